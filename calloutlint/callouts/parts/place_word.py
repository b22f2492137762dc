"""Second pass: plain words, and known words that have nothing to act on."""

from lark import Token

from calloutlint.callouts.expected import BY_PLACE
from calloutlint.callouts.note import read_note
from calloutlint.callouts.parts.place_unread import tolerance_expected
from calloutlint.callouts.parts.state import State
from calloutlint.callouts.symbols import SIZE_MODIFIERS
from calloutlint.callouts.words import is_characteristic, slip_of
from calloutlint.model.callout import FastenerNote, TargetKind, Words
from calloutlint.model.size import SizeModifier

_TARGET_KINDS = {"LINE": TargetKind.LINE, "AREA": TargetKind.AREA, "POINT": TargetKind.POINT}
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
        state.unread(token, tolerance_expected(state, token) or BY_PLACE["number"])


def take_by(state: State, token: Token) -> None:
    """X between two numbers; in a hole step and a target it is understood."""
    if state.step is None and state.target is None:
        state.parts.append(Words("X", (), state.line.span(token)))


def take_plain(state: State, token: Token) -> None:
    """Words with numbers in them that are no sizes: `ON ⌀3.000 BC`, `SEE NOTE 3`."""
    state.words.append(token)


def take_fastener(state: State, token: Token) -> None:
    """A fastener named in the callout, `FOR .250-20 UNC SCREW`."""
    span = state.line.span(token)
    fastener, hold = read_note(state.line.written(span))
    state.parts.append(FastenerNote(fastener, hold, span))
