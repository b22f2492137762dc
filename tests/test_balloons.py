"""Balloons written otherwise than `12)`: when they are taken for balloons, and when for sizes and counts.

How numbers and counts stand on exported sheets is common practice, no source.
"""

import pytest

from calloutlint.reading.layout import lay_out
from calloutlint.reading.sheet import parse_sheet
from calloutlint.reading.transcribe import transcribe

CALLOUTS = (
    "⏥ | .003\n      DATUM A",
    "BORE ⌀1.5000 +.0010 -.0000 THRU\n      ⟂ | ⌀.002 | A\n      DATUM B",
    "SURFACE\n      ⏥ | .004",
    "4X ⌀.281 +.007 -.002 THRU",
    "POSITON | ⌀.010 | A",
    "DIA .250 +.002 -.001",
    ".500 ±.005",
    "KNURL",
    "-C-",
)
HEAD = "ACTUATOR COVER\nunits: inch\nstandard: ASME Y14.5-2018\n"


def sheet(*tags: str) -> str:
    return HEAD + "\n".join(f"{tag}{callout}" for tag, callout in zip(tags, CALLOUTS, strict=False))


def balloons(text: str) -> list[str]:
    """The balloons of a sheet; of one whose balloons are not recognised, none."""
    layout = lay_out(text.splitlines())
    return [block.balloon for block in layout.blocks] if layout.style else []


def resembling(text: str) -> list[tuple[int, str | None]]:
    drawing = parse_sheet(text, "a")
    return [(line.number, line.reason) for line in drawing.lines if line.key is None]


@pytest.mark.parametrize(
    ("form", "name"),
    [
        ("{}. ", "1."),
        ("({}) ", "(1)"),
        ("[{}] ", "[1]"),
        ("{}: ", "1:"),
        ("{}\t", "1 and a tab"),
        ("  {} .  ".replace(" .", "."), "1."),
        ("{} C4. ", "1."),
        ("({} B12)   ", "(1)"),
    ],
)
def test_a_style_that_the_whole_sheet_keeps_to(form: str, name: str) -> None:
    numbers = [str(n) for n in range(1, len(CALLOUTS) + 1)]
    written = sheet(*(form.format(n) for n in numbers))
    drawing, usual = parse_sheet(written, "a"), parse_sheet(sheet(*(f"{n}) " for n in numbers)), "a")
    assert drawing.remarks == (f"balloons are written as {name}",)
    assert usual.remarks == ()
    assert [callout.balloon for callout in drawing.callouts] == numbers
    assert [callout.parts for callout in drawing.callouts] == [callout.parts for callout in usual.callouts]


def test_zone_and_place_of_another_style() -> None:
    first, second = parse_sheet("units: mm\n1 C4.  ⏥ | 0.1\n2.  ⌀5 +0.1 0 THRU", "a").callouts
    assert (first.zone, second.zone) == ("C4", None)
    assert (first.source[0].column, first.source[0].text) == (7, "⏥ | 0.1")


def test_numbers_may_leave_gaps_and_carry_letters() -> None:
    assert balloons("4. ⏥ | .003\n4A. ⌀.500 ±.003\n4.1: x\n7. ⌀.250 ±.003") == ["4", "4A", "7"]
    assert balloons("1) ⌀5\n") == []
    assert balloons("1: ⌀.500 ±.003\n1.9: ⌀.250 ±.003\n1.10: ⌀.250 ±.003") == ["1", "1.9", "1.10"]


def test_a_balloon_alone_on_its_line_in_another_style() -> None:
    text = "1.\n⏥ | .003\n\n2.\n⌀.500 ±.003"
    assert [callout.balloon for callout in parse_sheet(text, "a").callouts] == ["1", "2"]


