"""The title block: standards, units, general tolerances, process, and keys known and unknown."""

from decimal import Decimal
from time import perf_counter

import pytest

from calloutlint.callouts.write import Style
from calloutlint.model.drawing import Package, SheetLine, System
from calloutlint.reading.keys import is_known, normal_key
from calloutlint.reading.sheet import parse_sheet
from calloutlint.reading.standards import read_standard, read_unit
from calloutlint.reading.title_block import TitleBlock, read_title_block
from calloutlint.reading.tolerances import read_general_tolerances, read_process
from calloutlint.reading.transcribe import transcribe
from calloutlint.rulebook.rulebook import load_rulebook
from calloutlint.units import Unit

ASME, ISO = System.ASME, System.ISO


def block_of(*lines: str) -> TitleBlock:
    pairs = []
    for number, line in enumerate(lines, 1):
        written, _, value = line.partition(":")
        key = normal_key(written)
        pairs.append(SheetLine(number, line, key, value.strip(), is_known(key)))
    return read_title_block(pairs)


@pytest.mark.parametrize(
    ("written", "system", "edition"),
    [
        ("ASME Y14.5-2018", ASME, 2018),
        ("ASME Y14.5-2009", ASME, 2009),
        ("ASME Y14.5M-1994", ASME, 1994),
        ("ANSI Y14.5M-1982", ASME, 1982),
        ("ASME Y14.5", ASME, None),
        ("ASME Y14.5M", ASME, None),
        ("ASME Y 14.5 - 2009", ASME, 2009),
        ("ASME Y14.5 2018", ASME, 2018),
        ("ASME Y14.5–2018", ASME, 2018),
        ("asmey14.5-2018", ASME, 2018),
        ("Y14.5-2018 (R2024)", ASME, 2018),
        ("ASME Y14.5M-94", ASME, 1994),
        ("DIMENSIONS AND TOLERANCES PER ASME Y14.5-2018", ASME, 2018),
        ("ISO 8015", ISO, None),
        ("ISO 1101", ISO, None),
        ("ISO GPS", ISO, None),
        ("ISO-GPS", ISO, None),
        ("ISO 1101:2017", ISO, 2017),
        ("ISO 14405", ISO, None),
        ("ISO 14405-1:2016", ISO, 2016),
        ("ISO8015", ISO, None),
        ("DIN EN ISO 8015", ISO, None),
        ("ISO", ISO, None),
        ("ASME Y14.5-2015", None, None),
        ("ASME Y14.41-2019", None, None),
        ("ASME Y14.5.1M-1994", None, None),
        ("ISO 10110", None, None),
        ("ISO 9001", None, None),
        ("ASME Y14.5-2018 and ISO 1101", None, None),
        ("company standard 12", None, None),
    ],
)
def test_standard(written: str, system: System | None, edition: int | None) -> None:
    standard = read_standard(written)
    assert (standard.written, standard.system, standard.edition) == (written, system, edition)


@pytest.mark.parametrize(
    ("written", "unit"),
    [
        ("inch", Unit.INCH),
        ("INCHES", Unit.INCH),
        ("in", Unit.INCH),
        ("in.", Unit.INCH),
        ("mm", Unit.MM),
        ("MILLIMETRES", Unit.MM),
        ("millimeters", Unit.MM),
        ("metric", Unit.MM),
        ("ALL DIMENSIONS IN MM", Unit.MM),
        ("inch [mm]", Unit.INCH),
        ("mm [inch]", Unit.MM),
        ("cm", None),
        ("minutes", None),
    ],
)
def test_units(written: str, unit: Unit | None) -> None:
    assert read_unit(written) is unit


