"""A callout laid out for drawing: lines of text, frames with their compartments, datum feature symbols."""

from collections.abc import Iterator
from typing import NamedTuple

from calloutlint.callouts.write import Style, write_part
from calloutlint.model.callout import Callout, DatumFeature, Part, Unread
from calloutlint.model.frame import Frame, Scope, ScopeKind, Segment
from calloutlint.model.source import Span
from calloutlint.report.printable import printable

LONGEST = 240
"""Characters of a source line that are quoted; longer ones are cut short."""


class Piece(NamedTuple):
    """Text to draw, with the part it stands for and its place in the source.

    `ends` is given for text drawn as the source has it: where each of its characters ends in `text`.
    """

    text: str
    part: object = None
    span: Span | None = None
    ends: tuple[int, ...] = ()

    def columns(self, span: Span | None) -> tuple[int, int] | None:
        """The columns of `text` that a span of the source takes; None where that is not known."""
        if not self.ends or self.span is None or span is None:
            return None
        first, last = (max(0, min(edge - self.span.start, len(self.ends))) for edge in (span.start, span.end))
        return (self.ends[first - 1] if first else 0), (self.ends[last - 1] if last else 0)


class TextRow(NamedTuple):
    """Sizes, threads, steps and words that stand on one line."""

    pieces: tuple[Piece, ...]


class FrameRow(NamedTuple):
    """One line of a feature control frame; the first cell is the symbol, empty on a composite's lower lines."""

    pieces: tuple[Piece, ...]
    segment: Segment | None = None
    lower: bool = False
    beside: str = ""


class DatumRow(NamedTuple):
    """Datum feature symbols side by side."""

    pieces: tuple[Piece, ...]


Row = TextRow | FrameRow | DatumRow


def lay_out(callout: Callout, style: Style, like: Callout | None = None) -> list[Row]:
    """The rows of a callout in reading order, lines that hold unread text as they stand in the source.

    Parts share a line where they do in the source, or in that of the callout `like` it with the same parts.
    """
    torn = {part.span.line for part in callout.unread if part.span.line < len(callout.source)}
    rows: list[Row] = []
    before = None
    for part, home in zip(callout.parts, _homes(callout, like), strict=True):
        for line, row in _rows_of(part, style):
            if line not in torn:
                _add(rows, row, joins=home is not None and home == before)
            elif not any(_stands_on(row, line) for row in rows):
                rows.append(_verbatim(callout, line, style))
        before = home
    return rows


def _homes(callout: Callout, like: Callout | None) -> list[int | None]:
    """The line that each part stands on; None for frames, which have lines of their own."""
    same = like is not None and [type(part) for part in like.parts] == [type(part) for part in callout.parts]
    parts = like.parts if like is not None and same else callout.parts
    return [None if isinstance(part, Frame) else part.span.line for part in parts]


def _rows_of(part: Part, style: Style) -> Iterator[tuple[int, Row]]:
    if isinstance(part, Frame):
        yield from _frame_rows(part, style)
    elif isinstance(part, DatumFeature):
        yield part.span.line, DatumRow((Piece(printable(part.letter, style), part, part.span),))
    else:
        yield part.span.line, TextRow((Piece(_text(part, style), part, part.span),))


def _frame_rows(frame: Frame, style: Style) -> Iterator[tuple[int, Row]]:
    if frame.count:
        piece = Piece(frame.count.written, frame.count, frame.count.span)
        yield frame.count.span.line, TextRow((piece,))
    for number, segment in enumerate(frame.segments):
        beside = _scope_words(frame.scope, style) if frame.scope and not number else ""
        yield segment.span.line, FrameRow(_cells(segment, style), segment, number > 0, beside)


def _cells(segment: Segment, style: Style) -> tuple[Piece, ...]:
    texts = [text.strip() for text in _text(segment, style).split("|")]
    parts = [None, segment.zone, *segment.datums]
    return tuple(
        Piece(text, part, part.span if part else None) for text, part in zip(texts, parts, strict=False)
    )


def _text(part: Part | Segment, style: Style) -> str:
    written = write_part(part, style)
    return printable(written if isinstance(written, str) else " ".join(written), style)


def _scope_words(scope: Scope, style: Style) -> str:
    arrows = {ScopeKind.BETWEEN: ("↔", "<->"), ScopeKind.FROM_TO: ("→", "->")}
    if scope.kind not in arrows:
        return scope.kind.value.upper()
    arrow = arrows[scope.kind][style is Style.ASCII]
    return printable(f"{scope.start} {arrow} {scope.end}", style)


def _add(rows: list[Row], row: Row, *, joins: bool) -> None:
    """Append a row; text that joins what stands before it and datum symbols go on in the last row."""
    last = rows[-1] if rows else None
    if joins and isinstance(row, TextRow) and isinstance(last, TextRow):
        rows[-1] = TextRow(last.pieces + row.pieces)
    elif isinstance(row, DatumRow) and isinstance(last, DatumRow):
        rows[-1] = DatumRow(last.pieces + row.pieces)
    else:
        rows.append(row)


def _stands_on(row: Row, line: int) -> bool:
    return any(piece.span is not None and piece.span.line == line for piece in row.pieces)


def _verbatim(callout: Callout, line: int, style: Style) -> Row:
    """A source line as written; one that holds unread text between bars is still drawn in compartments."""
    text = callout.source[line].text
    unread = [part for part in callout.unread if part.span.line == line]
    if "|" not in text:
        return TextRow((_quoted(text, line, 0, unread, style),))
    pieces, start = [], 0
    for cell in text.split("|"):
        pieces.append(_quoted(cell, line, start, unread, style))
        start += len(cell) + 1
    lower = not pieces[0].text
    return FrameRow(tuple(piece for piece in pieces if piece.text or lower), lower=lower)


def _quoted(text: str, line: int, start: int, unread: list[Unread], style: Style) -> Piece:
    begin = start + len(text) - len(text.lstrip())
    span = Span(line, begin, start + len(text.rstrip()))
    inside = next((part for part in unread if span.start <= part.span.start < span.end), None)
    quoted = text.strip()[:LONGEST]
    ends = tuple(len(printable(quoted[: end + 1], style)) for end in range(len(quoted)))
    more = "…" if len(quoted) < len(text.strip()) else ""
    return Piece(printable(quoted + more, style), inside, span, ends)
