"""ISO metric screw threads: which pitch goes with which diameter."""

from collections.abc import Mapping
from dataclasses import dataclass
from decimal import Decimal
from functools import cache

from calloutlint.trade.tables import read_table

_FINER_PITCHES = ("3", "2", "1.5", "1", "0.75", "0.5", "0.35", "0.25", "0.2")


@dataclass(frozen=True, slots=True)
class Pitches:
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
    return pitch < min(listed.fine) and pitch in {Decimal(p) for p in _FINER_PITCHES}


def is_plausible_pitch(diameter: Decimal, number: Decimal) -> bool:
    """Whether a number after `M10 x` is its pitch, not its length: at most the coarse one, or a third."""
    return number <= max(coarse_pitch(diameter) or Decimal(0), diameter / 3)


def _pitches(row: Mapping[str, str]) -> Pitches:
    coarse = Decimal(row["coarse"]) if row["coarse"] else None
    return Pitches(coarse, tuple(Decimal(pitch) for pitch in row["fine"].split()))
