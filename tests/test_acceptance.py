"""Shares of accepted parts against closed forms and a seeded simulation."""

import random
from decimal import Decimal
from math import erf, exp, hypot, sqrt

import pytest

from calloutlint.facts.formulas.acceptance import Spread, acceptance, just_capable, share_accepted
from calloutlint.facts.formulas.boundaries import FeatureOfSize, GeometricTolerance
from calloutlint.model.frame import Modifier

D = Decimal
M, L = Modifier.MMC, Modifier.LMC
HOLE = FeatureOfSize(D("6.60"), D("6.75"))
SHAFT = FeatureOfSize(D("12.0"), D("12.2"), internal=False)


def normal(low: float, high: float, mean: float, sigma: float) -> float:
    """Probability of a normal variable between two values."""
    return (erf((high - mean) / sigma / sqrt(2)) - erf((low - mean) / sigma / sqrt(2))) / 2


def closed_form(feature: FeatureOfSize, tolerance: GeometricTolerance, spread: Spread, mean: float) -> float:
    """The integral solved by completing the square, for a tolerance that grows evenly with size.

    φ(s; μ, σs) exp(-(s - c)² / 2τ²), with τ = 2σ and c the size at which the tolerance would be nil, is a
    normal density again, scaled.
    """
    low, high = float(feature.smallest), float(feature.largest)
    sigma, tau = float(spread.size), 2 * float(spread.location)
    amount = float(tolerance.amount)
    inside = normal(low, high, mean, sigma)
    if tolerance.modifier not in {M, L}:
        return inside * (1 - exp(-(amount**2) / (2 * tau**2)))
    reference = float(feature.mmc if tolerance.modifier is M else feature.lmc)
    nil = reference - amount if reference == low else reference + amount
    variance = sigma**2 + tau**2
    middle, width = (mean * tau**2 + nil * sigma**2) / variance, sigma * tau / sqrt(variance)
    scale = tau / sqrt(variance) * exp(-((mean - nil) ** 2) / (2 * variance))
    return inside - scale * normal(low, high, middle, width)


@pytest.mark.parametrize("modifier", [M, L, None])
@pytest.mark.parametrize("feature", [HOLE, SHAFT], ids=["hole", "shaft"])
@pytest.mark.parametrize(
    ("amount", "location", "size", "offset"),
    [
        ("0.3", "0.05", "0.02", "0"),
        ("0.3", "0.2", "0.05", "0.03"),
        ("0", "0.02", "0.02", "0"),
        ("0.05", "0.001", "0.5", "-0.05"),  # location far narrower than size
        ("0.1", "1", "0.001", "0.09"),  # size far narrower than location, mean near or past a limit
        ("0.2", "0.05", "0.02", "0.2"),
    ],
)
def test_share_is_the_closed_form(
    feature: FeatureOfSize, modifier: Modifier | None, amount: str, location: str, size: str, offset: str
) -> None:
    mean = (feature.smallest + feature.largest) / 2 + D(offset)
    tolerance = GeometricTolerance(D(amount), modifier)
    spread = Spread(D(location), D(size), mean)
    expected = closed_form(feature, tolerance, spread, float(mean))
    assert share_accepted(feature, tolerance, spread) == pytest.approx(expected, abs=1e-8)


@pytest.mark.parametrize(
    "tolerance",
    [
        GeometricTolerance(D("0.3"), M),
        GeometricTolerance(D("0.3"), L),
        GeometricTolerance(D("0.3")),
        GeometricTolerance(D("0"), M),
        GeometricTolerance(D("0.1"), M, maximum=D("0.16")),
        GeometricTolerance(D("0.1"), L, maximum=D("0.16")),
    ],
)
@pytest.mark.parametrize("feature", [HOLE, SHAFT], ids=["hole", "shaft"])
def test_share_is_what_simulated_parts_come_to(feature: FeatureOfSize, tolerance: GeometricTolerance) -> None:
    """Within four standard errors of 60,000 parts measured one by one, seeded."""
    draw, parts, mean = random.Random(2207), 60_000, (feature.smallest + feature.largest) / 2
    spread = Spread(D("0.06"), D("0.04"), mean)
    accepted = 0
    for _ in range(parts):
        size = draw.gauss(float(mean), 0.04)
        deviation = 2 * hypot(draw.gauss(0, 0.06), draw.gauss(0, 0.06))
        if float(feature.smallest) <= size <= float(feature.largest):
            from_mmc = abs(size - float(feature.mmc if tolerance.modifier is M else feature.lmc))
            zone = float(tolerance.amount) + (from_mmc if tolerance.modifier else 0)
            accepted += deviation <= min(zone, float(tolerance.maximum or zone))
    share = share_accepted(feature, tolerance, spread)
    assert abs(accepted / parts - share) < 4 * sqrt(share * (1 - share) / parts)


def test_bonus_is_worth_the_difference() -> None:
    """⌀6.60-6.75, ⌀0.3, spread 0.1 and 0.02: without Ⓜ 1 - exp(-0.3² / 0.08) of the parts in limits."""
    found = acceptance(HOLE, GeometricTolerance(D("0.3"), M), Spread(D("0.1"), D("0.02")))
    in_limits = normal(6.60, 6.75, 6.675, 0.02)
    assert found.without == pytest.approx(in_limits * (1 - exp(-0.09 / 0.08)), abs=1e-9)
    assert found.with_bonus > found.without
    assert found.gained == found.with_bonus - found.without


def test_no_bonus_is_gained_regardless_of_size() -> None:
    assert acceptance(HOLE, GeometricTolerance(D("0.3")), Spread(D("0.1"), D("0.02"))).gained == 0


@pytest.mark.parametrize(
    ("location", "size", "mean", "share"),
    [
        ("0", "0", "6.7", 1.0),
        ("0", "0", "6.76", 0.0),  # every part too large
        ("0.1", "0", "6.7", 1 - exp(-(0.4**2) / 0.08)),  # ⌀0.3 Ⓜ at 6.7: 0.4
        ("0", "0.02", "6.675", normal(6.60, 6.75, 6.675, 0.02)),
        ("0.1", "0.02", "9", 0.0),
    ],
)
def test_a_process_without_spread_is_certain(location: str, size: str, mean: str, share: float) -> None:
    spread = Spread(D(location), D(size), D(mean))
    assert share_accepted(HOLE, GeometricTolerance(D("0.3"), M), spread) == pytest.approx(share, abs=1e-9)


def test_typical_spread_just_fills_limits_and_zone() -> None:
    """Six standard deviations each; a zero tolerance takes what is allowed in the middle of the limits."""
    assert just_capable(HOLE, GeometricTolerance(D("0.3"), M)) == Spread(D("0.05"), D("0.025"))
    assert just_capable(HOLE, GeometricTolerance(D(0), M)) == Spread(D("0.0125"), D("0.025"))


def test_negative_spread_is_refused() -> None:
    with pytest.raises(ValueError, match="cannot be negative"):
        Spread(D("-0.1"), D("0.02"))
