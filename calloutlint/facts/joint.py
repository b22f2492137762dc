"""Facts about a stated joint as a whole: its members, their counts, what its parts reference."""

from __future__ import annotations

from collections.abc import Iterable, Iterator
from typing import TYPE_CHECKING

from calloutlint.facts.assembly import Member, StatedJoint
from calloutlint.facts.fastener import FastenerView
from calloutlint.facts.feature import leading_size
from calloutlint.facts.fixing import FixingView, is_located
from calloutlint.facts.onward import PartView
from calloutlint.facts.passage import PassageView
from calloutlint.facts.view import View, fact
from calloutlint.model.callout import Callout
from calloutlint.model.drawing import Drawing
from calloutlint.model.fastener import Hold, HoleRef
from calloutlint.model.size import SizeForm
from calloutlint.model.values import Value

if TYPE_CHECKING:
    from calloutlint.facts.callout import CalloutView
    from calloutlint.facts.package import PackageView


class JointView(View):
    """A stated joint; it stands on its first clearance hole."""

    subject = "joint"
    part: StatedJoint

    def __init__(self, part: StatedJoint, package: PackageView) -> None:
        self.part = part
        self._package = package
        first = next((member for member in part.holes if member.callout is not None), None)
        placed = first or next((member for member in part.holes if member.drawing is not None), None)
        self.callout_model: Callout | None = first.callout if first else None
        self.drawing_model: Drawing | None = placed.drawing if placed else part.home
        self.unit = self.drawing_model.unit if self.drawing_model else None

    @fact
    def name(self) -> str:
        """The joint's name."""
        return self.part.joint.name

    @fact
    def fastener(self) -> FastenerView:
        """Its fastener, in the unit of the first clearance hole's drawing."""
        return FastenerView(self.part.joint.fastener, self.unit)

    @fact
    def hold(self) -> Hold | None:
        """Floating or fixed; unknown where it is not said."""
        return self.part.joint.hold

    @property
    def reach(self) -> Value | None:
        """P: the projection, else the thickness, with the unit of the first hole's drawing where it has none."""
        value = self.part.joint.projection or self.part.joint.thickness
        if value is None or value.unit is not None:
            return value
        return Value(value.text, value.amount, self.unit)

    @property
    def passages(self) -> tuple[PassageView, ...]:
        """Its clearance holes: those named first, and those it floats through."""
        mates = self.part.mates if self.hold is Hold.FLOATING else ()
        views = self._views((*self.part.holes, *mates))
        return tuple(PassageView(view, self.part.joint.fastener, self) for view in views)

    @property
    def fixings(self) -> tuple[FixingView, ...]:
        """The holes it is fixed in."""
        mates = self.part.mates if self.hold is Hold.FIXED else ()
        return tuple(FixingView(view, self) for view in self._views(mates))

    @property
    def members(self) -> tuple[MemberView, ...]:
        """Every hole of it that is at hand."""
        views = self._views((*self.part.holes, *self.part.mates))
        return tuple(MemberView(view, self) for view in views)

    def _views(self, members: Iterable[Member]) -> Iterator[CalloutView]:
        return (self._package.view_of(member.callout) for member in members if member.callout is not None)

    @fact
    def missing(self) -> tuple[str, ...]:
        """Balloons it names that their drawing does not have, as the joint writes them."""
        lost = (m for m in self._all if m.drawing is not None and m.callout is None)
        return tuple(_written(member.ref) for member in lost)

    @fact
    def missing_drawings(self) -> tuple[str, ...]:
        """Drawings of clearance holes that are not in the package; the part that fixes may be bought."""
        clearance = self.part.holes if self.hold is Hold.FIXED else self._all
        lost = {m.ref.drawing for m in clearance if m.drawing is None and m.ref.drawing is not None}
        return tuple(sorted(lost)) if self._package.assembled else ()

    @fact
    def no_holes(self) -> tuple[str, ...]:
        """Balloons it names whose callout is no hole, as the joint writes them."""
        found = (m for m in self._all if m.callout is not None and not _may_be_hole(m.callout))
        return tuple(_written(member.ref) for member in found)

    @property
    def _all(self) -> tuple[Member, ...]:
        return (*self.part.holes, *self.part.mates)

    @fact
    def fixing_at_hand(self) -> bool:
        """Whether a hole that fixes the fastener is named and at hand."""
        return bool(self.fixings)

    @fact
    def counts(self) -> tuple[int, ...]:
        """How many holes each drawing has, balloons of one drawing added up; empty where one count is not stated."""
        sums: dict[str, int] = {}
        for member in self._all:
            if member.callout is None or member.drawing is None:
                return ()
            count = member.callout.count
            if count is not None and count.number is None:
                return ()
            sums[member.drawing.name] = sums.get(member.drawing.name, 0) + (count.number if count else 1)  # type: ignore[operator]
        return tuple(sums.values())

    @fact
    def counts_by_drawing(self) -> tuple[str, ...]:
        """The same in words: `SG-1 has 4`."""
        names = dict.fromkeys(member.drawing.name for member in self._all if member.drawing is not None)
        return tuple(f"{name} has {count}" for name, count in zip(names, self.counts, strict=False))

    @fact
    def counts_agree(self) -> bool | None:
        """Whether every drawing has as many holes; unknown where one count is not stated."""
        return len(set(self.counts)) == 1 if self.counts else None


class MemberView(PartView):
    """A hole of a stated joint, clearance or fixing."""

    subject = "member"
    part: Callout

    def __init__(self, callout: CalloutView, joint: JointView) -> None:
        super().__init__(callout.part, callout)
        self._joint = joint

    @fact
    def joint(self) -> JointView:
        """The joint."""
        return self._joint

    @fact
    def located(self) -> bool:
        """Whether it has a position or profile tolerance."""
        return is_located(self._callout)

    @fact
    def frame_free_mates(self) -> tuple[str, ...]:
        """Other parts' holes of the joint whose position has datums, where this one's has none; as balloons."""
        if self._datums is None or self._datums:
            return ()
        others = (m for m in self._joint.members if m.drawing_model is not self.drawing_model)
        return tuple(f"{m.drawing_model.name}:{m.part.balloon}" for m in others if m._datums)

    @property
    def _datums(self) -> int | None:
        """Most datum references of its position lines; None where it has no position."""
        positions = [f for f in self._callout.frames if f.characteristic == "position"]
        return max((len(frame.part.datums) for frame in positions), default=None)


def _may_be_hole(callout: Callout) -> bool:
    """Whether a callout can be a hole: a diameter, thread or hole step, or nothing that says otherwise."""
    if callout.threads or callout.steps or callout.unread:
        return True
    size = leading_size(callout)
    return size is not None and size.form in {SizeForm.DIAMETER, SizeForm.LINEAR}


def _written(ref: HoleRef) -> str:
    return f"{ref.drawing}:{ref.balloon}" if ref.drawing else ref.balloon
