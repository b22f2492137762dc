"""Reading pins: `⌀6 m6 dowel pin`, `⌀.2500 +.0003 -.0000 DOWEL`, `ISO 8734 - 6 x 30`."""

import re

from calloutlint.callouts.value import parse_value
from calloutlint.model.size import Deviations, FitCode, Limits, PlusMinus, Size, SizeForm
from calloutlint.model.values import Value
from calloutlint.units import Unit

_NUMBER = r"(?:\d+[ -])?\d+/(?:2|4|8|16|32|64)(?!\d)|\d*\.\d+|\d+"
_AMOUNT = r"\d*\.\d+|\d+"
_PIN = re.compile(
    rf"(?P<sign>⌀\s*)?(?<![A-Za-z0-9.])(?P<size>{_NUMBER})(?P<unit>\s*(?:mm\b|\"|in\b\.?))?"
    rf"(?:\s*[-–/]\s*(?P<limit>\d*\.\d+))?"
    rf"(?:\s*(?P<letters>[a-z]{{1,2}})(?P<grade>0?1[0-8]?|[02-9])(?![\d.]))?"
    rf"(?:\s*(?:±|\+/-)\s*(?P<equal>{_AMOUNT})"
    rf"|\s*\(?(?P<upper>[+-]\s*(?:{_AMOUNT})|0(?=\s*/))\s*/?\s*(?P<lower>[+-]\s*(?:{_AMOUNT})|0(?![\d.]))\)?)?"
)
_LENGTH = re.compile(rf"(?<![A-Za-z])x\s*(?P<length>{_NUMBER})", re.IGNORECASE)


def find_pin(text: str, standard: str | None, default: Unit | None) -> tuple[Size | None, Value | None]:
    """Diameter and length of a pin in a designation, spellings already folded; None for what is not there.

    They are in the unit that the spelling shows, else in `default`.
    """
    match = next((m for m in _PIN.finditer(text) if m["sign"]), None) or _PIN.search(text)
    if match is None:
        return None, None
    unit = _unit(match, standard) or default
    length = _LENGTH.search(text, match.end())
    return _size(match, unit), parse_value(length["length"], unit) if length else None


def _size(match: re.Match[str], unit: Unit | None) -> Size | None:
    nominal = parse_value(match["size"], unit)
    if nominal.amount <= 0:
        return None
    fit = FitCode(match["letters"], match["grade"]) if match["letters"] else None
    if match["limit"]:
        limits = Limits(nominal, parse_value(match["limit"], unit))
        return Size(SizeForm.DIAMETER, None, limits, fit)
    return Size(SizeForm.DIAMETER, nominal, _tolerance(match, unit), fit)


def _tolerance(match: re.Match[str], unit: Unit | None) -> PlusMinus | Deviations | None:
    if match["equal"]:
        return PlusMinus(parse_value(match["equal"], unit))
    if match["upper"]:
        return Deviations(parse_value(match["upper"], unit), parse_value(match["lower"], unit))
    return None


def _unit(match: re.Match[str], standard: str | None) -> Unit | None:
    """The unit that a pin's spelling shows: a mark, a fraction, a bare point, a fit code, its standard."""
    mark = (match["unit"] or "").strip().lower()
    if mark == "mm" or match["letters"] or (standard or "").startswith(("ISO", "DIN", "EN")):
        return Unit.MM
    if mark or "/" in match["size"] or match["size"].startswith(".") or (standard or "").startswith("ASME"):
        return Unit.INCH
    return None
