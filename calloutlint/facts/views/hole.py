"""Facts about a callout's feature as a hole: its limits, what is done to it, what goes through it."""

from __future__ import annotations

import re
from decimal import Decimal

from calloutlint.facts.sizes import amount_in, leading_size
from calloutlint.facts.view import Length, fact, kept
from calloutlint.facts.views.fastener import FastenerView
from calloutlint.facts.views.part import PartView
from calloutlint.model.callout import Callout, FastenerNote, Meaning, Part, Words
from calloutlint.model.fastener import Fastener
from calloutlint.model.hole import StepKind
from calloutlint.model.size import Depth, Size, SizeForm, SizeStatus, Through
from calloutlint.model.thread import Thread, ThreadSystem
from calloutlint.model.values import Value
from calloutlint.trade.clearance import ClearanceMatch, assumed_range, fasteners_for, is_published
from calloutlint.trade.drills import drilled_tolerance, is_stock, next_larger_stock
from calloutlint.units import Unit, convert

NOT_CLEARANCE = {StepKind.REAM, StepKind.TAP}
FINISHED = {StepKind.REAM, StepKind.TAP, StepKind.BORE}
INCH_PLACES, MOST_INCH_PLACES = 3, 4
SCREWS = re.compile(r"\b(?:SCREWS?|BOLTS?|FASTENERS?|CAPSCREWS?|[SBF]HS?CS|HHCS)\b", re.IGNORECASE)
OTHER_USE = re.compile(
    r"\b(?:VENT\w*|DRAIN\w*|OIL\w*|PASSAGE\w*|LUBE|LUBRIC\w*|GREASE|WEEP|SIGHT|PORTS?|FOR)\b", re.IGNORECASE
)
SMALLEST_STEP = Decimal("0.00001")


