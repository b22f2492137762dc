"""Formulas for fasteners through patterns of holes: floating, fixed, and what cures a joint that does not fit.

All lengths are exact decimals in one unit. H is a hole at MMC, F the largest fastener, T a diametral position
tolerance; "inner boundary" is that of a hole with its position tolerance, H - T at MMC. A spare of nil is
line to line, which fits.
"""

from collections.abc import Callable, Iterable
from decimal import Decimal
from typing import Protocol

from calloutlint.facts.formulas.boundaries import FeatureOfSize, GeometricTolerance, inner_boundary


def floating_tolerance(hole: Decimal, fastener: Decimal) -> Decimal:
    """Largest position tolerance of each hole that a fastener floats through: T = H - F.

    Source: ASME Y14.5, Appendix B, floating fastener case. Negative: the fastener does not enter.
    """
    return hole - fastener


def floating_hole(fastener: Decimal, tolerance: Decimal) -> Decimal:
    """Smallest hole, at MMC, that a fastener floats through: H = F + T.

    Source: ASME Y14.5, Appendix B, floating fastener case.
    """
    return fastener + tolerance


def floating_spare(inner_boundaries: Iterable[Decimal], fastener: Decimal) -> Decimal:
    """What is left over in the tightest of the floating parts; negative is what is short.

    Source: ASME Y14.5, Appendix B, floating fastener case: the formula holds for each part by itself, however
    many there are. ValueError without any part.
    """
    return min(inner_boundaries) - fastener


def floating_pair_spare(inner: Decimal, other_inner: Decimal, fastener: Decimal) -> Decimal:
    """What two floating parts, and no others, have left over together: (IB1 + IB2)/2 - F.

    Two parts share a fastener: one that is short by itself still goes together with one that has as much to
    spare. Source: plane geometry; ASME Y14.5, Appendix B asks the formula of each part individually instead,
    which holds for any number of parts.
    """
    return (inner + other_inner) / 2 - fastener


def tilt_factor(projection: Decimal, depth: Decimal) -> Decimal:
    """How much the fixing hole's tolerance weighs without a projected zone: 1 + 2P/D, to 28 digits.

    Source: ASME Y14.5, Appendix B, provision for out-of-squareness when no projected tolerance zone is used.
    P is the projection above the fixing part, D the least full thread or engagement depth. ValueError where
    D is not positive or P negative.
    """
    _check_tilt(projection, depth)
    return 1 + 2 * projection / depth


def fixing_demand(
    tolerance: Decimal, projection: Decimal | None = None, depth: Decimal | None = None
) -> Decimal:
    """Clearance that the fixing hole's tolerance T2 uses up: T2 projected, T2(1 + 2P/D) without projected zone.

    Give P and D only for a hole without a projected zone; where either is unknown, T2 is the least it can be.
    Multiplied before it is divided, so that a result that a decimal can hold is exact. Source and errors as
    for `tilt_factor`.
    """
    if projection is None or depth is None:
        return tolerance
    _check_tilt(projection, depth)
    return tolerance + 2 * projection * tolerance / depth


def fixed_hole(
    fastener: Decimal,
    clearance_tolerance: Decimal,
    fixing_tolerance: Decimal,
    projection: Decimal | None = None,
    depth: Decimal | None = None,
) -> Decimal:
    """Smallest clearance hole, at MMC, of a fixed fastener: H = F + T1 + T2, or F + T1 + T2(1 + 2P/D).

    Source: ASME Y14.5, Appendix B, fixed fastener case. P and D as for `fixing_demand`.
    """
    return fastener + clearance_tolerance + fixing_demand(fixing_tolerance, projection, depth)


def fixed_total(hole: Decimal, fastener: Decimal) -> Decimal:
    """Sum of tolerances that clearance and projected fixing hole can share: T1 + T2 = H - F.

    Source: ASME Y14.5, Appendix B, fixed fastener case.
    """
    return hole - fastener


