"""General tolerances against published values of ISO 2768-1:1989 and ISO 2768-2:1989 (entered from memory)."""

import csv
from decimal import Decimal
from pathlib import Path

import pytest

from calloutlint.model.drawing import GeneralTolerances, PlacesTolerance
from calloutlint.model.frame import Characteristic
from calloutlint.model.size import Size, SizeForm, SizeStatus
from calloutlint.model.values import Value
from calloutlint.trade import general_tolerances as trade
from calloutlint.units import Unit

_CSV = Path(__file__).with_name("values") / "iso_2768.csv"
_LINES = _CSV.read_text(encoding="utf-8").splitlines()
_ROWS = list(csv.DictReader(line for line in _LINES if not line.startswith("#")))
_GEOMETRICAL = {
    "general_straightness_flatness": Characteristic.FLATNESS,
    "general_perpendicularity": Characteristic.PERPENDICULARITY,
    "general_symmetry": Characteristic.SYMMETRY,
    "general_circular_runout": Characteristic.CIRCULAR_RUNOUT,
}


def looked_up(quantity: str, length: Decimal, class_: str) -> Decimal | None:
    if quantity in _GEOMETRICAL:
        return trade.geometrical(_GEOMETRICAL[quantity], length, class_)
    table = {
        "general_linear_tolerance": trade.linear,
        "general_broken_edge_tolerance": trade.broken_edge,
        "general_angular_tolerance": trade.angle,
    }
    return table[quantity](length, class_)


@pytest.mark.parametrize("row", _ROWS, ids=lambda r: "-".join((r["quantity"], r["class"], r["over"], r["to"])))
def test_published_value_holds_through_its_range(row: dict[str, str]) -> None:
    """The value holds just above the range's lower end and at its upper end."""
    over = Decimal(row["over"] or 0)
    lengths = [over + Decimal("0.001"), Decimal(row["to"]) if row["to"] else over + 100]
    found = {looked_up(row["quantity"], length, row["class"]) for length in lengths}
    assert found == {Decimal(row["value"])}


@pytest.mark.parametrize(
    ("size", "class_"),
    [("0.499", "m"), ("3", "v"), ("4000.001", "c"), ("2000.001", "f"), ("0.3", "f")],
)
def test_sizes_that_the_linear_table_leaves_out(size: str, class_: str) -> None:
    """ISO 2768-1 Table 1: nothing under 0.5 mm, none in class v to 3 mm, none in class f over 2000 mm."""
    assert trade.linear(Decimal(size), class_) is None


def test_first_range_begins_at_half_a_millimetre() -> None:
    assert trade.linear(Decimal("0.5"), "m") == Decimal("0.1")
    assert trade.broken_edge(Decimal("0.5"), "m") == Decimal("0.2")


def test_parallelism_has_no_table() -> None:
    """ISO 2768-2 gives parallelism by the size tolerance or the flatness, not by a table."""
    assert trade.geometrical(Characteristic.PARALLELISM, Decimal(50), "K") is None


INCH_BY_PLACES = GeneralTolerances(
    written=".XX ±.01, .XXX ±.005, angles ±1°",
    places=(
        PlacesTolerance(2, Value(".01", Decimal(".01"), Unit.INCH)),
        PlacesTolerance(3, Value(".005", Decimal(".005"), Unit.INCH)),
    ),
    angle=Value("1", Decimal(1), Unit.DEGREE),
)
ISO_MEDIUM = GeneralTolerances(written="ISO 2768-m", iso_2768="m")


def size(text: str, unit: Unit | None, form: SizeForm = SizeForm.LINEAR) -> Size:
    return Size(form, Value(text, Decimal(text), unit))


def test_by_places_goes_by_the_places_written() -> None:
    assert trade.general_tolerance(INCH_BY_PLACES, size(".50", Unit.INCH), Unit.INCH) == Decimal(".01")
    assert trade.general_tolerance(INCH_BY_PLACES, size(".500", Unit.INCH), Unit.INCH) == Decimal(".005")
    assert trade.general_tolerance(INCH_BY_PLACES, size(".5", Unit.INCH), Unit.INCH) is None


