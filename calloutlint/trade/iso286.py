"""The ISO code system for tolerances on linear sizes: ISO 286-1:2010, nominal sizes to 3150 mm.

A capital letter is a hole, a small one a shaft. Everything is in millimetres and exact: the tables hold
micrometres as published, and nothing is computed by a formula that the standard rounds.
"""

from decimal import ROUND_FLOOR, Decimal
from typing import NamedTuple

from calloutlint.model.size import FitCode
from calloutlint.trade.tables import read_table

_MM_PER_MICROMETRE = Decimal("0.001")
_NOT_TO_1_MM = frozenset({"a", "b"})
_K_GRADES_WITH_DEVIATION = frozenset({"4", "5", "6", "7"})
_BELOW_ZERO_LINE = frozenset(["a", "b", "c", "cd", "d", "e", "ef", "f", "fg", "g", "h"])
_ABOVE_ZERO_LINE = frozenset(
    ["k", "m", "n", "p", "r", "s", "t", "u", "v", "x", "y", "z", "za", "zb", "zc"],
)
_JS_GRADES_ONCE_ROUNDED = range(7, 12)


class LimitDeviations(NamedTuple):
    """Upper and lower limit deviation from the nominal size, mm."""

    upper: Decimal
    lower: Decimal


def tolerance(nominal_mm: Decimal, grade: str) -> Decimal | None:
    """Standard tolerance of a grade (`01`, `0`, `1` … `18`) in mm; None where ISO 286 has none.

    Source: ISO 286-1:2010, Table 1. IT14 to IT18 are not used for nominal sizes up to 1 mm; IT01 and IT0
    end at 500 mm.
    """
    if nominal_mm <= 1 and grade.isdecimal() and int(grade) >= 14:
        return None
    return _look_up("iso286_grades", nominal_mm, grade)


def exists(nominal_mm: Decimal, code: FitCode) -> bool:
    """Whether ISO 286 has the tolerance class at that nominal size (mm)."""
    return limits(nominal_mm, code) is not None


def limits(nominal_mm: Decimal, code: FitCode) -> LimitDeviations | None:
    """Limit deviations in mm; None where ISO 286 does not have the class, or not at that nominal size.

    Source: ISO 286-1:2010, Tables 1 to 5; the values are those that ISO 286-2:2010 prints.
    """
    width = tolerance(nominal_mm, code.grade)
    if width is None:
        return None
    letters = code.letters.lower()
    if letters == "js":
        return LimitDeviations(width / 2, -width / 2) if code.letters in {"js", "JS"} else None
    if nominal_mm <= 1 and letters in _NOT_TO_1_MM:
        return None
    if code.letters.islower():
        return _shaft(nominal_mm, code, width)
    return _hole(nominal_mm, code, width) if code.letters.isupper() else None


def printed_limits(nominal_mm: Decimal, code: FitCode) -> tuple[LimitDeviations, ...]:
    """Every pair of limit deviations in mm that an edition of ISO 286 prints, the present one first.

    Source: ISO 286-1:1988 let js7 to js11 of an odd tolerance be rounded to the even micrometre below, so
    that drawings carry both ±0.0105 and ±0.010 for 25 js7.
    """
    found = limits(nominal_mm, code)
    if found is None:
        return ()
    if code.letters.lower() != "js" or int(code.grade) not in _JS_GRADES_ONCE_ROUNDED:
        return (found,)
    rounded = found.upper.quantize(_MM_PER_MICROMETRE, ROUND_FLOOR)
    return (found,) if rounded == found.upper else (found, LimitDeviations(rounded, -rounded))


def _shaft(nominal_mm: Decimal, code: FitCode, width: Decimal) -> LimitDeviations | None:
    if code.letters in _BELOW_ZERO_LINE:
        es = _look_up("iso286_shafts", nominal_mm, code.letters)
        return None if es is None else LimitDeviations(upper=es, lower=es - width)
    ei = _lower_of_tight_shaft(nominal_mm, code)
    return None if ei is None else LimitDeviations(upper=ei + width, lower=ei)


def _lower_of_tight_shaft(nominal_mm: Decimal, code: FitCode) -> Decimal | None:
    """Lower deviation ei of shafts j to zc: j is tabulated by grade, k is 0 but for IT4 to IT7."""
    if code.letters == "j":
        return _look_up("iso286_shafts", nominal_mm, f"j{code.grade}")
    if code.letters == "k" and code.grade not in _K_GRADES_WITH_DEVIATION:
        return Decimal(0)
    return _look_up("iso286_shafts", nominal_mm, code.letters) if code.letters in _ABOVE_ZERO_LINE else None


def _hole(nominal_mm: Decimal, code: FitCode, width: Decimal) -> LimitDeviations | None:
    letters = code.letters.lower()
    if letters in _BELOW_ZERO_LINE:
        es = _look_up("iso286_shafts", nominal_mm, letters)
        return None if es is None else LimitDeviations(upper=width - es, lower=-es)
    upper = _upper_of_tight_hole(nominal_mm, letters, code.grade, width)
    return None if upper is None else LimitDeviations(upper=upper, lower=upper - width)


def _upper_of_tight_hole(nominal_mm: Decimal, letters: str, grade: str, width: Decimal) -> Decimal | None:
    """Upper deviation ES of holes J to ZC: J is tabulated by grade.

    The others are the shaft's with the sign changed, plus Δ = IT(n) - IT(n-1) for K, M, N to IT8 and P to ZC
    to IT7, from 3 to 500 mm. Where the tables depart from that is said beside it.
    """
    if letters == "j":
        return _look_up("iso286_holes_j", nominal_mm, f"J{grade}")
    if letters not in _ABOVE_ZERO_LINE:
        return None
    ei = _look_up("iso286_shafts", nominal_mm, letters)
    if ei is None:
        return None
    number = int(grade)
    fine = number <= (8 if letters in {"k", "m", "n"} else 7)
    if letters == "m" and grade == "6" and 250 < nominal_mm <= 315:
        return Decimal("-0.009")  # -9 instead of the -11 that the rule gives
    if fine:
        return _delta(nominal_mm, grade, width) - ei
    if letters == "k" and nominal_mm > 3:
        return None  # K coarser than IT8 is tabulated to 3 mm only
    if letters == "n" and nominal_mm <= 1:
        return None  # N coarser than IT8 is not used to 1 mm
    if letters == "n" and 3 < nominal_mm <= 500:
        return Decimal(0)  # N coarser than IT8 lies below the zero line
    return -ei


def _delta(nominal_mm: Decimal, grade: str, width: Decimal) -> Decimal:
    if not 3 < nominal_mm <= 500 or int(grade) < 3:
        return Decimal(0)
    narrower = tolerance(nominal_mm, str(int(grade) - 1))
    return Decimal(0) if narrower is None else width - narrower


def _look_up(table: str, nominal_mm: Decimal, column: str) -> Decimal | None:
    """Value in mm of the range, over its lower end up to and with its upper, that holds the nominal size."""
    for row in read_table(table):
        if Decimal(row["over"]) < nominal_mm <= Decimal(row["to"]):
            cell = row.get(column)
            return Decimal(cell) * _MM_PER_MICROMETRE if cell else None
    return None
