"""Facts about a callout as a whole, and the views of its parts."""

from __future__ import annotations

from collections.abc import Iterator
from decimal import Decimal
from typing import TYPE_CHECKING

from calloutlint.facts.view import View, fact
from calloutlint.facts.views.feature import FeatureView
from calloutlint.facts.views.fit import FitView, MatingView, mating_of
from calloutlint.facts.views.frame import FrameView
from calloutlint.facts.views.hole import HoleView
from calloutlint.facts.views.marks import (
    DefinitionView,
    GapView,
    SymbolView,
    TargetView,
    UnreadView,
    gaps,
    symbols,
)
from calloutlint.facts.views.size import Role, SizeView
from calloutlint.facts.views.step import StepView
from calloutlint.facts.views.thread import ThreadView
from calloutlint.facts.writing import bare_points, uneven, zero_led
from calloutlint.model.callout import Callout, Meaning, Part
from calloutlint.model.drawing import Drawing
from calloutlint.model.fastener import Fastener
from calloutlint.model.frame import Frame
from calloutlint.model.hole import HoleStep, StepKind
from calloutlint.model.size import Depth, Size

if TYPE_CHECKING:
    from calloutlint.facts.views.drawing import DrawingView, StandardView


class CalloutView(View):
    """Everything that stands under one balloon."""

    subject = "callout"
    part: Callout
    drawing_model: Drawing
    callout_model: Callout

    def __init__(self, part: Callout, drawing: DrawingView) -> None:
        self.part = self.callout_model = part
        self.drawing_model = drawing.part
        self._drawing = drawing
        self.unit = drawing.unit

    @fact
    def drawing(self) -> DrawingView:
        """The drawing that the callout stands on."""
        return self._drawing

    @fact
    def standard(self) -> StandardView:
        """The standard that the drawing states."""
        return self._drawing.standard

    @fact
    def balloon(self) -> str:
        """The balloon number as written."""
        return self.part.balloon

    @fact
    def feature(self) -> FeatureView:
        """What the callout's feature is."""
        return FeatureView(self.part, self)

    @fact
    def hole(self) -> HoleView:
        """The callout's feature as a hole."""
        return HoleView(self.part, self)

    @fact
    def frames(self) -> tuple[FrameView, ...]:
        """Every line of every feature control frame, in reading order."""
        return tuple(_frame_views(self.part.frames, self))

    @fact
    def sizes(self) -> tuple[SizeView, ...]:
        """Every size in reading order: of the feature, of hole steps, depths, angles."""
        return tuple(_size_views(self))

    @fact
    def size(self) -> SizeView | None:
        """The size that the feature control frames apply to; unknown where none is stated."""
        own = (view for view in self.sizes if view.role is Role.FEATURE)
        return next((view for view in own if not view.part.doubtful), None)

    @fact
    def threads(self) -> tuple[ThreadView, ...]:
        """The threads in reading order."""
        return tuple(ThreadView(thread, self) for thread in self.part.threads)

    @fact
    def steps(self) -> tuple[StepView, ...]:
        """The hole steps in reading order."""
        return tuple(StepView(step, self) for step in self.part.steps)

    @fact
    def symbols(self) -> tuple[SymbolView, ...]:
        """Every modifier and symbol in frames and sizes."""
        return tuple(symbols(self))

    @fact
    def targets(self) -> tuple[TargetView, ...]:
        """The datum targets in reading order."""
        return tuple(TargetView(target, self) for target in self.part.datum_targets)

    @fact
    def unread(self) -> tuple[UnreadView, ...]:
        """What could not be read."""
        return tuple(UnreadView(part, self) for part in self.part.unread)

    @fact
    def gaps(self) -> tuple[GapView, ...]:
        """Frames without a tolerance value and symbols without the number they need."""
        return tuple(gaps(self))

    @fact
    def datum_letters(self) -> tuple[str, ...]:
        """Letters of the datum features that the callout establishes."""
        return tuple(feature.letter for feature in self.part.datum_features)

    @fact
    def meanings(self) -> tuple[Meaning, ...]:
        """What the callout's plain words say."""
        return tuple(sorted(self.part.meanings))

    @fact
    def count(self) -> int | None:
        """How many features it speaks for as written; unknown for TYP, 1 where no count is written."""
        count = self.part.count
        return 1 if count is None else count.number

    @fact
    def count_in_words(self) -> bool:
        """Whether the count is written in words, as PL, or as TYP."""
        count = self.part.count
        return count is not None and count.in_words

    @fact
    def count_as_written(self) -> str:
        """The count as written; empty where there is none."""
        count = self.part.count
        return count.written if count else ""

    @fact
    def repeats_balloon(self) -> bool:
        """Whether an earlier callout of the drawing has the same balloon number."""
        return self._drawing.first_under(self.part.balloon) is not self.part

    @fact
    def zero_led(self) -> tuple[str, ...]:
        """Inch values below one written with a zero before the point, as written."""
        return zero_led(self.part)

    @fact
    def uneven(self) -> tuple[str, ...]:
        """Sizes in the drawing's unit whose decimal places or zeros break its rule for writing them."""
        return uneven(self.part, self.unit)

    @fact
    def bare_points(self) -> tuple[str, ...]:
        """Millimetre values below one written without a zero before the point, as written."""
        return bare_points(self.part)

    @fact
    def definitions(self) -> tuple[DefinitionView, ...]:
        """The datum features that the callout establishes."""
        return tuple(DefinitionView(feature, self) for feature in self.part.datum_features)

    @property
    def joined(self) -> bool:
        """Whether a stated joint has this callout as a clearance hole."""
        return self._drawing.package.assembly.is_clearance(self.part)

    @property
    def in_any_joint(self) -> bool:
        """Whether a stated joint names this callout at all."""
        return self._drawing.package.assembly.is_joined(self.part)

    @property
    def fasteners(self) -> Iterator[Fastener]:
        """Fasteners of the stated joints that name this callout."""
        joints = self._drawing.package.assembly.joints
        return (j.joint.fastener for j in joints if any(m.callout is self.part for m in j.members))

    def fit_of(self, size: Size) -> FitView | None:
        """The view of a size's fit code; None where it has none."""
        return FitView(size, self) if size.fit else None

    def mating_of(self, size: Size) -> MatingView | None:
        """The fit that a size makes, where words call it one and it can be told; else None."""
        return mating_of(size, self)

    def fit_limits(self, size: Size) -> tuple[Decimal, Decimal] | None:
        """Limits of a size with a fit code, in the drawing's unit; None where ISO 286 has none."""
        return self._drawing.fit_limits(size)

    def view_of(self, size: Size) -> SizeView:
        """The view of one of the callout's sizes."""
        return next(view for view in self.sizes if view.part is size)


