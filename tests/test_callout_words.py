"""Plain words in a callout, and fasteners named in one."""

import pytest

from calloutlint.callouts.parse import parse_callout
from calloutlint.callouts.write import Style, write_parts
from calloutlint.model.callout import Callout, FastenerNote, Meaning, Part, Unread, Words
from calloutlint.model.fastener import Hold
from calloutlint.model.size import Size, Through
from calloutlint.units import Unit


def read(*lines: str) -> tuple[Part, ...]:
    return parse_callout(lines, Unit.INCH)


@pytest.mark.parametrize(
    ("count", "meaning"),
    [
        ("4 HOLES", Meaning.HOLE),
        ("2 SLOTS", Meaning.SLOT),
        ("3 SURFACES", Meaning.SURFACE),
        ("2 BOSSES", Meaning.BOSS),
    ],
)
def test_a_count_says_what_it_counts(count: str, meaning: Meaning) -> None:
    for text in (count, f"{count} .250 ±.005"):
        assert meaning in Callout("1", read(text)).meanings


ORDINARY = """\
BEARING BORE|DEBURR|NEAR SIDE|FAR SIDE|BOTH SIDES|AS SHOWN|EQ SP|EQUALLY SPACED|ON ⌀3.000 BC|POLISH|STAMP
REMOVE BURRS|BREAK ALL SHARP EDGES|BLACK OXIDE|MASK BEFORE PLATING|PLATES|PLANES|SPACES|TREAD|TROUGH|TURN
TRANSITION|POSITIVE STOP|PROTECTED|PROFILED|REFER TO NOTE 2|SEE NOTE 3|SEE DETAIL A1|SECTION A-A|VIEW B
ITEM 5|ZONE C4|GRIND|WELD|HEAT TREAT TO 58-62 HRC|63 RMS|RA 1.6|FINISH 32|MATERIAL 6061-T6|17-4PH|AISI 304
PER ASME B46.1|MIL-A-8625 TYPE II|TORQUE TO 25 IN-LB|PARALLEL TO DATUM A|SQUARE|SYMMETRICAL ABOUT CL
ROUGH MACHINE|THREAD RELIEF|UNDERCUT|FULL R|HELICOIL|KNURL|CHAMFER|FLAT HEAD|CAPPED|TAPPET|RADIAL
INDEPENDENTLY|FOR REFERENCE ONLY|CLEARANCE FOR WRENCH|DEPTH OF THREAD|THRU BOTH WALLS|MAX WIDTH|STOCK
CONCENTRIC|COAXIAL|CIRCULAR|STRAIGHT|PERPENDICULAR|ANGULAR|LOCATION|DIMENSION|DIAMETRAL|TANGENTIAL|CASTING
FORGING|MOLDED|BRASS BUSHING|O-RING GROOVE|OIL HOLE|INSPECT|IDENTIFY|ENGRAVE|ANODIZE|PASSIVATE|PAINT
LEFT SIDE|TOP|BOTTOM|CENTER|INSIDE|OUTSIDE|UPPER|LOWER|MATING PART|MATCHED SET|DRILL JIG|ASSEMBLY|SPRING
SEAL|GASKET|DOWEL|KEYSEAT|SPLINE|GEAR|SHOULDER|COUNTERWEIGHT|COUNTERSHAFT|HARDEN|TEMPER|STRESS RELIEVE
SHOT PEEN|LAP|HONE|BURNISH"""


@pytest.mark.parametrize("words", ORDINARY.replace("\n", "|").split("|"))
def test_ordinary_words_of_drawings_are_words(words: str) -> None:
    assert all(isinstance(part, Words) for part in read(words))
    beside = read(f"⌀.500 ±.002 {words}")
    assert not any(isinstance(part, Unread) for part in beside)


@pytest.mark.parametrize(
    ("written", "meaning"),
    [
        ("RUNNING FIT", Meaning.CLEARANCE_FIT),
        ("SLIP-FIT", Meaning.CLEARANCE_FIT),
        ("PRESS FIT", Meaning.INTERFERENCE_FIT),
        ("SHRINK FIT", Meaning.INTERFERENCE_FIT),
        ("TRANSITION FIT", Meaning.TRANSITION_FIT),
        ("KEYWAY", Meaning.SLOT),
        ("BEARING BORE", Meaning.BORE),
        ("BOSSES", Meaning.BOSS),
        ("FORM TAP", Meaning.FORM_TAP),
        ("SEP REQT", Meaning.SEPARATE_REQUIREMENT),
    ],
)
def test_words_that_rules_can_use_are_understood(written: str, meaning: Meaning) -> None:
    (words,) = read(written)
    assert isinstance(words, Words)
    assert words.meanings == (meaning,)


@pytest.mark.parametrize(
    ("written", "hold"),
    [
        ("FOR .250-20 UNC SCREW", None),
        ("CLEARANCE FOR M6 FLOATING", Hold.FLOATING),
        ("CLR FOR #10", None),
        ("FOR M6 SCREW, FIXED", Hold.FIXED),
        ("CLEAR FOR 1/4 BOLT FIXED", Hold.FIXED),
        ("FOR ⌀6 m6 DOWEL PIN", None),
    ],
)
def test_a_fastener_named_in_a_callout_is_found(written: str, hold: Hold | None) -> None:
    (note,) = read(written)
    assert isinstance(note, FastenerNote)
    assert note.fastener.thread or note.fastener.pin
    assert note.hold is hold


