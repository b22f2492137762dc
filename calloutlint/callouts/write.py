"""Canonical text: what is written for a part so that reading it gives the same part back."""

from collections.abc import Iterator, Sequence

from calloutlint.callouts.expected import BY_PLACE
from calloutlint.callouts.note import names_fastener
from calloutlint.callouts.spelling import normalise
from calloutlint.callouts.words import meanings_behind
from calloutlint.callouts.write_frame import write_frame, write_scope, write_segment
from calloutlint.callouts.write_size import write_size, write_step, write_thread
from calloutlint.callouts.writing import Style, Writing
from calloutlint.model.callout import (
    Callout,
    DatumFeature,
    DatumTarget,
    FastenerNote,
    Part,
    TargetKind,
    Unread,
    Words,
)
from calloutlint.model.frame import Frame, Segment
from calloutlint.model.hole import HoleStep
from calloutlint.model.size import Count, Size, Through
from calloutlint.model.thread import Thread
from calloutlint.units import Unit

_IN_ZONE = (BY_PLACE["zone"], BY_PLACE["letter in zone"], BY_PLACE["bar"])

__all__ = ["Style", "write_callout", "write_part"]


def write_callout(callout: Callout, style: Style, unit: Unit | None = None) -> list[str]:
    """The callout's lines without its balloon.

    A number whose unit is not `unit` carries its own (`6 mm`); without `unit` none does.
    """
    return write_parts(callout.parts, style, unit)


def write_parts(parts: Sequence[Part], style: Style, unit: Unit | None = None) -> list[str]:
    """The lines of several parts in reading order."""
    lines: list[str] = []
    for at, part in enumerate(parts):
        written = write_part(part, style, unit=unit)
        every = [written] if isinstance(written, str) else written
        if at and lines and _joins(parts, at):
            lines[-1] = _joined(lines[-1], every[0], part, parts[at - 1])
            every = every[1:]
        lines += every
    return lines


def write_part(
    part: Part | Segment, style: Style, *, lower: bool = False, unit: Unit | None = None
) -> str | list[str]:
    """The canonical text of one part; the lines of a frame. `lower` writes a composite's lower segment."""
    writing = Writing(style, unit)
    if isinstance(part, Segment):
        return write_segment(part, writing, lower=lower)
    if isinstance(part, Frame):
        return list(_frame_lines(part, writing))
    if isinstance(part, Size):
        return write_size(part, writing)
    if isinstance(part, Thread):
        return write_thread(part, writing)
    if isinstance(part, HoleStep):
        return write_step(part, writing)
    return _write_other(part, writing)


def _frame_lines(frame: Frame, writing: Writing) -> Iterator[str]:
    yield from write_frame(frame, writing)
    if frame.scope is not None:
        yield write_scope(frame.scope, writing)


def _write_other(
    part: DatumFeature | DatumTarget | FastenerNote | Words | Count | Unread, writing: Writing
) -> str:
    if isinstance(part, DatumFeature):
        return f"DATUM {part.letter}"
    if isinstance(part, DatumTarget):
        return _write_target(part, writing)
    if isinstance(part, FastenerNote):
        hold = f" {part.hold.upper()}" if part.hold else ""
        clear = "" if names_fastener(part.fastener.text) else "CLEARANCE "
        return f"{clear}FOR {part.fastener.text}{hold}"
    return part.written if isinstance(part, Count) else part.text


def _write_target(target: DatumTarget, writing: Writing) -> str:
    words = [f"{target.letter}{target.number}"]
    sizes = [writing.value(size) for size in target.sizes]
    if len(sizes) == 1:
        words.append(writing.form("⌀") + sizes[0])
    elif sizes:
        words.append(" X ".join(sizes))
    if target.kind is TargetKind.LINE or (target.kind is TargetKind.AREA and not sizes):
        words.append(target.kind.upper())
    if target.movable:
        words.append("MOVABLE")
    return " ".join(words)


def _joins(parts: Sequence[Part], at: int) -> bool:
    """Whether part `at` stands on the line of the part before it."""
    part, before = parts[at], parts[at - 1]
    following = parts[at + 1] if at + 1 < len(parts) else None
    if isinstance(part, Unread | Words) and isinstance(before, Unread):
        return before.in_frame or isinstance(part, Words)
    if isinstance(part, Unread):
        return getattr(before, "doubtful", False) or (isinstance(before, Frame) and part.in_frame)
    if isinstance(before, Unread):
        return getattr(part, "doubtful", False)
    if isinstance(part, Words) and isinstance(before, Count):
        return not isinstance(following, Size | Thread | HoleStep) and not _is_keyword(part)
    if isinstance(part, Words):
        if _becomes_thru_hole(part, before) or _is_silenced(part, before):
            return False
        tapped = isinstance(before, Thread) and part.text == "TAP"
        return tapped or (isinstance(before, Size | Thread | HoleStep) and _trails(part, following))
    return isinstance(before, Words) and isinstance(part, Size | Thread) and _leads(before)


def _joined(line: str, text: str, part: Part, before: Part) -> str:
    """A line with the text of one more part; what is wrong in a tolerance goes back beside it."""
    if not isinstance(part, Unread):
        return f"{line} {text}"
    if isinstance(before, Frame):
        return _with_wrong_zone(line, text, before) if part.expected in _IN_ZONE else f"{line} | {text}"
    return f"{line} | {text}" if part.in_frame and isinstance(before, Unread) else f"{line} {text}"


def _with_wrong_zone(line: str, text: str, frame: Frame) -> str:
    """The last line of a frame with text that is wrong in its tolerance compartment."""
    compartments = line.split(" | ")
    zone = 0 if line[0] == "|" else 1
    if len(compartments) <= zone + (frame.segments[-1].zone is not None):
        return f"{line} | {text}"
    if frame.segments[-1].zone is None:
        compartments.insert(zone, text)
    else:
        compartments[zone] += f" {text}"
    return " | ".join(compartments)


def _is_silenced(words: Words, before: Part) -> bool:
    """Whether words that name the feature would name it no more behind THRU, as in `THRU BOSS`."""
    through = isinstance(getattr(before, "extent", None), Through)
    return through and meanings_behind("‹THRU›", words.text) != words.meanings


def _becomes_thru_hole(words: Words, before: Part) -> bool:
    """Whether THRU would take the first of the words for its own, as in THRU HOLE."""
    through = isinstance(getattr(before, "extent", None), Through)
    return through and normalise(f"THRU {words.text}").text.partition("›")[2].lstrip() != words.text


def _trails(words: Words, following: Part | None) -> bool:
    """Whether words end the line of the size before them rather than begin the next one's."""
    if words.text in {"X", "DEEP"}:
        return True
    return not isinstance(following, Size | Thread) and not _is_keyword(words)


def _leads(words: Words) -> bool:
    return words.text == "X" or not _is_keyword(words)


def _is_keyword(words: Words) -> bool:
    """Whether the text would act on a number beside it if both stood on one line."""
    return "‹" in normalise(words.text).text
