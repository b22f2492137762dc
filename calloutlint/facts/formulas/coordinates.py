"""Coordinates and diametral zones of location, one turned into the other. Lengths are in one unit."""

from decimal import Decimal


def diametral(x: Decimal, y: Decimal) -> Decimal:
    """The diametral zone that ±x, ±y just reaches, or the deviation of an axis found x, y off: 2√(x² + y²).

    Source: plane geometry, the usual conversion of coordinates to a position tolerance (common practice, no
    source). To 28 digits; exact where the root is.
    """
    return 2 * (x * x + y * y).sqrt()


def coordinate(zone: Decimal) -> Decimal:
    """The equal ± tolerance on both coordinates that stays inside a diametral zone: zone / (2√2).

    Source as for `diametral`. To 28 digits. ValueError for a negative zone.
    """
    if zone < 0:
        raise ValueError(f"a zone cannot be negative: {zone}")
    return (zone * zone / 8).sqrt()
