"""What the writer needs everywhere: the style, and how a number and a symbol are spelled in it."""

from dataclasses import dataclass
from enum import Enum

from calloutlint.callouts.table import SPELLINGS
from calloutlint.model.values import Value
from calloutlint.units import Unit

_ASCII = {row.symbol: row.ascii for row in SPELLINGS}
_SUFFIX = {Unit.INCH: " in", Unit.MM: " mm"}


class Style(Enum):
    """The two forms of canonical text."""

    UNICODE = "unicode"
    ASCII = "ascii"


@dataclass(frozen=True, slots=True)
class Writing:
    """The style, and the unit that needs no mention."""

    style: Style
    unit: Unit | None = None

    def symbol(self, symbol: str) -> str:
        """A symbol of the spelling table in this style."""
        return symbol if self.style is Style.UNICODE else _ASCII.get(symbol, symbol)

    def form(self, symbol: str) -> str:
        """A symbol right before a number: a word keeps a space."""
        spelled = self.symbol(symbol)
        return f"{spelled} " if spelled != symbol else spelled

    def value(self, value: Value) -> str:
        """A number, with its unit if that is not the one of the drawing."""
        text = value.text if self.style is Style.UNICODE else value.text.replace("°", " DEG ").strip()
        if self.unit is not None and value.unit in _SUFFIX and value.unit is not self.unit:
            return text + _SUFFIX[value.unit]
        return text
