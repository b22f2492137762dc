"""Checks the kinds in a condition and turns its syntax tree into terms."""

import operator
from collections.abc import Callable
from decimal import Decimal

from lark import Token, Tree

from calloutlint.rulebook.kinds import (
    ANGLE,
    COUNT,
    FLAG,
    LENGTH,
    NUMBER,
    PLAIN_NUMBERS,
    QUANTITIES,
    TEXT,
    Kind,
    Listing,
    Thing,
    Words,
    comparable,
)
from calloutlint.rulebook.scope import (
    Scope,
    facts_with_word,
    follow,
    listed_words_of,
    lists_with_word,
    members,
    words_of,
)
from calloutlint.rulebook.syntax import Syntax, parse, place
from calloutlint.rulebook.terms import (
    Arithmetic,
    Comparison,
    Constant,
    CountOf,
    CountWhere,
    Fact,
    Junction,
    Known,
    Measure,
    Negation,
    Quantified,
    Term,
)
from calloutlint.rulebook.text_error import TextError, nearest
from calloutlint.units import Unit, convert

INVERSE = {"<": ">=", "<=": ">", ">": "<=", ">=": "<", "==": "!=", "!=": "==", "in": "not in", "not in": "in"}
FOLDED: dict[str, Callable[[Decimal, Decimal], Decimal]] = {
    "+": operator.add,
    "-": operator.sub,
    "*": operator.mul,
    "/": operator.truediv,
}


def condition(text: str, scope: Scope) -> Term:
    """A condition, checked.

    Raises:
        TextError: the text is not in the language, a name is not known, or kinds do not go together.
    """
    tree = parse(text)
    term = Resolver(scope).term(tree)
    if term.kind is not FLAG:
        raise TextError(f"a condition is needed, this is {term.kind.name}", *place(tree))
    return term


def expression(text: str, scope: Scope) -> Term:
    """A value of any kind, checked.

    Raises:
        TextError: as for `condition`.
    """
    return Resolver(scope).term(parse(text))


