"""Boundaries of features of size, by hand from the definitions of ASME Y14.5 (bonus, VC, RC, IB, OB, MMB)."""

from decimal import Decimal

import pytest

from calloutlint.facts.formulas.boundaries import (
    FeatureOfSize,
    GeometricTolerance,
    allowed,
    bonus,
    datum_shift,
    gauge_size,
    inner_boundary,
    maximum_material_boundary,
    outer_boundary,
    resultant_condition,
    virtual_condition,
    wall_between,
    wall_left,
)
from calloutlint.facts.formulas.coordinates import coordinate, diametral
from calloutlint.model.frame import Modifier

D = Decimal
M, L, RFS = Modifier.MMC, Modifier.LMC, None

HOLE = FeatureOfSize(D(".279"), D(".288"))
SHAFT = FeatureOfSize(D("12.0"), D("12.2"), internal=False)
SLOT = FeatureOfSize(D("6.60"), D("6.75"))


@pytest.mark.parametrize(
    ("feature", "amount", "modifier", "virtual", "resultant", "inner", "outer"),
    [
        (HOLE, ".014", M, ".265", ".311", ".265", ".311"),
        (HOLE, ".014", L, ".302", ".256", ".256", ".302"),
        (HOLE, ".014", RFS, None, None, ".265", ".302"),
        (HOLE, ".014", Modifier.RFS, None, None, ".265", ".302"),
        (SHAFT, "0.1", M, "12.3", "11.7", "11.7", "12.3"),
        (SHAFT, "0.1", L, "11.9", "12.5", "11.9", "12.5"),
        (SHAFT, "0.1", RFS, None, None, "11.9", "12.3"),
        (SLOT, "0", M, "6.60", "6.90", "6.60", "6.90"),
        (SLOT, "0", L, "6.75", "6.45", "6.45", "6.75"),
    ],
)
def test_boundaries_worked_by_hand(
    feature: FeatureOfSize,
    amount: str,
    modifier: Modifier | None,
    virtual: str | None,
    resultant: str | None,
    inner: str,
    outer: str,
) -> None:
    """H_MMC - T, H_LMC + T + bonus and so on, each with the numbers written out."""
    tolerance = GeometricTolerance(D(amount), modifier)
    assert virtual_condition(feature, tolerance) == (D(virtual) if virtual else None)
    assert resultant_condition(feature, tolerance) == (D(resultant) if resultant else None)
    assert inner_boundary(feature, tolerance) == D(inner)
    assert outer_boundary(feature, tolerance) == D(outer)


@pytest.mark.parametrize(
    ("feature", "modifier", "size", "expected"),
    [
        (HOLE, M, ".279", "0"),
        (HOLE, M, ".2791", ".0001"),
        (HOLE, M, ".288", ".009"),
        (HOLE, L, ".279", ".009"),
        (HOLE, L, ".288", "0"),
        (HOLE, RFS, ".288", "0"),
        (SHAFT, M, "12.2", "0"),
        (SHAFT, M, "12.0", "0.2"),
        (SHAFT, L, "12.0", "0"),
        (SHAFT, L, "12.15", "0.15"),
    ],
)
def test_bonus_is_the_departure_from_the_stated_material_condition(
    feature: FeatureOfSize, modifier: Modifier | None, size: str, expected: str
) -> None:
    tolerance = GeometricTolerance(D(".014"), modifier)
    assert bonus(feature, tolerance, D(size)) == D(expected)
    assert allowed(feature, tolerance, D(size)) == D(".014") + D(expected)


def test_bonus_stops_at_the_stated_maximum() -> None:
    """⌀.000 Ⓜ ⌀.010 MAX: a hole .250-.270 has .010 from .260 on, so its outer boundary is .280, not .290."""
    hole, zero = FeatureOfSize(D(".250"), D(".270")), GeometricTolerance(D(0), M, maximum=D(".010"))
    assert [allowed(hole, zero, D(size)) for size in (".255", ".260", ".270")] == [
        D(".005"),
        D(".010"),
        D(".010"),
    ]
    assert (inner_boundary(hole, zero), outer_boundary(hole, zero)) == (D(".250"), D(".280"))


