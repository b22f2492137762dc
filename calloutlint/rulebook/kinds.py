"""Kinds of value in a condition: what may be compared with what, and how messages name it."""

from collections.abc import Mapping
from dataclasses import dataclass
from decimal import Decimal
from enum import StrEnum
from functools import cache
from typing import Annotated, Any, NamedTuple, get_args, get_origin

from calloutlint.facts.view import View, facts_of


@dataclass(frozen=True, slots=True)
class Kind:
    """A kind of value; `name` is how messages call it, article included."""

    name: str


@dataclass(frozen=True, slots=True)
class Words(Kind):
    """One word of a known set; the set is the values of `enum`."""

    enum: type[StrEnum]

    @property
    def vocabulary(self) -> dict[str, StrEnum]:
        """The words, and what each stands for in the model."""
        return {word.value: word for word in self.enum}


@dataclass(frozen=True, slots=True)
class Thing(Kind):
    """Something that has facts of its own."""

    view: type[View]


@dataclass(frozen=True, slots=True)
class Listing(Kind):
    """A list of values of one kind."""

    item: Kind


class Member(NamedTuple):
    """A fact that may follow a thing after a dot; `optional` says whether it may be unknown."""

    name: str
    kind: Kind
    optional: bool
    doc: str


LENGTH = Kind("a length")
ANGLE = Kind("an angle")
NUMBER = Kind("a number")
COUNT = Kind("a count")
FLAG = Kind("a yes or no")
TEXT = Kind("a text")

QUANTITIES = {LENGTH, ANGLE, NUMBER, COUNT}
PLAIN_NUMBERS = {NUMBER, COUNT}

_SIMPLE: dict[Any, Kind] = {
    Annotated[Decimal, "length"]: LENGTH,
    Annotated[Decimal, "angle"]: ANGLE,
    Annotated[Decimal, "number"]: NUMBER,
    Decimal: NUMBER,
    int: COUNT,
    bool: FLAG,
    str: TEXT,
}


def kind_of(annotation: Any) -> Kind:
    """The kind that a fact's annotation stands for.

    Raises:
        TypeError: the annotation is none of those that facts may have.
    """
    if annotation in _SIMPLE:
        return _SIMPLE[annotation]
    if get_origin(annotation) is tuple:
        item = kind_of(get_args(annotation)[0])
        return Listing(f"a list ({item.name} each)", item)
    if isinstance(annotation, type) and issubclass(annotation, StrEnum):
        return Words("a word", annotation)
    if isinstance(annotation, type) and issubclass(annotation, View):
        return Thing(with_article(annotation.subject), annotation)
    raise TypeError(f"no kind of value for {annotation!r}")


def with_article(noun: str) -> str:
    """`a frame`, `an unread`."""
    return f"{'an' if noun[:1] in 'aeiou' else 'a'} {noun}"


@cache
def members(kind: Kind) -> Mapping[str, Member]:
    """The facts that may follow a value of this kind after a dot, by name."""
    if not isinstance(kind, Thing):
        return {}
    entries = facts_of(kind.view)  # type: ignore[arg-type]  # mypy takes View's own __hash__ for that of the class
    return {name: Member(name, kind_of(e.result), e.optional, e.doc) for name, e in entries.items()}


def single(kind: Kind) -> Kind:
    """The kind of one item of a list, or the kind itself."""
    return kind.item if isinstance(kind, Listing) else kind


def vocabulary(kind: Kind) -> Mapping[str, StrEnum]:
    """The words that a value of this kind may be; none where it is no word."""
    return kind.vocabulary if isinstance(kind, Words) else {}


def comparable(left: Kind, right: Kind) -> bool:
    """Whether two values can be equal or ordered."""
    return left == right or {left, right} <= PLAIN_NUMBERS
