"""Corrections on the terminal: those proposed, and those written into the sheets."""

from collections.abc import Sequence
from itertools import groupby

from calloutlint.redline.settle import Correction
from calloutlint.report.drawn import draw
from calloutlint.report.layout import lay_out
from calloutlint.report.marks import Mark
from calloutlint.report.proposed import changed_rows
from calloutlint.report.screen import Screen
from calloutlint.report.styles import ROLES
from calloutlint.report.terminal import INDENT, show_balloon, show_callout, show_heading
from calloutlint.report.words import counted
from calloutlint.review import Review

NOTHING_LEFT = "Nothing to write: no proven correction is left."


def show_redlines(review: Review, screen: Screen) -> None:
    """Print each finding that has a correction with the callout it is about, and how many are proven."""
    correctable = [judged for judged in review.findings if judged.redline]
    for drawing in review.package.drawings:
        here = [judged for judged in correctable if judged.finding.drawing is drawing]
        if here:
            show_heading(drawing, screen)
        for callout, group in groupby(here, key=lambda judged: judged.finding.callout):
            show_callout(callout, list(group), screen)
    screen.rule(ROLES.quiet)
    proven = sum(bool(judged.redline and judged.redline.proven) for judged in correctable)
    told = f"{counted(len(review.findings), 'finding').capitalize()}"
    if correctable:
        told += f", {counted(len(correctable), 'correction')}, {proven or 'none'} of them proven"
    elif review.findings:
        told += ", none with a correction"
    screen.paragraph(f"{told}.", ROLES.heading, indent=1)
    if proven:
        screen.paragraph("'redline --incorporate' writes the proven ones into the sheets.", indent=1)


def show_incorporated(corrections: Sequence[Correction], by_hand: Sequence[Correction], screen: Screen) -> None:
    """Print each callout as it was written into its sheet, and which are left to be corrected by hand."""
    _show_corrected(corrections, screen)
    files = len({correction.drawing.file for correction in corrections})
    if corrections:
        told = f"{counted(len(corrections), 'callout')} corrected in {counted(files, 'sheet')}."
    else:
        told = "Nothing was written: no proven correction can be placed." if by_hand else NOTHING_LEFT
    screen.paragraph(told, ROLES.heading, indent=1)
    for correction in by_hand:
        place = f"{correction.drawing.name}, balloon {correction.new.balloon}"
        screen.paragraph(
            f"To be corrected by hand, since its text cannot be changed in place: {place}.", indent=1
        )


def _show_corrected(corrections: Sequence[Correction], screen: Screen) -> None:
    for drawing, group in groupby(corrections, key=lambda correction: correction.drawing):
        show_heading(drawing, screen)
        for correction in group:
            show_balloon(correction.new, screen)
            old = lay_out(correction.old, screen.glyphs.spelling)
            new = lay_out(correction.new, screen.glyphs.spelling, like=correction.old)
            changed, marked = changed_rows(new, old, Mark("", ROLES.corrected))
            screen.lines(draw(changed, marked, screen.glyphs, screen.width - INDENT), INDENT)
            screen.line()
