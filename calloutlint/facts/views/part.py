"""What every view that stands on a callout can say: its callout, its drawing, its standard."""

from __future__ import annotations

from decimal import Decimal
from typing import TYPE_CHECKING, Any

from calloutlint.facts.sizes import amount_in
from calloutlint.facts.view import View, fact
from calloutlint.model.callout import Callout
from calloutlint.model.drawing import Drawing
from calloutlint.model.values import Value

if TYPE_CHECKING:
    from calloutlint.facts.views.callout import CalloutView
    from calloutlint.facts.views.drawing import DrawingView, StandardView
    from calloutlint.facts.views.feature import FeatureView
    from calloutlint.facts.views.hole import HoleView


class PartView(View):
    """A part of a callout. `part` is the model object that a finding marks and a redline changes."""

    drawing_model: Drawing
    callout_model: Callout

    def __init__(self, part: Any, callout: CalloutView) -> None:
        self.part = part
        self.drawing_model = callout.drawing_model
        self.callout_model = callout.callout_model
        self.doubtful = getattr(part, "doubtful", False)
        self.unit = callout.unit
        self._callout = callout

    def _length(self, value: Value | None) -> Decimal | None:
        return amount_in(value, self.unit)

    @fact
    def callout(self) -> CalloutView:
        """The callout that this stands in."""
        return self._callout

    @fact
    def drawing(self) -> DrawingView:
        """The drawing that this stands on."""
        return self._callout.drawing

    @fact
    def standard(self) -> StandardView:
        """The standard that the drawing states."""
        return self._callout.drawing.standard

    @fact
    def feature(self) -> FeatureView:
        """What the callout's feature is: internal or external, round, a width, a plain surface."""
        return self._callout.feature

    @fact
    def hole(self) -> HoleView:
        """The callout's feature as a hole: its limits, what goes through it."""
        return self._callout.hole
