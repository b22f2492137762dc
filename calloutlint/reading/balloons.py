"""How the balloons of a sheet are written: as `12)`, or in another way that the whole sheet keeps to."""

import re
from collections.abc import Collection, Iterator, Sequence
from itertools import pairwise
from typing import NamedTuple

from calloutlint.model.source import SourceLine
from calloutlint.reading.openings import opens_datum, opens_frame, opens_something

_NUMBER = r"(?P<balloon>\d{1,7}(?:\.\d{1,2})?[A-Za-z]?)"
_WHOLE = r"(?P<balloon>\d{1,4}[A-Za-z]?)"
_ZONE = r"(?:[ \t]+(?P<zone>[A-Za-z]{1,2}-?\d{1,2}|\d{1,2}-?[A-Za-z]{1,2}))?"
_NO_ZONE = r"(?P<zone>(?!))?"
_TEXT = r"(?![ \t±+=/]|%%p|-(?!\s?[A-Z]{1,2}\s?-)|[xX×](?!\w))"  # not the tolerance or multiple of a size
_GAP = rf"(?:[ \t]+{_TEXT}|$)"


class Style(NamedTuple):
    """A way to write balloons. One that `may_count` is also used for how many there are: `(4) ⌀.281`."""

    name: str
    pattern: re.Pattern[str]
    may_count: bool = False


USUAL = Style("1)", re.compile(rf"\s*{_NUMBER}{_ZONE}\)[ \t]*"))
OTHERS = (
    Style("1.", re.compile(rf"\s*{_NUMBER}{_ZONE}\.{_GAP}", re.IGNORECASE)),
    Style("1:", re.compile(rf"\s*{_NUMBER}{_ZONE}:{_GAP}", re.IGNORECASE)),
    Style("(1)", re.compile(rf"\s*\({_WHOLE}{_ZONE}\){_GAP}", re.IGNORECASE), may_count=True),
    Style("[1]", re.compile(rf"\s*\[{_WHOLE}{_ZONE}\]{_GAP}", re.IGNORECASE), may_count=True),
    Style(
        "1 and a tab", re.compile(rf"[ ]*{_WHOLE}{_NO_ZONE}[ ]*\t[ \t]*{_TEXT}", re.IGNORECASE), may_count=True
    ),
)
_ORDER = re.compile(r"(\d+)(?:\.(\d+))?([A-Za-z]?)")
_COUNT = re.compile(r"\s*\d+\s?[xX×](?!\w)")


class _Tagged(NamedTuple):
    """A line that may open a callout: its number, what follows on it, and whether that opens anything."""

    line: int
    balloon: str
    text: str
    opens: bool


def find_style(lines: Sequence[str]) -> Style | None:
    """The style that a sheet without a `12)` keeps to, given its lines without comments and title block.

    Its numbers run upwards, most of what they stand before opens a feature, a frame or a datum, and so does
    nothing before the first of them. None where numbers may as well be sizes or counts.
    """
    return next((style for style in OTHERS if _is_kept(style, lines)), None)


def _is_kept(style: Style, lines: Sequence[str]) -> bool:
    tagged = list(_tagged(style, lines))
    if len(tagged) < 2 or not all(_order(a.balloon) < _order(b.balloon) for a, b in pairwise(tagged)):
        return False
    if 2 * sum(tag.opens for tag in tagged) <= len(tagged) or any(
        map(opens_something, lines[: tagged[0].line])
    ):
        return False
    return not style.may_count or _is_no_count(tagged)


def _tagged(style: Style, lines: Sequence[str]) -> Iterator[_Tagged]:
    for index, line in enumerate(lines):
        if match := style.pattern.match(line):
            text, below = line[match.end() :], lines[index + 1 : index + 2]
            opens = opens_something(text) or any(
                opens_something(other) for other in below if not style.pattern.match(other)
            )
            yield _Tagged(index, match["balloon"], text, opens)


def _is_no_count(tagged: Sequence[_Tagged]) -> bool:
    """Whether they start at 1 and one stands where no count can, before a frame or `4X`; else run 1, 2, 3 …"""
    if tagged[0].balloon != "1":
        return False
    if any(opens_frame(tag.text) or opens_datum(tag.text) or _COUNT.match(tag.text) for tag in tagged):
        return True
    return len(tagged) > 2 and [tag.balloon for tag in tagged] == [str(n + 1) for n in range(len(tagged))]


def _order(balloon: str) -> tuple[int, int, str]:
    match = _ORDER.fullmatch(balloon)
    assert match is not None
    return int(match[1]), int(match[2] or 0), match[3].upper()


class Numbered(NamedTuple):
    """A callout's balloon and lines."""

    balloon: str
    lines: Sequence[SourceLine]


def in_other_styles(callouts: Sequence[Numbered]) -> Iterator[tuple[SourceLine, str]]:
    """Lines inside the callouts of a sheet with `12)` that read on like balloons; with each its number.

    They carry the number that would come next, which no other callout has; where it may be a count too, the
    callout after it goes on from there.
    """
    if not any(_may_be_tagged(line) for callout in callouts for line in callout.lines[1:]):
        return
    numbers = [_order(callout.balloon)[0] for callout in callouts]
    taken = frozenset(numbers)
    for callout, number, limit in zip(callouts, numbers, [*numbers[1:], None], strict=True):
        for line in filter(_may_be_tagged, callout.lines[1:]):
            if _reads_on(line.text, number + 1, limit, taken):
                number += 1
                yield line, str(number)


def _may_be_tagged(line: SourceLine) -> bool:
    return line.text[0] in "([0123456789"


def _reads_on(text: str, number: int, limit: int | None, taken: Collection[int]) -> bool:
    if number in taken or (limit is not None and limit <= number):
        return False
    return any(
        match["balloon"] == str(number) and opens_something(text[match.end() :])
        for style in OTHERS
        if (match := style.pattern.match(text)) and not (style.may_count and limit is None)
    )
