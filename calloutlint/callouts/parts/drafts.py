"""Parts of a callout while they are being put together; each becomes its frozen part of the model."""

from dataclasses import dataclass, field

from calloutlint.model.callout import DatumTarget, TargetKind
from calloutlint.model.frame import Characteristic, DatumRef, Frame, Scope, Segment, Zone
from calloutlint.model.hole import HoleStep, StepKind
from calloutlint.model.size import (
    Count,
    Depth,
    Deviations,
    FitCode,
    Limits,
    PlusMinus,
    Size,
    SizeForm,
    SizeModifier,
    SizeStatus,
    Through,
)
from calloutlint.model.source import Span
from calloutlint.model.thread import Thread, ThreadSystem
from calloutlint.model.values import Value


@dataclass(slots=True)
class SizeDraft:
    """A size in the making. `deviation` is a lone deviation that waits for its partner."""

    form: SizeForm
    nominal: Value | None
    span: Span
    tolerance: PlusMinus | Deviations | Limits | None = None
    fit: FitCode | None = None
    status: SizeStatus = SizeStatus.TOLERANCED
    count: Count | None = None
    extent: "Through | DepthDraft | None" = None
    modifiers: list[SizeModifier] = field(default_factory=list)
    dual: "SizeDraft | None" = None
    doubtful: bool = False
    deviation: Value | None = None

    @property
    def bare(self) -> bool:
        """Whether it is a single number and nothing more."""
        return (
            self.nominal is not None
            and self.tolerance is None
            and self.fit is None
            and self.deviation is None
            and self.count is None
            and self.extent is None
        )

    @property
    def plain(self) -> bool:
        """Whether nothing is said of it but its number, form and count."""
        return (
            self.tolerance is None
            and self.fit is None
            and self.deviation is None
            and self.dual is None
            and self.status is SizeStatus.TOLERANCED
        )

    def finish(self) -> Size:
        """The size as the model has it."""
        return Size(
            self.form,
            self.nominal,
            self.tolerance,
            self.fit,
            self.status,
            self.count,
            self.extent.finish() if isinstance(self.extent, DepthDraft) else self.extent,
            tuple(self.modifiers),
            None if self.dual is None else self.dual.finish(),
            self.span,
            self.doubtful,
        )


@dataclass(slots=True)
class DepthDraft:
    """A depth in the making."""

    span: Span
    size: SizeDraft | None = None

    def finish(self) -> Depth:
        """The depth as the model has it."""
        return Depth(None if self.size is None else self.size.finish(), self.span)


@dataclass(slots=True)
class ThreadDraft:
    """A thread in the making."""

    system: ThreadSystem
    size: str
    diameter: Value | None
    series: str
    span: Span
    tpi: Value | None = None
    pitch: Value | None = None
    class_: str | None = None
    left_hand: bool = False
    starts: int = 1
    count: Count | None = None
    extent: Through | DepthDraft | None = None
    doubtful: bool = False

    def finish(self) -> Thread:
        """The thread as the model has it."""
        extent = self.extent.finish() if isinstance(self.extent, DepthDraft) else self.extent
        return Thread(
            self.system,
            self.size,
            self.diameter,
            self.series,
            self.tpi,
            self.pitch,
            self.class_,
            self.left_hand,
            self.starts,
            self.count,
            extent,
            self.span,
            self.doubtful,
        )


@dataclass(slots=True)
class StepDraft:
    """A hole step in the making."""

    kind: StepKind
    span: Span
    size: SizeDraft | None = None
    angle: SizeDraft | None = None
    drill: str | None = None
    count: Count | None = None
    extent: Through | DepthDraft | None = None
    doubtful: bool = False

    def finish(self) -> HoleStep:
        """The step as the model has it."""
        extent = self.extent.finish() if isinstance(self.extent, DepthDraft) else self.extent
        return HoleStep(
            self.kind,
            None if self.size is None else self.size.finish(),
            None if self.angle is None else self.angle.finish(),
            self.drill,
            self.count,
            extent,
            self.span,
            self.doubtful,
        )


@dataclass(slots=True)
class SegmentDraft:
    """One line of a frame in the making."""

    characteristic: Characteristic
    span: Span
    zone: Zone | None = None
    datums: list[DatumRef] = field(default_factory=list)
    doubtful: bool = False

    def finish(self) -> Segment:
        """The segment as the model has it."""
        return Segment(self.characteristic, self.zone, tuple(self.datums), self.span, self.doubtful)


@dataclass(slots=True)
class FrameDraft:
    """A frame in the making."""

    segments: list[SegmentDraft]
    scope: Scope | None = None
    count: Count | None = None

    def finish(self) -> Frame:
        """The frame as the model has it."""
        return Frame(tuple(segment.finish() for segment in self.segments), self.scope, self.count)


@dataclass(slots=True)
class TargetDraft:
    """A datum target in the making."""

    letter: str
    number: int
    span: Span
    kind: TargetKind | None = None
    sizes: list[Value] = field(default_factory=list)
    movable: bool = False

    def finish(self) -> DatumTarget:
        """The target as the model has it."""
        kind = self.kind or (TargetKind.AREA if self.sizes else TargetKind.POINT)
        return DatumTarget(self.letter, self.number, kind, tuple(self.sizes), self.movable, self.span)
