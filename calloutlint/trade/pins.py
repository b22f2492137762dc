"""Dowel pins that are called out by their nominal diameter alone."""

from decimal import Decimal
from typing import NamedTuple

from calloutlint.model.size import FitCode
from calloutlint.trade import iso286
from calloutlint.trade.inches import ROUNDED, inches
from calloutlint.trade.tables import read_table
from calloutlint.units import Unit

_ISO_DIAMETERS = tuple(
    Decimal(d) for d in ("1", "1.5", "2", "2.5", "3", "4", "5", "6", "8", "10", "12", "16", "20")
)
_M6 = FitCode("m", "6")


class PinLimits(NamedTuple):
    """Limits of a standard dowel pin, in the unit it was asked for in."""

    largest: Decimal
    smallest: Decimal
    source: str


def dowel_limits(diameter: Decimal, unit: Unit) -> PinLimits | None:
    """Limits of the hardened dowel pin of a nominal diameter; None where its standard has no such pin.

    Sources: ASME B18.8.2, standard series (inch); ISO 8734, tolerance class m6 (mm).
    """
    return _inch(diameter) if unit is Unit.INCH else _metric(diameter)


def _inch(diameter: Decimal) -> PinLimits | None:
    for row in read_table("dowel_pins"):
        if abs(inches(row["size"]) - diameter) <= ROUNDED:
            return PinLimits(Decimal(row["largest"]), Decimal(row["smallest"]), "ASME B18.8.2")
    return None


def _metric(diameter: Decimal) -> PinLimits | None:
    limits = iso286.limits(diameter, _M6) if diameter in _ISO_DIAMETERS else None
    if limits is None:
        return None
    return PinLimits(diameter + limits.upper, diameter + limits.lower, "ISO 8734")
