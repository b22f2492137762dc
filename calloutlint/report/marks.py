"""Where a finding points in a drawn callout: which row, which compartment, or which columns of a line."""

from collections.abc import Iterable, Iterator, Sequence
from typing import NamedTuple

from calloutlint.model.frame import Frame
from calloutlint.model.size import Count, Through
from calloutlint.model.source import NOWHERE, Span
from calloutlint.model.values import Value
from calloutlint.report.faulty import faulty_parts, nested
from calloutlint.report.layout import FrameRow, Row
from calloutlint.rulebook.finding import Finding


class Mark(NamedTuple):
    """A letter that refers to a finding, and its style; no letter where a heavy line is enough."""

    letter: str
    style: str


class Place(NamedTuple):
    """A marked place: a piece of a row, `columns` of its text, or the row as a whole (`piece` is None)."""

    row: int
    piece: int | None
    columns: tuple[int, int] | None = None


def places(rows: Sequence[Row], finding: Finding) -> list[Place]:
    """The places of a finding, the narrowest that are known; none where it is about the whole callout."""
    faulty = faulty_parts(finding)
    if faulty[0] is None or faulty[0] is finding.callout:
        return []
    by_span = list(_by_span(rows, finding.span)) if finding.span else []
    if faulty[0] is finding.part and finding.span not in (None, NOWHERE, getattr(finding.part, "span", None)):
        return by_span
    by_part = [place for part in faulty for place in _by_part(rows, part)]
    by_row = [place for part in faulty for place in _by_row(rows, part)]
    return by_part or by_row or by_span


def _by_part(rows: Sequence[Row], part: object) -> Iterator[Place]:
    for number, row in enumerate(rows):
        for index, piece in enumerate(row.pieces):
            if any(inner is part for inner in nested(piece.part)):
                quoted = piece.columns(getattr(part, "span", None))
                yield Place(number, index, quoted or _written(piece.text, part))


def _written(text: str, part: object) -> tuple[int, int] | None:
    """The columns of a count, a number or THRU in canonical text; None where they are not certain."""
    match part:
        case Count() | Through():
            wanted = part.written
        case Value():
            wanted = part.text
        case _:
            return None
    start = text.find(wanted)
    return None if start < 0 or start != text.rfind(wanted) else (start, start + len(wanted))


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
