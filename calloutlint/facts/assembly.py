"""Which holes the stated joints tie together: joints of the package, of its sheets, and of fastener notes."""

from collections.abc import Iterator
from dataclasses import dataclass

from calloutlint.model.callout import Callout, FastenerNote
from calloutlint.model.drawing import Drawing, Package
from calloutlint.model.fastener import HoleRef, Joint


@dataclass(frozen=True, slots=True)
class Member:
    """One balloon that a joint names. `drawing` and `callout` are None where the package does not have them."""

    ref: HoleRef
    drawing: Drawing | None
    callout: Callout | None


@dataclass(frozen=True, slots=True)
class StatedJoint:
    """A stated joint with its balloons looked up; `home` is the drawing that states it, if any."""

    joint: Joint
    home: Drawing | None
    holes: tuple[Member, ...]
    mates: tuple[Member, ...]


class Assembly:
    """The stated joints of a package."""

    def __init__(self, package: Package) -> None:
        self._by_number: dict[str, list[Drawing]] = {}
        for drawing in package.drawings:
            self._by_number.setdefault(drawing.name, []).append(drawing)
        self._balloons = {
            (id(drawing), callout.balloon): callout
            for drawing in package.drawings
            for callout in reversed(drawing.callouts)
        }
        self.joints = tuple(self._resolve(joint, home) for joint, home in _stated(package))
        self._clearance = {id(member.callout) for joint in self.joints for member in joint.holes}
        self._named = self._clearance | {id(member.callout) for joint in self.joints for member in joint.mates}

    def is_clearance(self, callout: Callout) -> bool:
        """Whether a stated joint has the callout as a clearance hole."""
        return id(callout) in self._clearance

    def is_joined(self, callout: Callout) -> bool:
        """Whether a stated joint names the callout at all."""
        return id(callout) in self._named

    def _resolve(self, joint: Joint, home: Drawing | None) -> StatedJoint:
        holes = tuple(self._find(ref, home) for ref in joint.holes)
        mates = tuple(self._find(ref, home) for ref in joint.mates)
        return StatedJoint(joint, home, holes, mates)

    def _find(self, ref: HoleRef, home: Drawing | None) -> Member:
        if ref.drawing is None:
            sheets = [home] if home is not None else []
        else:
            sheets = self._by_number.get(ref.drawing, [])
        for sheet in sheets:
            callout = self._balloons.get((id(sheet), ref.balloon))
            if callout is not None:
                return Member(ref, sheet, callout)
        return Member(ref, sheets[0] if sheets else None, None)


def _stated(package: Package) -> Iterator[tuple[Joint, Drawing | None]]:
    yield from ((joint, None) for joint in package.joints)
    for drawing in package.drawings:
        yield from ((joint, drawing) for joint in drawing.joints)
        for callout in drawing.callouts:
            for note in callout.parts:
                if isinstance(note, FastenerNote):
                    here = (HoleRef(None, callout.balloon),)
                    yield Joint(f"balloon {callout.balloon}", here, note.fastener, note.hold), drawing
