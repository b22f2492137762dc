"""The ways in which the datum features of a frame may stand together, as far as their callouts tell.

Source: ASME Y14.5 (datum precedence, constraint of degrees of freedom), ISO 5459 (datum systems).
"""

from collections.abc import Iterator, Sequence
from dataclasses import dataclass
from functools import lru_cache

from calloutlint.facts.datums.kinds import DatumGeometry
from calloutlint.facts.datums.motion import Constraints, Freedom, Row, Z
from calloutlint.facts.datums.placement import Placement, placements
from calloutlint.facts.datums.relations import Link, Relation, agrees


@dataclass(frozen=True, slots=True)
class Reference:
    """A datum reference ready to be computed: its features by letter, and what its modifiers restrict.

    `named` are the freedoms written behind it; `orients_only` is the sign for orientation alone.
    """

    members: tuple[tuple[str, DatumGeometry], ...]
    named: tuple[Freedom, ...] = ()
    orients_only: bool = False


Arrangement = dict[str, Placement]


def arrangements(
    references: Sequence[Reference], relations: tuple[Relation, ...], *, turned: bool = False
) -> Iterator[Arrangement]:
    """Every arrangement that agrees with the relations, the first feature along z at the origin.

    `turned` lets the first feature point along each axis too, for where the axes have names.
    """

    def extend(placed: Arrangement, rest: Sequence[Reference]) -> Iterator[Arrangement]:
        if not rest:
            yield placed
            return
        for wider in extensions(placed, rest[0], relations, turned=turned):
            yield from extend(wider, rest[1:])

    return extend({}, references)


def constraints(references: Sequence[Reference], placed: Arrangement) -> Constraints:
    """All that the references hold together."""
    held = Constraints()
    for reference in references:
        held = after(held, reference, placed)
    return held


def after(before: Constraints, reference: Reference, placed: Arrangement) -> Constraints:
    """The constraints with those of one reference more: of its datum, or of the freedoms named behind it."""
    if reference.named:
        return before.and_also(freedom.row for freedom in reference.named)
    return before.and_also(own(reference, placed).rows)


def own(reference: Reference, placed: Arrangement) -> Constraints:
    """What the datum of a reference forbids by itself, whatever freedoms are named behind it."""
    rows = (row for letter, _ in reference.members for row in _forbidden(placed[letter]))
    held = Constraints().and_also(rows)
    return held.orientation() if reference.orients_only else held


@lru_cache(maxsize=1024)
def _forbidden(place: Placement) -> tuple[Row, ...]:
    return place.constraints()


def extensions(
    placed: Arrangement, reference: Reference, relations: tuple[Relation, ...], *, turned: bool = False
) -> Iterator[Arrangement]:
    """The arrangements with one reference more, the most usual first."""

    def extend(placed: Arrangement, members: Sequence[tuple[str, DatumGeometry]]) -> Iterator[Arrangement]:
        if not members:
            yield placed
            return
        (letter, geometry), *rest = members
        for place in _options(letter, geometry, relations):
            if not placed and not turned and (place.direction != Z or any(place.point)):
                continue
            wider = placed | {letter: place}
            if _agrees(letter, wider, relations) and _together(letter, reference, wider, relations):
                yield from extend(wider, rest)

    return extend(placed, [member for member in reference.members if member[0] not in placed])


def _options(letter: str, geometry: DatumGeometry, relations: tuple[Relation, ...]) -> Iterator[Placement]:
    oblique = any(r.link is Link.OBLIQUE and letter in (r.letter, r.to) for r in relations)
    return placements(geometry, oblique=oblique)


def _agrees(letter: str, placed: Arrangement, relations: tuple[Relation, ...]) -> bool:
    """Whether the feature placed last stands as the callouts say to those placed before."""
    return all(
        agrees(relation, placed[relation.letter], placed[relation.to])
        for relation in relations
        if letter in (relation.letter, relation.to) and relation.letter in placed and relation.to in placed
    )


def _together(letter: str, reference: Reference, placed: Arrangement, relations: tuple[Relation, ...]) -> bool:
    """Whether members of a common datum of one kind stand in one direction, unless callouts say otherwise."""
    place = placed[letter]
    told = {other for r in relations if letter in (r.letter, r.to) for other in (r.letter, r.to)}
    return all(
        placed[other].direction == place.direction
        for other, geometry in reference.members
        if other in placed and other not in told and geometry.kind is place.geometry.kind
    )
