"""Hole, position and lengths as they are given to `fit`: callout text, in inch or mm as it shows."""

import re
from dataclasses import dataclass
from decimal import Decimal

from calloutlint.callouts.fastener import parse_fastener
from calloutlint.callouts.parse import parse_callout
from calloutlint.callouts.value import parse_value
from calloutlint.errors import CalloutlintError
from calloutlint.model.callout import Unread, Words
from calloutlint.model.fastener import Fastener
from calloutlint.model.frame import Characteristic, Frame, Zone
from calloutlint.model.size import Size
from calloutlint.units import Unit

HOLE_FORM = "a size with its limits, such as '⌀6.6 +0.15/0', '.279-.288' or '6.6 H13'"
POSITION_FORM = "a position tolerance, such as '⌀0.3 Ⓜ' or '⌀.014 (M)'"
FASTENER_FORM = "a screw or a pin, such as 'M6 ISO 4762', '.250-20 UNC-2A' or '⌀6 m6 dowel pin'"
LENGTH_FORM = "a length, such as '12', '.50' or '12 mm'"

_MARKS = (
    (Unit.MM, re.compile(r"(?<![A-Za-z])mm\b", re.IGNORECASE)),
    (Unit.INCH, re.compile(r"(?<=[\d.\s])(?:in|inch|inches)\b\.?|\"", re.IGNORECASE)),
)
_HABITS = (
    (Unit.INCH, re.compile(r"(?<![\d.,])\.\d|\d/(?:2|4|8|16|32|64)(?!\d)")),
    (Unit.MM, re.compile(r"(?<![\d.])0[.,]\d")),
)


@dataclass(frozen=True, slots=True)
class Position:
    """A position tolerance as read; its lengths are in `unit`."""

    zone: Zone
    unit: Unit


def unit_shown(text: str) -> Unit | None:
    """The unit that a text shows: by a mark, else by how its numbers below one are written; else None."""
    for unit, pattern in (*_MARKS, *_HABITS):
        if pattern.search(text):
            return unit
    return None


def read_fastener(text: str, default: Unit | None) -> Fastener:
    """The fastener that a text names.

    Raises:
        CalloutlintError: it is none that is understood.
    """
    fastener = parse_fastener(text, default)
    if fastener.thread is None and fastener.pin is None:
        raise CalloutlintError(f"--fastener: '{text}' is not understood. Expected is {FASTENER_FORM}.")
    return fastener


def read_hole(text: str, default: Unit) -> Size:
    """The size of a hole, with limits.

    Raises:
        CalloutlintError: it is no size, or it states no limits.
    """
    unit = unit_shown(text) or default
    parts = parse_callout([_unmarked(text)], unit)
    sizes = [part for part in parts if isinstance(part, Size) and not part.doubtful]
    if not sizes or any(isinstance(part, Unread) for part in parts):
        raise CalloutlintError(f"--hole: '{text}' is not understood. Expected is {HOLE_FORM}.")
    if sizes[0].tolerance is None and sizes[0].fit is None:
        raise CalloutlintError(f"--hole: '{text}' has no tolerance. Expected is {HOLE_FORM}.")
    return sizes[0]


def read_position(option: str, text: str, default: Unit) -> Position:
    """The tolerance compartment of a position, given alone or as a whole frame.

    Raises:
        CalloutlintError: it is none, or it has no value.
    """
    unit = unit_shown(text) or default
    bare = _unmarked(text)
    parts = parse_callout([bare], unit)
    if not any(isinstance(part, Frame) for part in parts):
        parts = parse_callout([f"⌖ | {bare}"], unit)
    frames = [part for part in parts if isinstance(part, Frame)]
    others = [part for part in parts if isinstance(part, Unread | Words)]
    zone = frames[0].segments[0].zone if frames else None
    misread = len(frames) != 1 or frames[0].segments[0].characteristic is not Characteristic.POSITION
    if misread or others or zone is None or zone.value is None or frames[0].segments[0].doubtful:
        raise CalloutlintError(f"{option}: '{text}' is not understood. Expected is {POSITION_FORM}.")
    if zone.value.amount < 0:
        raise CalloutlintError(f"{option}: '{text}' is negative. Expected is {POSITION_FORM}.")
    return Position(zone, unit)


def read_length(option: str, text: str, default: Unit) -> tuple[Decimal, Unit]:
    """A length and its unit.

    Raises:
        CalloutlintError: it is no number, or a negative one.
    """
    unit = unit_shown(text) or default
    try:
        value = parse_value(_unmarked(text).replace(",", "."), unit)
    except ValueError:
        raise CalloutlintError(f"{option}: '{text}' is not understood. Expected is {LENGTH_FORM}.") from None
    if value.unit is Unit.DEGREE or value.amount < 0:
        raise CalloutlintError(f"{option}: '{text}' is no length. Expected is {LENGTH_FORM}.")
    return value.amount, unit


def _unmarked(text: str) -> str:
    for _, pattern in _MARKS:
        text = pattern.sub("", text)
    return " ".join(text.split())
