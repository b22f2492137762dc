"""Messages of a rule as they are said of a view."""

from dataclasses import dataclass, field
from typing import NamedTuple

from calloutlint.facts.view import View
from calloutlint.rulebook.code import Code
from calloutlint.rulebook.figures import figure, said
from calloutlint.rulebook.kinds import ANGLE, LENGTH, Kind


class Slot(NamedTuple):
    """One expression of a message: `name` is its text, `signed` whether a plus is written too."""

    name: str
    kind: Kind
    code: Code
    signed: bool = False


class Message(NamedTuple):
    """Text and slots in order; `figures` are further values to list beside the message."""

    pieces: tuple[str | Slot, ...]
    figures: tuple[Slot, ...] = ()

    def say(self, view: View) -> "Said | None":
        """The message about a view; None where a value in it is unknown."""
        told = Said()
        words = []
        for piece in self.pieces:
            if isinstance(piece, str):
                words.append(piece)
                continue
            value = piece.code.read(view)
            if value is None:
                return None
            words.append(said(value, piece.kind, view.unit, signed=piece.signed))
            if piece.kind in {LENGTH, ANGLE}:
                told.figures[piece.name] = figure(value, piece.kind, view.unit)
        told.text = "".join(words)
        for slot in self.figures:
            value = slot.code.read(view)
            if value is not None:
                told.figures[slot.name] = figure(value, slot.kind, view.unit)
        return told


@dataclass(slots=True)
class Said:
    """A message about one view, with the figures it rests on."""

    text: str = ""
    figures: dict[str, str] = field(default_factory=dict)
