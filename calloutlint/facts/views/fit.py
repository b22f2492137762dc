"""Facts about a fit code, and about the fit that a size makes with what goes with it."""

from __future__ import annotations

import re
from collections.abc import Iterator
from dataclasses import dataclass
from decimal import Decimal
from typing import TYPE_CHECKING

from calloutlint.facts.formulas.fits import Fit, FitKind, states_class
from calloutlint.facts.sides import side_by_hole, side_by_words
from calloutlint.facts.sizes import leading_size
from calloutlint.facts.view import Length, fact
from calloutlint.facts.views.fastener import FastenerView
from calloutlint.facts.views.part import PartView
from calloutlint.model.callout import FastenerNote, Meaning, Words
from calloutlint.model.fastener import Fastener
from calloutlint.model.size import FitCode, Limits, Size
from calloutlint.trade import iso286
from calloutlint.units import Unit, convert

if TYPE_CHECKING:
    from calloutlint.facts.views.callout import CalloutView

LARGEST_MM = Decimal(3150)
PLACES = {Unit.MM: Decimal("0.001"), Unit.INCH: Decimal("0.0001")}
CALLED = {Meaning.CLEARANCE_FIT: FitKind.CLEARANCE, Meaning.INTERFERENCE_FIT: FitKind.INTERFERENCE}
_PAIRED = re.compile(r"/\s*(?P<letters>[A-Za-z]{1,2})(?P<grade>\d{1,2})\b")


class FitView(PartView):
    """The ISO 286 tolerance class of a size, such as H7."""

    subject = "fit"
    part: Size

    @property
    def _code(self) -> FitCode:
        assert self.part.fit is not None
        return self.part.fit

    @fact
    def text(self) -> str:
        """The class as written, `H7`."""
        return str(self._code)

    @property
    def _nominal_mm(self) -> Decimal | None:
        nominal = self.part.nominal
        if nominal is None or nominal.unit not in {Unit.MM, Unit.INCH}:
            return None
        return convert(nominal.amount, nominal.unit, Unit.MM)

    @property
    def _deviations(self) -> iso286.LimitDeviations | None:
        return iso286.limits(self._nominal_mm, self._code) if self._nominal_mm is not None else None

    @fact
    def exists(self) -> bool | None:
        """Whether ISO 286 has the class at this nominal size; unknown without a nominal size and its unit."""
        return None if self._nominal_mm is None else self._deviations is not None

    @fact
    def in_range(self) -> bool | None:
        """Whether the nominal size is one that ISO 286 covers: more than 0, at most 3150 mm."""
        return None if self._nominal_mm is None else 0 < self._nominal_mm <= LARGEST_MM

    @fact
    def capital(self) -> bool:
        """Whether its letter is a capital: a hole's."""
        return self._code.letters[0].isupper()

    @fact
    def on_internal(self) -> bool | None:
        """Whether the feature is internal by all that is stronger than the letter: words, joint, hole."""
        if paired(self.part, self._callout):
            return None
        return _side(self.part, self._callout)

    @fact
    def in_other_case(self) -> str:
        """The class with its letter in the other case, `h7` for `H7`."""
        return self._code.letters.swapcase() + self._code.grade

    def _here(self, deviation: Decimal | None) -> Decimal | None:
        if deviation is None or self.unit not in PLACES:
            return None
        return convert(deviation, Unit.MM, self.unit).quantize(PLACES[self.unit])

    @fact
    def upper(self) -> Length | None:
        """Upper limit deviation of the class, to a micrometre or four places of an inch."""
        return self._here(self._deviations.upper) if self._deviations else None

    @fact
    def lower(self) -> Length | None:
        """Lower limit deviation of the class, to a micrometre or four places of an inch."""
        return self._here(self._deviations.lower) if self._deviations else None

    @fact
    def largest(self) -> Length | None:
        """Upper limit of size of the class."""
        nominal = self._length(self.part.nominal)
        return None if nominal is None or self.upper is None else nominal + self.upper

    @fact
    def smallest(self) -> Length | None:
        """Lower limit of size of the class."""
        nominal = self._length(self.part.nominal)
        return None if nominal is None or self.lower is None else nominal + self.lower

    @fact
    def by_limits(self) -> bool:
        """Whether limits of size stand beside it, not deviations."""
        return isinstance(self.part.tolerance, Limits)

    @fact
    def agrees(self) -> bool | None:
        """Whether the limits written beside it are its own; unknown where none are, or ISO 286 lacks it."""
        if self.part.tolerance is None or self.part.nominal is None:
            return None
        return states_class(self.part.nominal, self._code, self.part.tolerance)


@dataclass(frozen=True, slots=True)
class Partner:
    """What a size goes together with: a pin or a code that is stated, or the basic one that is assumed."""

    smallest: Decimal
    largest: Decimal
    named: str
    assumed: bool = False


