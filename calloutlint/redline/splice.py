"""Corrections written into a callout's own lines, with everything that need not change left as it stands."""

from collections.abc import Iterator
from typing import NamedTuple

from calloutlint.callouts.parse import parse_callout
from calloutlint.callouts.write import Style, write_callout, write_part
from calloutlint.model.callout import Callout, Part
from calloutlint.model.frame import Frame, Segment
from calloutlint.model.source import Span
from calloutlint.units import Unit


class Splice(NamedTuple):
    """New text for the columns that `span` names."""

    span: Span
    text: str


def new_lines(old: Callout, new: Callout, unit: Unit | None, style: Style) -> list[str]:
    """The callout's lines with its correction in them, in their own spelling wherever nothing changed.

    Only the changed parts are written anew. Where that does not read back as the corrected callout (a size
    stacked on two lines, say), the callout is written anew as a whole.
    """
    lines = [source.text for source in old.source]
    spliced = _spliced(lines, _splices(old, new, style))
    if spliced is not None and parse_callout(spliced, unit) == new.parts:
        return spliced
    return write_callout(new, style)


def _spliced(lines: list[str], splices: list[Splice] | None) -> list[str] | None:
    if splices is None:
        return None
    new = list(lines)
    for splice in sorted(splices, key=lambda splice: splice.span.start, reverse=True):
        span = splice.span
        line = new[span.line]
        new[span.line] = (line[: span.start] + splice.text + line[span.end :]).rstrip()
    return new


def _splices(old: Callout, new: Callout, style: Style) -> list[Splice] | None:
    """What to write where; None where the corrected callout has other parts than the old one."""
    if len(old.parts) != len(new.parts):
        return None
    found: list[Splice] = []
    for one, other in zip(old.parts, new.parts, strict=True):
        if one == other:
            continue
        pieces = list(_part_splices(one, other, style))
        if not pieces:
            return None
        found += pieces
    return found


def _part_splices(old: Part, new: Part, style: Style) -> Iterator[Splice]:
    if not isinstance(old, Frame) or not isinstance(new, Frame):
        yield Splice(old.span, _one_line(new, style))  # type: ignore[union-attr]
        return
    if len(old.segments) != len(new.segments):
        return
    for row, (one, other) in enumerate(zip(old.segments, new.segments, strict=True)):
        if one != other:
            yield Splice(one.span, _one_line(other, style, lower=row > 0))


def _one_line(part: Part | Segment, style: Style, *, lower: bool = False) -> str:
    written = write_part(part, style, lower=lower)
    return written if isinstance(written, str) else " ".join(written)
