"""What the names of a rule mean: the examined view, its facts, the sheet's limits, the words of the trade."""

from collections.abc import Mapping
from dataclasses import dataclass, field

from lark import Token

from calloutlint.facts.view import FactEntry, View
from calloutlint.rulebook.kinds import FLAG, Kind, Listing, Thing, Words, kind_of, members
from calloutlint.rulebook.terms import EXAMINED, Constant, Fact, Term, Variable
from calloutlint.rulebook.text_error import TextError, nearest

NEVER = "never"


@dataclass(frozen=True, slots=True)
class Scope:
    """The names that a text of a rule may use.

    First those bound by `any`, `every` and `count`, then the subject, the limits, `never` (what is false of
    everything), and the facts of the subject.
    """

    view: type[View]
    limits: Mapping[str, Term] = field(default_factory=dict)
    bound: Mapping[str, Variable] = field(default_factory=dict)

    @property
    def examined(self) -> Variable:
        """The examined view itself."""
        return Variable(EXAMINED, Thing(f"a {self.view.subject}", self.view))

    @property
    def names(self) -> list[str]:
        """Every name that may stand first in a path."""
        return [*self.bound, self.view.subject, *members(self.examined.kind), *self.limits]

    def lookup(self, name: str) -> Term | None:
        """What the first name of a path stands for."""
        if name in self.bound:
            return self.bound[name]
        if name == self.view.subject:
            return self.examined
        if name in self.limits:
            return self.limits[name]
        if name == NEVER:
            return Constant(constant=False, kind=FLAG)
        entry = members(self.examined.kind).get(name)
        return follow(self.examined, entry) if entry else None

    def with_variable(self, token: Token, kind: Kind) -> "tuple[Scope, Variable]":
        """The scope inside `any NAME of …`, and the variable.

        Raises:
            TextError: the name has a dot, or means something already.
        """
        start, end = token.start_pos or 0, token.end_pos or 0
        if "." in token:
            raise TextError(f"'{token}' must be one name without a dot", start, end)
        if self.lookup(token) is not None:
            raise TextError(f"'{token}' already means something here: choose another name", start, end)
        variable = Variable(f"each_{token}", kind)
        return Scope(self.view, self.limits, {**self.bound, str(token): variable}), variable

    def path(self, token: Token) -> Term:
        """What a dotted path stands for.

        Raises:
            TextError: a name in it is not known.
        """
        start = token.start_pos or 0
        first, *rest = token.split(".")
        term = self.lookup(first)
        if term is None:
            raise TextError(f"'{first}' is not known here{nearest(first, self.names)}", start, start + len(first))
        place = start + len(first) + 1
        for name in rest:
            entry = members(term.kind).get(name)
            if entry is None:
                problem = f"{term.kind.name} has no fact '{name}'{nearest(name, members(term.kind))}"
                raise TextError(problem, place, place + len(name))
            term = follow(term, entry)
            place += len(name) + 1
        return term


def follow(owner: Term, entry: FactEntry) -> Fact:
    """A fact of what `owner` stands for."""
    return Fact(owner, entry.name, kind_of(entry.result), entry.optional or owner.optional)


def facts_with_word(owner: Term, word: str) -> list[tuple[Fact, Constant]]:
    """Facts of `owner` that hold one word of a set with `word` in it, each with the word."""
    found = []
    for entry in members(owner.kind).values():
        kind = kind_of(entry.result)
        if isinstance(kind, Words) and word in kind.vocabulary:
            found.append((follow(owner, entry), Constant(kind.vocabulary[word], kind)))
    return found


def lists_with_word(owner: Term, word: str) -> list[tuple[Fact, Constant]]:
    """Facts of `owner` that hold a list of words of a set with `word` in it, each with the word."""
    found = []
    for entry in members(owner.kind).values():
        kind = kind_of(entry.result)
        if isinstance(kind, Listing) and isinstance(kind.item, Words) and word in kind.item.vocabulary:
            found.append((follow(owner, entry), Constant(kind.item.vocabulary[word], kind.item)))
    return found


def words_of(owner: Term) -> list[str]:
    """Every word that `owner is …` may be followed by: its flags, and the words of its facts."""
    found: list[str] = []
    for entry in members(owner.kind).values():
        kind = kind_of(entry.result)
        found += [entry.name] if kind is FLAG else list(kind.vocabulary) if isinstance(kind, Words) else []
    return found


def listed_words_of(owner: Term) -> list[str]:
    """Every word that `owner has …` may be followed by."""
    kinds = [kind_of(entry.result) for entry in members(owner.kind).values()]
    lists = [kind.item for kind in kinds if isinstance(kind, Listing)]
    return [word for item in lists if isinstance(item, Words) for word in item.vocabulary]
