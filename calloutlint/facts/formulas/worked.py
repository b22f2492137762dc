"""One joint worked out: from any two of fastener, hole and position tolerance the third, or all three judged.

All lengths are exact decimals in one unit. Sources: ASME Y14.5, Appendix B, as in `facts.formulas.fastening`.
"""

from collections.abc import Iterator
from dataclasses import dataclass, replace
from decimal import Decimal
from enum import StrEnum

from calloutlint.facts.formulas.boundaries import FeatureOfSize, GeometricTolerance, inner_boundary
from calloutlint.facts.formulas.fastening import Drill, drill_for_boundary, fixing_demand
from calloutlint.trade.clearance import clearance_sizes
from calloutlint.trade.drills import drilled_tolerance, next_larger_stock
from calloutlint.trade.inches import named_size
from calloutlint.trade.metric import pitches
from calloutlint.trade.unified_series import all_series
from calloutlint.units import Unit, convert

_DUST = Decimal(1).scaleb(-20)
"""Far below any drawn length: what converting between inch and mm may leave."""


class Sought(StrEnum):
    """Which of the three was not given."""

    NOTHING = "nothing"
    POSITION = "position"
    HOLE = "hole"
    FASTENER = "fastener"


@dataclass(frozen=True, slots=True)
class Held:
    """How the joint holds its fastener: floating, or fixed in a hole with a position `tolerance` of its own.

    `projection` is P, `depth` is D; without a projected zone both are needed for the tilt to count. None
    for what is not known.
    """

    fixed: bool = False
    tolerance: Decimal | None = None
    projected: bool = False
    projection: Decimal | None = None
    depth: Decimal | None = None

    @property
    def tilts(self) -> bool:
        """Whether the lean of an unprojected fixing hole can be worked out."""
        known = None not in (self.tolerance, self.projection, self.depth)
        return self.fixed and known and not self.projected

    @property
    def demand(self) -> Decimal:
        """Clearance that the fixing hole uses up; nil where the fastener floats, or nothing is known of it."""
        if not self.fixed or self.tolerance is None:
            return Decimal(0)
        if not self.tilts:
            return self.tolerance
        return fixing_demand(self.tolerance, self.projection, self.depth)


@dataclass(frozen=True, slots=True)
class Worked:
    """A joint with all three, one of them found. `drill` is what the hole that was found is drilled with."""

    fastener: Decimal
    hole: FeatureOfSize
    tolerance: GeometricTolerance
    held: Held
    sought: Sought = Sought.NOTHING
    drill: Drill | None = None

    @property
    def inner(self) -> Decimal:
        """The room that is always free."""
        return inner_boundary(self.hole, self.tolerance)

    @property
    def room(self) -> Decimal:
        """What that leaves around the fastener."""
        return settled(self.inner - self.fastener)

    @property
    def spare(self) -> Decimal:
        """What is left over after the fixing hole has taken its share; negative is what is short."""
        return settled(self.inner - self.fastener - self.held.demand)

    @property
    def fits(self) -> bool:
        """Whether it goes together in the worst case; line to line does."""
        return self.spare >= 0

    @property
    def largest_tolerance(self) -> Decimal | None:
        """The largest position tolerance of the hole that fits; None where not even nil does."""
        largest = self.tolerance.amount + self.spare
        return largest if largest >= 0 else None

    @property
    def smallest_hole(self) -> Decimal:
        """The smallest hole at MMC that fits with the tolerances as they are."""
        return self.hole.mmc - self.spare


def settled(amount: Decimal) -> Decimal:
    """An amount without the dust of conversions, so that line to line stays nil."""
    return amount.quantize(_DUST).normalize() + 0


def find_position(fastener: Decimal, hole: FeatureOfSize, zone: GeometricTolerance, held: Held) -> Worked:
    """The largest position tolerance that fits, with the modifier of `zone`; nil where even that is short."""
    none = Worked(fastener, hole, replace(zone, amount=Decimal(0)), held, Sought.POSITION)
    return replace(none, tolerance=replace(none.tolerance, amount=max(none.spare, Decimal(0))))


def find_hole(fastener: Decimal, tolerance: GeometricTolerance, held: Held, unit: Unit) -> Worked | None:
    """The smallest stock drill whose hole, drilled as is usual, fits; None beyond stock. Source: AND10387."""
    found = drill_for_boundary(
        fastener + held.demand,
        tolerance,
        lambda diameter: next_larger_stock(diameter, unit),
        lambda diameter: drilled_tolerance(diameter, unit),
    )
    if found is None:
        return None
    drill, hole = found
    return Worked(fastener, hole, tolerance, held, Sought.HOLE, drill)


def find_fastener(hole: FeatureOfSize, tolerance: GeometricTolerance, held: Held) -> Worked | None:
    """The largest fastener that fits; None where there is no room for any."""
    largest = settled(inner_boundary(hole, tolerance) - held.demand)
    return Worked(largest, hole, tolerance, held, Sought.FASTENER) if largest > 0 else None


def largest_screws(diameter: Decimal, unit: Unit) -> tuple[str, ...]:
    """The largest Unified and the largest metric screw that are not thicker than a diameter; those there are.

    Of the sizes that have published clearance holes: ASME B18.2.8, ISO 273.
    """
    return tuple(
        name
        for system, sizes in ((Unit.INCH, _unified()), (Unit.MM, _metric()))
        if (name := _largest(sizes, settled(convert(diameter, unit, system)))) is not None
    )


def _largest(sizes: Iterator[tuple[Decimal, str]], most: Decimal) -> str | None:
    return max(((size, name) for size, name in sizes if size <= most), default=(None, None))[1]


def _unified() -> Iterator[tuple[Decimal, str]]:
    for name in all_series():
        size = named_size(name)
        if size is not None and clearance_sizes(size.diameter, Unit.INCH):
            yield size.diameter, name


def _metric() -> Iterator[tuple[Decimal, str]]:
    for diameter, listed in pitches().items():
        if listed.coarse is not None and clearance_sizes(diameter, Unit.MM):
            yield diameter, f"M{diameter.normalize():f}"
