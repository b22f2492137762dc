"""What is wrong in a rule sheet's text, and the caret that shows where."""

from collections.abc import Iterable
from difflib import get_close_matches


class TextError(Exception):
    """A text of a rule sheet is wrong from `start` to `end`. Its message is one sentence without a place."""

    def __init__(self, message: str, start: int, end: int) -> None:
        super().__init__(message)
        self.start = start
        self.end = end

    def moved(self, offset: int) -> "TextError":
        """The same mistake in a text that has `offset` more characters before it."""
        return TextError(str(self), self.start + offset, self.end + offset)

    def shown_in(self, text: str) -> str:
        """The message, the line it stands on, and carets under the place."""
        opening = text.rfind("\n", 0, self.start) + 1
        line = text[opening:].partition("\n")[0]
        width = min(self.end - self.start, len(line) - (self.start - opening))
        caret = " " * (self.start - opening) + "^" * max(1, width)
        return f"{self}\n    {line}\n    {caret}"


def nearest(word: str, known: Iterable[str]) -> str:
    """A hint with the nearest known name, or with the first few where none is near; to end a sentence with."""
    names = list(known)
    close = get_close_matches(word, names, n=1, cutoff=0.6)
    if close:
        return f"; the nearest is '{close[0]}'"
    if not names:
        return ""
    shown = ", ".join(names[:12]) + (", …" if len(names) > 12 else "")
    return f"; known are: {shown}"
