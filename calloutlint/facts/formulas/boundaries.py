"""Worst-case boundaries of a feature of size: bonus, virtual and resultant condition, inner and outer boundary.

All lengths are exact decimals in one unit, whichever it is; tolerances are widths or diameters of zones.
"""

from dataclasses import dataclass
from decimal import Decimal

from calloutlint.model.frame import Modifier


@dataclass(frozen=True, slots=True)
class FeatureOfSize:
    """A cylinder or width by its limits of size; `internal` for a hole or slot."""

    smallest: Decimal
    largest: Decimal
    internal: bool = True

    def __post_init__(self) -> None:
        if self.smallest > self.largest:
            raise ValueError(f"limits of size in the wrong order: {self.smallest} is more than {self.largest}")

    @property
    def mmc(self) -> Decimal:
        """Maximum material condition: the smallest hole, the largest shaft."""
        return self.smallest if self.internal else self.largest

    @property
    def lmc(self) -> Decimal:
        """Least material condition: the largest hole, the smallest shaft."""
        return self.largest if self.internal else self.smallest


@dataclass(frozen=True, slots=True)
class GeometricTolerance:
    """A tolerance of location or orientation on a feature of size.

    `modifier` is `Modifier.MMC` or `Modifier.LMC`; anything else holds regardless of feature size.
    `maximum` is the most that it may grow to (`⌀.000 Ⓜ ⌀.010 MAX`).
    """

    amount: Decimal
    modifier: Modifier | None = None
    maximum: Decimal | None = None


def bonus(feature: FeatureOfSize, tolerance: GeometricTolerance, size: Decimal) -> Decimal:
    """What is added to the tolerance at an actual mating size, in the unit of the size.

    Source: ASME Y14.5, effect of the MMC and LMC modifiers: the departure of the feature from the stated
    material condition. Nil regardless of feature size. ValueError for a size outside its limits.
    """
    if not feature.smallest <= size <= feature.largest:
        raise ValueError(f"size {size} is outside the limits {feature.smallest} to {feature.largest}")
    match tolerance.modifier:
        case Modifier.MMC:
            departure = abs(size - feature.mmc)
        case Modifier.LMC:
            departure = abs(size - feature.lmc)
        case _:
            return Decimal(0)
    if tolerance.maximum is None:
        return departure
    return min(departure, max(tolerance.maximum - tolerance.amount, Decimal(0)))


def allowed(feature: FeatureOfSize, tolerance: GeometricTolerance, size: Decimal) -> Decimal:
    """The tolerance at an actual mating size: as stated, plus the bonus. Source and errors as for `bonus`."""
    return tolerance.amount + bonus(feature, tolerance, size)


def virtual_condition(feature: FeatureOfSize, tolerance: GeometricTolerance) -> Decimal | None:
    """The constant boundary of a feature toleranced at MMC or LMC; None regardless of feature size.

    Source: ASME Y14.5, virtual condition. At MMC, hole: MMC - T; shaft: MMC + T. At LMC, hole: LMC + T;
    shaft: LMC - T.
    """
    if not _has_material_condition(tolerance):
        return None
    boundary = inner_boundary if _inward(feature, tolerance) else outer_boundary
    return boundary(feature, tolerance)


def resultant_condition(feature: FeatureOfSize, tolerance: GeometricTolerance) -> Decimal | None:
    """The variable boundary on the other side of the virtual condition; None regardless of feature size.

    Source: ASME Y14.5, resultant condition. At MMC, hole: LMC + T + bonus; shaft: LMC - T - bonus. At LMC,
    hole: MMC - T - bonus; shaft: MMC + T + bonus. The bonus is the whole size tolerance.
    """
    if not _has_material_condition(tolerance):
        return None
    boundary = outer_boundary if _inward(feature, tolerance) else inner_boundary
    return boundary(feature, tolerance)


def inner_boundary(feature: FeatureOfSize, tolerance: GeometricTolerance) -> Decimal:
    """The smallest of (size - tolerance at that size) over all sizes.

    Source: ASME Y14.5, inner boundary. For a hole MMC - T at MMC and regardless of feature size, and
    MMC - T - (LMC - MMC) at LMC.
    """
    ends = (feature.smallest, feature.largest)
    return min(size - allowed(feature, tolerance, size) for size in ends)


def outer_boundary(feature: FeatureOfSize, tolerance: GeometricTolerance) -> Decimal:
    """The largest of (size + tolerance at that size) over all sizes.

    Source: ASME Y14.5, outer boundary. For a hole LMC + T + (LMC - MMC) at MMC, and LMC + T at LMC and
    regardless of feature size.
    """
    ends = (feature.smallest, feature.largest)
    return max(size + allowed(feature, tolerance, size) for size in ends)


def maximum_material_boundary(feature: FeatureOfSize, tolerance: GeometricTolerance) -> Decimal:
    """MMB of a datum feature of size, from its own tolerance to the datums that precede it.

    Source: ASME Y14.5-2009 and later, maximum material boundary: the inner boundary of an internal feature,
    the outer boundary of an external one. For a primary datum feature the tolerance is that of its form or
    orientation; nil where the limits of size govern it.
    """
    return inner_boundary(feature, tolerance) if feature.internal else outer_boundary(feature, tolerance)


def datum_shift(feature: FeatureOfSize, tolerance: GeometricTolerance, size: Decimal) -> Decimal:
    """How far, as a diameter or width, the part may move at its datum feature referenced at MMB.

    Source: ASME Y14.5, datum feature shift: the departure of the datum feature of this actual mating size
    from its maximum material boundary; largest at LMC.
    """
    return abs(size - maximum_material_boundary(feature, tolerance))


def gauge_size(feature: FeatureOfSize, tolerance: GeometricTolerance) -> Decimal | None:
    """Nominal of the functional gauge's pin for a hole, of its ring or slot for a shaft; None without Ⓜ.

    Source: ASME Y14.43, functional gauges: the gauging element is made to the MMC virtual condition.
    """
    return virtual_condition(feature, tolerance) if tolerance.modifier is Modifier.MMC else None


def wall_left(edge_distance: Decimal, outer: Decimal) -> Decimal:
    """Least wall between a hole and an edge: basic or least distance of the axis, less half the outer boundary.

    Source: ASME Y14.5, LMC applied to control wall thickness. Nil or negative: the hole breaks out.
    """
    return edge_distance - outer / 2


def wall_between(spacing: Decimal, outer: Decimal, other_outer: Decimal) -> Decimal:
    """Least wall between two holes of basic spacing, from their outer boundaries. Source as for `wall_left`."""
    return spacing - (outer + other_outer) / 2


def _has_material_condition(tolerance: GeometricTolerance) -> bool:
    return tolerance.modifier in {Modifier.MMC, Modifier.LMC}


def _inward(feature: FeatureOfSize, tolerance: GeometricTolerance) -> bool:
    """Whether the virtual condition lies within the surface: holes at MMC, shafts at LMC."""
    return (tolerance.modifier is Modifier.MMC) is feature.internal
