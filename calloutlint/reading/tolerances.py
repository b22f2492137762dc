"""The `tolerances` and `process` lines of a title block."""

import re
from collections.abc import Iterable
from dataclasses import dataclass, field, replace

from calloutlint.callouts.value import parse_value
from calloutlint.model.drawing import GeneralTolerances, PlacesTolerance, Process
from calloutlint.model.values import Value
from calloutlint.reading import tolerance_forms as forms
from calloutlint.reading.tolerance_words import (
    ADOPTED,
    FILLER,
    PROFILE,
    UNCHECKED,
    decimal_points,
    spelled,
)
from calloutlint.units import Unit

MOST_PLACES = 6

_COUNTS = {"one": 1, "two": 2, "three": 3, "four": 4}
_SEPARATOR = re.compile(r"[,;|]")


def read_general_tolerances(written: str, unit: Unit | None) -> GeneralTolerances:
    """General tolerances by decimal places or ISO 2768 class, with the angular one.

    An amount without a unit of its own is in `unit`. A bare `±0.2` holds for every number of places and for
    fractions, a bare `±1°` for angles. Standards that are not tabulated are in `unchecked`, what is not
    understood is in `unread`.
    """
    found = ToleranceLines(unit)
    found.read(written)
    return found.general


def read_process(written: str, unit: Unit | None) -> Process | None:
    """The stated spread `location 0.05, size 0.02`; None where neither can be read."""
    text = decimal_points(written)
    matches = forms.PROCESS.finditer(text)
    found = {match["what"].lower(): _length(match, unit) for match in matches}
    location, size = found.get("location") or found.get("position"), found.get("size")
    return Process(text, location, size) if location or size else None


@dataclass(slots=True)
class ToleranceLines:
    """The `tolerances` lines of one sheet, each read alone; what is stated first holds."""

    unit: Unit | None
    written: list[str] = field(default_factory=list)
    unread: list[str] = field(default_factory=list)
    unchecked: list[str] = field(default_factory=list)
    places: list[PlacesTolerance] = field(default_factory=list)
    fractions: Value | None = None
    angle: Value | None = None
    linear: str | None = None
    geometrical: str | None = None

    @property
    def general(self) -> GeneralTolerances:
        """What all lines read so far state together."""
        return GeneralTolerances(
            written=", ".join(self.written),
            places=tuple(self.places),
            angle=self.angle,
            iso_2768=self.linear,
            iso_2768_2=self.geometrical,
            unread=tuple(self.unread),
            fractions=self.fractions,
            unchecked=tuple(self.unchecked),
        )

    def read(self, written: str) -> tuple[str, ...]:
        """Takes one line in; what of it is not understood."""
        text = decimal_points(spelled(written))
        self.written.append(text)
        known = len(self.unread)
        for clause in _SEPARATOR.split(PROFILE.sub(self._not_tabulated, text)):
            self._read_clause(clause)
        return tuple(self.unread[known:])

    def _read_clause(self, clause: str) -> None:
        rest = forms.ISO_2768.sub(self._iso_2768_class, ADOPTED.sub(" ", clause))
        rest = UNCHECKED.sub(self._not_tabulated, rest)
        if "±" in rest:
            rest = self._without_amounts(rest)
        rest = FILLER.sub(";", rest)
        pieces = [piece for part in rest.split(";") if (piece := part.strip(" :/-()").rstrip(". "))]
        alone = all(forms.BARE_ANGLE.fullmatch(piece) or forms.BARE.fullmatch(piece) for piece in pieces)
        for piece in pieces:
            if alone:
                self._for_all(piece)
            else:
                self._refused(piece)

    def _without_amounts(self, rest: str) -> str:
        for pattern, take in (
            (forms.RANGES, self._not_tabulated),
            (forms.ANGLES_BY_PLACES, self._not_tabulated),
            (forms.ANGLES, self._for_angles),
            (forms.BENDS, lambda match: ";"),
            (forms.FRACTIONS, self._for_fractions),
            (forms.IN_WORDS, self._for_counted_places),
            (forms.PLACES, self._for_written_places),
            (forms.DECIMALS, self._for_decimals),
        ):
            rest = pattern.sub(take, rest)
        return rest

    def _iso_2768_class(self, match: re.Match[str]) -> str:
        linear = match["linear"] and match["linear"][0].lower()
        geometrical = match["geometrical"] and match["geometrical"].upper()
        if not (linear or geometrical) or (linear and self.linear) or (geometrical and self.geometrical):
            return match[0]
        self.linear, self.geometrical = linear or self.linear, geometrical or self.geometrical
        return ";"

    def _refused(self, written: str) -> str:
        self.unread.append(written.strip())
        return ";"

    def _not_tabulated(self, match: re.Match[str]) -> str:
        self.unchecked.append(match[0].strip())
        return ";"

    def _for_angles(self, match: re.Match[str]) -> str:
        if self.angle or not (match["degrees"] or match["minutes"]):
            return self._refused(match[0])
        self.angle = _angle(match)
        return ";"

    def _for_fractions(self, match: re.Match[str]) -> str:
        if self.fractions:
            return self._refused(match[0])
        self.fractions = _length(match, self.unit)
        return ";"

    def _for_counted_places(self, match: re.Match[str]) -> str:
        count = match["count"].lower()
        return self._add((_COUNTS.get(count) or int(count),), match)

    def _for_written_places(self, match: re.Match[str]) -> str:
        return self._add((len(match["places"] or ""),), match)

    def _for_decimals(self, match: re.Match[str]) -> str:
        return self._add(range(MOST_PLACES + 1), match)

    def _for_all(self, piece: str) -> None:
        """Takes an amount that stands alone: in degrees for angles, else for all other sizes."""
        if (match := forms.BARE_ANGLE.fullmatch(piece)) is not None:
            self._for_angles(match)
        elif (match := forms.BARE.fullmatch(piece)) is not None:
            self._add(range(MOST_PLACES + 1), match)
            self.fractions = self.fractions or _length(match, self.unit)

    def _add(self, places: Iterable[int], match: re.Match[str]) -> str:
        amount = _length(match, self.unit)
        self.places += [PlacesTolerance(number, amount) for number in places]
        return ";"


def _length(match: re.Match[str], unit: Unit | None) -> Value:
    own = match["unit"]
    return parse_value(match["amount"], (Unit.MM if own.lower() == "mm" else Unit.INCH) if own else unit)


def _angle(match: re.Match[str]) -> Value:
    degrees, minutes, seconds = match["degrees"], match["minutes"], match["seconds"]
    if degrees and "/" in degrees:
        fraction = parse_value(degrees, Unit.DEGREE)
        return replace(fraction, text=f"{fraction.text}°")
    marked = ((degrees, "°"), (minutes, "'"), (seconds, '"'))
    return parse_value("".join(f"{number}{mark}" for number, mark in marked if number), Unit.DEGREE)
