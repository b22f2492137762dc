"""What a finding is about inside its callout."""

from collections.abc import Iterator
from dataclasses import fields, is_dataclass

from calloutlint.model.frame import Segment
from calloutlint.model.source import Span
from calloutlint.rulebook.finding import Edit, Finding


def faulty_parts(finding: Finding) -> list[object]:
    """The part of a finding; of a frame line the parts inside it that the correction changes, if any are."""
    if isinstance(finding.part, Segment):
        inner = {id(part) for part in nested(finding.part)} - {id(finding.part)}
        changed = [target for edit in finding.edits for target in _targets(edit) if id(target) in inner]
        if changed:
            return changed
    return [finding.part]


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


def _targets(edit: Edit) -> tuple[object, ...]:
    return edit.target if isinstance(edit.target, tuple) else (edit.target,)
