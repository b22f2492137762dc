"""What a callout is read as."""

from collections.abc import Iterator
from dataclasses import fields, is_dataclass
from decimal import Decimal
from pathlib import Path

import pytest

from calloutlint.callouts.parse import parse_callout
from calloutlint.callouts.value import parse_size, parse_value
from calloutlint.callouts.write import Style, write_parts
from calloutlint.model.callout import DatumFeature, Part, Unread
from calloutlint.model.frame import Frame, Modifier, ZoneShape
from calloutlint.model.hole import HoleStep
from calloutlint.model.size import Depth, Deviations, FitCode, Limits, PlusMinus, Size, SizeForm, Through
from calloutlint.model.source import Span
from calloutlint.model.thread import Thread
from calloutlint.model.values import Value
from calloutlint.units import Unit

GOLDEN = sorted((Path(__file__).parent / "cases" / "golden").glob("*.txt"))


def read(*lines: str, unit: Unit = Unit.INCH) -> tuple[Part, ...]:
    return parse_callout(lines, unit)


@pytest.mark.parametrize("path", GOLDEN, ids=lambda path: path.stem)
def test_a_callout_has_its_golden_tree(path: Path) -> None:
    """The whole model with its spans, compared with what has been read over by eye."""
    text, _, tree = path.read_text("utf-8").partition("----\n")
    unit = Unit.MM if path.stem.endswith("-mm") else Unit.INCH
    parts = parse_callout(text.splitlines(), unit)
    assert "\n".join(line for part in parts for line in _tree(part)) + "\n" == tree


def _tree(node: object, name: str = "", depth: int = 0) -> Iterator[str]:
    """A model as indented lines; fields at their defaults are left out, spans stand beside their part."""
    head = "  " * depth + (f"{name}: " if name else "")
    if isinstance(node, Value):
        yield f"{head}{node.text} = {node.amount} {node.unit or 'of no unit'}"
    elif is_dataclass(node):
        span = getattr(node, "span", None)
        at = f"  [{span.line}:{span.start}-{span.end}]" if isinstance(span, Span) else ""
        yield f"{head}{type(node).__name__}{at}"
        for field in fields(node):
            value = getattr(node, field.name)
            if field.name != "span" and value != field.default and value != ():
                yield from _tree(value, field.name, depth + 1)
    elif isinstance(node, tuple):
        for item in node:
            yield from _tree(item, name, depth)
    else:
        yield f"{head}{node}"


ENCODINGS = [
    "⌖ | ⌀.014 Ⓜ | A | B Ⓜ | C",
    "⌖|⌀.014Ⓜ|A|BⓂ|C",
    "POS | DIA .014 (M) | A | B(M) | C",
    "POSITION DIA .014 MMC A B MMC C",
    "TRUE POSITION .014 DIA AT MMC A B AT MMC C",
    "position dia .014 mmc A B mmc C",
    "POSITION DIA .014 M A B M C",
    "POS|%%c.014 (M)|A|B (M)|C",
    r"{\Fgdt;j}%%v{\Fgdt;n}.014{\Fgdt;m}%%vA%%vB{\Fgdt;m}%%vC",
    "[⌖|⌀.014Ⓜ|A|BⓂ|C]",
    "[POS][DIA .014 (M)][A][B (M)][C]",
    "[⌖][⌀.014 Ⓜ][A][B Ⓜ][C]",
    "| ⌖ | Ø.014 Ⓜ | A | B Ⓜ | C |",
    "│⌖│⌀.014 Ⓜ│A│B Ⓜ│C│",
    "⌖ ⌀.014 Ⓜ A B Ⓜ C",
    "⌖ | ⌀.014 <M> | A, B <M>, C",
    "⌖ | ⌀.014 | A | B Ⓜ | C".replace(".014", ".014 ⓜ"),
]


@pytest.mark.parametrize("written", ENCODINGS)
def test_a_frame_is_the_same_in_every_encoding(written: str) -> None:
    assert read(written) == read(ENCODINGS[0])


