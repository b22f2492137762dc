"""A rule ready to run: its sheet with every text checked."""

from collections.abc import Callable, Iterator, Mapping
from contextlib import contextmanager
from dataclasses import dataclass, field
from enum import StrEnum
from functools import cached_property
from typing import Any

from calloutlint.errors import RuleSheetError
from calloutlint.facts.view import View
from calloutlint.model.drawing import Standard
from calloutlint.rulebook.correction import Correction, correction
from calloutlint.rulebook.finding import GRADES, Finding, Grade
from calloutlint.rulebook.holds import Holding, applies, holding
from calloutlint.rulebook.kinds import FLAG, Listing, Thing, Words
from calloutlint.rulebook.message import Message, Said, message, slot
from calloutlint.rulebook.resolve import condition, expression
from calloutlint.rulebook.scope import Scope
from calloutlint.rulebook.sheet import LimitAmount, Sheet
from calloutlint.rulebook.terms import (
    EXAMINED,
    Comparison,
    Constant,
    Fact,
    Junction,
    Measure,
    Term,
    Variable,
    Writer,
)
from calloutlint.rulebook.text_error import TextError, nearest


@dataclass(frozen=True)
class Variant:
    """What is said otherwise where `when` holds; None where the sheet's own stands."""

    when: Term
    grade: Grade | None = None
    say: Message | None = None
    assumed: Message | None = None
    correction: Correction | None = None

    @cached_property
    def holds(self) -> Callable[[View], Any]:
        """Whether it is certain that `when` holds."""
        writer = Writer()
        return writer.function(self.when.holds(writer))


@dataclass(frozen=True)
class Rule:
    """One rule; `variants` end with the sheet's own wording, which always holds."""

    sheet: Sheet
    grade: Grade
    view: type[View]
    when: Term | None
    demand: Term
    variants: tuple[Variant, ...]
    stands_on: Term | None = None
    holdings: tuple[Holding, ...] = ()

    @property
    def id(self) -> str:
        """Its id, `FIT-06`."""
        return self.sheet.id

    def applies_under(self, standard: Standard | None) -> bool:
        """Whether it holds under the standard that a drawing states."""
        return applies(self.holdings, standard)

    @cached_property
    def fires(self) -> Callable[[View], Any]:
        """Whether, for certain, `when` holds of a view and `demand` does not."""
        writer = Writer()
        fails = self.demand.fails(writer)
        return writer.function(f"{self.when.holds(writer)} and {fails}" if self.when else fails)

    @cached_property
    def _stands_on(self) -> Callable[[View], Any]:
        writer = Writer()
        return writer.function(self.stands_on.value(writer) if self.stands_on else EXAMINED)

    def judge(self, view: View) -> Finding | None:
        """The finding about a view that the rule fires on; None where its message meets an unknown value."""
        holding_here = [variant for variant in self.variants if variant.holds(view)]
        said = next((said for said in _said(holding_here, view) if said), None)
        if said is None:
            return None
        place = self._place(view)
        return Finding(
            rule=self.id,
            grade=_first([variant.grade for variant in holding_here]) or Grade.OBSERVATION,
            title=self.sheet.title,
            message=said.text,
            figures=said.figures,
            assumed=_assumed(holding_here, view),
            drawing=getattr(place, "drawing_model", None),
            callout=getattr(place, "callout_model", None),
            part=place.part,
            span=place.span,
            edits=(_first([variant.correction for variant in holding_here]) or Correction()).edits(view),
        )

    def _place(self, view: View) -> View:
        """The view that the finding stands on: the examined one where the sheet names no other."""
        place = self._stands_on(view)
        if isinstance(place, tuple):
            place = place[0] if place else None
        return view if place is None else place

    @cached_property
    def index(self) -> Mapping[str, frozenset[StrEnum]]:
        """Facts of the examined view that must hold one of a few words for the rule to fire, and those words."""
        conjuncts = self.when.inner if isinstance(self.when, Junction) and self.when.word == "and" else [self.when]
        found: dict[str, frozenset[StrEnum]] = {}
        for term in conjuncts:
            fact, words = _required(term)
            if fact:
                found[fact] = found.get(fact, words) & words
        return found


def _said(variants: list[Variant], view: View) -> Iterator[Said | None]:
    return (variant.say.say(view) for variant in variants if variant.say)


def _assumed(variants: list[Variant], view: View) -> str | None:
    chosen = _first([variant.assumed for variant in variants])
    said = chosen.say(view) if chosen else None
    return said.text or None if said else None


def _first(options: list[Any]) -> Any:
    return next((option for option in options if option is not None), None)


