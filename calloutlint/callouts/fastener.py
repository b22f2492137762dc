"""Reading fastener designations: `1/4-20 UNC-2A x .75 SHCS`, `ISO 4762 - M6 x 20`, `⌀6 m6 dowel pin`."""

import re
from dataclasses import dataclass
from decimal import Decimal
from functools import lru_cache

from calloutlint.callouts import fastener_words as words
from calloutlint.callouts.pin import find_pin
from calloutlint.callouts.value import number_value, parse_value
from calloutlint.model.fastener import Fastener
from calloutlint.model.thread import Thread, ThreadSystem
from calloutlint.model.values import Value
from calloutlint.trade.inches import is_number_size
from calloutlint.trade.metric import is_plausible_pitch, series_has
from calloutlint.units import Unit

LONGEST_DESIGNATION = 200
_SPELLINGS = (
    (r"[×✕*]", "x"),
    (r"[″”“]|''", '"'),
    (r"[–—−]", "-"),
    (r"[Øø⌀∅]|%%[cC]|\bDIAM?(?:ETER)?\b\.?", "⌀"),
    (r"(?<=\d),(?=\d)", "."),
    (r"^\s*(?:\(\d+\)|\d+\s*[xX](?=\s|#|M)|QTY\.?\s*\d+)\s*", ""),
)
_FRACTIONS = {"¼": "1/4", "½": "1/2", "¾": "3/4", "⅛": "1/8", "⅜": "3/8", "⅝": "5/8", "⅞": "7/8"}
_FRACTION = r"\d{1,2}/(?:2|4|8|16|32|64)(?!\d)"
_LENGTH = rf"(?P<length>\d+[ -]{_FRACTION}|{_FRACTION}|\d*\.\d+|\d+)"
_METRIC = re.compile(r"(?<![A-Za-z0-9.])(?P<series>MJ?)\s?(?P<size>\d+(?:\.\d+)?)(?![\d/])", re.IGNORECASE)
_METRIC_NUMBER = re.compile(r"\s*x\s*P?\s*(?P<number>\d+(?:\.\d+)?)(?:\s*mm\b)?", re.IGNORECASE)
_METRIC_DASHED = re.compile(r"\s*-\s*(?P<number>\d+(?:\.\d+)?)(?![\da-zA-Z.])")
_METRIC_CLASS = re.compile(r"\s*-?\s*(?P<class>(?:\d[a-hE-H]){1,2})(?![A-Za-z0-9.])")
_INCH = re.compile(
    r"(?<![A-Za-z0-9./-])(?:(?:#|NO\.?\s*|NUMBER\s+)(?P<number>\d{1,2})"
    rf"|(?P<size>\d[ -]{_FRACTION}|{_FRACTION}|\d?\.\d{{1,4}}|\d{{1,2}}))(?![\d/.])"
    r"(?P<mark>\s*(?:\"|IN(?:CH)?\b\.?))?"
    r"(?:\s*-\s*(?P<tpi>\d{1,2}(?:\.5)?)(?![\d./]))?",
    re.IGNORECASE,
)
_SERIES = re.compile(
    r"[\s-]*(?P<series>(?:\d{1,2}\s*-?\s*)?UNJ?R?(?:C|F|EF|S)?|N(?:C|F|EF|S))(?![A-Z])(?P<class>[\s-]*[1-5][AB]?G?\b)?"
    r"|[\s-]+(?P<bare>[123][AB])\b",
    re.IGNORECASE,
)
_INCH_LENGTH = re.compile(rf"\s*x\s*{_LENGTH}", re.IGNORECASE)
_SAID_LENGTH = (
    re.compile(rf"(?<![\d./-]){_LENGTH}\s*(?:\"|MM|IN\.?)?\s*(?:LG|LONG|LENGTH)\b", re.IGNORECASE),
    re.compile(rf"(?<=[\sA-Z])x\s*{_LENGTH}", re.IGNORECASE),
)
_LEFT_HAND = re.compile(r"\bLH\b|\bLEFT[ -]HAND", re.IGNORECASE)


@dataclass(frozen=True, slots=True)
class _Found:
    thread: Thread | None = None
    length: Value | None = None


@lru_cache(maxsize=1024)
def parse_fastener(text: str, unit: Unit | None = None) -> Fastener:
    """The fastener that a designation names; never raises.

    A designation that is not understood, or longer than any is, has neither `thread` nor `pin`. A thread's
    diameter is the basic major diameter in inches or mm; a pitch that is not written stays None. `unit` is the
    drawing's: a pin is in it unless its own spelling shows another.
    """
    folded = " ".join(text.split())
    if len(folded) > LONGEST_DESIGNATION:
        return Fastener(folded)
    standard, rest = words.standard_in(_spelled(folded))
    if words.is_otherwise_sized(rest):
        return Fastener(folded, head=words.head_in(rest, standard), standard=standard)
    found, pin = _Found(), None
    if not words.names_pin(rest, standard):
        found = _find_thread(rest)
    if found.thread is None and ("⌀" in rest or words.names_pin(rest, standard)):
        pin, length = find_pin(rest, standard, unit)
        found = _Found(None, length)
    return Fastener(
        text=folded,
        thread=found.thread,
        pin=pin,
        head=words.head_in(rest, standard),
        standard=standard,
        length=found.length,
        knurled="KNURL" in folded.upper(),
        washer=words.has_washer(folded),
    )


