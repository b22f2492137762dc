"""`fit`: one joint worked out, forward or backward."""

import sys
from argparse import Namespace
from pathlib import Path

from calloutlint.commands.arguments import Parser, Subparsers, plain_option
from calloutlint.errors import CalloutlintError


def add(commands: Subparsers) -> None:
    """Add `fit` to the commands."""
    parser = commands.add_parser(
        "fit",
        help="work out one joint, forward or backward",
        description="Give two of fastener, hole and position, and get the third; give all three, and see "
        "whether they fit in the worst case. Each is callout text. Numbers are in inch or mm as they show: "
        ".281 is inch, 0.3 is mm, marks (in, mm) decide; the rest is in --units, else in the fastener's unit.",
        epilog="Exit status: 0 if it fits, 1 if it does not, 2 if it could not be worked out.",
    )
    three = parser.add_argument_group("two of these, or all three")
    three.add_argument("--fastener", metavar="TEXT", help="such as 'M6 ISO 4762' or '.250-20 UNC-2A'")
    three.add_argument("--hole", metavar="TEXT", help="the clearance hole with its limits: '⌀6.6 +0.15/0'")
    three.add_argument("--position", metavar="TEXT", help="its position tolerance: '⌀0.3 Ⓜ' or 'DIA .014 (M)'")
    _held_options(parser)
    parser.add_argument("--units", choices=("inch", "mm"), help="the unit of numbers that do not show theirs")
    parser.add_argument("--process", metavar="TEXT", help="standard deviations: 'location 0.05, size 0.02'")
    parser.add_argument(
        "--measured",
        nargs=2,
        metavar=("SIZE", "OFF"),
        help="decide on a hole of this size whose axis is off by this diameter",
    )
    parser.add_argument("--report", type=Path, metavar="FILE", help="also write the result to FILE.json")
    plain_option(parser)
    parser.set_defaults(run=run)


def _held_options(parser: Parser) -> None:
    held = parser.add_argument_group("how the fastener is held")
    either = held.add_mutually_exclusive_group()
    either.add_argument("--floating", action="store_true", help="it passes clearance holes only (the default)")
    either.add_argument(
        "--fixed",
        nargs="?",
        const="",
        metavar="POSITION",
        help="it is fixed in a hole of this position: '⌀0.2 Ⓟ 12'; without it, what is left is worked out",
    )
    reach = held.add_mutually_exclusive_group()
    reach.add_argument("--projection", metavar="LENGTH", help="how far it stands out of the part that fixes it")
    reach.add_argument("--thickness", metavar="LENGTH", help="the same, by the thickness of what is fastened")
    held.add_argument("--depth", metavar="LENGTH", help="smallest full thread or engagement in that part")


def run(options: Namespace) -> int:
    """Work out the joint; the exit status."""
    from calloutlint.commands.fit_task import work_out
    from calloutlint.report.fit import show_fit
    from calloutlint.report.screen import Screen

    if options.report:
        _check_report(options.report)
    sheet = work_out(options)
    show_fit(sheet, Screen(sys.stdout, plain=options.plain))
    if options.report:
        from calloutlint._whole import write_whole
        from calloutlint.report.fit_record import fit_record_text

        write_whole(options.report, fit_record_text(sheet).encode())
    return 0 if sheet.worked.fits else 1


def _check_report(path: Path) -> None:
    from calloutlint.report.files import check_report_path

    if path.suffix.lower() != ".json":
        raise CalloutlintError(f"--report: 'fit' writes .json, and '{path}' is none.")
    check_report_path(path)
