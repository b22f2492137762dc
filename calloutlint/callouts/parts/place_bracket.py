"""Second pass: brackets, and whether they make a size basic, a reference, a dual or the limits of a fit."""

from lark import Token

from calloutlint.callouts.expected import BY_PLACE
from calloutlint.callouts.parts.drafts import SizeDraft
from calloutlint.callouts.parts.place_count import as_count
from calloutlint.callouts.parts.place_status import EXTREMES, STATUSES
from calloutlint.callouts.parts.read_size import (
    size_form,
)
from calloutlint.callouts.parts.state import State
from calloutlint.model.size import Limits, SizeForm, SizeStatus


def take_boxed_form(state: State, token: Token) -> None:
    """A symbol before a bracket: `⌀[3.000]`."""
    state.form = size_form(token)


def open_box(state: State, token: Token) -> None:
    """`[`: a dual dimension right after a size, else a basic one."""
    behind = isinstance(state.previous, Token) and state.previous.type in {*STATUSES, "THRU", "CLOSE"}
    state.outer, state.box = state.box, SizeStatus.BASIC
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
    state.box, state.outer, state.dual_of = state.outer, None, None


def take_dual(size: SizeDraft, draft: SizeDraft) -> None:
    """The bracketed size in the other unit; a second number in the bracket is its other limit."""
    first = size.dual
    if first is None:
        draft.form = size.form if draft.form is SizeForm.LINEAR else draft.form
        size.dual = draft
    elif first.nominal is not None and draft.nominal is not None and first.plain:
        first.tolerance, first.nominal = Limits(first.nominal, draft.nominal), None


def _name_dual(dual: SizeDraft, statuses: list[SizeStatus]) -> None:
    """MAX and MIN written inside the bracket."""
    limits = dual.tolerance
    if isinstance(limits, Limits) and set(statuses) == EXTREMES:
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
