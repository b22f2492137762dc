"""Where a finding points in a drawn callout: which row, which compartment, or which columns of a line."""

from collections.abc import Iterable, Iterator, Sequence
from dataclasses import dataclass, fields, is_dataclass

from calloutlint.model.frame import Frame, Segment
from calloutlint.model.source import NOWHERE, Span
from calloutlint.report.layout import FrameRow, Row
from calloutlint.rulebook.finding import Edit, Finding


@dataclass(frozen=True, slots=True)
class Mark:
    """A letter that refers to a finding, and its style; no letter where a heavy line is enough."""

    letter: str
    style: str


@dataclass(frozen=True, slots=True)
class Place:
    """A marked place: a piece of a row, `columns` of its text, or the row as a whole (`piece` is None)."""

    row: int
    piece: int | None
    columns: tuple[int, int] | None = None


def places(rows: Sequence[Row], finding: Finding) -> list[Place]:
    """The places of a finding, the narrowest that are known; none where it is about the whole callout."""
    if finding.part is None or finding.part is finding.callout:
        return []
    narrow = _narrower(finding)
    by_span = list(_by_span(rows, finding.span)) if narrow and finding.span else []
    corrected = _corrected(finding)
    by_edit = [place for target in corrected for place in _by_part(rows, target)]
    by_part = list(_by_part(rows, finding.part))
    whole = list(_by_row(rows, finding.part))
    return (
        by_span or by_edit or by_part or whole or (list(_by_span(rows, finding.span)) if finding.span else [])
    )


def _narrower(finding: Finding) -> bool:
    own = getattr(finding.part, "span", None)
    return isinstance(own, Span) and finding.span is not None and finding.span not in (own, NOWHERE)


def _corrected(finding: Finding) -> list[object]:
    """The parts of a frame line that the redline changes: they are at fault, not the line as a whole."""
    if not isinstance(finding.part, Segment):
        return []
    inner = {id(part) for part in _nested(finding.part)} - {id(finding.part)}
    return [target for edit in finding.edits for target in _targets(edit) if id(target) in inner]


def _targets(edit: Edit) -> tuple[object, ...]:
    return edit.target if isinstance(edit.target, tuple) else (edit.target,)


def _by_part(rows: Sequence[Row], part: object) -> Iterator[Place]:
    for number, row in enumerate(rows):
        for index, piece in enumerate(row.pieces):
            if any(inner is part for inner in _nested(piece.part)):
                yield Place(number, index, piece.columns(getattr(part, "span", None)))


def _by_row(rows: Sequence[Row], part: object) -> Iterator[Place]:
    segments: Iterable[object] = part.segments if isinstance(part, Frame) else [part]
    for number, row in enumerate(rows):
        if isinstance(row, FrameRow) and any(row.segment is segment for segment in segments):
            yield Place(number, None)


def _by_span(rows: Sequence[Row], span: Span) -> Iterator[Place]:
    for number, row in enumerate(rows):
        for index, piece in enumerate(row.pieces):
            if piece.span and _overlap(piece.span, span):
                yield Place(number, index, piece.columns(span))


def _overlap(one: Span, other: Span) -> bool:
    return one.line == other.line and one.start < other.end and other.start < one.end


def _nested(part: object) -> Iterator[object]:
    """A part of the model with all parts inside it."""
    if isinstance(part, tuple):
        for item in part:
            yield from _nested(item)
    elif is_dataclass(part) and not isinstance(part, Span | type):
        yield part
        for entry in fields(part):
            yield from _nested(getattr(part, entry.name))
