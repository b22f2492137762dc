"""What each reference of a frame holds, what it leaves, and which references add nothing.

Source: ASME Y14.5 (degrees of freedom constrained by primary, secondary and tertiary datum features),
ISO 5459 (datum systems).
"""

from dataclasses import dataclass
from itertools import takewhile

from calloutlint.facts.datums.arrangement import Reference
from calloutlint.facts.datums.claims import holds_all, takes_nothing, usual
from calloutlint.facts.datums.kinds import DatumKind
from calloutlint.facts.datums.motion import FREEDOMS, Freedom
from calloutlint.facts.datums.relations import Relation
from calloutlint.facts.datums.scheme import DatumScheme
from calloutlint.model.frame import DatumRef, Segment


@dataclass(frozen=True, slots=True)
class Held:
    """One reference of a frame in order of precedence.

    `freedoms` is what it would hold standing first, `new` what it takes after those before it, both in the
    usual arrangement and None where that is not known. `assumed` says what had to be taken for granted.
    """

    ref: DatumRef
    kind: DatumKind | None
    freedoms: tuple[Freedom, ...] | None
    new: tuple[Freedom, ...] | None
    assumed: str | None = None


def held(segment: Segment, scheme: DatumScheme) -> tuple[Held, ...]:
    """What each datum reference of a frame line holds, in order of precedence."""
    references = scheme.references(segment)
    known = tuple(takewhile(lambda reference: reference is not None, references))
    taken = usual(_present(known), _relations(scheme, known)) or ()
    result = []
    for order, ref in enumerate(segment.datums):
        here = taken[order] if order < len(taken) else None
        assumed = _assumed(references, order, scheme) if here else None
        alone, new = (here.alone, here.new) if here else (None, None)
        result.append(Held(ref, scheme.kind(ref), _in_order(alone), _in_order(new), assumed))
    return tuple(result)


def left(segment: Segment, scheme: DatumScheme) -> tuple[Freedom, ...] | None:
    """Freedoms that no reference of a frame line takes away; None where a reference is not known."""
    taken: set[Freedom] = set()
    for each in held(segment, scheme):
        if each.new is None:
            return None
        taken.update(each.new)
    return tuple(freedom for freedom in FREEDOMS if freedom not in taken)


def redundant(segment: Segment, scheme: DatumScheme) -> tuple[DatumRef, ...]:
    """References that take away no freedom after those before them, however the features may stand.

    Frames with named degrees of freedom are left out: there the names say what each one holds.
    """
    datums = segment.datums
    if len(datums) < 2:
        return ()
    key = tuple(map(_key, datums))
    if key not in scheme.idle:
        scheme.idle[key] = _idle(segment, scheme)
    return tuple(datums[place] for place in scheme.idle[key])


def _key(ref: DatumRef) -> object:
    """The letter of a bare reference, else the whole of it: letters are told apart far quicker."""
    bare = len(ref.letters) == 1 and not (ref.modifiers or ref.freedoms or ref.letters[0].modifiers)
    return ref.letters[0].letter if bare else ref


def _idle(segment: Segment, scheme: DatumScheme) -> tuple[int, ...]:
    if any(ref.freedoms for ref in segment.datums):
        return ()
    references = scheme.references(segment)
    return tuple(place for place in range(1, len(references)) if _adds_nothing(references, place, scheme))


def _adds_nothing(references: tuple[Reference | None, ...], order: int, scheme: DatumScheme) -> bool:
    earlier = references[:order]
    if None in earlier:
        return False
    present = _present(earlier)
    relations = _relations(scheme, earlier)
    last = references[order]
    if last is None:
        return holds_all(present, relations)
    return takes_nothing((*present, last), _relations(scheme, (*earlier, last)))


def _present(references: tuple[Reference | None, ...]) -> tuple[Reference, ...]:
    return tuple(reference for reference in references if reference is not None)


def _relations(scheme: DatumScheme, references: tuple[Reference | None, ...]) -> tuple[Relation, ...]:
    letters = (letter for reference in _present(references) for letter, _ in reference.members)
    return scheme.relations.among(letters)


def _in_order(freedoms: tuple[Freedom, ...] | None) -> tuple[Freedom, ...] | None:
    return None if freedoms is None else tuple(freedom for freedom in FREEDOMS if freedom in freedoms)


def _assumed(references: tuple[Reference | None, ...], order: int, scheme: DatumScheme) -> str | None:
    """What the usual arrangement took for granted of one reference: its kind, its direction, its likeness."""
    reference = references[order]
    if reference is None:
        return None
    said = [f"{letter} {geometry.assumed}" for letter, geometry in reference.members if geometry.assumed]
    letters = list(dict.fromkeys(letter for letter, _ in reference.members))
    before = [letter for r in _present(references[:order]) for letter, _ in r.members]
    if len(letters) > 1 and not scheme.relations.tell(letters, letters):
        said.append(f"{' and '.join(letters)} taken as {_usual_union(reference)}")
    if before and _has_direction(reference) and not scheme.relations.tell(letters, before):
        others = " and ".join(dict.fromkeys(before))
        said.append(f"{'-'.join(letters)} taken in its usual direction to {others}")
    return "; ".join(said) or None


def _usual_union(reference: Reference) -> str:
    kinds = {geometry.kind for _, geometry in reference.members}
    if kinds == {DatumKind.AXIS}:
        return "coaxial"
    flat = kinds <= {DatumKind.PLANE, DatumKind.CENTRE_PLANE}
    return "one plane" if flat else "standing in their usual directions"


def _has_direction(reference: Reference) -> bool:
    return any(geometry.kind is not DatumKind.POINT for _, geometry in reference.members)
