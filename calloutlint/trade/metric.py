"""ISO metric screw threads: their pitches (ISO 261) and limits of size (ISO 724, ISO 965-1). All in mm."""

import re
from collections.abc import Mapping
from decimal import Decimal
from functools import cache, lru_cache
from typing import NamedTuple

from calloutlint.trade import metric_tolerances
from calloutlint.trade.tables import read_table
from calloutlint.trade.thread_form import INTERNAL_CREST, UNJ_CREST, ThreadForm, ThreadLimits
from calloutlint.units import Unit

_PLACES = Decimal("0.001")
_FINER_PITCHES = tuple(Decimal(p) for p in ("3", "2", "1.5", "1", "0.75", "0.5", "0.35", "0.25", "0.2"))
_CLASS = re.compile(r"(?P<pitch>[3-9][a-zA-Z])(?P<crest>[3-9][a-zA-Z])?")
_EXTERNAL = frozenset("efgh")
_INTERNAL = frozenset("GH")
_MAJOR_GRADES = frozenset({4, 6, 8})
_INTERNAL_GRADES = frozenset({4, 5, 6, 7, 8})


class Pitches(NamedTuple):
    """The pitches of one diameter, mm; `coarse` is None where the standard gives fine ones only."""

    coarse: Decimal | None
    fine: tuple[Decimal, ...]


@cache
def pitches() -> Mapping[Decimal, Pitches]:
    """Pitches by nominal diameter, M1 to M64. Source: ISO 261, Table 2."""
    return {Decimal(row["diameter"]): _pitches(row) for row in read_table("metric_pitches")}


def coarse_pitch(diameter: Decimal) -> Decimal | None:
    """Coarse pitch of a nominal diameter, mm; None where ISO 261 gives none."""
    listed = pitches().get(diameter)
    return listed.coarse if listed else None


def series_has(diameter: Decimal, pitch: Decimal | None) -> bool | None:
    """Whether ISO 261 has a diameter with a pitch; no pitch means the coarse one. None above M64.

    Besides those listed for a diameter the standard admits finer pitches out of 3, 2, 1.5, 1, 0.75, 0.5,
    0.35, 0.25 and 0.2 where they are needed.
    """
    listed = pitches().get(diameter)
    if listed is None:
        return None if diameter > max(pitches()) else False
    if pitch is None:
        return listed.coarse is not None
    if pitch == listed.coarse or pitch in listed.fine:
        return True
    return pitch < min(listed.fine) and pitch in _FINER_PITCHES


def is_plausible_pitch(diameter: Decimal, number: Decimal) -> bool:
    """Whether a number after `M10 x` is its pitch, not its length: at most the coarse one, or a third."""
    return number <= max(coarse_pitch(diameter) or Decimal(0), diameter / 3)


def thread(diameter: Decimal, pitch: Decimal | None = None, series: str = "M") -> ThreadForm | None:
    """A metric thread; without a pitch the coarse one, and None where ISO 261 has no coarse pitch for it."""
    stated = coarse_pitch(diameter) if pitch is None else pitch
    if stated is None:
        return None
    crest = UNJ_CREST if "J" in series else INTERNAL_CREST
    return ThreadForm(f"M{diameter:f}", series, Unit.MM, diameter, stated, diameter - crest * stated)


@lru_cache(maxsize=256)
def limits(form: ThreadForm, class_: str) -> ThreadLimits | None:
    """Limits of a metric thread for a class such as 6g, 4g6g, 6H, 4H5H; None for what ISO 965-1 has not.

    A class of one group holds for pitch and crest diameter alike. Basic diameters are rounded to 0.001
    before tolerances are applied. Sources: ISO 724, ISO 965-1.
    """
    match = _CLASS.fullmatch(class_)
    if match is None or metric_tolerances.deviation(form.pitch, "h") is None:
        return None
    pitch_class, crest_class = match["pitch"], match["crest"] or match["pitch"]
    letters = {pitch_class[1], crest_class[1]}
    if letters <= _EXTERNAL:
        return _external(form, class_, pitch_class, crest_class)
    return _internal(form, class_, pitch_class, crest_class) if letters <= _INTERNAL else None


def _external(form: ThreadForm, class_: str, pitch_class: str, crest_class: str) -> ThreadLimits | None:
    below_pitch = metric_tolerances.deviation(form.pitch, pitch_class[1])
    below_major = metric_tolerances.deviation(form.pitch, crest_class[1])
    tolerance = metric_tolerances.pitch_diameter(form.diameter, form.pitch, int(pitch_class[0]), internal=False)
    grade = int(crest_class[0])
    if below_pitch is None or below_major is None or tolerance is None or grade not in _MAJOR_GRADES:
        return None
    major_max = form.diameter - below_major
    pitch_max = form.pitch_diameter.quantize(_PLACES) - below_pitch
    return ThreadLimits(
        class_=class_,
        internal=False,
        major_max=major_max,
        major_min=major_max - metric_tolerances.major(form.pitch, grade),
        pitch_max=pitch_max,
        pitch_min=pitch_max - tolerance,
        minor_max=form.minor.quantize(_PLACES) - below_pitch,
        minor_min=None,
    )


def _internal(form: ThreadForm, class_: str, pitch_class: str, crest_class: str) -> ThreadLimits | None:
    above_pitch = metric_tolerances.deviation(form.pitch, pitch_class[1])
    above_minor = metric_tolerances.deviation(form.pitch, crest_class[1])
    tolerance = metric_tolerances.pitch_diameter(form.diameter, form.pitch, int(pitch_class[0]), internal=True)
    grade = int(crest_class[0])
    known = {grade, int(pitch_class[0])} <= _INTERNAL_GRADES
    if above_pitch is None or above_minor is None or tolerance is None or not known:
        return None
    pitch_min = form.pitch_diameter.quantize(_PLACES) + above_pitch
    minor_min = form.minor.quantize(_PLACES) + above_minor
    controlled_root = "J" in form.series
    return ThreadLimits(
        class_=class_,
        internal=True,
        major_max=None,
        major_min=form.diameter + above_pitch,
        pitch_max=pitch_min + tolerance,
        pitch_min=pitch_min,
        minor_max=None if controlled_root else minor_min + metric_tolerances.minor(form.pitch, grade),
        minor_min=minor_min,
    )


def _pitches(row: Mapping[str, str]) -> Pitches:
    coarse = Decimal(row["coarse"]) if row["coarse"] else None
    return Pitches(coarse, tuple(Decimal(pitch) for pitch in row["fine"].split()))
