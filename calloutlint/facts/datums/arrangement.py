"""The ways in which the datum features of a frame may stand together, and what each reference takes.

Text says little of directions. The usual arrangement is the mutually perpendicular one that a reader would
draw from the callouts; a claim about a drawing is made only if it holds in every arrangement that agrees
with what the callouts say.

Source: ASME Y14.5 (datum precedence, constraint of degrees of freedom), ISO 5459 (datum systems).
"""

from collections.abc import Iterator, Sequence
from dataclasses import dataclass
from functools import lru_cache
from itertools import product

from calloutlint.facts.datums.kinds import DatumGeometry, DatumKind
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


@dataclass(frozen=True, slots=True)
class Taken:
    """What one reference does in an arrangement: `alone` if it stood first, `new` after those before it."""

    alone: tuple[Freedom, ...]
    new: tuple[Freedom, ...]


Arrangement = dict[str, Placement]


@lru_cache(maxsize=4096)
def usual(references: tuple[Reference, ...], relations: tuple[Relation, ...]) -> tuple[Taken, ...] | None:
    """What each reference takes in the usual arrangement; None where the callouts contradict each other.

    Each reference in turn stands at the first usual place where it takes away anything at all. Where some
    freedoms are named, the names settle which axis is which.
    """
    if any(reference.named for reference in references):
        return _as_named(references, relations)
    placed: Arrangement = {}
    before = Constraints()
    taken: list[Taken] = []
    for reference in references:
        choices = list(_extensions(placed, reference, relations))
        if not choices:
            return None
        placed = _first_that_holds(choices, reference, before)
        after = _after(before, reference, placed)
        taken.append(Taken(_after(Constraints(), reference, placed).held, after.held[before.rank :]))
        before = after
    return tuple(taken)


def _first_that_holds(choices: list[Arrangement], reference: Reference, before: Constraints) -> Arrangement:
    """The first choice that takes anything away.

    Of a common datum after others, the one that takes most; of a plane, one that stops a slide if any does.
    """
    news = [_after(before, reference, choice).held[before.rank :] for choice in choices]
    most = max(map(len, news))
    enough = most if before.rank and len(reference.members) > 1 else min(most, 1)
    good = [(choice, new) for choice, new in zip(choices, news, strict=True) if len(new) >= enough]
    if reference.members[0][1].kind is DatumKind.PLANE:
        good.sort(key=lambda each: all(freedom.turns for freedom in each[1]))
    return good[0][0]


def _as_named(references: tuple[Reference, ...], relations: tuple[Relation, ...]) -> tuple[Taken, ...] | None:
    """What each reference takes in the first arrangement in which all can hold what is named behind them."""
    for placed in arrangements(references, relations, turned=True):
        orders = range(len(references))
        if not any(out_of_reach(references[: order + 1], placed) for order in orders):
            befores = [constraints(references[:order], placed) for order in orders]
            return tuple(
                Taken(
                    _after(Constraints(), reference, placed).held,
                    _after(before, reference, placed).held[before.rank :],
                )
                for before, reference in zip(befores, references, strict=True)
            )
    return None


def out_of_reach(references: Sequence[Reference], placed: Arrangement) -> tuple[Freedom, ...]:
    """Names of the last reference that its datum does not hold, standing so behind those before it."""
    *earlier, last = references
    reach = constraints(earlier, placed).and_also(own(last, placed).rows)
    return tuple(name for name in last.named if not reach.forbids(name))


@lru_cache(maxsize=4096)
def takes_nothing(references: tuple[Reference, ...], relations: tuple[Relation, ...]) -> bool:
    """Whether the last reference takes no freedom away in any arrangement. False where there is none."""
    *earlier, last = references
    found = False
    for placed in arrangements(earlier, relations):
        before = constraints(earlier, placed)
        for whole in _extensions(placed, last, relations):
            found = True
            if before.rank == 6:
                break
            if _after(before, last, whole).rank > before.rank:
                return False
    return found


@lru_cache(maxsize=4096)
def holds_all(references: tuple[Reference, ...], relations: tuple[Relation, ...]) -> bool:
    """Whether all six freedoms are gone in every arrangement. False where there is no arrangement."""
    found = False
    for placed in arrangements(references, relations):
        found = True
        if constraints(references, placed).rank < 6:
            return False
    return found


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
        for wider in _extensions(placed, rest[0], relations, turned=turned):
            yield from extend(wider, rest[1:])

    return extend({}, references)


def constraints(references: Sequence[Reference], placed: Arrangement) -> Constraints:
    """All that the references hold together."""
    held = Constraints()
    for reference in references:
        held = _after(held, reference, placed)
    return held


def _after(before: Constraints, reference: Reference, placed: Arrangement) -> Constraints:
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


def _extensions(
    placed: Arrangement, reference: Reference, relations: tuple[Relation, ...], *, turned: bool = False
) -> Iterator[Arrangement]:
    """The arrangements with one reference more, the most usual first."""
    new = [(letter, geometry) for letter, geometry in reference.members if letter not in placed]
    options = [list(_options(letter, geometry, relations)) for letter, geometry in new]
    if not placed and not turned:
        options[0] = [place for place in options[0] if place.direction == Z and not any(place.point)]
    for choice in product(*options):
        wider = placed | {letter: place for (letter, _), place in zip(new, choice, strict=True)}
        if _agrees(wider, relations) and _together(reference, wider, relations):
            yield wider


def _options(letter: str, geometry: DatumGeometry, relations: tuple[Relation, ...]) -> Iterator[Placement]:
    oblique = any(r.link is Link.OBLIQUE and letter in (r.letter, r.to) for r in relations)
    return placements(geometry, oblique=oblique)


def _agrees(placed: Arrangement, relations: tuple[Relation, ...]) -> bool:
    return all(
        agrees(relation, placed[relation.letter], placed[relation.to])
        for relation in relations
        if relation.letter in placed and relation.to in placed
    )


def _together(reference: Reference, placed: Arrangement, relations: tuple[Relation, ...]) -> bool:
    """Whether the members of a common datum stand as such members do: of one kind, in one direction."""
    members = [placed[letter] for letter, _ in reference.members]
    told = {frozenset((relation.letter, relation.to)) for relation in relations}
    letters = frozenset(letter for letter, _ in reference.members)
    if len(members) < 2 or any(pair <= letters for pair in told):
        return True
    alike = {member.geometry.kind for member in members}
    return len(alike) > 1 or DatumKind.POINT in alike or len({member.direction for member in members}) == 1
