"""Writes values into messages in the drawing's manner."""

from collections.abc import Iterable
from decimal import ROUND_HALF_EVEN, Decimal
from enum import StrEnum
from typing import Any

from calloutlint.facts.symbol_names import drawn
from calloutlint.model.frame import Modifier
from calloutlint.rulebook.kinds import ANGLE, LENGTH, QUANTITIES, Kind, Listing, single
from calloutlint.units import Unit

INCH_PLACES = 5
INCH_PLACES_SHOWN = 3
OTHER_PLACES = 4
MINUS = "−"
UNIT_MARKS = {Unit.INCH: " in", Unit.MM: " mm"}


def written(value: Any, kind: Kind, unit: Unit | None, *, signed: bool = False) -> str:
    """A value in the drawing's manner: a length is in `unit`, which is not shown; a modifier is drawn."""
    if isinstance(kind, Listing):
        return joined(written(item, kind.item, unit, signed=signed) for item in value)
    if kind in QUANTITIES:
        return _quantity(Decimal(value), kind, unit, signed=signed)
    if isinstance(value, Modifier):
        return drawn(value)
    return value.value if isinstance(value, StrEnum) else str(value)


def said(value: Any, kind: Kind, unit: Unit | None, *, signed: bool = False) -> str:
    """A value as a message says it: as it is written, with a minus sign where a number for programs has `-`."""
    text = written(value, kind, unit, signed=signed)
    return text.replace("-", MINUS) if single(kind) in QUANTITIES else text


def figure(value: Any, kind: Kind, unit: Unit | None) -> str:
    """A value with its unit, as a record lists it."""
    mark = UNIT_MARKS.get(unit, "") if unit and kind == LENGTH else ""
    return written(value, kind, unit) + mark


def joined(items: Iterable[str]) -> str:
    """Items in words: `A`, `A and B`, `A, B and C`; `none` for no item."""
    *others, last = list(items) or ["none"]
    return f"{', '.join(others)} and {last}" if others else last


def _quantity(amount: Decimal, kind: Kind, unit: Unit | None, *, signed: bool) -> str:
    inch = kind == LENGTH and unit is Unit.INCH
    text = _inch(amount) if inch else _plain(amount)
    sign = "-" if amount < 0 and text.strip(".0") else "+" if signed and (amount or inch) else ""
    return sign + text + ("°" if kind == ANGLE else "")


def _inch(amount: Decimal) -> str:
    """Unsigned, without a zero before the point, three to five places."""
    whole, _, decimals = _rounded(amount, INCH_PLACES).partition(".")
    return f"{whole.lstrip('0')}.{decimals.rstrip('0').ljust(INCH_PLACES_SHOWN, '0')}"


def _plain(amount: Decimal) -> str:
    """Unsigned, with a zero before the point, no zeros at the end, at most four places."""
    return _rounded(amount, OTHER_PLACES).rstrip("0").rstrip(".")


def _rounded(amount: Decimal, places: int) -> str:
    return format(abs(amount).quantize(Decimal(1).scaleb(-places), ROUND_HALF_EVEN), "f")
