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
    single,
)
from calloutlint.rulebook.scope import Scope
from calloutlint.rulebook.syntax import Syntax, parse, phrase, place
from calloutlint.rulebook.terms import (
    Arithmetic,
    Comparison,
    Constant,
    CountOf,
    CountWhere,
    Junction,
    Known,
    Measure,
    Negation,
    Quantified,
    Term,
)
from calloutlint.rulebook.text_error import TextError
from calloutlint.rulebook.words import constant, list_with, said_of
from calloutlint.units import Unit, convert

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
    return Resolver(scope).condition(parse(text))


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
        """The term of a tree, of any kind."""
        if isinstance(syntax, Token):
            return self.scope.path(syntax)
        form: Callable[[Tree[Token]], Term] = getattr(self, f"_{syntax.data}")
        return form(syntax)

    def condition(self, syntax: Syntax) -> Term:
        """The term of a tree that must be a condition."""
        term = self.term(syntax)
        if term.kind is not FLAG:
            raise TextError(f"a condition is needed, this is {term.kind.name}", *place(syntax))
        return term

    def quantity(self, syntax: Syntax) -> Term:
        """The term of a tree that must be a length, an angle, a number or a count."""
        term = self.term(syntax)
        if term.kind not in QUANTITIES:
            raise TextError(f"a quantity is needed, this is {term.kind.name}", *place(syntax))
        return term

    def items(self, syntax: Syntax) -> Term:
        """The term of a tree that must be a list."""
        term = self.term(syntax)
        if not isinstance(term.kind, Listing):
            raise TextError(f"a list is needed, this is {term.kind.name}", *place(syntax))
        return term

    # Values.

    def _path(self, tree: Tree[Token]) -> Term:
        return self.scope.path(_token(tree, 0))

    def _number(self, tree: Tree[Token]) -> Term:
        amount = Decimal(_token(tree, 0))
        return Constant(amount, COUNT if amount == amount.to_integral_value() else NUMBER)

    def _measure(self, tree: Tree[Token]) -> Term:
        text = _token(tree, 0)
        digits = text.rstrip("imndeg°").rstrip()
        amount, unit = Decimal(digits), text[len(digits) :].strip()
        if unit in {"deg", "°"}:
            return Constant(amount, ANGLE)
        stated = Unit.MM if unit == "mm" else Unit.INCH
        return Measure({target: convert(amount, stated, target) for target in (Unit.INCH, Unit.MM)}, LENGTH)

    def _quoted(self, tree: Tree[Token]) -> Term:
        return Constant(_token(tree, 0)[1:-1], TEXT)

    def _signed(self, tree: Tree[Token]) -> Term:
        term = self.quantity(tree.children[1])
        if tree.children[0] == "+":
            return term
        if isinstance(term, Constant):
            return Constant(-term.constant, term.kind)
        return Arithmetic("-", Constant(Decimal(0), term.kind), term, term.kind)

    def _sum(self, tree: Tree[Token]) -> Term:
        return self._chain(tree, _added)

    def _product(self, tree: Tree[Token]) -> Term:
        return self._chain(tree, _scaled)

    def _chain(self, tree: Tree[Token], kind_of: Callable[[str, Term, Term, Syntax], Kind]) -> Term:
        left = self.quantity(tree.children[0])
        for sign, operand in zip(tree.children[1::2], tree.children[2::2], strict=True):
            right = self.quantity(operand)
            left = _arithmetic(str(sign), left, right, kind_of(str(sign), left, right, operand))
        return left

    def _listing(self, tree: Tree[Token]) -> Term:
        raise TextError("a list can only stand after 'in'", *place(tree))

    def _words(self, tree: Tree[Token]) -> Term:
        raise TextError("words stand after 'is', after 'has' and in lists", *place(tree))

    def _count_of(self, tree: Tree[Token]) -> Term:
        return CountOf(self.items(tree.children[1]))

    def _count_where(self, tree: Tree[Token]) -> Term:
        items = self.items(tree.children[2])
        inner, variable = self.scope.with_variable(_token(tree, 1), single(items.kind))
        return CountWhere(variable, items, Resolver(inner).condition(tree.children[3]))

    # Conditions.

    def _either(self, tree: Tree[Token]) -> Term:
        return Junction("or", [self.condition(child) for child in tree.children])

    def _both(self, tree: Tree[Token]) -> Term:
        return Junction("and", [self.condition(child) for child in tree.children])

    def _negated(self, tree: Tree[Token]) -> Term:
        return Negation(self.condition(tree.children[0]))

    def _quantified(self, tree: Tree[Token]) -> Term:
        items = self.items(tree.children[2])
        inner, variable = self.scope.with_variable(_token(tree, 1), single(items.kind))
        return Quantified(
            tree.children[0] == "every", variable, items, Resolver(inner).condition(tree.children[3])
        )

    def _known(self, tree: Tree[Token]) -> Term:
        return Known(self.term(tree.children[0]))

    def _unknown(self, tree: Tree[Token]) -> Term:
        return Negation(self._known(tree))

    def _ordered(self, tree: Tree[Token]) -> Term:
        left, right = self.quantity(tree.children[0]), self.quantity(tree.children[2])
        return _compared(str(tree.children[1]), left, right, tree)

    def _equality(self, tree: Tree[Token]) -> Term:
        sign = "==" if tree.children[1] == "=" else "!="
        return _compared(sign, self.term(tree.children[0]), self.term(tree.children[2]), tree)

    # Words.

    def _is_word(self, tree: Tree[Token]) -> Term:
        return said_of(self.term(tree.children[0]), tree.children[1])

    def _is_not_word(self, tree: Tree[Token]) -> Term:
        return Negation(self._is_word(tree))

    def _has(self, tree: Tree[Token]) -> Term:
        owner, word = self.term(tree.children[0]), tree.children[1]
        if isinstance(owner.kind, Thing):
            owner = list_with(owner, word)
        if not isinstance(owner.kind, Listing):
            raise TextError(f"'has' cannot follow {owner.kind.name}", *place(word))
        return Comparison("in", self._member(word, owner.kind.item), owner)

    def _has_no(self, tree: Tree[Token]) -> Term:
        return Negation(self._has(tree))

    def _within(self, tree: Tree[Token]) -> Term:
        owner, among = self.term(tree.children[0]), tree.children[1]
        if isinstance(among, Tree) and among.data == "listing":
            if not among.children:
                raise TextError("this list is empty: nothing can be in it", *place(tree))
            return self._one_of(owner, among)
        items = self.items(among)
        if not comparable(owner.kind, single(items.kind)):
            raise TextError(f"{owner.kind.name} cannot stand in {items.kind.name}", *place(among))
        return Comparison("in", owner, items)

    def _not_within(self, tree: Tree[Token]) -> Term:
        return Negation(self._within(tree))

    def _one_of(self, owner: Term, listing: Tree[Token]) -> Term:
        if isinstance(owner.kind, Thing):
            found = [said_of(owner, item) for item in listing.children]
        else:
            found = [Comparison("==", owner, self._member(item, owner.kind)) for item in listing.children]
        return found[0] if len(found) == 1 else Junction("or", found)

    def _member(self, syntax: Syntax, kind: Kind) -> Term:
        """What stands after `has` or in a list: a word where `kind` has a set of words, else a value."""
        if isinstance(kind, Words) and not self._names_a_value(syntax):
            return constant(kind, syntax)
        term = self.term(syntax)
        if not comparable(kind, term.kind):
            raise TextError(f"{kind.name} is needed, this is {term.kind.name}", *place(syntax))
        return term

    def _names_a_value(self, syntax: Syntax) -> bool:
        if not (isinstance(syntax, Tree) and syntax.data == "path"):
            return False
        dotted = phrase(syntax)
        return "." in dotted or dotted in self.scope.bound


