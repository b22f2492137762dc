"""Facts about a clearance hole that is too tight: what would cure it, and what has to be said with the sum."""

from __future__ import annotations

from collections.abc import Mapping
from decimal import ROUND_CEILING, ROUND_FLOOR, Decimal

from calloutlint.facts.view import Length, fact
from calloutlint.facts.views.located import positions
from calloutlint.facts.views.passing import PassingView
from calloutlint.model.fastener import Hold
from calloutlint.model.frame import Modifier
from calloutlint.units import Unit

MOST = {Unit.INCH: 4, Unit.MM: 3}
"""Places of a cure at most: what has more is rounded to them on the safe side."""
LEAST = {Unit.INCH: 3, Unit.MM: 2}
"""Places that a corrected tolerance may have in any case."""


class PassageView(PassingView):
    """A clearance hole that a fastener passes, by a stated joint or by assumption."""

    subject = "passage"

    @fact
    def least_short(self) -> Length | None:
        """What is lacking for certain, with as much of the joint as is known; unknown where nothing is."""
        lacking = self.spare if self.spare is not None else self.room
        return -lacking if lacking is not None and lacking < 0 else None

    @fact
    def stated_total(self) -> Length | None:
        """The tolerances that share the clearance: the hole's own, and the fixing hole's where it is fixed."""
        if self.tolerance is None:
            return None
        return self.tolerance + (self.fixing_tolerance or 0)

    @fact
    def fitting_tolerance(self) -> Length | None:
        """The largest position tolerance of this hole that fits; unknown where none does."""
        if self.tolerance is None or self.least_short is None:
            return None
        largest = self._rounded(self.tolerance - self.least_short, MOST, ROUND_FLOOR)
        return largest if largest >= 0 else None

    @fact
    def fair_tolerance(self) -> Length | None:
        """That tolerance as drawings state it, where half of the present one or more is left; else unknown."""
        if self.fitting_tolerance is None or self.tolerance is None:
            return None
        own = places_of(self.tolerance)
        places = {unit: min(max(least, own), MOST[unit]) for unit, least in LEAST.items()}
        fair = self._rounded(self.fitting_tolerance, places, ROUND_FLOOR)
        return fair if 2 * fair >= self.tolerance else None

    def _rounded(self, amount: Decimal, places: Mapping[Unit, int], way: str) -> Decimal:
        """An amount in no more places than its unit has."""
        most = places.get(self.unit, 0) if self.unit else 0
        return (
            amount.quantize(Decimal(1).scaleb(-most), way) if places_of(amount.normalize()) > most else amount
        )

    @fact
    def fitting_smallest(self) -> Length | None:
        """The smallest hole that fits with the present tolerances: what the hole lacks, added to it."""
        if self.size is None or self._lacks is None:
            return None
        return self._rounded(self.size.mmc + self._lacks, MOST, ROUND_CEILING)

    @fact
    def fitting_hole(self) -> Length | None:
        """The next stock drill, as this drawing rounds it, with which it fits; unknown beyond stock.

        Without a position tolerance it is at least the published close hole. No drill makes a slot, or the
        reamed or fit-coded hole of a pin.
        """
        hole = self._callout.hole
        undrilled = hole.slot or (hole.fitted and self.fastener.pin)
        if self._lacks is None or self.fitting_smallest is None or undrilled:
            return None
        least = self.fitting_smallest if hole.nominal is None else hole.nominal + self._lacks
        close = self.fastener.close if self.tolerance is None else None
        return hole.next_stock(least if close is None else max(least, close))

    @fact
    def settled(self) -> bool:
        """Whether all that decides is at hand: how it is held, where it is fixed the other hole's position."""
        return self.hold is Hold.FLOATING or self.spare is not None

    @property
    def _wanting(self) -> str:
        """P or D, whichever the tilt of an unprojected fixing hole is left out for want of."""
        wanting = (("P", self.reach is None), ("D", self.engagement is None))
        return " and ".join(name for name, lacks in wanting if lacks)

    @property
    def _lacks(self) -> Decimal | None:
        if self.least_short is not None:
            return self.least_short
        return -self.play if self.play is not None and self.play < 0 else None

    @fact
    def published(self) -> bool | None:
        """Whether the hole's nominal lies from close to loose for the fastener; unknown where no table says."""
        nominal = self._callout.hole.nominal
        return None if nominal is None else self.fastener.admits(nominal)

    @fact
    def remarks(self) -> str:
        """What else a checker has to know of the arithmetic: one sentence each, a space before; or empty."""
        source = self.fastener.limits_from
        said = (
            (self.hold is None, "How the joint is held is not said: so much is needed either way."),
            (
                self.tilt_unknown,
                f"The fixing hole is not projected; its tilt is left out, for want of {self._wanting}.",
            ),
            (bool(source), f"The pin states no limits; its largest diameter is that of {source}."),
        )
        return _sentences(said) + self.position_remarks

    @fact
    def several_positions(self) -> bool:
        """Whether it has several position lines, of which the largest ⌀ tolerance counts."""
        return len(positions(self._callout)) > 1

    @fact
    def position_remarks(self) -> str:
        """The same of the position tolerance alone."""
        return _sentences(
            (
                (self.several_positions, "Of its position lines the largest ⌀ tolerance counts."),
                (self._at(Modifier.LMC), "At Ⓛ the position is largest where the hole is smallest."),
                (self._shifts, "The datum shift that material modifiers on the datums allow is not counted."),
            )
        )

    def _at(self, kind: Modifier) -> bool:
        return self._tolerance is not None and self._tolerance.modifier is kind

    @property
    def _shifts(self) -> bool:
        uses = {use for datum in self.position.datums for use in datum.modifiers} if self.position else set()
        return bool(uses & {Modifier.MMC, Modifier.LMC})


def places_of(amount: Decimal) -> int:
    """Decimal places of an amount as it is written."""
    return max(0, -int(amount.as_tuple().exponent))


def _sentences(said: tuple[tuple[bool, str], ...]) -> str:
    return "".join(f" {sentence}" for holds, sentence in said if holds)
