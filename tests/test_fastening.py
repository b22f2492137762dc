"""Fastener formulas of ASME Y14.5, Appendix B, by hand: line to line, and short by the last decimal place."""

from decimal import Decimal

import pytest

from calloutlint.facts.formulas import fastening
from calloutlint.facts.formulas.boundaries import GeometricTolerance
from calloutlint.model.frame import Modifier
from calloutlint.trade.drills import drilled_tolerance, next_larger_stock
from calloutlint.units import Unit

D = Decimal


@pytest.mark.parametrize(
    ("hole", "fastener", "tolerance"),
    [
        ("6.44", "6", "0.44"),  # worked example of ASME Y14.5M-1994, Appendix B (from memory)
        (".281", ".250", ".031"),
        ("6.6", "6.6", "0"),
        (".2499", ".2500", "-.0001"),
    ],
)
def test_floating_tolerance_and_hole_are_each_other_back(hole: str, fastener: str, tolerance: str) -> None:
    """T = H - F and H = F + T."""
    assert fastening.floating_tolerance(D(hole), D(fastener)) == D(tolerance)
    assert fastening.floating_hole(D(fastener), D(tolerance)) == D(hole)


@pytest.mark.parametrize(
    ("boundaries", "spare"),
    [
        ([".265", ".270"], ".015"),
        ([".265", ".250"], "0"),
        ([".2499", ".265"], "-.0001"),
        ([".265"], ".015"),
        ([".265", ".262", ".271"], ".012"),
    ],
)
def test_floating_parts_are_each_held_to_the_fastener(boundaries: list[str], spare: str) -> None:
    assert fastening.floating_spare(map(D, boundaries), D(".250")) == D(spare)


@pytest.mark.parametrize(
    ("inner", "other", "spare"),
    [(".2490", ".2530", ".001"), (".249", ".251", "0"), (".249", ".2508", "-.0001")],
)
def test_two_floating_parts_may_share(inner: str, other: str, spare: str) -> None:
    assert fastening.floating_pair_spare(D(inner), D(other), D(".250")) == D(spare)


@pytest.mark.parametrize(
    ("hole", "fastener", "fixing", "clearance"),
    [
        ("6.44", "6", "0.22", "0.22"),  # worked example of ASME Y14.5M-1994, Appendix B (from memory)
        (".281", ".250", ".014", ".017"),
        (".281", ".250", ".031", "0"),
        (".281", ".250", ".0311", "-.0001"),
    ],
)
def test_fixed_fastener_with_projected_zone(hole: str, fastener: str, fixing: str, clearance: str) -> None:
    """H - F = T1 + T2."""
    assert fastening.clearance_hole_tolerance(D(hole), D(fastener), D(fixing)) == D(clearance)
    assert fastening.fixed_hole(D(fastener), D(clearance), D(fixing)) == D(hole)
    assert fastening.fixed_total(D(hole), D(fastener)) == D(fixing) + D(clearance)
    assert fastening.fixing_hole_tolerance(D(hole) - D(clearance), D(fastener)) == D(fixing)


@pytest.mark.parametrize(
    ("fixing", "projection", "depth", "factor", "demand"),
    [
        (".010", ".50", ".50", "3", ".030"),
        (".010", ".25", ".50", "2", ".020"),
        ("0.2", "10", "16", "2.25", "0.45"),
        ("0.2", "0", "16", "1", "0.2"),
        (".003", "1", "3", None, ".005"),  # 1 + 2/3 is no decimal, .003(1 + 2/3) is
    ],
)
def test_fixing_hole_without_projected_zone(
    fixing: str, projection: str, depth: str, factor: str | None, demand: str
) -> None:
    """T2(1 + 2P/D)."""
    length, engaged = D(projection), D(depth)
    assert factor is None or fastening.tilt_factor(length, engaged) == D(factor)
    assert fastening.fixing_demand(D(fixing), length, engaged) == D(demand)
    assert fastening.fixing_hole_tolerance(D("6") + D(demand), D("6"), length, engaged) == D(fixing)


