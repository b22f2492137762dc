"""Facts about a stated joint as a whole: its members, their counts, what its parts reference."""

from __future__ import annotations

from collections.abc import Iterable, Iterator
from decimal import Decimal
from functools import cached_property
from typing import TYPE_CHECKING

from calloutlint.facts.assembly import Member, StatedJoint
from calloutlint.facts.sides import side_by_words
from calloutlint.facts.sizes import amount_in, basic_major, leading_size
from calloutlint.facts.view import View, fact
from calloutlint.facts.views.fastener import FastenerView
from calloutlint.facts.views.feature import SURFACE_WORDS
from calloutlint.facts.views.fixing import FixingView
from calloutlint.facts.views.joined import JoinedView
from calloutlint.facts.views.located import positions
from calloutlint.facts.views.passage import PassageView
from calloutlint.model.callout import Callout, FastenerNote
from calloutlint.model.drawing import Drawing
from calloutlint.model.fastener import Fastener, Hold, HoleRef
from calloutlint.model.size import SizeForm
from calloutlint.model.values import Value
from calloutlint.units import Unit

if TYPE_CHECKING:
    from calloutlint.facts.views.callout import CalloutView
    from calloutlint.facts.views.package import PackageView

OUTER_PARTS = 2


class JointView(View):
    """A stated joint; it stands on its first clearance hole."""

    subject = "joint"
    part: StatedJoint

    def __init__(self, part: StatedJoint, package: PackageView) -> None:
        self.part = part
        self._package = package
        standing = part.holes or part.mates
        first = next((member for member in standing if member.callout is not None), None)
        placed = first or next((member for member in standing if member.drawing is not None), None)
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
        return FastenerView(self.part.joint.fastener, self.unit, self.drawing_model, self.callout_model)

    @fact
    def hold(self) -> Hold | None:
        """Floating or fixed; unknown where it is not said."""
        return self.part.joint.hold

    @property
    def reach(self) -> Value | None:
        """P: the projection, else the thickness of what is fastened."""
        return self.part.joint.projection or self.part.joint.thickness

    @cached_property
    def passages(self) -> tuple[PassageView, ...]:
        """Its clearance holes: those named first, and those it floats through; tapped ones left out."""
        clear = (member for member in self.part.clearance if _is_hole(member) and not _is_tapped(member))
        return tuple(PassageView(self._view(member), self.part.joint.fastener, self) for member in clear)

    @cached_property
    def fixings(self) -> tuple[FixingView, ...]:
        """The holes it is fixed in."""
        return tuple(FixingView(self._view(member), self) for member in self.part.fixing if _fixes(member))

    @cached_property
    def members(self) -> tuple[MemberView, ...]:
        """Every hole of it that is at hand."""
        fastener = self.part.joint.fastener
        return tuple(MemberView(self._view(member), fastener, self) for member in self._at_hand)

    @property
    def _at_hand(self) -> Iterator[Member]:
        yield from (member for member in self.part.clearance if _is_hole(member))
        yield from (member for member in self.part.fixing if _fixes(member))

    def _view(self, member: Member) -> CalloutView:
        assert member.callout is not None
        return self._package.view_of(member.callout)

    def is_outermost(self, callout: Callout) -> bool:
        """Whether a clearance hole is in the part under the head: the first named, or one of only two."""
        parts = list(dict.fromkeys(_part_name(member) for member in self.part.clearance))
        two = self.hold is Hold.FLOATING and len(parts) == OUTER_PARTS
        outer = parts if two else parts[:1]
        own = (member for member in self.part.clearance if member.callout is callout)
        return any(_part_name(member) in outer for member in own)

    @fact
    def missing(self) -> tuple[str, ...]:
        """Balloons it names that their drawing does not have, as the joint writes them."""
        lost = (m for m in self.part.members if m.drawing is not None and m.callout is None)
        return tuple(_written(member.ref) for member in lost)

    @fact
    def missing_drawings(self) -> tuple[str, ...]:
        """Drawings of clearance holes that are not in the package; the part that fixes may be bought."""
        lost = {m.ref.drawing for m in self.part.clearance if m.drawing is None and m.ref.drawing is not None}
        return tuple(sorted(lost)) if self._package.assembled else ()

    @fact
    def no_holes(self) -> tuple[str, ...]:
        """Balloons it names whose callout is no hole, as the joint writes them."""
        lost = [member for member in self.part.clearance if member.callout and not _is_hole(member)]
        lost += [member for member in self.part.fixing if member.callout and not _fixes(member)]
        return tuple(_written(member.ref) for member in lost)

    @fact
    def fixing_lost(self) -> tuple[str, ...]:
        """Fixing holes it names that are not at hand, as the joint writes them."""
        return tuple(_written(member.ref) for member in self.part.fixing if member.callout is None)

    @fact
    def noted_otherwise(self) -> tuple[str, ...]:
        """Its clearance holes beside which a note names a fastener of another diameter: `4 (M5)`."""
        own = self._major(self.part.joint.fastener)
        holes = (member for member in self.part.holes if member.callout is not None and own is not None)
        return tuple(
            f"{_written(member.ref)} ({note.fastener.text})"
            for member in holes
            for note in (member.callout.parts if member.callout else ())
            if isinstance(note, FastenerNote) and self._major(note.fastener) not in {own, None}
        )

    @staticmethod
    def _major(fastener: Fastener) -> Decimal | None:
        return amount_in(basic_major(fastener.thread), Unit.MM) if fastener.thread else None

    @fact
    def fixing_at_hand(self) -> bool:
        """Whether a hole that fixes the fastener is named and at hand."""
        return bool(self.fixings)

    @cached_property
    def _sums(self) -> dict[str, int]:
        """How many holes each member has: the holes of a drawing added up, the mates by themselves.

        Members on one drawing are told apart by their balloons.
        """
        sums: dict[tuple[str, str], int | None] = {}
        known = {id(member) for member in self._at_hand}
        for role, members in self._by_role:
            for member in members:
                key = (_part_name(member), role)
                before, more = sums.get(key, 0), _count(member) if id(member) in known else None
                sums[key] = None if before is None or more is None else before + more
        names = [name for name, _ in sums]
        balloons = {role: _balloons(members) for role, members in self._by_role}
        return {
            _member_name(name, balloons[role], names): number
            for (name, role), number in sums.items()
            if number is not None
        }

    @property
    def _by_role(self) -> tuple[tuple[str, tuple[Member, ...]], ...]:
        return ("holes", self.part.holes), ("mates", self.part.mates)

    @fact
    def counts(self) -> tuple[int, ...]:
        """How many holes each member has, as far as counts are stated; balloons of one drawing add up."""
        return tuple(self._sums.values())

    @fact
    def counts_by_drawing(self) -> tuple[str, ...]:
        """The same in words: `SG-1 has 4`."""
        return tuple(f"{name} has {number}" for name, number in self._sums.items())

    @fact
    def counts_agree(self) -> bool:
        """Whether every member whose count is stated has as many holes."""
        return len(set(self.counts)) <= 1


