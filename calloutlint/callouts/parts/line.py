"""One parsed line of a callout, and where its pieces stand in the source."""

import re
from collections.abc import Iterable, Mapping
from dataclasses import dataclass, field, replace

from lark import Token, Tree

from calloutlint.callouts.spelling import Normal
from calloutlint.callouts.value import parse_value
from calloutlint.model.source import Span
from calloutlint.model.values import Value
from calloutlint.units import Unit

_SPACES = re.compile(r"\s+")
_OTHER = {Unit.INCH: Unit.MM, Unit.MM: Unit.INCH}
Node = Token | Tree[Token]


@dataclass(frozen=True, slots=True)
class Line:
    """Line `index` of a callout: its normalised text, its parse `items`, the unit its lengths are in.

    `expected` says for the column of each word that was set aside what should have stood there.
    """

    index: int
    normal: Normal
    items: tuple[Node, ...]
    unit: Unit | None
    expected: Mapping[int, tuple[str, ...]] = field(default_factory=dict)

    def span(self, first: Token, last: Token | None = None) -> Span:
        """Where the pieces from `first` to `last` stand in the source."""
        start, end = first.start_pos or 0, (last or first).end_pos or 0
        normal = self.normal
        if not normal.shifts:
            return Span(self.index, start, end)
        return Span(self.index, normal.start(start), normal.end(end))

    def written(self, span: Span) -> str:
        """The source text of a span, spaces folded."""
        return _SPACES.sub(" ", self.normal.source[span.start : span.end].strip())

    def value(self, text: str) -> Value:
        """The number `text` in the unit of the callout."""
        return parse_value(str(text), self.unit)

    def in_unit(self, unit: Unit | None) -> "Line":
        """The same line with lengths in `unit`."""
        return self if unit is self.unit else replace(self, unit=unit)

    def in_other_unit(self) -> "Line":
        """The same line with lengths in the other unit, for a dual dimension."""
        return self.in_unit(None if self.unit is None else _OTHER.get(self.unit))


def tokens(tree: Tree[Token]) -> list[Token]:
    """The pieces of a node."""
    return [child for child in tree.children if isinstance(child, Token)]


def joined(spans: Iterable[Span]) -> Span:
    """The span from the first of some spans of one line to the last."""
    every = tuple(spans)
    return Span(every[0].line, every[0].start, every[-1].end)
