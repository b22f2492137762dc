"""A condition after its kinds are checked, and the Python that it becomes.

Logic is Kleene's with None for unknown. A condition is written as two plain tests, `holds` (certainly true)
and `fails` (certainly false); where neither passes, it is unknown. So no third truth value is handed around,
and what runs is ordinary short-circuit Python.
"""

from collections.abc import Callable, Mapping, Sequence
from dataclasses import dataclass, field
from decimal import Decimal
from itertools import accumulate
from typing import Any

from calloutlint.rulebook.code import EXAMINED, Code, compile_code
from calloutlint.rulebook.kinds import COUNT, FLAG, Kind
from calloutlint.units import Unit

DEEPEST = 150  # CPython compiles up to 200 brackets within each other
OPPOSITE = {"<": ">=", "<=": ">", ">": "<=", ">=": "<", "==": "!=", "!=": "==", "in": "not in"}


@dataclass(slots=True)
class Writer:
    """Names for constants and for values met on the way, while a condition is written as Python."""

    constants: dict[str, Any] = field(default_factory=dict)
    named: int = 0

    def constant(self, value: Any) -> str:
        """The name under which the written code finds `value`."""
        name = f"k{len(self.constants)}"
        self.constants[name] = value
        return name

    def fresh(self) -> str:
        """A name not used before."""
        self.named += 1
        return f"v{self.named}"


class Term:
    """A part of a condition. `optional` says whether its value may be unknown."""

    kind: Kind
    optional: bool

    def value(self, writer: Writer) -> str:
        """Python for the value, None where it is unknown."""
        return f"(True if {self.holds(writer)} else False if {self.fails(writer)} else None)"

    def holds(self, writer: Writer) -> str:
        """Python that is true where this is certainly true."""
        return f"({self.value(writer)} is True)" if self.optional else self.value(writer)

    def fails(self, writer: Writer) -> str:
        """Python that is true where this is certainly false."""
        return f"({self.value(writer)} is False)" if self.optional else f"(not {self.value(writer)})"


def code_of(form: Callable[[Writer], str]) -> Code:
    """One of a term's three forms, ready to run.

    Raises:
        RecursionError: it is nested so deeply that Python might not compile it.
    """
    writer = Writer()
    expression = form(writer)
    steps = ({"(": 1, ")": -1}.get(character, 0) for character in expression)
    if max(accumulate(steps), default=0) > DEEPEST:
        raise RecursionError
    return compile_code(expression, writer.constants)


def _operands(writer: Writer, terms: Sequence[Term]) -> tuple[str, list[str]]:
    """A test that no value is unknown, empty where none can be, and the names of the values after it."""
    checks, names = [], []
    for term in terms:
        code = term.value(writer)
        if term.optional:
            name = writer.fresh()
            checks.append(f"({name} := {code}) is not None")
            code = name
        names.append(code)
    return " and ".join(checks), names


@dataclass(slots=True)
class Constant(Term):
    """A value that the sheet states."""

    constant: Any
    kind: Kind
    optional: bool = False

    def value(self, writer: Writer) -> str:
        return writer.constant(self.constant)


@dataclass(slots=True)
class Measure(Term):
    """A length with its unit, in the unit of the examined view; unknown where the drawing states none."""

    by_unit: Mapping[Unit, Decimal]
    kind: Kind
    optional: bool = True

    def value(self, writer: Writer) -> str:
        return f"{writer.constant(self.by_unit)}.get({EXAMINED}.unit)"


@dataclass(slots=True)
class Variable(Term):
    """The examined view, or what `any`, `every` or `count` goes through."""

    name: str
    kind: Kind
    optional: bool = False

    def value(self, writer: Writer) -> str:
        return self.name


@dataclass(slots=True)
class Fact(Term):
    """A fact of a view."""

    owner: Term
    name: str
    kind: Kind
    optional: bool

    def value(self, writer: Writer) -> str:
        test, (owner,) = _operands(writer, [self.owner])
        return f"({owner}.{self.name} if {test} else None)" if test else f"{owner}.{self.name}"


@dataclass(slots=True)
class EachFact(Term):
    """A fact of every view in a list, as a list; unknown where one of them is."""

    items: Term
    name: str
    kind: Kind
    optional: bool = True

    def value(self, writer: Writer) -> str:
        items, found = writer.fresh(), writer.fresh()
        each = f"({found} := tuple(each.{self.name} for each in {items}))"
        known = f"({items} := {self.items.value(writer)}) is not None and None not in {each}"
        return f"({found} if {known} else None)"


