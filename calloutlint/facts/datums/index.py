"""The datum letters of a drawing, and what its datum scheme says of each frame line."""

from __future__ import annotations

from collections.abc import Iterable
from functools import cached_property

from calloutlint.facts.datums.chains import loop_use, loops
from calloutlint.facts.datums.completeness import TargetFault, target_faults
from calloutlint.facts.datums.conflicts import Conflict, boundary_conflicts, order_conflicts
from calloutlint.facts.datums.control import Uncontrolled, uncontrolled
from calloutlint.facts.datums.location import Unlocated, positions_of, unlocated
from calloutlint.facts.datums.scheme import DatumScheme, scheme_of
from calloutlint.facts.datums.uses import Use
from calloutlint.model.callout import Callout, DatumTarget
from calloutlint.model.drawing import Drawing
from calloutlint.model.fastener import Joint
from calloutlint.model.frame import Segment

Line = tuple[int, int]


class DatumIndex:
    """Datums of one drawing, all its sheets together.

    Callouts that read alike share their frames, so a frame line is told by its callout too.
    """

    def __init__(self, sheets: list[Drawing], joints: tuple[Joint, ...]) -> None:
        self._sheets = sheets
        self._joints = joints

    @cached_property
    def scheme(self) -> DatumScheme:
        """The datum scheme."""
        return scheme_of(*self._sheets)

    @cached_property
    def definitions(self) -> dict[str, list[Callout]]:
        """Callouts that establish each letter by a datum feature symbol, else by datum targets."""
        features: dict[str, list[Callout]] = {}
        targets: dict[str, list[Callout]] = {}
        for callout in self._callouts:
            for letter in dict.fromkeys(feature.letter for feature in callout.datum_features):
                features.setdefault(letter, []).append(callout)
            for target in callout.datum_targets:
                targets.setdefault(target.letter, []).append(callout)
        return targets | features

    @cached_property
    def references(self) -> frozenset[str]:
        """Letters that some frame references."""
        segments = (segment for callout in self._callouts for segment in callout.segments)
        refs = (ref for segment in segments for ref in segment.datums)
        return frozenset(letter.letter for ref in refs for letter in ref.letters)

    @property
    def _callouts(self) -> Iterable[Callout]:
        return (callout for sheet in self._sheets for callout in sheet.callouts)

    def unlocated(self, callout: Callout, segment: Segment) -> Unlocated | None:
        """Why a position line does not locate its feature; None where it does, or is no position."""
        if len(segment.datums) > 1:
            return None
        use = next((use for use in positions_of(callout) if use.segment is segment), None)
        return unlocated(use, self.scheme) if use else None

    def reordered_in_joint(self, callout: Callout, segment: Segment) -> str | None:
        """Balloon of the other callout of a joint whose datums stand in another order."""
        conflict = self._orders.get(_line(callout, segment))
        return conflict.other.callout.balloon if conflict and conflict.joint else None

    def reordered(self, callout: Callout, segment: Segment) -> str | None:
        """Balloon of another callout, of no common joint, whose datums stand in another order."""
        conflict = self._orders.get(_line(callout, segment))
        return conflict.other.callout.balloon if conflict and not conflict.joint else None

    def other_boundary(self, callout: Callout, segment: Segment) -> str | None:
        """Balloon of another position with the same datums and other material modifiers."""
        conflict = self._boundaries.get(_line(callout, segment))
        return conflict.other.callout.balloon if conflict else None

    def ring_closed(self, callout: Callout, segment: Segment) -> tuple[str, ...]:
        """Letters of a ring of datum features that this line closes."""
        return self._rings.get(_line(callout, segment), ())

    def uncontrolled(self, letter: str) -> Uncontrolled | None:
        """What control a datum feature lacks; None where it lacks none."""
        return self._uncontrolled.get(letter)

    def target_fault(self, target: DatumTarget) -> TargetFault | None:
        """What is wrong with the targets of a letter, for the first of them."""
        return next((fault for fault in self._target_faults if fault.target is target), None)

    @cached_property
    def _orders(self) -> dict[Line, Conflict]:
        return _by_line(order_conflicts(self.scheme, self._joints))

    @cached_property
    def _boundaries(self) -> dict[Line, Conflict]:
        return _by_line(boundary_conflicts(self.scheme))

    @cached_property
    def _rings(self) -> dict[Line, tuple[str, ...]]:
        return {_place(loop_use(ring, self.scheme)): ring for ring in loops(self.scheme)}

    @cached_property
    def _uncontrolled(self) -> dict[str, Uncontrolled]:
        return {one.feature.letter: one for one in uncontrolled(self.scheme)}

    @cached_property
    def _target_faults(self) -> tuple[TargetFault, ...]:
        return target_faults(self.scheme)


def _by_line(conflicts: Iterable[Conflict]) -> dict[Line, Conflict]:
    return {_place(conflict.use): conflict for conflict in conflicts}


def _place(use: Use) -> Line:
    return _line(use.callout, use.segment)


def _line(callout: Callout, segment: Segment) -> Line:
    return id(callout), id(segment)