def test_a_frame_is_taken_apart() -> None:
    (frame,) = read("⌓ | .012 Ⓤ .003 | A-B[x,y] | C Ⓜ ▷")
    assert isinstance(frame, Frame)
    (segment,) = frame.segments
    assert segment.zone is not None
    assert (segment.zone.shape, segment.zone.value) == (
        ZoneShape.WIDTH,
        Value(".012", Decimal(".012"), Unit.INCH),
    )
    (unequal,) = segment.zone.modifiers
    assert (unequal.kind, unequal.value) == (Modifier.UNEQUAL, Value(".003", Decimal(".003"), Unit.INCH))
    assert [datum.name for datum in segment.datums] == ["A-B", "C"]
    assert segment.datums[0].freedoms == ("x", "y")
    assert [use.kind for use in segment.datums[1].modifiers] == [Modifier.MMC, Modifier.TRANSLATION]


@pytest.mark.parametrize(
    ("written", "lower"),
    [
        (("⌖ | ⌀.014 | A | B", "| ⌀.006 | A"), 2),
        (("⌖ | ⌀.014 | A | B", "⌀.006 | A"), 2),
        (("⌖ ⌀.014 A B", "⌀.006 A"), 2),
        (("⌖ ⌀.014 A B / ⌀.006 A",), 2),
        (("⌖ | ⌀.014 | A | B", "| ⌀.006 | A", "| ⌀.002"), 3),
        (("⌖ | ⌀.014 | A | B", "⌖ | ⌀.006 | A"), 1),
        (("⌖ | ⌀.014 | A | B", "⌀.006 ±.001 THRU"), 1),
        (("⌖ | ⌀.014 | A | B", "⌀.500 THRU"), 1),
    ],
)
def test_lower_segments_are_told_from_new_frames_and_sizes(written: tuple[str, ...], lower: int) -> None:
    frame = read(*written)[0]
    assert isinstance(frame, Frame)
    assert len(frame.segments) == lower


def test_a_datum_feature_may_follow_a_lower_segment() -> None:
    frame, datum = read("⌖ | ⌀.014 | A", "| ⌀.006 | A -D-")
    assert isinstance(frame, Frame)
    assert len(frame.segments) == 2
    assert datum == read("DATUM D")[0]


def _limits(first: str, second: str, unit: Unit = Unit.INCH, *, named: bool = False) -> Limits:
    return Limits(Value(first, Decimal(first), unit), Value(second, Decimal(second), unit), named)


@pytest.mark.parametrize(
    "written",
    [(".288-.279",), (".288 - .279",), (".288/.279",), (".288 / .279",), (".288 .279",), (".288", ".279")],
)
def test_limits_are_read_in_every_layout(written: tuple[str, ...]) -> None:
    assert read(*written) == (Size(SizeForm.LINEAR, None, _limits(".288", ".279")),)


@pytest.mark.parametrize(
    "written",
    [
        (".288 MAX .279 MIN",),
        (".279 MIN .288 MAX",),
        ("MAX .288 MIN .279",),
        (".288 MAX / .279 MIN",),
        (".288 MAX", ".279 MIN"),
    ],
)
def test_named_limits_say_which_is_which(written: tuple[str, ...]) -> None:
    assert read(*written) == (Size(SizeForm.LINEAR, None, _limits(".288", ".279", named=True)),)


def test_two_numbers_far_apart_are_two_sizes() -> None:
    assert len(read("1.500", ".250")) == 2


