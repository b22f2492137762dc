"""Reads one number: decimals, fractions and mixed numbers, angles in degrees, minutes and seconds."""

import re
from decimal import Decimal
from fractions import Fraction
from functools import lru_cache

from calloutlint.model.size import Size
from calloutlint.model.values import Value
from calloutlint.trade.inches import number_diameter
from calloutlint.units import Unit

_UNITS = {'"': Unit.INCH, "IN": Unit.INCH, "IN.": Unit.INCH, "MM": Unit.MM}
_NUMBER = re.compile(
    r"""\s*(?P<sign>[+-]?)\s*
    (?:(?P<whole>\d+)[ -])?(?P<over>\d+)/(?P<under>\d+)\s*(?P<fraction_unit>"|mm|in\.?)?\s*
    |\s*(?P<sign2>[+-]?)\s*(?P<decimal>\d+\.?\d*|\.\d+)\s*
    (?:(?P<unit>"|mm|in\.?)|(?P<degrees>°\s*(?:(?P<minutes>\d+(?:\.\d+)?)\s*'\s*)?(?:(?P<seconds>\d+(?:\.\d+)?)\s*"\s*)?)
    |(?P<only_minutes>'))?\s*""",
    re.VERBOSE | re.IGNORECASE,
)
_CLEAN = re.compile(r"\d+\.\d+|\.\d+|\d+").fullmatch


@lru_cache(maxsize=8192)
def parse_value(text: str, unit: Unit | None) -> Value:
    """The number `text` as a value; `unit` is what it is in unless it carries a unit of its own.

    Raises:
        ValueError: `text` is not one number.
    """
    if _CLEAN(text):
        return Value(str(text), Decimal(text), unit)
    match = _NUMBER.fullmatch(text)
    if match is None:
        raise ValueError(f"'{text.strip()}' is not a number. Expected one like .250, 6.35, 1 1/4 or 30°.")
    if match["over"]:
        return _fraction(match, unit)
    if match["degrees"] or match["only_minutes"]:
        return _angle(match)
    digits = match["sign2"] + match["decimal"].removesuffix(".")
    return Value(digits, Decimal(digits), _stated_unit(match["unit"], unit))


def number_value(number: int) -> Value | None:
    """Basic major diameter of a number size, `.1900` in for 10; None if there is no such size."""
    diameter = number_diameter(number)
    return None if diameter is None else Value(f"{diameter}".removeprefix("0"), diameter, Unit.INCH)


def parse_size(text: str, unit: Unit | None) -> Size:
    """The one size that `text` states, such as `⌀6.6 +0.15/0`.

    Raises:
        ValueError: `text` is something else, or more than one size.
    """
    from calloutlint.callouts.parse import parse_callout  # reads its numbers with this module

    parts = parse_callout([text], unit)
    if len(parts) != 1 or not isinstance(parts[0], Size):
        raise ValueError(f"'{text.strip()}' is not one size. Expected one like ⌀.281 +.007 -.002 or 25 H7.")
    return parts[0]


def _fraction(match: re.Match[str], unit: Unit | None) -> Value:
    over, under, whole = int(match["over"]), int(match["under"]), int(match["whole"] or 0)
    if under == 0:
        raise ValueError(f"'{match[0].strip()}' divides by zero.")
    exact = whole + Fraction(over, under)
    amount = Decimal(exact.numerator) / Decimal(exact.denominator)
    written = f"{whole} {over}/{under}" if match["whole"] else f"{over}/{under}"
    stated = _stated_unit(match["fraction_unit"], unit)
    return Value(match["sign"] + written, -amount if match["sign"] == "-" else amount, stated)


def _angle(match: re.Match[str]) -> Value:
    if match["only_minutes"]:
        parts, written = (Decimal(0), Decimal(match["decimal"]), Decimal(0)), match["decimal"] + "'"
    else:
        minutes, seconds = match["minutes"], match["seconds"]
        parts = (Decimal(match["decimal"]), Decimal(minutes or 0), Decimal(seconds or 0))
        written = match["decimal"].removesuffix(".") + "°"
        written += f"{minutes}'" if minutes else ""
        written += f'{seconds}"' if seconds else ""
    amount = parts[0] + parts[1] / 60 + parts[2] / 3600
    sign = match["sign2"]
    return Value(sign + written, -amount if sign == "-" else amount, Unit.DEGREE)


def _stated_unit(mark: str | None, unit: Unit | None) -> Unit | None:
    return _UNITS[mark.upper()] if mark else unit
