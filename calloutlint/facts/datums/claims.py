"""What each datum reference of a frame takes, in the usual arrangement and in every one.

Text says little of directions. The usual arrangement is the mutually perpendicular one that a reader would
draw from the callouts; what is said against a drawing has to hold in every arrangement that agrees with
its callouts. Those are tried up to four datum features; of more nothing is claimed.

Source: ASME Y14.5 (datum precedence, constraint of degrees of freedom), ISO 5459 (datum systems).
"""

from collections.abc import Sequence
from dataclasses import dataclass
from functools import lru_cache

from calloutlint.facts.datums.arrangement import (
    Arrangement,
    Reference,
    after,
    arrangements,
    constraints,
    extensions,
    own,
)
from calloutlint.facts.datums.kinds import DatumKind
from calloutlint.facts.datums.motion import Constraints, Freedom
from calloutlint.facts.datums.relations import Relation

MOST_FEATURES = 4


@dataclass(frozen=True, slots=True)
class Taken:
    """What one reference does in an arrangement: `alone` if it stood first, `new` after those before it."""

    alone: tuple[Freedom, ...]
    new: tuple[Freedom, ...]


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
        choices = list(extensions(placed, reference, relations))
        if not choices:
            return None
        placed = _first_that_holds(choices, reference, before)
        taken.append(_taken(before, reference, placed))
        before = after(before, reference, placed)
    return tuple(taken)


def _first_that_holds(choices: list[Arrangement], reference: Reference, before: Constraints) -> Arrangement:
    """The first choice that takes anything away.

    Of a common datum after others, the one that takes most; of a plane, one that stops a slide if any does.
    """
    news = [after(before, reference, choice).held[before.rank :] for choice in choices]
    most = max(map(len, news))
    enough = most if before.rank and len(reference.members) > 1 else min(most, 1)
    good = [(choice, new) for choice, new in zip(choices, news, strict=True) if len(new) >= enough]
    if reference.members[0][1].kind is DatumKind.PLANE:
        good.sort(key=lambda each: all(freedom.turns for freedom in each[1]))
    return good[0][0]


def _taken(before: Constraints, reference: Reference, placed: Arrangement) -> Taken:
    alone, together = after(Constraints(), reference, placed), after(before, reference, placed)
    return Taken(alone.held, together.held[before.rank :])


def _as_named(references: tuple[Reference, ...], relations: tuple[Relation, ...]) -> tuple[Taken, ...] | None:
    """What each reference takes in the first arrangement in which all can hold what is named behind them."""
    if too_many(references):
        return None
    for placed in arrangements(references, relations, turned=True):
        orders = range(len(references))
        if not any(out_of_reach(references[: order + 1], placed) for order in orders):
            return tuple(
                _taken(constraints(references[:order], placed), references[order], placed) for order in orders
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
    if too_many(references):
        return False
    *earlier, last = references
    found = False
    for placed in arrangements(earlier, relations):
        before = constraints(earlier, placed)
        for whole in extensions(placed, last, relations):
            found = True
            if before.rank == 6:
                break
            if after(before, last, whole).rank > before.rank:
                return False
    return found


@lru_cache(maxsize=4096)
def holds_all(references: tuple[Reference, ...], relations: tuple[Relation, ...]) -> bool:
    """Whether all six freedoms are gone in every arrangement. False where there is no arrangement."""
    if too_many(references):
        return False
    found = False
    for placed in arrangements(references, relations):
        found = True
        if constraints(references, placed).rank < 6:
            return False
    return found


def too_many(references: Sequence[Reference]) -> bool:
    """Whether the features of a frame stand in more ways than are tried."""
    return sum(len(reference.members) for reference in references) > MOST_FEATURES
