"""`demo`: reviews the package that ships with the program."""

from argparse import Namespace

from calloutlint.commands.arguments import Subparsers
from calloutlint.commands.check import check_reports, review_options, reviewed, rules_for, show_and_report


def add(commands: Subparsers) -> None:
    """Add `demo` to the commands."""
    parser = commands.add_parser(
        "demo",
        help="check the demo package that ships with the program",
        description="Check the demo package, an invented waterworks assembly with real mistakes in it.",
    )
    review_options(parser)
    parser.set_defaults(run=run)


def run(options: Namespace) -> int:
    """Review the demo package; the exit status."""
    from calloutlint.reading.package import demo_package

    check_reports(options)
    package = demo_package()
    return show_and_report(reviewed(package, rules_for(package), options), options)
