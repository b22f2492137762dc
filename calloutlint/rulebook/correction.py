"""Corrections that a rule sheet prescribes: `add M to tolerance and drop datums`."""

from collections.abc import Callable
from dataclasses import dataclass
from decimal import Decimal
from functools import cached_property
from typing import Any

from lark import Token, Tree

from calloutlint.facts.view import View
from calloutlint.rulebook.finding import Edit
from calloutlint.rulebook.kinds import QUANTITIES, TEXT, Kind, Listing, Thing, Words, kind_of, members
from calloutlint.rulebook.resolve import Resolver
from calloutlint.rulebook.scope import Scope
from calloutlint.rulebook.syntax import parse, place
from calloutlint.rulebook.terms import Fact, Term, Writer
from calloutlint.rulebook.text_error import TextError, nearest

VERBS = {
    "add": "put a symbol into a part: add M to tolerance",
    "drop": "take a symbol out of a part, or a part out of the callout: drop M from tolerance, drop datums",
    "replace": "write another value for a fact: replace count with 4",
    "reorder": "put what a fact lists into the standard's order: reorder tolerance.modifiers",
    "respell": "write a part in canonical text: respell callout",
}


@dataclass(frozen=True)
class Change:
    """One change: `target` gives the view or views to change, `word` the symbol or fact, `new` the value to write."""

    verb: str
    target: Term
    word: str | None = None
    new: Term | None = None

    @cached_property
    def _read(self) -> tuple[Callable[[View], Any], Callable[[View], Any] | None]:
        writer = Writer()
        target = writer.function(self.target.value(writer))
        return target, writer.function(self.new.value(writer)) if self.new else None

    def edit(self, view: View) -> Edit | None:
        """The change for an examined view; None where its target or its value is unknown, or there is no target."""
        read_target, read_new = self._read
        target = read_target(view)
        new = read_new(view) if read_new else None
        if target is None or target == () or (self.new is not None and new is None):
            return None
        part = tuple(item.part for item in target) if isinstance(target, tuple) else target.part
        value = new if new is None or isinstance(new, str | Decimal) else Decimal(new)
        return Edit(self.verb, part, self.word, value)


@dataclass(frozen=True, slots=True)
class Correction:
    """Changes that together correct what a rule finds."""

    changes: tuple[Change, ...] = ()

    def edits(self, view: View) -> tuple[Edit, ...]:
        """The changes for an examined view; none at all where one of them is unknown."""
        edits = [change.edit(view) for change in self.changes]
        return tuple(edit for edit in edits if edit) if all(edits) else ()


def correction(text: str, scope: Scope) -> Correction:
    """The correction that a `redline` key states; none for an empty text.

    Raises:
        TextError: the text is not in the language, or names no part that can be changed so.
    """
    if not text.strip():
        return Correction()
    return Correction(tuple(_change(tree, scope) for tree in parse(text, "changes").children))


def _change(tree: Tree[Token] | Token, scope: Scope) -> Change:
    assert isinstance(tree, Tree)
    form = tree.data
    if form in {"add", "drop_word"}:
        words, path = tree.children
        target = _part(scope, path)
        return Change(form.partition("_")[0], target, _symbol(words, target.kind))
    path = tree.children[0]
    if form in {"drop", "respell"}:
        return Change(form, _part(scope, path))
    owner, word = _owner_and_fact(scope, path)
    if form == "reorder":
        return Change(form, owner, word)
    new = Resolver(scope).term(tree.children[1])
    if new.kind not in QUANTITIES and new.kind is not TEXT and not isinstance(new.kind, Words):
        raise TextError(f"a quantity, a word or a text is needed, this is {new.kind.name}", *place(tree.children[1]))
    return Change(form, owner, word, new)


def _part(scope: Scope, path: Tree[Token] | Token) -> Term:
    """The view, or the list of views, that a path names."""
    assert isinstance(path, Token)
    term = scope.path(path)
    if _view(term.kind) is None:
        raise TextError(f"'{path}' is {term.kind.name}, not a part of the callout", *place(path))
    return term


def _owner_and_fact(scope: Scope, path: Tree[Token] | Token) -> tuple[Term, str | None]:
    """The part that a path names; or the part and the name of its fact, where the path ends in one."""
    assert isinstance(path, Token)
    term = scope.path(path)
    if _view(term.kind) is not None:
        return term, None
    if isinstance(term, Fact):
        return term.owner, term.name
    raise TextError(f"'{path}' cannot be changed: it is no part of the callout", *place(path))


def _view(kind: Kind) -> type[View] | None:
    inner = kind.item if isinstance(kind, Listing) else kind
    return inner.view if isinstance(inner, Thing) else None


def _symbol(words: Tree[Token] | Token, kind: Kind) -> str:
    """The word to add or drop, one of those that facts of the part may hold."""
    assert isinstance(words, Tree)
    symbol = " ".join(str(token) for token in words.children).strip("\"'")
    known = _symbols(kind)
    if symbol not in known:
        raise TextError(f"'{symbol}' says nothing of {kind.name}{nearest(symbol, known)}", *place(words))
    return symbol


def _symbols(kind: Kind) -> list[str]:
    inner = kind.item if isinstance(kind, Listing) else kind
    found: list[str] = []
    for entry in members(inner).values():
        held = kind_of(entry.result)
        held = held.item if isinstance(held, Listing) else held
        found += list(held.vocabulary) if isinstance(held, Words) else []
    return found
