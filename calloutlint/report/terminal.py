"""A review on the terminal: every callout with findings drawn, its faults marked in place and explained."""

from collections.abc import Iterable, Sequence
from contextlib import suppress
from itertools import groupby
from pathlib import Path

from rich.text import Text

from calloutlint.model.callout import Callout
from calloutlint.model.drawing import Drawing, SheetLine
from calloutlint.redline.prove import Redline
from calloutlint.report.drawn import draw
from calloutlint.report.layout import Row, lay_out
from calloutlint.report.marks import Mark, Place, places
from calloutlint.report.proposed import changed_rows
from calloutlint.report.screen import Screen
from calloutlint.report.styles import ROLES
from calloutlint.report.tally import show_tally
from calloutlint.report.words import counted
from calloutlint.review import Judged, Review

INDENT = 6


def show_review(review: Review, screen: Screen) -> None:
    """Print a review: each drawing, then what stands on no drawing, and the tally."""
    for drawing in review.package.drawings:
        _show_drawing(drawing, [j for j in review.findings if j.finding.drawing is drawing], screen)
    loose = [judged for judged in review.findings if judged.finding.drawing is None]
    if loose:
        _show_heading(f"Package {review.package.name}", ["what stands on no single drawing"], screen)
        _show_findings(loose, {}, screen)
    show_tally(review, screen)


def _show_drawing(drawing: Drawing, findings: Sequence[Judged], screen: Screen) -> None:
    show_heading(drawing, screen)
    for callout, group in groupby(findings, key=lambda judged: judged.finding.callout):
        show_callout(callout, list(group), screen)
    clean = len(drawing.callouts) - len({id(j.finding.callout) for j in findings if j.finding.callout})
    words = _clean_words(clean, len(drawing.callouts))
    if words:
        screen.paragraph(words, ROLES.quiet, indent=1)
        screen.line()


def show_heading(drawing: Drawing, screen: Screen) -> None:
    """Print what a drawing is: number, revision, title, standard, unit, where it comes from."""
    name = [drawing.name]
    name += [f"revision {drawing.revision}"] if drawing.revision else []
    name += [f"sheet {drawing.sheet}"] if drawing.sheet else []
    name += [drawing.title] if drawing.title else []
    _show_heading("  ".join(name), [", ".join(_facts(drawing)), *drawing.remarks], screen)


def _show_heading(name: str, facts: Sequence[str], screen: Screen) -> None:
    screen.rule(ROLES.quiet)
    screen.paragraph(name, ROLES.heading, indent=1)
    for fact in facts:
        screen.paragraph(fact, ROLES.quiet, indent=1)
    screen.rule(ROLES.quiet)
    screen.line()


def _facts(drawing: Drawing) -> list[str]:
    standard = drawing.standard.written if drawing.standard else "no standard stated"
    unit = drawing.unit.value if drawing.unit else "no units stated"
    return [standard, unit, counted(len(drawing.callouts), "callout"), f"from {_near(drawing.file)}"]


def _near(file: str) -> str:
    """A file's path from the working folder where it stands inside it."""
    with suppress(ValueError, OSError):
        return str(Path(file).relative_to(Path.cwd()))
    return file


def _clean_words(clean: int, total: int) -> str:
    if not total:
        return "The sheet has no callouts."
    if clean == total:
        return f"{counted(total, 'callout')}, none with findings."
    if not clean:
        return "No callout is without findings." if total > 1 else ""
    return f"{counted(clean, 'other callout')} {'has' if clean == 1 else 'have'} no findings."


def show_callout(callout: Callout | None, findings: Sequence[Judged], screen: Screen) -> None:
    """Print a callout, drawn with its faults marked, and its findings; findings on no callout stand alone."""
    if callout is None:
        _show_findings(findings, {}, screen)
        return
    show_balloon(callout, screen)
    rows = lay_out(callout, screen.glyphs.spelling)
    marked, letters = _marked(rows, findings)
    screen.lines(draw(rows, marked, screen.glyphs, screen.width - INDENT), INDENT)
    screen.line()
    _show_findings(findings, letters, screen, rows)


def show_balloon(callout: Callout, screen: Screen) -> None:
    """Print a callout's balloon and where it stands."""
    place = [f"zone {callout.zone}"] if callout.zone else []
    place += [f"line {callout.source[0].number}"] if callout.source else []
    head = Text(f" ({screen.spell(callout.balloon)})", ROLES.balloon).append("  ")
    screen.paragraph(", ".join(place), ROLES.quiet, head=head)
    screen.line()


def _marked(rows: Sequence[Row], findings: Iterable[Judged]) -> tuple[dict[Place, list[Mark]], dict[int, str]]:
    """Where each mark goes, and the letter of each finding by its place in `findings`."""
    marked: dict[Place, list[Mark]] = {}
    letters: dict[int, str] = {}
    for number, judged in enumerate(findings):
        found = places(rows, judged.finding)
        if found:
            letters[number] = _letter(len(letters))
        for place in found:
            mark = Mark(letters[number], ROLES.grade(judged.finding.grade))
            marked.setdefault(place, []).append(mark)
    return marked, letters


def _letter(number: int) -> str:
    """From a to z, then A to Z, then a again: a callout with more findings is marked by colour and order."""
    alphabet = "abcdefghijklmnopqrstuvwxyzABCDEFGHIJKLMNOPQRSTUVWXYZ"
    return alphabet[number % len(alphabet)]


def _show_findings(
    findings: Sequence[Judged], letters: dict[int, str], screen: Screen, rows: Sequence[Row] = ()
) -> None:
    for number, judged in enumerate(findings):
        _show_finding(judged, letters.get(number, screen.glyphs.dot), screen)
        if judged.redline:
            _show_redline(judged.redline, judged.finding.callout, rows, screen)
        screen.line()


def _show_finding(judged: Judged, letter: str, screen: Screen) -> None:
    finding = judged.finding
    style = ROLES.grade(finding.grade)
    head = Text.assemble(
        (letter, style), "  ", (finding.grade.name, style), "  ", (finding.rule, ROLES.rule), "  "
    )
    screen.paragraph(finding.title, ROLES.title, indent=3, head=head)
    if isinstance(finding.part, SheetLine):
        screen.paragraph(f"Line {finding.part.number}: {' '.join(finding.part.text.split())}", indent=INDENT)
    screen.paragraph(finding.message, ROLES.message, indent=INDENT)
    if finding.assumed:
        screen.paragraph(f"Assumption: {finding.assumed.rstrip('.')}.", ROLES.message, indent=INDENT)


def _show_redline(redline: Redline, old: Callout | None, rows: Sequence[Row], screen: Screen) -> None:
    words = (
        "Proposed (proven: the corrected sheet, checked again, is rid of this):"
        if redline.proven
        else "Proposed (not proven: the corrected sheet, checked again, keeps this or gains another finding):"
    )
    screen.paragraph(words, ROLES.corrected if redline.proven else ROLES.quiet, indent=INDENT)
    corrected = lay_out(redline.callout, screen.glyphs.spelling, like=old)
    changed, marked = changed_rows(corrected, rows, Mark("", ROLES.corrected))
    screen.lines(draw(changed, marked, screen.glyphs, screen.width - INDENT), INDENT)
