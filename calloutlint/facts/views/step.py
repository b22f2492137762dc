"""Facts about a hole step: counterbore, spotface, countersink, drill."""

from __future__ import annotations

from decimal import Decimal

from calloutlint.facts.view import Length, fact
from calloutlint.facts.views.part import PartView
from calloutlint.model.hole import HoleStep, StepKind
from calloutlint.model.size import Size, SizeForm


class StepView(PartView):
    """One step of a hole."""

    subject = "step"
    part: HoleStep

    @fact
    def kind(self) -> StepKind:
        """Counterbore, spotface, countersink, drill…"""
        return self.part.kind

    @fact
    def enlarges(self) -> bool:
        """Whether it is a counterbore, spotface or countersink."""
        return self.part.kind in {StepKind.COUNTERBORE, StepKind.SPOTFACE, StepKind.COUNTERSINK}

    @fact
    def diameter(self) -> Length | None:
        """Nominal diameter of the step, or the middle of its limits."""
        return self._middle(self.part.size)

    @fact
    def smallest(self) -> Length | None:
        """Lower limit of the step's diameter."""
        return self._callout.view_of(self.part.size).smallest if self.part.size else None

    @fact
    def hole_diameter(self) -> Length | None:
        """Diameter of the hole that it stands on: the largest plain diameter or drill of the callout."""
        sizes = [size for size in self._callout.part.sizes if size.form is SizeForm.DIAMETER]
        drills = [s.size for s in self._callout.part.steps if s.kind is StepKind.DRILL and s.size is not None]
        diameters = [middle for size in [*sizes, *drills] if (middle := self._middle(size)) is not None]
        return max(diameters, default=None)

    def _middle(self, size: Size | None) -> Decimal | None:
        if size is None:
            return None
        if size.nominal is not None:
            return self._length(size.nominal)
        view = self._callout.view_of(size)
        if view.smallest is None or view.largest is None:
            return None
        return (view.smallest + view.largest) / 2
