"""Corrections written into a sheet's file: nothing else in it touched, all at once or not at all."""

import re
from collections.abc import Iterable
from dataclasses import replace
from pathlib import Path

from calloutlint._whole import write_whole
from calloutlint.callouts.write import Style
from calloutlint.model.callout import Callout
from calloutlint.reading.encoding import Text, encode, read_text_file
from calloutlint.redline.splice import new_lines
from calloutlint.units import Unit

_LINES = re.compile("[^\r\n]*(?:\r\n|\r|\n)|[^\r\n]+")
_LINE_END = re.compile("[\r\n]*$")


def incorporate(path: Path, unit: Unit | None, changes: Iterable[tuple[Callout, Callout]]) -> None:
    """Write corrected callouts into their sheet.

    `changes` pairs each callout as read with its corrected form. Encoding, byte order mark, line ends and every
    line that does not change stay as they are.

    Raises CalloutlintError, leaving the file as it was, where it cannot be written.
    """
    text = read_text_file(path)
    lines = _LINES.findall(text.text)
    style = _style_of(text)
    for old, new in sorted(changes, key=lambda pair: pair[0].source[0].number, reverse=True):
        _put(lines, old, new_lines(old, new, unit, style), text.newline)
    write_whole(path, encode(replace(text, text="".join(lines)), str(path)))


def _style_of(text: Text) -> Style:
    """ASCII for a sheet that has no symbol outside it, or cannot hold one; else Unicode."""
    return Style.UNICODE if text.encoding.startswith("utf") and not text.text.isascii() else Style.ASCII


def _put(lines: list[str], old: Callout, new: list[str], newline: str) -> None:
    """Put a callout's new lines where its old ones stand, each after what stands before it on its line."""
    last = old.source[-1]
    indent = lines[last.number - 1][: last.column] if len(old.source) > 1 else " " * last.column
    if len(new) > len(old.source):
        added = [f"{indent}{line}{newline}" for line in new[len(old.source) :]]
        lines[last.number - 1] = lines[last.number - 1].rstrip("\r\n") + newline
        lines[last.number : last.number] = added
    for source, line in reversed(list(zip(old.source, [*new, *[None] * len(old.source)], strict=False))):
        place = source.number - 1
        if line is None:
            del lines[place]
        else:
            lines[place] = lines[place][: source.column] + line + _LINE_END.findall(lines[place])[0]
