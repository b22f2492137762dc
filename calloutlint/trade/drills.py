"""Stock twist drills, what they are called, and how closely a drilled hole holds its size."""

from bisect import bisect_left
from collections.abc import Iterator, Mapping
from decimal import Decimal
from functools import cache
from typing import NamedTuple

from calloutlint.trade.inches import ROUNDED, fraction_name, inches
from calloutlint.trade.tables import read_table
from calloutlint.units import Unit, convert

CONVERTED = Decimal("0.00005")
"""In inches: a size this close to a drill of the other unit is that drill, converted."""


class Drill(NamedTuple):
    """A stock drill: its trade name (`#7`, `F`, `17/64`, `6.8`) and its diameter in `unit`."""

    name: str
    diameter: Decimal
    unit: Unit


class DrilledTolerance(NamedTuple):
    """How far a drilled hole may come out larger and smaller than its drill, both as positive amounts."""

    plus: Decimal
    minus: Decimal


@cache
def stock_drills(unit: Unit) -> tuple[Drill, ...]:
    """All stock drills of a unit, inch (fraction, number, letter) or mm, smallest first.

    Sources: ASME B94.11M (inch), ISO 235 (mm).
    """
    found = {drill.diameter: drill for drill in _stepped(unit)}
    if unit is Unit.INCH:
        for row in read_table("drills"):
            diameter = Decimal(row["diameter"])
            found.setdefault(diameter, Drill(row["name"], diameter, unit))
    return tuple(found[diameter] for diameter in sorted(found))


def drill_diameter(name: str) -> Decimal | None:
    """Inches of a drill called by number, letter or fraction: `#7`, `NO. 7`, `F`, `17/64`; None if unknown."""
    spelled = name.strip().upper().removesuffix(" DRILL").removesuffix('"').strip()
    if "/" in spelled:
        return next((d.diameter for d in stock_drills(Unit.INCH) if d.name == spelled), None)
    number = spelled.removeprefix("NO").removeprefix("#").strip(". ")
    key = f"#{int(number)}" if number.isascii() and number.isdigit() else spelled.removeprefix("LETTER ")
    return _named().get(key)


def is_stock(diameter: Decimal, unit: Unit) -> bool:
    """Whether a nominal diameter is that of a stock drill.

    An inch diameter may be rounded to three places. A drill of the other unit counts where the diameter is
    plainly its conversion, to four places of an inch.
    """
    if unit is Unit.INCH:
        slack, other = ROUNDED, Unit.MM
    else:
        slack, other = Decimal(0), Unit.INCH
    if _has_drill(diameter, unit, slack):
        return True
    return _has_drill(convert(diameter, unit, other), other, convert(CONVERTED, Unit.INCH, other))


def next_larger_stock(diameter: Decimal, unit: Unit) -> Drill | None:
    """The smallest stock drill of a unit that is not smaller than `diameter`; None above the largest."""
    drills, place = stock_drills(unit), _place(diameter, unit)
    return drills[place] if place < len(drills) else None


def next_fitting_drill(least: Decimal, unit: Unit) -> Drill | None:
    """The smallest stock drill whose hole, drilled as small as usual, is not smaller than `least`.

    None beyond stock or outside the table of drilled tolerances.
    """
    for drill in stock_drills(unit)[_place(least, unit) :]:
        tolerance = drilled_tolerance(drill.diameter, unit)
        if tolerance is None:
            return None
        if drill.diameter - tolerance.minus >= least:
            return drill
    return None


def drilled_tolerance(diameter: Decimal, unit: Unit) -> DrilledTolerance | None:
    """Usual tolerance of a drilled hole, in `unit`; None outside the table (.0135 to 2 in).

    Source: AND10387, Holes - Drilled, Tolerances; in mm its values rounded to 0.01.
    """
    size = convert(diameter, unit, Unit.INCH)
    return next((tolerance for over, to, tolerance in _drilled(unit) if over < size <= to), None)


@cache
def _drilled(unit: Unit) -> tuple[tuple[Decimal, Decimal, DrilledTolerance], ...]:
    """The sizes in inches over and up to which a tolerance in `unit` holds, and the tolerance."""
    rows = read_table("drilled_tolerances")
    return tuple((Decimal(row["over"]), Decimal(row["to"]), _tolerance(row, unit)) for row in rows)


def _tolerance(row: Mapping[str, str], unit: Unit) -> DrilledTolerance:
    return DrilledTolerance(*(_rounded(Decimal(row[side]), unit) for side in ("plus", "minus")))


def _rounded(amount: Decimal, unit: Unit) -> Decimal:
    return amount if unit is Unit.INCH else convert(amount, Unit.INCH, unit).quantize(Decimal("0.01"))


def _place(diameter: Decimal, unit: Unit) -> int:
    return bisect_left(_diameters(unit), diameter)


@cache
def _diameters(unit: Unit) -> tuple[Decimal, ...]:
    return tuple(drill.diameter for drill in stock_drills(unit))


def _has_drill(diameter: Decimal, unit: Unit, slack: Decimal) -> bool:
    drill = next_larger_stock(diameter - slack, unit)
    return drill is not None and drill.diameter <= diameter + slack


@cache
def _named() -> dict[str, Decimal]:
    return {row["name"]: Decimal(row["diameter"]) for row in read_table("drills")}


def _stepped(unit: Unit) -> Iterator[Drill]:
    for row in read_table("drill_steps"):
        if row["unit"] == unit:
            start, stop, step = (inches(row[column]) for column in ("from", "to", "step"))
            for count in range(int((stop - start) / step) + 1):
                diameter = (start + count * step).normalize()
                yield Drill(_step_name(diameter, unit), diameter, unit)


def _step_name(diameter: Decimal, unit: Unit) -> str:
    return fraction_name(diameter) if unit is Unit.INCH else f"{diameter:f}"
