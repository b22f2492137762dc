"""How the directions of datum features stand to each other, as far as their own callouts tell.

A direction is the normal of a plane or the line of an axis. Perpendicular surfaces have directions at right
angles; a hole perpendicular to a face has the direction of the face.

Source: ASME Y14.5 and ISO 1101, what the orientation, location and runout tolerances are defined by.
"""

from collections.abc import Collection, Iterable, Iterator, Mapping
from dataclasses import dataclass
from enum import Enum
from itertools import combinations

from calloutlint.facts.datums.kinds import DatumGeometry, DatumKind
from calloutlint.facts.datums.motion import Vector, cross, dot
from calloutlint.facts.datums.placement import Layout, Placement
from calloutlint.model.callout import Callout
from calloutlint.model.frame import Characteristic, Segment, ZoneShape


class Link(Enum):
    """What is known of two datum features."""

    SAME_DIRECTION = "same direction"
    RIGHT_ANGLE = "directions at right angles"
    OBLIQUE = "directions at another angle"
    COAXIAL = "coaxial"
    AROUND = "a pattern that stands along or around the axis"
    SIDE_BY_SIDE = "the members of the pattern side by side"


@dataclass(frozen=True, slots=True)
class Relation:
    """A link of the datum feature `letter` to an earlier one, `to`."""

    letter: str
    to: str
    link: Link


_COAXIAL = (Characteristic.CIRCULAR_RUNOUT, Characteristic.TOTAL_RUNOUT, Characteristic.CONCENTRICITY)
_FLAT = {DatumKind.PLANE, DatumKind.CENTRE_PLANE}


def relations_of(
    letter: str, callout: Callout, geometries: Mapping[str, DatumGeometry | None]
) -> Iterator[Relation]:
    """What the frames of a datum feature's own callout say of its direction."""
    own = geometries.get(letter)
    if own is None:
        return
    for segment in callout.segments:
        for order, ref in enumerate(segment.datums if not segment.doubtful else ()):
            names = [member.letter for member in ref.letters]
            for to in names:
                other = geometries.get(to)
                if other is not None and to != letter:
                    shared = letter in names
                    links = _shared(segment, own, other) if shared else _links(segment, order, own, other)
                    yield from (Relation(letter, to, link) for link in links)
    yield from _around(letter, callout, own, geometries)


def _shared(segment: Segment, own: DatumGeometry, other: DatumGeometry) -> Iterator[Link]:
    """A feature of a common datum held to that datum: two bearing seats in runout to their common axis."""
    coaxial = segment.characteristic in (*_COAXIAL, Characteristic.POSITION)
    if coaxial and own.kind is other.kind is DatumKind.AXIS:
        yield Link.COAXIAL


def _links(segment: Segment, order: int, own: DatumGeometry, other: DatumGeometry) -> Iterator[Link]:
    kinds = (own.member or own.kind, other.member or other.kind)
    if DatumKind.POINT in kinds:
        return
    flats = sum(kind in _FLAT for kind in kinds)
    match segment.characteristic:
        case Characteristic.PERPENDICULARITY if order == 0 or flats == 2:
            yield Link.SAME_DIRECTION if flats == 1 else Link.RIGHT_ANGLE
        case Characteristic.PARALLELISM if order == 0:
            yield Link.RIGHT_ANGLE if flats == 1 else Link.SAME_DIRECTION
        case Characteristic.ANGULARITY if order == 0:
            yield Link.OBLIQUE
        case characteristic if characteristic in _COAXIAL:
            yield Link.COAXIAL if own.kind is other.kind is DatumKind.AXIS else Link.SAME_DIRECTION
        case Characteristic.SYMMETRY if order == 0:
            yield Link.RIGHT_ANGLE if flats == 1 else Link.SAME_DIRECTION
        case Characteristic.POSITION if _stands_on(segment, own, other):
            yield Link.SAME_DIRECTION
            if own.kind is DatumKind.PATTERN:
                yield Link.SIDE_BY_SIDE


def _stands_on(segment: Segment, own: DatumGeometry, other: DatumGeometry) -> bool:
    """Whether round features are positioned to one plane and nothing else: they stand at right angles on it."""
    round_zone = segment.zone is not None and segment.zone.shape is ZoneShape.DIAMETER
    axes = own.kind is DatumKind.AXIS or own.member is DatumKind.AXIS
    return len(segment.datums) == 1 and other.kind is DatumKind.PLANE and round_zone and axes


