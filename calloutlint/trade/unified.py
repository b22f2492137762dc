"""Limits of size of Unified screw threads, by the formulas of ASME B1.1 and B1.15. All in inches.

Rounding follows the examples of ASME B1.1: allowance and limits to four places; the minor diameter of
classes 1B and 2B to three places from #6 up; its largest value goes by four places first.
"""

from decimal import Decimal
from functools import lru_cache

from calloutlint.trade import unified_series
from calloutlint.trade.inches import inches, named_size, nominal_size
from calloutlint.trade.thread_form import INTERNAL_CREST, UNJ_CREST, ThreadForm, ThreadLimits
from calloutlint.units import Unit

_ROOTS = {"J": Decimal("1.15470053837925"), "R": Decimal("1.19078493020361")}
_PLACES = Decimal("0.0001")
_THREE_PLACES = Decimal("0.001")
_NUMBER_SIX = Decimal("0.138")
_QUARTER = Decimal("0.25")
_FOUR_TPI = Decimal("0.25")
_COARSER_THAN_13 = Decimal(1) / 13
_TWO_THIRDS = Decimal(2) / 3
_PITCH_FACTOR = {
    "1A": Decimal("1.5"),
    "2A": Decimal(1),
    "3A": Decimal("0.75"),
    "1B": Decimal("1.95"),
    "2B": Decimal("1.3"),
    "3B": Decimal("0.975"),
}
_ENGAGED_OVER_DIAMETER = frozenset({unified_series.COARSE, unified_series.FINE})
_ENGAGED_OVER_DIAMETER_TO_TPI = 8
_ENGAGED_PITCHES = 9


def thread(size: str | Decimal, tpi: Decimal, series: str = "") -> ThreadForm:
    """A Unified thread by its size (`#10`, `1/4`, `.250`, or a diameter in inches), threads per inch, series.

    Without a series it is given the one that has this diameter and pitch, or else UNS.

    Raises:
        ValueError: the size is no size.
    """
    diameter, name = _diameter(size)
    pitch = 1 / tpi
    named = series.upper() or unified_series.standard_series(diameter, tpi) or unified_series.SPECIAL
    crest = UNJ_CREST if "J" in named else INTERNAL_CREST
    return ThreadForm(name, named, Unit.INCH, diameter, pitch, diameter - crest * pitch)


@lru_cache(maxsize=256)
def limits(form: ThreadForm, class_: str) -> ThreadLimits | None:
    """Limits of a Unified thread for class 1A, 2A, 3A, 1B, 2B or 3B; None for any other.

    Source: ASME B1.1, formulas for limits of size; ASME B1.15 for UNJ.
    """
    if class_ not in _PITCH_FACTOR:
        return None
    return _internal(form, class_) if class_.endswith("B") else _external(form, class_)


def pitch_diameter_tolerance(form: ThreadForm, class_: str) -> Decimal:
    """Tolerance on pitch diameter, inches, to six places.

    Class 2A: Td2 = 0.0015 ∛D + 0.0015 √LE + 0.015 ∛P²; the other classes are multiples of it. The length of
    engagement LE is D for UNC, UNF, 4-UN, 6-UN and 8-UN, else 9 P. Source: ASME B1.1.
    """
    class_2a = (
        Decimal("0.0015") * _cube_root(form.diameter)
        + Decimal("0.0015") * _engagement(form).sqrt()
        + Decimal("0.015") * _pitch_two_thirds(form)
    )
    return (class_2a * _PITCH_FACTOR[class_]).quantize(Decimal("0.000001"))


def allowance(form: ThreadForm, class_: str) -> Decimal:
    """Distance of the largest external thread from basic: 0.3 Td2 of class 2A for 1A and 2A, none for 3A."""
    if class_ == "3A":
        return Decimal(0)
    return (Decimal("0.3") * pitch_diameter_tolerance(form, "2A").quantize(_PLACES)).quantize(_PLACES)


def major_tolerance(form: ThreadForm, class_: str) -> Decimal:
    """Tolerance on the external major diameter: 0.06 ∛P², for class 1A 0.09 ∛P². Source: ASME B1.1."""
    return (Decimal("0.09") if class_ == "1A" else Decimal("0.06")) * _pitch_two_thirds(form)


