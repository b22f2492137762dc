"""Where a callout stands in its file."""

from dataclasses import dataclass


@dataclass(frozen=True, slots=True)
class Span:
    """Columns `start` to `end` (end excluded) of line `line` of a callout, all counted from 0.

    Columns refer to the callout's own text on that line, as `SourceLine.text` holds it. A part that runs
    over several lines has the span of its first line.
    """

    line: int
    start: int
    end: int


NOWHERE = Span(0, 0, 0)


@dataclass(frozen=True, slots=True)
class SourceLine:
    """One line of a callout in its file: `number` from 1, `column` of the first character from 0."""

    number: int
    column: int
    text: str
