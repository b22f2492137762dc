"""Second pass: which part a count speaks for."""

from lark import Token

from calloutlint.callouts.parts.drafts import FrameDraft, SizeDraft, ThreadDraft
from calloutlint.callouts.parts.read_count import read_count
from calloutlint.callouts.parts.state import HOLES, Hole, State
from calloutlint.model.size import Count, SizeForm
from calloutlint.units import MM_PER_INCH

_MOST_IN_PARENTHESES = 100


def take_count(state: State, token: Token) -> None:
    """A count in words may follow its size; `4X` waits for what it stands before, the nearest of two taken."""
    count = read_count(token, state.line)
    owner = _uncounted(state)
    if count.in_words and owner is not None:
        owner.count = count
    else:
        if state.count is not None:
            state.parts.insert(state.count_at, state.count)
        state.count, state.count_at = count, len(state.parts)


def as_count(state: State) -> None:
    """Takes a small whole number in parentheses behind a hole for its count: `⌀.281 THRU (4)`.

    A number that is the size before it in the other unit is no count.
    """
    number, before = state.last, state.parts[-2] if len(state.parts) > state.first + 1 else None
    if not (isinstance(number, SizeDraft) and number.bare and isinstance(before, SizeDraft | ThreadDraft)):
        return
    text = number.nominal.text if number.nominal else ""
    if before.count is not None or not text.isdecimal() or not 0 < int(text) < _MOST_IN_PARENTHESES:
        return
    if isinstance(before, ThreadDraft) or _is_other_number(before, int(text)):
        state.parts.pop()
        before.count = Count(int(text), f"({text})", number.span)
        state.size = None


def _is_other_number(size: SizeDraft, number: int) -> bool:
    """Whether a number behind a diameter is not the diameter in the other unit."""
    nominal = size.nominal.amount if size.nominal else 0
    converted = ((nominal, number), (number, nominal))
    dual = any(abs(inches * MM_PER_INCH - mm) <= 1 for inches, mm in converted)
    return size.form is SizeForm.DIAMETER and not dual


def end_count(state: State) -> None:
    """At the end of a line gives the count that still waits to what stood before it, else to nothing."""
    count = state.count
    if count is None:
        return
    owner = _uncounted(state) or state.last
    if isinstance(owner, (*HOLES, FrameDraft)) and owner.count is None:
        owner.count = count
    else:
        state.parts.insert(state.count_at, count)


def _uncounted(state: State) -> Hole | None:
    here = state.parts[state.first :]
    return next((part for part in here if isinstance(part, HOLES) and part.count is None), None)