@pytest.mark.parametrize(
    ("boundaries", "fixing", "tilt", "spare"),
    [
        ([".267"], ".017", None, "0"),
        ([".267"], ".0171", None, "-.0001"),
        ([".267", ".270"], ".010", None, ".007"),
        ([".280"], ".010", (".50", ".50"), "0"),
        ([".2799"], ".010", (".50", ".50"), "-.0001"),
        ([".255"], ".003", ("1", "3"), "0"),
    ],
)
def test_fixed_parts_line_to_line_and_short(
    boundaries: list[str], fixing: str, tilt: tuple[str, str] | None, spare: str
) -> None:
    projection, depth = map(D, tilt) if tilt else (None, None)
    found = fastening.fixed_spare(map(D, boundaries), D(".250"), D(fixing), projection, depth)
    assert found == D(spare)


@pytest.mark.parametrize(("projection", "depth"), [("1", "0"), ("1", "-1"), ("-0.1", "1")])
def test_tilt_needs_a_depth_and_no_negative_projection(projection: str, depth: str) -> None:
    with pytest.raises(ValueError, match=r"depth of engagement|projection cannot be negative"):
        fastening.tilt_factor(D(projection), D(depth))


def inch_drill(boundary: str, tolerance: GeometricTolerance) -> tuple[Decimal, Decimal, Decimal] | None:
    found = fastening.drill_for_boundary(
        D(boundary),
        tolerance,
        lambda diameter: next_larger_stock(diameter, Unit.INCH),
        lambda diameter: drilled_tolerance(diameter, Unit.INCH),
    )
    return None if found is None else (found[0].diameter, found[1].smallest, found[1].largest)


@pytest.mark.parametrize("modifier", [Modifier.MMC, Modifier.LMC, None])
@pytest.mark.parametrize("boundary", [".250", ".1120", ".4375", ".0600"])
@pytest.mark.parametrize("amount", [".005", ".014", "0"])
def test_stock_drill_is_the_smallest_that_fits(boundary: str, amount: str, modifier: Modifier | None) -> None:
    """The drill that is found fits as drilled, and no smaller stock drill does."""
    tolerance = GeometricTolerance(D(amount), modifier)
    found = inch_drill(boundary, tolerance)
    assert found
    at_lmc = found[2] - found[1] if modifier is Modifier.LMC else D(0)
    assert found[1] - D(amount) - at_lmc >= D(boundary)
    drill = next_larger_stock(D(".0135"), Unit.INCH)
    while drill and drill.diameter < found[0]:
        spread = drilled_tolerance(drill.diameter, Unit.INCH)
        if spread:
            lost = spread.plus + spread.minus if modifier is Modifier.LMC else D(0)
            assert drill.diameter - spread.minus - D(amount) - lost < D(boundary)
        drill = next_larger_stock(drill.diameter + D(".0001"), Unit.INCH)


def test_no_drill_where_the_stock_ends() -> None:
    assert inch_drill("5", GeometricTolerance(D(".014"), Modifier.MMC)) is None


@pytest.mark.parametrize(
    ("head", "hole", "fastener", "left"),
    [
        ("10", "6.75", "6", "1.25"),
        ("9.78", "6.6", "6", "1.29"),
        ("7.5", "6.75", "6", "0"),
        ("7.4", "6.75", "6", "-0.05"),
    ],
)
def test_head_bearing_left(head: str, hole: str, fastener: str, left: str) -> None:
    """The head pushed aside by (H - F)/2: on the far side (head - H)/2 - (H - F)/2 is left to bear."""
    assert fastening.bearing_left(D(head), D(hole), D(fastener)) == D(left)
    assert D(left) == (D(head) - D(hole)) / 2 - (D(hole) - D(fastener)) / 2
