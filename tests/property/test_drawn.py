"""Whatever stands in a sheet, its review can be shown: within the screen, in ASCII where that is asked for."""

import io
import os
from unittest.mock import patch

from hypothesis import given, settings
from hypothesis import strategies as st
from rich.cells import cell_len

from calloutlint.callouts.write import Style
from calloutlint.model.drawing import Package
from calloutlint.reading.sheet import parse_sheet
from calloutlint.report.drawn import draw
from calloutlint.report.layout import lay_out
from calloutlint.report.marks import Mark, places
from calloutlint.report.proposed import changed_rows
from calloutlint.report.record import record_text
from calloutlint.report.screen import NARROWEST, Screen
from calloutlint.report.styles import ASCII, UNICODE
from calloutlint.report.terminal import show_review
from calloutlint.review import Judged, Review
from calloutlint.rulebook.finding import Finding, Grade

PIECES = st.sampled_from(
    [
        "4X ⌀.281 +.007 -.002 THRU",
        "⌖ | ⌀.014 Ⓜ | A | B | C",
        "| ⌀.006 | A",
        "⟂ | .002 | A-B Ⓜ",
        "DATUM B",
        "A1 ⌀.50",
        "POSITON | .1 | A",
        ".250-20 UNC-2B ↧ .50",
        "⌴ ⌀.438 ↧ .25",
        "⏥ | | A",
        "⌓ | .012 Ⓤ .003 | A ALL AROUND",
    ]
)
NOISE = st.text(st.sampled_from("⌀⌖Ⓜ|.0123456789 AXx±+-()[]°軸\u0301\u202e\x1bé�"), max_size=60)
LINES = st.one_of(PIECES, NOISE, st.tuples(PIECES, NOISE).map(" ".join))
SHEETS = st.lists(st.lists(LINES, min_size=1, max_size=4), min_size=1, max_size=3).map(
    lambda callouts: (
        "units: inch\n\n" + "\n".join(f"{n}) " + "\n   ".join(c) for n, c in enumerate(callouts, 1))
    )
)
WIDTHS = st.integers(NARROWEST, 120)


def review_of(text: str) -> Review:
    """A review with a finding on every part of every callout of a sheet, which proposes the callout itself."""
    drawing = parse_sheet(text, "sheet.txt")
    found = [
        Finding(
            "WEIR-01",
            Grade.MAJOR,
            text[:90],
            text,
            {},
            text,
            drawing,
            callout,
            part,
            getattr(part, "span", None),
        )
        for callout in drawing.callouts
        for part in (*callout.parts, *callout.segments, callout)
    ]
    return Review(Package("p", (drawing,)), 1, "0", Grade.MAJOR, tuple(map(Judged, found)))


@given(SHEETS, WIDTHS, st.booleans())
@settings(max_examples=40)
def test_every_review_can_be_shown(text: str, width: int, plain: bool) -> None:
    stream = io.StringIO()
    with patch.dict(os.environ, {}, clear=True):
        show_review(review_of(text), Screen(stream, plain=plain, width=width))
    shown = stream.getvalue()
    assert max(map(cell_len, shown.split("\n"))) <= width
    assert shown.isascii() or not plain
    assert "\x1b" not in shown
    assert "\u202e" not in shown


@given(SHEETS)
@settings(max_examples=50)
def test_every_review_can_be_recorded(text: str) -> None:
    assert record_text(review_of(text)).endswith("}\n")


@given(SHEETS, SHEETS)
@settings(max_examples=50)
def test_every_correction_can_be_drawn(text: str, other: str) -> None:
    for old in parse_sheet(text, "a").callouts:
        for new in parse_sheet(other, "b").callouts:
            for glyphs, style in ((UNICODE, Style.UNICODE), (ASCII, Style.ASCII)):
                rows, marked = changed_rows(lay_out(new, style, like=old), lay_out(old, style), Mark("", ""))
                assert draw(rows, marked, glyphs, 60) or not new.parts


@given(SHEETS)
def test_a_part_that_is_drawn_can_be_pointed_at(text: str) -> None:
    for judged in review_of(text).findings:
        callout, part = judged.finding.callout, judged.finding.part
        if callout is not None and part is not callout and getattr(part, "span", None):
            assert places(lay_out(callout, Style.UNICODE), judged.finding)
