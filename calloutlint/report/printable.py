"""Text made safe for a terminal: no control characters, and in plain output nothing beyond ASCII."""

import unicodedata

from calloutlint.callouts.table import SPELLINGS
from calloutlint.callouts.write import Style

# Signs that messages use beside the symbols of callouts, and symbols that need a space beside them.
_SIGNS = {
    "⌀": "DIA ", "□": "SQ ", "°": " DEG", "−": "-", "–": "-", "—": "-", "…": "...", "·": "-", "•": "-",
    "×": "x", "←": "<-", "≤": "<=", "≥": ">=", "≠": "!=", "√": "sqrt", "²": "^2", "³": "^3", "µ": "u", "μ": "u",
    "‘": "'", "’": "'", "“": '"', "”": '"', "„": '"', "⟨": "<", "⟩": ">", "\N{NO-BREAK SPACE}": " ",
}  # fmt: skip
_ASCII = {row.symbol: row.ascii for row in SPELLINGS if not row.symbol.isascii()} | _SIGNS

_UNSEEN = {"Cc", "Cf", "Cs", "Co", "Cn", "Zl", "Zp"}


def printable(text: str, style: Style) -> str:
    """`text` with every control or unassigned character shown as `�` (`?` in ASCII); tabs become spaces."""
    if text.isascii() and text.isprintable():
        return text
    spelled = _ascii if style is Style.ASCII else _visible
    return "".join(map(spelled, text))


def _visible(character: str) -> str:
    if (character.isspace() and character.isprintable()) or character == "\t":
        return " "
    return "\N{REPLACEMENT CHARACTER}" if unicodedata.category(character) in _UNSEEN else character


def _ascii(character: str) -> str:
    if character in _ASCII:
        return _ASCII[character]
    shown = _visible(character)
    if shown.isascii():
        return shown
    letters = unicodedata.normalize("NFKD", shown).encode("ascii", "ignore").decode()
    return letters or "?"
