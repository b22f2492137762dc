"""What the names of a rule mean: the examined view, its facts, the sheet's limits, the words of the trade."""

from collections.abc import Mapping
from dataclasses import dataclass, field

from lark import Token

from calloutlint.facts.view import View
from calloutlint.rulebook.code import EXAMINED
from calloutlint.rulebook.kinds import (
    FLAG,
    Kind,
    Member,
    Thing,
    members,
    single,
    vocabulary,
    with_article,
)
from calloutlint.rulebook.terms import Constant, Fact, Term, Variable
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
        return Variable(EXAMINED, Thing(with_article(self.view.subject), self.view))

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
        member = members(self.examined.kind).get(name)
        return follow(self.examined, member) if member else None

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
            raise TextError(f"'{first}' is not known here{self._hint(first)}", start, start + len(first))
        start += len(first) + 1
        for name in rest:
            member = members(term.kind).get(name)
            if member is None:
                problem = f"{term.kind.name} has no fact '{name}'{nearest(name, members(term.kind))}"
                raise TextError(problem, start, start + len(name))
            term = follow(term, member)
            start += len(name) + 1
        return term

    def _hint(self, name: str) -> str:
        kinds = (single(member.kind) for member in members(self.examined.kind).values())
        if any(name in vocabulary(kind) for kind in kinds):
            return ": it is a word, and words stand after 'is', after 'has' and in lists"
        return nearest(name, self.names)


def follow(owner: Term, member: Member) -> Fact:
    """A fact of what `owner` stands for."""
    return Fact(owner, member.name, member.kind, member.optional or owner.optional)
