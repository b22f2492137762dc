"""Corrections written into a callout's own lines, with everything that need not change left as it stands."""

import re
from collections.abc import Iterable, Iterator, Sequence
from difflib import SequenceMatcher
from typing import NamedTuple

from calloutlint.callouts.parse import parse_callout
from calloutlint.callouts.write import Style, write_callout
from calloutlint.model.callout import Callout
from calloutlint.units import Unit

_TOKEN = re.compile(r"\||[^\s|,]+(?:,\d[^\s|,]*)*")
_POINT = re.compile(r"(?<=\d)\.(?=\d)|(?<![\d.])\.(?=\d)")


class Token(NamedTuple):
    """A word or a bar of a callout's text, and where it stands."""

    text: str
    line: int
    start: int
    end: int


class Change(NamedTuple):
    """Canonical words `start` to `end` that become the new words `new_start` to `new_end`."""

    start: int
    end: int
    new_start: int
    new_end: int


class Splice(NamedTuple):
    """New text for columns `start` to `end` of a line."""

    line: int
    start: int
    end: int
    text: str


def new_lines(old: Callout, new: Callout, unit: Unit | None, style: Style) -> list[str] | None:
    """The callout's lines with its correction in them; None where it has to be made by hand.

    The words that the correction changes are found in the canonical text and exchanged where they stand in the
    callout's own text, whatever the spelling around them. The outcome is used only if it reads as the corrected
    callout does.
    """
    lines = [source.text for source in old.source]
    commas = parse_callout(lines, unit) != old.parts
    before, after = (_words(callout, style, unit, commas) for callout in (old, new))
    splices = list(_splices(_tokens(lines), before, after))
    if any(splice is None for splice in splices):
        return None
    spliced = _spliced(lines, [splice for splice in splices if splice is not None])
    reads = parse_callout(spliced, unit, decimal_comma=commas)
    return spliced if reads == new.parts and all(line.strip() for line in spliced) else None


def _tokens(lines: Sequence[str]) -> list[Token]:
    found = ((at, match) for at, line in enumerate(lines) for match in _TOKEN.finditer(line))
    return [Token(match[0], at, match.start(), match.end()) for at, match in found]


def _words(callout: Callout, style: Style, unit: Unit | None, commas: bool) -> list[str]:
    """The words of the canonical text, with the decimal sign of the sheet."""
    text = "\n".join(write_callout(callout, style, unit))
    return _TOKEN.findall(_POINT.sub(",", text) if commas else text)


def _splices(own: list[Token], before: list[str], after: list[str]) -> Iterator[Splice | None]:
    """What to write where; None for a change that cannot be placed on one line."""
    blocks = SequenceMatcher(None, [token.text for token in own], before, autojunk=False).get_opcodes()
    places = _places(blocks, len(before))
    stretches = [(word, word_end) for kind, _, _, word, word_end in blocks if kind != "equal"]
    for change in _changes(before, after, stretches):
        first, last = places[change.start], places[change.end]
        text = " ".join(after[change.new_start : change.new_end])
        yield _inserted(own, first, text) if first == last else _exchanged(own[first:last], text, own, first)


def _places(blocks: Iterable[tuple[str, int, int, int, int]], words: int) -> list[int]:
    """For each canonical word, and their end, the own word it stands for or where its stretch begins."""
    places = [0] * (words + 1)
    for kind, start, end, word, word_end in blocks:
        for at in range(word, word_end):
            places[at] = start + (at - word if kind == "equal" else 0)
        places[word_end] = end
    return places


def _changes(before: list[str], after: list[str], stretches: Iterable[tuple[int, int]]) -> list[Change]:
    """The changes; a stretch that the sheet spells otherwise is changed as a whole."""
    codes = SequenceMatcher(None, before, after, autojunk=False).get_opcodes()
    changes = [Change(*places) for kind, *places in codes if kind != "equal"]
    for start, end in stretches:
        if any(change.start < end and change.end > start for change in changes):
            touching = [change for change in changes if change.start <= end and change.end >= start]
            others = [change for change in changes if change not in touching]
            changes = sorted([*others, _joined(touching, start, end)])
    return changes


def _joined(changes: list[Change], start: int, end: int) -> Change:
    """One change for several that touch the words from `start` to `end`, those words included."""
    first, last = changes[0], changes[-1]
    lead, rest = max(first.start - start, 0), max(end - last.end, 0)
    return Change(first.start - lead, last.end + rest, first.new_start - lead, last.new_end + rest)


def _inserted(own: list[Token], at: int, text: str) -> Splice:
    """New words after the own word before `at`, on its line."""
    if at == 0:
        return Splice(own[0].line, own[0].start, own[0].start, f"{text} ")
    return Splice(own[at - 1].line, own[at - 1].end, own[at - 1].end, f" {text}")


def _exchanged(stretch: list[Token], text: str, own: list[Token], at: int) -> Splice | None:
    """New words for own ones; with no new words, the space before them goes too."""
    first, last = stretch[0], stretch[-1]
    if first.line != last.line:
        return None
    joined = not text and at > 0 and own[at - 1].line == first.line
    return Splice(first.line, own[at - 1].end if joined else first.start, last.end, text)


def _spliced(lines: list[str], splices: list[Splice]) -> list[str]:
    new = list(lines)
    for line, start, end, text in sorted(splices, key=lambda splice: (splice.line, splice.start), reverse=True):
        new[line] = new[line][:start] + text + new[line][end:]
    return new
