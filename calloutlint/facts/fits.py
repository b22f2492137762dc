"""What two mating sizes make: clearance, transition or interference."""

from dataclasses import dataclass
from decimal import Decimal
from enum import StrEnum

from calloutlint.model.size import FitCode
from calloutlint.trade.iso286 import LimitDeviations, limits


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
