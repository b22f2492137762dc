"""The `tolerances` and `process` lines of a title block."""

import re
from collections.abc import Iterable, Iterator
from dataclasses import dataclass, field

from calloutlint.callouts.value import parse_value
from calloutlint.model.drawing import GeneralTolerances, PlacesTolerance, Process
from calloutlint.model.values import Value
from calloutlint.units import Unit

MOST_PLACES = 6

_SPELLINGS = (
    (re.compile(r"%%p|\\U\+00B1|<MOD-PM>|\+\s*/\s*-|\+-", re.IGNORECASE), "±"),
    (re.compile(r"%%d|\\U\+00B0|<MOD-DEG>|(?<=\d)\s*(?:degrees?|degs?)\b\.?|º|˚", re.IGNORECASE), "°"),
    (re.compile(r"[′’]"), "'"),
    (re.compile(r"[″”]"), '"'),
    (re.compile(r"[‐‑–−]"), "-"),
)
_COUNTS = {"one": 1, "two": 2, "three": 3, "four": 4}
_NUMBER = r"(?:(?:\d+\s+)?\d+/[1-9]\d*|\d*\.\d+|\d+\.?(?!/))"
_UNIT = r"(?:\s*(?P<unit>mm|in(?:ch(?:es)?)?\b\.?|\"))?"
_AMOUNT = rf"[\s=:]*±\s*(?P<amount>{_NUMBER}){_UNIT}"
_ANGLE = r"[\s=:]*±\s*(?:(?P<degrees>\d*\.?\d+)\s*(?:°|(?!['\d])))?\s*(?:(?P<minutes>\d+)\s*')?"

_ISO_2768 = re.compile(
    r"""
    (?:(?:DIN|EN|BS|NF)[\s-]+){0,3} ISO\s*2768
    (?:\s*-\s*[12](?!\d))? (?:\s*:\s*\d{4})? \s*-?\s*
    (?P<linear>fine|medium|coarse|very\ coarse|[fmcv])? \s*
    (?P<geometrical>[HKL])?
    (?:\s*-\s*E)? \b                                  # E: the envelope requirement of ISO 2768-2
    """,
    re.IGNORECASE | re.VERBOSE,
)
_ANGLES = re.compile(rf"(?:angles?|angular|ang\b\.?|∠){_ANGLE}", re.IGNORECASE)
_PLACES = re.compile(
    rf"(?<![\w.])(?:[X0]{{0,4}}\.(?P<places>X{{1,6}}|0{{1,6}})|X{{1,4}}|0)(?![\w.]){_AMOUNT}", re.IGNORECASE
)
_PLACE_WORD = r"(?:pl(?:aces?|cs?)?|decimals?|dec|dims?)\b\.?"
_IN_WORDS = re.compile(
    rf"(?P<count>\d|one|two|three|four)[\s-]*{_PLACE_WORD}(?:\s*{_PLACE_WORD})*{_AMOUNT}", re.IGNORECASE
)
_FRACTIONS = re.compile(rf"fraction(?:s|al)?\b{_AMOUNT}", re.IGNORECASE)
_ANY = re.compile(_AMOUNT, re.IGNORECASE)
_FILLER = re.compile(
    r"""
    \bunless\ otherwise\ (?:specified|stated|noted|indicated|shown)\b | \buos\b
    | \b(?:general|tolerances?|tols?|linear|decimals?|dimensions?|dims?|sizes?)\b\.?
    | \b(?:and|are|in\ inch(?:es)?|in\ mm|on|per|to)\b
    | \bISO\s*8015(?!\d)                                # a principle, no tolerance
    """,
    re.IGNORECASE | re.VERBOSE,
)
_SEPARATOR = re.compile(r"[,;|]")
_PROCESS = re.compile(rf"(?P<what>location|position|size)[\s=:]*(?P<amount>{_NUMBER}){_UNIT}", re.IGNORECASE)


def read_general_tolerances(written: str, unit: Unit | None) -> GeneralTolerances:
    """General tolerances by decimal places or ISO 2768 class, with the angular one.

    An amount without a unit of its own is in `unit`. A bare `±0.2` holds for every number of places, one for
    fractions for sizes without decimals. What is not understood is in `unread`.
    """
    found = ToleranceLines(unit)
    found.read(written)
    return found.general


