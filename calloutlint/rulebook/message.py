"""Messages of a rule: text with expressions in braces."""

import re
from collections.abc import Callable
from dataclasses import dataclass, field
from functools import cached_property
from typing import Any

from calloutlint.facts.view import View
from calloutlint.rulebook.figures import figure, written
from calloutlint.rulebook.kinds import ANGLE, FLAG, LENGTH, QUANTITIES, Kind, Listing, Thing, members, single
from calloutlint.rulebook.resolve import expression
from calloutlint.rulebook.scope import Scope, follow
from calloutlint.rulebook.terms import EachFact, Term, reading
from calloutlint.rulebook.text_error import TextError

_PIECE = re.compile(r"\{\{|\}\}|\{([^{}]*)\}|[{}]")
_SHOWN = ("value", "written", "text", "name")


@dataclass(frozen=True)
class Slot:
    """One expression of a message: `name` is its text, `signed` whether a plus is written too."""

    name: str
    term: Term
    signed: bool = False

    @cached_property
    def read(self) -> Callable[[View], Any]:
        """The value for a view, None where it is unknown."""
        return reading(self.term.value)


@dataclass(frozen=True, slots=True)
class Message:
    """Text and slots in order; `figures` are further values to list beside the message."""

    pieces: tuple[str | Slot, ...]
    figures: tuple[Slot, ...] = ()

    def say(self, view: View) -> "Said | None":
        """The message about a view; None where a value in it is unknown."""
        said = Said()
        words = []
        for piece in self.pieces:
            if isinstance(piece, str):
                words.append(piece)
                continue
            value = piece.read(view)
            if value is None:
                return None
            words.append(written(value, piece.term.kind, view.unit, signed=piece.signed))
            if piece.term.kind in {LENGTH, ANGLE}:
                said.figures[piece.name] = figure(value, piece.term.kind, view.unit)
        said.text = "".join(words)
        for slot in self.figures:
            value = slot.read(view)
            if value is not None:
                said.figures[slot.name] = figure(value, slot.term.kind, view.unit)
        return said


@dataclass(slots=True)
class Said:
    """A message about one view, with the figures it rests on."""

    text: str = ""
    figures: dict[str, str] = field(default_factory=dict)


def message(text: str, scope: Scope) -> Message:
    """A message, checked: `{expression}`, `{expression:+}` for a written sign, `{{` and `}}` for braces.

    Raises:
        TextError: a brace stands alone, or an expression is wrong or cannot be written.
    """
    pieces: list[str | Slot] = []
    end = 0
    text = text.strip("\n")
    for found in _PIECE.finditer(text):
        pieces.append(text[end : found.start()])
        end = found.end()
        if found[1] is not None:
            pieces.append(slot(found[1], scope, found.start(1)))
        elif found[0] in {"{{", "}}"}:
            pieces.append(found[0][0])
        else:
            raise TextError("this brace has no partner: write it twice to show one", found.start(), found.end())
    pieces.append(text[end:])
    return Message(tuple(piece for piece in pieces if piece))


def slot(text: str, scope: Scope, offset: int = 0) -> Slot:
    """One expression of a message.

    Raises:
        TextError: the expression is wrong or has no written form.
    """
    bare = text.removesuffix(":+")
    try:
        term = _shown(expression(bare, scope))
    except TextError as error:
        raise error.moved(offset) from None
    if not _writable(term.kind):
        raise TextError(f"{term.kind.name} cannot be written in a message", offset, offset + len(bare))
    if bare != text and term.kind not in QUANTITIES:
        raise TextError(f"only a quantity has a sign, this is {term.kind.name}", offset, offset + len(text))
    return Slot(bare.strip(), term, bare != text)


def _shown(term: Term) -> Term:
    """What is written: for a thing, and for each of a list of things, its value, else its text or name."""
    facts = members(single(term.kind))
    shown = (facts[name] for name in _SHOWN if name in facts and _writable(facts[name].kind))
    chosen = next(shown, None)
    if chosen is None:
        return term
    if isinstance(term.kind, Listing):
        return EachFact(term, chosen.name, Listing(term.kind.name, chosen.kind))
    return follow(term, chosen)


def _writable(kind: Kind) -> bool:
    return single(kind) is not FLAG and not isinstance(single(kind), Thing | Listing)