@pytest.mark.parametrize(
    ("written", "upper", "lower"),
    [
        ("+.002 -.001", "+.002", "-.001"),
        ("+.002/-.001", "+.002", "-.001"),
        ("+.002-.001", "+.002", "-.001"),
        ("+0.021/0", "+0.021", "0"),
        ("+0.2 0", "+0.2", "0"),
        ("0/-0.02", "0", "-0.02"),
        ("0 -0.02", "0", "-0.02"),
        ("-0.1 -0.3", "-0.1", "-0.3"),
        ("+.0010 -.0000", "+.0010", "-.0000"),
        ("(+0.15 0)", "+0.15", "0"),
    ],
)
def test_deviations_are_read_in_every_layout(written: str, upper: str, lower: str) -> None:
    (size,) = read(f"⌀30 {written}")
    assert isinstance(size, Size)
    assert isinstance(size.tolerance, Deviations)
    assert (size.tolerance.upper.text, size.tolerance.lower.text) == (upper, lower)


def test_stacked_deviations_belong_to_the_size_above() -> None:
    assert read("⌀.281 +.007", "-.002 THRU") == read("⌀.281 +.007 -.002 THRU")
    assert read("⌀30 +0.2", "0", unit=Unit.MM) == read("⌀30 +0.2 0", unit=Unit.MM)


@pytest.mark.parametrize(
    ("written", "code"), [("25 H7", "H7"), ("25H7", "H7"), ("25 js6", "js6"), ("25 M6", "M6"), ("25 R7", "R7")]
)
def test_a_fit_class_outranks_a_thread_and_a_radius(written: str, code: str) -> None:
    (size,) = read(written, unit=Unit.MM)
    assert isinstance(size, Size)
    assert str(size.fit) == code


def test_limits_beside_a_fit_code_are_its_tolerance() -> None:
    expected = _limits("24.980", "24.993", Unit.MM)
    for written in ("25 g6 (24.980-24.993)", "24.980-24.993 (25 g6)"):
        (size,) = read(written, unit=Unit.MM)
        assert isinstance(size, Size)
        assert (size.fit, size.tolerance) == (FitCode("g", "6"), expected)


def test_angles_keep_minutes_and_seconds() -> None:
    (size,) = read("30°15'36\" ±0°30'")
    assert isinstance(size, Size)
    assert isinstance(size.tolerance, PlusMinus)
    assert size.nominal == Value("30°15'36\"", Decimal("30.26"), Unit.DEGREE)
    assert size.tolerance.amount.amount == Decimal("0.5")


@pytest.mark.parametrize(
    ("text", "amount"),
    [
        ("1/4", ".25"),
        ("1 1/4", "1.25"),
        ("1-1/4", "1.25"),
        ("-3/8", "-.375"),
        (".2500", ".2500"),
        ("+.002", ".002"),
    ],
)
def test_numbers_are_exact(text: str, amount: str) -> None:
    assert parse_value(text, Unit.INCH).amount == Decimal(amount)


@pytest.mark.parametrize("text", ["", "A", "..250", "1/0", "1,5", "1.2.3", "±.1"])
def test_what_is_no_number_is_refused_in_words(text: str) -> None:
    with pytest.raises(ValueError, match=r"not a number|divides by zero"):
        parse_value(text, Unit.INCH)


def test_one_size_can_be_read_alone() -> None:
    size = parse_size("⌀6.6 +0.15/0", Unit.MM)
    assert size.form is SizeForm.DIAMETER
    assert isinstance(size.tolerance, Deviations)
    with pytest.raises(ValueError, match=r"'M6' is not one size\."):
        parse_size("M6", Unit.MM)


def test_a_dual_dimension_is_in_the_other_unit() -> None:
    (size,) = read("⌀.500 +.002 -.000 [12.7 +0.05 0]")
    assert isinstance(size, Size)
    assert size.dual is not None
    assert size.dual.nominal == Value("12.7", Decimal("12.7"), Unit.MM)
    assert size.dual.form is SizeForm.DIAMETER


def test_the_decimal_comma_is_read_where_the_sheet_has_it() -> None:
    with_comma = parse_callout(["⌀25,4 +0,1 0"], Unit.MM, decimal_comma=True)
    assert with_comma == parse_callout(["⌀25.4 +0.1 0"], Unit.MM)
    assert isinstance(parse_callout(["⌀25,4"], Unit.MM)[0], Unread)


