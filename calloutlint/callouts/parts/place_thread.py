"""Second pass: threads, and what is said of the thread before."""

import re

from lark import Token, Tree

from calloutlint.callouts.expected import BY_PLACE
from calloutlint.callouts.parts.drafts import SizeDraft, StepDraft, ThreadDraft
from calloutlint.callouts.parts.line import tokens
from calloutlint.callouts.parts.place_word import as_word
from calloutlint.callouts.parts.read_thread import read_thread
from calloutlint.callouts.parts.state import State
from calloutlint.model.callout import Words
from calloutlint.model.hole import StepKind
from calloutlint.model.size import SizeForm
from calloutlint.model.thread import ThreadSystem


def take_thread(state: State, tree: Tree[Token]) -> None:
    """A thread; TAP before it is a plain word."""
    draft = read_thread(tree, state.line)
    tap = state.parts[-1] if state.parts else None
    if isinstance(tap, StepDraft) and tap.kind is StepKind.TAP and not tap.size and not tap.extent:
        state.parts.pop()
        state.add_words("TAP", tap.span)
        state.step = None
    state.parts.append(draft)
    state.give_count(draft)
    _part_from_length(state, draft)
    last = tokens(tree)[-1]
    if last.type == "UNREAD":
        state.unread(last, BY_PLACE["series"])


def _part_from_length(state: State, thread: ThreadDraft) -> None:
    """In `M6 X 20` the second number is no pitch but a length."""
    length, diameter = thread.pitch, thread.diameter
    if thread.system is ThreadSystem.METRIC and length and diameter and length.amount >= diameter.amount:
        thread.pitch = None
        state.parts += [Words("X", (), thread.span), SizeDraft(SizeForm.LINEAR, length, thread.span)]


def take_left_hand(state: State, token: Token) -> None:
    """LH: of the thread before it."""
    thread = state.last_of(ThreadDraft)
    if isinstance(thread, ThreadDraft):
        thread.left_hand = True
    else:
        as_word(state, token)


def take_starts(state: State, token: Token) -> None:
    """`2 START`, `DOUBLE THREAD`: of the thread before it."""
    thread = state.last_of(ThreadDraft)
    if not isinstance(thread, ThreadDraft):
        as_word(state, token)
        return
    number = re.search(r"\d+", token)
    thread.starts = int(number[0]) if number else 3 if "TRIPLE" in token.upper() else 2
