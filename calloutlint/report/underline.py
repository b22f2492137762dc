"""A line of a callout with heavy lines under its marked columns, wrapped where it is too long."""

from collections.abc import Sequence
from dataclasses import dataclass, replace

from rich.cells import cell_len
from rich.text import Text

from calloutlint.report.canvas import Canvas
from calloutlint.report.styles import Glyphs
from calloutlint.report.wrap import breaks


@dataclass(frozen=True, slots=True)
class Underline:
    """Characters `start` to `end` of a line are marked, with the letters of the marks."""

    start: int
    end: int
    letters: str
    style: str


def underlined(text: str, marks: Sequence[Underline], glyphs: Glyphs, width: int) -> list[Text]:
    """`text` on lines of at most `width` columns, each followed by the marks under it."""
    canvas = Canvas()
    seen = [_seen(mark, len(text)) for mark in marks if text]
    for start, end in breaks(text, width):
        here = [mark for mark in seen if mark.start < end and mark.end > start]
        _draw(canvas, text, start, end, here, glyphs)
    return canvas.lines()


def _seen(mark: Underline, length: int) -> Underline:
    """The mark inside the line and at least one character long, even if it stands at its end."""
    start = max(0, min(mark.start, length - 1))
    return replace(mark, start=start, end=max(mark.end, start + 1))


def _draw(canvas: Canvas, text: str, start: int, end: int, marks: Sequence[Underline], glyphs: Glyphs) -> None:
    row = canvas.height
    canvas.put(0, row, text[start:end])
    taken: list[int] = []
    for mark in sorted(marks, key=lambda mark: (mark.start, mark.end)):
        first, last = max(mark.start, start), min(mark.end, end)
        column, length = cell_len(text[start:first]), cell_len(text[first:last])
        canvas.put(column, row, text[first:last], mark.style)
        letters = mark.letters if mark.start >= start else ""
        level = next((n for n, used in enumerate(taken) if used < column), len(taken))
        taken[level : level + 1] = [column + max(length, len(letters))]
        canvas.put(column, row + 1 + level, letters.center(length, glyphs.edges[2]), mark.style)
