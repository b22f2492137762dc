"""A rule ready to run: what it asks of a view, and what it says where the answer is no."""

from collections.abc import Iterable, Mapping
from dataclasses import dataclass
from enum import StrEnum
from functools import cached_property
from typing import TYPE_CHECKING, Any, NamedTuple, TypeVar

from calloutlint.facts.view import View
from calloutlint.model.drawing import Standard
from calloutlint.rulebook.code import Code
from calloutlint.rulebook.correction import Correction
from calloutlint.rulebook.finding import GRADES, Finding, Grade
from calloutlint.rulebook.holds import Holding, applies
from calloutlint.rulebook.message import Message

if TYPE_CHECKING:
    from calloutlint.rulebook.sheet import Sheet

T = TypeVar("T")


class Wording(NamedTuple):
    """What is said where `when` holds; None for what the next wording that holds says."""

    when: Code
    grade: Grade | None = None
    say: Message | None = None
    assumed: Message | None = None
    correction: Correction | None = None


@dataclass(frozen=True)
class Rule:
    """One rule, with its texts as code.

    `stated` is what its sheet states, as plain data. `broken` is true of a view where, for certain, `when`
    holds and `demand` does not; it can be so only where each fact in `required_words` holds one of its words.
    `wordings` end with the sheet's own, which always holds and says everything. `place` gives the view that a
    finding stands on, None for the examined one.
    """

    stated: Mapping[str, Any]
    holdings: tuple[Holding, ...]
    required_words: Mapping[str, frozenset[StrEnum]]
    broken: Code
    wordings: tuple[Wording, ...]
    place: Code | None = None

    @cached_property
    def id(self) -> str:
        """Its id, `FIT-06`."""
        return str(self.stated["id"])

    @cached_property
    def subject(self) -> str:
        """What it examines."""
        return str(self.stated["examine"])

    @property
    def title(self) -> str:
        """What is wrong where it finds something."""
        return str(self.stated["title"])

    @property
    def grade(self) -> Grade:
        """The grade of its findings, where no variant says otherwise."""
        return GRADES[self.stated["grade"]]

    @property
    def yields_to(self) -> tuple[str, ...]:
        """Rules whose finding in the same place takes the place of this one's."""
        return tuple(self.stated["yields_to"])

    @cached_property
    def sheet(self) -> "Sheet":
        """Its sheet as read."""
        from calloutlint.rulebook.sheet import Sheet  # only listings and proofs pay for pydantic

        return Sheet.model_validate(self.stated)

    def applies_under(self, standard: Standard | None) -> bool:
        """Whether it holds under the standard that a drawing states."""
        return applies(self.holdings, standard)

    def judge(self, view: View) -> Finding | None:
        """The finding about a view that breaks the rule; None where its message meets an unknown value."""
        wordings = [wording for wording in self.wordings if wording.when.read(view)]
        said = _first(wording.say.say(view) for wording in wordings if wording.say)
        if said is None:
            return None
        assumed = _first(wording.assumed for wording in wordings)
        assumption = assumed.say(view) if assumed else None
        correction = _first(wording.correction for wording in wordings)
        place = self._place_of(view)
        return Finding(
            rule=self.id,
            grade=_first(wording.grade for wording in wordings) or Grade.OBSERVATION,
            title=self.title,
            message=said.text,
            figures=said.figures,
            assumed=assumption.text or None if assumption else None,
            drawing=place.drawing_model,
            callout=place.callout_model,
            part=place.part,
            span=place.span,
            edits=correction.edits(view) if correction else (),
        )

    def _place_of(self, view: View) -> View:
        """The view that a finding stands on: the examined one where none is named or it is unknown."""
        place = self.place.read(view) if self.place else view
        if isinstance(place, tuple):
            place = place[0] if place else None
        return view if place is None else place


def _first(options: Iterable[T | None]) -> T | None:
    return next((option for option in options if option is not None), None)
