"""Facts about a clearance hole in a joint: whether the fastener goes through, in the worst case.

The formulas are those of `facts.fastening`; their sources stand there.
"""

from __future__ import annotations

from decimal import Decimal
from typing import TYPE_CHECKING

from calloutlint.facts import fastening
from calloutlint.facts.boundaries import FeatureOfSize, GeometricTolerance, allowed, inner_boundary
from calloutlint.facts.fastener import FastenerView
from calloutlint.facts.fixing import FixingView, is_located, position_lines, widest_position
from calloutlint.facts.onward import PartView, amount_in
from calloutlint.facts.view import Length, fact
from calloutlint.model.callout import Callout
from calloutlint.model.fastener import Fastener, Hold
from calloutlint.model.frame import Modifier
from calloutlint.model.hole import StepKind
from calloutlint.trade.drills import next_larger_stock

if TYPE_CHECKING:
    from calloutlint.facts.callout import CalloutView
    from calloutlint.facts.frame import FrameView
    from calloutlint.facts.joint import JointView


class PassageView(PartView):
    """A clearance hole that a fastener passes, by a stated joint or by assumption."""

    subject = "passage"
    part: Callout

    def __init__(self, callout: CalloutView, fastener: Fastener, joint: JointView | None) -> None:
        super().__init__(callout.part, callout)
        self._fastener = fastener
        self._joint = joint

    @fact
    def joint(self) -> JointView | None:
        """The stated joint; unknown where the hole is only taken for a clearance hole."""
        return self._joint

    @fact
    def stated(self) -> bool:
        """Whether a stated joint names it."""
        return self._joint is not None

    @fact
    def fastener(self) -> FastenerView:
        """The fastener that passes it."""
        return FastenerView(self._fastener, self.unit)

    @fact
    def hold(self) -> Hold | None:
        """Floating or fixed; unknown where it is not said."""
        return self._joint.part.joint.hold if self._joint else None

    @fact
    def located(self) -> bool:
        """Whether it has a position or profile tolerance."""
        return is_located(self._callout)

    @fact
    def position(self) -> FrameView | None:
        """The line with its largest ⌀ position tolerance; unknown where none is stated."""
        return widest_position(self._callout)

    @fact
    def several_lines(self) -> bool:
        """Whether it has more than one position line, of which the largest counts."""
        return position_lines(self._callout) > 1

    @fact
    def counts_datum_modifiers(self) -> bool:
        """Whether its datum references carry Ⓜ or Ⓛ, whose datum shift is not counted."""
        if self.position is None:
            return False
        uses = (use for datum in self.position.datums for use in datum.modifiers)
        return any(use in {Modifier.MMC, Modifier.LMC} for use in uses)

    @property
    def _size(self) -> FeatureOfSize | None:
        hole = self._callout.hole
        return None if hole.mmc is None or hole.lmc is None else FeatureOfSize(hole.mmc, hole.lmc)

    @property
    def _tolerance(self) -> GeometricTolerance | None:
        if self.position is None or self.position.tolerance.value is None:
            return None
        kinds = self.position.tolerance.modifiers
        modifier = next((kind for kind in kinds if kind in {Modifier.MMC, Modifier.LMC}), None)
        maximum = amount_in(self.position.part.zone.maximum, self.unit) if self.position.part.zone else None
        return GeometricTolerance(self.position.tolerance.value, modifier, maximum)

    @fact
    def tolerance(self) -> Length | None:
        """Its largest ⌀ position tolerance as stated."""
        return self._tolerance.amount if self._tolerance else None

    @fact
    def tolerance_at_lmc(self) -> Length | None:
        """That tolerance with its bonus at the hole's least material condition."""
        if self._size is None or self._tolerance is None:
            return None
        return allowed(self._size, self._tolerance, self._size.lmc)

    @fact
    def inner_boundary(self) -> Length | None:
        """The room that is always free: the smallest of hole size less the position allowed at that size."""
        if self._size is None or self._tolerance is None:
            return None
        return inner_boundary(self._size, self._tolerance)

    @fact
    def room(self) -> Length | None:
        """What the inner boundary leaves around the fastener; negative: they interfere."""
        diameter = self.fastener.diameter
        return None if self.inner_boundary is None or diameter is None else self.inner_boundary - diameter

    @fact
    def fixing(self) -> FixingView | None:
        """The fixing hole that asks for most; unknown where none is at hand or none has a position."""
        if self._joint is None or self.hold is not Hold.FIXED:
            return None
        fixings = [fixing for fixing in self._joint.fixings if self._need(fixing) is not None]
        return max(fixings, key=lambda fixing: self._need(fixing) or Decimal(0), default=None)

    def _need(self, fixing: FixingView) -> Decimal | None:
        tolerance = self._fixing_tolerance(fixing)
        if tolerance is None:
            return None
        reach, depth = self._reach_and_depth(fixing)
        if fixing.is_projected or reach is None or depth is None:
            return tolerance
        return fastening.fixing_demand(tolerance, reach, depth)

    def _fixing_tolerance(self, fixing: FixingView) -> Decimal | None:
        zone = fixing.position.part.zone if fixing.position else None
        return amount_in(zone.value, self.unit) if zone else None

    def _reach_and_depth(self, fixing: FixingView) -> tuple[Decimal | None, Decimal | None]:
        reach = amount_in(self._joint.reach, self.unit) if self._joint and self._joint.reach else None
        return reach, fixing.full_thread_in(self.unit)

    @fact
    def fixing_tolerance(self) -> Length | None:
        """Position tolerance of that fixing hole, in this drawing's unit."""
        return self._fixing_tolerance(self.fixing) if self.fixing else None

    @fact
    def fixing_need(self) -> Length | None:
        """What that fixing hole needs: its tolerance, times 1 + 2P/D where it is not projected."""
        return self._need(self.fixing) if self.fixing else None

    @fact
    def reach(self) -> Length | None:
        """P: the projection, else the thickness of the clearance parts; unknown where neither is stated."""
        return self._reach_and_depth(self.fixing)[0] if self.fixing else None

    @fact
    def engagement(self) -> Length | None:
        """D: the smallest full thread or engagement depth of that fixing hole."""
        return self._reach_and_depth(self.fixing)[1] if self.fixing else None

    @fact
    def tilts(self) -> bool:
        """Whether the fastener's tilt counts: the fixing hole is not projected, and P and D are known."""
        return self.fixing_need is not None and self.fixing_need != self.fixing_tolerance

    @fact
    def spare(self) -> Length | None:
        """Clearance left over: the room less what the fixing hole needs, or all of it where the fastener floats."""
        if self.room is None:
            return None
        if self.hold is Hold.FLOATING:
            return self.room
        return None if self.fixing_need is None else self.room - self.fixing_need

    @fact
    def stated_total(self) -> Length | None:
        """The tolerances that share the clearance: the hole's own, and the fixing hole's where it is fixed."""
        if self.tolerance is None:
            return None
        return self.tolerance + (self.fixing_tolerance or 0)

    @fact
    def fitting_tolerance(self) -> Length | None:
        """The largest position tolerance of this hole that fits; unknown where none does."""
        if self.tolerance is None or self.spare is None:
            return None
        largest = self.tolerance + self.spare
        return largest if largest >= 0 else None

    @fact
    def fitting_hole(self) -> Length | None:
        """The next stock drill size at which the hole would fit with its present tolerances; unknown beyond stock."""
        nominal, short = self._callout.hole.nominal, self._short
        if nominal is None or short is None or self.unit is None:
            return None
        drill = next_larger_stock(nominal + short, self.unit)
        return drill.diameter if drill else None

    @property
    def _short(self) -> Decimal | None:
        lacking = self.spare if self.spare is not None else self.room
        return None if lacking is None or lacking >= 0 else -lacking

    @fact
    def counterbore(self) -> Length | None:
        """Smallest diameter of its counterbore; unknown where it has none."""
        bores = [step for step in self._callout.steps if step.kind is StepKind.COUNTERBORE]
        return bores[0].smallest if bores else None

    @fact
    def head_shift(self) -> Length | None:
        """How far the head may stand off the counterbore's centre, as a diameter: position at LMC or the play."""
        diameter, lmc = self.fastener.diameter, self._callout.hole.lmc
        if self.tolerance_at_lmc is None or diameter is None or lmc is None:
            return None
        return min(self.tolerance_at_lmc, lmc - diameter)

    @fact
    def bearing_left(self) -> Length | None:
        """What the smallest head still bears on one side when it is pushed to the other; negative: nothing."""
        head, lmc, diameter = self.fastener.seat_smallest, self._callout.hole.lmc, self.fastener.diameter
        if head is None or lmc is None or diameter is None:
            return None
        return fastening.bearing_left(head, lmc, diameter)