@pytest.mark.parametrize(
    ("written", "places"),
    [
        (".XX ±.01, .XXX ±.005", {2: ".01", 3: ".005"}),
        (".XX%%p.01 .XXX%%p.005", {2: ".01", 3: ".005"}),
        (".XX +/- .01; .XXX +/- .005", {2: ".01", 3: ".005"}),
        (".xx = ±.01", {2: ".01"}),
        (".00 ±.01, .000 ±.005", {2: ".01", 3: ".005"}),
        ("X ±0.5, X.X ±0.2, X.XX ±0.05", {0: "0.5", 1: "0.2", 2: "0.05"}),
        ("X ±0,5; X,X ±0,2", {0: "0.5", 1: "0.2"}),
        ("2 PLACE DECIMALS ±.01, THREE PLACE ±.005", {2: ".01", 3: ".005"}),
        ("FRACTIONS ±1/32, .XX ±.01", {2: ".01"}),
        ("FRAC ±1/64, DEC .XX ±.01 .XXX ±.005, ANG ±1", {2: ".01", 3: ".005"}),
        ("DIMENSIONS ARE IN INCHES. TOLERANCES: TWO PLACE DECIMAL ±.01 BEND ±1°", {2: ".01"}),
        ("DECIMALS ±.005, FRACTIONS ±1/64", dict.fromkeys(range(7), ".005")),
        ("±0,1, ±1°", dict.fromkeys(range(7), "0.1")),
        (".XX ±.01, SURFACE FINISH 3.2", {2: ".01"}),
        (".XX ±.01, BREAK SHARP EDGES .01 ±.005", {2: ".01"}),
        (".XX ±.01, FILLETS AND ROUNDS R.03 MAX", {2: ".01"}),
        ("PER ASME Y14.5-2018, .XX ±.01", {2: ".01"}),
        ("UNLESS OTHERWISE SPECIFIED .XX ±.01", {2: ".01"}),
        ("±0.1", dict.fromkeys(range(7), "0.1")),
    ],
)
def test_tolerances_by_places(written: str, places: dict[int, str]) -> None:
    general = read_general_tolerances(written, Unit.INCH)
    assert {tolerance.places: tolerance.amount.text for tolerance in general.places} == places
    assert general.unread == ()


@pytest.mark.parametrize(
    ("written", "text", "degrees"),
    [
        ("angles ±1°", "1°", "1"),
        ("ANGLES %%p1%%d", "1°", "1"),
        ("ANGLES ±0°30'", "0°30'", "0.5"),
        ("angular ±30'", "30'", "0.5"),
        ("ANGLES +/- .5 DEG", ".5°", "0.5"),
        ("angles ±0.5", "0.5°", "0.5"),
        ("angles ±1/2°", "1/2°", "0.5"),
        ("ANGULAR ±1 1/2", "1 1/2°", "1.5"),
        ("ANG ±0°30'", "0°30'", "0.5"),
        ("ANG. ±0°30'00\"", "0°30'00\"", "0.5"),
        ("FRAC ±1/64, DEC .XX ±.01 .XXX ±.005, ANG ±1", "1°", "1"),
        ("FRACTIONAL ±1/64 ANGULAR: MACH ±1/2° BEND ±1°", "1/2°", "0.5"),
        ("ANGLES ±30 MIN", "30'", "0.5"),
        ("±0,1, ±1°", "1°", "1"),
        ("X ±0.5, X° ±1°", "1°", "1"),
        ("LINEAR: X ±0.5 X.X ±0.2 ANGULAR: X ±1°", "1°", "1"),
    ],
)
def test_tolerance_of_angles(written: str, text: str, degrees: str) -> None:
    angle = read_general_tolerances(written, Unit.MM).angle
    assert angle is not None
    assert (angle.text, angle.amount, angle.unit) == (text, Decimal(degrees), Unit.DEGREE)


