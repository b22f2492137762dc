"""What a finding is about inside its callout."""

from collections.abc import Iterator
from dataclasses import fields, is_dataclass

from calloutlint.model.source import Span
from calloutlint.rulebook.finding import Edit, Finding


def faulty_parts(finding: Finding) -> list[object]:
    """The parts inside the part of a finding that its correction changes, if any are; else that part itself."""
    inner = {id(part) for part in nested(finding.part)} - {id(finding.part)}
    changed = [part for edit in finding.edits for part in _changed(edit) if id(part) in inner]
    return changed or [finding.part]


def faulty_span(finding: Finding) -> Span | None:
    """Where the faulty parts stand, from the first to the last; else where the finding stands."""
    parts = faulty_parts(finding)
    spans = [span for part in parts if isinstance(span := getattr(part, "span", None), Span)]
    if parts[0] is finding.part or not spans:
        return finding.span
    here = [span for span in spans if span.line == spans[0].line]
    return Span(here[0].line, min(span.start for span in here), max(span.end for span in here))


def nested(part: object) -> Iterator[object]:
    """A part of the model with all parts inside it."""
    if isinstance(part, tuple):
        for item in part:
            yield from nested(item)
    elif is_dataclass(part) and not isinstance(part, Span | type):
        yield part
        for entry in fields(part):
            yield from nested(getattr(part, entry.name))


def _changed(edit: Edit) -> Iterator[object]:
    """What an edit changes: the part that its word names in the target, else the target."""
    targets = edit.target if isinstance(edit.target, tuple) else (edit.target,)
    for target in targets:
        named = getattr(target, edit.word, None) if edit.word else None
        yield named if is_dataclass(named) else target
