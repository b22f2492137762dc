"""Second pass: where a size, its status and its brackets belong."""

from lark import Token, Tree

from calloutlint.callouts.expected import BY_PLACE
from calloutlint.callouts.parts.drafts import DepthDraft, SizeDraft, TargetDraft
from calloutlint.callouts.parts.line import joined, tokens
from calloutlint.callouts.parts.place_count import as_count
from calloutlint.callouts.parts.place_hole import fits_step, place_depth, place_extent, put_in_step
from calloutlint.callouts.parts.place_word import as_word
from calloutlint.callouts.parts.read_size import (
    add_tolerance,
    read_size,
    size_form,
    upper_and_lower,
)
from calloutlint.callouts.parts.state import State
from calloutlint.callouts.symbols import SIZE_MODIFIERS
from calloutlint.model.callout import Unread
from calloutlint.model.size import Limits, SizeForm, SizeStatus
from calloutlint.model.values import Value

_STATUSES = {
    "MAX": SizeStatus.MAXIMUM,
    "MIN": SizeStatus.MINIMUM,
    "REFERENCE": SizeStatus.REFERENCE,
    "BASIC": SizeStatus.BASIC,
}
_EXTREMES = {SizeStatus.MAXIMUM, SizeStatus.MINIMUM}


def take_size(state: State, tree: Tree[Token]) -> None:
    """Puts a size where it belongs: a dual, a target, a depth, a step, or the callout itself."""
    draft = read_size(tree, state.line.in_other_unit() if state.dual_of else state.line)
    if state.form is not None:
        draft.form, state.form = state.form, None
    if state.dual_of is not None:
        _take_dual(state.dual_of, draft)
        return
    if isinstance(state.last, Unread) and _is_nil_after(draft, state.last):
        state.unread_span(draft.span, state.last.expected)
        return
    state.size = draft
    if not _belongs_elsewhere(state, draft):
        _append(state, draft)
    if state.box is not None:
        draft.status = state.box
    if state.status is not None:
        status, state.status = state.status, None
        _set_status(state, status, draft)


def _is_nil_after(draft: SizeDraft, lost: Unread) -> bool:
    """Whether a bare 0 is the other deviation of one that could not be read: `⌀12,5 +0,1 0`."""
    nil = draft.bare and draft.nominal is not None and not draft.nominal.amount
    return nil and ("+" in lost.text or "-" in lost.text)


def _take_dual(size: SizeDraft, draft: SizeDraft) -> None:
    """The bracketed size in the other unit; a second number in the bracket is its other limit."""
    first = size.dual
    if first is None:
        draft.form = size.form if draft.form is SizeForm.LINEAR else draft.form
        size.dual = draft
    elif first.nominal is not None and draft.nominal is not None and first.plain:
        first.tolerance, first.nominal = Limits(first.nominal, draft.nominal), None


def _belongs_elsewhere(state: State, draft: SizeDraft) -> bool:
    """Whether a target, a depth or a hole step took the size."""
    if state.target is not None and draft.nominal is not None:
        state.target.sizes.append(draft.nominal)
    elif state.depth is not None and state.depth.size is None:
        state.depth.size, state.depth.span = draft, joined((state.depth.span, draft.span))
        place_extent(state, state.depth)
    elif state.drill is not None and state.box is SizeStatus.REFERENCE:
        state.drill_size = draft
    elif state.follows("DEEP") and _is_depth(state, draft):
        place_depth(state, DepthDraft(draft.span, draft))
    elif state.step is not None and fits_step(state.step, draft):
        put_in_step(state.step, draft)
    else:
        return False
    return True


def _is_depth(state: State, draft: SizeDraft) -> bool:
    """Whether a number before DEEP is the depth. In `.500 DIA .25 DEEP` the symbol is the other number's."""
    if draft.form is not SizeForm.DIAMETER:
        return True
    last = state.last
    if isinstance(last, SizeDraft) and last.form is SizeForm.LINEAR and last.extent is None:
        last.form, draft.form = SizeForm.DIAMETER, SizeForm.LINEAR
        return True
    return False


def _append(state: State, draft: SizeDraft) -> None:
    if _is_target_area(draft):
        state.target = TargetDraft(*_target_name(draft), draft.span)
        if draft.nominal is not None:
            state.target.sizes.append(draft.nominal)
        state.parts.append(state.target)
    elif not _is_second_limit(state, draft):
        state.parts.append(draft)
        state.give_count(draft)


def _is_target_area(draft: SizeDraft) -> bool:
    """Whether what looks like a fit code is a datum target: `⌀.50 A1`. No usual fit has such a code."""
    fit = draft.fit
    if fit is None or draft.tolerance is not None or fit.letters in {"H", "JS"} or not fit.letters.isupper():
        return False
    return len(fit.letters) == 1 and fit.grade in {"1", "2", "3", "4"}


