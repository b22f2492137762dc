"""What a rule can ask: views over the model whose members are facts with a name, a type and a docstring.

A fact is a method of a `View` marked with `@fact`; it is computed at most once per view. Its return
annotation is its type in the condition language:

    Length, Angle, Number   exact decimals; a length is in the unit of the drawing that the view belongs to
    int, bool, str          a count, a flag, a text
    a StrEnum               one of a known set of words
    a View                  something that has facts of its own
    tuple[T, ...]           a list

`T | None` says that the fact may be unknown; a condition that meets None is unknown, and a rule whose
condition is unknown stays silent.
"""

import inspect
from collections.abc import Callable, Mapping
from dataclasses import dataclass
from decimal import Decimal
from functools import cache
from types import NoneType
from typing import Annotated, Any, ClassVar, Generic, Self, TypeVar, get_args, get_type_hints, overload

from calloutlint.model.callout import Callout
from calloutlint.model.drawing import Drawing
from calloutlint.model.source import Span
from calloutlint.units import Unit

Length = Annotated[Decimal, "length"]
Angle = Annotated[Decimal, "angle"]
Number = Annotated[Decimal, "number"]

T = TypeVar("T")


class kept(Generic[T]):  # noqa: N801 - used as a decorator only
    """A value that is computed at its first look-up, then kept on its object.

    Like `functools.cached_property`, without the lock that one takes at every first look-up until Python 3.12.
    """

    def __init__(self, compute: Callable[[Any], T]) -> None:
        self.compute = compute
        self.__doc__ = compute.__doc__

    def __set_name__(self, owner: type, name: str) -> None:
        self.name = name

    @overload
    def __get__(self, view: None, owner: type) -> Self: ...

    @overload
    def __get__(self, view: object, owner: type) -> T: ...

    def __get__(self, view: object | None, owner: type) -> Self | T:
        if view is None:
            return self
        value = view.__dict__[self.name] = self.compute(view)
        return value


class fact(kept[T]):  # noqa: N801 - used as a decorator only
    """Marks a method of a view as a fact, which rules can ask for by its name."""


@dataclass(frozen=True, slots=True)
class FactEntry:
    """What is known of a fact: `result` is its annotation without None, `optional` whether None may come."""

    name: str
    result: Any
    optional: bool
    doc: str


class View:
    """Base of everything a rule can ask.

    `subject` is its name in rule sheets; `part` the model object it speaks of, where a finding about it
    stands and what a redline changes; `unit` the unit that its lengths are in. `drawing_model` and
    `callout_model` are what it stands on, where it stands on one; rules leave alone what is `doubtful`
    because unread text stands beside it.
    """

    subject: ClassVar[str]
    unit: Unit | None
    part: Any = None
    drawing_model: Drawing | None = None
    callout_model: Callout | None = None
    doubtful: bool = False

    @property
    def span(self) -> Span | None:
        """Where the part stands in its callout."""
        return getattr(self.part, "span", None)


@cache
def facts_of(view: type[View]) -> Mapping[str, FactEntry]:
    """The facts of a view class by name, in the order they are written, inherited ones first."""
    found: dict[str, FactEntry] = {}
    for owner in reversed(view.__mro__):
        for name, member in vars(owner).items():
            if isinstance(member, fact):
                found[name] = _entry(name, member)
    return found


def _entry(name: str, member: fact[Any]) -> FactEntry:
    annotation = get_type_hints(member.compute, localns=_views_by_name(), include_extras=True)["return"]
    options = [option for option in get_args(annotation) if option is not NoneType]
    optional = NoneType in get_args(annotation)
    doc = inspect.getdoc(member.compute) or ""
    return FactEntry(name, options[0] if optional else annotation, optional, doc)


def _views_by_name() -> dict[str, type[View]]:
    """Every view class, so that views may name each other without importing each other."""
    found, waiting = {}, [View]
    while waiting:
        view = waiting.pop()
        found[view.__name__] = view
        waiting += view.__subclasses__()
    return found
