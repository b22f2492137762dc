"""Clearance holes against published values of ASME B18.2.8 and ISO 273, row by row with their provenance."""

import csv
from decimal import Decimal
from pathlib import Path

import pytest

from calloutlint.trade.clearance import (
    ClearanceFit,
    ClearanceHole,
    assumed_range,
    clearance_sizes,
    fasteners_for,
    is_published,
)
from calloutlint.trade.inches import named_size
from calloutlint.units import Unit

_VALUES = Path(__file__).with_name("values")
_FITS = {"fine": ClearanceFit.CLOSE, "medium": ClearanceFit.NORMAL, "coarse": ClearanceFit.LOOSE}


def published(name: str) -> list[dict[str, str]]:
    lines = (_VALUES / name).read_text(encoding="utf-8").splitlines()
    rows = csv.DictReader(line for line in lines if not line.startswith("# "))
    return [row for row in rows if row["quantity"].startswith("clearance")]


def hole(inputs: str) -> ClearanceHole | None:
    """The hole that `thread=M6; series=fine; …` or `screw=1/4; fit=close; …` names."""
    stated = dict(part.split("=") for part in inputs.split("; "))
    if "thread" in stated:
        sizes = clearance_sizes(Decimal(stated["thread"].removeprefix("M")), Unit.MM)
        return sizes.hole(_FITS[stated["series"]]) if sizes else None
    size = named_size(stated["screw"])
    assert size
    sizes = clearance_sizes(size.diameter, Unit.INCH)
    return sizes.hole(ClearanceFit(stated["fit"])) if sizes else None


def looked_up(row: dict[str, str]) -> Decimal | None:
    found = hole(row["inputs"])
    if found is None:
        return None
    member = row["quantity"].rpartition("_")[2]
    return {"min": found.minimum, "max": found.maximum, "diameter": found.drill}[member]


@pytest.mark.parametrize(
    "row", published("clearance_holes.csv"), ids=lambda r: f"{r['quantity']}-{r['inputs']}"
)
def test_published_value(row: dict[str, str]) -> None:
    """Fractions in the list are cut to five places."""
    found = looked_up(row)
    assert found is not None
    assert abs(found - Decimal(row["value"])) < Decimal("0.00001")


@pytest.mark.parametrize("row", published("package_differences.csv"), ids=lambda row: row["inputs"])
def test_where_the_package_differs(row: dict[str, str]) -> None:
    expected = Decimal(row["published"]) if row["published"] else None
    assert looked_up(row) == expected != Decimal(row["value"])
    assert row["reason"]


@pytest.mark.parametrize(
    ("nominal", "unit", "expected"),
    [
        (".281", Unit.INCH, "1/4 normal"),
        (".28125", Unit.INCH, "1/4 normal"),
        (".266", Unit.INCH, "1/4 close"),
        (".297", Unit.INCH, "1/4 loose"),
        (".2055", Unit.INCH, "#10 close"),
        (".206", Unit.INCH, "#10 close"),
        (".116", Unit.INCH, "#3 normal, #2 loose"),
        (".906", Unit.INCH, "7/8 close, 3/4 loose"),
        ("6.6", Unit.MM, "M6 normal"),
        ("6.60", Unit.MM, "M6 normal"),
        ("11", Unit.MM, "M10 normal"),
        ("13.5", Unit.MM, "M12 normal"),
        ("14", Unit.MM, ""),
        ("10", Unit.MM, "M8 loose"),
        (".300", Unit.INCH, ""),
    ],
)
def test_fasteners_that_a_hole_is_published_for(nominal: str, unit: Unit, expected: str) -> None:
    """Names from ASME B18.2.8 and ISO 273."""
    found = fasteners_for(Decimal(nominal), unit)
    assert ", ".join(f"{match.sizes.size} {match.fit}" for match in found) == expected
    assert is_published(Decimal(nominal), unit) is bool(expected)


@pytest.mark.parametrize(
    ("nominal", "unit", "expected"),
    [
        ("7.1374", Unit.MM, "1/4"),
        ("7.14", Unit.MM, "1/4"),
        (".2598", Unit.INCH, "M6"),
        (".260", Unit.INCH, "M6"),
    ],
)
def test_a_converted_hole_is_still_that_hole(nominal: str, unit: Unit, expected: str) -> None:
    assert {match.sizes.size for match in fasteners_for(Decimal(nominal), unit)} == {expected}


@pytest.mark.parametrize(
    ("diameter", "unit", "inside", "outside"),
    [
        (".25", Unit.INCH, [".2656", ".266", ".281", ".2969", ".297"], [".265", ".298"]),
        (".19", Unit.INCH, [".2055", ".206", ".238"], [".204", ".239"]),
        ("6", Unit.MM, ["6.4", "6.6", "6.9", "7"], ["6.3", "7.1"]),
    ],
)
def test_range_from_close_to_loose(diameter: str, unit: Unit, inside: list[str], outside: list[str]) -> None:
    """An inch hole counts by its drill and by its three places alike."""
    span = assumed_range(Decimal(diameter), unit)
    assert span is not None
    smallest, largest = span
    assert all(smallest <= Decimal(nominal) <= largest for nominal in inside)
    assert not any(smallest <= Decimal(nominal) <= largest for nominal in outside)


@pytest.mark.parametrize(
    ("diameter", "unit"), [("0.216", Unit.INCH), ("2", Unit.INCH), ("9", Unit.MM), ("6.5", Unit.MM)]
)
def test_what_the_standards_do_not_list(diameter: str, unit: Unit) -> None:
    assert clearance_sizes(Decimal(diameter), unit) is None
    assert assumed_range(Decimal(diameter), unit) is None
