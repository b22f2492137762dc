"""From a count to its number and its canonical spelling."""

import re

from lark import Token

from calloutlint.callouts.parts.line import Line
from calloutlint.model.size import Count

_COUNTED = re.compile(r"(\d+)").search
_WORDS = "ONE TWO THREE FOUR FIVE SIX SEVEN EIGHT NINE TEN ELEVEN TWELVE"
_NUMBER_WORDS = _WORDS.split()


def read_count(token: Token, line: Line) -> Count:
    """The count that a COUNT token states, in its canonical spelling."""
    text = str(token).upper()
    first = text.split()[0]
    counted = _COUNTED(text)
    number = int(counted[1]) if counted else None
    if number is None and first in _NUMBER_WORDS:
        number = _NUMBER_WORDS.index(first) + 1
    return Count(number, _canonical_count(text, number), line.span(token))


def _canonical_count(text: str, number: int | None) -> str:
    if number is None:
        return "TYP"
    if "‹TYP›" in text:
        return f"{number} TYP"
    if text.startswith("Q"):
        return f"QTY {number}"
    if text == f"({number})":
        return text
    noun = text.strip("()").split()[-1]
    if "‹PL›" in text:
        return f"{number} PL"
    if noun[-1] in "X×-":
        return f"{number}X"
    return f"{number} {noun}"
