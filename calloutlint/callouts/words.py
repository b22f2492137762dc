"""Plain words beside the symbols: what they say of the feature, and which are slips of known spellings."""

import re
from difflib import get_close_matches
from functools import lru_cache

from calloutlint.callouts.ordinary import ORDINARY
from calloutlint.callouts.table import CHARACTERISTICS, SPELLINGS
from calloutlint.model.callout import Meaning

_MEANINGS: tuple[tuple[Meaning, str], ...] = (
    (Meaning.CLEARANCE_FIT, r"(?:clearance|running|sliding|slide|slip|loose|free)[ -]fit|RC\d"),
    (Meaning.INTERFERENCE_FIT, r"(?:interference|press|force|shrink|drive|driving)[ -]fit|[FL]N\d"),
    (Meaning.TRANSITION_FIT, r"transition[ -]fit|L[CT]\d"),
    (Meaning.FORM_TAP, r"(?:roll[ -])?form(?:ed|ing)?[ -]tap(?:ped)?"),
    (Meaning.SEPARATE_REQUIREMENT, r"sep(?:arate)?\.?[ -]req(?:t|mt|uirement)?s?\.?"),
    (Meaning.SIMULTANEOUS_REQUIREMENT, r"sim(?:ultaneous)?\.?[ -]req(?:t|mt|uirement)?s?\.?"),
    (Meaning.INDIVIDUALLY, r"individually|indiv"),
    (Meaning.BOUNDARY, r"boundary"),
    (Meaning.EACH_ELEMENT, r"(?:le|each(?: radial)? (?:line )?element)"),
)
_FEATURES: tuple[tuple[Meaning, str], ...] = (
    (Meaning.HOLE, r"holes?"),
    (Meaning.SLOT, r"slots?|keyways?|keyseats?"),
    (Meaning.GROOVE, r"grooves?"),
    (Meaning.BORE, r"bores?|bored"),
    (Meaning.SHAFT, r"shafts?|journals?|spindles?"),
    (Meaning.PIN, r"(?:dowel )?pins?|dowels?"),
    (Meaning.BOSS, r"boss(?:es)?"),
    (Meaning.TAB, r"tabs?|tongues?"),
    (Meaning.SURFACE, r"surfaces?"),
    (Meaning.FACE, r"faces?"),
    (Meaning.SPHERE, r"spheres?"),
    (Meaning.CYLINDER, r"cylinders?"),
    (Meaning.WIDTH, r"widths?"),
)
_FIND = [
    (meaning, re.compile(rf"(?<![\w-])(?:{pattern})(?!\w)", re.IGNORECASE).search)
    for meaning, pattern in _MEANINGS
]
# In `SHAFT END` and `BOLT HOLE CIRCLE` the feature is not the one that the callout is about.
_OF_ANOTHER = r"(?:sides?|ends?|circles?|ports?|locks?|nuts?|only|hardened|hub|screws?|bolts?|keys?)"
_NAMES = [
    (
        meaning,
        re.compile(rf"(?<![\w-])(?:{pattern})(?!\w)(?!\s+{_OF_ANOTHER}(?!\w))", re.IGNORECASE).search,
    )
    for meaning, pattern in _FEATURES
]
_PREPOSITION = re.compile(
    r"(?<![\w.-])(?:in|on|for|with|at|to|into|from|(?<!width )of|near|against|through|thru|by)(?![\w.-]).*",
    re.IGNORECASE,
)
_BEHIND_THRU = re.compile(r"‹THRU(?: ALL)?›[\s,;]*$").search
# `DOWEL PIN HOLE` is a hole.
_INTERNAL = {Meaning.HOLE, Meaning.SLOT, Meaning.GROOVE, Meaning.BORE}
_EXTERNAL = {Meaning.PIN, Meaning.SHAFT, Meaning.BOSS, Meaning.TAB}
_FLAT = {Meaning.SURFACE, Meaning.FACE}
_SPELLINGS = {spelling.upper() for row in SPELLINGS for spelling in row.every}
_KNOWN = sorted(s for s in _SPELLINGS if s.replace("'", "").isalpha() and s.isascii() and len(s) > 3)
_CHARACTERISTICS = {spelling.upper() for row in CHARACTERISTICS for spelling in row.every}
_LOOK_ALIKE = str.maketrans("OIL", "011")
_PLAIN_NUMBER = re.compile(r"(?:S?⌀|±|R)?\s*(?:\d+\.?\d*|\.\d+)").fullmatch
_LEAST_FOR_ONE_SLIP, _LEAST_FOR_TWO_SLIPS = 6, 9


