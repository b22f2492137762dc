"""Plain washers."""

from decimal import Decimal
from functools import cache
from typing import NamedTuple

from calloutlint.trade.inches import nominal_size
from calloutlint.trade.tables import read_table
from calloutlint.units import Unit


class WasherSize(NamedTuple):
    """Published diameters of a plain washer, in `unit`."""

    outside_max: Decimal
    outside_min: Decimal
    inside_min: Decimal
    unit: Unit
    source: str


def washer_size(diameter: Decimal, unit: Unit) -> WasherSize | None:
    """The plain washer of a screw by its nominal diameter in its own unit; None where no table has it.

    Sources: ISO 7089 (mm); ASME B18.21.1 type A, narrow series (inch).
    """
    if unit is Unit.MM:
        return _washers(unit).get(f"M{diameter.normalize():f}")
    size = nominal_size(diameter)
    return _washers(unit).get(size.name) if size else None


@cache
def _washers(unit: Unit) -> dict[str, WasherSize]:
    source = "ASME B18.21.1" if unit is Unit.INCH else "ISO 7089"
    return {
        row["size"]: WasherSize(
            Decimal(row["outside_max"]), Decimal(row["outside_min"]), Decimal(row["inside_min"]), unit, source
        )
        for row in read_table("washers")
        if row["unit"] == unit
    }