@pytest.mark.parametrize(
    ("written", "linear", "geometrical"),
    [
        ("ISO 2768-m", "m", None),
        ("ISO 2768-mK", "m", "K"),
        ("ISO 2768-mK-E", "m", "K"),
        ("ISO2768-1 m", "m", None),
        ("ISO 2768 - m K", "m", "K"),
        ("DIN ISO 2768-1-f", "f", None),
        ("ISO 2768-1:1989-c", "c", None),
        ("ISO 2768-V", "v", None),
        ("ISO 2768-1 medium", "m", None),
        ("ISO 2768-f, ISO 2768-2 H", "f", "H"),
        ("ISO 8015, ISO 2768-mL", "m", "L"),
        ("ISO 2768-1-m / ISO 2768-2-K", "m", "K"),
        ("ISO 2768-1/-2 mK", "m", "K"),
        ("ISO 2768-1/2-m-K", "m", "K"),
        ("ISO 2768-1-m/2768-2-K", "m", "K"),
        ("EN 22768-1 m", "m", None),
    ],
)
def test_tolerance_classes_of_iso_2768(written: str, linear: str, geometrical: str | None) -> None:
    general = read_general_tolerances(written, Unit.MM)
    assert (general.iso_2768, general.iso_2768_2, general.unread) == (linear, geometrical, ())


@pytest.mark.parametrize(
    ("written", "fractions"),
    [
        ("FRACTIONS ±1/32, .XX ±.01", "1/32"),
        ("FRACTIONAL DIMENSIONS: ±1/64", "1/64"),
        ("FRAC. ±1/16", "1/16"),
        ("X/X ±1/64", "1/64"),
        ("DECIMALS ±.005, FRACTIONS ±.015", ".015"),
        ("±1/32", "1/32"),
        ("DECIMALS ±.005", None),
        ("X ±.03", None),
    ],
)
def test_tolerance_of_fractions(written: str, fractions: str | None) -> None:
    general = read_general_tolerances(written, Unit.INCH)
    assert (general.fractions and general.fractions.text) == fractions
    assert general.unread == ()


@pytest.mark.parametrize(
    ("written", "unchecked"),
    [
        ("ISO 22081", ("ISO 22081",)),
        ("ISO 22081:2021, linear ±0.2, ⌓ 0.5 | A | B | C", ("⌓ 0.5 | A | B | C", "ISO 22081:2021")),
        ("DIN EN ISO 13920-BF", ("ISO 13920-BF",)),
        ("EN ISO 13920 - B", ("ISO 13920 - B",)),
        ("ISO 8062-3 - DCTG 9", ("ISO 8062-3 - DCTG 9",)),
        ("ISO 8062-3-DCTG 12-RMA 6 (RMAG H)", ("ISO 8062-3-DCTG 12-RMA 6 (RMAG H)",)),
        ("ISO 8062-3 DCTG 9 GCTG 6, X ±0.5", ("ISO 8062-3 DCTG 9 GCTG 6",)),
        ("ISO 2768-mK, ISO 13920-AE", ("ISO 13920-AE",)),
        ("DIN 16742 TG6", ("DIN 16742 TG6",)),
        ("0-6 ±0.1, 6-30 ±0.2", ("0-6 ±0.1", "6-30 ±0.2")),
        ("X.X° ±0.5°", ("X.X° ±0.5°",)),
    ],
)
def test_known_tolerances_that_are_not_tabulated(written: str, unchecked: tuple[str, ...]) -> None:
    general = read_general_tolerances(written, Unit.MM)
    assert (general.unchecked, general.unread) == (unchecked, ())


def test_a_unit_beside_an_amount_outranks_the_sheet() -> None:
    (tolerance,) = read_general_tolerances(".XX ±0.25 mm", Unit.INCH).places
    assert tolerance.amount.unit is Unit.MM


@pytest.mark.parametrize(
    ("written", "unread"),
    [
        ("ISO 2768-x", ("ISO 2768-x",)),
        ("ISO 2768", ("ISO 2768",)),
        ("see note 3", ("see note 3",)),
        (".XX ±.01, castings by foundry", ("castings by foundry",)),
        (".XX +.01/-.02", (".XX +.01/-.02",)),
        (".XX ±1/0", (".XX ±1/0",)),
        ("ISO 2768-m, ISO 2768-c", ("ISO 2768-c",)),
        ("angles ±1°, angles ±0.5", ("angles ±0.5",)),
        ("FRACTIONS ±1/32, FRACTIONS ±1/64", ("FRACTIONS ±1/64",)),
        ("HOLES ±.005", ("HOLES ±.005",)),
        ("see drawing 2768-m", ("see drawing 2768-m",)),
    ],
)
def test_tolerances_not_understood_are_kept(written: str, unread: tuple[str, ...]) -> None:
    assert read_general_tolerances(written, Unit.INCH).unread == unread


