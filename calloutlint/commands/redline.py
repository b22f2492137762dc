"""`redline`: shows the corrections, and on request writes the proven ones into the sheets."""

import sys
from argparse import Namespace
from collections.abc import Sequence
from itertools import groupby
from pathlib import Path
from typing import TYPE_CHECKING

from calloutlint.commands.arguments import (
    Subparsers,
    house_option,
    paths_argument,
    plain_option,
    reader_may_leave,
    standard_option,
)
from calloutlint.commands.check import read, reviewed, rules_for, status

if TYPE_CHECKING:
    from calloutlint.model.drawing import Package
    from calloutlint.redline.settle import Correction
    from calloutlint.rulebook.rulebook import Rulebook


def add(commands: Subparsers) -> None:
    """Add `redline` to the commands."""
    parser = commands.add_parser(
        "redline",
        help="show the corrections, or write them into the sheets",
        description="Show the correction of each finding that has one; --incorporate writes the proven ones "
        "into the sheets and touches nothing else in them.",
        epilog="Exit status: as for 'check'; with --incorporate, of the sheets as they are afterwards.",
    )
    paths_argument(parser)
    parser.add_argument(
        "--incorporate", action="store_true", help="write the proven corrections into the sheets"
    )
    house_option(parser)
    standard_option(parser)
    plain_option(parser)
    parser.set_defaults(run=run)


def run(options: Namespace) -> int:
    """Show or write the corrections; the exit status."""
    from calloutlint.report.redlines import show_incorporated, show_redlines
    from calloutlint.report.screen import Screen

    screen = Screen(sys.stdout, plain=options.plain)
    package = read(options)
    rulebook = rules_for(package, options.house)
    if not options.incorporate:
        outcome = reviewed(package, rulebook, options)
        with reader_may_leave():
            show_redlines(outcome, screen)
        return status(outcome)
    written, by_hand = _incorporate(package, rulebook)
    with reader_may_leave():
        show_incorporated(written, by_hand, screen)
    return status(reviewed(read(options), rulebook, options))


def _incorporate(
    package: "Package", rulebook: "Rulebook"
) -> "tuple[Sequence[Correction], Sequence[Correction]]":
    """Write the corrections; those written, and those that have to be made by hand."""
    from calloutlint.redline.incorporate import incorporate
    from calloutlint.redline.settle import settle

    corrections = settle(package, rulebook.check)
    left: set[int] = set()
    for drawing, group in groupby(corrections, key=lambda correction: correction.drawing):
        changes = [(correction.old, correction.new) for correction in group]
        left.update(id(callout) for callout in incorporate(Path(drawing.file), drawing.unit, changes))
    by_hand = [correction for correction in corrections if id(correction.old) in left]
    return [correction for correction in corrections if id(correction.old) not in left], by_hand
