"""What says where a hole is: its position lines, other tolerances that locate, general tolerances."""

from __future__ import annotations

import re
from decimal import Decimal
from typing import TYPE_CHECKING

from calloutlint.facts.formulas.boundaries import GeometricTolerance
from calloutlint.facts.sizes import amount_in
from calloutlint.model.drawing import Drawing
from calloutlint.model.frame import Characteristic, Modifier, ScopeKind, ZoneShape
from calloutlint.units import Unit

if TYPE_CHECKING:
    from calloutlint.facts.views.callout import CalloutView
    from calloutlint.facts.views.frame import FrameView

LOCATING = {
    Characteristic.POSITION,
    Characteristic.LINE_PROFILE,
    Characteristic.SURFACE_PROFILE,
    Characteristic.CONCENTRICITY,
    Characteristic.SYMMETRY,
    Characteristic.CIRCULAR_RUNOUT,
    Characteristic.TOTAL_RUNOUT,
}
_GENERAL = re.compile(r"⌖|⌓|⌒|\bPOSITION(?:AL)?\b|\bPROFILE\b|\bISO\s*22081\b", re.IGNORECASE)


def positions(callout: CalloutView) -> list[FrameView]:
    """The position lines of a callout that are read in full, composite ones line by line."""
    lines = (frame for frame in callout.frames if frame.characteristic is Characteristic.POSITION)
    return [line for line in lines if not line.part.doubtful]


def widest_position(callout: CalloutView, shape: ZoneShape = ZoneShape.DIAMETER) -> FrameView | None:
    """The position line with the largest ⌀ tolerance, or of another shape; None where none is stated."""
    lines = (line for line in positions(callout) if line.tolerance.shape is shape)
    valued = [line for line in lines if line.tolerance.value is not None]
    return max(valued, key=lambda line: line.tolerance.value or Decimal(0), default=None)


def tolerance_of(line: FrameView, unit: Unit | None) -> GeometricTolerance | None:
    """A position line's tolerance for computing, in `unit`; None where no value is written."""
    zone = line.part.zone
    amount = amount_in(zone.value, unit) if zone else None
    if zone is None or amount is None:
        return None
    material = [kind for kind in (Modifier.MMC, Modifier.LMC) if zone.modifier(kind)]
    return GeometricTolerance(amount, material[0] if material else None, amount_in(zone.maximum, unit))


def is_located(callout: CalloutView) -> bool | None:
    """Whether something locates the feature of a callout.

    A single datum feature needs no location: it is where others are measured from. None where the callout
    has text that is not read, or where a general tolerance of position or profile may stand for it.
    """
    if any(frame.characteristic in LOCATING for frame in callout.frames):
        return True
    if callout.part.datum_features and not callout.feature.several:
        return True
    if callout.part.unread or _generally_located(callout.drawing_model):
        return None
    return False


def _generally_located(drawing: Drawing) -> bool:
    if any(_GENERAL.search(note) for note in drawing.notes):
        return True
    frames = (frame for callout in drawing.callouts for frame in callout.frames)
    return any(frame.scope is not None and frame.scope.kind is ScopeKind.ALL_OVER for frame in frames)
