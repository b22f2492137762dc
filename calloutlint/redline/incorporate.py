"""Corrections written into a sheet's file: nothing else in it touched, all at once or not at all."""

import re
from collections.abc import Iterable, Sequence
from dataclasses import replace
from pathlib import Path

from calloutlint._whole import write_whole
from calloutlint.callouts.write import Style
from calloutlint.model.callout import Callout
from calloutlint.reading.encoding import Text, encode, read_text_file
from calloutlint.redline.splice import new_lines
from calloutlint.units import Unit

_LINES = re.compile("[^\r\n]*(?:\r\n|\r|\n)|[^\r\n]+")


def incorporate(path: Path, unit: Unit | None, changes: Iterable[tuple[Callout, Callout]]) -> list[Callout]:
    """Write corrected callouts into their sheet; those that have to be corrected by hand are given back.

    `changes` pairs each callout as read with its corrected form. Encoding, byte order mark, line ends and all
    that does not change stay as they are.

    Raises:
        CalloutlintError: the file cannot be written, and is left as it was.
    """
    text = read_text_file(path)
    lines = _LINES.findall(text.text)
    by_hand = []
    for old, new in changes:
        corrected = new_lines(old, new, unit, _style_of(old, text))
        if corrected is None:
            by_hand.append(old)
        else:
            _put(lines, old, corrected)
    written = "".join(lines)
    if written != text.text:
        write_whole(path, encode(replace(text, text=written), str(path)))
    return by_hand


def _style_of(callout: Callout, text: Text) -> Style:
    """ASCII for a callout that has no symbol outside it, or where the file cannot hold one; else Unicode."""
    plain = all(source.text.isascii() for source in callout.source)
    return Style.ASCII if plain or not text.encoding.startswith("utf") else Style.UNICODE


def _put(lines: list[str], callout: Callout, new: Sequence[str]) -> None:
    """Put a callout's new lines where its old ones stand, each after what stands before it on its line."""
    for source, line in zip(callout.source, new, strict=True):
        place = source.number - 1
        end = source.column + len(source.text)
        lines[place] = lines[place][: source.column] + line + lines[place][end:]
