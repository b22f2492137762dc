"""Second pass: threads, hole steps, and which hole a depth or THRU belongs to."""

import re

from lark import Token, Tree

from calloutlint.callouts.expected import BY_PLACE
from calloutlint.callouts.parts.drafts import DepthDraft, SizeDraft, StepDraft, ThreadDraft
from calloutlint.callouts.parts.line import tokens
from calloutlint.callouts.parts.place_word import as_word
from calloutlint.callouts.parts.read_thread import read_thread
from calloutlint.callouts.parts.state import HOLES, SPEAKS_OF_SIZE_BEFORE, State
from calloutlint.callouts.symbols import STEPS
from calloutlint.model.callout import Words
from calloutlint.model.hole import StepKind
from calloutlint.model.size import SizeForm, Through
from calloutlint.model.source import Span
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


def take_step(state: State, token: Token) -> None:
    """A counterbore, countersink, spotface, drill, ream or tap."""
    kind = STEPS[token.strip("‹›")]
    if (kind is StepKind.TAP and _is_plain_tap(state)) or _is_plain_word(state, kind):
        as_word(state, token)
        return
    state.end_words()
    last = state.last
    draft = StepDraft(kind, state.line.span(token), state.drill_size, drill=state.drill)
    if draft.size is not None:
        draft.size.form = SizeForm.DIAMETER
    state.drill = state.drill_size = None
    of_size_before = kind in SPEAKS_OF_SIZE_BEFORE
    if not of_size_before and isinstance(last, SizeDraft) and _stands_after_number(state):
        _claim(state, draft, last)
    state.parts.append(draft)
    state.give_count(draft)
    state.step = draft
    if of_size_before and isinstance(last, SizeDraft):
        last.form = SizeForm.DIAMETER if last.form is SizeForm.LINEAR else last.form
        state.step = None
    state.size = None


def _is_plain_tap(state: State) -> bool:
    """Whether TAP only repeats that a thread is cut, or says how: `.250-20 UNC-2B TAP`, `FORM TAP`."""
    if state.words:
        return state.words[-1].upper().endswith("FORM")
    return isinstance(state.last, ThreadDraft)


def _is_plain_word(state: State, kind: StepKind) -> bool:
    """Whether DRILL or REAM has nothing to drill: `DRILL JIG`, the first word of `DRILL AND REAM ⌀.250`."""
    before = state.parts[-1] if state.parts else None
    named = state.drill is not None or isinstance(before, SizeDraft | ThreadDraft)
    return kind in SPEAKS_OF_SIZE_BEFORE and state.follows("WORD") and not named


def _stands_after_number(state: State) -> bool:
    """Whether the word stands after its number: `.438 CBORE .25 DEEP`."""
    if not (isinstance(state.previous, Tree) and state.previous.data == "size"):
        return False
    return not state.follows("size") or state.follows("DEEP", 1)


def _claim(state: State, draft: StepDraft, last: SizeDraft) -> None:
    state.parts.pop()
    if last.count is not None:
        draft.count, last.count = last.count, None
    put_in_step(draft, last)
    if last.form is not SizeForm.ANGLE or len(state.parts) < state.first + 2 or state.follows("size"):
        return
    diameter, by = state.parts[-2:]
    if isinstance(by, Words) and by.text == "X" and isinstance(diameter, SizeDraft):
        state.parts.pop()
        _claim(state, draft, diameter)


def fits_step(step: StepDraft, draft: SizeDraft) -> bool:
    """Whether a step can take a size: a countersink one angle, every step one diameter."""
    if draft.form is SizeForm.ANGLE:
        return step.kind is StepKind.COUNTERSINK and step.angle is None
    return step.size is None and draft.form in {SizeForm.LINEAR, SizeForm.DIAMETER}


def put_in_step(step: StepDraft, draft: SizeDraft) -> None:
    """Gives a step its diameter or its angle."""
    if draft.form is SizeForm.ANGLE:
        step.angle = draft
    else:
        draft.form = SizeForm.DIAMETER
        step.size = draft
    start, end = min(step.span.start, draft.span.start), max(step.span.end, draft.span.end)
    step.span = Span(step.span.line, start, end)


def take_drill_name(state: State, token: Token) -> None:
    """`#7` or `F` before DRILL, `#7` after it."""
    name = re.sub(r"(?i)^no\.?\s*", "#", str(token)).replace(" ", "")
    if state.step is not None and state.step.kind is StepKind.DRILL and state.step.size is None:
        state.step.drill = name
    else:
        state.drill = name


def take_through(state: State, token: Token) -> None:
    """THRU."""
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
    after_size = isinstance(state.previous, Tree) and state.previous.data == "size"
    if after_size and (state.size is None or state.size.form is not SizeForm.DIAMETER):
        return
    take_depth(state, token)


def take_by(state: State, token: Token) -> None:
    """X between two numbers; in a hole step and a target it is understood."""
    if state.step is None and state.target is None:
        state.parts.append(Words("X", (), state.line.span(token)))


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
