"""Which holes the stated joints tie together: joints of the package, of its sheets, and of fastener notes."""

from collections.abc import Iterator
from dataclasses import dataclass, replace

from calloutlint.facts.sides import side_by_words
from calloutlint.facts.sizes import leading_size, stated_limits
from calloutlint.model.callout import Callout, FastenerNote
from calloutlint.model.drawing import Drawing, Package
from calloutlint.model.fastener import Fastener, Hold, HoleRef, Joint
from calloutlint.model.hole import StepKind
from calloutlint.model.size import Deviations, Limits, PlusMinus, Size, SizeForm
from calloutlint.model.values import Value
from calloutlint.units import Unit, convert


@dataclass(frozen=True, slots=True)
class Member:
    """One balloon that a joint names. `drawing` and `callout` are None where the package does not have them."""

    ref: HoleRef
    drawing: Drawing | None
    callout: Callout | None


@dataclass(frozen=True, slots=True)
class StatedJoint:
    """A stated joint with its balloons looked up; `home` is the drawing that states it, if any.

    `noted` where no joint line states it, but a note beside the hole.
    """

    joint: Joint
    home: Drawing | None
    holes: tuple[Member, ...]
    mates: tuple[Member, ...]
    noted: bool = False

    @property
    def members(self) -> tuple[Member, ...]:
        """Every balloon that it names."""
        return (*self.holes, *self.mates)

    @property
    def clearance(self) -> tuple[Member, ...]:
        """Balloons of its clearance holes: those named first, and those it floats through."""
        return self.members if self.joint.hold is Hold.FLOATING else self.holes

    @property
    def fixing(self) -> tuple[Member, ...]:
        """Balloons of the holes it is fixed in."""
        return () if self.joint.hold is Hold.FLOATING else self.mates


class Assembly:
    """The stated joints of a package."""

    def __init__(self, package: Package) -> None:
        self._by_number: dict[str, list[Drawing]] = {}
        for drawing in package.drawings:
            self._by_number.setdefault(drawing.name.casefold(), []).append(drawing)
        self._balloons = {
            (id(drawing), callout.balloon): callout
            for drawing in package.drawings
            for callout in reversed(drawing.callouts)
        }
        stated = [self._resolve(joint, home) for joint, home in _stated(package)]
        named = {id(member.callout) for joint in stated for member in joint.members}
        noted = [
            replace(self._resolve(_noted(callout, note), drawing), noted=True)
            for drawing, callout, note in _notes(package)
            if id(callout) not in named
        ]
        self.joints = (*stated, *noted)
        self._clearance = {id(member.callout) for joint in self.joints for member in joint.clearance}
        self._named = {id(member.callout) for joint in self.joints for member in joint.members}

    def is_clearance(self, callout: Callout) -> bool:
        """Whether a stated joint has the callout as a clearance hole."""
        return id(callout) in self._clearance

    def is_joined(self, callout: Callout) -> bool:
        """Whether a stated joint names the callout at all."""
        return id(callout) in self._named

    def _resolve(self, joint: Joint, home: Drawing | None) -> StatedJoint:
        holes = tuple(self._find(ref, home) for ref in joint.holes)
        named = next((member.drawing for member in holes if member.drawing is not None), None)
        mates = tuple(self._find(ref, home or named) for ref in joint.mates)
        sheets = [member.drawing for member in (*holes, *mates) if member.drawing is not None]
        first = sheets[0] if sheets else home
        return StatedJoint(_in_unit(joint, first.unit if first else None), home, holes, mates)

    def _find(self, ref: HoleRef, home: Drawing | None) -> Member:
        if ref.drawing is None:
            sheets = [home] if home is not None else []
        else:
            sheets = self._by_number.get(ref.drawing.casefold(), [])
        for sheet in sheets:
            callout = self._balloons.get((id(sheet), ref.balloon))
            if callout is not None:
                return Member(ref, sheet, callout)
        return Member(ref, sheets[0] if sheets else None, None)


def _stated(package: Package) -> Iterator[tuple[Joint, Drawing | None]]:
    yield from ((joint, None) for joint in package.joints)
    for drawing in package.drawings:
        yield from ((joint, drawing) for joint in drawing.joints)


def _notes(package: Package) -> Iterator[tuple[Drawing, Callout, FastenerNote]]:
    for drawing in package.drawings:
        for callout in drawing.callouts:
            notes = (part for part in callout.parts if isinstance(part, FastenerNote))
            yield from ((drawing, callout, note) for note in notes if _joins(callout, note.fastener))


def _joins(callout: Callout, fastener: Fastener) -> bool:
    """Whether a note makes a joint: its callout is a hole, and it says the size of what goes in.

    Flats, keyseats and slots are made for screws, keys and pins too; `FOR SCREW` says no more than the hole.
    """
    size = leading_size(callout)
    hole = bool(callout.threads) or (size is not None and size.form is SizeForm.DIAMETER)
    sized = fastener.thread is not None or fastener.pin is not None
    return hole and sized and side_by_words(callout) is not False


def _noted(callout: Callout, note: FastenerNote) -> Joint:
    """The joint that a note makes: of its own hole as a clearance hole, or as the one that fixes."""
    here, name = (HoleRef(None, callout.balloon),), f"balloon {callout.balloon}"
    if _holds(callout, note.fastener):
        return Joint(name, (), note.fastener, note.hold, here)
    return Joint(name, here, note.fastener, note.hold)


def _holds(callout: Callout, fastener: Fastener) -> bool:
    """Whether the hole that names a fastener fixes it: tapped, finished to fit a pin, or not surely larger."""
    if callout.threads:
        return True
    size = leading_size(callout)
    if fastener.pin is None or size is None:
        return False
    if size.fit is not None or any(step.kind is StepKind.REAM for step in callout.steps):
        return True
    hole, pin = stated_limits(size), stated_limits(fastener.pin)
    largest = pin[1] if pin else (fastener.pin.nominal.amount if fastener.pin.nominal else None)
    if hole is None or largest is None:
        return True
    unit, other = _unit_of(size), _unit_of(fastener.pin)
    thickest = convert(largest, other, unit) if unit and other else largest
    return hole[0] < thickest or (pin is None and hole[0] == thickest)


def _unit_of(size: Size) -> Unit | None:
    return size.nominal.unit if size.nominal else None


def _in_unit(joint: Joint, unit: Unit | None) -> Joint:
    """The joint with `unit` for each length that states none: the projection, the thickness, a pin."""
    pin = joint.fastener.pin
    return replace(
        joint,
        projection=_stating(joint.projection, unit),
        thickness=_stating(joint.thickness, unit),
        fastener=replace(joint.fastener, pin=_pin_in(pin, unit)) if pin else joint.fastener,
    )


def _pin_in(pin: Size, unit: Unit | None) -> Size:
    tolerance = pin.tolerance
    match tolerance:
        case PlusMinus(amount):
            tolerance = PlusMinus(replace(amount, unit=amount.unit or unit))
        case Deviations(upper, lower):
            tolerance = Deviations(
                replace(upper, unit=upper.unit or unit), replace(lower, unit=lower.unit or unit)
            )
        case Limits(first, second, named):
            ends = replace(first, unit=first.unit or unit), replace(second, unit=second.unit or unit)
            tolerance = Limits(*ends, named)
    return replace(pin, nominal=_stating(pin.nominal, unit), tolerance=tolerance)


def _stating(value: Value | None, unit: Unit | None) -> Value | None:
    return value if value is None or value.unit is not None else replace(value, unit=unit)
