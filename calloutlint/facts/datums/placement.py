"""Where a datum feature may stand, and the constraints it sets from there.

A datum is made of elements (planes, lines, points), each invariant under some motions and forbidding the
others: a plane forbids one translation and two rotations, a line two and two, a point three translations.
A pattern or a common datum forbids whatever any of its elements forbids.

Source: ISO 5459 (invariance classes and situation features), ASME Y14.5 (constraint of degrees of freedom).
"""

from collections.abc import Iterator
from dataclasses import dataclass
from enum import Enum

from calloutlint.facts.datums.kinds import DatumGeometry, DatumKind
from calloutlint.facts.datums.motion import (
    ORIGIN,
    Row,
    Vector,
    X,
    Y,
    Z,
    across,
    cross,
    fixed_rotation,
    fixed_translation,
)

OBLIQUE: tuple[Vector, ...] = ((0, 3, 4), (3, 0, 4))
_ASIDE: tuple[Vector, ...] = ((5, 0, 0), (0, 0, 5), (2, 3, 7), (4, 6, 14))
_CONTACTS = ((3, 2), (9, 2), (4, 7))
_SPREAD: tuple[Vector, ...] = ((0, 0, 0), (9, 1, 4), (1, 8, 3))


class Layout(Enum):
    """How the members of a pattern stand to each other."""

    PARALLEL = "side by side"
    RADIAL = "around one point"
    IN_LINE = "in line"


@dataclass(frozen=True, slots=True)
class Placement:
    """A datum feature at a place: `direction` is a plane's normal, a line's direction; `point` lies on it."""

    geometry: DatumGeometry
    direction: Vector
    point: Vector
    layout: Layout = Layout.PARALLEL

    def constraints(self) -> tuple[Row, ...]:
        """All that the datum forbids when nothing stands before it."""
        kind = self.geometry.kind
        if kind is DatumKind.PATTERN:
            return self._pattern()
        if self.geometry.contacts is not None and kind is DatumKind.PLANE:
            return tuple(self._contacts(self.geometry.contacts))
        return _element(kind, self.direction, self.point)

    @property
    def directions(self) -> tuple[Vector, ...]:
        """The directions of the members: those around one point lie across the direction of the whole."""
        return across(self.direction) if self.layout is Layout.RADIAL else (self.direction,)

    def same_line(self, other: "Placement") -> bool:
        """Whether two axes coincide."""
        between = tuple(a - b for a, b in zip(self.point, other.point, strict=True))
        apart = cross((between[0], between[1], between[2]), self.direction)
        return not any(apart) and not any(cross(self.direction, other.direction))

    def _pattern(self) -> tuple[Row, ...]:
        member = self.geometry.member or DatumKind.AXIS
        if self.layout is Layout.RADIAL:
            directions = across(self.direction)
            return tuple(row for d in directions for row in _element(member, d, self.point))
        if self.layout is Layout.IN_LINE and member is not DatumKind.POINT:
            return _element(member, self.direction, self.point)
        several = 2 if self.layout is Layout.IN_LINE else self.geometry.count
        places = [_moved(self.point, offset) for offset in _SPREAD[:several]]
        return tuple(row for place in places for row in _element(member, self.direction, place))

    def _contacts(self, number: int) -> Iterator[Row]:
        """A plane touched at points: each forbids the motion of that point along the normal."""
        sides = across(self.direction)
        for contact in _CONTACTS[:number]:
            offset = tuple(contact[0] * a + contact[1] * b for a, b in zip(*sides, strict=True))
            yield fixed_translation(self.direction, _moved(self.point, (offset[0], offset[1], offset[2])))


def _element(kind: DatumKind, direction: Vector, at: Vector) -> tuple[Row, ...]:
    if kind is DatumKind.POINT:
        return point(at)
    if kind is DatumKind.CONE:
        return (*line(direction, at), *point(at))
    return line(direction, at) if kind is DatumKind.AXIS else plane(direction, at)


def plane(normal: Vector, at: Vector) -> tuple[Row, ...]:
    """What a plane forbids: to leave it, and to tilt about two directions in it."""
    return (fixed_translation(normal, at), *map(fixed_rotation, across(normal)))


def line(direction: Vector, at: Vector) -> tuple[Row, ...]:
    """What an axis forbids: to move sideways in two directions, and to tilt about two."""
    sides = across(direction)
    return (*(fixed_translation(side, at) for side in sides), *map(fixed_rotation, sides))


def point(at: Vector) -> tuple[Row, ...]:
    """What a point forbids: to move it, in three directions."""
    return tuple(fixed_translation(axis, at) for axis in (X, Y, Z))


def placements(geometry: DatumGeometry, *, oblique: bool = False) -> Iterator[Placement]:
    """Every place worth trying for a datum feature, the most usual first.

    Directions follow the axes of the mutually perpendicular frame, one more in between where an angle is
    called out; positions run through the origin, beside it, and anywhere.
    """
    kind = geometry.kind
    usual = (Y, Z, X) if kind is DatumKind.CENTRE_PLANE else (Z, Y, X)
    directions = (*usual, *OBLIQUE) if oblique else usual
    if kind is DatumKind.POINT:
        yield from (Placement(geometry, Z, at) for at in (ORIGIN, (0, 0, 5), *_ASIDE))
    elif kind is DatumKind.PATTERN:
        yield from (
            Placement(geometry, direction, at, layout)
            for layout in _layouts(geometry)
            for direction in directions
            for at in (_beside(direction) if layout is Layout.IN_LINE else (ORIGIN,))
        )
    elif kind in (DatumKind.PLANE, DatumKind.CENTRE_PLANE):
        yield from (Placement(geometry, direction, ORIGIN) for direction in directions)
    else:
        yield from (Placement(geometry, direction, at) for direction in directions for at in _beside(direction))


def _layouts(geometry: DatumGeometry) -> tuple[Layout, ...]:
    """Layouts of a pattern, the most usual first: slots in number stand around a centre, holes side by side."""
    if geometry.member is DatumKind.CENTRE_PLANE and geometry.count > 2:
        return (Layout.RADIAL, Layout.PARALLEL, Layout.IN_LINE)
    return (Layout.PARALLEL, Layout.RADIAL, Layout.IN_LINE)


def _beside(direction: Vector) -> tuple[Vector, ...]:
    """The origin, and points off the line through it in this direction."""
    return (ORIGIN, *(at for at in _ASIDE if any(cross(at, direction))))


def _moved(place: Vector, by: Vector) -> Vector:
    return (place[0] + by[0], place[1] + by[1], place[2] + by[2])
