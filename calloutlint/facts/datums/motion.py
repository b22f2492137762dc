"""Exact linear algebra of small motions: what a rigid part may still do, and what a constraint takes away.

A small motion is a twist (x, y, z, u, v, w): the translation of the origin along the three axes, then the
rotation about them, u about x, v about y, w about z. A constraint is a row of six whole numbers; it
forbids every twist whose product with the row is not zero.

Source: ASME Y14.5 and ISO 5459 for the six freedoms and their letters; the algebra is that of screws in
rigid body kinematics.
"""

from collections.abc import Iterable, Sequence
from dataclasses import dataclass
from enum import StrEnum
from math import gcd

Vector = tuple[int, int, int]
Row = tuple[int, ...]

X: Vector = (1, 0, 0)
Y: Vector = (0, 1, 0)
Z: Vector = (0, 0, 1)
ORIGIN: Vector = (0, 0, 0)


class Freedom(StrEnum):
    """A degree of freedom: translation along x, y, z; rotation u about x, v about y, w about z."""

    X = "x"
    Y = "y"
    Z = "z"
    U = "u"
    V = "v"
    W = "w"

    @property
    def turns(self) -> bool:
        """Whether it is a rotation."""
        return self in (Freedom.U, Freedom.V, Freedom.W)

    @property
    def row(self) -> Row:
        """The constraint that forbids exactly this freedom."""
        return tuple(int(other is self) for other in FREEDOMS)


FREEDOMS = tuple(Freedom)


def cross(a: Vector, b: Vector) -> Vector:
    """The cross product."""
    return (a[1] * b[2] - a[2] * b[1], a[2] * b[0] - a[0] * b[2], a[0] * b[1] - a[1] * b[0])


def dot(a: Sequence[int], b: Sequence[int]) -> int:
    """The scalar product."""
    return sum(p * q for p, q in zip(a, b, strict=True))


def across(direction: Vector) -> tuple[Vector, Vector]:
    """Two independent directions at right angles to a direction, in the order of the axes they follow."""
    first, second = (axis for axis in (X, Y, Z) if axis != _nearest_axis(direction))
    square = dot(direction, direction)
    return _flattened(first, direction, square), _flattened(second, direction, square)


def fixed_translation(along: Vector, point: Vector) -> Row:
    """The constraint that the material at a point does not move along a direction."""
    return (*along, *cross(point, along))


def fixed_rotation(about: Vector) -> Row:
    """The constraint that the part does not turn about a direction."""
    return (0, 0, 0, *about)


@dataclass(frozen=True, slots=True)
class Constraints:
    """Independent constraints in echelon form: no row has an entry in the leading column of one before it."""

    rows: tuple[Row, ...] = ()

    @property
    def rank(self) -> int:
        """How many degrees of freedom are held, 0 to 6."""
        return len(self.rows)

    @property
    def held(self) -> tuple[Freedom, ...]:
        """A freedom for each constraint: the first one of x y z u v w that it takes away."""
        return tuple(FREEDOMS[lead(row)] for row in self.rows)

    def and_also(self, rows: Iterable[Row]) -> "Constraints":
        """These constraints with others; what depends on those before adds nothing."""
        kept = list(self.rows)
        for row in rows:
            rest = _reduced(row, kept)
            if any(rest):
                kept.append(rest)
        return Constraints(tuple(kept))

    def forbids(self, freedom: Freedom) -> bool:
        """Whether this freedom alone follows from the constraints."""
        return not any(_reduced(freedom.row, self.rows))

    def orientation(self) -> "Constraints":
        """What they say of rotations alone: how they would hold a part that may slide anywhere."""
        ordered = Constraints().and_also(sorted(self.rows, key=lead))
        return Constraints(tuple(row for row in ordered.rows if lead(row) >= 3))


def lead(row: Row) -> int:
    """The column of the first entry that is not zero."""
    return next(column for column, entry in enumerate(row) if entry)


def _reduced(row: Row, basis: Sequence[Row]) -> Row:
    """The row with the leading columns of all rows of the basis cleared, in lowest terms."""
    for other in sorted(basis, key=lead):
        column = lead(other)
        if row[column]:
            row = tuple(other[column] * a - row[column] * b for a, b in zip(row, other, strict=True))
    divisor = gcd(*row)
    return tuple(entry // divisor for entry in row) if divisor > 1 else row


def _nearest_axis(direction: Vector) -> Vector:
    """The axis along which a direction reaches farthest; z where several do."""
    return max((Z, Y, X), key=lambda axis: abs(dot(direction, axis)))


def _flattened(axis: Vector, direction: Vector, square: int) -> Vector:
    """An axis without its part along a direction, scaled to whole numbers."""
    along = dot(axis, direction)
    x, y, z = (square * a - along * d for a, d in zip(axis, direction, strict=True))
    return (x, y, z)
