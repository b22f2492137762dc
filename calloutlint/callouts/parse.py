"""Reads the text of a callout. Whatever it says, parts come back, never an error."""

import re
from collections.abc import Collection, Mapping, Sequence
from functools import cache, lru_cache

from lark import Lark, Token, Tree, UnexpectedInput, UnexpectedToken

from calloutlint._grammar import load_grammar
from calloutlint.callouts.expected import expected_words
from calloutlint.callouts.note import find_note
from calloutlint.callouts.parts.assemble import assemble
from calloutlint.callouts.parts.line import Line, Node
from calloutlint.callouts.spelling import Normal, normalise
from calloutlint.callouts.symbols import ANY_CHARACTERISTIC
from calloutlint.model.callout import Part, Unread
from calloutlint.model.source import Span
from calloutlint.units import Unit

FRAGMENTS = ("terminals", "size", "thread", "frame", "datum")
LONGEST_LINE = 2000
_MOST_ERRORS = 12
_WORD = re.compile(r"[^\s|\[\]\uFFFD]+|[|\[\]]")
_LOWER = re.compile(
    r"\s*(?:\||S?⌀?\s*-?(?:\d+\.?\d*|\.\d+)\s*(?:\||(?:/[\d.×Xx]+|[ⓂⓁⓈⓅⓉⒻ]|\s+\.?\d*\.?\d+)*\s*(?:\||(?:\s[A-Z]{1,2}(?:-[A-Z])?\s*[ⓂⓁ]?)+\s*$)))"
).match
_OPENS_FRAME = re.compile(rf"\s*[|\[]?\s*[{ANY_CHARACTERISTIC}]").match


@cache
def grammar() -> Lark:
    """The parser of one normalised line."""
    return load_grammar(FRAGMENTS, ("line", "lower"), maybe_placeholders=False)


def parse_callout(lines: Sequence[str], unit: Unit | None, *, decimal_comma: bool = False) -> tuple[Part, ...]:
    """The parts of the callout that `lines` state; lengths are in `unit`, spans count from the first line.

    Text that cannot be read comes back as `Unread` parts.
    """
    return _parse(tuple(lines), unit, decimal_comma)


@lru_cache(maxsize=8192)
def _parse(lines: tuple[str, ...], unit: Unit | None, decimal_comma: bool) -> tuple[Part, ...]:
    parsed: list[Line] = []
    framed = False
    for index, text in enumerate(lines):
        if len(text) > LONGEST_LINE:
            return (_too_long(text, index),)
        normal = normalise(text, decimal_comma=decimal_comma)
        line = _parse_line(index, normal, unit, framed)
        framed = any(isinstance(item, Tree) and item.data in {"frame", "segment"} for item in line.items)
        parsed.append(line)
    return assemble(parsed)


def _too_long(text: str, index: int) -> Unread:
    expected = (f"a line of at most {LONGEST_LINE} characters, not {len(text)}",)
    return Unread(text[:60] + "…", expected, span=Span(index, 0, len(text)))


def _parse_line(index: int, normal: Normal, unit: Unit | None, framed: bool) -> Line:
    text = _without_note(normal.text)
    lower = framed and _LOWER(text) is not None and _OPENS_FRAME(text) is None
    items, expected = _items(text, "lower" if lower else "line")
    return Line(index, normal, items, unit, expected)


@lru_cache(maxsize=8192)
def _items(text: str, start: str) -> tuple[tuple[Node, ...], Mapping[int, tuple[str, ...]]]:
    """The parse of one line; on an error the whole word is set aside and the line parsed again.

    The second result says for the column of each word set aside what should have stood there.
    """
    expected: dict[int, tuple[str, ...]] = {}
    while len(expected) <= _MOST_ERRORS:
        try:
            tree = grammar().parse(text, start=start)
        except UnexpectedInput as error:
            begin, end = _word_at(text, error)
            expected[begin] = expected_words(_accepted(error))
            if len(expected) == _MOST_ERRORS:
                begin, end = 0, len(text)
            text = text[:begin] + "\ufffd" * (end - begin) + text[end:]
        else:
            return tuple(tree.children), expected
    return (Token("UNREAD", text, start_pos=0, end_pos=len(text)),), expected


def _without_note(text: str) -> str:
    """The text with a fastener named in it set aside: its numbers are not the callout's."""
    found = find_note(text)
    if found is None:
        return text
    begin, end = found
    return text[:begin] + "\ufffc" * (end - begin) + text[end:]


def _accepted(error: UnexpectedInput) -> Collection[str]:
    if isinstance(error, UnexpectedToken):
        return error.expected
    return getattr(error, "allowed", None) or ()


def _word_at(text: str, error: UnexpectedInput) -> tuple[int, int]:
    """The word at the error, or the last before it; a bar outside a frame takes the rest of the line along."""
    at_end = isinstance(error, UnexpectedToken) and error.token.type == "$END"
    at = len(text) if at_end else error.pos_in_stream or 0
    words = [match.span() for match in _WORD.finditer(text)]
    begin, end = next((span for span in words if span[1] > at), words[-1] if words else (0, len(text)))
    return (begin, len(text)) if text[begin] == "|" else (begin, end)
