"""`demo`: reviews the package that ships with the program."""

from argparse import Namespace
from dataclasses import replace
from pathlib import Path
from typing import TYPE_CHECKING

from calloutlint.commands.arguments import Subparsers
from calloutlint.commands.check import check_reports, review_options, reviewed, rules_for, show_and_report

if TYPE_CHECKING:
    from calloutlint.model.drawing import Drawing


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
    package = replace(package, drawings=tuple(map(_shortly_named, package.drawings)))
    return show_and_report(reviewed(package, rules_for(package), options), options)


def _shortly_named(drawing: "Drawing") -> "Drawing":
    """The drawing with its file named as in the package: where that is installed says nothing of it."""
    return replace(drawing, file=f"demo/{Path(drawing.file).name}")