def test_process_spread() -> None:
    process = read_process("location 0.05, size 0,02 mm", Unit.INCH)
    assert process is not None
    assert process.location is not None
    assert process.size is not None
    assert (process.location.text, process.location.unit) == ("0.05", Unit.INCH)
    assert (process.size.text, process.size.unit) == ("0.02", Unit.MM)
    assert read_process("about a thou", Unit.INCH) is None


def test_keys_stand_in_any_case_and_the_unit_holds_wherever_it_stands() -> None:
    block = block_of("TOLERANCES: .XX ±.01", "Rev: C", "DRAWING: SG-2207", "Units: INCH")
    assert (block.texts["revision"], block.texts["drawing"]) == ("C", "SG-2207")
    assert block.general is not None
    assert block.general.places[0].amount.unit is Unit.INCH
    assert all(line.known for line in block.lines)


def test_repeatable_keys_collect() -> None:
    block = block_of("note: A", "fastener: M6 hex head screw", "note: B", "fastener: M8 hex head screw")
    assert block.notes == ["A", "B"]
    assert [fastener.text for fastener in block.fasteners] == ["M6 hex head screw", "M8 hex head screw"]


@pytest.mark.parametrize("key", ["material", "FINISH", "Scale", "weight", "Checked by", "date", "part no."])
def test_usual_keys_are_known_and_unchecked(key: str) -> None:
    (line,) = block_of(f"{key}: any").lines
    assert line.known
    assert line.reason is None


@pytest.mark.parametrize(
    ("line", "reason"),
    [
        ("colour: blue", "'colour' is no title-block key that is known"),
        ("revison: B", "'revison' is no title-block key that is known"),
        ("process: good", "'good' is no spread; expected such as location 0.05, size 0.02"),
        (
            "tolerances: as usual",
            "'as usual' is no general tolerance; "
            "expected such as .XX ±.01, X.X ±0.2, fractions ±1/64, angles ±1° or ISO 2768-m",
        ),
        (
            "tolerances: as usual, or so",
            "'as usual', 'or so' are no general tolerances; "
            "expected such as .XX ±.01, X.X ±0.2, fractions ±1/64, angles ±1° or ISO 2768-m",
        ),
    ],
)
def test_a_line_not_understood_says_why(line: str, reason: str) -> None:
    (read,) = block_of(line).lines
    assert (read.known, read.reason) == (False, reason)


def test_a_key_stated_twice_keeps_the_first() -> None:
    block = block_of("drawing: A-1", "drawing: A-2")
    assert block.texts["drawing"] == "A-1"
    assert block.lines[1].reason == "'drawing' is stated a second time; the first is used"


def test_a_key_stated_twice_alike_is_no_fault() -> None:
    assert all(line.known for line in block_of("rev: B", "revision: B").lines)


def test_standards_and_tolerances_may_take_several_lines() -> None:
    block = block_of(
        "standard: ISO 8015", "standard: ISO 286-2", "tolerances: .XX ±.01", "tolerances: .XXX ±.005, or so"
    )
    assert block.standard is not None
    assert (block.standard.written, block.standard.system) == ("ISO 8015, ISO 286-2", ISO)
    assert block.general is not None
    assert [tolerance.places for tolerance in block.general.places] == [2, 3]
    assert [line.known for line in block.lines] == [True, True, True, False]


@pytest.mark.parametrize("key", ["tolerances", "standard", "units", "process", "fastener", "joint"])
def test_a_value_too_long_to_mean_anything_is_not_read(key: str) -> None:
    (line,) = block_of(f"{key}: " + "4 mm + " * 100 + "x").lines
    assert (line.known, line.reason) == (False, f"701 characters; at most 500 are read as {key}")
    assert (len(line.text), len(line.value)) == (61, 701)


