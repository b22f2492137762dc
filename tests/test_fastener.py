"""Fastener designations in the spellings that parts lists and notes use."""

import time

import pytest
from hypothesis import given
from hypothesis import strategies as st

from calloutlint.callouts.fastener import LONGEST_DESIGNATION, parse_fastener
from calloutlint.callouts.parse import parse_callout
from calloutlint.model.fastener import Fastener, Head
from calloutlint.model.size import Deviations, Limits, PlusMinus, Size, SizeForm
from calloutlint.model.thread import Thread, ThreadSystem
from calloutlint.units import Unit


def thread_of(fastener: Fastener) -> str:
    """`1/4-20 UNC 2A`, `M8x1.25 6g LH`; empty where there is none."""
    thread = fastener.thread
    if thread is None:
        return ""
    size = thread.size if thread.series != "MJ" else thread.size.replace("M", "MJ")
    pitch = f"-{thread.tpi.text}" if thread.tpi else f"x{thread.pitch.text}" if thread.pitch else ""
    series = thread.series if thread.system is ThreadSystem.UNIFIED else ""
    return " ".join(filter(None, [size + pitch, series, thread.class_, "LH" if thread.left_hand else ""]))


def pin_of(fastener: Fastener) -> str:
    """`⌀6 m6`, `⌀.2500 +.0003 -.0000 inch`; empty where there is none."""
    pin = fastener.pin
    if pin is None:
        return ""
    assert pin.form is SizeForm.DIAMETER
    return " ".join(filter(None, [size_text(pin), str(pin.fit or ""), unit_of(pin)]))


def size_text(pin: Size) -> str:
    match pin.tolerance:
        case Limits(first, second):
            return f"⌀{first.text}-{second.text}"
        case PlusMinus(amount):
            tolerance = f" ±{amount.text}"
        case Deviations(upper, lower):
            tolerance = f" {upper.text} {lower.text}"
        case None:
            tolerance = ""
    assert pin.nominal
    return f"⌀{pin.nominal.text}{tolerance}"


def unit_of(pin: Size) -> str:
    first = pin.nominal or (pin.tolerance.first if isinstance(pin.tolerance, Limits) else None)
    assert first
    return first.unit.value if first.unit else ""


