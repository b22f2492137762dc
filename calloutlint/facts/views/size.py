"""Facts about a size: its limits, its tolerance, how it is written."""

from __future__ import annotations

from decimal import Decimal
from enum import StrEnum
from typing import TYPE_CHECKING

from calloutlint.facts.sizes import SIGNS, amount_in, bounds, deviations
from calloutlint.facts.view import Length, fact, kept
from calloutlint.facts.views.part import PartView
from calloutlint.model.drawing import GeneralTolerances
from calloutlint.model.size import Deviations, Limits, PlusMinus, Size, SizeForm, SizeModifier, SizeStatus
from calloutlint.model.values import Value
from calloutlint.trade.general_tolerances import covers_angles, general_tolerance
from calloutlint.units import Unit

if TYPE_CHECKING:
    from calloutlint.facts.views.callout import CalloutView
    from calloutlint.facts.views.fit import FitView, MatingView


class Role(StrEnum):
    """What a size measures in its callout."""

    FEATURE = "feature"
    STEP = "step"
    DEPTH = "depth"
    STEP_ANGLE = "step angle"


class SizeView(PartView):
    """A size, a depth, or the diameter or angle of a hole step."""

    subject = "size"
    part: Size

    def __init__(
        self, part: Size, callout: CalloutView, role: Role = Role.FEATURE, *, stock: bool = False
    ) -> None:
        super().__init__(part, callout)
        self._role = role
        self._stock = stock

    @fact
    def role(self) -> Role:
        """What it measures: the feature itself, a hole step, a depth, a step's angle."""
        return self._role

    @fact
    def form(self) -> SizeForm:
        """What its symbol says: linear, diameter, radius, square, angle…"""
        return self.part.form

    @fact
    def status(self) -> SizeStatus:
        """Toleranced, basic, reference, maximum or minimum."""
        return self.part.status

    @fact
    def modifiers(self) -> tuple[SizeModifier, ...]:
        """Symbols that follow the size, such as ST or E."""
        return self.part.modifiers

    @fact
    def nominal(self) -> Length | None:
        """Nominal size; unknown where only limits are written."""
        return self._length(self.part.nominal)

    @fact
    def smallest(self) -> Length | None:
        """Lower limit of size from its explicit tolerance, else from the general tolerance."""
        limits = self._limits
        return limits[0] if limits else None

    @fact
    def largest(self) -> Length | None:
        """Upper limit of size from its explicit tolerance, else from the general tolerance."""
        limits = self._limits
        return limits[1] if limits else None

    @fact
    def total(self) -> Length | None:
        """Total size tolerance: upper limit less lower limit."""
        limits = self._limits
        return limits[1] - limits[0] if limits else None

    @kept
    def _limits(self) -> tuple[Decimal, Decimal] | None:
        explicit = bounds(self.part, self.unit)
        if explicit or self.part.status is not SizeStatus.TOLERANCED or self.part.fit:
            return explicit or self._fit_limits
        if self.nominal is None or self.general is None:
            return None
        return self.nominal - self.general, self.nominal + self.general

    @property
    def _fit_limits(self) -> tuple[Decimal, Decimal] | None:
        return self._callout.fit_limits(self.part) if self.part.fit else None

    @fact
    def fit(self) -> FitView | None:
        """Its ISO 286 tolerance class; unknown where it has none."""
        return self._callout.fit_of(self.part)

    @fact
    def mating(self) -> MatingView | None:
        """The fit that it makes, where words call it one and what it goes with is known; else unknown."""
        return self._callout.mating_of(self.part)

    @fact
    def upper(self) -> Length | None:
        """Upper deviation as written, the first of the two; a limit called MAX counts as upper."""
        return self._written_ends[0] if self._written_ends else None

    @fact
    def lower(self) -> Length | None:
        """Lower deviation as written, the second of the two; a limit called MIN counts as lower."""
        return self._written_ends[1] if self._written_ends else None

    @fact
    def named_limits(self) -> bool:
        """Whether it is two limits with MAX and MIN written out."""
        return isinstance(self.part.tolerance, Limits) and self.part.tolerance.named

    @fact
    def label(self) -> str:
        """The size as the drawing writes it, without its tolerance: `⌀.281`, `R4`, `30°`."""
        value = self.part.nominal
        return SIGNS.get(self.part.form, "") + value.text if value else "the size"

    @kept
    def _written_ends(self) -> tuple[Decimal, Decimal] | None:
        tolerance = self.part.tolerance
        if isinstance(tolerance, Limits):
            first, second = self._length(tolerance.first), self._length(tolerance.second)
            return (first, second) if tolerance.named and first is not None and second is not None else None
        return deviations(self.part, self.unit)

    @fact
    def toleranced(self) -> bool:
        """Whether it carries a tolerance of its own: deviations, limits, a fit code, MAX or MIN."""
        bounded = self.part.status in {SizeStatus.MAXIMUM, SizeStatus.MINIMUM}
        return bounded or self.part.tolerance is not None or self.part.fit is not None

    @fact
    def exempt(self) -> bool:
        """Whether it needs no tolerance: basic, reference, a countersink's angle, a drill called by name."""
        status = self.part.status in {SizeStatus.BASIC, SizeStatus.REFERENCE}
        return status or self._stock or self._role is Role.STEP_ANGLE

    @fact
    def general(self) -> Length | None:
        """The general tolerance (plus and minus) that covers this size; unknown where none does."""
        tolerances = self.drawing_model.general
        if tolerances is None:
            return None
        return general_tolerance(tolerances, self.part, self.unit)

    @fact
    def covered(self) -> bool | None:
        """Whether general tolerances cover this size; unknown where not all of them are read and tabulated."""
        tolerances = self.drawing_model.general
        if self.general is not None or (tolerances and self._is_covered_angle(tolerances)):
            return True
        return None if tolerances and (tolerances.unread or tolerances.unchecked) else False

    def _is_covered_angle(self, tolerances: GeneralTolerances) -> bool:
        return self.part.form is SizeForm.ANGLE and covers_angles(tolerances)

    @fact
    def repeats_general(self) -> bool | None:
        """Whether its explicit tolerance is just the general tolerance."""
        ends = deviations(self.part, self.unit)
        if ends is None or self.general is None:
            return None
        return ends == (self.general, -self.general)

    @fact
    def dual_agrees(self) -> bool | None:
        """Whether the bracketed size is the same size in the other unit, within the rounding of the brackets.

        The nominal has to agree to half a unit in the last place of the bracketed one; limits and deviations,
        which may be rounded inward, to one unit.
        """
        dual = self.part.dual
        if dual is None or self.unit not in {Unit.INCH, Unit.MM}:
            return None
        return _agrees(self.part, dual, self.unit)

    @fact
    def dual(self) -> str:
        """The bracketed size as written; empty where there is none."""
        dual = self.part.dual
        return dual.nominal.text if dual and dual.nominal else ""

    @fact
    def in_other_unit(self) -> str:
        """The nominal size converted to the bracketed size's unit, to its places."""
        dual, nominal = self.part.dual, self.part.nominal
        if dual is None or dual.nominal is None or nominal is None:
            return ""
        amount = amount_in(nominal, dual.nominal.unit)
        return "" if amount is None else f"{amount:.{dual.nominal.places}f}"


def _agrees(size: Size, dual: Size, unit: Unit) -> bool:
    pairs = [(size.nominal, dual.nominal, Decimal("0.5"))]
    match size.tolerance, dual.tolerance:
        case PlusMinus(one), PlusMinus(other):
            pairs.append((one, other, Decimal(1)))
        case Deviations(upper, lower), Deviations(dual_upper, dual_lower):
            pairs += [(upper, dual_upper, Decimal(1)), (lower, dual_lower, Decimal(1))]
        case Limits(first, second), Limits(dual_first, dual_second):
            pairs += [(first, dual_first, Decimal(1)), (second, dual_second, Decimal(1))]
    return all(_same(one, other, share) for one, other, share in pairs if one is not None and other is not None)


def _same(one: Value, other: Value, share: Decimal) -> bool:
    there = amount_in(one, other.unit)
    return there is None or abs(there - other.amount) <= share * _last_place(other)


def _last_place(value: Value) -> Decimal:
    return Decimal(1).scaleb(-value.places)
