"""Sheets: balloon tags, untagged exports, comments, stray lines, decimal commas, places in the file."""

from pathlib import Path

import pytest

from calloutlint.model.callout import Words
from calloutlint.model.drawing import Drawing
from calloutlint.model.source import SourceLine
from calloutlint.reading.layout import lay_out
from calloutlint.reading.sheet import has_decimal_commas, parse_sheet, read_sheet
from calloutlint.units import Unit

TAGGED = """\
# cover of the sluice gate actuator
drawing:    SG-2207
revision:   B
standard:   ASME Y14.5-2018
units:      inch
tolerances: .XX ±.01, .XXX ±.005, angles ±1°
fastener:   .250-20 UNC-2A socket head cap screw

1)    ⏥ | .003
      DATUM A
4 C4) 4X ⌀.281 +.007 -.002 THRU
      # pattern of the cover screws
      ⌖ | ⌀.014 Ⓜ | A | B | C

note:       REMOVE BURRS
joint:      cover screws = 4 with .250-20 UNC-2A socket head cap screw
"""

UNTAGGED = """\
UNITS: INCH

SURFACE FLATNESS|.003 -A-
%%c1.000 +.002 -.000 THRU PERP|%%c.002|A -B-
.250%%p.003 SLOT
POS|.006 (M)|A|B
-C-
2X .3125-18 UNC-2B .62 DEEP
"""


def blocks(text: str) -> list[tuple[str, str | None, list[str]]]:
    return [
        (block.balloon, block.zone, [line.text for line in block.lines])
        for block in lay_out(text.splitlines()).blocks
    ]


def strays(text: str) -> list[str]:
    return [line.text for line in lay_out(text.splitlines()).strays]


def unknown(drawing: Drawing) -> list[tuple[int, str | None, str | None]]:
    return [(line.number, line.key, line.reason) for line in drawing.lines if not line.known]


def test_a_tagged_sheet() -> None:
    drawing = parse_sheet(TAGGED, "cover.txt")
    assert (drawing.number, drawing.revision, drawing.unit) == ("SG-2207", "B", Unit.INCH)
    assert drawing.notes == ("REMOVE BURRS",)
    assert [joint.name for joint in drawing.joints] == ["cover screws"]
    assert [(callout.balloon, callout.zone) for callout in drawing.callouts] == [("1", None), ("4", "C4")]
    assert unknown(drawing) == []


def test_a_callout_knows_its_lines_and_columns() -> None:
    first, second = parse_sheet(TAGGED, "cover.txt").callouts
    assert first.source == (SourceLine(9, 6, "⏥ | .003"), SourceLine(10, 6, "DATUM A"))
    assert second.source == (
        SourceLine(11, 6, "4X ⌀.281 +.007 -.002 THRU"),
        SourceLine(13, 6, "⌖ | ⌀.014 Ⓜ | A | B | C"),
    )


@pytest.mark.parametrize("newline", ["\n", "\r\n", "\r"])
def test_line_ends_make_no_difference(newline: str) -> None:
    plain, other = parse_sheet(TAGGED, "a"), parse_sheet(TAGGED.replace("\n", newline), "a")
    assert other == plain
    assert [callout.source for callout in other.callouts] == [callout.source for callout in plain.callouts]


@pytest.mark.parametrize(
    ("line", "balloon", "zone", "text"),
    [
        ("12) ⌀5", "12", None, "⌀5"),
        ("12 C4) ⌀5", "12", "C4", "⌀5"),
        ("12  4C) ⌀5", "12", "4C", "⌀5"),
        ("4.1) ⌀5", "4.1", None, "⌀5"),
        ("4A) ⌀5", "4A", None, "⌀5"),
        ("  7)⌀5", "7", None, "⌀5"),
        ("7)", "7", None, ""),
    ],
)
def test_balloon_tags(line: str, balloon: str, zone: str | None, text: str) -> None:
    assert blocks(line) == [(balloon, zone, [text])]