def _spelled(text: str) -> str:
    for symbol, fraction in _FRACTIONS.items():
        text = re.sub(rf"\s*{symbol}", f" {fraction}", text)
    for pattern, symbol in _SPELLINGS:
        text = re.sub(pattern, symbol, text, flags=re.IGNORECASE)
    return text


def _find_thread(text: str) -> _Found:
    metric = _METRIC.search(text)
    if metric:
        return _metric(metric, text)
    screw = words.names_screw(text)
    found = (_inch(match, text, screw) for match in _INCH.finditer(text))
    return next((one for one in found if one.thread), _Found())


def _metric(match: re.Match[str], text: str) -> _Found:
    size = parse_value(match["size"], Unit.MM)
    pitch, class_, length = _metric_tail(size.amount, text, match.end())
    thread = Thread(
        ThreadSystem.METRIC,
        size=f"M{size.text}",
        diameter=size,
        series=match["series"].upper(),
        pitch=pitch,
        class_=class_,
        left_hand=bool(_LEFT_HAND.search(text)),
    )
    return _Found(thread, length or _said_length(text, Unit.MM))


def _metric_tail(size: Decimal, text: str, place: int) -> tuple[Value | None, str | None, Value | None]:
    """Pitch, class and length after `M8`: `x1.25-6g x 30`, `-1.25 x 30`, ` x 30`."""
    pitch, class_, length = None, None, None
    dashed = _METRIC_DASHED.match(text, place)
    if dashed and series_has(size, Decimal(dashed["number"])):
        pitch, place = parse_value(dashed["number"], Unit.MM), dashed.end()
    while found := (_METRIC_CLASS.match(text, place) or _METRIC_NUMBER.match(text, place)):
        place = found.end()
        if "class" in found.re.groupindex:
            class_ = found["class"]
            continue
        value = parse_value(found["number"], Unit.MM)
        if pitch is None and length is None and is_plausible_pitch(size, value.amount):
            pitch = value
        else:
            length = value
    return pitch, class_, length


def _inch(match: re.Match[str], text: str, screw: bool) -> _Found:
    series = _SERIES.match(text, match.end())
    end = series.end() if series else match.end()
    length = _INCH_LENGTH.match(text, end)
    size = _inch_size(match, named=bool(series) or screw or _stands_alone(match, text))
    if size is None:
        return _Found()
    name, diameter = size
    thread = Thread(
        ThreadSystem.UNIFIED,
        size=name,
        diameter=diameter,
        series=re.sub(r"[\s-]", "", series["series"]).upper() if series and series["series"] else "",
        tpi=parse_value(match["tpi"], None) if match["tpi"] else None,
        class_=_unified_class(series) if series else None,
        left_hand=bool(_LEFT_HAND.search(text)),
    )
    return _Found(thread, parse_value(length["length"], Unit.INCH) if length else _said_length(text, Unit.INCH))


def _unified_class(series: re.Match[str]) -> str | None:
    return (series["class"] or series["bare"] or "").strip(" -").upper() or None


def _inch_size(match: re.Match[str], named: bool) -> tuple[str, Value] | None:
    """Name and basic major diameter, where a pitch or a word says that this number is a thread size.

    A whole number without a pitch needs an inch mark besides. With a symbol of a diameter before it, a size
    without a pitch is a plain bolt.
    """
    written = (match["size"] or "").replace("-", " ")
    if not (match["tpi"] or (named and not match.string[: match.start()].rstrip().endswith("⌀"))):
        return None
    numbered = match["tpi"] and written.isdecimal() and is_number_size(int(written), Decimal(match["tpi"]))
    number = match["number"] or (written if numbered else None)
    if number is not None:
        diameter = number_value(int(number))
        return None if diameter is None else (f"#{int(number)}", diameter)
    told = match["tpi"] or match["mark"] or not written.isdecimal()
    return (written, parse_value(written, Unit.INCH)) if told else None


def _stands_alone(match: re.Match[str], text: str) -> bool:
    """Whether the designation is only the size, its length aside."""
    length = _INCH_LENGTH.match(text, match.end())
    rest = text[: match.start()] + text[length.end() if length else match.end() :]
    return not rest.strip(" ;,-")


def _said_length(text: str, unit: Unit) -> Value | None:
    match = next((found for pattern in _SAID_LENGTH if (found := pattern.search(text))), None)
    return parse_value(match["length"], unit) if match else None