def test_notes_and_titles_may_be_long() -> None:
    block = block_of("note: " + "REMOVE BURRS. " * 100, "title: " + "COVER " * 100)
    assert all(line.known for line in block.lines)
    assert len(block.notes[0]) > 1000


@pytest.mark.parametrize(
    "line",
    [
        "tolerances: .XX ±.01, .XXX ±.005, castings by foundry",
        "tolerances: " + "DIN " * 120,
        "standard: ISO 8015",
        "fastener: M6 x 20",
        "joint: x = 4 with fixed in " + "4 + " * 110 + "4",
        "joint: x" + " " * 480 + "y",
    ],
)
def test_a_title_block_of_two_thousand_lines_takes_no_time(line: str) -> None:
    begin = perf_counter()
    block_of(*[line] * 2000)
    assert perf_counter() - begin < 5  # a few tenths of a second; minutes if lines were read together


def test_what_is_stated_first_holds_over_several_lines() -> None:
    block = block_of("tolerances: ISO 2768-m", "tolerances: ISO 2768-c", "tolerances: angles ±1°, ISO 2768-2-K")
    assert block.general is not None
    assert (block.general.iso_2768, block.general.iso_2768_2) == ("m", "K")
    assert block.general.unread == ("ISO 2768-c",)
    assert [line.known for line in block.lines] == [True, False, True]


FRACTIONS_IN_INCHES = "units: inch\ntolerances: FRACTIONS ±1/32, .XX ±.02, ANGULAR ±1/2°, SURFACE FINISH 63\n"


@pytest.mark.parametrize(
    ("title_block", "callouts", "found"),
    [
        (FRACTIONS_IN_INCHES, ["3/8", "⌀9/16 THRU", "R1/8", "2-3/4", "45°", ".50"], []),
        (FRACTIONS_IN_INCHES, ["3/8", "⌀.5625 THRU"], ["SIZE-02"]),
        ("units: inch\ntolerances: .XX ±.02\n", ["3/8"], ["SIZE-02"]),
        ("units: mm\ntolerances: ±0,1, ±1°\n", ["⌀9.5 THRU", "45°"], []),
        ("units: mm\ntolerances: ISO 13920-BF\n", ["250", "45°"], []),
        ("units: mm\ntolerances: ISO 8062-3 - DCTG 9\n", ["⌀120", "R5"], []),
        ("units: mm\ntolerances: ISO 22081\n", ["120"], []),
        ("units: mm\ntolerances: as usual\n", ["120"], ["READ-02"]),
    ],
)
def test_what_the_rules_make_of_general_tolerances(
    title_block: str, callouts: list[str], found: list[str]
) -> None:
    standard = "ASME Y14.5-2018" if "inch" in title_block else "ISO 8015"
    balloons = "".join(f"{number}) {callout}\n" for number, callout in enumerate(callouts, 1))
    drawing = parse_sheet(f"drawing: SG-1\nrevision: A\nstandard: {standard}\n{title_block}{balloons}", "gate")
    findings = load_rulebook().check(Package("gate", (drawing,)))
    assert [finding.rule for finding in findings if finding.rule in {"SIZE-02", "READ-02"}] == found


@pytest.mark.parametrize("style", Style)
def test_tolerances_stand_the_same_when_written_out(style: Style) -> None:
    text = "units: inch\ntolerances: FRACTIONS ±1/32, .XX ±.02, angles ±1/2°, ISO 13920-BF, SURFACE FINISH 63\n"
    drawing = parse_sheet(text + "1) 3/8\n", "gate")
    assert parse_sheet(transcribe(drawing, style), "gate") == drawing


def test_a_unit_that_is_none_stands_in_the_lines() -> None:
    block = block_of("units: furlong")
    assert block.unit is None
    assert [(line.key, line.value) for line in block.lines] == [("units", "furlong")]