@pytest.mark.parametrize("written", ["⌀.500 FOR 2.00 LENGTH", "⌀5 FOR M6 TAP", "FOR REFERENCE ONLY"])
def test_other_things_that_a_callout_is_for_are_no_fasteners(written: str) -> None:
    assert not any(isinstance(part, FastenerNote) for part in read(written))


@pytest.mark.parametrize(
    ("written", "meanings"),
    [
        ("AT SURFACE K", ()),
        ("FLUSH WITH SURFACE", ()),
        ("SLOT IN FACE", (Meaning.SLOT,)),
        ("PIN, SURFACE HARDENED", (Meaning.PIN,)),
        ("BORE, HOLE SURFACE 32 RMS", (Meaning.BORE,)),
        ("IN BOSS", ()),
        ("FOR SHAFT LOCK", ()),
        ("SHAFT END", ()),
        ("TAB SIDE", ()),
        ("BEARING SEAT, SHAFT SIDE", ()),
        ("STUD, PRESS INTO HOLE", ()),
        ("STUD IN HOLE", ()),
        ("SPINDLE NUT", ()),
        ("DOWEL PIN HOLE", (Meaning.HOLE,)),
        ("DEBURR ON EDGE, SHAFT", (Meaning.SHAFT,)),
        ("WIDTH OF SLOT", (Meaning.SLOT, Meaning.WIDTH)),
    ],
)
def test_the_first_noun_before_a_preposition_is_the_feature(
    written: str, meanings: tuple[Meaning, ...]
) -> None:
    (words,) = read(written)
    assert isinstance(words, Words)
    assert words.meanings == meanings


@pytest.mark.parametrize(
    ("written", "meanings"),
    [
        ("⌀.500 d9 SHAFT THROUGH COVER", {Meaning.SHAFT}),
        ("⌀.250 THRU BOSS", set()),
        ("⌀.250 THRU BORE", {Meaning.BORE}),
        ("⌀.500 HOLE THROUGH COVER", {Meaning.HOLE}),
    ],
)
def test_what_a_feature_goes_through_is_another_one(written: str, meanings: set[Meaning]) -> None:
    parts = read(written)
    assert Callout("1", parts).meanings == meanings
    assert any(isinstance(getattr(part, "extent", None), Through) for part in parts) is ("SHAFT" not in written)
    assert read(*write_parts(parts, Style.UNICODE)) == parts


NOTES_WITH_NUMBERS = """\
10 ACTIVE COILS, 12 TOTAL COILS|20 TPI|DIAMETRAL PITCH 12|32 TOOTH SERRATION|17 TEETH, 8 DP
WHOLE DEPTH 2.7|3 COATS EPOXY|3 EQUAL SPACES|6 EQ SP|NO. 2 MORSE|PAINT COLOR NO. 26329
LUBRICATE WITH ISO VG 46|PRESSURE TEST 150 PSIG MIN, 10 MIN HOLD|63 MICROINCH|63 ALL OVER|2 PLUGS
3/16 FILLET WELD|CUT FROM 2 X 4 BAR|USE 1/8 DIA ROD|FOR 1/2 CONDUIT|FOR 1/4 SQ KEY|STAMP PART NO 12345-6
ASTM A48 CL 30B|BAKE 375° ±25°F|STRESS RELIEVE 450°F 30 MIN|HÄRTE 58+4 HRC|FLUSH TO ISO 4406 16/14/11
1ST OPERATION|2ND SIDE SIMILAR|√63|125√|(-1 ONLY)|COUNTERSINK TO CLEAN UP|ENDS SQUARE WITHIN 2°
HELICAL COIL INSERT 1.5D|P96 DIAMOND KNURL|N7|TYPICAL SECTION|2 PLACES AS SHOWN|TAPER 1:10|1:10 TAPER|⌲ 1:10
⌲ .20:1|⌳ .08:1|SCALE 2:1|DETAIL B SCALE 4:1|INVOLUTE SPLINE, 14 TEETH, 16/32 DP, CLASS 5|24 DP SERRATION
12 PITCH|VOLUME 3.2 IN³|3 TURNS FULL THREAD"""


@pytest.mark.parametrize("unit", [Unit.INCH, Unit.MM])
@pytest.mark.parametrize("words", NOTES_WITH_NUMBERS.replace("\n", "|").split("|"))
def test_a_number_that_a_note_counts_or_measures_by_is_no_size(words: str, unit: Unit) -> None:
    parts = parse_callout([words], unit)
    assert all(isinstance(part, Words) for part in parts)
    for style in Style:
        assert parse_callout(write_parts(parts, style), unit) == parts


@pytest.mark.parametrize(
    "written",
    [
        "6 THICK",
        "25 WIDE",
        ".50 BOSS",
        "10 DEEP",
        "12 ACROSS FLATS",
        "25 BETWEEN FACES",
        "40 OVERALL",
        "20 RADIUS",
        "16 ACCESS",
        "3/16 THICK",
        "12 SQ",
        "63 LONG",
        "2 X 45°",
    ],
)
def test_a_number_with_a_word_that_says_what_it_measures_is_a_size(written: str) -> None:
    assert any(isinstance(part, Size) for part in parse_callout([written], Unit.MM))
