"""Inch sizes as the trade names them: fractions and number sizes, as exact decimals."""

from decimal import Decimal
from fractions import Fraction
from functools import lru_cache
from typing import NamedTuple

ROUNDED = Decimal("0.0005")
"""Drawings round inch sizes to three places: `.281` is 9/32, `.312` is 5/16."""

_NUMBER_STEP = Decimal("0.013")
_NUMBER_START = Decimal("0.060")
_NUMBERS = (*range(11), 12)
_SIXTEENTHS_TO = Decimal(4)


class NominalSize(NamedTuple):
    """A nominal fastener size: its trade name (`#10`, `1/4`, `1 1/8`) and basic major diameter in inches."""

    name: str
    diameter: Decimal


def inches(text: str) -> Decimal:
    """Exact decimal inches of a decimal or a binary fraction: `.257`, `17/64`, `1 1/32`.

    Raises:
        ValueError: the text is neither.
    """
    whole, _, part = text.strip().rpartition(" ")
    if "/" not in part:
        return Decimal(part) if _is_number(part) else _refuse(text)
    numerator, _, denominator = part.partition("/")
    if not (numerator.isdecimal() and denominator.isdecimal() and int(denominator)):
        return _refuse(text)
    return Decimal(whole or 0) + Decimal(numerator) / Decimal(denominator)


def fraction_name(diameter: Decimal) -> str:
    """An exact diameter as the trade writes it: `17/64`, `1 1/32`, `2`."""
    whole, part = divmod(Fraction(diameter), 1)
    return " ".join(str(piece) for piece in (whole, part) if piece)


def number_diameter(number: int) -> Decimal | None:
    """Basic major diameter of a number size, #0 to #10 and #12: 0.060 + 0.013 N inches.

    Source: ASME B1.1, basic major diameters of the number sizes.
    """
    return _NUMBER_START + number * _NUMBER_STEP if number in _NUMBERS else None


def is_number_size(number: int, tpi: Decimal) -> bool:
    """Whether a whole number before a pitch is a number size: `10-32`, `1-64` are, `2-12`, `1-32` are not.

    Source: ASME B1.1. The coarsest number sizes have 24 threads per inch; of whole inches only 1 has finer
    series, up to 32.
    """
    finest_of_inches = {0: Decimal(0), 1: Decimal(32)}.get(number, Decimal(23))
    return number in _NUMBERS and tpi > finest_of_inches


@lru_cache(maxsize=1024)
def nominal_size(diameter: Decimal) -> NominalSize | None:
    """The nominal size that a diameter in inches stands for, as written or rounded to three places.

    Number sizes #0 to #12, then sixteenths from 1/4 to 4 in (ASME B1.1); None for any other diameter.
    """
    for number in _NUMBERS:
        exact = _NUMBER_START + number * _NUMBER_STEP
        if abs(exact - diameter) <= ROUNDED:
            return NominalSize(f"#{number}", exact)
    exact = (diameter * 16).to_integral_value() / 16
    if abs(exact - diameter) <= ROUNDED and Decimal("0.25") <= exact <= _SIXTEENTHS_TO:
        return NominalSize(fraction_name(exact), exact)
    return None


def named_size(name: str) -> NominalSize | None:
    """The nominal size of a trade name, `#10` or `1/4`; None if there is no such size."""
    if name.startswith("#"):
        diameter = number_diameter(int(name[1:])) if name[1:].isdecimal() else None
        return None if diameter is None else NominalSize(name, diameter)
    return nominal_size(inches(name))


def _is_number(text: str) -> bool:
    return text.replace(".", "", 1).isdecimal()


def _refuse(text: str) -> Decimal:
    raise ValueError(f"{text!r} is no size in inches; expected a decimal or a fraction such as 17/64")
