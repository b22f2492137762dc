"""Datum reference frames in force: which callouts share one, and which differ by order or by a modifier.

Source: ASME Y14.5 (datum reference frames, simultaneous requirements), ISO 5459 (datum systems),
ISO 5458 (simultaneous requirement only where SIM is written).
"""

from dataclasses import dataclass

from calloutlint.facts.datums.scheme import DatumScheme
from calloutlint.facts.datums.uses import Use
from calloutlint.model.callout import Meaning
from calloutlint.model.frame import Characteristic, DatumRef, Modifier

_LOCATING = {Characteristic.POSITION, Characteristic.SURFACE_PROFILE, Characteristic.LINE_PROFILE}


@dataclass(frozen=True, slots=True)
class FrameInForce:
    """A datum reference frame with all lines that refer to it, in the order of the drawing.

    Two lines share it if letters, order, material boundaries and named freedoms are the same. `simultaneous`
    are the lines that one setting of the part has to satisfy together, empty where fewer than two callouts
    are tied.
    """

    refs: tuple[DatumRef, ...]
    uses: tuple[Use, ...]
    simultaneous: tuple[Use, ...]


def frames_in_force(scheme: DatumScheme) -> tuple[FrameInForce, ...]:
    """The datum reference frames of a drawing in the order they first appear."""
    groups: dict[object, list[Use]] = {}
    for use in scheme.uses:
        names = tuple(ref.freedoms for ref in use.segment.datums)
        groups.setdefault((use.order, use.boundaries, names), []).append(use)
    return tuple(
        FrameInForce(uses[0].segment.datums, tuple(uses), _simultaneous(uses, scheme))
        for uses in groups.values()
    )


def _simultaneous(uses: list[Use], scheme: DatumScheme) -> tuple[Use, ...]:
    """Position and profile of one frame go together unless parted; under ISO only where SIM says so."""
    tied = tuple(use for use in uses if may_be_tied(use) and (not scheme.iso or _says_so(use)))
    return tied if len({id(use.callout) for use in tied}) > 1 else ()


def may_be_tied(use: Use) -> bool:
    """Whether a frame line could share a simultaneous requirement: it locates, and nothing parts it."""
    locates = use.segment.characteristic in _LOCATING and not use.lower
    return locates and Meaning.SEPARATE_REQUIREMENT not in use.callout.meanings


def is_tied(use: Use, scheme: DatumScheme) -> bool:
    """Whether a simultaneous requirement makes a pattern of this line's feature and those of other callouts."""
    like = (other for other in scheme.uses if other.order == use.order and other.boundaries == use.boundaries)
    return any(other.segment is use.segment for other in _simultaneous(list(like), scheme))


def _says_so(use: Use) -> bool:
    zone = use.segment.zone
    written = zone is not None and zone.modifier(Modifier.SIMULTANEOUS) is not None
    return written or Meaning.SIMULTANEOUS_REQUIREMENT in use.callout.meanings
