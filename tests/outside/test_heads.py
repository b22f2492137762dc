"""Heads and washers against published values; each row of the CSV names its standard and its provenance."""

import csv
from decimal import Decimal
from math import cos, pi
from pathlib import Path

import pytest

from calloutlint.callouts.fastener import parse_fastener
from calloutlint.model.fastener import Head
from calloutlint.trade.heads import HeadSize, head_size, room_for, seat_of
from calloutlint.trade.inches import named_size
from calloutlint.trade.pins import PinLimits, dowel_limits
from calloutlint.trade.tables import read_table
from calloutlint.trade.washers import washer_size
from calloutlint.units import Unit

_VALUES = Path(__file__).with_name("values")
_HEADS = {
    "socket_head_diameter_max": Head.SOCKET_CAP,
    "socket_head_diameter_max_plain": Head.SOCKET_CAP,
    "socket_head_diameter_max_knurled": Head.SOCKET_CAP,
    "hex_across_flats_max": Head.HEX,
    "button_head_diameter_max": Head.SOCKET_BUTTON,
    "countersunk_head_diameter_max": Head.SOCKET_COUNTERSUNK,
    "pan_head_diameter_max": Head.PAN,
    "cheese_head_diameter_max": Head.FILLISTER,
}
_TABLES = (
    *("heads_asme_b18_3", "heads_asme_b18_2_1", "heads_asme_b18_6_3", "heads_iso_4762"),
    *("heads_iso_4014", "heads_iso_7380", "heads_iso_10642", "heads_iso_machine"),
)


def published(name: str) -> list[dict[str, str]]:
    lines = (_VALUES / name).read_text(encoding="utf-8").splitlines()
    rows = csv.DictReader(line for line in lines if not line.startswith("# "))
    return [row for row in rows if row["quantity"] in _HEADS or row["quantity"].startswith("washer")]


def diameter_of(inputs: str) -> tuple[Decimal, Unit]:
    """`screw=M6; …` or `washer=1/4; …`."""
    size = inputs.split(";")[0].split("=")[1]
    if size.startswith("M"):
        return Decimal(size[1:]), Unit.MM
    named = named_size(size)
    assert named
    return named.diameter, Unit.INCH


def looked_up(quantity: str, inputs: str) -> Decimal | None:
    diameter, unit = diameter_of(inputs)
    if quantity.startswith("washer"):
        washer = washer_size(diameter, unit)
        outside = quantity == "washer_outside_diameter_max"
        return (washer.outside_max if outside else washer.inside_min) if washer else None
    size = head_size(_HEADS[quantity], diameter, unit)
    if size is None:
        return None
    if quantity == "hex_across_flats_max":
        return size.flats
    return size.knurled if quantity.endswith("knurled") else size.largest


@pytest.mark.parametrize("row", published("heads.csv"), ids=lambda row: f"{row['quantity']}-{row['inputs']}")
def test_published_value(row: dict[str, str]) -> None:
    assert looked_up(row["quantity"], row["inputs"]) == Decimal(row["value"])


@pytest.mark.parametrize(
    "row", published("package_differences.csv"), ids=lambda row: f"{row['quantity']}-{row['inputs']}"
)
def test_where_the_package_differs(row: dict[str, str]) -> None:
    expected = Decimal(row["published"]) if row["published"] else None
    assert looked_up(row["quantity"], row["inputs"]) == expected != Decimal(row["value"])
    assert row["reason"]


@pytest.mark.parametrize(
    ("designation", "largest", "smallest", "bearing", "source"),
    [
        # From memory of the named standards.
        ("#10-32 SHCS", ".312", ".303", ".303", "ASME B18.3"),
        ("1/4-20 SHCS", ".375", ".365", ".365", "ASME B18.3"),
        ("3/8-16 SHCS", ".562", ".550", ".550", "ASME B18.3"),
        ("1/4-20 BHCS", ".437", ".419", ".419", "ASME B18.3"),
        ("1/4-20 FHCS", ".531", ".480", ".480", "ASME B18.3"),
        ("3/8-16 HEX HEAD BOLT", ".650", ".551", ".50625", "ASME B18.2.1"),
        ("#8-32 PAN HEAD", ".322", ".306", ".306", "ASME B18.6.3"),
        ("#8-32 FILLISTER HEAD", ".270", ".250", ".250", "ASME B18.6.3"),
        ("M6 ISO 4762", "10", "9.78", "9.38", "ISO 4762"),
        ("M12 ISO 4762", "18", "17.73", "17.23", "ISO 4762"),
        ("M5 ISO 7380-1", "9.5", "9.14", "8.74", "ISO 7380-1"),
        ("M10 ISO 4017", "18.48", "15.73", "14.63", "ISO 4014 and ISO 4017"),
        ("M30 ISO 4014", "53.12", "45", "42.75", "ISO 4014 and ISO 4017"),
        ("M4 ISO 10642", "8.96", "7.53", "7.53", "ISO 10642"),
        ("M6 SHCS with washer", "12", "11.57", "11.57", "ISO 7089"),
    ],
)
def test_what_bears_on_the_part(
    designation: str, largest: str, smallest: str, bearing: str, source: str
) -> None:
    seat = seat_of(parse_fastener(designation))
    assert seat is not None
    found = (seat.largest, seat.smallest, seat.bearing, seat.source)
    assert found == (Decimal(largest), Decimal(smallest), Decimal(bearing), source)


