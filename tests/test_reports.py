"""Whole reports, compared letter by letter with those kept in cases/reports.

The findings are made up there, so that no change of a rule changes a report. To write the kept reports anew
after a change of their form, run this file; then read what changed.
"""

import io
import os
import tomllib
from collections.abc import Iterator
from dataclasses import fields, is_dataclass, replace
from pathlib import Path
from typing import Any
from unittest.mock import patch

import pytest

from calloutlint import __version__
from calloutlint.callouts.parse import parse_callout
from calloutlint.model.callout import Callout
from calloutlint.model.drawing import Drawing, Package
from calloutlint.model.source import SourceLine, Span
from calloutlint.reading.sheet import parse_sheet
from calloutlint.redline.prove import Redline
from calloutlint.report.record import record_text
from calloutlint.report.screen import Screen
from calloutlint.report.terminal import show_review
from calloutlint.review import Judged, Review
from calloutlint.rulebook.finding import GRADES, Finding

CASES = Path(__file__).parent / "cases" / "reports"
FORMS = ("unicode-80.txt", "unicode-120.txt", "plain-80.txt", "plain-120.txt", "colour-80.ansi", "record.json")


def review_of(case: Path) -> Review:
    """The review that a case folder describes: its sheets, and the findings in its findings.toml."""
    stated = tomllib.loads((case / "findings.toml").read_text(encoding="utf-8"))
    sheets = sorted(path for path in case.glob("*.txt") if path.name not in FORMS)
    drawings = [parse_sheet(path.read_text(encoding="utf-8"), path.name) for path in sheets]
    judged = tuple(
        _judged(entry, {drawing.name: drawing for drawing in drawings}) for entry in stated["finding"]
    )
    return Review(
        Package(stated["package"], tuple(drawings)), 81, "0123456789abcdef", GRADES[stated["gate"]], judged
    )


def _judged(entry: dict[str, Any], drawings: dict[str, Drawing]) -> Judged:
    drawing = drawings.get(entry.get("drawing", ""))
    callouts = drawing.callouts if drawing else ()
    callout = next((c for c in callouts if c.balloon == entry.get("balloon")), None)
    part: object = drawing and next((line for line in drawing.lines if line.number == entry.get("line")), None)
    span = None
    if callout and "marks" in entry:
        row, text = entry["marks"]
        start = callout.source[row].text.index(text)
        span = Span(row, start, start + len(text))
        part = next((inner for inner in _nested(callout.parts) if getattr(inner, "span", None) == span), None)
    finding = Finding(
        rule=entry["rule"],
        grade=GRADES[entry["grade"]],
        title=entry["title"],
        message=entry["message"],
        figures=entry.get("figures", {}),
        assumed=entry.get("assumed"),
        drawing=drawing,
        callout=callout,
        part=part,
        span=span,
    )
    return Judged(finding, _redline(entry, drawing, callout))


def _redline(entry: dict[str, Any], drawing: Drawing | None, callout: Callout | None) -> Redline | None:
    if "redline" not in entry or drawing is None or callout is None:
        return None
    lines = entry["redline"]
    source = tuple(SourceLine(number, 0, line) for number, line in enumerate(lines, start=1))
    new = replace(callout, parts=parse_callout(lines, drawing.unit), source=source)
    return Redline("\n".join(lines), entry["proven"], new)


def _nested(part: object) -> Iterator[object]:
    if isinstance(part, tuple):
        for item in part:
            yield from _nested(item)
    elif is_dataclass(part):
        yield part
        for field in fields(part):
            yield from _nested(getattr(part, field.name))


def report(review: Review, form: str) -> str:
    """The report of a review in one of the forms."""
    if form == "record.json":
        return record_text(review).replace(f'"version": "{__version__}"', '"version": "…"')
    look, _, width = form.partition(".")[0].partition("-")
    stream = io.StringIO()
    colour = {"FORCE_COLOR": "1", "TERM": "xterm-16color"} if look == "colour" else {}
    with patch.dict(os.environ, colour, clear=True):
        show_review(review, Screen(stream, plain=look == "plain", width=int(width)))
    return stream.getvalue()


def cases() -> list[Path]:
    return sorted(path.parent for path in CASES.glob("*/findings.toml"))


@pytest.mark.parametrize("form", FORMS)
@pytest.mark.parametrize("case", cases(), ids=lambda case: case.name)
def test_a_report_is_what_is_kept(case: Path, form: str) -> None:
    assert report(review_of(case), form) == (case / form).read_text(encoding="utf-8")


@pytest.mark.parametrize("width", [40, 80])
def test_no_line_ends_in_blanks(width: int) -> None:
    sheet = parse_sheet("drawing: WG-9\n1) ⏥ | .003\n", "wg-9.txt")
    finding = Finding(
        "WEIR-01", GRADES["observation"], "A title", "A message.", {}, None, sheet, sheet.callouts[0]
    )
    review = Review(Package("Weir", (sheet,)), 81, "5eed", GRADES["major"], (Judged(finding),))
    told = report(review, f"unicode-{width}.txt").splitlines()
    assert told == [line.rstrip() for line in told]


@pytest.mark.parametrize("case", cases(), ids=lambda case: case.name)
def test_a_plain_report_is_ascii(case: Path) -> None:
    assert report(review_of(case), "plain-80.txt").isascii()


@pytest.mark.parametrize("case", cases(), ids=lambda case: case.name)
@pytest.mark.parametrize("look", ["unicode", "plain"])
@pytest.mark.parametrize("width", [60, 80, 120])
def test_no_line_of_a_report_is_wider_than_the_screen(case: Path, look: str, width: int) -> None:
    lines = report(review_of(case), f"{look}-{width}.txt").splitlines()
    assert max(map(len, lines)) <= width


def rewrite() -> None:
    """Write every kept report anew."""
    for case in cases():
        for form in FORMS:
            (case / form).write_text(report(review_of(case), form), encoding="utf-8")


if __name__ == "__main__":
    rewrite()
