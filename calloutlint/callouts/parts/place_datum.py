"""Second pass: datum features, compartments without a frame, and datum targets."""

from lark import Token, Tree

from calloutlint.callouts.expected import BY_PLACE
from calloutlint.callouts.parts.drafts import FrameDraft, SizeDraft, TargetDraft
from calloutlint.callouts.parts.line import tokens
from calloutlint.callouts.parts.state import State
from calloutlint.model.callout import DatumFeature
from calloutlint.model.frame import (
    Characteristic,
    DatumLetter,
    DatumRef,
)

_FRAMES = {"frame", "segment"}
_FORM = {
    Characteristic.STRAIGHTNESS,
    Characteristic.FLATNESS,
    Characteristic.CIRCULARITY,
    Characteristic.CYLINDRICITY,
}
_REFERRING = {"TO", "FROM", "WITH", "OF", "BY", "ON", "IN", "AT", "WRT", "AND", "&", "OR", "ABOUT", "NORMAL"}
_NAMES_TARGET = {"▲", "DATUM", "MOVABLE", "TARGET", "TARGETS"}


def take_datum_feature(state: State, token: Token) -> None:
    """A datum feature symbol; in `PARALLEL TO DATUM A`, `VIEW [A]` it is only spoken of."""
    spoken_of = state.words and (token[0] == "[" or state.words[-1].upper() in _REFERRING)
    if token[0] in "▲[" and spoken_of:
        state.words.append(token)
        return
    state.end_words()
    state.parts.append(DatumFeature(token.strip("▲-[]| "), state.line.span(token)))


def take_boxed_letter(state: State, token: Token) -> None:
    """`[A]` at the end of a line: a datum feature, or the compartment that the frame before it still lacks."""
    frame = state.last
    if isinstance(state.previous, Tree) and state.previous.data in _FRAMES and isinstance(frame, FrameDraft):
        segment = frame.segments[-1]
        if not segment.datums and segment.characteristic not in _FORM:
            at = state.line.span(token)
            segment.datums.append(DatumRef((DatumLetter(token.strip("[] "), (), at),), (), (), at))
            return
    take_datum_feature(state, token)


def take_compartment(state: State, token: Token) -> None:
    """A datum compartment without a frame; in `SEE VIEW [A] AND [B]` it is plain words."""
    if state.words:
        state.words.append(token)
    else:
        state.unread(token, BY_PLACE["before"])


def take_numbered_datum(state: State, token: Token) -> None:
    """`DATUM 1`: a datum feature has a letter. In `SEE DATUM 1` it is plain words."""
    if state.words:
        state.words.append(token)
    else:
        state.unread(token, BY_PLACE["letter"])


def take_target(state: State, tree: Tree[Token]) -> None:
    """A datum target; in `SEE DETAIL A1` it is plain words. The size of its area may stand before it."""
    token = tokens(tree)[0]
    before = {word.upper() for word in state.words}
    if not before <= _NAMES_TARGET:
        state.words.append(token)
        return
    draft = TargetDraft(token[0], int(token[1:]), state.line.span(token), movable="MOVABLE" in before)
    state.words = []
    size = state.last
    if isinstance(size, SizeDraft) and size.bare and size.nominal is not None:
        draft.sizes.append(size.nominal)
        state.parts.pop()
    state.parts.append(draft)
    state.target = draft
