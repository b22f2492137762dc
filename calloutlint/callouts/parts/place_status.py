"""Second pass: MAX, MIN, REF and BSC, and the modifiers of a size."""

from lark import Token

from calloutlint.callouts.parts.drafts import SizeDraft
from calloutlint.callouts.parts.place_word import as_word
from calloutlint.callouts.parts.state import State
from calloutlint.callouts.symbols import SIZE_MODIFIERS
from calloutlint.model.size import Limits, SizeStatus

STATUSES = {
    "MAX": SizeStatus.MAXIMUM,
    "MIN": SizeStatus.MINIMUM,
    "REFERENCE": SizeStatus.REFERENCE,
    "BASIC": SizeStatus.BASIC,
}
EXTREMES = {SizeStatus.MAXIMUM, SizeStatus.MINIMUM}


def take_status(state: State, token: Token) -> None:
    """MAX, MIN, REF or BSC: of the size before it, else of the one after it."""
    status, size = STATUSES[token.type], state.size
    if state.dual_of is not None:
        state.dual_statuses.append(status)
        return
    taken = size is not None and size.status in EXTREMES and state.follows("size")
    if size is not None and state.after_size and not taken:
        set_status(state, status, size)
    elif state.follows("size"):
        state.status = status
    else:
        as_word(state, token)


def set_status(state: State, status: SizeStatus, size: SizeDraft) -> None:
    """Gives a size its status; a MAX and a MIN beside each other are the limits of one size."""
    size.status = status
    pair = [part for part in state.parts[-2:] if isinstance(part, SizeDraft)]
    if len(pair) < 2 or {part.status for part in pair} != EXTREMES:
        return
    upper, lower = sorted(pair, key=lambda part: part.status is SizeStatus.MINIMUM)
    if upper.nominal is None or lower.nominal is None or upper.tolerance or lower.tolerance:
        return
    whole = pair[0]
    whole.tolerance = Limits(upper.nominal, lower.nominal, named=True)
    whole.nominal, whole.status = None, SizeStatus.TOLERANCED
    state.parts.pop()
    state.size = whole


def take_size_modifier(state: State, token: Token) -> None:
    """⟨ST⟩, ⟨CF⟩, Ⓔ …: of the size before it."""
    if state.size is None:
        as_word(state, token)
    else:
        state.size.modifiers.append(SIZE_MODIFIERS[token])
