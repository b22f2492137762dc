"""Second pass: frames, and what applies to them."""

import re
from dataclasses import replace

from lark import Token, Tree

from calloutlint.callouts.expected import BY_PLACE
from calloutlint.callouts.parts.drafts import FrameDraft
from calloutlint.callouts.parts.line import tokens
from calloutlint.callouts.parts.read_frame import FrameRead, read_frame
from calloutlint.callouts.parts.state import State
from calloutlint.callouts.words import slip_of
from calloutlint.model.frame import (
    Modifier,
    ModifierUse,
    Scope,
    ScopeKind,
)
from calloutlint.model.source import Span


def take_frame(state: State, tree: Tree[Token]) -> None:
    """A frame, or the first line of a composite one."""
    read = read_frame(tokens(tree), state.line)
    draft = FrameDraft(read.segments, state.scope)
    state.scope = None
    state.parts.append(draft)
    state.give_count(draft)
    _end_frame(state, read)


def take_segment(state: State, tree: Tree[Token]) -> None:
    """A lower line of a composite frame."""
    above = state.last_of(FrameDraft)
    if isinstance(above, FrameDraft):
        read = read_frame(tokens(tree), state.line, above.segments[-1].characteristic)
        above.segments += read.segments
        _end_frame(state, read)


def _end_frame(state: State, read: FrameRead) -> None:
    for token, place in read.unread:
        state.unread(token, BY_PLACE[place], in_frame=True)
    for token in read.scopes:
        take_scope(state, token)
    for token in read.words:
        if _is_wrong(token, read):
            state.unread(token, BY_PLACE["frame"], in_frame=True)
            read.segments[-1].doubtful = True
        else:
            state.words.append(token)


def _is_wrong(token: Token, read: FrameRead) -> bool:
    """Whether a word after a frame is no plain word: too short, a slip, or datum letters run together."""
    if (len(token) < 3 and token != "LE") or slip_of(token) is not None:
        return True
    run_together = len(token) == 3 and token.isupper() and list(token) == sorted(set(token))
    return run_together and not read.segments[-1].datums


def take_projected_height(state: State, token: Token) -> None:
    """The height of a projected zone in a box under its frame, as editions before 1994 draw it."""
    frame = state.last_of(FrameDraft)
    zone = frame.segments[0].zone if isinstance(frame, FrameDraft) else None
    if not isinstance(frame, FrameDraft) or zone is None:
        state.unread(token, BY_PLACE["frame"])
        return
    height = state.line.value(token.replace("Ⓟ", "").replace("‹MIN›", "").strip())
    use = ModifierUse(Modifier.PROJECTED, height, state.line.span(token))
    others = tuple(other for other in zone.modifiers if other.kind is not Modifier.PROJECTED)
    frame.segments[0].zone = replace(zone, modifiers=(*others, use))


def take_scope(state: State, token: Token) -> None:
    """ALL AROUND, between …: of the frame before it that has none, else of the next one."""
    scope = _scope(token, state.line.span(token))
    frame = state.last_of(FrameDraft)
    if isinstance(frame, FrameDraft) and frame.scope is None:
        frame.scope = scope
    else:
        state.end_scope()
        state.scope, state.scope_text = scope, state.line.written(scope.span)


def _scope(token: Token, span: Span) -> Scope:
    if token == "⌮":
        return Scope(ScopeKind.ALL_AROUND, span=span)
    if token == "‹ALL OVER›":
        return Scope(ScopeKind.ALL_OVER, span=span)
    start, end = re.findall(r"(?<![A-Za-z])[A-Z](?![A-Za-z])", token)
    from_to = "→" in token or token.upper().startswith("FROM")
    return Scope(ScopeKind.FROM_TO if from_to else ScopeKind.BETWEEN, start, end, span)