def test_bonus_outside_the_limits_is_refused() -> None:
    with pytest.raises(ValueError, match=r"size 0\.2881 is outside the limits 0\.279 to 0\.288"):
        bonus(HOLE, GeometricTolerance(D(0), M), D(".2881"))


def test_limits_in_the_wrong_order_are_refused() -> None:
    with pytest.raises(ValueError, match=r"wrong order: 0\.288 is more than 0\.279"):
        FeatureOfSize(D(".288"), D(".279"))


@pytest.mark.parametrize(
    ("feature", "amount", "modifier", "boundary", "size", "shift"),
    [
        (FeatureOfSize(D("20.0"), D("20.1")), "0.05", M, "19.95", "20.06", "0.11"),
        (FeatureOfSize(D("20.0"), D("20.1")), "0", M, "20.0", "20.0", "0"),
        (FeatureOfSize(D("20.0"), D("20.1")), "0.05", RFS, "19.95", "20.1", "0.15"),
        (FeatureOfSize(D(".998"), D("1.000"), internal=False), ".003", M, "1.003", ".998", ".005"),
    ],
)
def test_datum_shift_is_the_departure_from_the_maximum_material_boundary(
    feature: FeatureOfSize, amount: str, modifier: Modifier | None, boundary: str, size: str, shift: str
) -> None:
    tolerance = GeometricTolerance(D(amount), modifier)
    assert maximum_material_boundary(feature, tolerance) == D(boundary)
    assert datum_shift(feature, tolerance, D(size)) == D(shift)


def test_functional_gauge_is_made_to_the_virtual_condition() -> None:
    """Only Ⓜ can be gauged so: 6.60-6.75, ⌀0.3 Ⓜ takes a pin of 6.30; a shaft 12.2, ⌀0.1 Ⓜ a ring of 12.3."""
    assert gauge_size(SLOT, GeometricTolerance(D("0.3"), M)) == D("6.30")
    assert gauge_size(SHAFT, GeometricTolerance(D("0.1"), M)) == D("12.3")
    assert gauge_size(SLOT, GeometricTolerance(D("0.3"), L)) is None
    assert gauge_size(SLOT, GeometricTolerance(D("0.3"))) is None


@pytest.mark.parametrize(("edge", "left"), [(".250", ".0945"), (".1555", "0"), (".1554", "-.0001")])
def test_wall_left_at_an_edge(edge: str, left: str) -> None:
    """Outer boundary .311: the wall is the distance of the axis less .1555, to line to line and beyond."""
    assert wall_left(D(edge), outer_boundary(HOLE, GeometricTolerance(D(".014"), M))) == D(left)


@pytest.mark.parametrize(("spacing", "left"), [("10", "3.1"), ("6.9", "0"), ("6.8", "-0.1")])
def test_wall_between_two_holes(spacing: str, left: str) -> None:
    assert wall_between(D(spacing), D("6.9"), D("6.9")) == D(left)


@pytest.mark.parametrize(
    ("x", "y", "zone"),
    [("3", "4", "10"), (".005", "0", ".010"), ("-.003", ".004", ".010"), ("0.5", "1.2", "2.6")],
)
def test_coordinates_reach_a_diametral_zone(x: str, y: str, zone: str) -> None:
    """Pythagorean triples, so that the root is exact."""
    assert diametral(D(x), D(y)) == D(zone)


def test_equal_coordinates_and_their_zone_are_each_other_back() -> None:
    """±.005 both ways is a zone of .01414…, the usual .014; .014 is ±.00495 (common practice, no source)."""
    assert round(diametral(D(".005"), D(".005")), 5) == D(".01414")
    assert round(coordinate(D(".014")), 5) == D(".00495")
    for zone in (".014", ".2828427", "1"):
        half = coordinate(D(zone))
        assert abs(diametral(half, half) - D(zone)) < D("1e-26")
    with pytest.raises(ValueError, match="negative"):
        coordinate(D("-0.1"))
