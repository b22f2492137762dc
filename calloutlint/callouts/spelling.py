"""Brings a line to one spelling, and knows where each column of it came from.

Characters are exchanged one for one, never folded in case or compatibility: `Ⓜ`, `½` and the letters of a
fit code mean something. Spaces stay where they are: they decide meaning too.
"""

import re
from bisect import bisect_right
from collections.abc import Iterable
from typing import NamedTuple

from calloutlint._saved import compiled
from calloutlint.callouts.symbols import ANY_CHARACTERISTIC
from calloutlint.callouts.table import CHARACTERISTICS, SPELLINGS

__all__ = ["SPELLINGS", "Normal", "normalise", "opens_feature"]

Trie = dict[str, "Trie"]


class Normal(NamedTuple):
    """A normalised line; `shifts` holds where it gets out of step with `source`: (its column, the source's)."""

    source: str
    text: str
    shifts: tuple[tuple[int, int], ...] = ()

    def start(self, column: int) -> int:
        """The source column that the normalised `column` came from."""
        if not self.shifts:
            return column
        at = bisect_right(self.shifts, (column, len(self.source))) - 1
        if at < 0:
            return column
        here, there = self.shifts[at]
        return there + column - here

    def end(self, column: int) -> int:
        """The source column after what the normalised column before `column` came from."""
        if not self.shifts:
            return column
        at = bisect_right(self.shifts, (column - 1, len(self.source))) - 1
        following = self.shifts[at + 1] if at + 1 < len(self.shifts) else None
        if following is not None and following[0] == column:
            return following[1]
        return self.start(column - 1) + 1 if column else 0


def normalise(line: str, *, decimal_comma: bool = False) -> Normal:
    """The line in the one spelling that the grammar reads."""
    exchanged = line.translate(_EXCHANGED)
    if decimal_comma:
        exchanged = _COMMA.sub(".", exchanged)
    shifts: list[tuple[int, int]] = []
    drift = 0

    def replaced(match: re.Match[str]) -> str:
        nonlocal drift
        written = match[0]
        normal = _NORMAL[_SPACES.sub(" ", written).upper()]
        if normal[0].isdigit() and match.start() and exchanged[match.start() - 1].isdigit():
            normal = " " + normal
        elif normal in _FORMS and written[0].isalpha() and _stands_between_numbers(exchanged, *match.span()):
            normal = f"‹{normal}›"
        if len(normal) != len(written):
            shifts.append((match.start() + drift, match.start()))
            drift += len(normal) - len(written)
            shifts.append((match.end() + drift, match.end()))
        return normal

    text = _SPELLED.sub(replaced, exchanged)
    return Normal(line, text, tuple(shifts))


def opens_feature(line: str) -> bool:
    """Whether a line opens a size, a thread or a hole, so that an untagged sheet starts a callout there."""
    text = normalise(line[:_LONGEST_OPENING]).text
    head = _FEATURE_ENDS.split(text, maxsplit=1)[0]
    return _OPENS(head) is not None and _JOINS(head) is None


_LONGEST_OPENING = 200
_FEATURE_ENDS = re.compile(rf"[{ANY_CHARACTERISTIC}▲]|(?<!\S)-[A-Z]-")
_OPENS = re.compile(
    r"\s*(?:[^\W\d_][\w'./&-]*\s+|\d+\s?[Xx×](?!\w)\s*)*(?:S?⌀|□|‹[CS]?R›|[\[(]?\.?\d|#\s?\d|MJ?\d|Tr\s?\d|G\s?\d)"
).match
_JOINS = re.compile(
    r"\s*(?:[|⌴⌵↧+]|-\s?\.?\d|‹(?:SF|DRILL|REAM|TAP)›|(?i:[\w ]*\b(?:notes?|for|see|per|within|tir)\s))"
).match


def _stands_between_numbers(text: str, start: int, end: int) -> bool:
    """Whether a word like DIA ends one number before another: in `.500 DIA .25 DEEP`, not in `A1 DIA .25`."""
    before = _NUMBER_BEFORE.search(text, max(0, start - 12), start)
    return before is not None and _NUMBER_AFTER.match(text, end) is not None


_NUMBER_BEFORE = re.compile(r"(?i)(?<![A-Z\d])(?<!\bQTY\s)(?<!\bQTY[.:]\s)\d*\.?\d+\"?\s*$")
_NUMBER_AFTER = re.compile(r"\s*\.?\d")


def _spelled() -> dict[str, str]:
    """What needs more than an exchange of one character: spelling in upper case, what stands for it."""
    pairs = ((spelling.upper(), row.normal) for row in SPELLINGS for spelling in row.every)
    return {spelling: normal for spelling, normal in pairs if spelling != normal and spelling not in _AS_IS}


def _exchanged() -> dict[int, str]:
    return {
        ord(spelling): row.normal
        for row in SPELLINGS
        for spelling in row.every
        if len(spelling) == 1 and len(row.normal) == 1 and not spelling.isascii() and spelling != "—"
    }