def _target_name(draft: SizeDraft) -> tuple[str, int]:
    fit = draft.fit
    return ("", 0) if fit is None else (fit.letters, int(fit.grade))


def _is_second_limit(state: State, draft: SizeDraft) -> bool:
    """Whether a bare number under or beside another one is its second limit, or a nil deviation under one."""
    above = state.parts[-1] if state.parts else None
    if not isinstance(above, SizeDraft) or above.extent is not None or not draft.bare:
        return False
    if draft.nominal is None or above.nominal is None or draft.form not in {above.form, SizeForm.LINEAR}:
        return False
    if above.deviation is not None:
        return _complete(above, draft.nominal)
    marked = state.status is not None or state.box is not None or any(map(state.follows, _STATUSES))
    if marked or state.count is not None or not above.plain or not _near(above.nominal, draft.nominal):
        return False
    above.tolerance, above.nominal = Limits(above.nominal, draft.nominal), None
    state.size = above
    return True


def _complete(size: SizeDraft, nil: Value) -> bool:
    if size.deviation is None or nil.amount:
        return False
    size.tolerance, size.deviation = upper_and_lower(size.deviation, nil), None
    return True


def _near(one: Value, other: Value) -> bool:
    """Whether two numbers can be limits of one size: neither is twice the other."""
    smaller, larger = sorted((one.amount, other.amount))
    return smaller > 0 and larger < 2 * smaller


def take_stacked(state: State, tree: Tree[Token]) -> None:
    """A tolerance at the start of a line belongs to the size above it."""
    above = state.parts[-1] if state.parts else None
    for piece in tokens(tree):
        if isinstance(above, SizeDraft) and above.tolerance is None and above.fit is None:
            unit = above.nominal.unit if above.nominal and above.form is not SizeForm.ANGLE else state.line.unit
            add_tolerance(above, piece, state.line.in_unit(unit))
            state.size = above
        else:
            state.unread(piece, BY_PLACE["size"])


def take_status(state: State, token: Token) -> None:
    """MAX, MIN, REF or BSC: of the size before it, else of the one after it."""
    status, size = _STATUSES[token.type], state.size
    if state.dual_of is not None:
        state.dual_statuses.append(status)
        return
    taken = size is not None and size.status in _EXTREMES and state.follows("size")
    if size is not None and state.after_size and not taken:
        _set_status(state, status, size)
    elif state.follows("size"):
        state.status = status
    else:
        as_word(state, token)


def _set_status(state: State, status: SizeStatus, size: SizeDraft) -> None:
    size.status = status
    pair = [part for part in state.parts[-2:] if isinstance(part, SizeDraft)]
    if len(pair) < 2 or {part.status for part in pair} != _EXTREMES:
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


def take_boxed_form(state: State, token: Token) -> None:
    """A symbol before a bracket: `⌀[3.000]`."""
    state.form = size_form(token)


def take_angle_sign(state: State, token: Token) -> None:
    """`∠` before an angle says nothing that its degree sign does not."""


def open_box(state: State, token: Token) -> None:
    """`[`: a dual dimension right after a size, else a basic one."""
    behind = isinstance(state.previous, Token) and state.previous.type in {*_STATUSES, "THRU"}
    state.box = SizeStatus.BASIC
    state.dual_of = state.size if state.after_size or behind else None


def open_parenthesis(state: State, token: Token) -> None:
    """`(`: a reference dimension."""
    state.box, state.dual_of = SizeStatus.REFERENCE, None


def close(state: State, token: Token) -> None:
    """`]` or `)`."""
    if state.box is None:
        state.unread(token, BY_PLACE["bracket"])
    elif state.box is SizeStatus.REFERENCE:
        _join_fit(state)
        as_count(state)
    if state.dual_of is not None and state.dual_of.dual is not None:
        _name_dual(state.dual_of.dual, state.dual_statuses)
    state.dual_statuses = []
    state.box = state.dual_of = None


def _name_dual(dual: SizeDraft, statuses: list[SizeStatus]) -> None:
    """MAX and MIN written inside the bracket."""
    limits = dual.tolerance
    if isinstance(limits, Limits) and set(statuses) == _EXTREMES:
        pair = (limits.first, limits.second)
        upper, lower = pair if statuses[0] is SizeStatus.MAXIMUM else pair[::-1]
        dual.tolerance = Limits(upper, lower, named=True)
    elif len(statuses) == 1:
        dual.status = statuses[0]


def _join_fit(state: State) -> None:
    """`30.000-29.979 (30 f7)`: the limits and the code they come from are one size."""
    if len(state.parts) < state.first + 2:
        return
    limits, coded = state.parts[-2:]
    if not isinstance(limits, SizeDraft) or not isinstance(coded, SizeDraft):
        return
    unnamed = isinstance(limits.tolerance, Limits) and limits.nominal is None
    if unnamed and coded.fit is not None and coded.tolerance is None:
        limits.nominal, limits.fit = coded.nominal, coded.fit
        state.parts.pop()
        state.size = limits
