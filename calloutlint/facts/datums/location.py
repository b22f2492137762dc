"""Whether the references of a position locate a feature at all, or only orient it.

Source: ASME Y14.5 and ISO 5458, position tolerances: the zone is at true position in the frame; a
tolerance whose datums leave it free to move controls orientation only.
"""

from enum import StrEnum

from calloutlint.facts.datums.frames import is_tied
from calloutlint.facts.datums.kinds import DatumKind
from calloutlint.facts.datums.scheme import DatumScheme
from calloutlint.facts.datums.uses import Use, uses_in
from calloutlint.model.callout import Callout
from calloutlint.model.frame import Characteristic, DatumRef, ZoneShape
from calloutlint.model.size import SizeForm


class Unlocated(StrEnum):
    """Why a positioned feature is not located."""

    NO_DATUM = "no datum"
    ONE_PLANE = "one plane"


def unlocated(use: Use, scheme: DatumScheme) -> Unlocated | None:
    """Why the position of a single feature leaves it free to move in the zone's plane; None where it may not.

    Silent for patterns and coaxial groups, for lines that refine another position of the same callout, where
    other positions or profiles share the frame (one setting of the part ties them together), and for a
    width positioned to one plane, which locates it.
    """
    datums = use.segment.datums
    if len(datums) > 1 or not _is_lone(use):
        return None
    if not datums:
        return Unlocated.NO_DATUM
    round_zone = use.segment.zone is not None and use.segment.zone.shape is not ZoneShape.WIDTH
    if not round_zone or not _is_flat(datums[0], scheme) or is_tied(use, scheme):
        return None
    return Unlocated.ONE_PLANE


def positions_have_datums(callout: Callout) -> bool | None:
    """Whether any position of a callout refers to a datum; None where it has no position at all."""
    positions = [s for s in callout.segments if s.characteristic is Characteristic.POSITION]
    if not positions or any(segment.doubtful for segment in positions):
        return None
    return any(segment.datums for segment in positions)


def positions_of(callout: Callout) -> tuple[Use, ...]:
    """Position lines of a callout, with and without datums."""
    return tuple(use for use in uses_in([callout]) if use.segment.characteristic is Characteristic.POSITION)


def _is_lone(use: Use) -> bool:
    """Whether a single feature has this as its only position, read without doubt."""
    callout = use.callout
    several = sum(size.form in (SizeForm.DIAMETER, SizeForm.SPHERICAL_DIAMETER) for size in callout.sizes) > 1
    counts = (callout.count, use.frame.count)
    if several or callout.unread or use.segment.doubtful or use.frame.composite:
        return False
    if any(count is not None and count.number != 1 for count in counts):
        return False
    return len(positions_of(callout)) == 1


def _is_flat(ref: DatumRef, scheme: DatumScheme) -> bool:
    planes = (DatumKind.PLANE, DatumKind.CENTRE_PLANE)
    return len(ref.letters) == 1 and scheme.kind(ref) in planes
