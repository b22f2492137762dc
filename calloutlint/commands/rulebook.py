"""`rulebook`: the rules, the facts that they can ask, and the proof of each by its own cases."""

import sys
from argparse import Namespace
from pathlib import Path

from calloutlint.commands.arguments import Subparsers, house_option, plain_option
from calloutlint.errors import CalloutlintError


def add(commands: Subparsers) -> None:
    """Add `rulebook` and what it can do to the commands."""
    parser = commands.add_parser(
        "rulebook", help="list, show and prove the rules", description="The rules in force."
    )
    actions = parser.add_subparsers(title="actions", metavar="ACTION", required=True)
    listing = actions.add_parser("list", help="every rule in a line", description="List every rule in force.")
    house_option(listing)
    plain_option(listing)
    listing.set_defaults(run=run_list)
    showing = actions.add_parser("show", help="one rule in full", description="Show a rule with its cases.")
    showing.add_argument("id", metavar="ID", help="the rule, such as FIT-06")
    house_option(showing)
    plain_option(showing)
    showing.set_defaults(run=run_show)
    facts = actions.add_parser(
        "facts", help="what rules can ask", description="List the facts that rules can ask."
    )
    facts.add_argument("subject", metavar="SUBJECT", nargs="?", help="only those of one subject, such as frame")
    plain_option(facts)
    facts.set_defaults(run=run_facts)
    proving = actions.add_parser(
        "prove",
        help="run every rule's own cases",
        description="Run the cases inside the rule sheets: those that ship, and those in DIR.",
        epilog="Exit status: 0 if every rule holds, 1 if not, 2 if a rule sheet is broken.",
    )
    proving.add_argument("folders", type=Path, nargs="*", metavar="DIR", help="a folder of house rule sheets")
    plain_option(proving)
    proving.set_defaults(run=run_prove)


def run_list(options: Namespace) -> int:
    """List the rules; the exit status."""
    from calloutlint.report.rules import show_list
    from calloutlint.report.screen import Screen
    from calloutlint.rulebook.rulebook import load_rulebook

    show_list(load_rulebook(options.house), Screen(sys.stdout, plain=options.plain))
    return 0


def run_show(options: Namespace) -> int:
    """Show one rule; the exit status."""
    from calloutlint.report.rules import show_rule
    from calloutlint.report.screen import Screen
    from calloutlint.rulebook.rulebook import load_rulebook
    from calloutlint.rulebook.text_error import nearest

    rulebook = load_rulebook(options.house)
    rules = {rule.id: rule for rule in (*rulebook.as_written, *rulebook.rules)}
    wanted = options.id.upper()
    if wanted not in rules:
        raise CalloutlintError(
            f"There is no rule '{options.id}'{nearest(wanted, rules)}. 'calloutlint rulebook list' lists them."
        )
    changes = [change for change in rulebook.changes if change.rule == wanted]
    show_rule(rules[wanted], changes, Screen(sys.stdout, plain=options.plain))
    return 0


def run_facts(options: Namespace) -> int:
    """List the facts; the exit status."""
    from calloutlint.report.rules import show_facts
    from calloutlint.report.screen import Screen
    from calloutlint.rulebook.reference import facts
    from calloutlint.rulebook.text_error import nearest

    groups = {group.subject: group for group in facts()}
    wanted = options.subject
    if wanted is not None and wanted not in groups:
        raise CalloutlintError(f"There is no subject '{wanted}'{nearest(wanted, groups)}.")
    shown = list(groups.values()) if wanted is None else [groups[wanted]]
    show_facts(shown, Screen(sys.stdout, plain=options.plain))
    return 0


def run_prove(options: Namespace) -> int:
    """Prove the rules; the exit status."""
    from calloutlint.report.rules import show_proofs
    from calloutlint.report.screen import Screen
    from calloutlint.rulebook.proof import prove
    from calloutlint.rulebook.rulebook import load_rulebook

    proofs = prove(load_rulebook(options.folders))
    show_proofs(proofs, Screen(sys.stdout, plain=options.plain))
    return 0 if all(proof.holds for proof in proofs) else 1