def minor_tolerance(form: ThreadForm, class_: str) -> Decimal:
    """Tolerance on the internal minor diameter, inches. Source: ASME B1.1.

    0.05 ∛P² + 0.03 P/D - 0.002, at most 0.394 P, and at least 0.25 P - 0.4 P² (1B, 2B), 0.23 P - 1.5 P² (3B,
    13 threads per inch and finer) or 0.12 P (3B, coarser). Classes 1B and 2B from 1/4 in up have
    0.25 P - 0.4 P² itself, and 0.15 P where coarser than 4 threads per inch.
    """
    pitch = form.pitch
    if class_ == "3B":
        finest = Decimal("0.23") * pitch - Decimal("1.5") * pitch**2
        least = Decimal("0.12") * pitch if pitch > _COARSER_THAN_13 else finest
    elif pitch > _FOUR_TPI:
        return Decimal("0.15") * pitch
    else:
        least = Decimal("0.25") * pitch - Decimal("0.4") * pitch**2
        if form.diameter >= _QUARTER:
            return least
    by_engagement = Decimal("0.03") * pitch / form.diameter
    small = Decimal("0.05") * _pitch_two_thirds(form) + by_engagement - Decimal("0.002")
    return max(least, min(small, Decimal("0.394") * pitch))


def _external(form: ThreadForm, class_: str) -> ThreadLimits:
    major_max = form.diameter - allowance(form, class_)
    pitch_max = (major_max - (form.diameter - form.pitch_diameter)).quantize(_PLACES)
    root = _ROOTS["J"] if "J" in form.series else _ROOTS["R"] if "UNR" in form.series else INTERNAL_CREST
    return ThreadLimits(
        class_=class_,
        internal=False,
        major_max=major_max.quantize(_PLACES),
        major_min=(major_max - major_tolerance(form, class_)).quantize(_PLACES),
        pitch_max=pitch_max,
        pitch_min=(pitch_max - pitch_diameter_tolerance(form, class_)).quantize(_PLACES),
        minor_max=(major_max - root * form.pitch).quantize(_PLACES),
        minor_min=None,
    )


def _internal(form: ThreadForm, class_: str) -> ThreadLimits:
    pitch_min = form.pitch_diameter.quantize(_PLACES)
    minor_min, minor_max = _internal_minor(form, class_)
    return ThreadLimits(
        class_=class_,
        internal=True,
        major_max=None,
        major_min=form.diameter,
        pitch_max=(pitch_min + pitch_diameter_tolerance(form, class_)).quantize(_PLACES),
        pitch_min=pitch_min,
        minor_max=minor_max,
        minor_min=minor_min,
    )


def _internal_minor(form: ThreadForm, class_: str) -> tuple[Decimal, Decimal | None]:
    """Smallest and largest minor diameter; the tables here do not know the largest one of UNJ."""
    if "J" in form.series:
        return form.minor.quantize(_PLACES), None
    least = form.minor.quantize(_PLACES)
    largest = (least + minor_tolerance(form, class_)).quantize(_PLACES)
    if form.diameter < _NUMBER_SIX:
        return least, largest
    if class_ == "3B":
        return form.minor.quantize(_THREE_PLACES).quantize(_PLACES), largest
    return form.minor.quantize(_THREE_PLACES), largest.quantize(_THREE_PLACES)


def _engagement(form: ThreadForm) -> Decimal:
    plain = unified_series.plain_series(form.series)
    coarse_constant = plain == unified_series.CONSTANT and form.pitch * _ENGAGED_OVER_DIAMETER_TO_TPI >= 1
    if plain in _ENGAGED_OVER_DIAMETER or coarse_constant:
        return form.diameter
    return _ENGAGED_PITCHES * form.pitch


def _cube_root(amount: Decimal) -> Decimal:
    return amount ** (Decimal(1) / 3)


def _pitch_two_thirds(form: ThreadForm) -> Decimal:
    return form.pitch**_TWO_THIRDS


def _diameter(size: str | Decimal) -> tuple[Decimal, str]:
    if isinstance(size, str) and size.startswith("#"):
        named = named_size(size)
        if named is None:
            raise ValueError(f"{size} is no Unified size; expected #0 to #10 or #12")
        return named.diameter, named.name
    diameter = size if isinstance(size, Decimal) else inches(size)
    known = nominal_size(diameter)
    return (known.diameter, known.name) if known else (diameter, f"{diameter}".removeprefix("0"))
