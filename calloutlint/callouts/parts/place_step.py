"""Second pass: counterbores, countersinks, drills and other hole steps, with their sizes."""

import re

from lark import Token, Tree

from calloutlint.callouts.parts.drafts import SizeDraft, StepDraft, ThreadDraft
from calloutlint.callouts.parts.place_word import as_word
from calloutlint.callouts.parts.state import SPEAKS_OF_SIZE_BEFORE, State
from calloutlint.callouts.symbols import STEPS
from calloutlint.model.callout import Words
from calloutlint.model.hole import StepKind
from calloutlint.model.size import SizeForm
from calloutlint.model.source import Span


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
    if not of_size_before and isinstance(last, SizeDraft) and _stands_after_number(state, kind):
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
    """Whether a step says no size and needs none.

    `DRILL JIG`, the first word of `DRILL AND REAM ⌀.250`, `COUNTERSINK TO CLEAN UP`.
    """
    if state.follows("WORD") and state.following_text.upper() == "TO" and "size" not in state.kinds[state.at :]:
        return True
    before = state.parts[-1] if state.parts else None
    named = state.drill is not None or isinstance(before, SizeDraft | ThreadDraft)
    return kind in SPEAKS_OF_SIZE_BEFORE and state.follows("WORD") and not named


def _stands_after_number(state: State, kind: StepKind) -> bool:
    """Whether the word stands after its number: `.438 CBORE .25 DEEP`, `82° CSK ⌀.50`."""
    if not (isinstance(state.previous, Tree) and state.previous.data == "size"):
        return False
    angle_first = kind is StepKind.COUNTERSINK and _is_angle(state.last)
    return angle_first or not state.follows("size") or state.follows("DEEP", 1)


def _is_angle(part: object) -> bool:
    return isinstance(part, SizeDraft) and part.form is SizeForm.ANGLE


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
    name = re.sub(r"(?i)^no\.?\s*", "#", token.strip("() ")).replace(" ", "")
    if state.step is not None and state.step.kind is StepKind.DRILL and state.step.size is None:
        state.step.drill = name
    else:
        state.drill = name
