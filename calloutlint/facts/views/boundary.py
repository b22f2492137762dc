"""Facts about the worst-case boundaries that a size and a geometric tolerance make together.

The formulas are those of `facts.formulas.boundaries`; their sources stand there.
"""

from __future__ import annotations

from collections.abc import Callable
from decimal import Decimal
from typing import TYPE_CHECKING

from calloutlint.facts.formulas.boundaries import (
    FeatureOfSize,
    GeometricTolerance,
    datum_shift,
    inner_boundary,
    outer_boundary,
    resultant_condition,
    virtual_condition,
)
from calloutlint.facts.view import Length, fact
from calloutlint.facts.views.located import tolerance_of
from calloutlint.facts.views.part import PartView
from calloutlint.model.frame import Characteristic, Modifier, Segment

if TYPE_CHECKING:
    from calloutlint.facts.views.callout import CalloutView
    from calloutlint.facts.views.frame import FrameView


class BoundaryView(PartView):
    """Boundaries of a feature of size by one frame line; unknown where its side or its limits are not known."""

    subject = "boundary"
    part: Segment

    def __init__(self, frame: FrameView) -> None:
        super().__init__(frame.part, frame.callout)
        self._tolerance = tolerance_of(frame, self.unit) if _bounds_size(frame) else None
        self._size = feature_of_size(frame.callout)

    def _by(self, formula: Callable[[FeatureOfSize, GeometricTolerance], Decimal | None]) -> Decimal | None:
        return formula(self._size, self._tolerance) if self._size and self._tolerance else None

    @fact
    def virtual_condition(self) -> Length | None:
        """The constant boundary at Ⓜ or Ⓛ; unknown regardless of feature size."""
        return self._by(virtual_condition)

    @fact
    def resultant_condition(self) -> Length | None:
        """The boundary on the other side of the virtual condition; unknown regardless of feature size."""
        return self._by(resultant_condition)

    @fact
    def inner(self) -> Length | None:
        """The inner boundary: the smallest of size less tolerance, over all sizes."""
        return self._by(inner_boundary)

    @fact
    def outer(self) -> Length | None:
        """The outer boundary: the largest of size plus tolerance, over all sizes."""
        return self._by(outer_boundary)


def feature_of_size(callout: CalloutView) -> FeatureOfSize | None:
    """The limits of a callout's feature and its side; None where one of them is not known."""
    size, internal = callout.size, callout.feature.internal
    if size is None or internal is None or size.smallest is None or size.largest is None:
        return None
    return FeatureOfSize(size.smallest, size.largest, internal) if size.smallest <= size.largest else None


def largest_shift(callout: CalloutView) -> Decimal | None:
    """How far a part may move at this datum feature when it is referenced at Ⓜ, the feature at its LMC.

    Its own tolerance counts by its first position or orientation line; without one, its limits of size do.
    """
    feature = feature_of_size(callout)
    if feature is None:
        return None
    lines = (frame for frame in callout.frames if frame.datums and _bounds_size(frame))
    own = next((tolerance_of(line, callout.unit) for line in lines), None)
    return datum_shift(feature, own or GeometricTolerance(Decimal(0), Modifier.MMC), feature.lmc)


def _bounds_size(frame: FrameView) -> bool:
    """Whether a frame line holds the axis or the centre plane of a feature of size."""
    return frame.characteristic is Characteristic.POSITION or frame.orientation
