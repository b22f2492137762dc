"""Second pass: where a size, or a tolerance under one, belongs."""

from lark import Token, Tree

from calloutlint.callouts.expected import BY_PLACE
from calloutlint.callouts.parts.drafts import DepthDraft, SizeDraft, TargetDraft
from calloutlint.callouts.parts.line import joined, tokens
from calloutlint.callouts.parts.place_bracket import take_dual
from calloutlint.callouts.parts.place_extent import place_depth, place_extent
from calloutlint.callouts.parts.place_status import STATUSES, set_status, take_size_modifier
from calloutlint.callouts.parts.place_step import fits_step, put_in_step
from calloutlint.callouts.parts.read_size import (
    add_tolerance,
    read_size,
    upper_and_lower,
)
from calloutlint.callouts.parts.state import State
from calloutlint.model.callout import Unread
from calloutlint.model.size import Limits, SizeForm, SizeStatus
from calloutlint.model.values import Value


def take_size(state: State, tree: Tree[Token]) -> None:
    """Puts a size where it belongs: a dual, a target, a depth, a step, or the callout itself."""
    draft = read_size(tree, state.line.in_other_unit() if state.dual_of else state.line)
    if state.form is not None:
        draft.form, state.form = state.form, None
    if state.dual_of is not None:
        take_dual(state.dual_of, draft)
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
        set_status(state, status, draft)


def _is_nil_after(draft: SizeDraft, lost: Unread) -> bool:
    """Whether a bare 0 is the other deviation of one that could not be read: `⌀12,5 +0,1 0`."""
    nil = draft.bare and draft.nominal is not None and not draft.nominal.amount
    return nil and ("+" in lost.text or "-" in lost.text)


def _belongs_elsewhere(state: State, draft: SizeDraft) -> bool:
    """Whether a target, a depth or a hole step took the size."""
    if state.target is not None and draft.nominal is not None:
        state.target.sizes.append(draft.nominal)
    elif state.depth is not None and state.depth.size is None:
        state.depth.size, state.depth.span = draft, joined((state.depth.span, draft.span))
        place_extent(state, state.depth)
    elif state.drill is not None and state.box is SizeStatus.REFERENCE:
        state.drill_size = draft
    elif _deep_follows(state) and _is_depth(state, draft):
        place_depth(state, DepthDraft(draft.span, draft))
    elif state.step is not None and fits_step(state.step, draft):
        put_in_step(state.step, draft)
    else:
        return False
    return True


def _deep_follows(state: State) -> bool:
    """Whether DEEP follows the number, a MIN or MAX between them or not: `.50 MIN DEEP`."""
    return state.follows("DEEP") or (
        (state.follows("MIN") or state.follows("MAX")) and state.follows("DEEP", 1)
    )


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
    marked = state.status is not None or state.box is not None or any(map(state.follows, STATUSES))
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


def take_modified(state: State, tree: Tree[Token]) -> None:
    """`⌀7.5 Ⓔ +0.1 0`: a modifier of the size before, and its tolerance."""
    modifier, tolerance = tokens(tree)
    take_size_modifier(state, modifier)
    size = state.size
    if size is None or size.tolerance is not None or size.fit is not None:
        state.unread(tolerance, BY_PLACE["size" if size is None else "second"])
    else:
        add_tolerance(size, tolerance, state.line)


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


def take_angle_sign(state: State, token: Token) -> None:
    """`∠` before an angle says nothing that its degree sign does not."""