def _required(term: Term | None) -> tuple[str, frozenset[StrEnum]]:
    """The fact and the words that a term like `frame is position` or `frame in [a, b]` requires; else no fact."""
    nothing: tuple[str, frozenset[StrEnum]] = ("", frozenset())
    if isinstance(term, Junction) and term.word == "or":
        parts = [_required(inner) for inner in term.inner]
        facts = {fact for fact, _ in parts}
        return (facts.pop(), frozenset().union(*(words for _, words in parts))) if len(facts) == 1 else nothing
    if not (isinstance(term, Comparison) and term.operator == "==" and isinstance(term.left, Fact)):
        return nothing
    own = isinstance(term.left.owner, Variable) and term.left.owner.name == EXAMINED
    if own and isinstance(term.right, Constant) and isinstance(term.right.kind, Words):
        return term.left.name, frozenset({term.right.constant})
    return nothing


@dataclass
class _Reader:
    """Reads the texts of one sheet and keeps every mistake, so that all are told at once."""

    file: str
    scope: Scope
    problems: list[str] = field(default_factory=list)

    @contextmanager
    def key(self, key: str, text: str) -> Iterator[None]:
        try:
            yield
        except TextError as error:
            self.problems.append(f"{self.file}: key '{key}': {error.shown_in(text)}")

    def condition(self, key: str, text: str) -> Term:
        with self.key(key, text):
            return condition(text, self.scope)
        return Constant(constant=False, kind=FLAG)

    def message(self, key: str, text: str, figures: list[str]) -> Message:
        slots = []
        for name in figures:
            with self.key("figures", name):
                slots.append(slot(name, self.scope))
        with self.key(key, text):
            return message(text, self.scope, slots)
        return Message(())

    def correction(self, key: str, text: str) -> Correction:
        with self.key(key, text):
            return correction(text, self.scope)
        return Correction()

    def view(self, key: str, text: str) -> Term | None:
        if not text:
            return None
        with self.key(key, text):
            term = expression(text, self.scope)
            inner = term.kind.item if isinstance(term.kind, Listing) else term.kind
            if not isinstance(inner, Thing):
                raise TextError(f"a finding cannot stand on {term.kind.name}", 0, len(text))
            return term
        return None


def build_rule(sheet: Sheet, file: str, subjects: Mapping[str, type[View]]) -> Rule:
    """The rule of a sheet, every text of it checked against the facts of the subject that it examines.

    Raises:
        RuleSheetError: something in it is wrong; the message tells each mistake with its key and place.
    """
    view = subjects.get(sheet.examine)
    if view is None:
        raise RuleSheetError(f"{file}: key 'examine': '{sheet.examine}' is no subject{nearest(sheet.examine, subjects)}")
    reader = _Reader(file, Scope(view))
    reader.scope = Scope(view, _limits(sheet.limits, reader))
    rule = Rule(
        sheet=sheet,
        grade=GRADES[sheet.grade],
        view=view,
        when=reader.condition("when", sheet.when) if sheet.when else None,
        demand=reader.condition("demand", sheet.demand),
        variants=(*_variants(sheet, reader), _own_wording(sheet, reader)),
        stands_on=reader.view("stands_on", sheet.stands_on),
        holdings=tuple(holding(text) for text in sheet.holds),
    )
    if reader.problems:
        raise RuleSheetError("\n".join(reader.problems))
    return rule


def _variants(sheet: Sheet, reader: _Reader) -> Iterator[Variant]:
    for number, stated in enumerate(sheet.variant, start=1):
        key = f"variant.{number}"
        yield Variant(
            when=reader.condition(f"{key}.when", stated.when),
            grade=GRADES[stated.grade] if stated.grade else None,
            say=None if stated.say is None else reader.message(f"{key}.say", stated.say, sheet.figures),
            assumed=None if stated.assumed is None else reader.message(f"{key}.assumed", stated.assumed, []),
            correction=None if stated.redline is None else reader.correction(f"{key}.redline", stated.redline),
        )


def _own_wording(sheet: Sheet, reader: _Reader) -> Variant:
    return Variant(
        when=Constant(constant=True, kind=FLAG),
        grade=GRADES[sheet.grade],
        say=reader.message("say", sheet.say, sheet.figures),
        assumed=reader.message("assumed", sheet.assumed, []) if sheet.assumed else None,
        correction=reader.correction("redline", sheet.redline),
    )


def _limits(stated: Mapping[str, LimitAmount], reader: _Reader) -> dict[str, Term]:
    found: dict[str, Term] = {}
    for name, amount in stated.items():
        text = str(amount)
        with reader.key(f"limits.{name}", text):
            found[name] = _limit(name, text, reader.scope)
    return found


def _limit(name: str, text: str, scope: Scope) -> Term:
    if scope.lookup(name) is not None:
        raise TextError(f"'{name}' already means something here: choose another name", 0, len(text))
    term = expression(text, scope)
    if not isinstance(term, Constant | Measure):
        raise TextError("a limit is a number, or a length or an angle with its unit", 0, len(text))
    return term
