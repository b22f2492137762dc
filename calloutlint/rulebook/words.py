"""What the words of the trade say of a thing: `frame is position`, `hole is clearance`, `tolerance has M`."""

from calloutlint.rulebook.kinds import FLAG, Kind, Listing, Thing, Words, members, single, vocabulary
from calloutlint.rulebook.scope import follow
from calloutlint.rulebook.syntax import Syntax, phrase, place
from calloutlint.rulebook.terms import Comparison, Constant, Fact, Term
from calloutlint.rulebook.text_error import TextError, nearest


def said_of(owner: Term, at: Syntax) -> Term:
    """`owner is WORD`: one of a word's own set, a yes-or-no fact of a thing, or a word of one of its facts.

    Raises:
        TextError: the word says nothing of `owner`, or could be said of several of its facts.
    """
    said = phrase(at)
    if isinstance(owner.kind, Words):
        return Comparison("==", owner, constant(owner.kind, at))
    if not isinstance(owner.kind, Thing):
        raise TextError(f"'is' cannot follow {owner.kind.name}: compare it with =", *place(at))
    flag = members(owner.kind).get(said.replace(" ", "_"))
    if flag is not None and flag.kind is FLAG:
        return follow(owner, flag)
    fact = _only_fact(owner, at, [m.name for m in members(owner.kind).values() if said in vocabulary(m.kind)])
    return Comparison("==", fact, constant(fact.kind, at))


def list_with(owner: Term, at: Syntax) -> Fact:
    """The list fact of a thing that `owner has WORD` asks.

    Raises:
        TextError: no list fact of `owner` can hold the word, or several can.
    """
    said = phrase(at)
    lists = [m for m in members(owner.kind).values() if isinstance(m.kind, Listing)]
    return _only_fact(owner, at, [m.name for m in lists if said in vocabulary(single(m.kind))])


def constant(kind: Kind, at: Syntax) -> Constant:
    """A word of a known set, or of the set that a list draws on.

    Raises:
        TextError: it is none of the set.
    """
    known, said = vocabulary(single(kind)), phrase(at)
    if said not in known:
        raise TextError(f"'{said}' is not one of its words{nearest(said, known)}", *place(at))
    return Constant(known[said], single(kind))


def words_of(kind: Kind) -> list[str]:
    """Every word that can be said of a thing: its yes-or-no facts, and the words of its facts and lists."""
    found: list[str] = []
    for member in members(kind).values():
        found += [member.name] if member.kind is FLAG else vocabulary(single(member.kind))
    return found


def _only_fact(owner: Term, at: Syntax, names: list[str]) -> Fact:
    said, thing = phrase(at), owner.kind.name
    if not names:
        hint = nearest(said, words_of(owner.kind))
        raise TextError(f"'{said}' says nothing of {thing}{hint}", *place(at))
    if len(names) > 1:
        raise TextError(f"'{said}' could be said of several facts of {thing}: name one", *place(at))
    return follow(owner, members(owner.kind)[names[0]])
