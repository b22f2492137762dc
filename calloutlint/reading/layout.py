"""How a sheet's lines fall into title-block lines, callouts and lines that belong to neither."""

import re
from collections.abc import Iterator, Sequence
from dataclasses import dataclass, field

from calloutlint.callouts.spelling import opens_feature
from calloutlint.model.drawing import SheetLine
from calloutlint.model.source import SourceLine
from calloutlint.reading.balloons import USUAL, Numbered, Style, find_style, in_other_styles
from calloutlint.reading.keys import is_known, normal_key
from calloutlint.reading.openings import opens_datum, opens_frame

_KEY = re.compile(
    r"(?P<indent>\s*)(?P<key>[A-Za-z][A-Za-z0-9 ./_&'-]{0,39}?)[ \t]*:(?P<gap>[ \t]*)(?P<value>.*)"
)
_INDENTED_COMMENT = re.compile(r"\s*#(?:\s+(?!\d)|$)")
_STRAY = "the line belongs to no callout; a balloon such as 12) opens one"
_PARTED = "a {} without a callout: no blank line may stand between a callout and its {}"
_RESEMBLES = "looks like a balloon in another style; write {})"


@dataclass(slots=True)
class Block:
    """The lines of one callout, before they are parsed. `balloon` is its number on a sheet without tags."""

    balloon: str
    zone: str | None = None
    lines: list[SourceLine] = field(default_factory=list)


@dataclass(slots=True)
class Layout:
    """A sheet taken apart: callouts in order, title-block lines, and lines that belong to no callout.

    Lines that stand in a callout, but may be meant to open one, are in `strays` too. `style` is how the
    balloons are written, where it is not the usual way.
    """

    blocks: list[Block] = field(default_factory=list)
    pairs: list[SheetLine] = field(default_factory=list)
    strays: list[SheetLine] = field(default_factory=list)
    style: Style | None = None


def lay_out(lines: Sequence[str]) -> Layout:
    """Takes a sheet's lines apart; on a sheet without any balloon tag the callouts are numbered 1, 2, 3 …"""
    if any(USUAL.pattern.match(line) for line in lines):
        layout = _tagged(lines, USUAL)
        layout.strays += _resembling(layout.blocks)
    elif style := find_style(list(_without_title_block(lines))):
        layout = _tagged(lines, style)
        layout.style = style
    else:
        layout = _untagged(lines)
    return layout


def _tagged(lines: Sequence[str], style: Style) -> Layout:
    layout = Layout()
    block: Block | None = None
    below_callout = False
    for number, line in enumerate(lines, 1):
        if not line.strip():
            block = None
        elif _is_comment(line):
            continue
        elif tag := style.pattern.match(line):
            block, below_callout = Block(tag["balloon"], tag["zone"]), True
            layout.blocks.append(block)
            block.lines.append(_source(number, line, tag.end()))
        elif pair := _pair(number, line, inside=block is not None):
            block, below_callout = None, False
            layout.pairs.append(pair)
        elif block is None:
            reason = _why_stray(line, below_callout)
            layout.strays.append(SheetLine(number, line.strip(), known=False, reason=reason))
        else:
            block.lines.append(_source(number, line))
    for block in layout.blocks:
        block.lines = [line for line in block.lines if line.text] or block.lines[:1]
    return layout


def _why_stray(line: str, below_callout: bool) -> str:
    if below_callout and opens_frame(line):
        return _PARTED.format("frame", "frame")
    if below_callout and opens_datum(line):
        return _PARTED.format("datum", "datum")
    return _STRAY


def _resembling(blocks: Sequence[Block]) -> Iterator[SheetLine]:
    for line, number in in_other_styles([Numbered(block.balloon, block.lines) for block in blocks]):
        yield SheetLine(line.number, line.text, known=False, reason=_RESEMBLES.format(number))


def _without_title_block(lines: Sequence[str]) -> Iterator[str]:
    """The lines, with blank ones for comments and title-block lines."""
    inside = False
    for number, line in enumerate(lines, 1):
        callout = line.strip() and not _is_comment(line) and _pair(number, line, inside) is None
        inside = inside or bool(callout)
        yield line if callout else ""


def _untagged(lines: Sequence[str]) -> Layout:
    layout = Layout()
    runs: list[list[SourceLine]] = []
    open_run = after_text = by_blank = False
    for number, line in enumerate(lines, 1):
        if not line.strip():
            open_run, after_text = False, open_run or after_text
        elif _is_comment(line):
            continue
        elif (pair := _pair(number, line, inside=bool(runs))) and not opens_feature(line):
            layout.pairs.append(pair)
            open_run = after_text = False
        else:
            if not open_run:
                by_blank = by_blank or after_text
                runs.append([])
            runs[-1].append(_source(number, line))
            open_run, after_text = True, False
    groups = runs if by_blank else [group for run in runs for group in _by_features(run)]
    layout.blocks = [Block(str(number), lines=group) for number, group in enumerate(groups, 1)]
    return layout


def _by_features(run: Sequence[SourceLine]) -> Iterator[list[SourceLine]]:
    group: list[SourceLine] = []
    for line in run:
        if group and opens_feature(line.text):
            yield group
            group = []
        group.append(line)
    yield group


def _is_comment(line: str) -> bool:
    return "#" in line and (line.startswith(("# ", "#\t")) or _INDENTED_COMMENT.match(line) is not None)


def _source(number: int, line: str, start: int = 0) -> SourceLine:
    text = line[start:].lstrip()
    return SourceLine(number, len(line) - len(text), text.rstrip())


def _pair(number: int, line: str, inside: bool) -> SheetLine | None:
    """A `key: value` line.

    A key that is not known needs its space (`SG-2210:7` is no pair), and inside a callout stands flush left.
    """
    found = _KEY.match(line)
    if found is None:
        return None
    key = normal_key(found["key"])
    known = is_known(key)
    if not known and ((found["value"] and not found["gap"]) or (inside and found["indent"])):
        return None
    return SheetLine(number, line.strip(), key, found["value"].strip(), known)