@pytest.mark.parametrize(
    "text",
    [
        "1. ⌀.500 ±.003 THRU",  # one alone proves nothing
        "1. ±.005\n2. ±.005\n3. ±.005",
        "1.  ±.005\n2.  ±.005\n3.  ±.005",
        "1. +.002 -.000\n2. +.003 -.000",
        "1. THRU\n2. THRU\n3. MAX",
        "1. X .500\n2. x 45°",
        "1. REMOVE BURRS\n2. PAINT\n3. SEE SHEET 2",
        "⌀.500 ±.003 THRU\n1. BREAK EDGES .010\n2. FILLETS R.03",
        "2. ⌀.500 ±.003\n1. ⌀.250 ±.003",
        "(2) ⌀.500 ±.003 THRU\n(4) ⌀.281 ±.003 THRU",
        "(1) ⌀.500 ±.003 THRU\n(2) ⌀.281 ±.003 THRU",
        "(1) ⌀.500 ±.003 THRU\n(2) ⌀.281 ±.003 THRU\n(4) ⌀.281 ±.003 THRU",
        "(1.25)\n(2.50)\n(3.75)",
        "(4) PLACES\n(6) PLACES",
        "4 X ⌀.5 ±.003\n5 X ⌀.25 ±.003",
        "4X ⌀.5 ±.003\n5X ⌀.25 ±.003",
        "[2.000]\n[3.000]\n[4.000]",
        "[10]\n⌖ | 0.1 | A\n[20]\n⌖ | 0.2 | A",
        "[10] ⌖ | 0.1 | A\n[20] ⌖ | 0.2 | A",
        ".250 ±.003\n.500 ±.003",
        "1.250 ±.003\n2.500 ±.003",
        "25 ±0.1\n30 ±0.1",
        "2\t⌀.500 ±.003\n4\t⌀.281 ±.003",
        "1\t±.003\n2\t±.003\n3\t±.003",
        "1:20\n1:50",
    ],
)
def test_sizes_counts_and_notes_are_no_balloons(text: str) -> None:
    assert balloons(text) == []
    assert parse_sheet(text, "a").remarks == ()


@pytest.mark.parametrize("tag", ["4. ", "4: ", "(4) ", "[4] ", "4\t"])
def test_one_balloon_in_another_style_is_said(tag: str) -> None:
    text = f"3) ⌀.500 ±.003\n{tag}⌀.250 ±.003 THRU\n5) ⌀.750 ±.003"
    assert [len(callout.source) for callout in parse_sheet(text, "a").callouts] == [2, 1]
    assert resembling(text) == [(2, "looks like a balloon in another style; write 4)")]


def test_several_balloons_in_another_style_are_said() -> None:
    text = "3) ⌀.500 ±.003\n4. ⌀.250 ±.003 THRU\n   ⌖ | ⌀.01 | A\n5. ⏥ | .003\n"
    assert [number for number, _ in resembling(text)] == [2, 4]


@pytest.mark.parametrize(
    "text",
    [
        "3) SURFACE\n   (4) ⌀.281 ±.003 THRU",  # four holes
        "3) SURFACE\n   (4) ⌀.281 ±.003 THRU\n4) ⏥ | .003",
        "3) SURFACE\n   4. ⌀.281 ±.003 THRU\n4) ⏥ | .003",
        "3) ⌀.500 ±.003\n   4. PLACES",
        "3) ⌀.500\n   4. ±.003",
        "3) ⌀.500 ±.003\n   (6) ⌀.281 ±.003 THRU\n7) ⏥ | .003",
        "3) 4X ⌀.500 ±.003\n   (4.000)\n   [4] x [5]\n5) ⏥ | .003",
    ],
)
def test_counts_and_sizes_below_a_callout_are_not_said(text: str) -> None:
    assert resembling(text) == []


def test_a_line_in_another_style_is_transcribed_once() -> None:
    text = "units: inch\n3) ⌀.500 ±.003\n4. ⌀.250 ±.003 THRU\n"
    assert transcribe(parse_sheet(text, "a")).count(".250") == 1
