"""Whether datum targets are complete: numbered without a gap, and enough of them for a primary plane.

Source: ASME Y14.5 and ISO 5459, datum targets: a primary plane rests on three points out of line. An area
is counted as one contact, a line as two.
"""

from dataclasses import dataclass

from calloutlint.facts.datums.kinds import DatumKind
from calloutlint.facts.datums.scheme import DatumScheme, Established
from calloutlint.facts.datums.targets import missing_numbers
from calloutlint.model.callout import Callout, DatumTarget

FULL_PLANE = 3


@dataclass(frozen=True, slots=True)
class TargetFault:
    """Targets of one letter that are not complete; a finding stands on `target`, the first, in `callout`.

    `missing` are the numbers left out; `contacts` is how many points the targets of a primary plane make
    where they are fewer than three, else None.
    """

    letter: str
    callout: Callout
    target: DatumTarget
    missing: tuple[int, ...]
    contacts: int | None


def target_faults(scheme: DatumScheme) -> tuple[TargetFault, ...]:
    """Letters whose datum targets have a gap, or are too few for a primary plane.

    A letter that no frame references and no symbol defines may be no datum: `P96` is a knurl, `N7` a roughness.
    """
    primary = {use.order[0] for use in scheme.uses}
    referenced = {letter.letter for use in scheme.uses for ref in use.segment.datums for letter in ref.letters}
    faults = []
    for feature in scheme.features.values():
        if not feature.targets or any(callout.unread for callout, _ in feature.targets):
            continue
        if not feature.callouts and feature.letter not in referenced:
            continue
        missing = missing_numbers(target for _, target in feature.targets)
        contacts = _too_few(feature) if feature.letter in primary else None
        if missing or contacts is not None:
            callout, target = feature.targets[0]
            faults.append(TargetFault(feature.letter, callout, target, missing, contacts))
    return tuple(faults)


def _too_few(feature: Established) -> int | None:
    """Contacts of a plane that does not rest on them alone; None for enough, or for another kind of datum."""
    geometry = feature.geometry
    if geometry is None or geometry.kind is not DatumKind.PLANE or geometry.contacts is None:
        return None
    return geometry.contacts if geometry.contacts < FULL_PLANE else None
