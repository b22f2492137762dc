"""The table of spellings on the terminal: the one that the reader itself uses."""

from itertools import groupby

from rich.cells import cell_len, set_cell_size
from rich.text import Text

from calloutlint.callouts.spelling import SPELLINGS, Spelling
from calloutlint.report.screen import Screen
from calloutlint.report.styles import ROLES


def show_symbols(screen: Screen) -> None:
    """Print every spelling that is read, by group: the symbol, its ASCII form, its name, what else is read."""
    symbol, plain, name = (max(map(cell_len, column)) for column in zip(*map(_columns, SPELLINGS), strict=True))
    for group, rows in groupby(SPELLINGS, key=lambda spelling: spelling.group):
        screen.line(f"{group}s".capitalize(), ROLES.heading)
        for row in rows:
            texts = _columns(row)
            head = Text.assemble(
                (set_cell_size(screen.spell(texts[0]), symbol), ROLES.rule),
                "  ",
                (set_cell_size(texts[1], plain), ""),
                "  ",
                set_cell_size(screen.spell(texts[2]), name),
                "  ",
            )
            others = [screen.spell(text) for text in row.spellings]
            screen.paragraph("   ".join(dict.fromkeys(others)), ROLES.quiet, indent=2, head=head)
        screen.line()


def _columns(spelling: Spelling) -> tuple[str, str, str]:
    return spelling.symbol, spelling.ascii, spelling.name
