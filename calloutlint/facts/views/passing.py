"""Facts about a clearance hole in a joint: whether the fastener goes through, in the worst case.

The formulas are those of `facts.formulas.fastening`; their sources stand there. What decides is computed in
millimetres, into which inches convert without rounding, so that line to line stays exact across drawings.
"""

from __future__ import annotations

from decimal import Decimal
from typing import TYPE_CHECKING

from calloutlint.facts.formulas import fastening
from calloutlint.facts.formulas.boundaries import FeatureOfSize, GeometricTolerance, allowed, inner_boundary
from calloutlint.facts.sizes import amount_in
from calloutlint.facts.view import Length, fact
from calloutlint.facts.views.fixing import FixingView
from calloutlint.facts.views.located import tolerance_of, widest_position
from calloutlint.facts.views.seated import SeatedView
from calloutlint.facts.views.tolerance import ZONE_SIGNS
from calloutlint.model.fastener import Hold
from calloutlint.model.frame import ZoneShape
from calloutlint.units import Unit, convert

if TYPE_CHECKING:
    from calloutlint.facts.views.frame import FrameView


class PassingView(SeatedView):
    """A clearance hole with the fastener that passes it, by a stated joint or by assumption."""

    @fact
    def stated(self) -> bool:
        """Whether a stated joint names it."""
        return self._joint is not None

    @fact
    def hold(self) -> Hold | None:
        """Floating or fixed; unknown where it is not said."""
        return self._joint.hold if self._joint else None

    @fact
    def under_head(self) -> bool:
        """Whether the head, or the nut, bears on it: an outermost part, as far as the joint tells."""
        return self._joint is None or self._joint.is_outermost(self.part)

    @fact
    def position(self) -> FrameView | None:
        """The line with its largest ⌀ position tolerance, a slot's across its width; unknown without one."""
        hole = self._callout.hole
        if hole.sized_both_ways:
            return None
        return widest_position(self._callout, ZoneShape.WIDTH if hole.slot else ZoneShape.DIAMETER)

    @fact
    def sign(self) -> str:
        """The sign before its position tolerance: ⌀, nothing for a width."""
        zone = self.position.part.zone if self.position else None
        return ZONE_SIGNS[zone.shape] if zone else ""

    @property
    def size(self) -> FeatureOfSize | None:
        """The hole by its limits; None where they are not known, or in the wrong order."""
        mmc, lmc = self._callout.hole.mmc, self._callout.hole.lmc
        return None if mmc is None or lmc is None or mmc > lmc else FeatureOfSize(mmc, lmc)

    @property
    def _tolerance(self) -> GeometricTolerance | None:
        return tolerance_of(self.position, self.unit) if self.position else None

    @fact
    def tolerance(self) -> Length | None:
        """Its largest position tolerance as stated."""
        return self._tolerance.amount if self._tolerance else None

    @fact
    def tolerance_at_mmc(self) -> Length | None:
        """That tolerance at the hole's smallest size: as stated, but at Ⓛ with the whole bonus."""
        return self._allowed(self.size.mmc) if self.size else None

    @fact
    def tolerance_at_lmc(self) -> Length | None:
        """That tolerance at the hole's largest size: at Ⓜ with the whole bonus."""
        return self._allowed(self.size.lmc) if self.size else None

    def _allowed(self, size: Decimal) -> Decimal | None:
        if self.size is None or self._tolerance is None:
            return None
        return allowed(self.size, self._tolerance, size)

    @fact
    def inner_boundary(self) -> Length | None:
        """The room that is always free: the smallest of hole size less the position allowed at that size."""
        if self.size is None or self._tolerance is None:
            return None
        return inner_boundary(self.size, self._tolerance)

    @fact
    def play(self) -> Length | None:
        """Smallest hole less the fastener; negative: it cannot enter."""
        return self._here(self._less_fastener(self.size.mmc if self.size else None))

    @fact
    def room(self) -> Length | None:
        """What the inner boundary leaves around the fastener; negative: they interfere."""
        return self._here(self._room)

    @property
    def _room(self) -> Decimal | None:
        return self._less_fastener(self.inner_boundary)

    def _less_fastener(self, length: Decimal | None) -> Decimal | None:
        """A length of this drawing less the fastener's largest size, in mm."""
        fastener = amount_in(self.fastener.largest, Unit.MM)
        if length is None or fastener is None or self.unit not in {Unit.INCH, Unit.MM}:
            return None
        return convert(length, self.unit, Unit.MM) - fastener

    def _here(self, millimetres: Decimal | None) -> Decimal | None:
        return None if millimetres is None or self.unit is None else convert(millimetres, Unit.MM, self.unit)

    @fact
    def fixing(self) -> FixingView | None:
        """The fixing hole that asks for most; unknown where none is at hand or none has a position."""
        if self._joint is None or self.hold is not Hold.FIXED:
            return None
        fixings = [fixing for fixing in self._joint.fixings if self._need(fixing) is not None]
        return max(fixings, key=lambda fixing: self._need(fixing) or Decimal(0), default=None)

    def _need(self, fixing: FixingView) -> Decimal | None:
        """What a fixing hole needs, in mm: its tolerance, with the tilt where that is known."""
        tolerance = _stated(fixing)
        reach, depth = self._reach, fixing.full_thread_in(Unit.MM)
        if tolerance is None:
            return None
        if fixing.is_projected or reach is None or depth is None or depth <= 0:
            return tolerance
        return fastening.fixing_demand(tolerance, reach, depth)

    @property
    def _reach(self) -> Decimal | None:
        reach = amount_in(self._joint.reach, Unit.MM) if self._joint else None
        return reach if reach is None or reach >= 0 else None

    @fact
    def fixing_tolerance(self) -> Length | None:
        """Position tolerance of that fixing hole, in this drawing's unit."""
        return self._here(_stated(self.fixing)) if self.fixing else None

    @fact
    def fixing_need(self) -> Length | None:
        """What that fixing hole needs: its tolerance, times 1 + 2P/D where it is not projected."""
        return self._here(self._need(self.fixing)) if self.fixing else None

    @fact
    def reach(self) -> Length | None:
        """P: the projection, else the thickness of the clearance parts; unknown where neither is stated."""
        return self._here(self._reach)

    @fact
    def engagement(self) -> Length | None:
        """D: the smallest full thread or engagement depth of that fixing hole."""
        return self.fixing.full_thread_in(self.unit) if self.fixing else None

    @fact
    def tilts(self) -> bool:
        """Whether the fastener's tilt counts: the fixing hole is not projected, and P and D are known."""
        return self.fixing is not None and self._need(self.fixing) != _stated(self.fixing)

    @fact
    def tilt_spoils(self) -> bool:
        """Whether it would fit if the fixing hole were projected, and does not because it is not."""
        if self.fixing is None or self.room is None or self.spare is None or not self.tilts:
            return False
        return self.spare < 0 <= self.room - (self.fixing_tolerance or 0)

    @fact
    def tilt_unknown(self) -> bool:
        """Whether the fixing hole is not projected, and P or D is not known, so that the tilt is left out."""
        fixing = self.fixing
        if fixing is None or fixing.is_projected:
            return False
        return self._reach is None or fixing.full_thread is None

    @fact
    def spare(self) -> Length | None:
        """Clearance left over: the room, less what the fixing hole needs where the fastener is fixed."""
        if self._room is None:
            return None
        if self.hold is Hold.FLOATING:
            return self.room
        need = self._need(self.fixing) if self.fixing else None
        return None if need is None else self._here(self._room - need)


def _stated(fixing: FixingView) -> Decimal | None:
    """Position tolerance of a fixing hole in mm; None where none is stated, or its drawing states no unit."""
    zone = fixing.position.part.zone if fixing.position else None
    if zone is None or zone.value is None or zone.value.unit not in {Unit.INCH, Unit.MM}:
        return None
    return amount_in(zone.value, Unit.MM)
