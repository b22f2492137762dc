"""The language of rule sheets: what is read, what it means, what is refused and how."""

from __future__ import annotations

from decimal import Decimal
from fractions import Fraction
from itertools import product

import pytest
from hypothesis import given
from hypothesis import strategies as st

from calloutlint.rulebook.build import limit
from calloutlint.rulebook.index import required_words
from calloutlint.rulebook.resolve import condition
from calloutlint.rulebook.scope import Scope
from calloutlint.rulebook.terms import code_of
from calloutlint.rulebook.text_error import TextError
from calloutlint.units import Unit
from tests.valve import STEMS, StemView, ValveView, ask, truth, value


@pytest.mark.parametrize(
    ("text", "expected"),
    [
        ("bore = 80 mm", True),
        ("valve.bore != 80 mm", False),
        ("bore > 3 in and bore < 3.5 in", True),
        ("lift = 1 in", True),
        ("lift = 1.0000 in", True),
        ("lift <= .999 in", False),
        ("bore - lift * 2 >= 29.2 mm", True),
        ("bore / lift > 3.1", True),
        ("(bore + lift) / 2 = 52.7 mm", True),
        ("-bore < 0", True),
        ("slope = 5.5 deg and slope > 5°", True),
        ("ratio = 5 / 2", True),
        ("bolts = 8 and bolts / 2 = 4", True),
        ("count = 3 and count * 2 = 6", True),
        ("valve is brass", True),
        ("metal is brass", True),
        ("metal is not brass", False),
        ("valve is gun metal", False),
        ("valve in [iron, gun metal, brass]", True),
        ("metal not in [iron, gun metal]", True),
        ("valve is rising_stem and valve is rising stem", True),
        ("rising_stem", True),
        ("not rising_stem or bolts > 4", True),
        ("letters has 'A' and letters has no 'C'", True),
        ("'B' in letters", True),
        ("count of letters = 2", True),
        ("any x of stems: x has T", True),
        ("every x of stems: x has T", False),
        ("every x of stems: x has C and x.across < 15 mm", True),
        ("(count x of stems: x is tested) = 1", True),
        ("any x of stems: every y of stems: x.across >= y.across", True),
        ("any x of stems: x = stem", True),
        ('stem.name = "left"', True),
        ("stem.marks has C", True),
        ("bolts in [4, 8]", True),
        ("stem.name in ['right', 'middle']", False),
        ("known bore and not unknown bore", True),
        ("never", False),
    ],
)
def test_a_condition_means_what_it_says(text: str, expected: bool) -> None:
    assert ask(text, ValveView(stems=STEMS)) is expected


@pytest.mark.parametrize(
    ("text", "expected"),
    [
        ("bore > 1 mm", None),
        ("not bore > 1 mm", None),
        ("bore > 1 mm and never", False),
        ("bore > 1 mm or rising_stem", True),
        ("bore * 2 - lift > 0", None),
        ("known bore", False),
        ("unknown bore", True),
        ("known (bore > 1 mm)", False),
        ("stem.across > 1 mm", None),
        ("stem is tested", None),
        ("stem has T", None),
        ("lift / (lift - lift) > 1", None),
        ("any x of stems: x is tested", False),
        ("every x of stems: x is tested", True),
    ],
)
def test_what_is_unknown_stays_unknown(text: str, expected: bool | None) -> None:
    assert ask(text, ValveView(bore=None)) is expected


def test_one_unknown_item_leaves_a_quantifier_open_only_where_the_others_do_not_settle_it() -> None:
    stems = (StemView("left", Unit.MM, None), StemView("right", Unit.MM, "14"))
    view = ValveView(stems=stems)
    assert ask("any x of stems: x.across > 13 mm", view) is True
    assert ask("any x of stems: x.across > 15 mm", view) is None
    assert ask("every x of stems: x.across > 15 mm", view) is False
    assert ask("every x of stems: x.across > 13 mm", view) is None
    assert ask("(count x of stems: x.across > 13 mm) = 1", view) is None


def test_a_length_with_a_unit_is_exact_in_either_unit_and_unknown_without_one() -> None:
    assert value("2 in", ValveView(Unit.MM)) == Decimal("50.8")
    assert value("50.8 mm", ValveView(Unit.INCH)) == Decimal(2)
    assert value(".005 in", ValveView(Unit.MM)) == Decimal("0.127")
    assert ask("bore > 1 mm", ValveView(None)) is None
    assert ask("bore > 0", ValveView(None)) is True


NOT = {True: False, False: True, None: None}
TRUTHS = (True, False, None)


def kleene_and(*values: bool | None) -> bool | None:
    """Kleene's strong conjunction (Introduction to Metamathematics, 1952, section 64)."""
    return False if False in values else None if None in values else True


