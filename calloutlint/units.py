"""Units of drawn values, and the exact conversion between inch and millimetre."""

from decimal import Decimal
from enum import StrEnum

MM_PER_INCH = Decimal("25.4")


class Unit(StrEnum):
    """Unit of a drawn value."""

    INCH = "inch"
    MM = "mm"
    DEGREE = "degree"


def convert(amount: Decimal, source: Unit, target: Unit) -> Decimal:
    """A length in `source` expressed in `target`; 1 inch is exactly 25.4 mm.

    Inch to mm is exact; mm to inch is rounded to the 28 digits of the decimal context.
    """
    if source is target:
        return amount
    return amount * MM_PER_INCH if source is Unit.INCH else amount / MM_PER_INCH