class Resolver:
    """Turns syntax into terms; one method for each form of the grammar, under its name there."""

    def __init__(self, scope: Scope) -> None:
        self.scope = scope

    def term(self, syntax: Syntax) -> Term:
        """The term of a tree."""
        if isinstance(syntax, Token):
            return self.scope.path(syntax)
        method: Callable[[Tree[Token]], Term] = getattr(self, syntax.data)
        return method(syntax)

    # Values.

    def path(self, tree: Tree[Token]) -> Term:
        return self.scope.path(_token(tree, 0))

    def number(self, tree: Tree[Token]) -> Term:
        amount = Decimal(_token(tree, 0))
        return Constant(amount, COUNT if amount == amount.to_integral_value() else NUMBER)

    def measure(self, tree: Tree[Token]) -> Term:
        text = _token(tree, 0)
        written = text.rstrip("imndeg°").rstrip()
        amount, unit = Decimal(written), text[len(written) :].strip()
        if unit in {"deg", "°"}:
            return Constant(amount, ANGLE)
        stated = Unit.MM if unit == "mm" else Unit.INCH
        return Measure({target: convert(amount, stated, target) for target in (Unit.INCH, Unit.MM)}, LENGTH)

    def quoted(self, tree: Tree[Token]) -> Term:
        return Constant(_token(tree, 0)[1:-1], TEXT)

    def signed(self, tree: Tree[Token]) -> Term:
        term = self._quantity(tree.children[1])
        if tree.children[0] == "+":
            return term
        if isinstance(term, Constant):
            return Constant(-term.constant, term.kind)
        return Arithmetic("-", Constant(Decimal(0), term.kind), term, term.kind, term.optional)

    def sum(self, tree: Tree[Token]) -> Term:
        return self._chain(tree, self._added)

    def product(self, tree: Tree[Token]) -> Term:
        return self._chain(tree, self._scaled)

    def _chain(self, tree: Tree[Token], join: "Callable[[str, Term, Term, Syntax], Term]") -> Term:
        left = self._quantity(tree.children[0])
        for sign, operand in zip(tree.children[1::2], tree.children[2::2], strict=True):
            left = join(str(sign), left, self._quantity(operand), operand)
        return left

    def _added(self, sign: str, left: Term, right: Term, at: Syntax) -> Term:
        if not comparable(left.kind, right.kind):
            word = "added to" if sign == "+" else "taken from"
            raise TextError(f"{right.kind.name} cannot be {word} {left.kind.name}", *place(at))
        kind = NUMBER if NUMBER in {left.kind, right.kind} else left.kind
        return _arithmetic(sign, left, right, kind)

    def _scaled(self, sign: str, left: Term, right: Term, at: Syntax) -> Term:
        kinds = {left.kind, right.kind}
        if sign == "*" and kinds & PLAIN_NUMBERS:
            kind = next(iter(kinds - PLAIN_NUMBERS), COUNT if kinds == {COUNT} else NUMBER)
        elif sign == "/" and right.kind in PLAIN_NUMBERS:
            kind = NUMBER if left.kind is COUNT else left.kind
        elif sign == "/" and left.kind is right.kind:
            kind = NUMBER
        else:
            word = "multiplied" if sign == "*" else "divided"
            raise TextError(f"{left.kind.name} cannot be {word} by {right.kind.name}", *place(at))
        return _arithmetic(sign, left, right, kind)

    def _quantity(self, syntax: Syntax) -> Term:
        term = self.term(syntax)
        if term.kind not in QUANTITIES:
            raise TextError(f"a quantity is needed, this is {term.kind.name}", *place(syntax))
        return term

    def listing(self, tree: Tree[Token]) -> Term:
        raise TextError("a list can only stand after 'in'", *place(tree))

    def words(self, tree: Tree[Token]) -> Term:
        raise TextError(f"'{_phrase(tree)}' is not a value: words stand after 'is', 'has' and 'in'", *place(tree))

    def count_of(self, tree: Tree[Token]) -> Term:
        return CountOf(self._list(tree.children[1]))

    def count_where(self, tree: Tree[Token]) -> Term:
        items = self._list(tree.children[2])
        inner, variable = self.scope.with_variable(_token(tree, 1), _item(items))
        return CountWhere(variable, items, Resolver(inner)._condition(tree.children[3]))

    def _list(self, syntax: Syntax) -> Term:
        term = self.term(syntax)
        if not isinstance(term.kind, Listing):
            raise TextError(f"a list is needed, this is {term.kind.name}", *place(syntax))
        return term

    # Conditions.

    def _condition(self, syntax: Syntax) -> Term:
        term = self.term(syntax)
        if term.kind is not FLAG:
            raise TextError(f"a condition is needed, this is {term.kind.name}", *place(syntax))
        return term

    def either(self, tree: Tree[Token]) -> Term:
        return Junction("or", [self._condition(child) for child in tree.children])

    def both(self, tree: Tree[Token]) -> Term:
        return Junction("and", [self._condition(child) for child in tree.children])

    def negated(self, tree: Tree[Token]) -> Term:
        return Negation(self._condition(tree.children[0]))

    def quantified(self, tree: Tree[Token]) -> Term:
        items = self._list(tree.children[2])
        inner, variable = self.scope.with_variable(_token(tree, 1), _item(items))
        condition = Resolver(inner)._condition(tree.children[3])
        return Quantified(tree.children[0] == "every", variable, items, condition)

    def known(self, tree: Tree[Token]) -> Term:
        return Known(self.term(tree.children[0]))

    def unknown(self, tree: Tree[Token]) -> Term:
        return Negation(self.known(tree))

    def ordered(self, tree: Tree[Token]) -> Term:
        left, right = self._quantity(tree.children[0]), self._quantity(tree.children[2])
        return self._compared(str(tree.children[1]), left, right, tree)

    def equality(self, tree: Tree[Token]) -> Term:
        sign = "==" if tree.children[1] == "=" else "!="
        return self._compared(sign, self.term(tree.children[0]), self.term(tree.children[2]), tree)

    def _compared(self, sign: str, left: Term, right: Term, at: Syntax) -> Term:
        if not (comparable(left.kind, right.kind) or _nil(left, right) or _nil(right, left)):
            raise TextError(f"{left.kind.name} cannot be compared with {right.kind.name}", *place(at))
        return Comparison(sign, INVERSE[sign], left, right)

    # Words.

    def is_word(self, tree: Tree[Token]) -> Term:
        return self._is(self.term(tree.children[0]), tree.children[1])

    def is_not_word(self, tree: Tree[Token]) -> Term:
        return Negation(self.is_word(tree))

    def _is(self, owner: Term, syntax: Syntax) -> Term:
        word = _phrase(syntax)
        if isinstance(owner.kind, Words):
            return Comparison("==", "!=", owner, _word(word, owner.kind, syntax))
        if not isinstance(owner.kind, Thing):
            raise TextError(f"'is' cannot follow {owner.kind.name}: compare it with =", *place(syntax))
        flag = members(owner.kind).get(word.replace(" ", "_"))
        if flag is not None and flag.result is bool:
            return follow(owner, flag)
        fact, constant = _only(facts_with_word(owner, word), word, words_of(owner), owner, syntax)
        return Comparison("==", "!=", fact, constant)

    def has(self, tree: Tree[Token]) -> Term:
        owner, syntax = self.term(tree.children[0]), tree.children[1]
        if isinstance(owner.kind, Thing):
            word = _phrase(syntax)
            found = _only(lists_with_word(owner, word), word, listed_words_of(owner), owner, syntax)
            return Comparison("in", "not in", found[1], found[0])
        if not isinstance(owner.kind, Listing):
            raise TextError(f"'has' cannot follow {owner.kind.name}", *place(syntax))
        return Comparison("in", "not in", self._member(syntax, owner.kind.item), owner)

    def has_no(self, tree: Tree[Token]) -> Term:
        return Negation(self.has(tree))

    def within(self, tree: Tree[Token]) -> Term:
        owner, syntax = self.term(tree.children[0]), tree.children[1]
        if not (isinstance(syntax, Tree) and syntax.data == "listing"):
            items = self._list(syntax)
            if not comparable(owner.kind, _item(items)):
                raise TextError(f"{owner.kind.name} cannot stand in {items.kind.name}", *place(syntax))
            return Comparison("in", "not in", owner, items)
        if not syntax.children:
            raise TextError("this list is empty: nothing can be in it", *place(tree))
        if isinstance(owner.kind, Thing):
            return _joined([self._is(owner, item) for item in syntax.children])
        return _joined([self._equal(owner, item) for item in syntax.children])

    def not_within(self, tree: Tree[Token]) -> Term:
        return Negation(self.within(tree))

    def _equal(self, owner: Term, item: Syntax) -> Term:
        if isinstance(owner.kind, Words):
            return Comparison("==", "!=", owner, self._member(item, owner.kind))
        return self._compared("==", owner, self.term(item), item)

    def _member(self, syntax: Syntax, kind: Kind) -> Term:
        """What stands after `has` or inside a list: a word where `kind` has a set of words, else a value."""
        if isinstance(kind, Words) and _phrase(syntax) in kind.vocabulary:
            return _word(_phrase(syntax), kind, syntax)
        if isinstance(kind, Words) and not self._is_name(syntax):
            return _word(_phrase(syntax), kind, syntax)
        term = self.term(syntax)
        if not comparable(kind, term.kind):
            raise TextError(f"{kind.name} is needed, this is {term.kind.name}", *place(syntax))
        return term

    def _is_name(self, syntax: Syntax) -> bool:
        return isinstance(syntax, Tree) and syntax.data == "path" and self.scope.lookup(_root(syntax)) is not None


