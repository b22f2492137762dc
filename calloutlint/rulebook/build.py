"""Builds a rule from its sheet: checks every text, and tells every mistake at once."""

from collections.abc import Callable, Iterator, Mapping, Sequence
from dataclasses import dataclass, field
from typing import TypeVar

from calloutlint.errors import RuleSheetError
from calloutlint.facts.view import View
from calloutlint.facts.views.subjects import SUBJECTS
from calloutlint.rulebook.changes import correction
from calloutlint.rulebook.code import Code
from calloutlint.rulebook.correction import Correction
from calloutlint.rulebook.finding import GRADES
from calloutlint.rulebook.holds import holding
from calloutlint.rulebook.index import required_words
from calloutlint.rulebook.kinds import FLAG, QUANTITIES, Thing, single
from calloutlint.rulebook.message import Message
from calloutlint.rulebook.resolve import condition, expression
from calloutlint.rulebook.rule import Rule, Wording
from calloutlint.rulebook.scope import Scope
from calloutlint.rulebook.sheet import LIMIT_FORM, Filed, LimitAmount, Sheet
from calloutlint.rulebook.template import message, slot
from calloutlint.rulebook.terms import Constant, Junction, Measure, Negation, Term, code_of
from calloutlint.rulebook.text_error import TextError, nearest

T = TypeVar("T")

ALWAYS: Term = Constant(constant=True, kind=FLAG)


def build_rules(sheets: Sequence[Filed], subjects: Mapping[str, type[View]] = SUBJECTS) -> tuple[Rule, ...]:
    """The rules of some sheets, in their order.

    Raises:
        RuleSheetError: texts of sheets are wrong; the message tells all of them.
    """
    problems: list[str] = []
    rules = []
    for filed in sheets:
        try:
            rules.append(build_rule(filed, subjects))
        except RuleSheetError as error:
            problems.append(str(error))
    if problems:
        raise RuleSheetError("\n".join(problems))
    return tuple(rules)


def build_rule(filed: Filed, subjects: Mapping[str, type[View]]) -> Rule:
    """The rule of a sheet, every text of it checked against the facts of the subject that it examines.

    Raises:
        RuleSheetError: something in it is wrong; the message tells each mistake with its key and place.
    """
    sheet = filed.sheet
    view = subjects.get(sheet.examine)
    if view is None:
        problem = f"'{sheet.examine}' is no subject{nearest(sheet.examine, subjects)}"
        raise RuleSheetError(f"{filed.file}: key 'examine': {problem}")
    reader = _Reader(filed.file, Scope(view))
    reader.scope = Scope(view, dict(_limits(sheet.limits, reader)))
    reader.stop_at_problems()  # texts that name a wrong limit would be told as wrong too
    when = reader.condition("when", sheet.when) if sheet.when else ALWAYS
    demand = reader.condition("demand", sheet.demand)
    rule = Rule(
        stated=sheet.model_dump(mode="json"),
        holdings=tuple(holding(text) for text in sheet.holds),
        required_words=required_words(when),
        broken=code_of(Junction("and", [when, Negation(demand)]).holds),
        wordings=(*_variants(sheet, reader), _own_wording(sheet, reader)),
        place=reader.read("stands_on", sheet.stands_on, _place, None) if sheet.stands_on else None,
    )
    reader.stop_at_problems()
    return rule


@dataclass
class _Reader:
    """Reads the texts of one sheet and keeps what is wrong with them."""

    file: str
    scope: Scope
    problems: list[str] = field(default_factory=list)

    def read(self, key: str, text: str, form: Callable[[str, Scope], T], otherwise: T) -> T:
        """What `form` makes of a text; `otherwise`, and one problem more, where it is wrong."""
        try:
            return form(text, self.scope)
        except TextError as error:
            self.problems.append(f"{self.file}: key '{key}': {error.shown_in(text)}")
        except RecursionError:
            self.problems.append(
                f"{self.file}: key '{key}': this is nested too deeply: state it in fewer steps"
            )
        return otherwise

    def stop_at_problems(self) -> None:
        """Raise what is wrong so far as one `RuleSheetError`."""
        if self.problems:
            raise RuleSheetError("\n".join(self.problems))

    def condition(self, key: str, text: str) -> Term:
        return self.read(key, text, _runnable, ALWAYS)

    def message(self, key: str, text: str | None, figures: list[str]) -> Message | None:
        if text is None:
            return None
        slots = [self.read(f"figures.{number}", name, slot, None) for number, name in enumerate(figures, 1)]
        said = self.read(key, text, message, Message(()))
        return Message(said.pieces, tuple(slot for slot in slots if slot))

    def correction(self, key: str, text: str | None) -> Correction | None:
        return None if text is None else self.read(key, text, correction, None)


def _variants(sheet: Sheet, reader: _Reader) -> Iterator[Wording]:
    for number, stated in enumerate(sheet.variant, start=1):
        key = f"variant.{number}"
        yield Wording(
            when=code_of(reader.condition(f"{key}.when", stated.when).holds),
            grade=GRADES[stated.grade] if stated.grade else None,
            say=reader.message(f"{key}.say", stated.say, sheet.figures),
            assumed=reader.message(f"{key}.assumed", stated.assumed, []),
            correction=reader.correction(f"{key}.redline", stated.redline),
        )


def _own_wording(sheet: Sheet, reader: _Reader) -> Wording:
    return Wording(
        when=code_of(ALWAYS.holds),
        grade=GRADES[sheet.grade],
        say=reader.message("say", sheet.say, sheet.figures),
        assumed=reader.message("assumed", sheet.assumed or None, []),
        correction=reader.correction("redline", sheet.redline),
    )


def _runnable(text: str, scope: Scope) -> Term:
    term = condition(text, scope)
    code_of(term.holds)
    code_of(term.fails)
    return term


def _place(text: str, scope: Scope) -> Code | None:
    term = expression(text, scope)
    if not isinstance(single(term.kind), Thing):
        raise TextError(f"a finding cannot stand on {term.kind.name}", 0, len(text))
    return code_of(term.value)


def _limits(stated: Mapping[str, LimitAmount], reader: _Reader) -> Iterator[tuple[str, Term]]:
    for name, amount in stated.items():
        if reader.scope.lookup(name) is not None:
            reader.problems.append(
                f"{reader.file}: key 'limits.{name}': '{name}' already means something in a rule"
            )
            continue
        term = reader.read(f"limits.{name}", str(amount), limit, None)
        if term is not None:
            yield name, term


def limit(text: str, scope: Scope) -> Term | None:
    """A limit that a sheet states.

    Raises:
        TextError: it is not a plain number, or a length or an angle with its unit.
    """
    try:
        term = expression(text, scope)
    except TextError:
        term = ALWAYS
    if not isinstance(term, Constant | Measure) or term.kind not in QUANTITIES:
        raise TextError(f"{LIMIT_FORM} is expected", 0, len(text))
    return term
