"""The reference of facts: what conditions can ask, by subject."""

from collections.abc import Iterator, Mapping
from dataclasses import dataclass

from calloutlint.facts.subjects import SUBJECTS
from calloutlint.facts.view import FactEntry, View, facts_of
from calloutlint.rulebook.kinds import ANGLE, LENGTH, Kind, Listing, Thing, Words, kind_of


@dataclass(frozen=True, slots=True)
class FactLine:
    """A fact as listed. `kind` says what it is; `unit` is empty for what has none; `words` are those it may hold."""

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
            facts=tuple(_line(entry) for entry in facts_of(view).values()),
        )
        for view in _reached(subjects)
    ]


def _reached(subjects: Mapping[str, type[View]]) -> list[type[View]]:
    found = list(subjects.values())
    for view in found:
        led = (_view(kind_of(entry.result)) for entry in facts_of(view).values())
        found += [v for v in dict.fromkeys(led) if v is not None and v not in found]
    return found


def _view(kind: Kind) -> type[View] | None:
    inner = kind.item if isinstance(kind, Listing) else kind
    return inner.view if isinstance(inner, Thing) else None


def _line(entry: FactEntry) -> FactLine:
    kind = kind_of(entry.result)
    inner = kind.item if isinstance(kind, Listing) else kind
    unit = "drawing's unit" if inner is LENGTH else "degrees" if inner is ANGLE else ""
    words = tuple(inner.vocabulary) if isinstance(inner, Words) else ()
    return FactLine(entry.name, kind.name, unit, entry.optional, words, entry.doc)


def rows(subjects: list[SubjectFacts]) -> Iterator[tuple[str, FactLine]]:
    """Every fact with its subject, for a flat listing."""
    return ((group.subject, line) for group in subjects for line in group.facts)
