"""Facts about one datum compartment of a frame line."""

from __future__ import annotations

from typing import TYPE_CHECKING

from calloutlint.facts.datums.chains import self_references
from calloutlint.facts.datums.held import held, redundant
from calloutlint.facts.datums.kinds import DatumKind
from calloutlint.facts.datums.named import NamedFault, named_faults
from calloutlint.facts.datums.scheme import DatumScheme
from calloutlint.facts.datums.words import in_words
from calloutlint.facts.symbol_names import drawn
from calloutlint.facts.view import Length, fact
from calloutlint.facts.views.boundary import largest_shift
from calloutlint.facts.views.part import PartView
from calloutlint.model.frame import DatumRef, Modifier

if TYPE_CHECKING:
    from calloutlint.facts.views.frame import FrameView


class DatumView(PartView):
    """One datum compartment of a frame line."""

    subject = "datum"
    part: DatumRef

    def __init__(self, part: DatumRef, frame: FrameView, place: int) -> None:
        super().__init__(part, frame.callout)
        self.doubtful = frame.doubtful
        self._frame = frame
        self._place = place

    @fact
    def frame(self) -> FrameView:
        """The frame line that it stands in."""
        return self._frame

    @fact
    def name(self) -> str:
        """The datum as named: `A`, `A-B`."""
        return self.part.name

    @fact
    def place(self) -> int:
        """Order of precedence, from 1."""
        return self._place

    @fact
    def letters(self) -> tuple[str, ...]:
        """Its letters; two or more in a common datum."""
        return tuple(letter.letter for letter in self.part.letters)

    @fact
    def modifiers(self) -> tuple[Modifier, ...]:
        """Its modifiers, those of single letters of a common datum included."""
        own = (use.kind for letter in self.part.letters for use in letter.modifiers)
        return (*own, *(use.kind for use in self.part.modifiers))

    @fact
    def symbols(self) -> tuple[str, ...]:
        """Its modifiers as drawn."""
        return tuple(drawn(kind) for kind in self.modifiers)

    @fact
    def shift(self) -> Length | None:
        """How far the part may move at it, its feature at LMC; unknown without Ⓜ or its size."""
        definers = self._callout.drawing.definers(self.letters[0])
        if Modifier.MMC not in self.modifiers or len(self.letters) > 1 or len(definers) != 1:
            return None
        return largest_shift(self._callout.drawing.package.view_of(definers[0]))

    @fact
    def freedoms(self) -> tuple[str, ...]:
        """The degrees of freedom named with it, as written."""
        return self.part.freedoms

    @fact
    def undefined(self) -> tuple[str, ...]:
        """Letters that are defined nowhere on the drawing or its other sheets."""
        known = self._callout.drawing.defined_letters
        return tuple(letter for letter in self.letters if letter not in known)

    @fact
    def plane(self) -> bool | None:
        """Whether every datum feature it names is a plane; unknown where one is not known."""
        kinds = [self._callout.drawing.is_plane(letter) for letter in self.letters]
        if None in kinds:
            return None
        return all(kinds)

    @fact
    def own(self) -> bool:
        """Whether it names, alone, a datum feature that this very callout establishes."""
        return any(ref is self.part for _, ref in self_references(self._callout.part))

    @fact
    def kind(self) -> DatumKind | None:
        """What kind of datum it is: plane, axis…; unknown where its callout does not tell."""
        return self._scheme.kind(self.part)

    @fact
    def takes(self) -> str | None:
        """The degrees of freedom that it takes after those before it, in words; unknown with its kind."""
        held_here = held(self._frame.part, self._scheme)[self._place - 1]
        return None if held_here.new is None else in_words(held_here.new)

    @fact
    def redundant(self) -> bool:
        """Whether it takes no degree of freedom after those before it, however the datums stand."""
        later = self._place > 1
        return later and any(ref is self.part for ref in redundant(self._frame.part, self._scheme))

    @fact
    def repeated_freedoms(self) -> tuple[str, ...]:
        """Named degrees of freedom that it or a reference before it has named already."""
        return tuple(self._named_fault.repeated) if self._named_fault else ()

    @fact
    def freedoms_beyond(self) -> tuple[str, ...]:
        """Named degrees of freedom that its datum cannot hold."""
        return tuple(self._named_fault.beyond) if self._named_fault else ()

    @property
    def _named_fault(self) -> NamedFault | None:
        if not self.part.freedoms:
            return None
        faults = named_faults(self._frame.part, self._scheme)
        return next((fault for fault in faults if fault.ref is self.part), None)

    @property
    def _scheme(self) -> DatumScheme:
        return self._callout.drawing.datums.scheme
