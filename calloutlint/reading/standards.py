"""The `standard` and `units` lines of a title block."""

import re

from calloutlint.model.drawing import Standard, System
from calloutlint.units import Unit

ASME_EDITIONS = (1973, 1982, 1994, 2009, 2018)
"""Editions of Y14.5 that carry a year on drawings: ANSI Y14.5-1973 and Y14.5M-1982, ASME since 1994."""

_YEAR = r"(?P<year>(?:19|20)\d\d|\d\d)"
_ASME = re.compile(
    rf"""
    (?:\b|(?<=ASME)|(?<=ANSI)) Y\s*14\.5 (?!\.?\d)     # not Y14.5.1, Y14.41
    \s*M?
    (?:[\s:,'’–‑-]*{_YEAR}\b)?
    """,
    re.IGNORECASE | re.VERBOSE,
)
_ISO = re.compile(
    rf"""
    (?: \bISO(?:[\s/-]*(?:TS|TR))?[\s-]* (?:1101|1660|2692|5458|5459|8015|14405|14638|17450|22081)(?:-\d)?
      | \bISO[\s-]*GPS\b
      | \bBS[\s-]*8888                                # the British standard that adopts ISO GPS
    )
    (?!\d) (?:\s*[:–‑-]\s*{_YEAR}\b)?
    | ^\s*ISO\s*$
    """,
    re.IGNORECASE | re.VERBOSE,
)
_UNITS = (
    (Unit.INCH, re.compile(r"\binch(?:es)?\b|\bin\b(?!\s+(?:mm|milli|inch|metric))", re.IGNORECASE)),
    (Unit.MM, re.compile(r"\b(?:mm|millimet(?:re|er)s?|metric)\b", re.IGNORECASE)),
)


def read_standard(written: str) -> Standard:
    """The standard that a title block states; `system` is None where it is unknown or names both systems."""
    asme, iso = _ASME.search(written), _ISO.search(written)
    if asme and not iso:
        edition = _full_year(asme["year"])
        known = edition is None or edition in ASME_EDITIONS
        return Standard(written, System.ASME if known else None, edition if known else None)
    if iso and not asme:
        return Standard(written, System.ISO, _full_year(iso["year"]))
    return Standard(written)


def read_unit(written: str) -> Unit | None:
    """The unit named first in the text, as dual dimensioned drawings state theirs; None where none is."""
    found = [(match.start(), unit) for unit, word in _UNITS if (match := word.search(written))]
    return min(found)[1] if found else None


def _full_year(year: str | None) -> int | None:
    if year is None or len(year) == 4:
        return int(year) if year else None
    return int(year) + (1900 if int(year) > 50 else 2000)
