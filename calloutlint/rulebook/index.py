"""What a condition requires of one fact, so that the engine need not ask rules that cannot fire."""

from collections.abc import Mapping
from enum import StrEnum

from calloutlint.rulebook.code import EXAMINED
from calloutlint.rulebook.kinds import Words
from calloutlint.rulebook.terms import Comparison, Constant, Fact, Junction, Term, Variable

NOTHING: tuple[str, frozenset[StrEnum]] = ("", frozenset())


def required_words(when: Term | None) -> Mapping[str, frozenset[StrEnum]]:
    """Facts of the examined view that must hold one of a few words for `when` to hold, and those words."""
    joined = isinstance(when, Junction) and when.word == "and"
    found: dict[str, frozenset[StrEnum]] = {}
    for term in when.inner if isinstance(when, Junction) and joined else [when]:
        fact, words = _required(term)
        if fact:
            found[fact] = found.get(fact, words) & words
    return found


def _required(term: Term | None) -> tuple[str, frozenset[StrEnum]]:
    """The fact and the words that a term like `frame is position` or `frame in [a, b]` requires."""
    if isinstance(term, Junction) and term.word == "or":
        parts = [_required(inner) for inner in term.inner]
        facts = {fact for fact, _ in parts}
        return (facts.pop(), frozenset().union(*(words for _, words in parts))) if len(facts) == 1 else NOTHING
    if isinstance(term, Comparison) and term.operator == "==" and isinstance(term.left, Fact):
        owner, word = term.left.owner, term.right
        own = isinstance(owner, Variable) and owner.name == EXAMINED
        if own and isinstance(word, Constant) and isinstance(word.kind, Words):
            return term.left.name, frozenset({word.constant})
    return NOTHING
