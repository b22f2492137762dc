"""Feature control frames in box characters: compartments in rows, a composite's symbol across its rows."""

from collections.abc import Sequence
from dataclasses import dataclass, replace

from rich.cells import cell_len

from calloutlint.report.canvas import Canvas
from calloutlint.report.styles import Glyphs
from calloutlint.report.wrap import breaks

_LIGHT, _HEAVY = 1, 2


@dataclass(frozen=True, slots=True)
class Cell:
    """A compartment. A marked one has a heavy lower edge with the letters of its marks on it."""

    text: str
    marked: bool = False
    letters: str = ""
    style: str = ""

    @property
    def width(self) -> int:
        """Terminal columns between the sides."""
        return max(cell_len(self.text), len(self.letters)) + 2


@dataclass(frozen=True, slots=True)
class GridRow:
    """One line of a frame. `lower` shares the symbol of the row above; `beside` is text to its right.

    `torn` says of the left and the right side whether the line goes on there, in another grid.
    """

    cells: tuple[Cell, ...]
    lower: bool = False
    beside: tuple[tuple[str, str], ...] = ()
    torn: tuple[bool, bool] = (False, False)

    @property
    def beside_width(self) -> int:
        """Terminal columns that the text to its right takes, with the spaces before it."""
        return sum(1 + cell_len(text) for text, _ in self.beside)


def draw_grid(rows: Sequence[GridRow], glyphs: Glyphs) -> Canvas:
    """The rows under each other as one drawing, compartments of a column equally wide."""
    rows = _symbols_apart(rows)
    edges = _columns(rows)
    canvas = Canvas()
    for number in range(len(rows) + 1):
        above = rows[number - 1] if number else None
        below = rows[number] if number < len(rows) else None
        _draw_edge(canvas, 2 * number, above, below, edges, glyphs)
        if below:
            _draw_row(canvas, 2 * number + 1, below, edges, glyphs)
    _draw_symbols(canvas, rows, edges)
    return canvas


def tear(row: GridRow, width: int) -> list[GridRow]:
    """The row in as many lines as it needs to stay within `width` columns, torn where it goes on."""
    symbol, *others = row.cells
    cells = [replace(symbol, text="" if row.lower else symbol.text), *others]
    width -= row.beside_width
    cells = [part for cell in cells for part in _split(cell, max(width - 4, 1))]
    lines: list[list[Cell]] = [[]]
    for cell in cells:
        if lines[-1] and _width([*lines[-1], cell]) > width:
            lines.append([])
        lines[-1].append(cell)
    last = len(lines) - 1
    return [
        GridRow(tuple(line), False, row.beside if number == last else (), (number > 0, number < last))
        for number, line in enumerate(lines)
    ]


def grid_width(rows: Sequence[GridRow]) -> int:
    """Terminal columns that the rows take together, text beside them included."""
    edges = _columns(rows)
    return max(edges[len(row.cells)] + 1 + row.beside_width for row in rows)


def _width(cells: Sequence[Cell]) -> int:
    return 1 + sum(cell.width + 1 for cell in cells)


def _split(cell: Cell, width: int) -> list[Cell]:
    """A compartment too wide for any line, cut into several; letters stay on the first."""
    if cell.width <= width + 2:
        return [cell]
    texts = [cell.text[start:end] for start, end in breaks(cell.text, width)]
    return [
        replace(cell, text=text, letters="" if number else cell.letters) for number, text in enumerate(texts)
    ]


def _columns(rows: Sequence[GridRow]) -> list[int]:
    """The column of each side, from the left."""
    edges = [0]
    for index in range(max(len(row.cells) for row in rows)):
        edges.append(edges[-1] + 1 + max(row.cells[index].width for row in rows if index < len(row.cells)))
    return edges


def _symbols_apart(rows: Sequence[GridRow]) -> list[GridRow]:
    """A composite's mark on its symbol moves to its last row, where the symbol's compartment ends."""
    moved = list(rows)
    for number in range(1, len(moved)):
        if moved[number].lower:
            above, here = moved[number - 1], moved[number]
            moved[number] = replace(here, cells=(replace(above.cells[0], text=""), *here.cells[1:]))
            moved[number - 1] = replace(
                above, cells=(replace(above.cells[0], marked=False, letters=""), *above.cells[1:])
            )
    return moved


def _draw_edge(
    canvas: Canvas, line: int, above: GridRow | None, below: GridRow | None, edges: list[int], glyphs: Glyphs
) -> None:
    upper, lower = (row.cells if row else () for row in (above, below))
    sides = max(len(upper), len(lower))
    weights = [0, *(_weight(upper, below, index) for index in range(sides)), 0]
    for index in range(sides):
        cell = upper[index] if index < len(upper) and upper[index].marked else Cell("")
        span = edges[index + 1] - edges[index] - 1
        text = cell.letters.center(span, glyphs.edges[weights[index + 1]])
        canvas.put(edges[index] + 1, line, text, cell.style)
    for index in range(sides + 1):
        up, down = bool(upper) and index <= len(upper), bool(lower) and index <= len(lower)
        canvas.put(edges[index], line, glyphs.junction(up, down, weights[index], weights[index + 1]))


def _weight(upper: Sequence[Cell], below: GridRow | None, index: int) -> int:
    if below and below.lower and index == 0:
        return 0
    return _HEAVY if index < len(upper) and upper[index].marked else _LIGHT


def _draw_row(canvas: Canvas, line: int, row: GridRow, edges: list[int], glyphs: Glyphs) -> None:
    last = len(row.cells)
    for index in range(last + 1):
        torn = (index == 0 and row.torn[0]) or (index == last and row.torn[1])
        canvas.put(edges[index], line, glyphs.torn if torn else glyphs.side)
    for index, cell in enumerate(row.cells):
        canvas.put(_centred(cell.text, edges, index), line, cell.text, cell.style)
    column = edges[last] + 1
    for text, style in row.beside:
        canvas.put(column + 1, line, text, style)
        column += 1 + cell_len(text)


def _centred(text: str, edges: list[int], index: int) -> int:
    return edges[index] + 1 + (edges[index + 1] - edges[index] - 1 - cell_len(text)) // 2


def _draw_symbols(canvas: Canvas, rows: Sequence[GridRow], edges: list[int]) -> None:
    """Put a composite's symbol in the middle of its rows."""
    first = 0
    for number in range(1, len(rows) + 1):
        if number < len(rows) and rows[number].lower:
            continue
        symbol = rows[first].cells[0]
        if number - first > 1:
            column = _centred(symbol.text, edges, 0)
            canvas.put(column, 2 * first + 1, " " * cell_len(symbol.text))
            canvas.put(column, first + number, symbol.text, symbol.style)
        first = number