def clearance_hole_tolerance(
    hole: Decimal,
    fastener: Decimal,
    fixing_tolerance: Decimal,
    projection: Decimal | None = None,
    depth: Decimal | None = None,
) -> Decimal:
    """Largest tolerance T1 of the clearance hole beside a given T2; negative if T2 alone is too large.

    Source: ASME Y14.5, Appendix B, fixed fastener case. P and D as for `fixing_demand`.
    """
    return hole - fastener - fixing_demand(fixing_tolerance, projection, depth)


def fixing_hole_tolerance(
    inner: Decimal, fastener: Decimal, projection: Decimal | None = None, depth: Decimal | None = None
) -> Decimal:
    """Largest tolerance T2 of the fixing hole that a clearance hole's inner boundary leaves: IB - F.

    Source: ASME Y14.5, Appendix B, fixed fastener case; without a projected zone it is divided by 1 + 2P/D.
    Negative: the clearance hole alone does not let the fastener in.
    """
    if projection is None or depth is None:
        return inner - fastener
    _check_tilt(projection, depth)
    return (inner - fastener) * depth / (depth + 2 * projection)


def fixed_spare(
    inner_boundaries: Iterable[Decimal],
    fastener: Decimal,
    fixing_tolerance: Decimal,
    projection: Decimal | None = None,
    depth: Decimal | None = None,
) -> Decimal:
    """What is left over in the tightest of the clearance parts; negative is what is short.

    Source: ASME Y14.5, Appendix B, fixed fastener case, for each clearance part by itself; with several, P is
    the thickness of all of them. P and D as for `fixing_demand`. ValueError without any part.
    """
    return min(inner_boundaries) - fastener - fixing_demand(fixing_tolerance, projection, depth)


class Drill(Protocol):
    """What is needed of a stock drill."""

    @property
    def name(self) -> str:
        """What the trade calls it."""

    @property
    def diameter(self) -> Decimal:
        """Nominal diameter."""


class DrilledTolerance(Protocol):
    """What is needed of the usual tolerance of a drilled hole, both as positive amounts."""

    @property
    def plus(self) -> Decimal:
        """How much larger than its drill the hole may come out."""

    @property
    def minus(self) -> Decimal:
        """How much smaller than its drill the hole may come out."""


def drill_for_boundary(
    boundary: Decimal,
    tolerance: GeometricTolerance,
    next_larger: Callable[[Decimal], Drill | None],
    usual: Callable[[Decimal], DrilledTolerance | None],
) -> tuple[Drill, FeatureOfSize] | None:
    """The smallest stock drill whose hole, drilled as is usual, keeps its inner boundary, and that hole.

    `boundary` is what the joint needs: F floating, F + the fixing hole's demand fixed. `next_larger` gives
    the smallest stock drill not smaller than a diameter, `usual` the drilled tolerance of one. None where the
    stock or the tolerances end first. Source: common practice, no source.
    """
    wanted = boundary + tolerance.amount
    while drill := next_larger(wanted):
        spread = usual(drill.diameter)
        if spread is None:
            return None
        hole = FeatureOfSize(drill.diameter - spread.minus, drill.diameter + spread.plus)
        short = boundary - inner_boundary(hole, tolerance)
        if short <= 0:
            return drill, hole
        wanted = drill.diameter + short
    return None


def bearing_left(head: Decimal, hole: Decimal, fastener: Decimal) -> Decimal:
    """Bearing of a head that is left on one side when the screw is pushed to the other: (head + F)/2 - H.

    `hole` is the largest hole, `head` the smallest head or washer; the screw moves by (H - F)/2. Nil or
    negative: no bearing there. Source: plane geometry; common practice, no source.
    """
    return (head + fastener) / 2 - hole


def _check_tilt(projection: Decimal, depth: Decimal) -> None:
    if depth <= 0:
        raise ValueError(f"the depth of engagement must be more than nil, not {depth}")
    if projection < 0:
        raise ValueError(f"the projection cannot be negative: {projection}")
