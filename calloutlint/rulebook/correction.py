"""Corrections that a rule sheet prescribes: `add M to tolerance and drop datums`."""

from collections.abc import Callable
from dataclasses import dataclass
from decimal import Decimal
from functools import cached_property
from typing import Any

from lark import Token, Tree

from calloutlint.facts.view import View
from calloutlint.rulebook.finding import Edit
from calloutlint.rulebook.kinds import QUANTITIES, TEXT, Kind, Thing, Words, members, single, vocabulary
from calloutlint.rulebook.resolve import Resolver
from calloutlint.rulebook.scope import Scope
from calloutlint.rulebook.syntax import Syntax, parse, phrase, place
from calloutlint.rulebook.terms import Fact, Term, reading
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
    """One change.

    `target` gives the view or views to change, `word` the symbol or the fact, `new` the value to write.
    """

    verb: str
    target: Term
    word: str | None = None
    new: Term | None = None

    @cached_property
    def _read_target(self) -> Callable[[View], Any]:
        return reading(self.target.value)

    @cached_property
    def _read_new(self) -> Callable[[View], Any]:
        return reading(self.new.value) if self.new else lambda examined: None

    def edit(self, view: View) -> Edit | None:
        """The change for an examined view; None where it has no target, or target or value is unknown."""
        target, new = self._read_target(view), self._read_new(view)
        if target is None or target == () or (self.new is not None and new is None):
            return None
        part = tuple(item.part for item in target) if isinstance(target, tuple) else target.part
        value = new if new is None or isinstance(new, str | Decimal) else Decimal(new)
        return Edit(self.verb, self.word, part, value)


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


def _change(tree: Syntax, scope: Scope) -> Change:
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
        problem = f"a quantity, a word or a text is needed, this is {new.kind.name}"
        raise TextError(problem, *place(tree.children[1]))
    return Change(form, owner, word, new)


def _part(scope: Scope, path: Syntax) -> Term:
    """The view, or the list of views, that a path names."""
    assert isinstance(path, Token)
    term = scope.path(path)
    if not isinstance(single(term.kind), Thing):
        raise TextError(f"'{path}' is {term.kind.name}, not a part of the callout", *place(path))
    return term


def _owner_and_fact(scope: Scope, path: Syntax) -> tuple[Term, str | None]:
    """The part that a path names; or the part and the name of its fact, where the path ends in one."""
    assert isinstance(path, Token)
    term = scope.path(path)
    if isinstance(single(term.kind), Thing):
        return term, None
    if isinstance(term, Fact):
        return term.owner, term.name
    raise TextError(f"'{path}' cannot be changed: it is no part of the callout", *place(path))


def _symbol(words: Syntax, kind: Kind) -> str:
    """The word to add or drop, one of those that facts of the part may hold."""
    symbol = phrase(words)
    known = [word for member in members(single(kind)).values() for word in vocabulary(single(member.kind))]
    if symbol not in known:
        raise TextError(f"'{symbol}' says nothing of {kind.name}{nearest(symbol, known)}", *place(words))
    return symbol
