"""Facts about a screw thread."""

from __future__ import annotations

from calloutlint.facts.feature import side_by_hole, side_by_words, side_of_thread
from calloutlint.facts.onward import PartView
from calloutlint.facts.view import Length, Number, fact
from calloutlint.model.size import Depth, Through
from calloutlint.model.thread import Thread, ThreadSystem
from calloutlint.trade.threads import series_has


class ThreadView(PartView):
    """A screw thread of a callout."""

    subject = "thread"
    part: Thread

    @fact
    def system(self) -> ThreadSystem:
        """Unified, metric, pipe…"""
        return self.part.system

    @fact
    def size_name(self) -> str:
        """The size as written: `.250`, `#10`, `M6`."""
        return self.part.size

    @fact
    def series(self) -> str:
        """The series as written: `UNC`, `M`; empty where none is stated."""
        return self.part.series

    @fact
    def class_name(self) -> str:
        """The class as written: `2B`, `6H`; empty where none is stated."""
        return self.part.class_ or ""

    @fact
    def diameter(self) -> Length | None:
        """Basic major diameter; unknown for pipe threads."""
        return self._length(self.part.diameter)

    @fact
    def tpi(self) -> Number | None:
        """Threads per inch as written; unknown where none are."""
        return self.part.tpi.amount if self.part.tpi else None

    @fact
    def pitch(self) -> Length | None:
        """Pitch of a metric thread as written; unknown where it is not."""
        return self._length(self.part.pitch)

    @fact
    def in_series(self) -> bool | None:
        """Whether its series has this diameter and pitch; unknown for series without a fixed list."""
        return series_has(self.part)

    @fact
    def class_internal(self) -> bool | None:
        """Whether its class is one for internal threads (2B, 6H); unknown where no class is stated."""
        return side_of_thread(self.part)

    @fact
    def tapped(self) -> bool | None:
        """Whether it is cut in a hole, by everything but its class: words, joint, drill, depth, through."""
        callout = self._callout
        said = side_by_words(callout.part)
        if said is not None:
            return said
        if callout.in_any_joint or side_by_hole(callout.part):
            return True
        return True if isinstance(self.part.extent, Through | Depth) else None

    @fact
    def depth(self) -> Length | None:
        """Depth of full thread as stated; unknown where none is."""
        extent = self.part.extent
        return self._length(extent.size.nominal) if isinstance(extent, Depth) and extent.size else None