def test_a_depth_belongs_to_the_hole_before_it() -> None:
    size, step, thread = read("⌀.281 THRU ⌴ ⌀.438 ↧ .25", ".250-20 UNC-2B", "↧ .50")
    assert isinstance(size, Size)
    assert isinstance(step, HoleStep)
    assert isinstance(thread, Thread)
    assert isinstance(size.extent, Through)
    for extent, depth in ((step.extent, ".25"), (thread.extent, ".50")):
        assert isinstance(extent, Depth)
        assert extent.size is not None
        assert extent.size.nominal is not None
        assert extent.size.nominal.text == depth


@pytest.mark.parametrize(
    "written",
    [
        "4X ⌀.281 THRU",
        "4 X ⌀.281 THRU",
        "4x ⌀.281 THRU",
        "(4X) ⌀.281 THRU",
        "⌀.281 THRU 4X",
    ],
)
def test_a_count_is_read_before_and_after(written: str) -> None:
    assert read(written) == read("4X ⌀.281 THRU")


@pytest.mark.parametrize(
    "count", ["4 PLACES", "4 PL", "(4) PLACES", "4 PLCS", "4 REQD", "FOUR PLACES", "FOUR (4) PLACES"]
)
def test_counts_in_words_come_to_one_spelling(count: str) -> None:
    assert read(f"{count} ⌀.281") == read(f"⌀.281 {count}") == read("4 PL ⌀.281")


def test_a_count_of_holes_says_what_they_are() -> None:
    (size,) = read("FOUR HOLES ⌀.281")
    assert isinstance(size, Size)
    assert size.count is not None
    assert (size.count.number, size.count.written, size.count.in_words) == (4, "4 HOLES", True)


@pytest.mark.parametrize("written", ["[A]", "⌀.500 ±.002 THRU [A]", "⏥ .003 [A]", "⟂ | .002 | B ¶ [A]"])
def test_one_letter_in_a_bracket_that_ends_a_line_is_a_datum_feature(written: str) -> None:
    assert read(*written.split(" ¶ "))[-1] == DatumFeature("A")


@pytest.mark.parametrize(
    "written", ["[DIA .014] [A] [B]", "[A] [B]", "TP [.014] [A] [B]", "SEE VIEW [A]", "⟂ .002 [A]"]
)
def test_brackets_in_a_row_are_never_a_datum_feature(written: str) -> None:
    assert not any(isinstance(part, DatumFeature) for part in read(written))


@pytest.mark.parametrize(
    ("written", "unit", "marked"),
    [
        ("⌀6.6 mm ±0.2", Unit.INCH, Unit.MM),
        ("⌀6.6 mm +0.2 0", Unit.INCH, Unit.MM),
        ("25.0-25.2 mm", Unit.INCH, Unit.MM),
        ("⌀6.6 mm ¶ ±0.2", Unit.INCH, Unit.MM),
        ("1 in ±.5", Unit.MM, Unit.INCH),
        ('1.000"-1.002"', Unit.MM, Unit.INCH),
    ],
)
def test_a_unit_marked_on_one_number_holds_for_the_size(written: str, unit: Unit, marked: Unit) -> None:
    (size,) = read(*written.split(" ¶ "), unit=unit)
    assert isinstance(size, Size)
    assert size.tolerance is not None
    assert {value.unit for value in size.tolerance.values} == {marked}
    assert size.nominal is None or size.nominal.unit is marked


@pytest.mark.parametrize(
    ("written", "number"),
    [("4 OFF", 4), ("QTY 4", 4), ("QTY. 12", 12), ("(4)", 4), ("4 REQD", 4), ("6 HOLES", 6)],
)
def test_a_count_in_words_stands_before_or_after_its_size(written: str, number: int) -> None:
    for text in (f"{written} ⌀.281 THRU", f"⌀.281 THRU {written}"):
        (size,) = read(text)
        assert isinstance(size, Size)
        assert size.count is not None
        assert size.count.number == number
        assert size.count.in_words


