"""An invented subject for the condition language: a valve with stems, and what conditions say of it."""

from __future__ import annotations

from decimal import Decimal
from enum import StrEnum

from calloutlint.facts.view import Angle, Length, Number, View, fact
from calloutlint.rulebook.resolve import condition, expression
from calloutlint.rulebook.scope import Scope
from calloutlint.rulebook.terms import Term, code_of
from calloutlint.units import Unit


class Metal(StrEnum):
    BRASS = "brass"
    GUNMETAL = "gun metal"
    IRON = "iron"


class Mark(StrEnum):
    CAST = "C"
    TESTED = "T"


class StemView(View):
    """A valve stem."""

    subject = "stem"

    def __init__(self, name: str, unit: Unit | None, across: str | None, marks: tuple[Mark, ...] = ()) -> None:
        self.unit = unit
        self._name, self._across, self._marks = name, across, marks

    @fact
    def name(self) -> str:
        """Its name."""
        return self._name

    @fact
    def across(self) -> Length | None:
        """Its diameter."""
        return None if self._across is None else Decimal(self._across)

    @fact
    def marks(self) -> tuple[Mark, ...]:
        """The marks cast on it."""
        return self._marks

    @fact
    def tested(self) -> bool:
        """Whether it was tested."""
        return Mark.TESTED in self._marks


class ValveView(View):
    """A sluice valve."""

    subject = "valve"

    def __init__(
        self,
        unit: Unit | None = Unit.MM,
        bore: str | None = "80",
        metal: Metal = Metal.BRASS,
        stems: tuple[StemView, ...] = (),
        flags: tuple[bool | None, ...] = (None, None, None),
    ) -> None:
        self.unit = unit
        self._bore, self._metal, self._stems, self._flags = bore, metal, stems, flags

    @fact
    def bore(self) -> Length | None:
        """Its bore."""
        return None if self._bore is None else Decimal(self._bore)

    @fact
    def lift(self) -> Length:
        """How far the gate lifts."""
        return Decimal("25.4") if self.unit is Unit.MM else Decimal("1")

    @fact
    def slope(self) -> Angle:
        """Slope of the seat."""
        return Decimal("5.5")

    @fact
    def ratio(self) -> Number:
        """Ratio of the gear."""
        return Decimal("2.5")

    @fact
    def bolts(self) -> int:
        """Number of bolts."""
        return 8

    @fact
    def metal(self) -> Metal:
        """What it is cast of."""
        return self._metal

    @fact
    def count(self) -> int:
        """How many are ordered."""
        return 3

    @fact
    def rising_stem(self) -> bool:
        """Whether its stem rises."""
        return True

    @fact
    def stems(self) -> tuple[StemView, ...]:
        """Its stems."""
        return self._stems

    @fact
    def stem(self) -> StemView | None:
        """The first stem."""
        return self._stems[0] if self._stems else None

    @fact
    def letters(self) -> tuple[str, ...]:
        """Letters on its plate."""
        return ("A", "B")

    @fact
    def one(self) -> bool | None:
        """A flag that may be unknown."""
        return self._flags[0]

    @fact
    def two(self) -> bool | None:
        """Another."""
        return self._flags[1]

    @fact
    def three(self) -> bool | None:
        """A third."""
        return self._flags[2]


def truth(term: Term, view: View) -> bool | None:
    """True, False, or None for unknown, by the two tests that a condition becomes."""
    holds, fails = code_of(term.holds).read(view), code_of(term.fails).read(view)
    assert not (holds and fails)
    outcome: bool | None = True if holds else False if fails else None
    assert [code_of(term.value).read(view)] == [outcome]
    return outcome


def ask(text: str, view: View | None = None) -> bool | None:
    return truth(condition(text, Scope(ValveView)), view or ValveView())


def value(text: str, view: View | None = None) -> object:
    return code_of(expression(text, Scope(ValveView)).value).read(view or ValveView())


STEMS = (
    StemView("left", Unit.MM, "12", (Mark.CAST,)),
    StemView("right", Unit.MM, "14", (Mark.CAST, Mark.TESTED)),
)