def kleene_or(*values: bool | None) -> bool | None:
    """Kleene's strong disjunction, from the same source."""
    return True if True in values else None if None in values else False


@pytest.mark.parametrize("flags", list(product(TRUTHS, repeat=3)))
def test_logic_is_kleenes(flags: tuple[bool | None, bool | None, bool | None]) -> None:
    view, (a, b, c) = ValveView(flags=flags), flags
    assert ask("one and two and three", view) is kleene_and(a, b, c)
    assert ask("one or two or three", view) is kleene_or(a, b, c)
    assert ask("not one or two and three", view) is kleene_or(NOT[a], kleene_and(b, c))
    assert ask("not (one and not two)", view) is NOT[kleene_and(a, NOT[b])]
    assert ask("known one", view) is (a is not None)
    assert ask("valve is one", view) is a


FORMULAS: st.SearchStrategy[object] = st.recursive(
    st.sampled_from(["one", "two", "three"]),
    lambda inner: st.one_of(
        st.tuples(st.just("not"), inner),
        st.tuples(st.sampled_from(["and", "or"]), inner, inner),
    ),
    max_leaves=8,
)


def spelled(formula: object) -> str:
    if isinstance(formula, str):
        return formula
    assert isinstance(formula, tuple)
    if formula[0] == "not":
        return f"not ({spelled(formula[1])})"
    return f"({spelled(formula[1])} {formula[0]} {spelled(formula[2])})"


def reckoned(formula: object, flags: dict[str, bool | None]) -> bool | None:
    if isinstance(formula, str):
        return flags[formula]
    assert isinstance(formula, tuple)
    values = [reckoned(part, flags) for part in formula[1:]]
    if formula[0] == "not":
        return NOT[values[0]]
    return kleene_and(*values) if formula[0] == "and" else kleene_or(*values)


@given(FORMULAS, st.tuples(*[st.sampled_from(TRUTHS)] * 3))
def test_any_formula_is_kleenes(formula: object, flags: tuple[bool | None, ...]) -> None:
    known = dict(zip(("one", "two", "three"), flags, strict=True))
    assert ask(spelled(formula), ValveView(flags=flags)) is reckoned(formula, known)


SUMS: st.SearchStrategy[tuple[str, Fraction]] = st.recursive(
    st.sampled_from(
        [
            ("lift", Fraction(1)),
            ("25.4 mm", Fraction(1)),
            (".005 in", Fraction(1, 200)),
            ("127 mm", Fraction(5)),
        ]
    ),
    lambda inner: st.one_of(
        st.builds(lambda a, b: (f"({a[0]} + {b[0]})", a[1] + b[1]), inner, inner),
        st.builds(lambda a, b: (f"({a[0]} - {b[0]})", a[1] - b[1]), inner, inner),
        st.builds(lambda a, n: (f"{a[0]} * {n}", a[1] * n), inner, st.integers(1, 9)),
        st.builds(lambda a, n: (f"({a[0]}) / {n}", a[1] / n), inner, st.sampled_from([1, 2, 4, 5, 8])),
        st.builds(lambda a: (f"-({a[0]})", -a[1]), inner),
    ),
    max_leaves=6,
)


@given(SUMS)
def test_arithmetic_is_exact(case: tuple[str, Fraction]) -> None:
    """Against rational arithmetic, for amounts that end in decimals; an inch is exactly 25.4 mm."""
    text, expected = case
    found = value(text, ValveView(Unit.INCH))
    assert isinstance(found, Decimal)
    assert Fraction(found) == expected