def _around(
    letter: str, callout: Callout, own: DatumGeometry, geometries: Mapping[str, DatumGeometry | None]
) -> Iterator[Relation]:
    """Three or more holes positioned to a face and an axis, or to an axis: along the axis, or around it."""
    if own.kind is not DatumKind.PATTERN or own.member is not DatumKind.AXIS or own.count < 3:
        return
    for segment in callout.segments:
        if segment.characteristic is not Characteristic.POSITION or len(segment.datums) > 2:
            continue
        for to in (ref.letters[0].letter for ref in segment.datums if len(ref.letters) == 1):
            other = geometries.get(to)
            if to != letter and other is not None and other.kind is DatumKind.AXIS:
                yield Relation(letter, to, Link.AROUND)


class Relations:
    """All that is known of the directions of a drawing's datum features, and what follows from it."""

    def __init__(self, known: Iterable[Relation]) -> None:
        self._known = frozenset(relation for relation in known if relation.letter != relation.to)
        self._direction = _joined(self._known, (Link.SAME_DIRECTION, Link.COAXIAL))
        self._axis = _joined(self._known, (Link.COAXIAL,))
        self._of_the_pair = [r for r in self._known if r.link in _OF_THE_PAIR]
        self._square = {
            frozenset((self._direction.get(r.letter, r.letter), self._direction.get(r.to, r.to)))
            for r in self._known
            if r.link is Link.RIGHT_ANGLE
        }

    def among(self, letters: Iterable[str]) -> tuple[Relation, ...]:
        """The relations between these letters, in a fixed order."""
        chosen = sorted(set(letters))
        found = [Relation(a, b, link) for a, b in combinations(chosen, 2) for link in self._between(a, b)]
        found += [r for r in self._of_the_pair if r.letter in chosen and r.to in chosen]
        return tuple(sorted(found, key=lambda r: (r.letter, r.to, r.link.value)))

    def tell(self, some: Iterable[str], others: Iterable[str]) -> bool:
        """Whether the callouts say how one of these features stands to one of the others."""
        return any(True for a in some for b in others if a != b for _ in self._between(a, b))

    def _between(self, a: str, b: str) -> Iterator[Link]:
        """What follows for two features: what has the direction of a third is square to what that is."""
        one, other = self._direction.get(a, a), self._direction.get(b, b)
        if one == other:
            yield Link.COAXIAL if self._axis.get(a, a) == self._axis.get(b, b) else Link.SAME_DIRECTION
        if frozenset((one, other)) in self._square:
            yield Link.RIGHT_ANGLE


_OF_THE_PAIR = (Link.OBLIQUE, Link.AROUND, Link.SIDE_BY_SIDE)


def _joined(relations: Iterable[Relation], links: Collection[Link]) -> dict[str, str]:
    """Letters with one that stands for all that these links join it with, directly or through others."""
    roots: dict[str, str] = {}
    for relation in relations:
        if relation.link in links:
            old, new = roots.get(relation.to, relation.to), roots.get(relation.letter, relation.letter)
            roots.setdefault(relation.letter, new)
            roots.setdefault(relation.to, old)
            roots.update({letter: new for letter, root in roots.items() if root == old})
    return roots


def agrees(relation: Relation, own: Placement, other: Placement) -> bool:
    """Whether two placements are as a relation says."""
    pairs = [(a, b) for a in own.directions for b in other.directions]
    match relation.link:
        case Link.SAME_DIRECTION:
            return all(_parallel(a, b) for a, b in pairs)
        case Link.RIGHT_ANGLE:
            return all(dot(a, b) == 0 for a, b in pairs)
        case Link.OBLIQUE:
            return not any(_parallel(a, b) for a, b in pairs)
        case Link.COAXIAL:
            return own.same_line(other)
        case Link.AROUND:
            return own.layout is not Layout.IN_LINE and _parallel(own.direction, other.direction)
        case Link.SIDE_BY_SIDE:
            return own.layout is Layout.PARALLEL


def _parallel(a: Vector, b: Vector) -> bool:
    return not any(cross(a, b))
