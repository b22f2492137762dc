"""The table of spellings on the terminal: the one that the reader itself uses."""

from collections.abc import Iterator, Sequence
from itertools import groupby

from rich.cells import cell_len, set_cell_size
from rich.text import Text

from calloutlint.callouts.table import SPELLINGS, Spelling
from calloutlint.callouts.write import Style
from calloutlint.report.screen import Screen
from calloutlint.report.styles import ROLES


def show_symbols(screen: Screen) -> None:
    """Print every spelling that is read, by group: the symbol, its ASCII form, its name, what else is read."""
    widths = [
        max(map(cell_len, column)) for column in zip(*(_forms(row, screen) for row in SPELLINGS), strict=True)
    ]
    indent = 2 + sum(width + 2 for width in widths)
    for group, rows in groupby(SPELLINGS, key=lambda spelling: spelling.group):
        screen.line(f"{group}s".capitalize(), ROLES.heading)
        for row in rows:
            forms = "  ".join(
                set_cell_size(form, width) for form, width in zip(_forms(row, screen), widths, strict=True)
            )
            screen.line(Text.assemble("  ", (forms, ROLES.rule), "  ", screen.spell(row.name)))
            others = [_shown(text, screen) for text in row.spellings]
            for line in _lines(others, screen.width - indent):
                screen.line(Text(" " * indent + line, ROLES.quiet))
        screen.line()


def _forms(spelling: Spelling, screen: Screen) -> list[str]:
    return [spelling.ascii] if screen.glyphs.spelling is Style.ASCII else [spelling.symbol, spelling.ascii]


def _shown(text: str, screen: Screen) -> str:
    """A spelling as the screen can show it: in ASCII, other characters by their code."""
    if screen.glyphs.spelling is Style.ASCII and not text.isascii():
        return " ".join(f"U+{ord(character):04X}" if ord(character) > 127 else character for character in text)
    return text


def _lines(items: Sequence[str], width: int) -> Iterator[str]:
    """The items after one another, no line wider than `width` unless one item is."""
    line = ""
    for item in items:
        if line and cell_len(line) + 3 + cell_len(item) > width:
            yield line
            line = ""
        line += ("   " if line else "") + item
    if line:
        yield line
