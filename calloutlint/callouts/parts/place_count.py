"""Second pass: which part a count speaks for."""

from lark import Token

from calloutlint.callouts.parts.drafts import FrameDraft
from calloutlint.callouts.parts.place_word import as_word
from calloutlint.callouts.parts.read_size import read_count
from calloutlint.callouts.parts.state import HOLES, Hole, State


def take_count(state: State, token: Token) -> None:
    """A count in words may follow its size; `4X` waits for what it stands before."""
    count = read_count(token, state.line)
    owner = _uncounted(state)
    if count.in_words and owner is not None:
        owner.count = count
    elif state.count is None:
        state.count, state.count_at = count, len(state.parts)
    else:
        as_word(state, token)


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
