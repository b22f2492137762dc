"""A grid of terminal cells to draw on, so that wide characters and overlaid lines keep their columns."""

from itertools import groupby

from rich.cells import cell_len
from rich.text import Text


class Canvas:
    """Rows of styled cells that grow as they are drawn on; columns and rows count from 0."""

    def __init__(self) -> None:
        self._rows: list[list[tuple[str, str]]] = []

    @property
    def height(self) -> int:
        """Rows drawn so far."""
        return len(self._rows)

    def put(self, column: int, row: int, text: str, style: str = "") -> None:
        """Write `text` over whatever stands there, one cell for each column it takes."""
        self._rows.extend([] for _ in range(row + 1 - self.height))
        cells = self._rows[row]
        for character in text:
            width = cell_len(character)
            cells.extend((" ", "") for _ in range(column + width - len(cells)))
            if width == 0:
                _join(cells, column, character)
                continue
            cells[column] = (character, style)
            cells[column + 1 : column + width] = [("", style)] * (width - 1)
            column += width

    def stamp(self, column: int, row: int, drawing: "Canvas") -> None:
        """Copy another drawing with its top left cell at `column` and `row`."""
        for down, cells in enumerate(drawing._rows):
            for across, (characters, style) in enumerate(cells):
                self.put(column + across, row + down, characters, style)

    def lines(self, indent: int = 0) -> list[Text]:
        """The rows as text without trailing spaces, moved right by `indent`."""
        return [_line(row, indent) for row in self._rows]


def _join(cells: list[tuple[str, str]], column: int, mark: str) -> None:
    if 0 < column <= len(cells):
        base, style = cells[column - 1]
        cells[column - 1] = (base + mark, style)


def _line(row: list[tuple[str, str]], indent: int) -> Text:
    line = Text(" " * indent)
    for style, cells in groupby(row, key=lambda cell: cell[1]):
        line.append("".join(characters for characters, _ in cells), style or None)
    line.rstrip()
    return line
