"""Heads of screws: the room they need, and the smallest that may come to bear on the part."""

from collections.abc import Mapping
from decimal import Decimal
from functools import cache
from typing import NamedTuple

from calloutlint.model.fastener import Fastener, Head
from calloutlint.trade.inches import named_size, nominal_size
from calloutlint.trade.tables import read_table
from calloutlint.trade.washers import WasherSize, washer_size
from calloutlint.units import Unit

_INCH_TABLES = {
    "heads_asme_b18_3": "ASME B18.3",
    "heads_asme_b18_2_1": "ASME B18.2.1",
    "heads_asme_b18_6_3": "ASME B18.6.3",
}
_METRIC_TABLES = {
    "heads_iso_4762": "ISO 4762",
    "heads_iso_4014": "ISO 4014 and ISO 4017",
    "heads_iso_7380": "ISO 7380-1",
    "heads_iso_10642": "ISO 10642",
    "heads_iso_machine": "ISO 7045, ISO 7046-1 and ISO 1207",
}


class HeadSize(NamedTuple):
    """Published sizes of a head, or of the washer under it, in `unit`.

    `largest`: the diameter it can reach, across the corners of a hexagon, the theoretical sharp edge of a
    countersunk head; `knurled` that of a knurled one where the standard has its own. `smallest`: the least
    diameter, across the flats of a hexagon. `bearing`: the least diameter of its bearing face where the
    standard limits it, else `smallest`. `flats`: the largest width across the flats of a hexagon.
    """

    largest: Decimal
    smallest: Decimal
    bearing: Decimal
    unit: Unit
    source: str
    knurled: Decimal | None = None
    flats: Decimal | None = None


def head_size(head: Head, diameter: Decimal, unit: Unit) -> HeadSize | None:
    """A head by the nominal diameter of its screw, in the screw's own unit; None where no table has it.

    Sources, inch: ASME B18.3, B18.2.1 (hex cap screws), B18.6.3; mm: ISO 4762, 4014/4017, 7380-1, 10642,
    7045, 7046-1, 1207.
    """
    if unit is Unit.MM:
        return _heads(unit).get((head, diameter))
    size = nominal_size(diameter)
    return _heads(unit).get((head, size.diameter)) if size else None


def seat_of(fastener: Fastener) -> HeadSize | None:
    """What a screw bears on its part with: its washer where one is said, else its head.

    None where neither is said or the tables do not have it. Sources: see `head_size`, `washer_size`.
    """
    diameter = fastener.thread.diameter if fastener.thread else None
    if diameter is None or diameter.unit is None:
        return None
    if fastener.washer:
        return _under_washer(washer_size(diameter.amount, diameter.unit))
    return head_size(fastener.head, diameter.amount, diameter.unit) if fastener.head else None


def room_for(seat: HeadSize, knurled: bool) -> Decimal:
    """The largest diameter that a head may have: plain unless a knurled one is called for."""
    return seat.knurled if knurled and seat.knurled is not None else seat.largest


def _under_washer(washer: WasherSize | None) -> HeadSize | None:
    if washer is None:
        return None
    return HeadSize(washer.outside_max, washer.outside_min, washer.outside_min, washer.unit, washer.source)


@cache
def _heads(unit: Unit) -> dict[tuple[Head, Decimal], HeadSize]:
    tables = _INCH_TABLES if unit is Unit.INCH else _METRIC_TABLES
    return {
        (Head(row["head"]), _diameter(row["size"])): _head(row, unit, source)
        for name, source in tables.items()
        for row in read_table(name)
    }


def _diameter(size: str) -> Decimal:
    if size.startswith("M"):
        return Decimal(size[1:])
    named = named_size(size)
    assert named is not None, f"{size} is no Unified size"
    return named.diameter


def _head(row: Mapping[str, str], unit: Unit, source: str) -> HeadSize:
    smallest = Decimal(row["smallest"])
    bearing, knurled, flats = row.get("bearing"), row.get("knurled"), row.get("flats")
    return HeadSize(
        largest=Decimal(row["largest"]),
        smallest=smallest,
        bearing=Decimal(bearing) if bearing else smallest,
        unit=unit,
        source=source,
        knurled=Decimal(knurled) if knurled else None,
        flats=Decimal(flats) if flats else None,
    )