def _compared(sign: str, left: Term, right: Term, at: Syntax) -> Term:
    if not (comparable(left.kind, right.kind) or _nil(left, right) or _nil(right, left)):
        raise TextError(f"{left.kind.name} cannot be compared with {right.kind.name}", *place(at))
    return Comparison(sign, left, right)


def _nil(term: Term, other: Term) -> bool:
    """Whether `term` is a plain 0, which may be compared with any quantity."""
    return isinstance(term, Constant) and term.constant == 0 and other.kind in QUANTITIES


def _added(sign: str, left: Term, right: Term, at: Syntax) -> Kind:
    if _nil(left, right):
        return right.kind
    if not (comparable(left.kind, right.kind) or _nil(right, left)):
        words = "added to" if sign == "+" else "taken from"
        raise TextError(f"{right.kind.name} cannot be {words} {left.kind.name}", *place(at))
    return NUMBER if right.kind is NUMBER else left.kind


def _scaled(sign: str, multiplied: Term, by: Term, at: Syntax) -> Kind:
    left, right = multiplied.kind, by.kind
    if sign == "*" and {left, right} == {COUNT}:
        return COUNT
    if sign == "*" and {left, right} & PLAIN_NUMBERS:
        return next(iter({left, right} - PLAIN_NUMBERS), NUMBER)
    if sign == "/" and right in PLAIN_NUMBERS:
        return NUMBER if left in PLAIN_NUMBERS else left
    if sign == "/" and left == right:
        return NUMBER
    raise TextError(
        f"{left.name} cannot be {'multiplied' if sign == '*' else 'divided'} by {right.name}", *place(at)
    )


def _arithmetic(sign: str, left: Term, right: Term, kind: Kind) -> Term:
    if isinstance(left, Constant) and isinstance(right, Constant) and (sign != "/" or right.constant):
        return Constant(FOLDED[sign](left.constant, right.constant), kind)
    return Arithmetic(sign, left, right, kind)


def _token(tree: Tree[Token], index: int) -> Token:
    child = tree.children[index]
    assert isinstance(child, Token)
    return child
