"""What a material condition modifier is worth: the share of parts accepted with it and without it.

A process spreads the location of an axis normally, with one standard deviation in both directions and its
mean at true position, and the size normally, independent of the location. Lengths are exact decimals in one
unit; shares are floats from 0 to 1.
"""

from collections.abc import Callable
from dataclasses import dataclass, replace
from decimal import Decimal
from itertools import pairwise
from math import ceil, exp, expm1, fsum, pi, sqrt

from calloutlint.facts.formulas.boundaries import FeatureOfSize, GeometricTolerance, allowed
from calloutlint.model.frame import Modifier

_REACH = 9.0
"""In standard deviations: what lies farther from the mean is below the precision of a float."""
_PANELS_PER_SCALE = 40
_MOST_PANELS = 40_000


@dataclass(frozen=True, slots=True)
class Spread:
    """Standard deviations of a process, and its mean size (None: the middle of the limits).

    `location` is that of each coordinate of the axis, in the unit of the sizes. ValueError if negative.
    """

    location: Decimal
    size: Decimal
    mean_size: Decimal | None = None

    def __post_init__(self) -> None:
        if self.location < 0 or self.size < 0:
            raise ValueError(f"a standard deviation cannot be negative: {self.location}, {self.size}")


@dataclass(frozen=True, slots=True)
class Acceptance:
    """Shares of parts accepted: regardless of feature size, and with the modifier's bonus."""

    without: float
    with_bonus: float

    @property
    def gained(self) -> float:
        """Share of all parts that only the bonus accepts."""
        return self.with_bonus - self.without


def just_capable(feature: FeatureOfSize, tolerance: GeometricTolerance) -> Spread:
    """A typical spread where none is known: ±3 standard deviations just fill the size limits and the zone.

    The zone is the one stated, or, for a zero tolerance, the one allowed in the middle of the size limits.
    Source: common practice (a capability of one), no source.
    """
    middle = (feature.smallest + feature.largest) / 2
    zone = tolerance.amount or allowed(feature, tolerance, middle)
    return Spread(location=zone / 6, size=(feature.largest - feature.smallest) / 6)


def acceptance(feature: FeatureOfSize, tolerance: GeometricTolerance, spread: Spread) -> Acceptance:
    """Shares accepted regardless of feature size and with the stated modifier; see `share_accepted`."""
    rigid = replace(tolerance, modifier=None)
    return Acceptance(share_accepted(feature, rigid, spread), share_accepted(feature, tolerance, spread))


def share_accepted(feature: FeatureOfSize, tolerance: GeometricTolerance, spread: Spread) -> float:
    """Share of parts within the limits of size whose location is within the tolerance at their size.

        share = ∫ φ((s - μ) / σs) / σs · P(s) ds     over the limits of size
        P(s)  = 1 - exp(-T(s)² / (8 σ²))             2√(x² + y²) ≤ T(s)

    μ, σs: mean and standard deviation of size; σ: of each coordinate; T(s): the tolerance allowed at size s.
    P is the Rayleigh distribution of the distance from true position, exact; the integral is by Simpson's
    rule. Source: Rayleigh distribution; ASME Y14.5 for T(s).
    """
    mean = (feature.smallest + feature.largest) / 2 if spread.mean_size is None else spread.mean_size
    if not spread.size:
        if not feature.smallest <= mean <= feature.largest:
            return 0.0
        return _located(float(allowed(feature, tolerance, mean)), float(spread.location))
    return _integral_over_size(feature, tolerance, float(mean), spread)


def _integral_over_size(
    feature: FeatureOfSize, tolerance: GeometricTolerance, mean: float, spread: Spread
) -> float:
    """The integral, piece by piece of the sizes between which the tolerance grows evenly."""
    ends = (feature.smallest, *_knee(feature, tolerance), feature.largest)
    points = [(float(size), float(allowed(feature, tolerance, size))) for size in ends]
    return sum(_piece(start, end, mean, spread) for start, end in pairwise(points) if start[0] < end[0])


def _knee(feature: FeatureOfSize, tolerance: GeometricTolerance) -> tuple[Decimal, ...]:
    """The size at which the tolerance reaches its stated maximum, where that lies between the limits."""
    if tolerance.maximum is None or tolerance.modifier not in {Modifier.MMC, Modifier.LMC}:
        return ()
    start, end = feature.mmc, feature.lmc
    if tolerance.modifier is Modifier.LMC:
        start, end = end, start
    growth = max(tolerance.maximum - tolerance.amount, Decimal(0))
    knee = start + growth if end > start else start - growth
    return (knee,) if feature.smallest < knee < feature.largest else ()


def _piece(start: tuple[float, float], end: tuple[float, float], mean: float, spread: Spread) -> float:
    """The integral between two sizes, each given with the tolerance allowed there."""
    sigma, location = float(spread.size), float(spread.location)
    slope = (end[1] - start[1]) / (end[0] - start[0])

    def density(size: float) -> float:
        z = (size - mean) / sigma
        zone = start[1] + slope * (size - start[0])
        return exp(-z * z / 2) / (sigma * sqrt(2 * pi)) * _located(zone, location)

    low, high = max(start[0], mean - _REACH * sigma), min(end[0], mean + _REACH * sigma)
    scale = min(sigma, 2 * location) if location else sigma
    return _simpson(density, low, high, scale) if low < high else 0.0


def _located(zone: float, sigma: float) -> float:
    """Probability that an axis lies in a diametral zone about true position."""
    return -expm1(-((zone / sigma) ** 2) / 8) if sigma else 1.0


def _simpson(function: Callable[[float], float], low: float, high: float, scale: float) -> float:
    """Integral by Simpson's rule, in panels that are short beside the scale on which the function varies."""
    panels = 2 * ceil(min((high - low) / scale * _PANELS_PER_SCALE, _MOST_PANELS) / 2 + 1)
    step = (high - low) / panels
    inner = fsum((4 if k % 2 else 2) * function(low + k * step) for k in range(1, panels))
    return (function(low) + inner + function(high)) * step / 3