def read_process(written: str, unit: Unit | None) -> Process | None:
    """The stated spread `location 0.05, size 0.02`; None where neither can be read."""
    text = decimal_points(written)
    matches = _PROCESS.finditer(text)
    found = {match["what"].lower(): _length(match, unit) for match in matches}
    location, size = found.get("location") or found.get("position"), found.get("size")
    return Process(text, location, size) if location or size else None


@dataclass(slots=True)
class ToleranceLines:
    """The `tolerances` lines of one sheet, each read alone; what is stated first holds."""

    unit: Unit | None
    written: list[str] = field(default_factory=list)
    unread: list[str] = field(default_factory=list)
    places: list[PlacesTolerance] = field(default_factory=list)
    angle: Value | None = None
    linear: str | None = None
    geometrical: str | None = None

    @property
    def general(self) -> GeneralTolerances:
        """What all lines read so far state together."""
        written = ", ".join(self.written)
        places, unread = tuple(self.places), tuple(self.unread)
        return GeneralTolerances(written, places, self.angle, self.linear, self.geometrical, unread)

    def read(self, written: str) -> tuple[str, ...]:
        """Takes one line in; what of it is not understood."""
        text = decimal_points(_spelled(written))
        self.written.append(text)
        unread = tuple(piece for clause in _SEPARATOR.split(text) for piece in self._read_clause(clause))
        self.unread += unread
        return unread

    def _read_clause(self, rest: str) -> Iterator[str]:
        for pattern, take in (
            (_ISO_2768, self._iso_2768_class),
            (_ANGLES, self._angle_tolerance),
            (_FRACTIONS, self._for_fractions),
            (_IN_WORDS, self._for_counted_places),
            (_PLACES, self._for_written_places),
            (_ANY, self._for_all_places),
            (_FILLER, lambda match: ";"),
        ):
            rest = pattern.sub(take, rest)
        yield from (piece for part in rest.split(";") if (piece := part.strip(" :/-()")))

    def _iso_2768_class(self, match: re.Match[str]) -> str:
        linear = match["linear"] and match["linear"][0].lower()
        geometrical = match["geometrical"] and match["geometrical"].upper()
        if not (linear or geometrical) or (linear and self.linear) or (geometrical and self.geometrical):
            return match[0]
        self.linear, self.geometrical = linear or self.linear, geometrical or self.geometrical
        return ";"

    def _angle_tolerance(self, match: re.Match[str]) -> str:
        degrees, minutes = match["degrees"], match["minutes"]
        if self.angle or not (degrees or minutes):
            return match[0]
        text = (f"{degrees}°" if degrees else "") + (f"{minutes}'" if minutes else "")
        self.angle = parse_value(text, Unit.DEGREE)
        return ";"

    def _for_fractions(self, match: re.Match[str]) -> str:
        return self._add((0,), match)

    def _for_counted_places(self, match: re.Match[str]) -> str:
        count = match["count"].lower()
        return self._add((_COUNTS.get(count) or int(count),), match)

    def _for_written_places(self, match: re.Match[str]) -> str:
        return self._add((len(match["places"] or ""),), match)

    def _for_all_places(self, match: re.Match[str]) -> str:
        return self._add(range(MOST_PLACES + 1), match)

    def _add(self, places: Iterable[int], match: re.Match[str]) -> str:
        amount = _length(match, self.unit)
        self.places += [PlacesTolerance(number, amount) for number in places]
        return ";"


def _length(match: re.Match[str], unit: Unit | None) -> Value:
    own = match["unit"]
    return parse_value(match["amount"], (Unit.MM if own.lower() == "mm" else Unit.INCH) if own else unit)


def _spelled(written: str) -> str:
    for spelling, canonical in _SPELLINGS:
        written = spelling.sub(canonical, written)
    return " ".join(written.split())


def decimal_points(text: str) -> str:
    """The text with a point for every decimal comma: between two digits, or in `X,X`."""
    return re.sub(r"(?<=\d),(?=\d)|(?<=[Xx]),(?=[Xx])", ".", text)
