"""Draws a callout as the standards do: text above, feature control frames in boxes, datum symbols below."""

from collections.abc import Mapping, Sequence
from itertools import groupby

from rich.text import Text

from calloutlint.report.canvas import Canvas
from calloutlint.report.grid import Cell, GridRow, draw_grid, grid_width, tear
from calloutlint.report.layout import DatumRow, FrameRow, Row
from calloutlint.report.marks import Mark, Place
from calloutlint.report.styles import Glyphs
from calloutlint.report.underline import Underline, underlined

Marked = Mapping[Place, Sequence[Mark]]

_CONTINUED = 4


def draw(rows: Sequence[Row], marked: Marked, glyphs: Glyphs, width: int) -> list[Text]:
    """The rows of a callout as lines of at most `width` terminal columns, marked places in place."""
    lines: list[Text] = []
    for kind, group in groupby(enumerate(rows), key=lambda item: type(item[1])):
        numbered = list(group)
        if kind is FrameRow:
            lines += _draw_frames(numbered, marked, glyphs, width)
        elif kind is DatumRow:
            lines += [
                line
                for number, row in numbered
                for line in _draw_datums(number, row, marked, glyphs, bool(lines))
            ]
        else:
            lines += [
                line for number, row in numbered for line in _draw_text(number, row, marked, glyphs, width)
            ]
    return lines


def _draw_text(number: int, row: Row, marked: Marked, glyphs: Glyphs, width: int) -> list[Text]:
    text, underlines = "", []
    for index, piece in enumerate(row.pieces):
        text += " " if text else ""
        for place, marks in marked.items():
            if place.row == number and place.piece in (index, None):
                first, last = place.columns or (0, len(piece.text))
                letters, style = _joined(marks), marks[0].style
                underlines.append(Underline(len(text) + first, len(text) + last, letters, style))
        text += piece.text
    return underlined(text, underlines, glyphs, width)


def _draw_frames(numbered: Sequence[tuple[int, Row]], marked: Marked, glyphs: Glyphs, width: int) -> list[Text]:
    rows = [_grid_row(number, row, marked, glyphs) for number, row in numbered if isinstance(row, FrameRow)]
    if grid_width(rows) <= width:
        return draw_grid(rows, glyphs).lines()
    lines = []
    for row in rows:
        for part in tear(row, width - _CONTINUED):
            lines += draw_grid([part], glyphs).lines(_CONTINUED if part.torn[0] else 0)
    return lines


def _grid_row(number: int, row: FrameRow, marked: Marked, glyphs: Glyphs) -> GridRow:
    cells = tuple(_cell(piece.text, _marks(marked, number, index)) for index, piece in enumerate(row.pieces))
    marks = _marks(marked, number, None)
    beside = [(row.beside, "")] if row.beside else []
    beside += [(f"{glyphs.pointer} {_joined(marks)}", marks[0].style)] if marks else []
    return GridRow(cells, row.lower, tuple(beside))


def _marks(marked: Marked, row: int, piece: int | None) -> list[Mark]:
    return [
        mark for place, marks in marked.items() if (place.row, place.piece) == (row, piece) for mark in marks
    ]


def _cell(text: str, marks: Sequence[Mark]) -> Cell:
    return Cell(text, bool(marks), _joined(marks), marks[0].style if marks else "")


def _joined(marks: Sequence[Mark]) -> str:
    return "".join(dict.fromkeys(mark.letter for mark in marks))


def _draw_datums(number: int, row: Row, marked: Marked, glyphs: Glyphs, attached: bool) -> list[Text]:
    """Datum feature symbols: a triangle on what stands above, and the letter in a box."""
    canvas, column = Canvas(), 0
    for index, piece in enumerate(row.pieces):
        cell = _cell(piece.text, _marks(marked, number, index))
        box = draw_grid([GridRow((cell,))], glyphs)
        middle = column + 1 + cell.width // 2
        top = 1 if attached else 0
        canvas.stamp(column, top, box)
        if attached:
            canvas.put(middle, 0, glyphs.triangle)
            canvas.put(middle, 1, glyphs.junction(True, False, 1, 1))
        column += cell.width + 3
    return canvas.lines()