def _joined(terms: list[Term]) -> Term:
    return terms[0] if len(terms) == 1 else Junction("or", terms)


def _arithmetic(sign: str, left: Term, right: Term, kind: Kind) -> Term:
    if isinstance(left, Constant) and isinstance(right, Constant) and (sign != "/" or right.constant):
        return Constant(FOLDED[sign](left.constant, right.constant), kind)
    return Arithmetic(sign, left, right, kind, left.optional or right.optional or sign == "/")


def _nil(term: Term, other: Term) -> bool:
    """Whether `term` is a plain 0, which may be compared with any quantity."""
    return isinstance(term, Constant) and term.constant == 0 and other.kind in QUANTITIES


def _item(items: Term) -> Kind:
    assert isinstance(items.kind, Listing)
    return items.kind.item


def _token(tree: Tree[Token], index: int) -> Token:
    child = tree.children[index]
    assert isinstance(child, Token)
    return child


def _root(tree: Tree[Token]) -> str:
    return _token(tree, 0).partition(".")[0]


def _phrase(syntax: Syntax) -> str:
    """The word or words of a tree as one word of a vocabulary, quotes taken off."""
    if isinstance(syntax, Token):
        return str(syntax)
    words = [str(token) for token in syntax.scan_values(lambda value: isinstance(value, Token))]
    return " ".join(words).strip("\"'")


def _word(word: str, kind: Words, syntax: Syntax) -> Constant:
    if word not in kind.vocabulary:
        raise TextError(f"'{word}' is not one of its words{nearest(word, kind.vocabulary)}", *place(syntax))
    return Constant(kind.vocabulary[word], kind)


Saying = tuple[Fact, Constant]


def _only(found: list[Saying], word: str, known: list[str], owner: Term, syntax: Syntax) -> Saying:
    """The one thing that a word can mean."""
    if not found:
        raise TextError(f"'{word}' says nothing of {owner.kind.name}{nearest(word, known)}", *place(syntax))
    if len(found) > 1:
        raise TextError(f"'{word}' could be said of several facts of {owner.kind.name}: name one", *place(syntax))
    return found[0]
