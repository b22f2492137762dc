"""Numbers and counts written as the standard writes them.

ASME Y14.5, the subjects of decimal inch and millimetre dimensioning and of limits, deviations and zeros.
"""

from dataclasses import replace
from decimal import Decimal
from typing import Any

from calloutlint.facts.sizes import written_values
from calloutlint.model.callout import Callout
from calloutlint.model.size import Count, Deviations, Limits, Size, SizeForm, SizeStatus
from calloutlint.model.thread import Thread
from calloutlint.model.values import Value
from calloutlint.redline.substitute import rebuild, substitute
from calloutlint.units import Unit


def written(amount: Decimal, unit: Unit | None, like: Value | None = None) -> Value:
    """An amount as its unit's rule writes it: inch to the places of `like` or more, mm as short as can be."""
    exact = amount.normalize()
    if unit is not Unit.INCH:
        return Value(f"{exact:f}", amount, unit)
    places = max(-int(exact.as_tuple().exponent), like.places if like else 0)
    return Value(_without_zero(f"{exact:.{places}f}"), amount, unit)


def plain_count(callout: Callout) -> Callout:
    """The callout with its counts written `4X`."""
    return rebuild(callout, _plain)


def _plain(node: Any) -> Any:
    if isinstance(node, Count) and node.number is not None:
        return replace(node, written=f"{node.number}X")
    return node


def respell(callout: Callout, unit: Unit | None) -> Callout:
    """The callout with zeros and decimal places as ASME Y14.5 writes them in the drawing's unit."""
    if unit is Unit.INCH:
        return rebuild(callout, _inch)
    return rebuild(callout, _mm) if unit is Unit.MM else callout


def _inch(node: Any) -> Any:
    match node:
        case Value(unit=Unit.INCH):
            return _respelled(node, _without_zero(node.text))
        case Thread():
            return replace(node, size=_without_zero(node.size))
        case Size() if _evened(node, Unit.INCH) and node.status not in {SizeStatus.BASIC, SizeStatus.REFERENCE}:
            places = max((value.places for value in written_values(node)), default=0)
            return substitute(node, {id(value): _padded(value, places) for value in written_values(node)})
    return node


def _mm(node: Any) -> Any:
    match node:
        case Value(unit=Unit.MM):
            return _respelled(node, _with_zero(node.text))
        case Size() if _evened(node, Unit.MM):
            return _even_mm(node)
    return node


def _evened(size: Size, unit: Unit) -> bool:
    if size.form is SizeForm.ANGLE or (size.fit and unit is Unit.INCH):
        return False
    return all(value.unit is unit and "/" not in value.text for value in written_values(size))


def _even_mm(size: Size) -> Size:
    nominal = _trimmed(size.nominal) if size.nominal else None
    match size.tolerance:
        case Deviations(upper, lower):
            return replace(size, nominal=nominal, tolerance=Deviations(*_even_pair(upper, lower)))
        case Limits(first, second, named):
            return replace(size, nominal=nominal, tolerance=Limits(*_even_limits(first, second), named))
    return replace(size, nominal=nominal)


def _even_pair(upper: Value, lower: Value) -> tuple[Value, Value]:
    if upper.amount == 0 or lower.amount == 0:
        return _nil(upper), _nil(lower)
    return _even_limits(upper, lower)


def _even_limits(first: Value, second: Value) -> tuple[Value, Value]:
    first, second = _trimmed(first), _trimmed(second)
    places = max(first.places, second.places)
    return _padded(first, places), _padded(second, places)


def _nil(value: Value) -> Value:
    return _respelled(value, "0") if value.amount == 0 else value


def _trimmed(value: Value) -> Value:
    return _respelled(value, value.text.rstrip("0").rstrip(".")) if "." in value.text else value


def _padded(value: Value, places: int) -> Value:
    if value.places >= places:
        return value
    point = "" if "." in value.text else "."
    text = value.text + point + "0" * (places - value.places)
    return _respelled(value, _without_zero(text) if value.unit is Unit.INCH else text)


def _without_zero(text: str) -> str:
    sign, digits = _split(text)
    return sign + digits[1:] if digits.startswith("0.") else text


def _with_zero(text: str) -> str:
    sign, digits = _split(text)
    return sign + "0" + digits if digits.startswith(".") else text


def _split(text: str) -> tuple[str, str]:
    return (text[0], text[1:]) if text[:1] in {"+", "-"} else ("", text)


def _respelled(value: Value, text: str) -> Value:
    return value if text == value.text else Value(text, value.amount, value.unit)
