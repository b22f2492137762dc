"""What each word of a rule sheet's redline does to a callout."""

from collections.abc import Callable, Iterable, Mapping
from dataclasses import replace
from decimal import Decimal
from typing import Any

from calloutlint.model.callout import Callout
from calloutlint.model.frame import DatumRef, Modifier, ModifierUse, Segment, Zone, ZoneShape
from calloutlint.model.size import Deviations, Limits, Size
from calloutlint.model.thread import Thread
from calloutlint.model.values import Value
from calloutlint.redline.respell import plain_count, respell, written
from calloutlint.redline.substitute import Removed, substitute
from calloutlint.rulebook.finding import Edit
from calloutlint.units import Unit

ORDER = (
    (Modifier.MMC, Modifier.LMC, Modifier.RFS),
    (Modifier.RECIPROCITY,),
    (Modifier.PROJECTED, Modifier.FREE_STATE, Modifier.TANGENT, Modifier.UNEQUAL),
    (),
    (Modifier.STATISTICAL,),
)
SHAPES = {"diameter": ZoneShape.DIAMETER, "sphere": ZoneShape.SPHERE}


class UndeterminedError(Exception):
    """The callout gives no single correction for what the rule sheet asks."""


def corrected(callout: Callout, edits: Iterable[Edit], unit: Unit | None) -> Callout:
    """The callout with every edit applied; raises UndeterminedError where one cannot be.

    Edits of one part follow each other: each changes what the one before it left.
    """
    moved: dict[int, object] = {}
    for edit in edits:
        changes = _changes(_onto(edit, moved), unit)
        moved |= _steps(edit, changes, moved)
        whole = changes.pop(id(callout), callout)
        if not isinstance(whole, Callout):
            raise UndeterminedError
        callout = substitute(whole, changes)
    return callout


def _onto(edit: Edit, moved: Mapping[int, object]) -> Edit:
    """The edit with its targets as earlier edits left them."""
    if isinstance(edit.target, tuple):
        return replace(edit, target=tuple(moved.get(id(target), target) for target in edit.target))
    return replace(edit, target=moved.get(id(edit.target), edit.target))


def _steps(edit: Edit, changes: Mapping[int, object], moved: Mapping[int, object]) -> dict[int, object]:
    """What the edit's targets, as the finding names them, have now become."""
    targets = edit.target if isinstance(edit.target, tuple) else (edit.target,)
    return {id(target): changes[id(moved.get(id(target), target))] for target in targets}


def _changes(edit: Edit, unit: Unit | None) -> dict[int, object]:
    targets = edit.target if isinstance(edit.target, tuple) else (edit.target,)
    if not targets or None in targets:
        raise UndeterminedError
    change = VERBS.get(edit.verb)
    if change is None:
        raise UndeterminedError
    return {id(target): change(target, edit, unit) for target in targets}


def _add(target: Any, edit: Edit, _unit: Unit | None) -> object:
    if isinstance(target, Zone) and edit.word in SHAPES:
        return replace(target, shape=SHAPES[edit.word])
    if isinstance(target, Zone | DatumRef):
        return replace(target, modifiers=_in_order((*target.modifiers, ModifierUse(_modifier(edit)))))
    raise UndeterminedError


def _drop(target: Any, edit: Edit, _unit: Unit | None) -> object:
    if edit.word is None:
        return Removed
    if isinstance(target, Zone) and edit.word in SHAPES:
        return replace(target, shape=ZoneShape.WIDTH)
    if isinstance(target, Zone | DatumRef | Size):
        kind = edit.word
        kept: Any = tuple(use for use in target.modifiers if getattr(use, "kind", use) != kind)
        return replace(target, modifiers=kept)
    raise UndeterminedError