@pytest.mark.parametrize("line", ["(1.25)", "4X ⌀.5 (REF)", "25 H7 (+0.021 0)", ".5)", "24.993) REF"])
def test_what_is_no_tag(line: str) -> None:
    assert blocks(f"1) ⌀5\n   {line}") == [("1", None, ["⌀5", line])]


def test_a_tag_alone_on_its_line_opens_what_follows() -> None:
    assert blocks("1)\n   ⌀5\n2)\n\n3) ⌀6") == [("1", None, ["⌀5"]), ("2", None, [""]), ("3", None, ["⌀6"])]


def test_a_balloon_used_twice_stays_two_callouts() -> None:
    assert blocks("1) ⌀5\n1) ⌀6") == [("1", None, ["⌀5"]), ("1", None, ["⌀6"])]


def test_a_blank_line_and_a_key_line_end_a_callout() -> None:
    text = "1) ⌀5\n\nDATUM A\n2) ⌀6\nnote: B\nDATUM C"
    assert [lines for _, _, lines in blocks(text)] == [["⌀5"], ["⌀6"]]
    assert strays(text) == ["DATUM A", "DATUM C"]


def test_a_stray_line_and_an_unknown_key_say_why() -> None:
    drawing = parse_sheet("colour: blue\nsee sheet 2\n1) ⌀5\n   ⏥ | 0.1\nnoet: DEBURR\n", "a")
    stray = "the line belongs to no callout; a balloon such as 12) opens one"
    assert unknown(drawing) == [
        (1, "colour", "'colour' is no title-block key that is known"),
        (2, None, stray),
        (5, "noet", "'noet' is no title-block key that is known"),
    ]


@pytest.mark.parametrize(
    ("line", "what"),
    [
        ("⌖ | ⌀.014 Ⓜ | A", "frame"),
        ("   POS|.014(M)|A", "frame"),
        ("   | ⌀.006 | A", "frame"),
        ("   DATUM A", "datum"),
        ("-A-", "datum"),
    ],
)
def test_a_blank_line_between_a_callout_and_its_frame_is_said(line: str, what: str) -> None:
    drawing = parse_sheet(f"1) ⌀.500 ±.003 THRU\n\n{line}\n{line}\nnote: PAINT\n{line}", "a")
    parted = f"a {what} without a callout: no blank line may stand between a callout and its {what}"
    stray = "the line belongs to no callout; a balloon such as 12) opens one"
    assert [reason for _, _, reason in unknown(drawing)] == [parted, parted, stray]


@pytest.mark.parametrize("line", ["units:mm", "UNITS : mm", "  Units:\tmm"])
def test_a_key_that_is_known_needs_no_space(line: str) -> None:
    assert parse_sheet(line, "a").unit is Unit.MM


def test_an_old_end_of_file_mark_is_no_line() -> None:
    assert parse_sheet("units: mm\r\n1) ⌀5 +0.1 0\r\n\x1a", "a").lines[-1].key == "units"


def test_text_with_a_colon_inside_a_callout_stays_in_it() -> None:
    assert blocks("1) ⌀5\n   SEE DETAIL: X") == [("1", None, ["⌀5", "SEE DETAIL: X"])]


def test_an_export_with_a_callout_a_line() -> None:
    assert [(balloon, lines) for balloon, _, lines in blocks(UNTAGGED)] == [
        ("1", ["SURFACE FLATNESS|.003 -A-"]),
        ("2", ["%%c1.000 +.002 -.000 THRU PERP|%%c.002|A -B-"]),
        ("3", [".250%%p.003 SLOT", "POS|.006 (M)|A|B", "-C-"]),
        ("4", ["2X .3125-18 UNC-2B .62 DEEP"]),
    ]


def test_blank_lines_part_the_callouts_of_an_untagged_sheet() -> None:
    text = "units: mm\n\n⏥ | 0.1\nDATUM A\n\n\n⌀5 +0.1 0 THRU\n⌴ ⌀9 ↧ 5\n\nnote: DEBURR\n"
    assert [(balloon, lines) for balloon, _, lines in blocks(text)] == [
        ("1", ["⏥ | 0.1", "DATUM A"]),
        ("2", ["⌀5 +0.1 0 THRU", "⌴ ⌀9 ↧ 5"]),
    ]


