"""A datum compartment of a frame in the making."""

from calloutlint.callouts.parts.line import joined
from calloutlint.model.frame import (
    DatumLetter,
    DatumRef,
    ModifierUse,
)
from calloutlint.model.source import Span


class Compartment:
    """The letters of one datum and their modifiers. `joining` while a hyphen waits for its letter."""

    __slots__ = ("boundary", "closed", "freedoms", "joining", "letters", "shared", "spans")

    def __init__(self, letter: str, span: Span) -> None:
        self.letters: list[tuple[str, Span, list[ModifierUse]]] = [(letter, span, [])]
        self.shared: list[ModifierUse] = []
        self.freedoms: tuple[str, ...] = ()
        self.boundary = ""
        self.joining = self.closed = False
        self.spans = [span]

    def add(self, use: ModifierUse) -> None:
        """Gives a modifier to the last letter, or to the whole group `(A-B)`."""
        (self.shared if self.closed and len(self.letters) > 1 else self.letters[-1][2]).append(use)
        self.spans.append(use.span)

    def finish(self) -> DatumRef:
        """The datum reference as the model has it."""
        span = joined(self.spans)
        if len(self.letters) > 1:
            letters = tuple(DatumLetter(letter, tuple(uses), at) for letter, at, uses in self.letters)
            return DatumRef(letters, tuple(self.shared), self.freedoms, span, self.boundary)
        letter, at, uses = self.letters[0]
        return DatumRef((DatumLetter(letter, (), at),), tuple(uses), self.freedoms, span, self.boundary)
