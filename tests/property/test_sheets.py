"""Properties of sheets: nothing is lost, nothing crashes, and canonical text reads back the same."""

from hypothesis import given
from hypothesis import strategies as st

from calloutlint.callouts.write import Style
from calloutlint.errors import SheetError
from calloutlint.reading.encoding import decode, encode, split_lines
from calloutlint.reading.joints import JointTextError, parse_joint
from calloutlint.reading.sheet import parse_sheet
from calloutlint.reading.transcribe import joint_text, transcribe

KEYS = st.sampled_from(
    [
        "drawing: SG-1",
        "REV: B",
        "units: mm",
        "units: inch",
        "standard: ISO 8015",
        "standard: ASME Y14.5M-1994",
        "tolerances: X.X ±0.2, angles ±0°30'",
        "tolerances: ISO 2768-mK",
        "tolerances: .XX ±.01; 2 PLACE ±.02, castings by foundry",
        "tolerances: " + ", ".join(f".XX ±.0{digit}" for digit in "123456789" * 5),
        "tolerances: " + "as usual, " * 60 + "x",
        "fastener: M6 socket head cap screw ISO 4762",
        "fastener: ⌀6 m6 dowel pin",
        "joint: lid screws = 1 with M6 hex head bolt, fixed in SG-2:4, thickness 12 mm",
        "process: location 0.05, size 0.02",
        "note: DEBURR",
        "material: BRONZE",
        "colour: blue",
        "joint: nothing",
    ]
)
LINES = st.sampled_from(
    [
        "⌀6.6 +0.2 0 THRU",
        "4X ⌀.281 +.007 -.002 THRU",
        "⌴ ⌀11 ↧ 6.5",
        "M6x1-6H ↧ 12",
        "SLOT 12 H9",
        "⏥ | 0.05",
        "⌖ | ⌀0.4 Ⓜ | A | B | C",
        "| ⌀0.1 Ⓜ | A",
        "DATUM A",
        "-B-",
        "SURFACE",
        "[25.4]",
        "POSITON | ⌀0.1",
        "20 ±0.1",
    ]
)
TAGS = st.builds(
    lambda number, letter, zone: f"{number}{letter}{zone})",
    st.integers(1, 30),
    st.sampled_from(["", "A", ".1"]),
    st.sampled_from(["", " C4", " B12"]),
)
CALLOUTS = st.builds(
    lambda tag, lines: f"{tag} " + "\n   ".join(lines), TAGS, st.lists(LINES, min_size=1, max_size=4)
)
SHEETS = st.builds(
    lambda head, callouts, tail: "\n".join([*head, "", *callouts, "", *tail]),
    st.lists(KEYS, max_size=8),
    st.lists(CALLOUTS, min_size=1, max_size=6),
    st.lists(st.one_of(KEYS, LINES), max_size=2),
)
UNTAGGED = st.lists(st.one_of(KEYS, LINES, LINES, st.just(""), st.just("# remark")), min_size=1, max_size=12)
STYLED = st.builds(lambda text, style: text.replace(") ", style), SHEETS, st.sampled_from([". ", ": ", "\t"]))
ANY_SHEET = st.one_of(SHEETS, STYLED, UNTAGGED.map("\n".join))
ANYTHING = st.text(st.characters(exclude_categories=["Cs"]), max_size=80)


@given(ANYTHING)
def test_any_text_gives_a_drawing(text: str) -> None:
    assert parse_sheet(text, "a").file == "a"


@given(ANY_SHEET)
def test_every_line_stands_in_one_place(text: str) -> None:
    drawing = parse_sheet(text, "a")
    standing = [line.number for callout in drawing.callouts for line in callout.source]
    standing += [line.number for line in drawing.lines]
    expected = [n for n, line in enumerate(split_lines(text), 1) if line.strip() and not line.startswith("# ")]
    assert sorted(standing) == expected


@given(ANY_SHEET)
def test_a_callout_knows_where_it_stands(text: str) -> None:
    lines = split_lines(text)
    for callout in parse_sheet(text, "a").callouts:
        for source in callout.source:
            assert lines[source.number - 1][source.column :].startswith(source.text)


@given(ANY_SHEET, st.sampled_from(list(Style)))
def test_a_sheet_transcribed_reads_back_the_same(text: str, style: Style) -> None:
    drawing = parse_sheet(text, "a")
    written = transcribe(drawing, style)
    assert parse_sheet(written, "a") == drawing
    assert transcribe(parse_sheet(written, "a"), style) == written


@given(st.one_of(st.binary(max_size=60), ANYTHING.map(lambda text: text.encode("utf-16"))))
def test_what_is_decoded_is_written_back_byte_by_byte(data: bytes) -> None:
    try:
        text = decode(data)
    except SheetError:
        return
    assert encode(text) == data


@given(ANYTHING)
def test_a_joint_that_reads_is_written_out_the_same(text: str) -> None:
    try:
        joint = parse_joint(f"x = 4 with {text}")
    except JointTextError:
        return
    assert parse_joint(joint_text(joint)) == joint
