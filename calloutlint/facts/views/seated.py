"""Facts about how a head sits at a hole: the counterbore's room, the bearing that is left."""

from __future__ import annotations

from typing import TYPE_CHECKING

from calloutlint.facts.formulas import fastening
from calloutlint.facts.view import Length, fact
from calloutlint.facts.views.joined import JoinedView
from calloutlint.facts.views.step import StepView
from calloutlint.model.hole import StepKind

if TYPE_CHECKING:
    from decimal import Decimal

SEATS = {StepKind.COUNTERBORE, StepKind.SPOTFACE}


class SeatedView(JoinedView):
    """A hole that a head may bear on; the hole's position is given by what builds on it."""

    tolerance_at_lmc: Decimal | None

    @fact
    def counterbore(self) -> StepView | None:
        """Its counterbore or spotface, the one that takes the head; unknown where it has none."""
        return next((step for step in self._callout.steps if step.kind in SEATS), None)

    @fact
    def play_at_lmc(self) -> Length | None:
        """Largest hole less the fastener: how far the fastener may move in it, as a diameter."""
        lmc, diameter = self._callout.hole.lmc, self.fastener.diameter
        return None if lmc is None or diameter is None else lmc - diameter

    @fact
    def head_shift(self) -> Length | None:
        """How far the head may stand off the counterbore, as a diameter: position at LMC or the play."""
        if self.tolerance_at_lmc is None or self.play_at_lmc is None:
            return None
        return min(self.tolerance_at_lmc, self.play_at_lmc)

    @fact
    def bearing_left(self) -> Length | None:
        """What the smallest head still covers on one side when it is pushed to the other; negative: nothing."""
        return self._left_of(self.fastener.seat_smallest)

    @fact
    def face_left(self) -> Length | None:
        """The same of the smallest bearing face, inside the rounded or chamfered edge of the head."""
        return self._left_of(self.fastener.bearing_smallest)

    def _left_of(self, head: Decimal | None) -> Decimal | None:
        lmc, diameter = self._callout.hole.lmc, self.fastener.diameter
        if head is None or lmc is None or diameter is None:
            return None
        return fastening.bearing_left(head, lmc, diameter)
