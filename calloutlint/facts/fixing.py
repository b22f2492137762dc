"""Facts about a hole that fixes the fastener of a joint: tapped, or pressed on a pin."""

from __future__ import annotations

from decimal import Decimal
from typing import TYPE_CHECKING

from calloutlint.facts.fastener import FastenerView
from calloutlint.facts.onward import PartView, amount_in
from calloutlint.facts.size import bounds
from calloutlint.facts.view import Length, fact
from calloutlint.model.callout import Callout
from calloutlint.model.frame import Modifier
from calloutlint.model.size import Depth, Size
from calloutlint.model.thread import Thread
from calloutlint.trade.threads import screws_into
from calloutlint.units import Unit

if TYPE_CHECKING:
    from calloutlint.facts.callout import CalloutView
    from calloutlint.facts.frame import FrameView
    from calloutlint.facts.joint import JointView

LOCATING = {"position", "line profile", "surface profile"}


def widest_position(callout: CalloutView) -> FrameView | None:
    """The position line with the largest ⌀ tolerance; None where no diametral position is stated."""
    lines = (
        frame for frame in callout.frames if frame.characteristic == "position" and not frame.part.doubtful
    )
    diametral = [
        line for line in lines if line.tolerance.shape == "diameter" and line.tolerance.value is not None
    ]
    return max(diametral, key=lambda line: line.tolerance.value or Decimal(0), default=None)


def is_located(callout: CalloutView) -> bool:
    """Whether the callout states a position or profile tolerance."""
    return any(frame.characteristic in LOCATING for frame in callout.frames)


def position_lines(callout: CalloutView) -> int:
    """How many position lines the callout has."""
    return sum(frame.characteristic == "position" for frame in callout.frames)


class FixingView(PartView):
    """A hole that a stated joint names as the one the fastener is fixed in."""

    subject = "fixing"
    part: Callout

    def __init__(self, callout: CalloutView, joint: JointView) -> None:
        super().__init__(callout.part, callout)
        self._joint = joint

    @fact
    def joint(self) -> JointView:
        """The joint."""
        return self._joint

    @fact
    def fastener(self) -> FastenerView:
        """The fastener that it fixes, in the unit of this hole's drawing."""
        return FastenerView(self._joint.part.joint.fastener, self.unit)

    @fact
    def position(self) -> FrameView | None:
        """The line with its largest ⌀ position tolerance; unknown where none is stated."""
        return widest_position(self._callout)

    @fact
    def located(self) -> bool:
        """Whether it has a position or profile tolerance."""
        return is_located(self._callout)

    @fact
    def is_projected(self) -> bool | None:
        """Whether its position has a projected zone; unknown without a position."""
        if self.position is None:
            return None
        return any(
            frame.part.zone and frame.part.zone.modifier(Modifier.PROJECTED) for frame in self._callout.frames
        )

    @fact
    def projected_height(self) -> Length | None:
        """Height of its projected zone as written; unknown where it is not."""
        heights = [f.tolerance.projected for f in self._callout.frames if f.tolerance.projected is not None]
        return max(heights, default=None)

    @fact
    def needed_height(self) -> Length | None:
        """What the projected zone has to reach: the joint's projection, else the thickness of what is fastened."""
        return amount_in(self._joint.reach, self.unit) if self._joint.reach else None

    @fact
    def full_thread(self) -> Length | None:
        """Smallest depth of full thread, or of a pin's hole; unknown where it goes through or is not stated."""
        return self.full_thread_in(self.unit)

    def full_thread_in(self, unit: Unit | None) -> Decimal | None:
        """That depth in a unit."""
        extent = self._thread.extent if self._thread else self._bore_extent
        if not isinstance(extent, Depth) or extent.size is None:
            return None
        limits = bounds(extent.size, unit)
        return limits[0] if limits else amount_in(extent.size.nominal, unit)

    @property
    def _thread(self) -> Thread | None:
        threads = self.part.threads
        return threads[0] if threads and not threads[0].doubtful else None

    @property
    def _bore_extent(self) -> object:
        sizes: tuple[Size, ...] = self.part.sizes
        return sizes[0].extent if sizes else None

    @fact
    def tapped(self) -> bool:
        """Whether it is a tapped hole."""
        return self._thread is not None

    @fact
    def thread_as_called(self) -> str:
        """Its thread as written, without class; empty where there is none."""
        return _called(self._thread) if self._thread else ""

    @fact
    def fastener_as_called(self) -> str:
        """The fastener's thread as written, without class; empty where it has none."""
        thread = self._joint.part.joint.fastener.thread
        return _called(thread) if thread else ""

    @fact
    def thread_matches(self) -> bool | None:
        """Whether its thread is the fastener's: diameter and pitch, coarse where a metric one states none."""
        screw = self._joint.part.joint.fastener.thread
        return None if screw is None or self._thread is None else screws_into(screw, self._thread)


def _called(thread: Thread) -> str:
    if thread.tpi is not None:
        return f"{thread.size}-{thread.tpi.text} {thread.series}".rstrip()
    return f"{thread.size}x{thread.pitch.text}" if thread.pitch else thread.size
