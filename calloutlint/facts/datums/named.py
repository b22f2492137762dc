"""Named degrees of freedom: whether the datum can hold what is written behind it.

The letters belong to the axes of the drawing, and which axis is which is the drafter's choice; but u turns
about x, v about y and w about z. So `A[u,v,z]` is right for a plane, which is then normal to z, and
`A[x,u,v]` for no plane at all.

Source: ASME Y14.5, customized datum reference frames.
"""

from dataclasses import dataclass
from functools import lru_cache

from calloutlint.facts.datums.arrangement import Reference, arrangements
from calloutlint.facts.datums.claims import out_of_reach, too_many
from calloutlint.facts.datums.motion import Freedom
from calloutlint.facts.datums.relations import Relation
from calloutlint.facts.datums.scheme import DatumScheme, freedom_named
from calloutlint.model.frame import DatumRef, Segment


@dataclass(frozen=True, slots=True)
class NamedFault:
    """A reference with names that cannot stand: `repeated` ones, and those `beyond` what the datum holds."""

    ref: DatumRef
    repeated: tuple[Freedom, ...]
    beyond: tuple[Freedom, ...]


def named_faults(segment: Segment, scheme: DatumScheme) -> tuple[NamedFault, ...]:
    """References whose named degrees of freedom are repeated, or beyond what the datum can hold."""
    faults = []
    seen: set[Freedom] = set()
    for order, ref in enumerate(segment.datums):
        repeated = []
        for freedom in _names(ref):
            if freedom in seen:
                repeated.append(freedom)
            seen.add(freedom)
        beyond = _beyond(segment, order, scheme)
        if repeated or beyond:
            faults.append(NamedFault(ref, tuple(dict.fromkeys(repeated)), beyond))
    return tuple(faults)


def _names(ref: DatumRef) -> tuple[Freedom, ...]:
    return tuple(freedom for freedom in map(freedom_named, ref.freedoms) if freedom is not None)


def _beyond(segment: Segment, order: int, scheme: DatumScheme) -> tuple[Freedom, ...]:
    """Names of one reference that it cannot hold after those before it; empty where a datum is not known."""
    references = scheme.references(segment)[: order + 1]
    known = tuple(reference for reference in references if reference is not None)
    if len(known) <= order or not segment.datums[order].freedoms:
        return ()
    letters = (letter for reference in known for letter, _ in reference.members)
    return least_beyond(known, scheme.relations.among(letters))


@lru_cache(maxsize=4096)
def least_beyond(references: tuple[Reference, ...], relations: tuple[Relation, ...]) -> tuple[Freedom, ...]:
    """Names of the last reference that it cannot hold, in the arrangement that leaves the fewest."""
    if too_many(references):
        return ()
    fewest: tuple[Freedom, ...] | None = None
    for placed in arrangements(references, relations, turned=True):
        faults = [out_of_reach(references[: order + 1], placed) for order in range(len(references))]
        if any(faults[:-1]):
            continue
        if not faults[-1]:
            return ()
        if fewest is None or len(faults[-1]) < len(fewest):
            fewest = faults[-1]
    return fewest or ()
