"""Worst case proven: parts placed at random never interfere where the formulas say they fit, and a placement
that interferes is built wherever they say they do not.

Geometry is exact: hole and fastener are circles in each plane across the axis, as the formulas of ASME Y14.5,
Appendix B take them, and points on a circle are rational.
"""

from dataclasses import dataclass
from decimal import Decimal
from fractions import Fraction

from hypothesis import given, settings
from hypothesis import strategies as st

from calloutlint.facts.formulas.boundaries import (
    FeatureOfSize,
    GeometricTolerance,
    allowed,
    inner_boundary,
    outer_boundary,
)
from calloutlint.facts.formulas.fastening import (
    fixed_hole,
    fixed_spare,
    fixing_demand,
    fixing_hole_tolerance,
    floating_hole,
    floating_pair_spare,
    floating_spare,
)
from calloutlint.model.frame import Modifier

Point = tuple[Fraction, Fraction]
FASTENER = Decimal("6.0")
TRUE_POSITION = (Fraction(0), Fraction(0))
CASES = settings(derandomize=True, deadline=None, max_examples=150)


@dataclass(frozen=True)
class Part:
    """A hole by its limits and its position tolerance."""

    hole: FeatureOfSize
    tolerance: GeometricTolerance

    @property
    def inner(self) -> Decimal:
        return inner_boundary(self.hole, self.tolerance)

    def reach(self, size: Decimal) -> Fraction:
        """How far the axis may lie from true position."""
        return Fraction(allowed(self.hole, self.tolerance, size)) / 2

    def worst_placement(self, direction: Point) -> "Placed":
        """The hole as small and as far off as puts it at its inner boundary."""
        ends = (self.hole.smallest, self.hole.largest)
        size = min(ends, key=lambda end: end - allowed(self.hole, self.tolerance, end))
        return Placed(size, scaled(direction, self.reach(size)))


@dataclass(frozen=True)
class Placed:
    """A produced hole: its diameter and where its axis crosses a face."""

    size: Decimal
    axis: Point

    @property
    def room(self) -> Fraction:
        """How far the axis of a fastener may lie from the hole's own."""
        return Fraction(self.size - FASTENER) / 2

    def clears(self, fastener: Point) -> bool:
        """Whether the fastener's circle lies within the hole's."""
        return self.room >= 0 and apart(self.axis, fastener) <= self.room**2

    def shares_a_fastener_with(self, other: "Placed") -> bool:
        """Whether a fastener finds any place that clears both holes."""
        if min(self.room, other.room) < 0:
            return False
        return apart(self.axis, other.axis) <= (self.room + other.room) ** 2


@dataclass(frozen=True)
class Fixing:
    """A fixing hole: its tolerance T2, and where the zone is not projected P and D."""

    tolerance: Decimal
    projection: Decimal | None = None
    depth: Decimal | None = None

    @property
    def demand(self) -> Decimal:
        return fixing_demand(self.tolerance, self.projection, self.depth)

    def spare_over(self, part: Part) -> Decimal:
        return fixed_spare([part.inner], FASTENER, self.tolerance, self.projection, self.depth)

    def far_end(self, entry: Point, other: Point) -> Point:
        """The fastener's axis at the far face of the clearance part, from two points of its zone.

        A projected zone reaches that face. Otherwise the zone lies below the mating face, `other` at its
        bottom, and the axis goes on from there through `entry` in its direction.
        """
        if self.projection is None or self.depth is None:
            return other
        beyond = 1 + Fraction(self.projection) / Fraction(self.depth)
        return other[0] + (entry[0] - other[0]) * beyond, other[1] + (entry[1] - other[1]) * beyond


def scaled(direction: Point, distance: Fraction) -> Point:
    return direction[0] * distance, direction[1] * distance


def apart(one: Point, other: Point) -> Fraction:
    """Squared distance."""
    return (one[0] - other[0]) ** 2 + (one[1] - other[1]) ** 2


hundredths = st.integers(0, 60).map(lambda n: Decimal(n) / 100)
shares = st.integers(0, 20).map(lambda n: Fraction(n, 20))
lengths = st.integers(0, 20).map(Decimal)
depths = st.sampled_from([Decimal(n) for n in (4, 5, 8, 10, 16, 20)])
projected = st.builds(Fixing, hundredths)
unprojected = st.builds(Fixing, hundredths, lengths, depths)
fixings = projected | unprojected


@st.composite
def directions(draw: st.DrawFn) -> Point:
    """A point of the unit circle with rational coordinates, in any quadrant."""
    t, sign = Fraction(draw(st.integers(-12, 12)), 12), draw(st.sampled_from([1, -1]))
    return sign * (1 - t * t) / (1 + t * t), sign * 2 * t / (1 + t * t)


@st.composite
def parts(draw: st.DrawFn, inner: Decimal) -> Part:
    """A hole with a given inner boundary."""
    size_tolerance, amount = draw(hundredths), draw(hundredths)
    modifier = draw(st.sampled_from([Modifier.MMC, Modifier.LMC, None]))
    smallest = inner + amount + (size_tolerance if modifier is Modifier.LMC else 0)
    hole = FeatureOfSize(smallest, smallest + size_tolerance)
    return Part(hole, GeometricTolerance(amount, modifier))