@pytest.mark.parametrize(
    ("text", "thread", "head", "length"),
    [
        ("1/4-20 UNC-2A x .75 SHCS", "1/4-20 UNC 2A", Head.SOCKET_CAP, ".75"),
        (".250-20 UNC-2A socket head cap screw", ".250-20 UNC 2A", Head.SOCKET_CAP, ""),
        ("SCREW, CAP, SOCKET HEAD, .250-20UNC-2A X 1.00", ".250-20 UNC 2A", Head.SOCKET_CAP, "1.00"),
        ("SCREW, CAP, HEXAGON HEAD, 3/8-16", "3/8-16", Head.HEX, ""),
        ("¼-20 UNC x 1½ SHCS", "1/4-20 UNC", Head.SOCKET_CAP, "1 1/2"),
        ("1/4-20 SHCS x 3/4", "1/4-20", Head.SOCKET_CAP, "3/4"),
        ("ANSI B18.3 1/4-20 x 1 hexagon socket head cap screw", "1/4-20", Head.SOCKET_CAP, "1"),
        ("4X 1/4-20 UNC SOC HD CAP SCR", "1/4-20 UNC", Head.SOCKET_CAP, ""),
        ("#10-32 PAN HEAD", "#10-32", Head.PAN, ""),
        ("4-40 x 3/8 PHMS", "#4-40", Head.PAN, "3/8"),
        ("8-32 x 0.5 in flat head machine screw", "#8-32", Head.FLAT, "0.5"),
        ("#6-32 FIL HD", "#6-32", Head.FILLISTER, ""),
        ("10-32 UNF-3A FHCS x 1/2", "#10-32 UNF 3A", Head.SOCKET_COUNTERSUNK, "1/2"),
        ("1/4-20 socket flat head screw", "1/4-20", Head.SOCKET_COUNTERSUNK, ""),
        ("#10-32 UNF-2A x .50 BHCS", "#10-32 UNF 2A", Head.SOCKET_BUTTON, ".50"),
        ("3/8-16 UNC-2A hex head bolt", "3/8-16 UNC 2A", Head.HEX, ""),
        ("1/2-13 UNC-2A X 2.00 LG HHCS", "1/2-13 UNC 2A", Head.HEX, "2.00"),
        ("1 1/8-7 UNC-2A x 3-1/2 LG HEX CAP SCREW", "1 1/8-7 UNC 2A", Head.HEX, "3 1/2"),
        ("5/16 STUD", "5/16", Head.STUD, ""),
        ("1/4-28 UNF-3A SOCKET SET SCREW", "1/4-28 UNF 3A", Head.NONE, ""),
        ("1/4-20 hex flange screw", "1/4-20", None, ""),
        ("1/4-20 low head cap screw", "1/4-20", None, ""),
        (".190-32 UNJF-3A x .75", ".190-32 UNJF 3A", None, ".75"),
        ("1/4-20UNC2A", "1/4-20 UNC 2A", None, ""),
        ("1-1/2-6 UNC-2A-LH", "1 1/2-6 UNC 2A LH", None, ""),
        ("1 1/2-12 UN-2A", "1 1/2-12 UN 2A", None, ""),
        ("⌀1/4-20 UNC", "1/4-20 UNC", None, ""),
        ("#10", "#10", None, ""),
        ("NO. 8 SCREW", "#8", None, ""),
        ("#10 x 1/2", "#10", None, "1/2"),
        ("1/4", "1/4", None, ""),
        (".250", ".250", None, ""),
        ("1/4 BOLT", "1/4", None, ""),
        ("1/4-20 SCREW WITH SPRING WASHER", "1/4-20", None, ""),
        ('1" BOLT', "1", None, ""),
    ],
)
def test_inch_screws(text: str, thread: str, head: Head | None, length: str) -> None:
    found = parse_fastener(text)
    assert (thread_of(found), found.head, found.length.text if found.length else "") == (thread, head, length)
    assert found.length is None or found.length.unit is Unit.INCH
    assert found.pin is None


@pytest.mark.parametrize(
    ("text", "thread"),
    [
        ("1-8 UNC", "1-8 UNC"),
        ("1-64 UNC", "#1-64 UNC"),
        ("1-72", "#1-72"),
        ("2-56 UNC", "#2-56 UNC"),
        ("2-4.5 UNC", "2-4.5 UNC"),
        ("2-12 UN", "2-12 UN"),
        ("0-80", "#0-80"),
        ("12-24 UNC", "#12-24 UNC"),
    ],
)
def test_a_whole_number_before_a_pitch_is_a_number_size_or_inches(text: str, thread: str) -> None:
    assert thread_of(parse_fastener(text)) == thread


