"""Stock drills against published sizes of ASME B94.11M, and the drilled tolerances of AND10387."""

import csv
from decimal import Decimal
from pathlib import Path

import pytest

from calloutlint.trade.drills import (
    DrilledTolerance,
    drill_diameter,
    drilled_tolerance,
    is_stock,
    next_fitting_drill,
    next_larger_stock,
    stock_drills,
)
from calloutlint.units import Unit

_VALUES = Path(__file__).with_name("values")


def published(name: str) -> list[dict[str, str]]:
    lines = (_VALUES / name).read_text(encoding="utf-8").splitlines()
    rows = csv.DictReader(line for line in lines if not line.startswith("# "))
    return [row for row in rows if row["quantity"] == "drill_diameter"]


def name(row: dict[str, str]) -> str:
    return row["inputs"].removeprefix("drill=")


@pytest.mark.parametrize("row", published("drills.csv"), ids=name)
def test_published_diameter(row: dict[str, str]) -> None:
    assert drill_diameter(name(row)) == Decimal(row["value"])
    assert is_stock(Decimal(row["value"]), Unit.INCH)


@pytest.mark.parametrize("row", published("package_differences.csv"), ids=name)
def test_where_the_package_rounds(row: dict[str, str]) -> None:
    assert drill_diameter(name(row)) == Decimal(row["published"]) != Decimal(row["value"])
    assert row["reason"]


def test_number_drills_grow_smaller_and_letters_larger() -> None:
    """All 80 and all 26: a slip of a digit would break the order."""
    numbers = [drill_diameter(f"#{number}") or Decimal(0) for number in range(1, 81)]
    letters = [drill_diameter(letter) or Decimal(0) for letter in "ABCDEFGHIJKLMNOPQRSTUVWXYZ"]
    assert numbers == sorted(numbers, reverse=True)
    assert letters == sorted(letters)
    assert 0 < numbers[-1] < numbers[0] < letters[0]


@pytest.mark.parametrize("spelling", ["#7", "7", "NO. 7", "No.7", "#7 DRILL"])
def test_spellings_of_a_number_drill(spelling: str) -> None:
    assert drill_diameter(spelling) == Decimal(".201")


@pytest.mark.parametrize("spelling", ["", "#0", "#81", "1/3", "5/128", "AA", "⌀", "¼", "1/0"])
def test_what_is_no_drill(spelling: str) -> None:
    assert drill_diameter(spelling) is None


@pytest.mark.parametrize(
    ("diameter", "unit", "expected"),
    [
        (".281", Unit.INCH, True),
        (".2812", Unit.INCH, True),
        (".266", Unit.INCH, True),
        (".2055", Unit.INCH, True),
        (".300", Unit.INCH, False),
        (".2598", Unit.INCH, True),
        ("6.6", Unit.MM, True),
        ("6.75", Unit.MM, True),
        ("6.65", Unit.MM, False),
        ("17.5", Unit.MM, True),
        ("17.6", Unit.MM, False),
        ("7.1438", Unit.MM, True),
        ("120", Unit.MM, False),
    ],
)
def test_stock_sizes(diameter: str, unit: Unit, expected: bool) -> None:
    """An inch size is rounded to three places; a converted one keeps four."""
    assert is_stock(Decimal(diameter), unit) is expected


@pytest.mark.parametrize(
    ("diameter", "unit", "expected"),
    [
        (".281", Unit.INCH, "K"),
        (".2811", Unit.INCH, "9/32"),
        (".2501", Unit.INCH, "F"),
        ("1.76", Unit.INCH, "1 25/32"),
        ("6.61", Unit.MM, "6.7"),
        ("6.6", Unit.MM, "6.6"),
        ("14.1", Unit.MM, "14.25"),
        ("32.1", Unit.MM, "32.5"),
    ],
)
def test_smallest_drill_that_is_large_enough(diameter: str, unit: Unit, expected: str) -> None:
    drill = next_larger_stock(Decimal(diameter), unit)
    assert drill is not None
    assert drill.name == expected
    assert drill.diameter >= Decimal(diameter)


@pytest.mark.parametrize(
    ("least", "unit", "expected"),
    [
        (".280", Unit.INCH, "K"),
        (".2801", Unit.INCH, "9/32"),
        (".281", Unit.INCH, "L"),
        ("6.57", Unit.MM, "6.6"),
        ("6.571", Unit.MM, "6.7"),
        ("2.5", Unit.INCH, None),
    ],
)
def test_smallest_drill_whose_smallest_hole_is_large_enough(
    least: str, unit: Unit, expected: str | None
) -> None:
    """The hole of a drill may come out .001 in or 0.03 mm smaller (AND10387)."""
    drill = next_fitting_drill(Decimal(least), unit)
    assert (drill.name if drill else None) == expected


def test_above_the_largest_drill_there_is_none() -> None:
    assert next_larger_stock(Decimal("3.6"), Unit.INCH) is None
    assert next_larger_stock(Decimal("100.5"), Unit.MM) is None


def test_drills_stand_in_order_without_repeats() -> None:
    for unit in (Unit.INCH, Unit.MM):
        diameters = [drill.diameter for drill in stock_drills(unit)]
        assert diameters == sorted(set(diameters))


@pytest.mark.parametrize(
    ("diameter", "unit", "plus", "minus"),
    [
        (".125", Unit.INCH, ".004", ".001"),
        (".1250001", Unit.INCH, ".005", ".001"),
        (".25", Unit.INCH, ".005", ".001"),
        (".281", Unit.INCH, ".006", ".001"),
        (".75", Unit.INCH, ".008", ".001"),
        ("1", Unit.INCH, ".010", ".001"),
        ("2", Unit.INCH, ".012", ".001"),
        ("6.6", Unit.MM, "0.15", "0.03"),
        ("3.175", Unit.MM, "0.10", "0.03"),
    ],
)
def test_drilled_tolerance(diameter: str, unit: Unit, plus: str, minus: str) -> None:
    """AND10387, from memory of the published table."""
    assert drilled_tolerance(Decimal(diameter), unit) == DrilledTolerance(Decimal(plus), Decimal(minus))


def test_no_drilled_tolerance_outside_the_table() -> None:
    assert drilled_tolerance(Decimal("2.01"), Unit.INCH) is None
    assert drilled_tolerance(Decimal("0.3"), Unit.MM) is None
