"""The rulebook on the terminal: the list, one rule in full, the facts, the proofs."""

from collections.abc import Sequence

from rich.text import Text

from calloutlint.report.screen import Screen
from calloutlint.report.styles import ROLES
from calloutlint.report.words import counted
from calloutlint.rulebook.finding import GRADES
from calloutlint.rulebook.house_change import HouseChange
from calloutlint.rulebook.proof import Proof
from calloutlint.rulebook.reference import FactLine, SubjectFacts
from calloutlint.rulebook.rule import Rule
from calloutlint.rulebook.rulebook import Rulebook
from calloutlint.rulebook.sheet import Case

_LABEL = 12


def show_list(rulebook: Rulebook, screen: Screen) -> None:
    """Print a line for each rule: its id, its grade, its title, and the standards where it is not for all."""
    ids = max((len(rule.id) for rule in rulebook.rules), default=0)
    grades = max(map(len, GRADES))
    everywhere = max((rule.sheet.holds for rule in rulebook.rules), key=len, default=[])
    for rule in rulebook.rules:
        head = Text.assemble(
            (rule.id.ljust(ids), ROLES.rule),
            "  ",
            (rule.sheet.grade.ljust(grades), ROLES.grade(rule.grade)),
            "  ",
        )
        limited = "" if set(rule.sheet.holds) == set(everywhere) else f" ({', '.join(rule.sheet.holds)})"
        screen.paragraph(rule.sheet.title + limited, head=head)
    screen.line()
    screen.paragraph(f"{counted(len(rulebook.rules), 'rule')}, digest {rulebook.digest[:12]}", ROLES.quiet)


def show_rule(rule: Rule, changes: Sequence[HouseChange], screen: Screen) -> None:
    """Print a rule with its cases, and what house sheets changed in it."""
    sheet = rule.sheet
    screen.paragraph(sheet.title, ROLES.title, head=Text(f"{rule.id}  ", ROLES.rule))
    screen.line()
    for change in changes:
        _entry("house", f"{change.told} (from {change.file})", screen)
    _entry("grade", sheet.grade, screen)
    _entry("examines", f"every {sheet.examine}", screen)
    _entry("holds under", ", ".join(sheet.holds), screen)
    _entry("basis", sheet.basis, screen)
    _entry("when", sheet.when or "always", screen)
    _entry("demands", sheet.demand, screen)
    _entry("says", sheet.say, screen)
    for name, amount in sheet.limits.items():
        _entry("limit", f"{name} = {amount}", screen)
    for variant in sheet.variant:
        changed = {
            "grade": variant.grade,
            "says": variant.say,
            "assumes": variant.assumed,
            "redline": variant.redline,
        }
        words = "; ".join(f"{key} {value}" for key, value in changed.items() if value)
        _entry("but", f"where {variant.when}: {words}", screen)
    _entry("assumes", sheet.assumed, screen)
    _entry("redline", sheet.redline, screen)
    _entry("yields to", ", ".join(sheet.yields_to), screen)
    _entry("why", sheet.why, screen)
    for number, case in enumerate(sheet.case, start=1):
        _show_case(number, case, screen)


def _entry(label: str, text: str, screen: Screen) -> None:
    if text:
        screen.paragraph(text.strip(), head=Text(label.ljust(_LABEL), ROLES.quiet), indent=2)


def _show_case(number: int, case: Case, screen: Screen) -> None:
    found = f"finds {', '.join(case.finds)}" if case.finds else "clean"
    screen.line()
    note = f" ({case.note})" if case.note else ""
    screen.paragraph(f"case {number}{note}: {found}", ROLES.heading, indent=2)
    sheets = case.package or {"": case.sheet or ""}
    for name, text in sheets.items():
        if name:
            screen.paragraph(name, ROLES.quiet, indent=4)
        for line in text.strip("\n").splitlines():
            screen.line(Text(f"    {screen.spell(line)}"))


def show_facts(subjects: Sequence[SubjectFacts], screen: Screen) -> None:
    """Print every fact by subject: its name, what it is, and its meaning."""
    for group in subjects:
        reached = "" if group.examined else "  (reached from others)"
        screen.line(Text.assemble((group.subject, ROLES.heading), (reached, ROLES.quiet)))
        screen.paragraph(_first_paragraph(group.doc), indent=2)
        for line in group.facts:
            screen.paragraph(_kind(line), ROLES.quiet, indent=2, head=Text(f"{line.name}  ", ROLES.rule))
            screen.paragraph(_first_paragraph(line.doc), indent=6)
        screen.line()


def _kind(line: FactLine) -> str:
    unit = (
        f" in the {line.unit}" if line.unit.startswith("drawing") else f" in {line.unit}" if line.unit else ""
    )
    words = f": {', '.join(line.words)}" if line.words else ""
    return f"{line.kind}{unit}{', may be unknown' if line.may_be_unknown else ''}{words}"


def _first_paragraph(doc: str) -> str:
    return " ".join(doc.partition("\n\n")[0].split())


def show_proofs(proofs: Sequence[Proof], screen: Screen) -> None:
    """Print what fails of each rule, and how many hold."""
    for proof in proofs:
        for failure in proof.failures:
            screen.paragraph(failure, head=Text(f"{proof.rule}  ", ROLES.critical))
    held = sum(proof.holds for proof in proofs)
    cases = sum(proof.cases for proof in proofs)
    words = f"{counted(len(proofs), 'rule')}, {counted(cases, 'case')}: "
    words += "every rule holds." if held == len(proofs) else f"{counted(len(proofs) - held, 'rule')} failed."
    screen.paragraph(words, ROLES.heading)
