"""Published clearance holes: ASME B18.2.8 for inch and metric fasteners, ISO 273 for metric ones."""

from bisect import bisect_left, bisect_right
from collections.abc import Mapping
from decimal import Decimal
from enum import StrEnum
from functools import cache, lru_cache
from typing import NamedTuple

from calloutlint.trade.drills import drill_diameter
from calloutlint.trade.inches import ROUNDED, named_size, nominal_size
from calloutlint.trade.tables import read_table
from calloutlint.units import MM_PER_INCH, Unit, convert


class ClearanceFit(StrEnum):
    """ASME B18.2.8's names; ISO 273 calls the same three fine, medium and coarse."""

    CLOSE = "close"
    NORMAL = "normal"
    LOOSE = "loose"


_FITS = tuple(ClearanceFit)
_NORMAL_FIRST = (ClearanceFit.NORMAL, ClearanceFit.CLOSE, ClearanceFit.LOOSE)


class ClearanceHole(NamedTuple):
    """One published hole: what it is drilled with, and its least and largest diameter.

    `drill` is the exact drill of an inch hole, and the least diameter of a metric one. The least diameter of
    an inch hole is that drill rounded to three places.
    """

    drill: Decimal
    minimum: Decimal
    maximum: Decimal


class ClearanceSizes(NamedTuple):
    """The three published holes of a fastener, lengths in `unit`; `size` is the fastener's, `1/4`, `M6`."""

    size: str
    diameter: Decimal
    unit: Unit
    holes: tuple[ClearanceHole, ClearanceHole, ClearanceHole]
    source: str

    @property
    def close(self) -> Decimal:
        """Published close (fine) hole."""
        return self.holes[0].minimum

    @property
    def normal(self) -> Decimal:
        """Published normal (medium) hole."""
        return self.holes[1].minimum

    @property
    def loose(self) -> Decimal:
        """Published loose (coarse) hole."""
        return self.holes[2].minimum

    @property
    def span(self) -> tuple[Decimal, Decimal]:
        """Nominals from close to loose; an inch hole may be written as its drill rounded to three places."""
        slack = ROUNDED if self.unit is Unit.INCH else Decimal(0)
        return self.holes[0].drill - slack, self.holes[2].drill + slack

    def hole(self, fit: ClearanceFit) -> ClearanceHole:
        """The published hole of one fit."""
        return self.holes[_FITS.index(fit)]


class ClearanceMatch(NamedTuple):
    """A fastener that a hole is published for, and the fit that it makes there."""

    sizes: ClearanceSizes
    fit: ClearanceFit


def clearance_sizes(diameter: Decimal, unit: Unit) -> ClearanceSizes | None:
    """Published clearance holes of a fastener by its nominal diameter in its own unit; None if not listed.

    Sources: ASME B18.2.8 Table 1 (inch, #0 to 1 1/2); ISO 273 (mm, M1 to M100).
    """
    if unit is Unit.INCH:
        size = nominal_size(diameter)
        return _inch_table().get(size.name) if size else None
    return _metric_table().get(diameter)


def assumed_range(diameter: Decimal, unit: Unit) -> tuple[Decimal, Decimal] | None:
    """Smallest and largest hole nominal that is taken for a fastener's clearance hole, in `unit`.

    None where the fastener is not listed. See `ClearanceSizes.span`.
    """
    sizes = clearance_sizes(diameter, unit)
    return sizes.span if sizes else None


@lru_cache(maxsize=1024)
def fasteners_for(nominal: Decimal, unit: Unit) -> tuple[ClearanceMatch, ...]:
    """Fasteners for which a hole nominal is a published size: normal fits first, then close, then loose.

    Fasteners of the drawing's own unit; those of the other unit only where there is none.
    """
    own, other = (Unit.INCH, Unit.MM) if unit is Unit.INCH else (Unit.MM, Unit.INCH)
    return _matches(nominal, unit, own) or _matches(nominal, unit, other)


def is_published(nominal: Decimal, unit: Unit) -> bool:
    """Whether a hole nominal is a published clearance size of any fastener."""
    return bool(fasteners_for(nominal, unit))


def _matches(nominal: Decimal, unit: Unit, table: Unit) -> tuple[ClearanceMatch, ...]:
    wanted, slack, drills = convert(nominal, unit, table), _slack(unit, table), _drills(table)
    found = _by_drill(table)[bisect_left(drills, wanted - slack) : bisect_right(drills, wanted + slack)]
    return tuple(sorted(found, key=lambda match: _NORMAL_FIRST.index(match.fit)))


def _drill(match: ClearanceMatch) -> Decimal:
    return match.sizes.hole(match.fit).drill


def _slack(unit: Unit, table: Unit) -> Decimal:
    """Inch sizes are rounded to three places on drawings and in conversion; metric ones are exact."""
    if table is Unit.INCH:
        return ROUNDED
    return ROUNDED * MM_PER_INCH if unit is Unit.INCH else Decimal(0)


@cache
def _by_drill(unit: Unit) -> tuple[ClearanceMatch, ...]:
    sizes = (_inch_table() if unit is Unit.INCH else _metric_table()).values()
    return tuple(sorted((ClearanceMatch(each, fit) for each in sizes for fit in ClearanceFit), key=_drill))


@cache
def _drills(unit: Unit) -> tuple[Decimal, ...]:
    return tuple(_drill(match) for match in _by_drill(unit))


@cache
def _inch_table() -> dict[str, ClearanceSizes]:
    table = (_sizes(row, row["screw"], "ASME B18.2.8") for row in read_table("clearance_inch"))
    return {sizes.size: sizes for sizes in table}


@cache
def _metric_table() -> dict[Decimal, ClearanceSizes]:
    table = (_sizes(row, row["thread"], "ISO 273") for row in read_table("clearance_metric"))
    return {sizes.diameter: sizes for sizes in table}


def _sizes(row: Mapping[str, str], size: str, source: str) -> ClearanceSizes:
    close, normal, loose = (_hole(row, fit) for fit in ClearanceFit)
    if size.startswith("M"):
        return ClearanceSizes(size, Decimal(size[1:]), Unit.MM, (close, normal, loose), source)
    named = named_size(size)
    assert named is not None, f"clearance_inch.csv: {size} is no Unified size"
    return ClearanceSizes(size, named.diameter, Unit.INCH, (close, normal, loose), source)


def _hole(row: Mapping[str, str], fit: ClearanceFit) -> ClearanceHole:
    least, largest = Decimal(row[f"{fit}_min"]), Decimal(row[f"{fit}_max"])
    name = row.get(f"{fit}_drill")
    drill = drill_diameter(name) if name else least
    assert drill is not None, f"clearance_inch.csv: {name} is no stock drill"
    return ClearanceHole(drill, least, largest)