def _frame_views(frames: tuple[Frame, ...], callout: CalloutView) -> Iterator[FrameView]:
    for frame in frames:
        above: FrameView | None = None
        for segment in frame.segments:
            above = FrameView(segment, callout, frame, above)
            yield above


def _size_views(callout: CalloutView) -> Iterator[SizeView]:
    parts = callout.part.parts
    for part, following in zip(parts, (*parts[1:], None), strict=True):
        if isinstance(part, Size):
            yield SizeView(part, callout, stock=_names_drill(part, following))
        inner = (
            (getattr(part, "size", None), Role.STEP),
            (getattr(part, "angle", None), Role.STEP_ANGLE),
        )
        for size, role in inner:
            if isinstance(size, Size):
                yield SizeView(size, callout, role, stock=getattr(part, "drill", None) is not None)
        extent = getattr(part, "extent", None)
        if isinstance(extent, Depth) and extent.size is not None:
            yield SizeView(extent.size, callout, Role.DEPTH)


def _names_drill(size: Size, following: Part | None) -> bool:
    """Whether a fraction right before DRILL names the drill: `27/64 DRILL`."""
    drilled = isinstance(following, HoleStep) and following.kind is StepKind.DRILL and following.size is None
    return drilled and size.nominal is not None and "/" in size.nominal.text
