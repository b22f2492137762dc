"""Facts about a hole that fixes the fastener of a joint: tapped, or pressed on a pin."""

from __future__ import annotations

from decimal import ROUND_CEILING, Decimal
from typing import TYPE_CHECKING

from calloutlint.facts.sizes import amount_in, basic_major, bounds
from calloutlint.facts.view import Length, fact
from calloutlint.facts.views.fastener import FastenerView
from calloutlint.facts.views.located import is_located, widest_position
from calloutlint.facts.views.part import PartView
from calloutlint.model.callout import Callout
from calloutlint.model.fastener import Hold
from calloutlint.model.frame import Modifier
from calloutlint.model.size import Depth, Size
from calloutlint.model.thread import Thread
from calloutlint.trade.threads import screws_into
from calloutlint.units import Unit

if TYPE_CHECKING:
    from calloutlint.facts.views.callout import CalloutView
    from calloutlint.facts.views.frame import FrameView
    from calloutlint.facts.views.joint import JointView

HEIGHTS = {Unit.INCH: Decimal("0.001"), Unit.MM: Decimal("0.01")}


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
    def hold(self) -> Hold | None:
        """Floating or fixed; unknown where it is not said."""
        return self._joint.hold

    @fact
    def fastener(self) -> FastenerView:
        """The fastener that it fixes, in the unit of this hole's drawing."""
        return FastenerView(self._joint.part.joint.fastener, self.unit)

    @fact
    def position(self) -> FrameView | None:
        """The line with its largest ⌀ position tolerance; unknown where none is stated."""
        return widest_position(self._callout)

    @fact
    def located(self) -> bool | None:
        """Whether something locates it; unknown where a general tolerance may."""
        return is_located(self._callout)

    @fact
    def is_projected(self) -> bool | None:
        """Whether its position has a projected zone; unknown without a position."""
        if self.position is None:
            return None
        zones = (frame.part.zone for frame in self._callout.frames)
        return any(zone is not None and zone.modifier(Modifier.PROJECTED) is not None for zone in zones)

    @fact
    def projected_height(self) -> Length | None:
        """Height of its projected zone as written; unknown where it is not."""
        heights = [f.tolerance.projected for f in self._callout.frames if f.tolerance.projected is not None]
        return max(heights, default=None)

    @fact
    def projected_line(self) -> FrameView | None:
        """The frame line with its projected zone, the highest; unknown where none is written."""
        lines = [f for f in self._callout.frames if f.tolerance.projected is not None]
        return max(lines, key=lambda line: line.tolerance.projected or Decimal(0), default=None)

    @fact
    def needed_height(self) -> Length | None:
        """What the projected zone has to reach: the projection, else the thickness of what is fastened."""
        return amount_in(self._joint.reach, self.unit)

    @fact
    def drawn_height(self) -> Length | None:
        """That height as a drawing states it: a length from the other unit rounded up."""
        if self.needed_height is None or self.unit not in HEIGHTS:
            return None
        return self.needed_height.quantize(HEIGHTS[self.unit], ROUND_CEILING)

    @fact
    def tilt_spoils(self) -> bool:
        """Whether the joint would fit with a projected zone here, and does not without one."""
        passages = [passage for passage in self._joint.passages if passage.fixing is self]
        return any(passage.tilt_spoils for passage in passages)

    @fact
    def full_thread(self) -> Length | None:
        """Smallest depth of full thread, or of a pin's hole; unknown where it goes through or is not stated."""
        return self.full_thread_in(self.unit)

    def full_thread_in(self, unit: Unit | None) -> Decimal | None:
        """That depth in a unit. A depth without a tolerance is the least that is asked for."""
        extent = self._extent
        if not isinstance(extent, Depth) or extent.size is None or extent.size.doubtful:
            return None
        limits = bounds(extent.size, unit)
        return limits[0] if limits else amount_in(extent.size.nominal, unit)

    @fact
    def depth_toleranced(self) -> bool:
        """Whether that depth has a tolerance of its own, so that it is the least there is."""
        extent = self._extent
        return isinstance(extent, Depth) and extent.size is not None and extent.size.tolerance is not None

    @property
    def _extent(self) -> object:
        return self._thread.extent if self._thread else self._bore_extent

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
    def one_diameter(self) -> Length | None:
        """Basic major diameter of its thread: the least usual engagement; unknown where there is none."""
        return amount_in(basic_major(self._thread), self.unit) if self._thread else None

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
        return None if self._screw is None or self._thread is None else screws_into(self._screw, self._thread)

    @property
    def _screw(self) -> Thread | None:
        """The fastener's thread; None where it has none, or none that the tables have."""
        return self._joint.part.joint.fastener.thread if self.fastener.known else None

    @fact
    def pitch_open(self) -> bool:
        """Whether screw and hole have one diameter, and an inch size without a pitch leaves the rest open."""
        return self._screw is not None and self.tapped and self.thread_matches is None


def _called(thread: Thread) -> str:
    hand = " LH" if thread.left_hand else ""
    if thread.tpi is not None:
        return f"{thread.size}-{thread.tpi.text} {thread.series}".rstrip() + hand
    if thread.pitch is not None:
        return f"{thread.size}x{thread.pitch.text}{hand}"
    return f"{thread.size} {thread.series if thread.series != 'M' else ''}".rstrip() + hand