_AS_IS = {"X", "-", "DEPTH FEATURE"}
_SPACED = (*range(0x100), 0x1680, *range(0x2000, 0x2060), 0x3000)  # where Unicode has its spaces
_EXCHANGED = _exchanged() | {code: " " for code in _SPACED if chr(code).isspace() and code != ord("\t")}
_NORMAL = {
    spelling: normal for spelling, normal in _spelled().items() if spelling.translate(_EXCHANGED) == spelling
}
_SPACES = re.compile(r"\s+")
_FORMS = {"⌀", "S⌀", "□"}
_COMMA = re.compile(r"(?<=\d),(?=\d)|(?<![\w,]),(?=\d)")

_FRAME_WORDS = {s.upper() for row in CHARACTERISTICS for s in row.every if s[0].isalpha() or s in {"—", "//"}}
_SAID_OF_A_DATUM = {s for s in _FRAME_WORDS if s.endswith((" TO", " WITH"))}
_SAID_WITHIN = {s for s in _FRAME_WORDS if s.endswith(" WITHIN")}
_TOLERANCE = r"(?:S?⌀|%%[cC]|S?DIA\b|dia\b|-?\.?\d)"
_FRAME_FOLLOWS = rf"(?=\s*[\]|]|[\s:=]*(?:(?i:within|tol(?:erance)?)\s+)?{_TOLERANCE}%s%s)"
_BOX_FOLLOWS = rf"|\s*\[\s*{_TOLERANCE}"
_MAY_BE_BASIC = {"FLAT", "ANG", "CIR", "CYL"}  # `FLAT [.500]`, `ANG [30°]` are sizes
_LONG_FOLLOWS = r"|\s+[A-Z](?![A-Za-z0-9.])"
_DATUM = r"\s+(?:(?i:datums?)\s+)?[A-Z](?:\s*-\s*[A-Z])?(?!\w)"
_NUMBER_WITHIN = rf"\s+{_TOLERANCE}(?!.*\b(?i:tir|fim|fir|total|per)\b|\s*[\d.]*\s*(?:°|(?i:deg)))"
_WITHIN_FOLLOWS = rf"\s+(?i:within){_NUMBER_WITHIN}"
_SAID = rf"(?={_WITHIN_FOLLOWS}|{_NUMBER_WITHIN}\S*(?:\s+(?:⌀|dia\b|DIA\b))?\s+(?i:to|with){_DATUM})"
_FRAME_PHRASES = {
    **dict.fromkeys(("PERPENDICULAR", "PARALLEL"), _SAID),
    **dict.fromkeys(_SAID_OF_A_DATUM, rf"(?={_DATUM}{_WITHIN_FOLLOWS})"),
    **dict.fromkeys(_SAID_WITHIN, rf"(?={_NUMBER_WITHIN})"),
}
_DEVIATION_FOLLOWS = r"(?=\s*(?:\d*\.\d|\d+(?:\s*[/,]?\s*(?i:minus|plus)\b|\s*$)))"
_NUMBER_FOLLOWS = r"(?=\s*[(\[]?\s*\.?\d)"
_RADIUS_FOLLOWS = rf"(?:(?<!\d\sR)(?<!\dR){_NUMBER_FOLLOWS}|(?=\s*\d*\.\d|\s*[(\[]\s*\.?\d))"


def _ending(spelling: str) -> str:
    """What must stand after a spelling for it to be read as such."""
    whole = spelling[-1].isalpha() and spelling[0].isalpha()
    ending = "(?![A-Za-z])" if whole else r"(?!\d)" if spelling[-1] == "." else ""
    if spelling in _FRAME_PHRASES:
        return ending + _FRAME_PHRASES[spelling]
    if spelling in _FRAME_WORDS:
        boxed = "" if spelling in _MAY_BE_BASIC else _BOX_FOLLOWS
        return ending + _FRAME_FOLLOWS % (boxed, _LONG_FOLLOWS if len(spelling) > 7 else "")
    if spelling == "R":
        return ending + _RADIUS_FOLLOWS
    if spelling in {"PLUS", "MINUS"}:
        return ending + _DEVIATION_FOLLOWS
    return ending + (_NUMBER_FOLLOWS if spelling in {"CR", "SR"} else "")


def _pattern(spellings: Iterable[str]) -> str:
    """One pattern for all spellings in any case, common beginnings written once."""
    trie: Trie = {}
    for spelling in spellings:
        node = trie
        for character in spelling:
            node = node.setdefault(character, {})
        node[""] = {_ending(spelling): {}}
    return "|".join(_letter(first) + _beginning(first) + _branches(rest) for first, rest in trie.items())


def _beginning(first: str) -> str:
    """A word, or a letter in parentheses as in `HOLE(S)`, does not begin inside another word."""
    return "(?<![A-Za-z]{2})" if first.isalpha() else r"(?<![A-Za-z]{2}\()" if first == "(" else ""


def _branches(node: Trie) -> str:
    longer = [_letter(character) + _branches(rest) for character, rest in node.items() if character]
    if "" in node:
        longer.append(next(iter(node[""])))
    return longer[0] if len(longer) == 1 else f"(?:{'|'.join(longer)})"


def _letter(character: str) -> str:
    if character == " ":
        return r"\s+"
    if character.isalpha() and character.lower() != character and len(character.lower()) == 1:
        return f"[{character}{character.lower()}]"
    return re.escape(character)


_SPELLED = compiled(_pattern(_NORMAL))
