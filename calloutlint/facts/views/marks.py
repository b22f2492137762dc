"""Facts about the smaller marks in a callout: symbols, gaps, unread text, datum targets."""

from __future__ import annotations

from collections.abc import Iterator
from typing import TYPE_CHECKING, Any

from calloutlint.facts.datums.completeness import TargetFault
from calloutlint.facts.datums.control import Uncontrolled
from calloutlint.facts.symbol_names import drawn
from calloutlint.facts.view import fact
from calloutlint.facts.views.part import PartView
from calloutlint.model.callout import DatumFeature, DatumTarget, TargetKind, Unread
from calloutlint.model.frame import Modifier, ModifierUse, Scope, ScopeKind
from calloutlint.model.size import Depth, Size

if TYPE_CHECKING:
    from calloutlint.facts.views.callout import CalloutView
    from calloutlint.facts.views.frame import FrameView
    from calloutlint.facts.views.size import SizeView


MOST_EXPECTED = 2


class SymbolView(PartView):
    """One modifier or special symbol, in a tolerance, on a datum reference or after a size."""

    subject = "symbol"

    def __init__(
        self,
        part: Any,
        callout: CalloutView,
        kind: Modifier | None,
        frame: FrameView | None,
        *,
        on_datum: bool = False,
    ) -> None:
        super().__init__(part, callout)
        self._kind = kind
        self._frame = frame
        self._on_datum = on_datum
        if frame is not None:
            self.doubtful = frame.doubtful

    @fact
    def kind(self) -> Modifier | None:
        """Which modifier; unknown for a symbol that is none."""
        return self._kind

    @fact
    def frame(self) -> FrameView | None:
        """The frame line it stands in; unknown after a size."""
        return self._frame

    @fact
    def size(self) -> SizeView | None:
        """The size it follows; unknown in a frame."""
        return self._callout.view_of(self.part) if isinstance(self.part, Size) else None

    @fact
    def label(self) -> str:
        """The symbol as drawn, or what it is called where it is no letter."""
        if self._kind is None:
            return "the from-to symbol" if self.from_to else "naming degrees of freedom"
        return drawn(self._kind)

    @fact
    def on_datum(self) -> bool:
        """Whether it stands on a datum reference."""
        return self._on_datum

    @fact
    def from_to(self) -> bool:
        """Whether it is the from-to symbol."""
        return isinstance(self.part, Scope) and self.part.kind is ScopeKind.FROM_TO

    @fact
    def names_freedoms(self) -> bool:
        """Whether it is a datum reference that names its degrees of freedom."""
        return self._kind is None and self._on_datum


def symbols(callout: CalloutView) -> Iterator[SymbolView]:
    """Every symbol of a callout in reading order."""
    for size in callout.sizes:
        for modifier in size.part.modifiers:
            kind = Modifier(modifier.value)
            yield SymbolView(size.part, callout, kind, None)
    for frame in callout.frames:
        if frame.whole.scope and frame.whole.scope.kind is ScopeKind.FROM_TO and frame.row == 1:
            yield SymbolView(frame.whole.scope, callout, None, frame)
        for use in frame.part.zone.modifiers if frame.part.zone else ():
            yield SymbolView(use, callout, use.kind, frame)
        yield from _datum_symbols(frame, callout)


def _datum_symbols(frame: FrameView, callout: CalloutView) -> Iterator[SymbolView]:
    for ref in frame.part.datums:
        uses: list[ModifierUse] = [use for letter in ref.letters for use in letter.modifiers]
        for use in [*uses, *ref.modifiers]:
            yield SymbolView(use, callout, use.kind, frame, on_datum=True)
        if ref.freedoms:
            yield SymbolView(ref, callout, None, frame, on_datum=True)


class GapView(PartView):
    """A symbol whose number is missing."""

    subject = "gap"

    def __init__(self, part: Any, callout: CalloutView, lacking: str) -> None:
        super().__init__(part, callout)
        self._lacking = lacking

    @fact
    def lacking(self) -> str:
        """What has no number: `tolerance`, `depth`, `counterbore`…"""
        return self._lacking


def gaps(callout: CalloutView) -> Iterator[GapView]:
    """Frames without a tolerance value, depths and steps without their number."""
    for frame in callout.frames:
        if frame.part.zone is None or frame.part.zone.value is None:
            yield GapView(frame.part, callout, "tolerance")
    for step in callout.part.steps:
        needs_size = step.kind.value in {"counterbore", "spotface", "countersink"}
        if needs_size and step.size is None:
            yield GapView(step, callout, step.kind.value)
    for part in callout.part.parts:
        extent = getattr(part, "extent", None)
        if isinstance(extent, Depth) and extent.size is None:
            yield GapView(part, callout, "depth")


class UnreadView(PartView):
    """Text that could not be read."""

    subject = "unread"
    part: Unread

    @fact
    def text(self) -> str:
        """The text as written."""
        return self.part.text

    @fact
    def expected(self) -> tuple[str, ...]:
        """What could have stood there, in the trade's words."""
        return self.part.expected

    @fact
    def narrowed(self) -> str | None:
        """What could have stood there, in words; unknown where almost anything could."""
        *others, last = self.part.expected or ("",)
        if not last or len(others) > MOST_EXPECTED:
            return None
        return f"{', '.join(others)} or {last}" if others else last

    @fact
    def nearest(self) -> str | None:
        """The nearest spelling that is read; unknown where none is near."""
        return self.part.nearest

    @fact
    def in_frame(self) -> bool:
        """Whether it stands inside a feature control frame."""
        return self.part.in_frame


class TargetView(PartView):
    """One datum target."""

    subject = "target"
    part: DatumTarget

    @fact
    def letter(self) -> str:
        """The letter of the datum that it helps to establish."""
        return self.part.letter

    @fact
    def number(self) -> int:
        """Its number."""
        return self.part.number

    @fact
    def kind(self) -> TargetKind:
        """Point, line or area."""
        return self.part.kind

    @property
    def _fault(self) -> TargetFault | None:
        return self._callout.drawing.datums.target_fault(self.part)

    @fact
    def missing(self) -> tuple[int, ...]:
        """Numbers left out among the targets of its letter; told of the first target only."""
        return self._fault.missing if self._fault else ()

    @fact
    def contacts(self) -> int | None:
        """Points that the targets of a primary plane make, if fewer than three; told of the first only."""
        return self._fault.contacts if self._fault else None


class DefinitionView(PartView):
    """A datum feature symbol: the callout's feature establishes the datum."""

    subject = "definition"
    part: DatumFeature

    @fact
    def letter(self) -> str:
        """The datum letter."""
        return self.part.letter

    @fact
    def referenced(self) -> bool:
        """Whether a frame on the drawing, on any of its sheets, references it."""
        return self.part.letter in self._callout.drawing.referenced_letters

    @property
    def _lack(self) -> Uncontrolled | None:
        return self._callout.drawing.datums.uncontrolled(self.part.letter)

    @fact
    def lacks_form(self) -> bool:
        """Whether it is a primary datum feature without control of its size or form."""
        return self._lack is not None and self._lack.primary is None

    @fact
    def lacks_relation_to(self) -> str | None:
        """The primary datum that nothing relates it to, as a secondary one; unknown if there is none."""
        return self._lack.primary.name if self._lack and self._lack.primary else None

    @fact
    def repeats(self) -> str | None:
        """Balloon of an earlier callout that defines the same letter; unknown where none does."""
        first = self._callout.drawing.definers(self.part.letter)[0]
        return None if first is self._callout.part else first.balloon
