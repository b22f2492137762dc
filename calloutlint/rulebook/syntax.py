"""Reads the text of a condition or a correction into a syntax tree."""

from collections.abc import Iterable, Iterator
from functools import cache
from typing import Literal

from lark import Lark, Token, Tree
from lark.exceptions import UnexpectedInput, UnexpectedToken

from calloutlint._grammar import load_grammar
from calloutlint.rulebook.text_error import TextError

Syntax = Tree[Token] | Token
Start = Literal["either", "changes"]

_EXPECTED = {
    "PATH": "a name",
    "NUMBER": "a number",
    "MEASURE": "a length or an angle",
    "QUOTED": "a text in quotes",
    "ORDER": "an operator",
    "EQUALITY": "an operator",
    "SCALE": "an operator",
    "LSQB": "'['",
    "RSQB": "']'",
    "LPAR": "'('",
    "RPAR": "')'",
    "COMMA": "','",
    "COLON": "':'",
    "$END": "the end",
}
_UNSAID = {"MEASURE", "SIGN", "QUANTIFIER", "COUNT_OF", "COUNT_EACH", "KNOWN", "UNKNOWN", "LPAR", "LSQB"}


@cache
def _parser() -> Lark:
    return load_grammar(("condition",), ("either", "changes"), maybe_placeholders=False)


def parse(text: str, start: Start = "either") -> Tree[Token]:
    """The syntax tree of a condition or value (`either`), or of the corrections of a redline (`changes`).

    Raises:
        TextError: the text is not in the language; the message says what was expected.
    """
    try:
        return _parser().parse(text, start=start)
    except UnexpectedInput as error:
        raise _unexpected(error, text, start) from None


def _unexpected(error: UnexpectedInput, text: str, start: Start) -> TextError:
    if isinstance(error, UnexpectedToken) and error.token.type == "$END":
        problem = f"the text ends too early: expected {_listed(error.accepts)}"
        return TextError(problem, len(text), len(text))
    place = error.pos_in_stream or 0
    if isinstance(error, UnexpectedToken):
        wrong, expected = str(error.token), error.accepts
    else:
        wrong, expected = text[place], _accepted_after(text[:place], start)
    if wrong in {"'", '"'}:
        return TextError("this quotation mark has no partner", place, place + 1)
    return TextError(f"'{wrong}' cannot stand here: expected {_listed(expected)}", place, place + len(wrong))


def _accepted_after(text: str, start: Start) -> set[str]:
    """The terminals that may follow a text which is right so far."""
    parser = _parser().parse_interactive(text, start=start)
    parser.exhaust_lexer()
    accepted: set[str] = parser.accepts()  # type: ignore[no-untyped-call]  # lark leaves it untyped
    return accepted


def _listed(terminals: Iterable[str] | None) -> str:
    names = {_EXPECTED.get(name, f"'{name.lower()}'") for name in terminals or () if name not in _UNSAID}
    *others, last = sorted(names) or ["a condition"]
    return f"{', '.join(others)} or {last}" if others else last


def tokens(syntax: Syntax) -> Iterator[Token]:
    """Every token of a tree, in reading order."""
    if isinstance(syntax, Token):
        yield syntax
        return
    for child in syntax.children:
        yield from tokens(child)


def place(syntax: Syntax) -> tuple[int, int]:
    """Where a tree stands in its text: offset of its first character and of the one after its last."""
    found = list(tokens(syntax))
    return (found[0].start_pos or 0, found[-1].end_pos or 0) if found else (0, 0)


def phrase(syntax: Syntax) -> str:
    """The word or words of a tree as one word of the trade, quotes taken off."""
    return " ".join(tokens(syntax)).strip("\"'")
