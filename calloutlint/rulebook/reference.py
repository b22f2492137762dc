"""The reference of facts: what conditions can ask, by subject."""

from collections.abc import Mapping
from dataclasses import dataclass

from calloutlint.facts.view import View
from calloutlint.facts.views.subjects import SUBJECTS
from calloutlint.rulebook.kinds import ANGLE, LENGTH, Member, Thing, members, single, vocabulary


@dataclass(frozen=True, slots=True)
class FactLine:
    """A fact as listed; `unit` is empty where it has none, `words` are those that it may hold."""

    name: str
    kind: str
    unit: str
    may_be_unknown: bool
    words: tuple[str, ...]
    doc: str


@dataclass(frozen=True, slots=True)
class SubjectFacts:
    """The facts of one kind of view. `examined` says whether rules can examine it, or only reach it."""

    subject: str
    examined: bool
    doc: str
    facts: tuple[FactLine, ...]


def facts(subjects: Mapping[str, type[View]] = SUBJECTS) -> list[SubjectFacts]:
    """Every fact of every subject, and of every view that they lead to."""
    examined = set(subjects.values())
    return [
        SubjectFacts(
            subject=view.subject,
            examined=view in examined,
            doc=(view.__doc__ or "").strip(),
            facts=tuple(_line(member) for member in members(Thing("", view)).values()),
        )
        for view in _reached(subjects)
    ]


def _reached(subjects: Mapping[str, type[View]]) -> list[type[View]]:
    found = list(subjects.values())
    for view in found:  # the list grows while it is gone through
        kinds = (single(member.kind) for member in members(Thing("", view)).values())
        led = dict.fromkeys(kind.view for kind in kinds if isinstance(kind, Thing))
        found += [view for view in led if view not in found]
    return found


def _line(member: Member) -> FactLine:
    inner = single(member.kind)
    unit = "drawing's unit" if inner is LENGTH else "degrees" if inner is ANGLE else ""
    return FactLine(member.name, member.kind.name, unit, member.optional, tuple(vocabulary(inner)), member.doc)
