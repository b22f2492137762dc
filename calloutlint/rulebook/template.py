"""Reads the messages of a rule sheet: text with expressions in braces."""

import re

from calloutlint.rulebook.kinds import FLAG, QUANTITIES, Kind, Listing, Thing, members, single
from calloutlint.rulebook.message import Message, Slot
from calloutlint.rulebook.resolve import expression
from calloutlint.rulebook.scope import Scope, follow
from calloutlint.rulebook.terms import EachFact, Term, code_of
from calloutlint.rulebook.text_error import TextError

_PIECE = re.compile(r"\{\{|\}\}|\{([^{}]*)\}|[{}]")
_SIGN = ":+"
_SHOWN = ("value", "written", "text", "name")


def message(text: str, scope: Scope) -> Message:
    """A message, checked: `{expression}`, `{expression:+}` for a written sign, `{{` and `}}` for braces.

    Raises:
        TextError: a brace stands alone, or an expression is wrong or cannot be written.
    """
    pieces: list[str | Slot] = []
    end = 0
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
    """One expression of a message, `offset` characters after the start of the text shown in errors.

    Raises:
        TextError: the expression is wrong or has no written form.
    """
    bare = text.removesuffix(_SIGN)
    try:
        term = _shown(expression(bare, scope))
    except TextError as error:
        raise error.moved(offset) from None
    if not _writable(term.kind):
        raise TextError(f"{term.kind.name} cannot be written in a message", offset, offset + len(bare))
    if bare != text and term.kind not in QUANTITIES:
        raise TextError(f"only a quantity has a sign, this is {term.kind.name}", offset, offset + len(text))
    return Slot(bare.strip(), term.kind, code_of(term.value), signed=bare != text)


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
    return single(kind) != FLAG and not isinstance(single(kind), Thing | Listing)
