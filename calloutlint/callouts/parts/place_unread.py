"""Second pass: text that cannot be read, and what should stand there."""

import re

from lark import Token, Tree

from calloutlint.callouts.expected import BY_PLACE
from calloutlint.callouts.parts.drafts import SizeDraft
from calloutlint.callouts.parts.line import tokens
from calloutlint.callouts.parts.state import State
from calloutlint.callouts.words import mistyped_number
from calloutlint.model.callout import Unread

_TOLERANCE = re.compile(r"[±+-]\s*\.?\d").match


def take_spoken(state: State, token: Token) -> None:
    """A geometric tolerance in words that do not say enough for a frame: `CONCENTRIC TO A WITHIN .003`."""
    state.end_words()
    state.unread(token, BY_PLACE["frame in words"])


def take_lost(state: State, tree: Tree[Token]) -> None:
    """A word that the grammar could not take. What a bar parts from no frame follows a wrong characteristic."""
    token, last = tokens(tree)[0], tokens(tree)[-1]
    span = state.line.span(token, last)
    text = state.line.written(span)
    if text[:1] != "|":
        state.end_words()
        meant = mistyped_number(state.line.written(state.line.span(token)))
        state.unread_span(span, _expected(state, token, text), meant)
        return
    wrong = state.words.pop() if state.words else None
    state.end_words()
    if wrong is not None:
        state.unread(wrong, BY_PLACE["characteristic"], in_frame=True)
    if isinstance(state.last, Unread):
        state.add_words(text, span)
    else:
        state.unread(token, BY_PLACE["characteristic"], in_frame=True)


def _expected(state: State, token: Token, text: str) -> tuple[str, ...]:
    if token.type == "MISTYPED":
        return BY_PLACE["digits"]
    by_grammar = state.line.expected.get(token.start_pos or 0)
    return tolerance_expected(state, text) or by_grammar or BY_PLACE["word"]


def tolerance_expected(state: State, text: str) -> tuple[str, ...] | None:
    """What a tolerance is missing where none can stand: a size, or a size that has none yet."""
    if not _TOLERANCE(text):
        return None
    size = state.last
    return BY_PLACE["second"] if isinstance(size, SizeDraft) and size.tolerance else BY_PLACE["size"]