class MatingView(PartView):
    """The fit that a size makes, where the callout's words call it a clearance or an interference fit."""

    subject = "mating"
    part: Size

    def __init__(
        self, part: Size, callout: CalloutView, called: FitKind, internal: bool, fits: tuple[Fit, Partner]
    ) -> None:
        super().__init__(part, callout)
        self._called = called
        self._internal = internal
        self._fit, self._partner = fits

    @fact
    def called(self) -> FitKind:
        """What the words call it: a clearance fit or an interference fit."""
        return self._called

    @fact
    def kind(self) -> FitKind:
        """What it is by its limits."""
        return self._fit.kind

    @fact
    def least_clearance(self) -> Length:
        """Smallest hole less largest shaft; negative is interference."""
        return self._fit.least_clearance

    @fact
    def greatest_clearance(self) -> Length:
        """Largest hole less smallest shaft; negative is interference."""
        return self._fit.greatest_clearance

    @fact
    def hole_is_own(self) -> bool:
        """Whether the callout's own size is the hole of the fit."""
        return self._internal

    @fact
    def partner(self) -> str:
        """What it is fitted with, as stated or assumed."""
        return self._partner.named

    @fact
    def partner_smallest(self) -> Length:
        """Lower limit of what it is fitted with."""
        return self._partner.smallest

    @fact
    def partner_largest(self) -> Length:
        """Upper limit of what it is fitted with."""
        return self._partner.largest

    @fact
    def partner_assumed(self) -> bool:
        """Whether the partner is the basic hole H or shaft h, for want of a stated one."""
        return self._partner.assumed


def paired(size: Size, callout: CalloutView) -> FitCode | None:
    """The other class of a pair such as H7/g6, which stands behind the size; None where there is none."""
    parts = callout.part.parts
    place = next((i for i, part in enumerate(parts) if part is size), len(parts))
    after = parts[place + 1] if place + 1 < len(parts) else None
    match = _PAIRED.match(after.text) if isinstance(after, Words) else None
    if match is None or size.fit is None or match["letters"].isupper() is size.fit.letters.isupper():
        return None
    return FitCode(match["letters"], match["grade"])


def mating_of(size: Size, callout: CalloutView) -> MatingView | None:
    """The fit of a callout's leading size; None where no words call it any, or its partner is not known."""
    called = {kind for meaning, kind in CALLED.items() if meaning in callout.meanings}
    if len(called) != 1 or size is not leading_size(callout.part):
        return None
    own = callout.view_of(size)
    if own.smallest is None or own.largest is None:
        return None
    kind = called.pop()
    found = _together(size, callout, kind, (own.smallest, own.largest))
    if found is None:
        return None
    internal, fits = found
    return MatingView(size, callout, kind, internal, fits)


def _together(
    size: Size, callout: CalloutView, called: FitKind, limits: tuple[Decimal, Decimal]
) -> tuple[bool, tuple[Fit, Partner]] | None:
    """Whether the own size is the hole, and its fit, with any partner as called; None where none is known."""
    pins = [pin for pin in _pins(callout) if pin is not None]
    internal = True if pins and size.fit is None else (size.fit is not None and size.fit.letters.isupper())
    partners = pins if pins and internal else list(_coded(size, callout))
    fits = [(_fit(*limits, each, internal), each) for each in partners]
    if not fits:
        return None
    return internal, next((each for each in fits if each[0].kind is called), fits[0])


def _fit(smallest: Decimal, largest: Decimal, partner: Partner, internal: bool) -> Fit:
    if internal:
        return Fit(smallest - partner.largest, largest - partner.smallest)
    return Fit(partner.smallest - largest, partner.largest - smallest)


def _pins(callout: CalloutView) -> Iterator[Partner | None]:
    """Pins that the callout's note or a joint puts into the hole."""
    notes = (part.fastener for part in callout.part.parts if isinstance(part, FastenerNote))
    for fastener in (*notes, *callout.fasteners):
        yield _pin(fastener, callout)


def _pin(fastener: Fastener, callout: CalloutView) -> Partner | None:
    view = FastenerView(fastener, callout.unit)
    if not view.pin or view.smallest is None or view.diameter is None:
        return None
    return Partner(view.smallest, view.diameter, view.text)


def _coded(size: Size, callout: CalloutView) -> Iterator[Partner]:
    """The other class of a stated pair; else the basic hole or shaft of the usual grades, by assumption."""
    if size.fit is None or size.nominal is None or size.nominal.unit not in {Unit.INCH, Unit.MM}:
        return
    stated = paired(size, callout)
    codes = [stated] if stated else _basic(size.fit)
    for code in codes:
        limits = callout.fit_limits(Size(size.form, size.nominal, fit=code))
        if limits is not None:
            yield Partner(limits[0], limits[1], str(code), assumed=stated is None)


def _basic(code: FitCode) -> list[FitCode]:
    """Basic partners: H of the shaft's grade and the next coarser, h of the hole's and the next finer."""
    if code.letters in {"H", "h"} or not code.grade.isdecimal():
        return []
    letter, other = ("h", -1) if code.letters.isupper() else ("H", 1)
    return [FitCode(letter, str(int(code.grade) + step)) for step in (other, 0)]


def _side(size: Size, callout: CalloutView) -> bool | None:
    """Whether a size is of an internal feature by words, joint or signs of a hole; None where nothing says."""
    if any(step.size is size for step in callout.part.steps):
        return True
    if size is not leading_size(callout.part):
        return True if size.extent is not None else None
    said, holed = side_by_words(callout.part), side_by_hole(callout.part)
    if said is False and (holed or callout.in_any_joint):
        only_pin = not callout.part.meanings & {Meaning.SHAFT, Meaning.BOSS, Meaning.TAB}
        return None if only_pin else False
    if said is not None:
        return said
    return True if callout.in_any_joint or holed else None
