"""Puts rules to everything that a package holds; knows no rule."""

import re
from collections import Counter
from collections.abc import Callable, Iterable, Sequence
from enum import StrEnum
from typing import Any, NamedTuple

from calloutlint.facts.view import View
from calloutlint.model.drawing import Package, Standard
from calloutlint.model.source import Span
from calloutlint.rulebook.finding import Finding
from calloutlint.rulebook.rule import Rule

IN_FRAMES = {"frame", "datum"}
NOWHERE = Span(-1, -1, -1)


Asked = tuple[tuple[Callable[[View], Any], Rule], ...]


class Agenda(NamedTuple):
    """The rules for one subject under one standard, each after its test, by the word that `fact` must hold."""

    fact: str | None
    always: Asked
    by_word: dict[StrEnum, Asked]

    def asked(self, view: View) -> Asked:
        """The rules that a view can break."""
        return self.by_word.get(getattr(view, self.fact), self.always) if self.fact else self.always


class Engine:
    """Rules sorted for speed: by subject, by standard, by the word that they require of one fact."""

    def __init__(self, rules: Sequence[Rule]) -> None:
        self._by_subject: dict[str, list[Rule]] = {}
        for rule in rules:
            self._by_subject.setdefault(rule.subject, []).append(rule)
        self._agendas: dict[Standard | None, dict[str, Agenda]] = {}
        self._yields = {rule.id: frozenset(rule.yields_to) for rule in rules if rule.yields_to}

    def findings(self, views: Iterable[View]) -> list[Finding]:
        """What the rules find in the views, in their order, without what yields to another finding."""
        found: list[tuple[View, Finding]] = []
        drawing, agendas = None, self._agendas_under(None)
        for view in views:
            own = view.drawing_model
            if own is not drawing:
                drawing, agendas = own, self._agendas_under(own.standard if own else None)
            agenda = agendas.get(view.subject)
            if agenda is None or view.doubtful:
                continue
            for broken, rule in agenda.asked(view):
                if broken(view) and (finding := rule.judge(view)):
                    found.append((view, finding))
        return _unrepeated(self._unyielding(found))

    def _agendas_under(self, standard: Standard | None) -> dict[str, Agenda]:
        agendas = self._agendas.get(standard)
        if agendas is None:
            agendas = {
                subject: agenda_of([rule for rule in rules if rule.applies_under(standard)])
                for subject, rules in self._by_subject.items()
            }
            self._agendas[standard] = agendas
        return agendas

    def _unyielding(self, found: list[tuple[View, Finding]]) -> list[Finding]:
        """The findings without those whose rule yields to another that found something in the same place."""
        if not self._yields:
            return [finding for _, finding in found]
        beside: dict[tuple[int, int], list[tuple[View, Finding]]] = {}
        for view, finding in found:
            beside.setdefault((id(finding.drawing), id(finding.callout)), []).append((view, finding))
        kept = []
        for view, finding in found:
            stronger = self._yields.get(finding.rule, frozenset())
            rivals = beside[id(finding.drawing), id(finding.callout)] if stronger else []
            if not any(f.rule in stronger and _same_line(v, f, view, finding) for v, f in rivals):
                kept.append(finding)
        return kept


def agenda_of(rules: Sequence[Rule]) -> Agenda:
    """Rules sorted by the fact on which most of them depend, each list in the order given."""
    facts = Counter(fact for rule in rules for fact in rule.required_words)
    if not facts:
        return Agenda(None, _asked(rules), {})
    fact = facts.most_common(1)[0][0]
    words = {word for rule in rules for word in rule.required_words.get(fact, ())}
    always = [rule for rule in rules if fact not in rule.required_words]
    by_word = {word: [rule for rule in rules if _possible(rule, fact, word)] for word in words}
    return Agenda(fact, _asked(always), {word: _asked(possible) for word, possible in by_word.items()})


def _possible(rule: Rule, fact: str, word: StrEnum) -> bool:
    return fact not in rule.required_words or word in rule.required_words[fact]


def _asked(rules: Iterable[Rule]) -> Asked:
    return tuple((rule.broken.read, rule) for rule in rules)


def _same_line(view: View, finding: Finding, other_view: View, other: Finding) -> bool:
    """Whether two findings of a callout stand on one frame line, or not both in frames."""
    one, two = finding.span, other.span
    if not (view.subject in IN_FRAMES and other_view.subject in IN_FRAMES and one and two):
        return True
    return one.line == two.line and one.start < two.end and two.start < one.end


def _unrepeated(findings: list[Finding]) -> list[Finding]:
    """Findings without those that say the same of the same part again."""
    first = {(f.rule, id(f.drawing), id(f.callout), id(f.part), f.message): f for f in reversed(findings)}
    kept = {id(finding) for finding in first.values()}
    return [finding for finding in findings if id(finding) in kept]


def ordered(findings: list[Finding], package: Package) -> list[Finding]:
    """Findings by drawing (the package as a whole first), balloon, place in the callout, then grade."""
    places = {id(drawing): number for number, drawing in enumerate(package.drawings)}

    def key(finding: Finding) -> tuple[object, ...]:
        callout, span = finding.callout, finding.span or NOWHERE
        return (
            places.get(id(finding.drawing), -1),
            balloon_key(callout.balloon) if callout else [],
            callout.source[0].number if callout and callout.source else -1,
            span.line,
            span.start,
            -finding.grade,
            finding.rule,
        )

    return sorted(findings, key=key)


def balloon_key(balloon: str) -> list[tuple[int, int, str]]:
    """Sorts balloons as people count: 2 before 10, 4 before 4.1 before 4A."""
    pieces = re.findall(r"\d+|\D+", balloon)
    return [(0, int(piece), "") if piece.isdecimal() else (1, 0, piece) for piece in pieces]
