"""Facts about one line of a feature control frame: characteristic, tolerance, datum references."""

from __future__ import annotations

from typing import TYPE_CHECKING

from calloutlint.facts.datums.held import left
from calloutlint.facts.datums.location import Unlocated
from calloutlint.facts.datums.words import in_words
from calloutlint.facts.view import Length, fact
from calloutlint.facts.views.boundary import BoundaryView
from calloutlint.facts.views.datum import DatumView
from calloutlint.facts.views.part import PartView
from calloutlint.facts.views.tolerance import MATERIAL, ToleranceView
from calloutlint.model.callout import Meaning
from calloutlint.model.frame import (
    Characteristic,
    Frame,
    Modifier,
    ScopeKind,
    Segment,
    ZoneShape,
)
from calloutlint.model.size import SizeModifier

if TYPE_CHECKING:
    from calloutlint.facts.views.callout import CalloutView

FORM = {
    Characteristic.STRAIGHTNESS,
    Characteristic.FLATNESS,
    Characteristic.CIRCULARITY,
    Characteristic.CYLINDRICITY,
}
ORIENTATION = {Characteristic.ANGULARITY, Characteristic.PERPENDICULARITY, Characteristic.PARALLELISM}
PROFILE = {Characteristic.LINE_PROFILE, Characteristic.SURFACE_PROFILE}
SURFACE_FORM = {Characteristic.CIRCULARITY, Characteristic.CYLINDRICITY}
RUNOUT = {Characteristic.CIRCULAR_RUNOUT, Characteristic.TOTAL_RUNOUT}