@pytest.mark.parametrize(
    ("text", "message"),
    [
        (
            "valve is bras",
            "'bras' says nothing of a valve; the nearest is 'brass'\n    valve is bras\n             ^^^^",
        ),
        (
            "rising_stem and\n  bor > 3 mm",
            "'bor' is not known here; the nearest is 'bore'\n      bor > 3 mm\n      ^^^",
        ),
        (
            "stem.acros > 3 mm",
            "a stem has no fact 'acros'; the nearest is 'across'\n    stem.acros > 3 mm\n         ^^^^^",
        ),
        ("bore > bolts", "a length cannot be compared with a count\n    bore > bolts\n    ^^^^^^^^^^^^"),
        ("slope < 3 mm", "an angle cannot be compared with a length\n    slope < 3 mm\n    ^^^^^^^^^^^^"),
        ("bore + 2 > lift", "a count cannot be added to a length\n    bore + 2 > lift\n           ^"),
        ("bore * lift > 2", "a length cannot be multiplied by a length\n    bore * lift > 2\n           ^^^^"),
        ("2 / bore > 2", "a count cannot be divided by a length\n    2 / bore > 2\n        ^^^^"),
        ("metal in []", "this list is empty: nothing can be in it\n    metal in []\n    ^^^^^"),
        (
            "metal is brass or iron",
            "'iron' is not known here: it is a word, and words stand after 'is', after 'has' and in lists\n"
            "    metal is brass or iron\n                      ^^^^",
        ),
        ("bore", "a condition is needed, this is a length\n    bore\n    ^^^^"),
        ("bore and rising_stem", "a condition is needed, this is a length\n    bore and rising_stem\n    ^^^^"),
        ("any x of bore: x", "a list is needed, this is a length\n    any x of bore: x\n             ^^^^"),
        (
            "any bore of stems: bore is tested",
            "'bore' already means something here: choose another name\n"
            "    any bore of stems: bore is tested\n        ^^^^",
        ),
        (
            "rising_stem and (bolts > 3",
            "the text ends too early: expected ')'\n"
            "    rising_stem and (bolts > 3\n                              ^",
        ),
        (
            "bolts >> 3",
            "'>' cannot stand here: expected a name, a number or a text in quotes\n"
            "    bolts >> 3\n           ^",
        ),
        ("bolts ; 3", "';' cannot stand here: expected"),
        (
            "rising_stem and bolts ; 3",
            "';' cannot stand here: expected 'and', 'has', 'in', 'is', 'not', 'or', an operator or the end\n"
            "    rising_stem and bolts ; 3\n                          ^",
        ),
        ("stem.name = 'left", "this quotation mark has no partner\n    stem.name = 'left\n                ^"),
        ("stem has Q", "'Q' says nothing of a stem; known are: C, T, tested\n    stem has Q\n             ^"),
        ("name is brass", "'name' is not known here"),
        (
            "stem.name is left",
            "'is' cannot follow a text: compare it with =\n    stem.name is left\n                 ^^^^",
        ),
        ("letters has 3", "a text is needed, this is a count\n    letters has 3\n                ^"),
        ("", "the text ends too early: expected"),
    ],
)
def test_a_mistake_is_told_with_its_place_and_the_nearest_name(text: str, message: str) -> None:
    with pytest.raises(TextError) as caught:
        condition(text, Scope(ValveView))
    shown = caught.value.shown_in(text)
    assert shown == message or (("\n" not in message) and shown.startswith(message)), shown


@pytest.mark.parametrize(
    "text",
    ["__import__('os')", "open('x')", "bore.__class__", "valve._bore = 1", "lambda: 1", "bore if one else two"],
)
def test_nothing_can_be_called_imported_or_opened(text: str) -> None:
    with pytest.raises(TextError):
        condition(text, Scope(ValveView))


@given(st.text(alphabet="valve.bore [](),:<>=!+-*/\"' 0123mm in notandorishascountofanyx\n°", max_size=40))
def test_any_text_is_read_or_refused_with_a_place(text: str) -> None:
    refused = None
    try:
        condition(text, Scope(ValveView))
    except TextError as error:
        refused = error
    if refused:
        assert 0 <= refused.start <= refused.end <= len(text)
        assert "^" in refused.shown_in(text)


def test_an_index_holds_only_what_a_condition_surely_requires() -> None:
    def words(text: str) -> dict[str, set[str]]:
        found = required_words(condition(text, Scope(ValveView)))
        return {name: set(values) for name, values in found.items()}

    assert words("valve is brass and bolts > 3") == {"metal": {"brass"}}
    assert words("bolts > 3 and metal in [brass, iron]") == {"metal": {"brass", "iron"}}
    assert words("valve is brass and valve in [brass, iron]") == {"metal": {"brass"}}
    assert words("metal is iron") == {"metal": {"iron"}}
    assert words("valve is brass or bolts > 3") == {}
    assert words("valve is not brass") == {}
    assert words("not (valve is brass and bolts > 3)") == {}


@pytest.mark.parametrize(
    ("text", "amount"), [("0.1", "0.1"), ("3", "3"), ("-2", "-2"), ("1 / 4", "0.25"), ("30 deg", "30")]
)
def test_a_limit_is_a_plain_amount(text: str, amount: str) -> None:
    term = limit(text, Scope(ValveView))
    assert term is not None
    assert code_of(term.value).read(ValveView()) == Decimal(amount)


def test_a_limit_cannot_ask_a_fact() -> None:
    with pytest.raises(TextError, match="a number, or a length or an angle with its unit"):
        limit("bore", Scope(ValveView))


def test_a_named_limit_stands_for_its_amount() -> None:
    term = limit("3 in", Scope(ValveView))
    assert term is not None
    scope = Scope(ValveView, {"smallest": term})
    assert truth(condition("bore > smallest", scope), ValveView()) is True
    assert truth(condition("bore < smallest", scope), ValveView(Unit.INCH, "2.5")) is True