@lru_cache(maxsize=4096)
def meanings_of(text: str) -> tuple[Meaning, ...]:
    """What the words say that rules can use, in the order of `Meaning`."""
    found = {meaning for meaning, search in _FIND if search(text)} | _features(text)
    return tuple(meaning for meaning in Meaning if meaning in found)


def _features(text: str) -> set[Meaning]:
    """What the words call the feature: the first phrase that names one, up to its first preposition.

    `SLOT IN FACE` is a slot, `PIN, SURFACE HARDENED` a pin, `FLUSH WITH SURFACE` says nothing of the kind.
    """
    for phrase in re.split("[,;]", text):
        named = _PREPOSITION.sub("", phrase)
        found = {meaning for meaning, search in _NAMES if search(named)}
        if found:
            return found - _EXTERNAL if found & _INTERNAL else found
    return set()


def meanings_behind(before: str, text: str) -> tuple[Meaning, ...]:
    """What words say behind the text `before`: in `⌀.25 THRU BOSS` nothing, in `THRU BORE` it is a bore."""
    found = meanings_of(text)
    if _BEHIND_THRU(before) is None:
        return found
    return tuple(meaning for meaning in found if meaning not in _EXTERNAL | _FLAT)


@lru_cache(maxsize=4096)
def slip_of(word: str) -> str | None:
    """The known spelling that `word` misses by a slip or two; None for ordinary words."""
    upper = word.upper().strip(".,;:()\"'")
    if not upper.replace("'", "").isalpha() or len(upper) < 4 or _is_ordinary(upper):
        return None
    for known in get_close_matches(upper, _KNOWN, n=5, cutoff=0.7):
        if _slips(upper, known) <= _allowed(upper, known):
            return known
    return None


@lru_cache(maxsize=4096)
def nearest_spelling(word: str) -> str | None:
    """The known spelling most like `word`, for a message about text that is certainly wrong."""
    upper = word.upper().strip(".,;:()\"'|[]")
    if not any(character.isalpha() for character in upper):
        return None
    if upper == "PROFILE":
        return "PROFILE OF A SURFACE"
    if upper in _SPELLINGS or upper in ORDINARY:
        return None
    if (number := mistyped_number(word)) is not None:
        return number
    if " " in upper:
        return None
    if (slip := slip_of(word)) is not None:
        return slip
    close = get_close_matches(upper, _KNOWN, n=1, cutoff=0.6)
    return close[0] if close else None


def mistyped_number(word: str) -> str | None:
    """The number that a word is with its letters O, I and L as digits; None if it is no number then either."""
    written = word.upper().strip("|[],;:() ")
    digits = written.translate(_LOOK_ALIKE)
    return digits if digits != written and _PLAIN_NUMBER(digits) else None


def is_characteristic(spelling: str) -> bool:
    """Whether a known spelling names a geometric characteristic."""
    return spelling in _CHARACTERISTICS


def _is_ordinary(upper: str) -> bool:
    """Whether it is an everyday word, or a known spelling with an everyday ending."""
    if upper in ORDINARY or upper in _KNOWN:
        return True
    return any(upper.endswith(ending) and upper.removesuffix(ending) in _STEMS for ending in _ENDINGS)


_ENDINGS = ("S", "ES", "ED", "ING", "D", "AL", "LY", "ER", "OR", "NESS", "N")
_STEMS = {*ORDINARY, *_KNOWN, *(known.removesuffix("E") for known in _KNOWN)}


def _allowed(word: str, known: str) -> int:
    shorter = min(len(word), len(known))
    if shorter >= _LEAST_FOR_TWO_SLIPS:
        return 2
    if shorter >= _LEAST_FOR_ONE_SLIP:
        return 1
    return 1 if sorted(word) == sorted(known) else 0


def _slips(one: str, other: str) -> int:
    """Letters left out, added, exchanged, or two neighbours swapped, counted one each."""
    before: list[int] = []
    row = list(range(len(other) + 1))
    for i, letter in enumerate(one, 1):
        older, before, row = before, row, [i]
        for j, wanted in enumerate(other, 1):
            cost = min(before[j] + 1, row[j - 1] + 1, before[j - 1] + (letter != wanted))
            if i > 1 and j > 1 and letter == other[j - 2] and one[i - 2] == wanted:
                cost = min(cost, older[j - 2] + 1)
            row.append(cost)
    return row[-1]