class MemberView(JoinedView):
    """A hole of a stated joint, clearance or fixing, or one taken for a clearance hole."""

    subject = "member"

    @fact
    def owes_location(self) -> bool:
        """Whether it has to be located by itself: a joint line names it, or it is a drilled clearance hole.

        A note beside a reamed or tapped hole, or one with a fit code, says what goes in, not where it is.
        """
        if self._joint is None or not self._joint.part.noted:
            return True
        return self._joint.part.clearance != () and not self._callout.hole.fitted

    @fact
    def frame_free_mates(self) -> tuple[str, ...]:
        """Other drawings' holes of the joint whose position has datums, where this has none; as balloons."""
        if self._joint is None or self._datums != 0 or self.part.datum_features:
            return ()
        others = (m for m in self._joint.members if m.drawing_model is not self.drawing_model)
        return tuple(f"{m.drawing_model.name}:{m.part.balloon}" for m in others if m._datums)

    @property
    def _datums(self) -> int | None:
        """Most datum references of its position lines; None where it has no position."""
        return max((len(line.part.datums) for line in positions(self._callout)), default=None)


def _is_hole(member: Member) -> bool:
    """Whether what a member names can be a hole: nothing says that it is outside material or a plain face."""
    return (
        member.callout is not None and side_by_words(member.callout) is not False and _has_width(member.callout)
    )


def _is_tapped(member: Member) -> bool:
    return member.callout is not None and bool(member.callout.threads)


def _fixes(member: Member) -> bool:
    """Whether what a member names can fix a fastener: a hole, or a stud or pin that is there already."""
    return member.callout is not None and _has_width(member.callout)


def _has_width(callout: Callout) -> bool:
    """Whether a callout has a diameter, a thread, a step, or a width that is located or goes into depth."""
    if callout.threads or callout.steps or callout.unread:
        return True
    size = leading_size(callout)
    if size is None or callout.meanings & SURFACE_WORDS:
        return False
    if size.form is SizeForm.LINEAR:
        located = any(segment.characteristic == "position" for segment in callout.segments)
        deep = any(each.extent is not None for each in callout.sizes)
        return located or deep or side_by_words(callout) is not None
    return size.form is SizeForm.DIAMETER


def _count(member: Member) -> int | None:
    count = member.callout.count if member.callout else None
    return count.number if count else 1


def _part_name(member: Member) -> str:
    return member.drawing.name if member.drawing else member.ref.drawing or ""


def _member_name(name: str, balloons: str, names: list[str]) -> str:
    """What a member is called: its drawing, with its balloons where it has others, they alone on one sheet."""
    if len(names) > 1 and set(names) == {name}:
        return f"balloon {balloons}"
    return f"{name}:{balloons}" if names.count(name) > 1 else name


def _balloons(members: Iterable[Member]) -> str:
    return "+".join(member.ref.balloon for member in members)


def _written(ref: HoleRef) -> str:
    return f"{ref.drawing}:{ref.balloon}" if ref.drawing else ref.balloon
