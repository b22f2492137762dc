"""What the grammar expected where it met text it cannot read, in the words of the trade."""

from collections.abc import Iterable

_WORDS = {
    "NUMBER": "a number",
    "FRAME_NUMBER": "a number",
    "LIMITS": "two limits",
    "PLUS_MINUS": "a ± tolerance",
    "DEVIATIONS": "two deviations",
    "FIT": "a fit code",
    "FORM": "⌀, R or □",
    "SERIES": "a thread series such as UNC or UNF",
    "UNIFIED_CLASS": "a thread class",
    "THRU": "THRU",
    "DEPTH": "a depth",
    "STEP": "a hole step",
    "COUNT": "a count such as 4X",
    "CHARACTERISTIC": "a geometric characteristic",
    "BAR": "a compartment bar",
    "ZONE_FORM": "⌀",
    "MODIFIER": "a modifier such as Ⓜ",
    "LETTERS": "a datum letter",
    "DATUM_FEATURE": "a datum feature",
}
_MOST = 4
BY_PLACE = {
    "zone": ("a tolerance", "a modifier such as Ⓜ", "a compartment bar"),
    "letter in zone": ("a modifier such as Ⓜ", "a compartment bar before it"),
    "datum": ("a datum letter", "a modifier such as Ⓜ", "a compartment bar"),
    "bar": ("a compartment bar", "MAX after a second number", "Ⓟ or Ⓤ before one"),
    "frame": ("a modifier such as Ⓜ", "a compartment bar", "a datum letter"),
    "number": ("a number after the symbol",),
    "deviation": ("a second deviation, 0 if it is nil",),
    "word": ("a known word or symbol",),
    "value": ("numbers that make sense together",),
    "size": ("a size before the tolerance",),
    "series": ("a thread series such as UNC or UNF",),
    "bracket": ("an opening bracket before it",),
    "before": ("a geometric characteristic before its compartments",),
    "letter": ("a datum letter",),
    "second": ("one tolerance for a size",),
    "frame in words": ("a feature control frame",),
    "digits": ("digits, not letters",),
    "comma": ("a decimal point as elsewhere on the sheet",),
    "characteristic": ("a geometric characteristic",),
}


def expected_words(terminals: Iterable[str]) -> tuple[str, ...]:
    """What the named terminals are, without repetition, the likeliest first."""
    names = set(terminals)
    return tuple(dict.fromkeys(words for name, words in _WORDS.items() if name in names))[:_MOST]
