"""Second pass: plain words, slips of known spellings, and text that cannot be read."""

import re

from lark import Token, Tree

from calloutlint.callouts.expected import BY_PLACE
from calloutlint.callouts.note import read_note
from calloutlint.callouts.parts.drafts import SizeDraft
from calloutlint.callouts.parts.line import tokens
from calloutlint.callouts.parts.state import State
from calloutlint.callouts.symbols import SIZE_MODIFIERS
from calloutlint.callouts.words import is_characteristic, mistyped_number, slip_of
from calloutlint.model.callout import FastenerNote, TargetKind, Unread, Words
from calloutlint.model.size import SizeModifier

_TARGET_KINDS = {"LINE": TargetKind.LINE, "AREA": TargetKind.AREA, "POINT": TargetKind.POINT}
_TOLERANCE = re.compile(r"[±+-]\s*\.?\d").match
_SIZE_MODIFIERS = {
    **SIZE_MODIFIERS,
    "CF": SizeModifier.CONTINUOUS_FEATURE,
    "ST": SizeModifier.STATISTICAL,
}
_PUNCTUATION = set(",;.:/")


def take_word(state: State, token: Token) -> None:
    """A plain word, unless it belongs to a target or a size, or is a slip of a known spelling."""
    upper = token.upper()
    if state.target is not None and upper in _TARGET_KINDS:
        state.target.kind = _TARGET_KINDS[upper]
    elif state.target is not None and upper == "MOVABLE":
        state.target.movable = True
    elif token in _PUNCTUATION:
        state.end_words()
    elif token in _SIZE_MODIFIERS and state.size is not None:
        state.size.modifiers.append(_SIZE_MODIFIERS[token])
    elif upper == "PROFILE" and state.follows("size"):
        state.end_words()
        state.unread(token, BY_PLACE["characteristic"], in_frame=True)
    elif (near := slip_of(token)) is not None:
        state.end_words()
        state.unread(token, BY_PLACE["word"], near, in_frame=is_characteristic(near))
    else:
        state.words.append(token)


def as_word(state: State, token: Token) -> None:
    """A known word or symbol that has nothing to act on: plain words, if it is made of letters."""
    if state.line.written(state.line.span(token))[:1].isascii():
        state.words.append(token)
    else:
        state.end_words()
        state.unread(token, _tolerance_expected(state, token) or BY_PLACE["number"])


def take_by(state: State, token: Token) -> None:
    """X between two numbers; in a hole step and a target it is understood."""
    if state.step is None and state.target is None:
        state.parts.append(Words("X", (), state.line.span(token)))


def take_plain(state: State, token: Token) -> None:
    """Words with numbers in them that are no sizes: `ON ⌀3.000 BC`, `SEE NOTE 3`."""
    state.words.append(token)


def take_spoken(state: State, token: Token) -> None:
    """A geometric tolerance in words that do not say enough for a frame: `CONCENTRIC TO A WITHIN .003`."""
    state.end_words()
    state.unread(token, BY_PLACE["frame in words"])


def take_fastener(state: State, token: Token) -> None:
    """A fastener named in the callout, `FOR .250-20 UNC SCREW`."""
    span = state.line.span(token)
    fastener, hold = read_note(state.line.written(span))
    state.parts.append(FastenerNote(fastener, hold, span))


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
    return _tolerance_expected(state, text) or by_grammar or BY_PLACE["word"]


def _tolerance_expected(state: State, text: str) -> tuple[str, ...] | None:
    """What a tolerance is missing where none can stand: a size, or a size that has none yet."""
    if not _TOLERANCE(text):
        return None
    size = state.last
    return BY_PLACE["second"] if isinstance(size, SizeDraft) and size.tolerance else BY_PLACE["size"]
