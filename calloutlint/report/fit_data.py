"""What `fit` shows, on the terminal and in its record: the joint worked out, and what follows from it."""

from dataclasses import dataclass, replace
from decimal import Decimal

from calloutlint.facts.formulas.acceptance import Acceptance, Spread, acceptance, just_capable
from calloutlint.facts.formulas.boundaries import GeometricTolerance, gauge_size
from calloutlint.facts.formulas.fastening import bearing_left
from calloutlint.facts.formulas.verdict import BonusRow, Decision, Verdict, bonus_table, decide
from calloutlint.facts.formulas.worked import Sought, Worked, largest_screws
from calloutlint.facts.views.fastener import FastenerView
from calloutlint.model.frame import Modifier
from calloutlint.units import Unit


@dataclass(frozen=True, slots=True)
class Measured:
    """A measured hole: its size, the deviation of its axis, and what becomes of it.

    `at_mmc` is what Ⓜ would allow, for a hole that only the missing modifier rejects.
    """

    size: Decimal
    deviation: Decimal
    verdict: Verdict
    at_mmc: Decimal | None = None


@dataclass(frozen=True, slots=True)
class Seat:
    """What the head or washer needs: the least counterbore, and the bearing left on one side."""

    name: str
    source: str
    largest: Decimal
    counterbore: Decimal
    bearing: Decimal | None


@dataclass(frozen=True, slots=True)
class FitSheet:
    """A joint worked out, all lengths in `unit`. `fastener` is None where it is what was sought."""

    unit: Unit
    worked: Worked
    fastener: FastenerView | None
    hole: str
    position: str
    spread: Spread | None = None
    measured: tuple[Decimal, Decimal] | None = None

    @property
    def sought(self) -> Sought:
        """Which of the three was not given."""
        return self.worked.sought

    @property
    def rows(self) -> tuple[BonusRow, ...]:
        """The position allowed at each measured size."""
        return bonus_table(self.worked.hole, self.worked.tolerance)

    @property
    def with_bonus(self) -> GeometricTolerance:
        """The tolerance with its modifier, or at Ⓜ where it has none: what a bonus is, or would be, worth."""
        tolerance = self.worked.tolerance
        return tolerance if tolerance.modifier else replace(tolerance, modifier=Modifier.MMC)

    @property
    def process(self) -> Spread:
        """The spread of the process, a typical one where none is stated."""
        return self.spread or just_capable(self.worked.hole, self.with_bonus)

    @property
    def accepted(self) -> Acceptance:
        """Shares of holes accepted without and with the bonus."""
        return acceptance(self.worked.hole, self.with_bonus, self.process)

    @property
    def gauge_pin(self) -> Decimal | None:
        """Nominal of the functional gauge's pin; None without Ⓜ, or where it is nil."""
        pin = gauge_size(self.worked.hole, self.worked.tolerance)
        return pin if pin is not None and pin > 0 else None

    @property
    def decision(self) -> Measured | None:
        """What becomes of the measured hole; None where none was measured."""
        if self.measured is None:
            return None
        size, deviation = self.measured
        verdict = decide(self.worked.hole, self.worked.tolerance, size, deviation)
        forgiven = decide(self.worked.hole, self.with_bonus, size, deviation)
        gained = self.worked.tolerance.modifier is None and forgiven.decision is Decision.ACCEPT_WITH_BONUS
        return Measured(size, deviation, verdict, forgiven.allowed if gained else None)

    @property
    def screws(self) -> tuple[str, ...]:
        """Where the fastener was sought, the largest screws that are not thicker."""
        return largest_screws(self.worked.fastener, self.unit) if self.sought is Sought.FASTENER else ()

    @property
    def seat(self) -> Seat | None:
        """What the head or washer needs; None where no table has it."""
        view = self.fastener
        if view is None or view.seat_largest is None:
            return None
        worked = self.worked
        shift = min(worked.hole.lmc - worked.fastener, self.rows[-1].allowed)
        smallest = view.seat_smallest
        bearing = None if smallest is None else bearing_left(smallest, worked.hole.lmc, worked.fastener)
        return Seat(
            view.seat, view.seat_source, view.seat_largest, view.seat_largest + max(shift, Decimal(0)), bearing
        )