class FrameView(PartView):
    """One line of a feature control frame."""

    subject = "frame"
    part: Segment

    def __init__(self, part: Segment, callout: CalloutView, frame: Frame, above: FrameView | None) -> None:
        super().__init__(part, callout)
        self.whole = frame
        self._above = above

    @fact
    def characteristic(self) -> Characteristic:
        """The geometric characteristic."""
        return self.part.characteristic

    @fact
    def named(self) -> str:
        """The characteristic as a sentence begins with it."""
        return self.part.characteristic.value.capitalize()

    @fact
    def form(self) -> bool:
        """Whether it is a form tolerance."""
        return self.part.characteristic in FORM

    @fact
    def orientation(self) -> bool:
        """Whether it is an orientation tolerance."""
        return self.part.characteristic in ORIENTATION

    @fact
    def profile(self) -> bool:
        """Whether it is a profile tolerance."""
        return self.part.characteristic in PROFILE

    @fact
    def runout(self) -> bool:
        """Whether it is a runout tolerance."""
        return self.part.characteristic in RUNOUT

    @fact
    def surface_only(self) -> bool:
        """Whether it controls a surface whatever its size: circularity, cylindricity, profile, runout."""
        return self.runout or self.profile or self.part.characteristic in SURFACE_FORM

    @fact
    def tolerance(self) -> ToleranceView:
        """Its tolerance compartment."""
        return ToleranceView(self.part.zone, self)

    @fact
    def boundary(self) -> BoundaryView:
        """The worst-case boundaries that it makes with the size of its feature."""
        return BoundaryView(self)

    @fact
    def datums(self) -> tuple[DatumView, ...]:
        """Its datum compartments in order of precedence."""
        return tuple(DatumView(ref, self, place) for place, ref in enumerate(self.part.datums, start=1))

    @fact
    def left_free(self) -> str | None:
        """The degrees of freedom that its datums leave, in words; unknown where a datum is not known."""
        free = left(self.part, self._callout.drawing.datums.scheme)
        return None if free is None else in_words(free)

    @fact
    def unlocated(self) -> Unlocated | None:
        """Why a single feature's position does not locate it; unknown where it may."""
        return self._callout.drawing.datums.unlocated(self._callout.part, self.part)

    @fact
    def reordered_in_joint(self) -> str | None:
        """Balloon of another callout of its joint with these datums in another order; unknown if none has."""
        return self._callout.drawing.datums.reordered_in_joint(self._callout.part, self.part)

    @fact
    def reordered(self) -> str | None:
        """Balloon of another callout elsewhere with these datums in another order; unknown if none has."""
        return self._callout.drawing.datums.reordered(self._callout.part, self.part)

    @fact
    def other_boundary(self) -> str | None:
        """Balloon of another position with these datums, other material modifiers; unknown if none has."""
        return self._callout.drawing.datums.other_boundary(self._callout.part, self.part)

    @fact
    def closes_ring(self) -> tuple[str, ...]:
        """Datum letters that are each controlled to the next in a ring, which this line closes."""
        return self._callout.drawing.datums.ring_closed(self._callout.part, self.part)

    @fact
    def composite(self) -> bool:
        """Whether it is a line of a composite frame."""
        return self.whole.composite

    @fact
    def row(self) -> int:
        """Its line in a composite frame, from 1."""
        return 1 if self._above is None else self._above.row + 1

    @fact
    def above(self) -> FrameView | None:
        """The line above it in a composite frame; unknown for the first."""
        return self._above

    @fact
    def follows_above(self) -> bool | None:
        """Whether its datums are the leading datums of the line above in the same order."""
        if self._above is None:
            return None
        names = [datum.name for datum in self.datums]
        return names == [datum.name for datum in self._above.datums][: len(names)]

    @fact
    def size(self) -> Length | None:
        """Total size tolerance of the feature that it controls."""
        size = self._callout.size
        return size.total if size else None

    @fact
    def free_of_envelope(self) -> bool:
        """Whether the size carries independency or the free state, which lift the envelope of perfect form."""
        size = self._callout.size
        return size is not None and bool(
            {SizeModifier.INDEPENDENCY, SizeModifier.FREE_STATE} & set(size.modifiers)
        )

    @fact
    def scope(self) -> ScopeKind | None:
        """All around, all over, between or from-to; unknown where nothing is said."""
        return self.whole.scope.kind if self.whole.scope else None

    @fact
    def repeat(self) -> DatumView | None:
        """The first of its datum compartments with a letter that stands before it, or twice in it."""
        for place, datum in enumerate(self.datums):
            seen = {letter for other in self.datums[:place] for letter in other.letters}
            if seen & set(datum.letters) or len(set(datum.letters)) < len(datum.letters):
                return datum
        return None

    @fact
    def surplus(self) -> tuple[DatumView, ...]:
        """Its datum compartments beyond the third."""
        return self.datums[3:]

    @fact
    def at_odds(self) -> tuple[DatumView, ...]:
        """Its datum compartments that carry Ⓜ and Ⓛ at once."""
        both = {Modifier.MMC, Modifier.LMC}
        return tuple(datum for datum in self.datums if both <= set(datum.modifiers))

    @fact
    def primary(self) -> DatumView | None:
        """Its primary datum compartment; unknown without datums."""
        return self.datums[0] if self.datums else None

    @fact
    def repeated_letters(self) -> tuple[str, ...]:
        """Letters that stand in two of its datum compartments."""
        letters = [letter for datum in self.datums for letter in set(datum.letters)]
        return tuple(sorted({letter for letter in letters if letters.count(letter) > 1}))

    @fact
    def doubled_letters(self) -> tuple[str, ...]:
        """Letters that stand twice in one common datum, as in `A-A`."""
        return tuple(sorted({x for d in self.datums for x in d.letters if d.letters.count(x) > 1}))

    @fact
    def bidirectional(self) -> bool:
        """Whether the callout has two or more position frames without a diameter: one for each direction."""
        first_lines = (view for view in self._callout.frames if view.row == 1)
        positions = [view for view in first_lines if view.characteristic is Characteristic.POSITION]
        return sum(view.tolerance.shape is ZoneShape.WIDTH for view in positions) > 1

    @fact
    def twin(self) -> FrameView | None:
        """An earlier single frame of the callout that says the same of the feature; unknown where none does.

        The same characteristic, datums and scope. Two directions (both without ⌀), one at Ⓜ and one at Ⓛ, and
        frames that differ in a projected zone, free state, tangent plane or unit are not twins.
        """
        if self.composite:
            return None
        for other in self._callout.frames:
            if other is self:
                return None
            if not other.composite and _twins(other, self):
                return other
        return None

    @fact
    def position_partner(self) -> FrameView | None:
        """The widest position line with the same primary datum and material modifier, not projected."""
        if not self.datums:
            return None
        partners = [view for view in self._callout.frames if _refines(self, view)]
        return max(partners, key=lambda view: view.tolerance.value or 0, default=None)

    @fact
    def each_element(self) -> bool:
        """Whether the callout's words limit it to line elements."""
        return Meaning.EACH_ELEMENT in self._callout.part.meanings


def _twins(one: FrameView, other: FrameView) -> bool:
    if (one.characteristic, one.part.datums, one.whole.scope) != (
        other.characteristic,
        other.part.datums,
        other.whole.scope,
    ):
        return False
    if not one.profile and one.tolerance.shape is other.tolerance.shape is ZoneShape.WIDTH:
        return False
    kinds, others = set(one.tolerance.modifiers), set(other.tolerance.modifiers)
    if {Modifier.MMC, Modifier.LMC} <= kinds | others:
        return False
    if one.tolerance.per_unit or other.tolerance.per_unit:
        return False
    return kinds - set(MATERIAL) == others - set(MATERIAL)


def _refines(orientation: FrameView, position: FrameView) -> bool:
    if position.characteristic is not Characteristic.POSITION or not position.datums:
        return False
    same_primary = position.part.datums[0] == orientation.part.datums[0]
    kinds, others = (set(view.tolerance.modifiers) for view in (orientation, position))
    return same_primary and Modifier.PROJECTED not in kinds | others and _material(kinds) == _material(others)


def _material(kinds: set[Modifier]) -> set[Modifier]:
    return kinds & {Modifier.MMC, Modifier.LMC}