@pytest.mark.parametrize(
    ("text", "thread", "head", "standard", "length"),
    [
        ("M6", "M6", None, None, ""),
        ("M6x1-6g", "M6x1 6g", None, None, ""),
        ("M6 socket head cap screw ISO 4762", "M6", Head.SOCKET_CAP, "ISO 4762", ""),
        ("M6 ISO 4762", "M6", Head.SOCKET_CAP, "ISO 4762", ""),
        ("ISO 4762 - M6 x 20", "M6", Head.SOCKET_CAP, "ISO 4762", "20"),
        ("ISO 4762:2004 - M6 x 20 - 8.8", "M6", Head.SOCKET_CAP, "ISO 4762:2004", "20"),
        ("DIN EN ISO 4762 M6x16", "M6", Head.SOCKET_CAP, "DIN EN ISO 4762", "16"),
        ("DIN912 M6x16", "M6", Head.SOCKET_CAP, "DIN 912", "16"),
        ("ISO 4014 M10x50", "M10", Head.HEX, "ISO 4014", "50"),
        ("M10x1.25-6g x 35 hex cap screw, ISO 8676", "M10x1.25 6g", Head.HEX, "ISO 8676", "35"),
        ("ISO 7380-1 - M5 x 10", "M5", Head.SOCKET_BUTTON, "ISO 7380-1", "10"),
        ("M3 countersunk socket screw ISO 10642", "M3", Head.SOCKET_COUNTERSUNK, "ISO 10642", ""),
        ("M4 cheese head", "M4", Head.FILLISTER, None, ""),
        ("M8 HHCS", "M8", Head.HEX, None, ""),
        ("M8x1.25x30 SHCS 12.9", "M8x1.25", Head.SOCKET_CAP, None, "30"),
        ("M5 × 0,8 × 12", "M5x0.8", None, None, "12"),
        ("M5x8", "M5", None, None, "8"),
        ("M6x20", "M6", None, None, "20"),
        ("M20x2 - 6g LH", "M20x2 6g LH", None, None, ""),
        ("M64x6", "M64x6", None, None, ""),
        ("M8-1.25 x 30 SHCS", "M8x1.25", Head.SOCKET_CAP, None, "30"),
        ("M6-20", "M6", None, None, ""),
        ("ISO 14583 hexalobular socket pan head screw M5", "M5", Head.PAN, "ISO 14583", ""),
        ("hexalobular socket countersunk screw M5", "M5", Head.FLAT, None, ""),
        ("M6 screw with hex nut", "M6", None, None, ""),
        ("MJ6x1-4h6h", "MJ6x1 4h6h", None, None, ""),
        ("M12 X 40 LG HEX BOLT", "M12", Head.HEX, None, "40"),
        ("4 x M6 screws", "M6", None, None, ""),
    ],
)  # fmt: skip
def test_metric_screws(text: str, thread: str, head: Head | None, standard: str | None, length: str) -> None:
    """A number after the size is its pitch as far as the size has such pitches, else the length."""
    found = parse_fastener(text)
    read = (thread_of(found), found.head, found.standard, found.length.text if found.length else "")
    assert read == (thread, head, standard, length)
    assert found.length is None or found.length.unit is Unit.MM


@pytest.mark.parametrize(
    ("text", "pin", "length"),
    [
        ("⌀6 m6 dowel pin", "⌀6 m6 mm", ""),
        ("dowel pin Ø8 m6 x 24", "⌀8 m6 mm", "24"),
        ("⌀.2500 +.0003 -.0000 DOWEL", "⌀.2500 +.0003 -.0000 inch", ""),
        ("⌀5.0 +0.012/+0.004 dowel", "⌀5.0 +0.012 +0.004", ""),
        ("⌀6 (+0.012 +0.004) dowel", "⌀6 +0.012 +0.004", ""),
        ("⌀6 ±0.01 pin", "⌀6 ±0.01", ""),
        (".2503-.2501 DOWEL PIN", "⌀.2503-.2501 inch", ""),
        ("1/4 DOWEL PIN x 3/4", "⌀1/4 inch", "3/4"),
        ("6 mm dowel", "⌀6 mm", ""),
        ("ISO 8734 - 6 x 30 - A - St", "⌀6 mm", "30"),
        ("ISO 2338 - 6 m6 x 30 - St", "⌀6 m6 mm", "30"),
        ("DIN 7 - 4 m6 x 20", "⌀4 m6 mm", "20"),
        ("⌀12 BOLT", "⌀12", ""),
        ("⌀.250 BOLT", "⌀.250 inch", ""),
        ("⌀6 h6 PIN", "⌀6 h6 mm", ""),
    ],
)
def test_pins_and_plain_bolts(text: str, pin: str, length: str) -> None:
    """The unit is only given where the spelling shows it; else it is the drawing's."""
    found = parse_fastener(text)
    assert (pin_of(found), found.length.text if found.length else "") == (pin, length)
    assert found.thread is None


@pytest.mark.parametrize(
    ("text", "expected"),
    [
        ("⌀6 DOWEL", "⌀6 inch"),
        ("⌀6 m6 DOWEL", "⌀6 m6 mm"),
        ("⌀6 mm DOWEL", "⌀6 mm"),
        ("1/4 DOWEL", "⌀1/4 inch"),
    ],
)
def test_a_pin_is_in_the_drawings_unit_unless_it_shows_another(text: str, expected: str) -> None:
    assert pin_of(parse_fastener(text, Unit.INCH)) == expected


