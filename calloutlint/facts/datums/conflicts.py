"""Frames that differ where they should agree: by the order of their datums, or by a material boundary.

A conflict stands on the later of two callouts. The frame that most callouts of a drawing use is taken as
the one that is meant; lines of one callout may differ from each other.

Source: ASME Y14.5 (datum precedence; material boundaries of datum features; simultaneous requirements).
"""

from collections import Counter
from collections.abc import Callable, Hashable, Iterable, Iterator, Sequence
from dataclasses import dataclass

from calloutlint.facts.datums.frames import may_be_tied
from calloutlint.facts.datums.scheme import DatumScheme
from calloutlint.facts.datums.uses import Use
from calloutlint.model.fastener import Joint
from calloutlint.model.frame import Characteristic

RUNOUT = {Characteristic.CIRCULAR_RUNOUT, Characteristic.TOTAL_RUNOUT}


@dataclass(frozen=True, slots=True)
class Conflict:
    """Two frame lines that differ: `use` in the later callout, where the finding stands, and `other`.

    `joint` is the joint that both callouts belong to, None where there is none.
    """

    use: Use
    other: Use
    joint: Joint | None = None


def order_conflicts(scheme: DatumScheme, joints: Sequence[Joint] = ()) -> tuple[Conflict, ...]:
    """Frames with the same letters in another order.

    `joints` are those of the package, beside the drawing's own. A conflict inside one joint names
    it, and the callout is not reported again for the rest of the drawing.
    """
    uses = scheme.uses
    found: dict[int, Conflict] = {}
    own = [joint for sheet in scheme.sheets for joint in sheet.joints]
    for joint in (*own, *joints):
        members = _members(joint, scheme)
        for use, other in _deviating((u for u in uses if id(u.callout) in members), _letters, _order):
            found.setdefault(id(use.callout), Conflict(use, other, joint))
    for use, other in _deviating(uses, _letters, _order):
        found.setdefault(id(use.callout), Conflict(use, other))
    return tuple(found[id(callout)] for callout in scheme.callouts if id(callout) in found)


def boundary_conflicts(scheme: DatumScheme) -> tuple[Conflict, ...]:
    """Positions with the same datums in the same order, but other material boundaries, that nothing parts."""
    positions = (u for u in scheme.uses if u.segment.characteristic is Characteristic.POSITION)
    uses = filter(may_be_tied, positions)
    return tuple(Conflict(use, other) for use, other in _deviating(uses, _order, _boundaries))


def _members(joint: Joint, scheme: DatumScheme) -> set[int]:
    """Identities of the callouts of a drawing that a joint names."""
    return {
        id(callout)
        for sheet in scheme.sheets
        for hole in (*joint.holes, *joint.mates)
        if hole.drawing == sheet.name or (hole.drawing is None and joint in sheet.joints)
        for callout in sheet.callouts
        if callout.balloon == hole.balloon
    }


def _letters(use: Use) -> Hashable:
    """What two lines must have in common to be compared: a runout has its axis first by its nature."""
    return use.segment.characteristic in RUNOUT, tuple(sorted(use.order))


def _order(use: Use) -> Hashable:
    return use.order


def _boundaries(use: Use) -> Hashable:
    return use.boundaries


def _deviating(
    uses: Iterable[Use], group: Callable[[Use], Hashable], variant: Callable[[Use], Hashable]
) -> Iterator[tuple[Use, Use]]:
    """Within each group, a use of every callout that lacks the prevailing variant, and a use that has it.

    Where the deviating callout stands before all that have the prevailing variant, the pair is turned
    round, so that it stands on the later callout, once.
    """
    groups: dict[Hashable, list[Use]] = {}
    for use in uses:
        groups.setdefault(group(use), []).append(use)
    for members in groups.values():
        if len(set(map(variant, members))) > 1:
            yield from _against_prevailing(members, variant)


def _against_prevailing(members: list[Use], variant: Callable[[Use], Hashable]) -> Iterator[tuple[Use, Use]]:
    by_callout: dict[int, dict[Hashable, Use]] = {}
    for use in members:
        by_callout.setdefault(id(use.callout), {}).setdefault(variant(use), use)
    votes = Counter(key for variants in by_callout.values() for key in variants)
    prevailing = max(votes, key=lambda key: votes[key])
    model: Use | None = None
    early: Use | None = None
    for variants in by_callout.values():
        own = variants.get(prevailing)
        first = next(iter(variants.values()))
        if model is None and own is not None:
            model = own
            if early is not None:
                yield model, early
        elif own is None and model is not None:
            yield first, model
        elif own is None:
            early = first