class HoleView(PartView):
    """A hole: clearance, fixing or plain. Its facts are unknown where the callout states no single diameter."""

    subject = "hole"
    part: Callout

    @kept
    def _size(self) -> Size | None:
        size = leading_size(self.part)
        if size is None or size.doubtful or not (size.form is SizeForm.DIAMETER or self._is_slot(size)):
            return None
        return size

    def _is_slot(self, size: Size) -> bool:
        """Whether a size is the width of a slot that a stated joint has as a clearance hole."""
        slot = size.form is SizeForm.LINEAR and Meaning.SLOT in self.part.meanings
        return slot and self._callout.joined

    @fact
    def slot(self) -> bool:
        """Whether it is a slot that a fastener passes; its limits are those of its width."""
        return self._size is not None and self._is_slot(self._size)

    @fact
    def sized_both_ways(self) -> bool:
        """Whether it is a slot with a length besides its width: a position line does not say which it holds."""
        return self.slot and sum(size.form is SizeForm.LINEAR for size in self.part.sizes) > 1

    @fact
    def opening(self) -> str:
        """What it is called: `hole` or `slot`."""
        return "slot" if self.slot else "hole"

    @fact
    def nominal(self) -> Length | None:
        """Nominal diameter; unknown for a slot."""
        return self._length(self._size.nominal) if self._size and not self.slot else None

    @fact
    def mmc(self) -> Length | None:
        """Smallest diameter of the hole, or width of the slot: its maximum material condition."""
        return self._callout.view_of(self._size).smallest if self._size else None

    @fact
    def lmc(self) -> Length | None:
        """Largest diameter of the hole, or width of the slot: its least material condition."""
        return self._callout.view_of(self._size).largest if self._size else None

    @fact
    def bonus(self) -> Length | None:
        """Size tolerance of the hole: the bonus that Ⓜ would allow at least material condition."""
        return None if self.mmc is None or self.lmc is None else self.lmc - self.mmc

    @fact
    def through(self) -> bool:
        """Whether the hole goes through."""
        return self._size is not None and isinstance(self._size.extent, Through)

    @fact
    def threaded(self) -> bool:
        """Whether the hole is tapped."""
        return bool(self.part.threads)

    @fact
    def fitted(self) -> bool:
        """Whether it is finished to take what goes in: tapped, reamed, or with a fit code."""
        coded = self._size is not None and self._size.fit is not None
        return coded or self.threaded or any(step.kind in NOT_CLEARANCE for step in self.part.steps)

    @fact
    def plain(self) -> bool:
        """Whether it is a through hole as fasteners pass: not fitted; steps allowed."""
        size = self._size
        return size is not None and self.through and not self.fitted and size.status is SizeStatus.TOLERANCED

    @fact
    def joined(self) -> bool:
        """Whether a joint stated in words has this as a clearance hole."""
        return self._callout.joined

    @fact
    def clearance(self) -> bool:
        """Whether it is a clearance hole: stated by a joint, else assumed from the published sizes."""
        return (self.joined and self._known_fastener) or self.presumed or self.guessed

    @property
    def _known_fastener(self) -> bool:
        return any(FastenerView(fastener, self.unit).known for fastener in self._callout.fasteners)

    @fact
    def presumed(self) -> bool:
        """Whether it is taken for a clearance hole of a fastener in the drawing's parts list."""
        return bool(self.presumed_fasteners)

    @fact
    def presumed_fasteners(self) -> tuple[str, ...]:
        """Fasteners of the parts list whose close to loose sizes take in this hole."""
        return tuple(fastener.text for fastener in self._presumed)

    @property
    def _presumed(self) -> list[Fastener]:
        nominal = self._middle if self.nominal is None else self.nominal
        if not self.drawing_model.fasteners or not self._open_to_assumption or nominal is None:
            return []
        return [f for f in self.drawing_model.fasteners if _admits(f, nominal, self.unit)]

    @property
    def _middle(self) -> Decimal | None:
        return None if self.mmc is None or self.lmc is None else (self.mmc + self.lmc) / 2

    @property
    def thinnest_presumed(self) -> Fastener:
        """The thinnest of those fasteners: what it does not fit, none of them fits."""
        return min(self._presumed, key=lambda fastener: _diameter_mm(fastener))

    @property
    def thinnest_guessed(self) -> Fastener | None:
        """The thinnest fastener of the drawing's unit that the hole is a published size for, if guessed."""
        return min(self._guessed, key=lambda fastener: _diameter_mm(fastener), default=None)

    @property
    def _guessed(self) -> list[Fastener]:
        if self.nominal is None or self.unit is None or not self.guessed:
            return []
        matches = fasteners_for(self.nominal, self.unit)
        return [_named(match) for match in matches if match.sizes.unit is self.unit]

    @fact
    def still_goes(self) -> str:
        """What a position with its bonus leaves true: of a hole with steps, only what concerns the shank."""
        return "the fastener would still enter" if self.part.steps else "every part would still assemble"

    @fact
    def guessed(self) -> bool:
        """Whether, without a parts list, its nominal equals a published clearance size."""
        if not self._open_to_assumption or self.drawing_model.fasteners or self.nominal is None:
            return False
        return self.unit in {Unit.INCH, Unit.MM} and is_published(self.nominal, self.unit)

    @fact
    def drilled(self) -> bool | None:
        """Whether a twist drill alone makes it: a plain diameter, no finer than drilled holes usually are."""
        size = self._size
        if size is None or size.status is not SizeStatus.TOLERANCED or size.extent is None or self.threaded:
            return False
        finished = any(step.kind in FINISHED for step in self.part.steps) or Meaning.BORE in self.part.meanings
        if finished or size.fit is not None or self.part.datum_features or self.nominal is None:
            return False
        usual = drilled_tolerance(self.nominal, self.unit) if self.unit in {Unit.INCH, Unit.MM} else None
        return None if usual is None or self.bonus is None else self.bonus >= usual.plus + usual.minus

    @fact
    def published_size(self) -> bool | None:
        """Whether its nominal is a stock drill or a published clearance size; unknown without a nominal."""
        if self.nominal is None or self.unit not in {Unit.INCH, Unit.MM}:
            return None
        return is_stock(self.nominal, self.unit) or is_published(self.nominal, self.unit)

    @fact
    def next_drill(self) -> Length | None:
        """The next larger stock drill, as this drawing rounds it; unknown beyond stock."""
        return None if self.nominal is None else self.next_stock(self.nominal)

    def next_stock(self, least: Decimal) -> Decimal | None:
        """The smallest stock drill that, rounded to the places of the hole's nominal, is not below `least`."""
        if self.unit not in {Unit.INCH, Unit.MM}:
            return None
        nominal = self._size.nominal if self._size else None
        places = min(max(nominal.places if nominal else 0, INCH_PLACES), MOST_INCH_PLACES)
        place = Decimal(1).scaleb(-places) if self.unit is Unit.INCH else None
        drill = next_larger_stock(least, self.unit)
        while drill is not None:
            rounded = drill.diameter if place is None else drill.diameter.quantize(place)
            if rounded >= least:
                return rounded
            drill = next_larger_stock(drill.diameter + SMALLEST_STEP, self.unit)
        return None

    @property
    def _open_to_assumption(self) -> bool:
        if self._callout.in_any_joint or not self.plain or self.part.datum_features:
            return False
        return not any(_says_other_use(part) for part in self.part.parts)

    @fact
    def depth(self) -> Length | None:
        """Depth of the drilled hole, its deepest part; unknown for a through hole or where none is stated."""
        extents = [step.extent for step in self.part.steps if step.kind is StepKind.DRILL]
        extents += [size.extent for size in self.part.sizes if size.form is SizeForm.DIAMETER]
        if any(isinstance(extent, Through) for extent in extents):
            return None
        sizes = [extent.size for extent in extents if isinstance(extent, Depth) and extent.size]
        depths = [depth for size in sizes if (depth := self._length(size.nominal)) is not None]
        return max(depths, default=None)


def _says_other_use(part: Part) -> bool:
    """Whether words say that something else than a screw goes through: oil, sight, a rivet, a handle."""
    if isinstance(part, FastenerNote):
        return not SCREWS.search(part.fastener.text)
    return isinstance(part, Words) and OTHER_USE.search(part.text) is not None


def _named(match: ClearanceMatch) -> Fastener:
    """The fastener of a published clearance size, by its size alone."""
    sizes = match.sizes
    metric = sizes.unit is Unit.MM
    system = ThreadSystem.METRIC if metric else ThreadSystem.UNIFIED
    diameter = Value(str(sizes.diameter), sizes.diameter, sizes.unit)
    return Fastener(sizes.size, thread=Thread(system, sizes.size, diameter, series="M" if metric else ""))


def _admits(fastener: Fastener, nominal: Decimal, unit: Unit | None) -> bool:
    """Whether a hole lies between the close and loose published sizes of a fastener."""
    diameter = fastener.thread.diameter if fastener.thread else None
    if diameter is None or diameter.unit is None or unit is None:
        return False
    span = assumed_range(diameter.amount, diameter.unit)
    if span is None:
        return False
    close, loose = (convert(end, diameter.unit, unit) for end in span)
    return close <= nominal <= loose


def _diameter_mm(fastener: Fastener) -> Decimal:
    diameter = fastener.thread.diameter if fastener.thread else None
    return amount_in(diameter, Unit.MM) or Decimal(0)
