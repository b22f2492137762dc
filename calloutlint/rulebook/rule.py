"""A rule ready to run: what it asks of a view, and what it says where the answer is no."""

from collections.abc import Callable, Iterable, Mapping
from dataclasses import dataclass
from enum import StrEnum
from functools import cached_property
from typing import Any, TypeVar

from calloutlint.facts.view import View
from calloutlint.model.drawing import Standard
from calloutlint.rulebook.correction import Correction
from calloutlint.rulebook.finding import Finding, Grade
from calloutlint.rulebook.holds import Holding, applies
from calloutlint.rulebook.index import required_words
from calloutlint.rulebook.message import Message
from calloutlint.rulebook.sheet import Sheet
from calloutlint.rulebook.terms import Term, Writer, reading

T = TypeVar("T")


@dataclass(frozen=True)
class Wording:
    """What is said where `when` holds; None for what the next wording that holds says."""

    when: Term
    grade: Grade | None = None
    say: Message | None = None
    assumed: Message | None = None
    correction: Correction | None = None

    @cached_property
    def holds(self) -> Callable[[View], Any]:
        """Whether it is certain that `when` holds."""
        return reading(self.when.holds)


@dataclass(frozen=True)
class Rule:
    """One rule; `wordings` end with the sheet's own, which always holds and says everything."""

    sheet: Sheet
    view: type[View]
    when: Term | None
    demand: Term
    wordings: tuple[Wording, ...]
    stands_on: Term | None
    holdings: tuple[Holding, ...]

    @property
    def id(self) -> str:
        """Its id, `FIT-06`."""
        return self.sheet.id

    def applies_under(self, standard: Standard | None) -> bool:
        """Whether it holds under the standard that a drawing states."""
        return applies(self.holdings, standard)

    @cached_property
    def required_words(self) -> Mapping[str, frozenset[StrEnum]]:
        """Facts of the examined view that must hold one of a few words for it to fire, and those words."""
        return required_words(self.when)

    @cached_property
    def fires(self) -> Callable[[View], Any]:
        """Whether, for certain, `when` holds of a view and `demand` does not."""
        writer = Writer()
        fails = self.demand.fails(writer)
        return writer.function(f"{self.when.holds(writer)} and {fails}" if self.when else fails)

    def judge(self, view: View) -> Finding | None:
        """The finding about a view that the rule fires on; None where its message meets an unknown value."""
        wordings = [wording for wording in self.wordings if wording.holds(view)]
        said = _first(wording.say.say(view) for wording in wordings if wording.say)
        if said is None:
            return None
        assumed = _first(wording.assumed for wording in wordings)
        assumption = assumed.say(view) if assumed else None
        correction = _first(wording.correction for wording in wordings)
        place = self._place(view)
        return Finding(
            rule=self.id,
            grade=_first(wording.grade for wording in wordings) or Grade.OBSERVATION,
            title=self.sheet.title,
            message=said.text,
            figures=said.figures,
            assumed=assumption.text or None if assumption else None,
            drawing=getattr(place, "drawing_model", None),
            callout=getattr(place, "callout_model", None),
            part=place.part,
            span=place.span,
            edits=correction.edits(view) if correction else (),
        )

    @cached_property
    def _read_place(self) -> Callable[[View], Any]:
        return reading(self.stands_on.value) if self.stands_on else lambda examined: examined

    def _place(self, view: View) -> View:
        """The view that the finding stands on: the examined one where the sheet names no other."""
        place = self._read_place(view)
        if isinstance(place, tuple):
            place = place[0] if place else None
        return view if place is None else place


def _first(options: Iterable[T | None]) -> T | None:
    return next((option for option in options if option is not None), None)