def test_by_places_does_not_cover_a_fraction_or_another_unit() -> None:
    whole = GeneralTolerances("X ±.03", places=(PlacesTolerance(0, Value(".03", Decimal(".03"), Unit.INCH)),))
    quarter = Size(SizeForm.LINEAR, Value("1/4", Decimal("0.25"), Unit.INCH))
    assert trade.general_tolerance(whole, quarter, Unit.INCH) is None
    assert trade.general_tolerance(INCH_BY_PLACES, size("6.35", Unit.MM), Unit.INCH) is None


FRACTIONS = GeneralTolerances(
    written="FRACTIONS ±1/32, .XX ±.01",
    places=(PlacesTolerance(2, Value(".01", Decimal(".01"), Unit.INCH)),),
    fractions=Value("1/32", Decimal("0.03125"), Unit.INCH),
)


@pytest.mark.parametrize(("text", "amount"), [("1 1/2", "1.5"), ("9/16", "0.5625"), ("2", "2")])
def test_fractions_and_whole_inches_go_by_the_tolerance_of_fractions(text: str, amount: str) -> None:
    """Common practice, no source."""
    written = Size(SizeForm.DIAMETER, Value(text, Decimal(amount), Unit.INCH))
    assert trade.general_tolerance(FRACTIONS, written, Unit.INCH) == Decimal("0.03125")


def test_the_tolerance_of_fractions_covers_no_decimal() -> None:
    assert trade.general_tolerance(FRACTIONS, size(".50", Unit.INCH), Unit.INCH) == Decimal(".01")
    assert trade.general_tolerance(FRACTIONS, size(".500", Unit.INCH), Unit.INCH) is None
    assert trade.general_tolerance(FRACTIONS, size("2", Unit.MM), Unit.INCH) is None


def test_class_on_an_inch_drawing_is_converted_exactly() -> None:
    """ISO 2768-1 class m from 6 to 30 mm is ±0.2 mm; 30 mm is 1.1811… in, so 1.1811 is inside, 1.1812 not."""
    inside = trade.general_tolerance(ISO_MEDIUM, size("1.1811", Unit.INCH), Unit.INCH)
    outside = trade.general_tolerance(ISO_MEDIUM, size("1.1812", Unit.INCH), Unit.INCH)
    assert inside == Decimal("0.2") / Decimal("25.4")
    assert outside == Decimal("0.3") / Decimal("25.4")


def test_radii_go_by_the_table_of_broken_edges() -> None:
    assert trade.general_tolerance(ISO_MEDIUM, size("5", Unit.MM), Unit.MM) == Decimal("0.1")
    assert trade.general_tolerance(ISO_MEDIUM, size("5", Unit.MM, SizeForm.RADIUS), Unit.MM) == Decimal("0.5")


def test_unstated_unit_is_millimetres_for_a_class() -> None:
    assert trade.general_tolerance(ISO_MEDIUM, size("50", None), None) == Decimal("0.3")


@pytest.mark.parametrize("status", [s for s in SizeStatus if s is not SizeStatus.TOLERANCED])
def test_exact_and_one_sided_sizes_have_no_general_tolerance(status: SizeStatus) -> None:
    exempt = Size(SizeForm.LINEAR, Value("50", Decimal(50), Unit.MM), status=status)
    assert trade.general_tolerance(ISO_MEDIUM, exempt, Unit.MM) is None


def test_angles_go_by_the_stated_angle_or_the_shorter_side() -> None:
    """ISO 2768-1 Table 3, class m: 30' up to 50 mm of shorter side."""
    assert trade.general_tolerance(INCH_BY_PLACES, size("30", Unit.DEGREE, SizeForm.ANGLE), Unit.INCH) == 1
    assert trade.general_angle(ISO_MEDIUM) is None
    assert trade.general_angle(ISO_MEDIUM, Decimal(50)) == Decimal("0.5")
    assert trade.general_angle(GeneralTolerances("X ±1"), Decimal(50)) is None


def test_a_class_says_something_on_angles_even_where_the_side_is_unknown() -> None:
    assert trade.covers_angles(ISO_MEDIUM)
    assert trade.covers_angles(INCH_BY_PLACES)
    assert not trade.covers_angles(GeneralTolerances("X ±1"))
