"""What a stated process makes of a position tolerance: the share of holes accepted, with Ⓜ and without."""

from __future__ import annotations

from decimal import Decimal
from typing import TYPE_CHECKING

from calloutlint.facts.formulas.acceptance import Acceptance, Spread, acceptance
from calloutlint.facts.formulas.boundaries import FeatureOfSize, GeometricTolerance
from calloutlint.facts.sizes import amount_in
from calloutlint.model.drawing import Drawing
from calloutlint.model.frame import Modifier, ZoneShape

if TYPE_CHECKING:
    from calloutlint.facts.views.hole import HoleView
    from calloutlint.facts.views.tolerance import ToleranceView

TENTH = Decimal("0.1")


def shares(tolerance: ToleranceView, hole: HoleView) -> Acceptance | None:
    """Shares of holes accepted regardless of size and at Ⓜ under the process that the drawing states.

    None where it states none, or for anything but a ⌀ tolerance of a hole whose limits are known. Formula and
    source: `facts.formulas.acceptance`.
    """
    spread = _spread(tolerance.drawing_model)
    if spread is None or tolerance.value is None or tolerance.shape is not ZoneShape.DIAMETER:
        return None
    if hole.mmc is None or hole.lmc is None or hole.mmc > hole.lmc:
        return None
    zone = GeometricTolerance(tolerance.value, Modifier.MMC)
    return acceptance(FeatureOfSize(hole.mmc, hole.lmc), zone, spread)


def percent(share: float) -> Decimal:
    """A share as percent, to a tenth."""
    return Decimal(100 * share).quantize(TENTH)


def _spread(drawing: Drawing) -> Spread | None:
    process = drawing.process
    if process is None or process.location is None:
        return None
    location, size = amount_in(process.location, drawing.unit), amount_in(process.size, drawing.unit)
    if location is None or location < 0 or (size is not None and size < 0):
        return None
    return Spread(location, size or Decimal(0))
