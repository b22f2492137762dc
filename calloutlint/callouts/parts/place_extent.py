"""Second pass: which hole, thread or step a depth or THRU belongs to."""

from lark import Token

from calloutlint.callouts.parts.drafts import DepthDraft, SizeDraft, StepDraft, ThreadDraft
from calloutlint.callouts.parts.place_word import as_word
from calloutlint.callouts.parts.state import HOLES, SPEAKS_OF_SIZE_BEFORE, State
from calloutlint.callouts.words import meanings_of
from calloutlint.model.callout import Meaning, Words
from calloutlint.model.size import SizeForm, Through


def take_through(state: State, token: Token) -> None:
    """THRU. In `SHAFT THROUGH COVER` it is a preposition."""
    if state.follows("WORD") and state.words and Meaning.SHAFT in meanings_of(state.words[-1]):
        state.words.append(token)
        return
    state.end_words()
    place_extent(state, Through(token.strip("‹›"), state.line.span(token)))


def take_depth(state: State, token: Token) -> None:
    """The depth symbol; its number follows. Without number and hole the word is only a word."""
    hole = any(isinstance(part, HOLES) for part in state.parts)
    if not hole and not state.follows("size") and token.type == "DEPTH":
        as_word(state, token)
        return
    state.end_words()
    state.depth = DepthDraft(state.line.span(token))


def take_deep(state: State, token: Token) -> None:
    """DEEP. After its number it was seen with the number; else the number follows or is missing."""
    before = state.kinds[max(state.at - 2, 0) : state.at]
    after_size = before[-1:] == ["size"] or before in (["size", "MIN"], ["size", "MAX"])
    if after_size and (state.size is None or state.size.form is not SizeForm.DIAMETER):
        return
    take_depth(state, token)


def place_depth(state: State, depth: DepthDraft) -> None:
    """Places a depth that stood before DEEP, as in `⌀.50 X .25 DEEP`."""
    last = state.parts[-1] if state.parts else None
    if isinstance(last, Words) and last.text == "X":
        state.parts.pop()
    place_extent(state, depth)


def place_extent(state: State, extent: Through | DepthDraft) -> None:
    """Gives THRU or a depth to the nearest hole, thread or step before it."""
    state.depth = None
    for at in reversed(range(len(state.parts))):
        part = state.parts[at]
        if not isinstance(part, HOLES) or _leaves_to_size_before(state, at):
            continue
        if part.extent is None:
            part.extent = extent
            return
        break
    if isinstance(extent, DepthDraft) and extent.size is not None:
        state.parts.append(extent.size)
        state.give_count(extent.size)
    state.add_words(extent.written if isinstance(extent, Through) else "DEEP", extent.span)


def _leaves_to_size_before(state: State, at: int) -> bool:
    """Whether part `at` is a DRILL or REAM that speaks of the size before it, which has no depth yet."""
    step, before = state.parts[at], state.parts[at - 1] if at else None
    if not isinstance(step, StepDraft) or step.size is not None or step.kind not in SPEAKS_OF_SIZE_BEFORE:
        return False
    return isinstance(before, SizeDraft | ThreadDraft) and before.extent is None