def test_blank_lines_round_key_lines_part_nothing() -> None:
    text = "units: mm\n\ndrawing: A\n\n⌀5 +0.1 0\n⌀6 +0.1 0\n\nnote: DEBURR\n\nnote: PAINT\n"
    assert [lines for _, _, lines in blocks(text)] == [["⌀5 +0.1 0"], ["⌀6 +0.1 0"]]


@pytest.mark.parametrize("line", ["# a remark", "#", "#\ta remark", "   # a remark in a callout"])
def test_comments(line: str) -> None:
    assert blocks(f"1) ⌀5\n{line}\n   DATUM A") == [("1", None, ["⌀5", "DATUM A"])]


@pytest.mark.parametrize("line", ["#10-32 UNF-2B", "   # 7 DRILL"])
def test_a_number_size_is_no_comment(line: str) -> None:
    assert blocks(f"1) ⌀5\n{line}") == [("1", None, ["⌀5", line.strip()])]


@pytest.mark.parametrize(
    ("text", "expected"),
    [
        ("⌀6,6 +0,2 0", True),
        ("M6x1,5\n12 ±0,025", True),
        ("tolerances: X,X ±0,2\n⌀6", True),
        ("1,500 ±.010", False),
        ("⌀6.6 +0.2 0\n1,25", False),
        ("⌀6,6\n⌀6,7\n⌀6.8", True),
        (".500 ±.005\nA1,2", False),
        ("A, B", False),
    ],
)
def test_a_decimal_comma_is_a_property_of_the_sheet(text: str, expected: bool) -> None:
    assert has_decimal_commas(lay_out(text.splitlines())) is expected


def test_a_sheet_with_decimal_commas_reads_as_one_with_points() -> None:
    points = """\
standard: ISO 8015
units: mm
tolerances: X.X ±0.2
fastener: M6x0.75 hex head bolt
joint: lid = 1 with M6x0.75 hex head bolt, thickness 4.5

1) ⌀6.6 +0.2 0 THRU
   ⌖ | ⌀0.3 Ⓜ | A | B
2) 12.5 ±0.1
"""
    assert parse_sheet(points.replace(".", ","), "a") == parse_sheet(points, "a")


def test_equal_text_is_read_the_same_wherever_it_stands() -> None:
    drawing = parse_sheet("1) ⌀5 +0.1 0 THRU\n2)   ⌀5 +0.1 0 THRU", "a")
    assert drawing.callouts[0].parts == drawing.callouts[1].parts
    assert drawing.callouts[1].source[0].column == 5


def test_one_bad_callout_hides_no_other() -> None:
    good = parse_sheet("units: mm\n1) ⌀5 +0.1 0 THRU\n2) ⌖ | ⌀0.2 Ⓜ | A", "a").callouts
    bad = parse_sheet("units: mm\n1) ⌀5 +0.1 0 THRU\n9) ⌀..5 (( ⌖ | | {}[\n2) ⌖ | ⌀0.2 Ⓜ | A", "a").callouts
    assert (bad[0], bad[2]) == good
    assert bad[1].unread


def test_plain_words_are_kept() -> None:
    (callout,) = parse_sheet("1) BEARING BORE ⌀5 +0.1 0", "a").callouts
    assert any(isinstance(part, Words) for part in callout.parts)


def test_the_encoding_is_remarked(tmp_path: Path) -> None:
    sheet = tmp_path / "übersicht 1.txt"
    sheet.write_bytes("units: mm\n1) Ø6.6 ±0.2\n".encode("cp1252"))
    drawing = read_sheet(sheet)
    assert drawing.remarks == ("read as Windows-1252",)
    assert drawing.callouts == parse_sheet("units: mm\n1) ⌀6.6 ±0.2\n", "a").callouts
    assert drawing.file == str(sheet)
