"""Tolerances and deviations of ISO metric threads, by the formulas of ISO 965-1. All in millimetres.

A grade-6 value is computed by its formula and rounded to the R40 series of preferred numbers. The other
grades are whole steps of that series away, four steps a grade; the pitch diameter of an internal thread is
five steps above that of the external one.
"""

from decimal import Decimal
from functools import cache
from itertools import pairwise

from calloutlint.trade.tables import read_table

_MM = Decimal("0.001")
_R40 = tuple(
    Decimal(number)
    for number in (
        *(100, 106, 112, 118, 125, 132, 140, 150, 160, 170, 180, 190, 200, 212, 224, 236, 250, 265, 280, 300),
        *(315, 335, 355, 375, 400, 425, 450, 475, 500, 530, 560, 600, 630, 670, 710, 750, 800, 850, 900, 950),
    )
)
_STEPS_A_DECADE = len(_R40)
_STEPS_A_GRADE = 4
_INTERNAL_STEPS = 5
_DIAMETERS = ("0.99", "1.4", "2.8", "5.6", "11.2", "22.4", "45", "90")
_FINE_PITCH_TO = Decimal("0.8")


def major(pitch: Decimal, grade: int) -> Decimal:
    """Td of an external major diameter: 180 ∛P² - 3.15/√P µm at grade 6. Source: ISO 965-1."""
    micrometres = 180 * pitch ** (Decimal(2) / 3) - Decimal("3.15") / pitch.sqrt()
    return _graded(_printed("major", pitch) or micrometres, grade)


def minor(pitch: Decimal, grade: int) -> Decimal:
    """TD1 of an internal minor diameter at grade 6, µm. Source: ISO 965-1.

    433 P - 190 P^1.22 to P = 0.8, above it 230 P^0.7.
    """
    if pitch <= _FINE_PITCH_TO:
        micrometres = 433 * pitch - 190 * pitch ** Decimal("1.22")
    else:
        micrometres = 230 * pitch ** Decimal("0.7")
    return _graded(_printed("minor", pitch) or micrometres, grade)


def pitch_diameter(diameter: Decimal, pitch: Decimal, grade: int, internal: bool) -> Decimal | None:
    """Td2 or TD2: at grade 6 external 90 P^0.4 d^0.1 µm, d the geometric mean of the range of diameters.

    None below and above the ranges (0.99 to 90 mm). Source: ISO 965-1.
    """
    found = _range_of(diameter)
    if found is None:
        return None
    over, to = found
    micrometres = 90 * pitch ** Decimal("0.4") * (over * to).sqrt() ** Decimal("0.1")
    grade_six = _printed("pitch", pitch, over) or micrometres
    return _graded(grade_six, grade, _INTERNAL_STEPS if internal else 0)


def deviation(pitch: Decimal, letter: str) -> Decimal | None:
    """Fundamental deviation of a tolerance position: below basic for e to h, above it for G and H.

    None where the standard has no such pitch or no such position. Source: ISO 965-1, Table 1.
    """
    row = next((row for row in read_table("metric_deviations") if Decimal(row["pitch"]) == pitch), None)
    if row is None:
        return None
    micrometres = "0" if letter in {"h", "H"} else row.get(letter.replace("G", "g"))
    return Decimal(micrometres) * _MM if micrometres else None


def _graded(grade_six: Decimal, grade: int, steps: int = 0) -> Decimal:
    """A grade-6 value in µm at another grade, in mm."""
    return _preferred(_nearest_step(grade_six) + (grade - 6) * _STEPS_A_GRADE + steps) * _MM


def _nearest_step(micrometres: Decimal) -> int:
    """Place of a value in R40, counted from 100."""
    return int((micrometres.log10() * _STEPS_A_DECADE).to_integral_value()) - 2 * _STEPS_A_DECADE


def _preferred(step: int) -> Decimal:
    """A number of R40 by its place, whole micrometres as the tables print them."""
    decade, place = divmod(step, _STEPS_A_DECADE)
    return (_R40[place].scaleb(decade)).quantize(Decimal(1))


@cache
def _printed(quantity: str, pitch: Decimal, over: Decimal | None = None) -> Decimal | None:
    for row in read_table("metric_tolerances"):
        same_range = not row["over"] or Decimal(row["over"]) == over
        if row["quantity"] == quantity and Decimal(row["pitch"]) == pitch and same_range:
            return Decimal(row["value"])
    return None


def _range_of(diameter: Decimal) -> tuple[Decimal, Decimal] | None:
    bounds = [Decimal(bound) for bound in _DIAMETERS]
    return next(((over, to) for over, to in pairwise(bounds) if over < diameter <= to), None)
