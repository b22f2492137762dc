"""Facts about a screw thread."""

from __future__ import annotations

import re
from collections.abc import Iterator
from dataclasses import replace
from decimal import Decimal

from calloutlint.facts.sides import side_by_hole, side_by_words, side_of_thread
from calloutlint.facts.sizes import amount_in
from calloutlint.facts.view import Length, Number, fact
from calloutlint.facts.views.part import PartView
from calloutlint.facts.views.size import Role
from calloutlint.model.callout import Meaning, Words
from calloutlint.model.hole import StepKind
from calloutlint.model.size import Depth, SizeForm, Through
from calloutlint.model.thread import Thread, ThreadSystem
from calloutlint.model.values import Value
from calloutlint.trade.drills import drill_diameter
from calloutlint.trade.metric import pitches
from calloutlint.trade.thread_form import ThreadLimits
from calloutlint.trade.threads import limits_of, series_has
from calloutlint.trade.unified_series import only_tpi
from calloutlint.units import Unit

STUD = re.compile(r"(?:THREADED )?(?:STUDS?|ROD)\b(?! SIDE| END| HOLE)", re.IGNORECASE)
OTHER_CLASS = {"1A": "1B", "2A": "2B", "3A": "3B", "1B": "1A", "2B": "2A", "3B": "3A", "6g": "6H", "6H": "6g"}


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
    def as_called(self) -> str:
        """The thread as written: `1/4-20 UNC-2B`, `M8x1-6H`."""
        part = self.part
        pitch = f"-{part.tpi.text}" if part.tpi else f"x{part.pitch.text}" if part.pitch else ""
        series = f" {part.series}" if part.series and part.system is not ThreadSystem.METRIC else ""
        return f"{part.size}{pitch}{series}" + (f"-{part.class_}" if part.class_ else "")

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
    def other_class(self) -> str | None:
        """The like class of the other side, `2B` for `2A`, `6H` for `6g`; unknown for others."""
        return OTHER_CLASS.get(self.class_name)

    @fact
    def series_pitch(self) -> str:
        """Its size with the pitches that its series has for it, as `1/4-20 UNC`; empty where it has none."""
        return _offered(self.part)

    @property
    def _limits(self) -> ThreadLimits | None:
        limits = limits_of(self.part)
        return limits if limits is not None and limits.internal else None

    def _own(self, amount: Decimal | None) -> Decimal | None:
        diameter = self.part.diameter
        if amount is None or diameter is None:
            return None
        return amount_in(replace(diameter, amount=amount), self.unit)

    @fact
    def minor_smallest(self) -> Length | None:
        """Smallest minor diameter of a tapped hole of its class; unknown without a class for tapped holes."""
        return self._own(self._limits.minor_min) if self._limits else None

    @fact
    def minor_largest(self) -> Length | None:
        """Largest minor diameter of a tapped hole of its class; unknown without a class for tapped holes."""
        return self._own(self._limits.minor_max) if self._limits else None

    @fact
    def tap_drill(self) -> Length | None:
        """The hole drilled for it: nominal of the diameter in its callout that is smaller than the thread.

        Of several, one within the minor diameter limits. Unknown where none is stated.
        """
        drills = [drill for drill in self._drills if self.diameter is None or drill < self.diameter]
        least, most = self.minor_smallest, self.minor_largest
        if least is None or most is None:
            return drills[0] if drills else None
        return next((drill for drill in drills if least <= drill <= most), drills[0] if drills else None)

    @property
    def _drills(self) -> Iterator[Decimal]:
        callout = self._callout
        for view in callout.sizes:
            if view.role is Role.FEATURE and view.form is SizeForm.DIAMETER and not view.part.doubtful:
                middle = (view.smallest + view.largest) / 2 if view.smallest and view.largest else None
                yield from (each for each in [view.nominal or middle] if each is not None)
        for step in callout.part.steps:
            if step.kind is not StepKind.DRILL or step.doubtful:
                continue
            named = drill_diameter(step.drill) if step.drill else None
            amount = self._length(step.size.nominal) if step.size else None
            inch = Value("", named, Unit.INCH) if named is not None else None
            yield from (each for each in [amount_in(inch, self.unit) or amount] if each is not None)

    @fact
    def form_tapped(self) -> bool:
        """Whether words say that a form tap makes it, which wants a larger hole."""
        return Meaning.FORM_TAP in self._callout.part.meanings

    @fact
    def tapped(self) -> bool | None:
        """Whether it is cut in a hole, by everything but its class: words, joint, drill, depth, through."""
        callout = self._callout
        said = side_by_words(callout.part)
        if said is not None:
            return said
        if side_by_hole(callout.part) or isinstance(self.part.extent, Through | Depth):
            return True
        words = (part.text for part in callout.part.parts if isinstance(part, Words))
        if any(STUD.match(text) for text in words):
            return False
        return True if callout.in_any_joint else None

    @fact
    def depth(self) -> Length | None:
        """Depth of full thread as stated; unknown where none is."""
        extent = self.part.extent
        return self._length(extent.size.nominal) if isinstance(extent, Depth) and extent.size else None


def _offered(thread: Thread) -> str:
    if thread.diameter is None:
        return ""
    if thread.system is ThreadSystem.UNIFIED:
        tpi = only_tpi(thread.diameter.amount, thread.series)
        return "" if tpi is None else f"{thread.size}-{tpi.normalize():f} {thread.series}"
    listed = pitches().get(thread.diameter.amount) if thread.system is ThreadSystem.METRIC else None
    if listed is None:
        return ""
    steps = (*([listed.coarse] if listed.coarse is not None else []), *listed.fine)
    return ", ".join(f"{thread.size}x{step.normalize():f}" for step in steps)