@st.composite
def placements(draw: st.DrawFn, part: Part) -> Placed:
    """A produced size of the hole and a place of its axis, anywhere within what is allowed at that size."""
    size = part.hole.smallest + (part.hole.largest - part.hole.smallest) * draw(st.integers(0, 20)) / 20
    return Placed(size, scaled(draw(directions()), part.reach(size) * draw(shares)))


@CASES
@given(st.data(), hundredths)
def test_floating_parts_that_fit_never_interfere(data: st.DataObject, spare: Decimal) -> None:
    """A fastener of the largest size at true position clears every hole, however sized and placed."""
    part = data.draw(parts(FASTENER + spare))
    assert floating_spare([part.inner], FASTENER) == spare
    assert data.draw(placements(part)).clears(TRUE_POSITION)


@CASES
@given(st.data(), hundredths, directions())
def test_a_floating_part_that_is_short_can_interfere(
    data: st.DataObject, short: Decimal, direction: Point
) -> None:
    """Against a mating part that is just line to line, the two holes pushed apart leave no place."""
    part = data.draw(parts(FASTENER - short - Decimal("0.01")))
    mate = data.draw(parts(FASTENER))
    assert floating_spare([part.inner, mate.inner], FASTENER) < 0
    opposite = scaled(direction, Fraction(-1))
    assert not part.worst_placement(direction).shares_a_fastener_with(mate.worst_placement(opposite))


@CASES
@given(st.data(), hundredths, st.integers(-60, 60), directions())
def test_two_floating_parts_share_what_they_have(
    data: st.DataObject, short: Decimal, left: int, direction: Point
) -> None:
    """Two parts interfere in some placement exactly if their inner boundaries together are short."""
    one = data.draw(parts(FASTENER - short))
    other = data.draw(parts(FASTENER + short + Decimal(left) / 100))
    fits = floating_pair_spare(one.inner, other.inner, FASTENER) >= 0
    assert fits == (left >= 0)
    opposite = scaled(direction, Fraction(-1))
    worst = one.worst_placement(direction), other.worst_placement(opposite)
    if fits and min(one.hole.smallest, other.hole.smallest) >= FASTENER:
        assert data.draw(placements(one)).shares_a_fastener_with(data.draw(placements(other)))
    assert worst[0].shares_a_fastener_with(worst[1]) == (fits and min(p.room for p in worst) >= 0)


@CASES
@given(st.data(), fixings, hundredths)
def test_fixed_joint_that_fits_never_interferes(data: st.DataObject, fixing: Fixing, spare: Decimal) -> None:
    """However the fastener leans within its zone and the clearance hole within its own, both faces clear."""
    part = data.draw(parts(FASTENER + fixing.demand + spare))
    assert fixing.spare_over(part) == spare
    zone = Fraction(fixing.tolerance) / 2
    entry, other = (scaled(data.draw(directions()), zone * data.draw(shares)) for _ in range(2))
    near = data.draw(placements(part))
    far = Placed(near.size, scaled(data.draw(directions()), part.reach(near.size) * data.draw(shares)))
    assert near.clears(entry)
    assert far.clears(fixing.far_end(entry, other))


@CASES
@given(st.data(), fixings, hundredths, directions())
def test_fixed_joint_that_is_short_can_interfere(
    data: st.DataObject, fixing: Fixing, short: Decimal, direction: Point
) -> None:
    """The fastener leaning one way and the clearance hole off the other way touch at the far face."""
    part = data.draw(parts(FASTENER + fixing.demand - short - Decimal("0.01")))
    assert fixing.spare_over(part) < 0
    entry = scaled(direction, Fraction(fixing.tolerance) / 2)
    other = entry if fixing.projection is None else scaled(entry, Fraction(-1))
    opposite = scaled(direction, Fraction(-1))
    assert not part.worst_placement(opposite).clears(fixing.far_end(entry, other))


@CASES
@given(hundredths, fixings)
def test_the_smallest_hole_is_line_to_line(clearance: Decimal, fixing: Fixing) -> None:
    """Holes and tolerances found backward leave nothing over when put back."""
    assert floating_spare([floating_hole(FASTENER, clearance) - clearance], FASTENER) == 0
    tilt = fixing.projection, fixing.depth
    inner = fixed_hole(FASTENER, clearance, fixing.tolerance, *tilt) - clearance
    assert fixed_spare([inner], FASTENER, fixing.tolerance, *tilt) == 0
    assert fixing_hole_tolerance(inner, FASTENER, *tilt) == fixing.tolerance


@CASES
@given(st.data())
def test_no_placement_crosses_the_boundaries(data: st.DataObject) -> None:
    """Its surface comes no nearer to true position than the inner boundary, no farther than the outer."""
    part = data.draw(parts(FASTENER))
    placed = data.draw(placements(part))
    off = apart(placed.axis, TRUE_POSITION)
    assert off <= (Fraction(placed.size - part.inner) / 2) ** 2
    assert off <= (Fraction(outer_boundary(part.hole, part.tolerance) - placed.size) / 2) ** 2
