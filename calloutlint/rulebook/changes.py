"""Reads the corrections that a rule sheet prescribes: `add M to tolerance and drop datums`."""

from lark import Token, Tree

from calloutlint.rulebook.correction import Change, Correction
from calloutlint.rulebook.kinds import QUANTITIES, TEXT, Kind, Thing, Words, members, single, vocabulary
from calloutlint.rulebook.resolve import Resolver
from calloutlint.rulebook.scope import Scope
from calloutlint.rulebook.syntax import Syntax, parse, phrase, place
from calloutlint.rulebook.terms import Fact, Term, code_of
from calloutlint.rulebook.text_error import TextError, nearest


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
    verb = tree.data.partition("_")[0]
    if tree.data in {"add", "drop_word"}:
        words, path = tree.children
        target = _part(scope, path)
        return Change(verb, _symbol(words, target.kind), code_of(target.value))
    if tree.data in {"drop", "respell"}:
        return Change(verb, None, code_of(_part(scope, tree.children[0]).value))
    owner, word = _owner_and_fact(scope, tree.children[0])
    new = _new_value(scope, tree.children[1]) if verb == "replace" else None
    return Change(verb, word, code_of(owner.value), code_of(new.value) if new else None)


def _new_value(scope: Scope, syntax: Syntax) -> Term:
    new = Resolver(scope).term(syntax)
    if new.kind not in QUANTITIES and new.kind != TEXT and not isinstance(new.kind, Words):
        raise TextError(f"a quantity, a word or a text is needed, this is {new.kind.name}", *place(syntax))
    return new


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
