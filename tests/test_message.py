"""Messages of rules: values in the drawing's manner, figures, and mistakes told with their place."""

from decimal import Decimal

import pytest

from calloutlint.model.frame import Modifier
from calloutlint.rulebook.figures import figure, joined, said, written
from calloutlint.rulebook.kinds import ANGLE, COUNT, LENGTH, NUMBER, TEXT, Listing, Words
from calloutlint.rulebook.scope import Scope
from calloutlint.rulebook.template import message
from calloutlint.rulebook.text_error import TextError
from calloutlint.units import Unit
from tests.valve import STEMS, ValveView


@pytest.mark.parametrize(
    ("amount", "unit", "shown"),
    [
        (".2790", Unit.INCH, ".279"),
        (".28", Unit.INCH, ".280"),
        ("1.5", Unit.INCH, "1.500"),
        (".00025", Unit.INCH, ".00025"),
        (".123456", Unit.INCH, ".12346"),
        ("-.002", Unit.INCH, "-.002"),
        ("0", Unit.INCH, ".000"),
        ("-0.000001", Unit.INCH, ".000"),
        ("12.50", Unit.MM, "12.5"),
        ("0.5", Unit.MM, "0.5"),
        (".05", Unit.MM, "0.05"),
        ("100", Unit.MM, "100"),
        ("1.23456", Unit.MM, "1.2346"),
        ("0", Unit.MM, "0"),
    ],
)
def test_lengths_are_written_in_the_drawings_manner(amount: str, unit: Unit, shown: str) -> None:
    """Decimals as ASME Y14.5 has them: no zero before the point in inch, one in millimetre, none behind."""
    assert written(Decimal(amount), LENGTH, unit) == shown


def test_other_quantities_signs_and_lists_are_written_plainly() -> None:
    assert written(Decimal("30.50"), ANGLE, Unit.INCH) == "30.5°"
    assert written(Decimal(".5"), NUMBER, Unit.INCH) == "0.5"
    assert written(4, COUNT, Unit.INCH) == "4"
    assert written(Decimal(".002"), LENGTH, Unit.INCH, signed=True) == "+.002"
    assert written(Decimal("-.002"), LENGTH, Unit.INCH, signed=True) == "-.002"
    assert written(Decimal("0"), LENGTH, Unit.MM, signed=True) == "0"
    assert joined(["A"]) == "A"
    assert joined(["A", "B", "C"]) == "A, B and C"
    assert joined([]) == "none"


def test_modifiers_are_written_as_they_are_drawn() -> None:
    kind = Listing("a list", Words("a word", Modifier))
    assert written((Modifier.MMC, Modifier.PROJECTED), kind, None) == "Ⓜ and Ⓟ"


def test_a_message_has_a_minus_sign_and_a_figure_a_number_that_programs_read() -> None:
    assert said(Decimal("-.002"), LENGTH, Unit.INCH, signed=True) == "−.002"
    assert said("A-B", TEXT, None) == "A-B"
    assert figure(Decimal("-.002"), LENGTH, Unit.INCH) == "-.002 in"
    assert figure((Decimal(-1), Decimal(2)), Listing("a list", NUMBER), None) == "-1 and 2"


def test_a_message_shows_its_values_and_collects_its_figures() -> None:
    spoken = message(
        "{{{metal}}} {stems} {stem.marks} {bolts} bolts, {bore}, {lift / 2:+} at {slope}", Scope(ValveView)
    ).say(ValveView(stems=STEMS))
    assert spoken is not None
    assert spoken.text == "{brass} left and right C 8 bolts, 80, +12.7 at 5.5°"
    assert spoken.figures == {"bore": "80 mm", "lift / 2": "12.7 mm", "slope": "5.5°"}


def test_a_message_that_meets_an_unknown_is_not_said() -> None:
    assert message("{bore} of {metal}", Scope(ValveView)).say(ValveView(bore=None)) is None


@pytest.mark.parametrize(
    ("text", "problem"),
    [
        ("{bor}", "'bor' is not known here; the nearest is 'bore'\n    {bor}\n     ^^^"),
        ("a {bore", "this brace has no partner: write it twice to show one\n    a {bore\n      ^"),
        ("{rising_stem}", "a yes or no cannot be written in a message\n    {rising_stem}\n     ^^^^^^^^^^^"),
        ("{metal:+}", "only a quantity has a sign, this is a word\n    {metal:+}\n     ^^^^^^^"),
        (
            "first\nthen {bore < 3 mm}",
            "a yes or no cannot be written in a message\n    then {bore < 3 mm}\n          ^^^^^^^^^^^",
        ),
    ],
)
def test_a_mistake_in_a_message_is_told_with_its_place(text: str, problem: str) -> None:
    with pytest.raises(TextError) as caught:
        message(text, Scope(ValveView))
    assert caught.value.shown_in(text) == problem