@dataclass(slots=True)
class Arithmetic(Term):
    """Two quantities added, subtracted, multiplied or divided; a division by zero is unknown."""

    operator: str
    left: Term
    right: Term
    kind: Kind
    optional: bool = field(init=False)

    def __post_init__(self) -> None:
        self.optional = self.left.optional or self.right.optional or self.operator == "/"

    def value(self, writer: Writer) -> str:
        test, (left, right) = _operands(writer, [self.left, self.right])
        code = f"divide({left}, {right})" if self.operator == "/" else f"({left} {self.operator} {right})"
        return f"({code} if {test} else None)" if test else code


@dataclass(slots=True)
class Comparison(Term):
    """Two values compared, or a value looked for in a list; `operator` is Python's."""

    operator: str
    left: Term
    right: Term
    kind: Kind = FLAG
    optional: bool = field(init=False)

    def __post_init__(self) -> None:
        self.optional = self.left.optional or self.right.optional

    def holds(self, writer: Writer) -> str:
        return self._written(writer, self.operator)

    def fails(self, writer: Writer) -> str:
        return self._written(writer, OPPOSITE[self.operator])

    def _written(self, writer: Writer, operator: str) -> str:
        test, (left, right) = _operands(writer, [self.left, self.right])
        code = f"{left} {operator} {right}"
        return f"({test} and {code})" if test else f"({code})"


@dataclass(slots=True)
class Negation(Term):
    """`not`."""

    inner: Term
    kind: Kind = FLAG
    optional: bool = field(init=False)

    def __post_init__(self) -> None:
        self.optional = self.inner.optional

    def holds(self, writer: Writer) -> str:
        return self.inner.fails(writer)

    def fails(self, writer: Writer) -> str:
        return self.inner.holds(writer)


@dataclass(slots=True)
class Junction(Term):
    """Several conditions joined by `and`, or by `or`."""

    word: str
    inner: Sequence[Term]
    kind: Kind = FLAG
    optional: bool = field(init=False)

    def __post_init__(self) -> None:
        self.optional = any(term.optional for term in self.inner)

    def holds(self, writer: Writer) -> str:
        return "(" + f" {self.word} ".join(term.holds(writer) for term in self.inner) + ")"

    def fails(self, writer: Writer) -> str:
        opposite = "or" if self.word == "and" else "and"
        return "(" + f" {opposite} ".join(term.fails(writer) for term in self.inner) + ")"


@dataclass(slots=True)
class Quantified(Term):
    """`any x of xs: …` and `every x of xs: …`."""

    every: bool
    variable: Variable
    items: Term
    condition: Term
    kind: Kind = FLAG
    optional: bool = field(init=False)

    def __post_init__(self) -> None:
        self.optional = self.items.optional or self.condition.optional

    def holds(self, writer: Writer) -> str:
        return self._written(writer, "all" if self.every else "any", self.condition.holds(writer))

    def fails(self, writer: Writer) -> str:
        return self._written(writer, "any" if self.every else "all", self.condition.fails(writer))

    def _written(self, writer: Writer, function: str, condition: str) -> str:
        items = writer.fresh()
        loop = f"{function}({condition} for {self.variable.name} in {items})"
        return f"(({items} := {self.items.value(writer)}) is not None and {loop})"


@dataclass(slots=True)
class CountOf(Term):
    """`count of xs`."""

    items: Term
    kind: Kind = COUNT
    optional: bool = field(init=False)

    def __post_init__(self) -> None:
        self.optional = self.items.optional

    def value(self, writer: Writer) -> str:
        test, (items,) = _operands(writer, [self.items])
        return f"(len({items}) if {test} else None)" if test else f"len({items})"


@dataclass(slots=True)
class CountWhere(Term):
    """`(count x of xs: …)`; unknown where the condition is unknown of one of them."""

    variable: Variable
    items: Term
    condition: Term
    kind: Kind = COUNT
    optional: bool = True

    def value(self, writer: Writer) -> str:
        items, name = writer.fresh(), self.variable.name
        holds, fails = self.condition.holds(writer), self.condition.fails(writer)
        known = f"all({holds} or {fails} for {name} in {items})"
        count = f"sum(1 for {name} in {items} if {holds})"
        return f"({count} if ({items} := {self.items.value(writer)}) is not None and {known} else None)"


@dataclass(slots=True)
class Known(Term):
    """`known x`; of a condition: that it is true or false."""

    inner: Term
    kind: Kind = FLAG
    optional: bool = False

    def value(self, writer: Writer) -> str:
        return f"({self.inner.value(writer)} is not None)"

    def fails(self, writer: Writer) -> str:
        return f"({self.inner.value(writer)} is None)"
