"""Which diameter and pitch the Unified thread series have."""

import re
from collections.abc import Mapping
from decimal import Decimal
from functools import cache
from typing import NamedTuple

from calloutlint.trade.inches import nominal_size
from calloutlint.trade.tables import read_table

COARSE, FINE, EXTRA_FINE, CONSTANT, SPECIAL = "UNC", "UNF", "UNEF", "UN", "UNS"

_SPELLING = re.compile(r"(?P<pitch>\d{0,2})U?N(?P<root>J?R?)(?P<kind>C|F|EF|S|)")
_KINDS = {"C": COARSE, "F": FINE, "EF": EXTRA_FINE, "S": SPECIAL, "": CONSTANT}
_CONSTANT_PITCHES_TO = Decimal("1.5")


class Series(NamedTuple):
    """The threads per inch of one nominal size; None where a series does not have the size."""

    coarse: Decimal | None
    fine: Decimal | None
    extra_fine: Decimal | None
    constant: tuple[Decimal, ...]

    def of(self, series: str) -> tuple[Decimal, ...]:
        """Threads per inch of the size in a series, `UNC`, `UNF`, `UNEF` or `UN`."""
        if series == CONSTANT:
            return self.constant
        only = {COARSE: self.coarse, FINE: self.fine, EXTRA_FINE: self.extra_fine}[series]
        return () if only is None else (only,)


def plain_series(written: str) -> str | None:
    """The series of a spelling without its root form: `UNJF`, `UNRF`, `NF` are `UNF`; `8UN` is `UN`.

    None for what is no Unified series.
    """
    match = _SPELLING.fullmatch(written.upper().replace("-", "").replace(" ", ""))
    return _KINDS[match["kind"]] if match else None


def series_has(diameter: Decimal, tpi: Decimal | None, series: str) -> bool | None:
    """Whether a Unified series has a diameter (inches) with a number of threads per inch.

    Without `tpi`, whether the series has the diameter at all. None where any pitch will do or it is not
    known: UNS, no series stated, constant pitches above 1 1/2 in. Source: ASME B1.1.
    """
    plain = plain_series(series)
    if plain is None or plain == SPECIAL:
        return None
    if plain == CONSTANT and diameter > _CONSTANT_PITCHES_TO:
        return None
    size = nominal_size(diameter)
    listed = all_series().get(size.name) if size else None
    pitches = listed.of(plain) if listed else ()
    return bool(pitches) if tpi is None else tpi in pitches


def standard_series(diameter: Decimal, tpi: Decimal) -> str | None:
    """The series that a diameter and threads per inch belong to, the first of coarse, fine, extra-fine, UN."""
    return next((s for s in (COARSE, FINE, EXTRA_FINE, CONSTANT) if series_has(diameter, tpi, s)), None)


def only_tpi(diameter: Decimal, series: str) -> Decimal | None:
    """Threads per inch where the series fixes them: `1/4 UNC` has 20. None otherwise."""
    size, plain = nominal_size(diameter), plain_series(series)
    listed = all_series().get(size.name) if size else None
    if listed is None or plain not in {COARSE, FINE, EXTRA_FINE}:
        return None
    return next(iter(listed.of(plain)), None)


@cache
def all_series() -> Mapping[str, Series]:
    """Series by nominal size name, `#0` to `4`. Source: ASME B1.1."""
    return {row["size"]: _series(row) for row in read_table("unified_series")}


def _series(row: Mapping[str, str]) -> Series:
    coarse, fine, extra_fine = (
        Decimal(row[column]) if row[column] else None for column in ("coarse", "fine", "extra_fine")
    )
    return Series(coarse, fine, extra_fine, tuple(Decimal(tpi) for tpi in row["constant"].split()))