def _replace(target: Any, edit: Edit, unit: Unit | None) -> object:
    if isinstance(target, Zone) and edit.word == "value":
        return replace(target, value=_number(edit, unit, target.value))
    if isinstance(target, Zone) and edit.word == "projected":
        return replace(target, modifiers=_with_height(target.modifiers, _number(edit, unit, target.value)))
    if isinstance(target, Size):
        return _resized(target, edit, unit)
    if isinstance(target, Callout) and edit.word == "count":
        return plain_count(target)
    if isinstance(target, Thread) and edit.word == "class_name":
        return replace(target, class_=str(edit.value))
    if isinstance(target, Segment) and edit.word == "characteristic":
        return replace(target, characteristic=type(target.characteristic)(str(edit.value)))
    raise UndeterminedError


def _resized(size: Size, edit: Edit, unit: Unit | None) -> Size:
    match edit.word, size.tolerance:
        case "nominal", _:
            return replace(size, nominal=_number(edit, unit, size.nominal))
        case "upper", Deviations(upper, lower):
            return replace(size, tolerance=Deviations(_deviation(edit, unit, upper), lower))
        case "lower", Deviations(upper, lower):
            return replace(size, tolerance=Deviations(upper, _deviation(edit, unit, lower)))
        case "largest" | "smallest", Limits(first, second, named):
            if (edit.word == "largest") is (second.amount > first.amount):
                return replace(size, tolerance=Limits(first, _as_given(edit, unit), named))
            return replace(size, tolerance=Limits(_as_given(edit, unit), second, named))
    raise UndeterminedError


def _reorder(target: Any, _edit: Edit, _unit: Unit | None) -> object:
    match target:
        case Zone():
            return replace(target, modifiers=_in_order(target.modifiers))
        case Size(tolerance=Deviations(upper, lower)):
            return replace(target, tolerance=Deviations(lower, upper))
        case Size(tolerance=Limits(first, second, named)):
            return replace(target, tolerance=Limits(second, first, named))
    raise UndeterminedError


def _respell(target: Any, _edit: Edit, unit: Unit | None) -> object:
    if isinstance(target, Callout):
        return respell(target, unit)
    raise UndeterminedError


VERBS: dict[str, Callable[[Any, Edit, Unit | None], object]] = {
    "add": _add,
    "drop": _drop,
    "replace": _replace,
    "reorder": _reorder,
    "respell": _respell,
}


def _number(edit: Edit, unit: Unit | None, like: Value | None) -> Value:
    if not isinstance(edit.value, Decimal):
        raise UndeterminedError
    return written(edit.value, unit, like)


def _deviation(edit: Edit, unit: Unit | None, like: Value) -> Value:
    """A deviation with its sign; nil in mm is a plain 0."""
    number = _as_given(edit, unit)
    if number.amount == 0 and unit is not Unit.INCH:
        return replace(number, text="0")
    if number.signed:
        return number
    sign = "+" if number.amount or not like.signed else like.text[0]
    return replace(number, text=sign + number.text)


def _as_given(edit: Edit, unit: Unit | None) -> Value:
    """The number with the places that it is given with, as two limits or deviations have to have alike."""
    if not isinstance(edit.value, Decimal):
        raise UndeterminedError
    exact = Value(f"{edit.value:f}", edit.value, unit)
    return written(edit.value, unit, exact) if unit is Unit.INCH else exact


def _modifier(edit: Edit) -> Modifier:
    try:
        return Modifier(edit.word or "")
    except ValueError:
        raise UndeterminedError from None


def _in_order(uses: Iterable[ModifierUse]) -> tuple[ModifierUse, ...]:
    return tuple(sorted(uses, key=lambda use: _rank(use.kind)))


def _rank(kind: Modifier) -> int:
    others = ORDER.index(())
    return next((rank for rank, kinds in enumerate(ORDER) if kind in kinds), others)


def _with_height(uses: tuple[ModifierUse, ...], height: Value) -> tuple[ModifierUse, ...]:
    """The modifiers with a projected zone of this height, added where there is none."""
    if all(use.kind is not Modifier.PROJECTED for use in uses):
        return _in_order((*uses, ModifierUse(Modifier.PROJECTED, height)))
    return tuple(replace(use, value=height) if use.kind is Modifier.PROJECTED else use for use in uses)
