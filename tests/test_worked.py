"""One joint worked out, forward and backward, by hand: ASME Y14.5, Appendix B, floating and fixed fasteners."""

from decimal import Decimal

import pytest
from hypothesis import given
from hypothesis import strategies as st

from calloutlint.facts.formulas.boundaries import FeatureOfSize, GeometricTolerance
from calloutlint.facts.formulas.worked import (
    Held,
    Worked,
    find_fastener,
    find_hole,
    find_position,
    largest_screws,
    settled,
)
from calloutlint.model.frame import Modifier
from calloutlint.units import Unit

D = Decimal
MMC = Modifier.MMC


def hole(smallest: str, largest: str) -> FeatureOfSize:
    return FeatureOfSize(D(smallest), D(largest))


def zone(amount: str, modifier: Modifier | None = MMC) -> GeometricTolerance:
    return GeometricTolerance(D(amount), modifier)


TILTED = Held(fixed=True, tolerance=D("0.2"), projection=D(12), depth=D(16))  # 0.2 (1 + 24/16) = 0.5
PROJECTED = Held(fixed=True, tolerance=D(".010"), projected=True)


@pytest.mark.parametrize(
    ("fastener", "smallest", "tolerance", "held", "spare"),
    [
        ("6", "6.6", "0.3", Held(), "0.3"),
        (".250", ".279", ".029", Held(), "0"),  # line to line
        (".250", ".279", ".0291", Held(), "-0.0001"),  # short by the last place
        ("6", "6.6", "0.3", TILTED, "-0.2"),
        ("6", "6.8", "0.3", TILTED, "0"),
        (".250", ".281", ".021", PROJECTED, "0"),
        (".250", ".281", ".0211", PROJECTED, "-0.0001"),
        ("6", "6.6", "0.3", Held(fixed=True, tolerance=D("0.2")), "0.1"),  # P or D not known: T2 at least
    ],
)
def test_what_is_left_over(fastener: str, smallest: str, tolerance: str, held: Held, spare: str) -> None:
    worked = Worked(D(fastener), FeatureOfSize(D(smallest), D(smallest) + 1), zone(tolerance), held)
    assert worked.spare == D(spare)
    assert worked.fits is (D(spare) >= 0)


def test_bonus_at_least_material_condition_takes_room_away() -> None:
    """At LMC the smallest hole may be off by its whole size tolerance besides: 6.6 - (0.4 + 0.2) = 6."""
    worked = Worked(D(6), hole("6.6", "6.8"), zone("0.4", Modifier.LMC), Held())
    assert worked.inner == 6
    assert worked.spare == 0


@pytest.mark.parametrize(
    ("held", "largest"), [(Held(), "0.8"), (TILTED, "0.3"), (Held(fixed=True, tolerance=D("0.9")), "0")]
)
def test_largest_position(held: Held, largest: str) -> None:
    found = find_position(D(6), hole("6.8", "7"), GeometricTolerance(D(0), MMC), held)
    assert found.tolerance.amount == D(largest)
    assert found.fits is (held.demand <= D("0.8"))


def test_largest_position_when_the_fastener_is_too_thick() -> None:
    found = find_position(D(6), hole("5.9", "6.1"), GeometricTolerance(D(0), MMC), Held())
    assert found.tolerance.amount == 0
    assert found.spare == D("-0.1")
    assert found.largest_tolerance is None


def test_next_stock_drill_fits_as_it_is_usually_drilled() -> None:
    """F + T = .264; drill 17/64 (.2656) may come out at .2646 by AND10387: +.006 -.001."""
    found = find_hole(D(".250"), zone(".014"), Held(), Unit.INCH)
    assert found is not None
    assert found.drill is not None
    assert found.drill.name == "17/64"
    assert found.hole.smallest == D(".264625")
    assert found.fits


def test_no_stock_drill_is_large_enough() -> None:
    assert find_hole(D(90), zone("0.3"), Held(), Unit.MM) is None


def test_largest_fastener() -> None:
    found = find_fastener(hole("6.6", "6.8"), zone("0.3"), TILTED)
    assert found is not None
    assert found.fastener == D("5.8")
    assert found.spare == 0
    assert find_fastener(hole("6.6", "6.8"), zone("6.6"), Held()) is None


@pytest.mark.parametrize(
    ("diameter", "unit", "screws"),
    [
        (".265", Unit.INCH, ("1/4", "M6")),
        (".250", Unit.INCH, ("1/4", "M6")),
        (".2499", Unit.INCH, ("#10", "M6")),
        ("8", Unit.MM, ("5/16", "M8")),
        ("0.9", Unit.MM, ()),
    ],
)
def test_largest_screws(diameter: str, unit: Unit, screws: tuple[str, ...]) -> None:
    """Basic major diameters of ASME B1.1 and ISO 261; of the sizes that ASME B18.2.8 and ISO 273 list."""
    assert largest_screws(D(diameter), unit) == screws


def test_line_to_line_survives_the_conversion_from_mm_to_inch() -> None:
    """6 mm + 0.35 mm is exactly a quarter inch, though neither is a decimal of an inch."""
    pieces = [D(6) / D("25.4"), D("0.35") / D("25.4")]
    worked = Worked(pieces[0], hole(".25", ".26"), zone("0"), Held(True, pieces[1], projected=True))
    assert worked.spare == 0
    assert settled(D(1) / 3 * 3 - 1) == 0


LENGTHS = st.decimals("0.01", "3", places=3)


@given(
    st.decimals("1", "20", places=2),
    LENGTHS,
    LENGTHS,
    LENGTHS,
    st.sampled_from([Held(), TILTED, PROJECTED, Held(fixed=True)]),
    st.sampled_from([MMC, Modifier.LMC, None]),
)
def test_what_is_found_fits_line_to_line_and_no_more(
    fastener: Decimal, clearance: Decimal, width: Decimal, tolerance: Decimal, held: Held, kind: Modifier | None
) -> None:
    feature = FeatureOfSize(fastener + clearance, fastener + clearance + width)
    found = find_position(fastener, feature, GeometricTolerance(D(0), kind), held)
    assert found.spare == min(found.spare, 0)
    assert not Worked(fastener, feature, zone(str(found.tolerance.amount + D("0.001")), kind), held).fits
    largest = find_fastener(feature, GeometricTolerance(tolerance, kind), held)
    if largest is not None:
        assert largest.spare == 0
    drilled = find_hole(fastener, GeometricTolerance(tolerance, kind), held, Unit.MM)
    assert drilled is None or drilled.fits
