"""Text made safe for a terminal: no control characters, and in plain output nothing beyond ASCII."""

import re
import unicodedata

from calloutlint.callouts.table import SPELLINGS
from calloutlint.callouts.write import Style

# Signs that messages use beside the symbols of callouts; degrees need a space before them.
_SIGNS = {
    "°": " DEG", "−": "-", "–": "-", "—": "-", "…": "...", "·": "-", "•": "-",
    "×": "x", "←": "<-", "≤": "<=", "≥": ">=", "≠": "!=", "√": "sqrt", "²": "^2", "³": "^3", "µ": "u", "μ": "u",
    "‘": "'", "’": "'", "“": '"', "”": '"', "„": '"', "⟨": "<", "⟩": ">", "\N{NO-BREAK SPACE}": " ",
}  # fmt: skip
_ASCII = {row.symbol: row.ascii for row in SPELLINGS if not row.symbol.isascii()} | _SIGNS

_SPACED = re.compile(r"([⌀□])(?=[\w.\[(])")

_UNSEEN = {"Cc", "Cf", "Cs", "Co", "Cn", "Zl", "Zp"}


def printable(text: str, style: Style) -> str:
    """`text` with control characters shown as `�` or `?`; in ASCII, foreign ones by their code, `U+8EF8`."""
    if text.isascii() and text.isprintable():
        return text
    if style is Style.ASCII:
        return "".join(map(_ascii, _SPACED.sub(r"\1 ", text)))
    return "".join(map(_visible, text))


def _visible(character: str) -> str:
    if (character.isspace() and character.isprintable()) or character == "\t":
        return " "
    return "\N{REPLACEMENT CHARACTER}" if unicodedata.category(character) in _UNSEEN else character


def _ascii(character: str) -> str:
    if character.isascii() and character.isprintable():
        return character
    if character in _ASCII:
        return _ASCII[character]
    shown = _visible(character)
    if shown == "\N{REPLACEMENT CHARACTER}":
        return "?"
    letters = unicodedata.normalize("NFKD", shown).encode("ascii", "ignore").decode()
    return letters or f"U+{ord(character):04X}"
