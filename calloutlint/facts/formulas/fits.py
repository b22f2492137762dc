"""Fits: what two mating sizes make, and whether limits written beside a tolerance class are its own."""

from dataclasses import dataclass
from decimal import Decimal
from enum import StrEnum

from calloutlint.model.size import Deviations, FitCode, Limits, PlusMinus
from calloutlint.model.values import Value
from calloutlint.trade.iso286 import LimitDeviations, limits, printed_limits
from calloutlint.units import Unit, convert

_ROUNDING = {Unit.MM: Decimal("0.0005"), Unit.INCH: Decimal("0.00005")}
"""Limits of a class are written at least to the micrometre, or to four places of an inch."""


class FitKind(StrEnum):
    """Kinds of fit by ISO 286-1."""

    CLEARANCE = "clearance fit"
    TRANSITION = "transition fit"
    INTERFERENCE = "interference fit"


@dataclass(frozen=True, slots=True)
class Fit:
    """A hole and a shaft together: their least and greatest clearance; negative is interference."""

    least_clearance: Decimal
    greatest_clearance: Decimal

    @property
    def kind(self) -> FitKind:
        """The kind of fit.

        Source: ISO 286-1: clearance where the smallest hole is not smaller than the largest shaft,
        interference where the largest hole is not larger than the smallest shaft, transition between.
        """
        if self.least_clearance >= 0:
            return FitKind.CLEARANCE
        return FitKind.INTERFERENCE if self.greatest_clearance <= 0 else FitKind.TRANSITION

    @property
    def greatest_interference(self) -> Decimal:
        """Smallest hole against largest shaft; negative is clearance."""
        return -self.least_clearance

    @property
    def least_interference(self) -> Decimal:
        """Largest hole against smallest shaft; negative is clearance."""
        return -self.greatest_clearance


def fit(hole: LimitDeviations, shaft: LimitDeviations) -> Fit:
    """The fit of a hole and a shaft, both as deviations from one nominal or both as sizes, in one unit.

    Source: ISO 286-1, clearance and interference from the limits of size.
    """
    return Fit(hole.lower - shaft.upper, hole.upper - shaft.lower)


def coded_fit(nominal_mm: Decimal, hole: FitCode, shaft: FitCode) -> Fit | None:
    """The fit of two tolerance classes at a nominal size, such as 25 H7/g6, in mm; None if ISO 286 lacks one.

    Source: ISO 286-1 and -2. ValueError where the hole's letter is not capital or the shaft's not small.
    """
    if not hole.letters.isupper() or not shaft.letters.islower():
        raise ValueError(f"a fit is a hole and a shaft, such as H7/g6, not {hole}/{shaft}")
    hole_limits, shaft_limits = limits(nominal_mm, hole), limits(nominal_mm, shaft)
    if hole_limits is None or shaft_limits is None:
        return None
    return fit(hole_limits, shaft_limits)


def states_class(nominal: Value, code: FitCode, written: PlusMinus | Deviations | Limits) -> bool | None:
    """Whether written limits or deviations are those of the class, in whichever order they stand.

    A number may be rounded to its places, but to no fewer than a micrometre or four places of an inch needs;
    both roundings of js that ISO 286-1 has printed are right. A nominal without a unit is in mm. None where
    ISO 286 does not have the class. Source: ISO 286-1:2010 and 1988.
    """
    unit = nominal.unit or Unit.MM
    if unit not in _ROUNDING:
        return None
    printed = printed_limits(convert(nominal.amount, unit, Unit.MM), code)
    if not printed:
        return None
    upper, lower = _written_deviations(nominal, written)
    return any(_same(upper, pair.upper, unit) and _same(lower, pair.lower, unit) for pair in printed)


_Written = tuple[Decimal, int]
"""A deviation and the places that it is written to."""


def _written_deviations(nominal: Value, written: PlusMinus | Deviations | Limits) -> tuple[_Written, _Written]:
    match written:
        case PlusMinus(amount):
            return (amount.amount, amount.places), (-amount.amount, amount.places)
        case Deviations(first, second):
            base = Decimal(0)
        case Limits(first, second):
            base = nominal.amount
    pair = [(value.amount - base, value.places) for value in (first, second)]
    return max(pair), min(pair)


def _same(written: _Written, deviation_mm: Decimal, unit: Unit) -> bool:
    amount, places = written
    slack = min(Decimal("0.5").scaleb(-places), _ROUNDING[unit])
    return abs(amount - convert(deviation_mm, Unit.MM, unit)) <= slack