@pytest.mark.parametrize(
    "text",
    [
        "", " ", "garbage", "M", "#13-20", "3/0 bolt", "FOR 3/8 TUBE", "ITEM #4", "1/4 PLATE", "10 SCREW",
        "1/4 shoulder screw", "1/8 RIVET", "⌀.250 SPRING PIN", "⌀0 PIN", "TAPER PIN 1/4", "DOWEL", "M6 DOWEL",
        "#10 WOOD SCREW", "PIN, SPRING, ⌀.250", "PART 91352-4-12", "⌀", "x", "-", "1/3-20 UNC", "SEE NOTE 4",
    ],
)  # fmt: skip
def test_what_is_not_understood_has_neither_thread_nor_pin(text: str) -> None:
    """Shoulder screws, rivets, spring and taper pins are not as thick in the hole as their size says."""
    found = parse_fastener(text)
    assert (found.thread, found.pin) == (None, None)


@pytest.mark.parametrize(
    ("text", "knurled", "washer"),
    [
        ("M6 SHCS", False, False),
        ("knurled socket head cap screw M5", True, False),
        ("1/4-20 SHCS WITH FLAT WASHER", False, True),
        ("M6 SEMS", False, True),
        ("M6 screw with lock washer", False, False),
        ("M6 screw with spring washer", False, False),
        ("M6 screw, no washer", False, False),
        ("M6 washer head screw", False, False),
    ],
)
def test_knurls_and_washers_are_said_or_not_there(text: str, knurled: bool, washer: bool) -> None:
    found = parse_fastener(text)
    assert (found.knurled, found.washer) == (knurled, washer)


def test_a_number_size_stands_for_its_basic_major_diameter() -> None:
    """ASME B1.1: 0.060 + 0.013 N, .190 for #10."""
    thread = parse_fastener("#10-32 UNF-2A").thread
    assert thread is not None
    assert thread.diameter is not None
    assert (thread.size, thread.diameter.text, thread.diameter.unit) == ("#10", ".190", Unit.INCH)


def test_text_is_kept_as_written_with_its_spaces_folded() -> None:
    assert parse_fastener("  1/4-20   UNC-2A\tSHCS ").text == "1/4-20 UNC-2A SHCS"


@given(st.text(alphabet='M#0123456789./- xX⌀mhgUNCFA+±()"¼½dowelpinSHCS,\n', max_size=40))
def test_no_text_breaks_it(text: str) -> None:
    found = parse_fastener(text)
    assert found.text == " ".join(text.split())
    assert found.thread is None or found.pin is None


@given(st.text(max_size=60))
def test_no_character_breaks_it(text: str) -> None:
    assert parse_fastener(text).text == " ".join(text.split())


@pytest.mark.parametrize("repeated", ["4X ", "1/4-20 ", "M6 x ", "⌀6 m6 ", "FLAT "])
def test_a_designation_of_any_length_is_read_at_once(repeated: str) -> None:
    """Far more time is allowed than it takes, so that only a time that grows with the square fails."""
    started = time.process_time()
    assert parse_fastener(repeated * 4000) == Fastener((repeated * 4000).strip())
    parse_fastener((repeated * 200)[:LONGEST_DESIGNATION])
    assert time.process_time() - started < 1


@pytest.mark.parametrize(
    ("written", "size"),
    [("10-32 UNF", "#10"), ("1-64 UNC", "#1"), ("1-32 UN", "1"), ("2-12 UN", "2"), ("0-80 UNF", "#0")],
)
def test_a_whole_number_is_the_same_size_in_a_thread_and_a_fastener(written: str, size: str) -> None:
    """Source: ASME B1.1, standard series, from memory."""
    (thread,) = parse_callout([written], Unit.INCH)
    fastener = parse_fastener(written).thread
    assert isinstance(thread, Thread)
    assert fastener is not None
    assert thread.size == fastener.size == size
