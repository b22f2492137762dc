"""One parsed line of a callout, and where its pieces stand in the source."""

import re
from collections.abc import Iterable
from dataclasses import dataclass, replace

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
    """Line `index` of a callout: its normalised text, its parse `items`, the unit its lengths are in."""

    index: int
    normal: Normal
    items: tuple[Node, ...]
    unit: Unit | None
    expected: tuple[tuple[int, tuple[str, ...]], ...] = ()

    def span(self, first: Node, last: Node | None = None) -> Span:
        """Where the pieces from `first` to `last` stand in the source."""
        start = first.start_pos if isinstance(first, Token) else _tokens(first)[0].start_pos
        ending = first if last is None else last
        end = ending.end_pos if isinstance(ending, Token) else _tokens(ending)[-1].end_pos
        return self.between(start or 0, end or 0)

    def between(self, start: int, end: int) -> Span:
        """The source span of the normalised columns `start` to `end`."""
        normal = self.normal
        if not normal.shifts:
            return Span(self.index, start, end)
        return Span(self.index, normal.start(start), normal.end(end))

    def written(self, span: Span) -> str:
        """The source text of a span, spaces folded."""
        return _SPACES.sub(" ", self.normal.source[span.start : span.end].strip())

    def in_other_unit(self) -> "Line":
        """The same line with lengths in the other unit, for a dual dimension."""
        return replace(self, unit=None if self.unit is None else _OTHER.get(self.unit))

    def value(self, text: str) -> Value:
        """The number `text` in the unit of the callout."""
        return parse_value(text, self.unit)


def _tokens(tree: Tree[Token]) -> list[Token]:
    return [child for child in tree.children if isinstance(child, Token)]


def joined(spans: Iterable[Span]) -> Span:
    """The span from the first of some spans of one line to the last."""
    every = tuple(spans)
    return Span(every[0].line, every[0].start, every[-1].end)