def test_the_text_of_a_number_is_plain_text() -> None:
    (size,) = read("⌀.281 ±.002")
    assert isinstance(size, Size)
    assert size.nominal is not None
    assert type(size.nominal.text) is str
    frame = read("⌖ | ⌀.014 Ⓟ .50 | A")[0]
    assert isinstance(frame, Frame)
    assert frame.segments[0].zone is not None
    assert {type(use.value.text) for use in frame.segments[0].zone.modifiers if use.value} == {str}


@pytest.mark.parametrize(
    ("written", "canonical"),
    [
        ("⌀.500 X .50 MIN DEEP", "⌀.500 ↧ .50 MIN"),
        ("10-32 UNF-2B X .38 MIN DP", "#10-32 UNF-2B ↧ .38 MIN"),
        ("SPOTFACE ⌀.88 X .03 MAX DEEP", "SF ⌀.88 ↧ .03 MAX"),
        ("⌀.500 ↧ MIN .31", "⌀.500 ↧ .31 MIN"),
        ("M6-6H ↧ 12 TYP", "M6-6H ↧ 12 TYP"),
    ],
)
def test_a_depth_may_be_a_least_or_a_largest_one(written: str, canonical: str) -> None:
    parts = parse_callout([written], Unit.INCH)
    assert write_parts(parts, Style.UNICODE) == [canonical]
    assert parse_callout([canonical], Unit.INCH) == parts


def test_a_drill_named_in_parentheses_behind_its_diameter_is_read() -> None:
    parts = parse_callout(["⌀.201 (#7) DRILL ↧ .75"], Unit.INCH)
    assert write_parts(parts, Style.UNICODE) == ["⌀.201 ↧ .75", "#7 DRILL"]


@pytest.mark.parametrize(
    ("written", "canonical"),
    [
        ("⌖ | ⌀.014 Ⓜ | A | B[BASIC] | C", "⌖ | ⌀.014 Ⓜ | A | B [BSC] | C"),
        ("⌖ | ⌀.014 Ⓜ | A | B Ⓜ [⌀1.020] | C[.020]", "⌖ | ⌀.014 Ⓜ | A | B Ⓜ [⌀1.020] | C [.020]"),
        ("○ | .010 Ⓖ", "○ | .010 Ⓖ"),
        ("⌭ | .010 Ⓝ", "⌭ | .010 Ⓝ"),
        ("⏥ | .010 Ⓒ", "⏥ | .010 Ⓒ"),
        ("⌭ | .010 Ⓧ", "⌭ | .010 Ⓧ"),
        ("M16 LH-6H ↧ 20", "M16-6H-LH ↧ 20"),
        ("Tr 24x10 P5 LH-7H", "Tr24x10 P5-7H-LH"),
        ("0°-5° GROOVE WALL", "0°-5° GROOVE WALL"),
        ("5 X 1.000 (= 5.000)", "5X 1.000 (= 5.000)"),
        ("(4.500 [114.30])", "(4.500) [114.30]"),
    ],
)
def test_forms_of_the_standards_are_read_whole(written: str, canonical: str) -> None:
    """Common practice in Y14.5 (stated boundaries), ISO 1101 (association) and B1.13; no clause quoted."""
    parts = parse_callout([written], Unit.INCH)
    assert write_parts(parts, Style.UNICODE) == [canonical]
    for style in Style:
        assert parse_callout(write_parts(parts, style), Unit.INCH) == parts


def test_a_countersink_takes_the_angle_before_it() -> None:
    parts = read("82° CSK ⌀.50")
    assert write_parts(parts, Style.UNICODE) == ["⌵ ⌀.50 X 82°"]
    assert read("⌵ ⌀.50 X 82°") == parts
