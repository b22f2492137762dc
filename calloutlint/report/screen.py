"""Where results are written: a stream, its width, and whether it can show colours and drawing symbols."""

import os
from collections.abc import Iterable, Mapping
from contextlib import suppress
from typing import TextIO

from rich.cells import cell_len
from rich.text import Text

from calloutlint.report.printable import printable
from calloutlint.report.styles import ASCII, UNICODE
from calloutlint.report.wrap import wrap

NARROWEST = 40
NARROWEST_TEXT = 20
USUAL = 80

# Locale settings that an interpreter sets by itself in the C locale (PEP 538).
_COERCED = {"", "C.UTF-8", "C.utf8", "UTF-8"}


class Screen:
    """Prints lines of text as they are: nothing in them is taken for markup."""

    def __init__(self, stream: TextIO, *, plain: bool = False, width: int | None = None) -> None:
        """Write to `stream`, `width` columns wide (None: as wide as the terminal, else 80)."""
        plain = plain or not draws_symbols(stream.encoding, os.environ)
        self.glyphs = ASCII if plain else UNICODE
        self.width = max(width or terminal_width(os.environ), NARROWEST)
        self._stream = stream
        self._console = None
        if not plain and may_show_colours(stream, os.environ):
            from calloutlint.report.console import Console  # only colours need the rest of rich

            self._console = Console(stream, width)

    def spell(self, text: str) -> str:
        """`text` as this screen can show it."""
        return printable(text, self.glyphs.spelling)

    def line(self, line: Text | str = "", style: str = "") -> None:
        """Print one line, as wide as it is."""
        text = line if isinstance(line, Text) else Text(self.spell(line), style)
        if self._console is None:
            self._stream.write(f"{text.plain}\n")
        else:
            self._console.show(text)

    def lines(self, lines: Iterable[Text], indent: int = 0) -> None:
        """Print lines drawn elsewhere, moved right by `indent`."""
        for line in lines:
            self.line(Text(" " * indent).append_text(line))

    def paragraph(self, text: str, style: str = "", *, indent: int = 0, head: Text | None = None) -> None:
        """Print `text` wrapped, moved right by `indent`, its lines hanging from the end of `head`."""
        opening = Text(" " * indent).append_text(head or Text())
        hang = cell_len(opening.plain)
        if self.width - hang < NARROWEST_TEXT and text:
            opening.rstrip()
            self.line(opening)
            hang = min(indent + 3, self.width - NARROWEST_TEXT)
            opening = Text(" " * hang)
        for line in self.wrapped(text, hang) or [""]:
            self.line(opening.append(line, style or None))
            opening = Text(" " * hang)

    def wrapped(self, text: str, indent: int = 0) -> list[str]:
        """`text` as this screen can show it, in lines that fit it after `indent` columns."""
        paragraphs = [self.spell(line) for line in text.splitlines()]
        return wrap("\n".join(paragraphs), self.width - indent)

    def rule(self, style: str = "") -> None:
        """Print a line across the screen."""
        self.line(Text(self.glyphs.rule * self.width, style))


def terminal_width(environment: Mapping[str, str]) -> int:
    """The columns that COLUMNS states, else those of the terminal that the program runs in, else 80."""
    stated = environment.get("COLUMNS", "")
    if stated.isdecimal() and int(stated):
        return int(stated)
    for descriptor in range(3):
        with suppress(OSError):
            return os.get_terminal_size(descriptor).columns or USUAL
    return USUAL


def may_show_colours(stream: TextIO, environment: Mapping[str, str]) -> bool:
    """Whether a stream is a terminal, or the user says that it takes colours like one."""
    return stream.isatty() or "FORCE_COLOR" in environment or "TTY_COMPATIBLE" in environment


def draws_symbols(encoding: str | None, environment: Mapping[str, str]) -> bool:
    """Whether drawing symbols can be shown: by the encoding of a stream, and where the user set no C locale."""
    try:
        "⌖⏥Ⓜ┶━".encode(encoding or "utf-8")
    except (LookupError, UnicodeEncodeError):
        return False
    stated = environment.get("LC_ALL") or environment.get("LC_CTYPE", "")
    if stated in _COERCED and not environment.get("LC_ALL"):
        stated = environment.get("LANG", "")
    return stated not in {"C", "POSIX"}
