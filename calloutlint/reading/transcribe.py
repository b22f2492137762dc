"""A drawing written out as a callout sheet in canonical text, whatever it was read from."""

from collections.abc import Iterable, Iterator, Sequence

from calloutlint.callouts.write import Style, write_callout
from calloutlint.model.callout import Callout
from calloutlint.model.drawing import Drawing, SheetLine
from calloutlint.model.fastener import Hold, HoleRef, Joint
from calloutlint.model.values import Value
from calloutlint.reading.keys import READ
from calloutlint.reading.title_block import LONGEST_VALUE
from calloutlint.units import Unit

_KEY_WIDTH = 12
_PLAIN = str.maketrans({"±": "+/-", "°": "%%d", "⌀": "DIA ", "×": "x", "–": "-"})

_SYMBOLIC = frozenset({"tolerances", "fastener", "joint"})


def transcribe(drawing: Drawing, style: Style = Style.UNICODE) -> str:
    """The sheet of a drawing, without the comments of the file it was read from.

    Read back, it gives an equal drawing, and the lines that were not understood.
    """
    rows = [f"{key + ':':{_KEY_WIDTH}}{value}" for key, value in _title_block(drawing, style)]
    rows.append("")
    rows += _callouts(drawing.callouts, style, drawing.unit)
    standing = {line.number for callout in drawing.callouts for line in callout.source}
    strays = [line.text for line in drawing.lines if line.key is None and line.number not in standing]
    return "\n".join([*rows, "", *strays] if strays else rows) + "\n"


def joint_text(joint: Joint) -> str:
    """A joint as a sheet or a package states it."""
    clauses = [f"{joint.name} = {_holes(joint.holes)} with {joint.fastener.text}"]
    if joint.hold:
        way = "through" if joint.hold is Hold.FLOATING else "in"
        clauses.append(f"{joint.hold} {way} {_holes(joint.mates)}" if joint.mates else str(joint.hold))
    for what, length in (("projection", joint.projection), ("thickness", joint.thickness)):
        if length:
            clauses.append(f"{what} {_length(length)}")
    return ", ".join(clauses)


def _title_block(drawing: Drawing, style: Style) -> Iterator[tuple[str, str]]:
    for key, value in _stated(drawing):
        if value:
            yield key, value.translate(_PLAIN) if style is Style.ASCII and key in _SYMBOLIC else value
    for line in drawing.lines:
        if line.key and (line.key not in READ or not (line.known or _stands_in_general(line))):
            yield line.key, line.value


def _stands_in_general(line: SheetLine) -> bool:
    """General tolerances are kept as written with what was not understood in them, except where too long."""
    return line.key == "tolerances" and len(line.value) <= LONGEST_VALUE


def _stated(drawing: Drawing) -> Iterator[tuple[str, str | None]]:
    yield "drawing", drawing.number
    yield "revision", drawing.revision
    yield "sheet", drawing.sheet
    yield "title", drawing.title
    yield from _lines_of("standard", drawing.standard.written if drawing.standard else "")
    yield "units", drawing.unit
    yield from _lines_of("tolerances", drawing.general.written if drawing.general else "")
    yield "process", drawing.process.written if drawing.process else None
    yield from (("fastener", fastener.text) for fastener in drawing.fasteners)
    yield from (("joint", joint_text(joint)) for joint in drawing.joints)
    yield from (("note", note) for note in drawing.notes)


def _lines_of(key: str, written: str) -> Iterator[tuple[str, str]]:
    """One line, or as many as the sheet needs so that none is too long to be read."""
    line = ""
    for clause in written.split(", "):
        if line and len(line) + len(clause) > LONGEST_VALUE // 3:  # ± has three characters in plain text
            yield key, line
            line = clause
        else:
            line = f"{line}, {clause}" if line else clause
    yield key, line


def _callouts(callouts: Sequence[Callout], style: Style, unit: Unit | None) -> Iterator[str]:
    tags = [f"{c.balloon} {c.zone}) " if c.zone else f"{c.balloon}) " for c in callouts]
    width = max(map(len, tags), default=0)
    for tag, callout in zip(tags, callouts, strict=True):
        lines = _lines(callout, style, unit)
        yield (tag.ljust(width) + lines[0]).rstrip()
        yield from (" " * width + line for line in lines[1:])


def _lines(callout: Callout, style: Style, unit: Unit | None) -> list[str]:
    """A callout that was not understood in full stands as it was written."""
    if callout.unread and callout.source:
        return [line.text for line in callout.source]
    return write_callout(callout, style, unit) or [""]


def _holes(holes: Iterable[HoleRef]) -> str:
    """Holes of the sheet's own drawing first: a drawing that is named holds for the balloons after it."""
    ordered = sorted(holes, key=lambda hole: hole.drawing is not None)
    return " + ".join(f"{hole.drawing}:{hole.balloon}" if hole.drawing else hole.balloon for hole in ordered)


def _length(length: Value) -> str:
    own = {Unit.MM: " mm", Unit.INCH: " in"}.get(length.unit) if length.unit else None
    return length.text + (own or "")
