"""Which standards and editions a rule holds for."""

import re
from collections.abc import Iterable
from typing import NamedTuple

from calloutlint.model.drawing import Standard, System

EDITIONS = {System.ASME: (1982, 1994, 2009, 2018), System.ISO: (None,)}
FORMS = "ASME Y14.5, ASME Y14.5-2018, ASME Y14.5-2009 and later, ASME Y14.5-1994 and earlier, or ISO GPS"
_FORM = re.compile(r"(?P<system>ASME Y14\.5|ISO GPS)(-(?P<year>\d{4})( and (?P<side>later|earlier))?)?")


class Holding(NamedTuple):
    """One entry of `holds`: a system, and the editions from `first` to `last` where they are limited."""

    system: System
    first: int | None = None
    last: int | None = None

    def covers(self, system: System, edition: int | None) -> bool:
        """Whether a drawing to this edition is under the rule; None stands for no certain edition."""
        if system is not self.system:
            return False
        if edition is None:
            return self.first is None and self.last is None
        return (self.first or edition) <= edition <= (self.last or edition)


def holding(text: str) -> Holding:
    """One entry of `holds`.

    Raises:
        ValueError: it is in none of the known forms, or an edition that the standard does not have.
    """
    found = _FORM.fullmatch(text)
    if found is None:
        raise ValueError(f"'{text}' is no standard that rules know: expected {FORMS}")
    system, side = System(found["system"]), found["side"]
    if found["year"] is None:
        return Holding(system)
    year = int(found["year"])
    if year not in EDITIONS[system]:
        raise ValueError(f"'{text}' names an edition that is not known: expected {_years(system)}")
    return Holding(system, None if side == "earlier" else year, None if side == "later" else year)


def _years(system: System) -> str:
    return ", ".join(str(year) for year in EDITIONS[system] if year) or f"{system} without a year"


def applies(holdings: Iterable[Holding], standard: Standard | None) -> bool:
    """Whether a rule holds under a drawing's standard.

    Where the edition is not stated, it must hold under every edition; where the standard is not known, under
    every edition of every system.
    """
    entries = list(holdings)
    if standard is None or standard.system is None:
        return all(_everywhere(entries, system) for system in System)
    if standard.edition is None:
        return _everywhere(entries, standard.system)
    return any(entry.covers(standard.system, standard.edition) for entry in entries)


def _everywhere(entries: list[Holding], system: System) -> bool:
    return all(any(entry.covers(system, edition) for entry in entries) for edition in EDITIONS[system])
