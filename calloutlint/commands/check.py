"""`check`: reviews drawings and says what is wrong with them."""

import sys
from argparse import Namespace
from collections.abc import Sequence
from dataclasses import replace
from pathlib import Path
from typing import TYPE_CHECKING

from calloutlint.commands.arguments import (
    Parser,
    Subparsers,
    grade,
    house_option,
    paths_argument,
    plain_option,
    reader_may_leave,
    standard_option,
)
from calloutlint.errors import CalloutlintError

if TYPE_CHECKING:
    from calloutlint.model.drawing import Package
    from calloutlint.review import Review
    from calloutlint.rulebook.rulebook import Rulebook


def add(commands: Subparsers) -> None:
    """Add `check` to the commands."""
    parser = commands.add_parser(
        "check",
        help="check sheets and packages",
        description="Check callout sheets and drawing packages, and show every finding with its correction.",
        epilog="Exit status: 0 if nothing stands at the gate or above and everything was read, 1 if not, "
        "2 if the check could not be done.",
    )
    paths_argument(parser)
    review_options(parser)
    house_option(parser)
    standard_option(parser)
    parser.add_argument("--datums", action="store_true", help="show the datum scheme of each drawing instead")
    parser.set_defaults(run=run)


def review_options(parser: Parser) -> None:
    """The options that every command with a review has."""
    parser.add_argument(
        "--gate",
        type=grade,
        metavar="GRADE",
        help="the least grade that fails the run: critical, "
        "major, minor or observation (default: the package's, else major)",
    )
    parser.add_argument(
        "--report",
        type=Path,
        action="append",
        default=[],
        metavar="FILE",
        help="also write the review to FILE, as its suffix says: .json; may be given several times",
    )
    plain_option(parser)


def run(options: Namespace) -> int:
    """Check the drawings that the options name; the exit status."""
    check_reports(options)
    package = read(options)
    if options.datums:
        return _show_datums(package, options)
    return show_and_report(reviewed(package, rules_for(package, options.house), options), options)


def check_reports(options: Namespace) -> None:
    """Make sure that the reports asked for can be written, before any work is done."""
    if options.report:
        from calloutlint.report.files import check_report_path

        for path in options.report:
            check_report_path(path)


def read(options: Namespace) -> "Package":
    """The package that the options name."""
    from calloutlint.reading.package import read_package

    return with_standard(read_package(options.paths), options.standard)


def rules_for(package: "Package", house: Sequence[Path] = ()) -> "Rulebook":
    """The rules that ship, the package's own house rules and those of the folders given."""
    from calloutlint.rulebook.rulebook import load_rulebook

    return load_rulebook([*map(Path, package.house), *house])


def reviewed(package: "Package", rulebook: "Rulebook", options: Namespace) -> "Review":
    """The review of a package; the gate is that of the options, else the package's, else major."""
    from calloutlint.review import review
    from calloutlint.rulebook.finding import GRADES, Grade

    stated = getattr(options, "gate", None)
    if stated is None:
        stated = GRADES[package.gate] if package.gate else Grade.MAJOR
    return review(package, rulebook, stated)


def show_and_report(outcome: "Review", options: Namespace) -> int:
    """Show a review and write the reports asked for; the exit status."""
    from calloutlint.report.screen import Screen
    from calloutlint.report.terminal import show_review

    with reader_may_leave():
        show_review(outcome, Screen(sys.stdout, plain=options.plain))
    if options.report:
        from calloutlint.report.files import write_report

        for path in options.report:
            write_report(path, outcome)
    return status(outcome)


def status(outcome: "Review") -> int:
    """The exit status of a review: 1 if something stands at the gate or above, or was not read."""
    return 1 if outcome.at_gate or outcome.unread else 0


def with_standard(package: "Package", written: str | None) -> "Package":
    """The package with a standard for the drawings that state none.

    Raises:
        CalloutlintError: the standard is not known.
    """
    if written is None:
        return package
    from calloutlint.reading.standards import read_standard

    standard = read_standard(written)
    if standard.system is None:
        raise CalloutlintError(
            f"--standard: '{written}' is no standard that is known. "
            "Expected is a standard such as 'ASME Y14.5-2018' or 'ISO 1101'."
        )
    drawings = (
        drawing if drawing.standard else replace(drawing, standard=standard) for drawing in package.drawings
    )
    return replace(package, drawings=tuple(drawings))


def _show_datums(package: "Package", options: Namespace) -> int:
    """Show the datum scheme of each drawing."""
    from calloutlint.report.datums import show_datums
    from calloutlint.report.screen import Screen

    show_datums(package, Screen(sys.stdout, plain=options.plain))
    return 0
