"""The reference of facts, the words that can be said of things, and the code that conditions become."""

import io
import pickle
from decimal import Decimal

import pytest

from calloutlint._pickling import write
from calloutlint.rulebook.code import EXAMINED, Code, compile_code, divide
from calloutlint.rulebook.kinds import Thing
from calloutlint.rulebook.reference import FactLine, facts
from calloutlint.rulebook.words import words_of
from calloutlint.units import Unit
from tests.valve import StemView, ValveView


def test_the_reference_has_examined_subjects_and_what_they_lead_to() -> None:
    groups = facts({"valve": ValveView})
    assert [(group.subject, group.examined, group.doc) for group in groups] == [
        ("valve", True, "A sluice valve."),
        ("stem", False, "A valve stem."),
    ]
    lines = {line.name: line for line in groups[1].facts}
    assert list(lines) == ["name", "across", "marks", "tested"]
    assert lines["across"] == FactLine("across", "a length", "drawing's unit", True, (), "Its diameter.")
    assert lines["marks"].words == ("C", "T")
    assert (lines["tested"].kind, lines["tested"].may_be_unknown) == ("a yes or no", False)


def test_every_shipped_fact_is_explained() -> None:
    assert [(group.subject, line.name) for group in facts() for line in group.facts if not line.doc] == []


def test_the_words_of_a_thing_are_its_flags_and_the_words_of_its_facts() -> None:
    assert words_of(Thing("a stem", StemView)) == ["C", "T", "tested"]


def test_code_runs_on_the_examined_view_and_comes_back_from_a_pickle() -> None:
    code = compile_code(f"divide({EXAMINED}.bore, k0)", {"k0": Decimal(8)})
    assert code.read(ValveView(Unit.MM)) == 10
    file = io.BytesIO()
    write(code, file)
    again = pickle.loads(file.getvalue())
    assert isinstance(again, Code)
    assert again.read(ValveView(Unit.MM)) == 10


@pytest.mark.parametrize(("dividend", "divisor", "quotient"), [(1, 4, Decimal("0.25")), (1, 0, None)])
def test_a_division_by_zero_is_unknown(dividend: int, divisor: int, quotient: Decimal | None) -> None:
    assert divide(dividend, divisor) == quotient