@pytest.mark.parametrize(
    "designation", ["M6", "5/16 STUD", "M8 SET SCREW", "M7 SHCS", "⌀6 m6 dowel pin", "#12 SHCS"]
)
def test_no_head_is_guessed(designation: str) -> None:
    assert seat_of(parse_fastener(designation)) is None


def test_a_head_is_plain_unless_knurled_is_said() -> None:
    """ISO 4762: 10 plain, 10.22 knurled."""
    for words, expected in [("M6 SHCS", "10"), ("M6 SHCS knurled", "10.22")]:
        fastener = parse_fastener(words)
        seat = seat_of(fastener)
        assert seat is not None
        assert room_for(seat, fastener.knurled) == Decimal(expected)


def test_the_inch_standard_has_one_column_for_both() -> None:
    seat = head_size(Head.SOCKET_CAP, Decimal(".25"), Unit.INCH)
    assert seat is not None
    assert room_for(seat, knurled=True) == Decimal(".375")


def heads() -> list[tuple[str, Head, HeadSize]]:
    found = []
    for table in _TABLES:
        for row in read_table(table):
            head = Head(row["head"])
            size = head_size(head, *diameter_of(f"screw={row['size']}"))
            assert size is not None
            found.append((row["size"], head, size))
    return found


def test_every_head_is_larger_than_its_screw_and_its_limits_stand_in_order() -> None:
    """A slip of a digit would break the order; bearing faces may be smaller than the head, not larger."""
    for name, _, size in heads():
        diameter, _ = diameter_of(f"screw={name}")
        assert diameter < size.bearing <= size.smallest < size.largest, name
        assert size.knurled is None or size.knurled > size.largest, name


def test_heads_grow_with_their_screws() -> None:
    by_table: dict[tuple[Head, Unit], list[Decimal]] = {}
    for _, head, size in heads():
        by_table.setdefault((head, size.unit), []).append(size.smallest)
    exceptions = {(Head.FILLISTER, Unit.INCH)}  # ASME B18.6.3 has .590 at 3/8 and .589 at 7/16
    for key, sizes in by_table.items():
        assert key in exceptions or sizes == sorted(set(sizes)), key


def test_corners_of_a_hexagon_follow_from_its_flats() -> None:
    """Across corners = across flats / cos 30°, to the last place printed."""
    for name, head, size in heads():
        if head is Head.HEX:
            assert size.flats is not None
            assert abs(float(size.largest) - float(size.flats) / cos(pi / 6)) < 0.01, name


@pytest.mark.parametrize(
    ("diameter", "unit", "expected"),
    [
        # ASME B18.8.2 and ISO 8734, from memory of the published tables.
        (".25", Unit.INCH, PinLimits(Decimal(".2503"), Decimal(".2501"), "ASME B18.8.2")),
        (".1875", Unit.INCH, PinLimits(Decimal(".1878"), Decimal(".1876"), "ASME B18.8.2")),
        ("6", Unit.MM, PinLimits(Decimal("6.012"), Decimal("6.004"), "ISO 8734")),
        ("10", Unit.MM, PinLimits(Decimal("10.015"), Decimal("10.006"), "ISO 8734")),
        ("20", Unit.MM, PinLimits(Decimal("20.021"), Decimal("20.008"), "ISO 8734")),
        ("7", Unit.MM, None),
        (".3", Unit.INCH, None),
    ],
)
def test_dowel_pins(diameter: str, unit: Unit, expected: PinLimits | None) -> None:
    assert dowel_limits(Decimal(diameter), unit) == expected
