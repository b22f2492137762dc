"""House sheets: rules of one's own, retired and amended ones, and what is wrong with them."""

from __future__ import annotations

from pathlib import Path

import pytest

from calloutlint.errors import CalloutlintError, RuleSheetError
from calloutlint.rulebook.build import build_rules
from calloutlint.rulebook.finding import Grade
from calloutlint.rulebook.house import amended, filed_rules, read_sheets
from calloutlint.rulebook.proof import prove
from calloutlint.rulebook.rulebook import load_rulebook

OWN = """
id = "HOUSE-01"
title = "Position wider than we can inspect"
grade = "minor"
examine = "frame"
holds = ["ASME Y14.5", "ISO GPS"]
basis = "house practice"
when = "frame is position"
demand = "tolerance.value <= widest"
say = "{tolerance} is wider than {widest}"
[limits]
widest = "1 mm"
"""


@pytest.fixture
def house(tmp_path: Path) -> Path:
    folder = tmp_path / "our rules"
    (folder / "gauges").mkdir(parents=True)
    (folder / "gauges" / "own.toml").write_text(OWN, encoding="utf-8")
    return folder


def test_a_house_folder_adds_its_rules_to_those_that_ship(house: Path) -> None:
    shipped, both = load_rulebook(), load_rulebook([house])
    ids = [rule.id for rule in both.rules]
    assert ids == sorted([*(rule.id for rule in shipped.rules), "HOUSE-01"])
    assert both.digest != shipped.digest


def test_a_house_sheet_retires_a_shipped_rule(house: Path) -> None:
    (house / "a.toml").write_text('retires = "FIT-06"\nwhy = "our holes are reamed"', encoding="utf-8")
    ids = [rule.id for rule in load_rulebook([house]).rules]
    assert "FIT-06" not in ids
    assert "HOUSE-01" in ids


def test_a_house_sheet_changes_grade_and_limit(house: Path) -> None:
    (house / "b.toml").write_text(
        'amends = "HOUSE-01"\nwhy = "a larger gauge"\ngrade = "critical"\nlimits.widest = "2 mm"',
        encoding="utf-8",
    )
    rules = {rule.id: rule for rule in load_rulebook([house]).rules}
    assert rules["HOUSE-01"].grade is Grade.CRITICAL
    assert rules["HOUSE-01"].sheet.limits == {"widest": "2 mm"}


def test_a_retired_or_amended_rule_is_proven_as_written(house: Path) -> None:
    shipped = [(proof.rule, proof.holds) for proof in prove(load_rulebook())]
    (house / "gauges" / "own.toml").unlink()
    (house / "a.toml").write_text('retires = "FRAME-01"\nwhy = "x"', encoding="utf-8")
    (house / "b.toml").write_text('amends = "FRAME-02"\ngrade = "minor"\nwhy = "x"', encoding="utf-8")
    book = load_rulebook([house])
    assert [(proof.rule, proof.holds) for proof in prove(book)] == shipped
    assert len(book.rules) == len(shipped) - 1


def test_what_house_sheets_change_is_told_with_its_reason(house: Path) -> None:
    (house / "a.toml").write_text('retires = "FIT-06"\nwhy = "our holes are reamed."', encoding="utf-8")
    text = 'amends = "HOUSE-01"\nwhy = "a larger gauge"\ngrade = "major"\nlimits.widest = "2 mm"'
    (house / "b.toml").write_text(text, encoding="utf-8")
    assert load_rulebook().changes == ()
    assert [change.told for change in load_rulebook([house]).changes] == [
        "FIT-06 retired, because: our holes are reamed.",
        "HOUSE-01 amended (grade major, was minor; widest 2 mm, was 1 mm), because: a larger gauge.",
    ]


@pytest.mark.parametrize(
    ("other", "problem"),
    [
        ("HOUSE-02", "there is no rule HOUSE-02; the nearest is 'HOUSE-01'"),
        ("HOUSE-01", "a rule cannot yield to itself"),
    ],
)
def test_a_rule_can_yield_only_to_another_that_there_is(other: str, problem: str) -> None:
    text = OWN.replace("say =", f'yields_to = ["{other}"]\nsay =')
    with pytest.raises(RuleSheetError) as caught:
        filed_rules(read_sheets([("own.toml", text)]))
    assert str(caught.value) == f"own.toml: key 'yields_to.1': {problem}"


def test_a_house_rule_may_yield_to_a_shipped_one_even_if_that_is_retired(house: Path) -> None:
    text = OWN.replace("say =", 'yields_to = ["FIT-06"]\nsay =')
    (house / "gauges" / "own.toml").write_text(text, encoding="utf-8")
    (house / "a.toml").write_text('retires = "FIT-06"\nwhy = "x"', encoding="utf-8")
    assert "HOUSE-01" in [rule.id for rule in load_rulebook([house]).rules]


@pytest.mark.parametrize(
    ("text", "problem"),
    [
        (OWN, "HOUSE-01 is the id of another rule already, in own.toml"),
        ('retires = "FIT-60"\nwhy = "x"', "there is no rule FIT-60; known are: HOUSE-01"),
        (
            'amends = "HOUSE-01"\nwhy = "x"\nlimits.widst = "2 mm"',
            "HOUSE-01 has no limit 'widst'; the nearest is 'widest'",
        ),
    ],
)
def test_an_amendment_that_fits_no_rule_is_refused(text: str, problem: str) -> None:
    sheets = read_sheets([("own.toml", OWN), ("b.toml", text)])
    with pytest.raises(RuleSheetError) as caught:
        amended(filed_rules(sheets), sheets)
    assert str(caught.value) == f"b.toml: {problem}"


def test_a_limit_may_not_become_another_kind_of_amount() -> None:
    """The rule's own texts are checked again with the new limit."""
    text = 'amends = "HOUSE-01"\nwhy = "x"\nlimits.widest = "2 deg"'
    sheets = read_sheets([("own.toml", OWN), ("b.toml", text)])
    filed = amended(filed_rules(sheets), sheets).rules
    with pytest.raises(RuleSheetError, match="key 'demand': a length cannot be compared with an angle"):
        build_rules(filed)


def test_every_broken_sheet_is_told(house: Path) -> None:
    (house / "c.toml").write_text("id = 3", encoding="utf-8")
    (house / "d.toml").write_text("id ?", encoding="utf-8")
    with pytest.raises(RuleSheetError) as caught:
        load_rulebook([house])
    told = str(caught.value)
    assert "c.toml: key 'title' is missing" in told
    assert "d.toml: this is no TOML" in told


def test_a_missing_folder_and_a_file_that_is_no_text_are_told(house: Path) -> None:
    with pytest.raises(CalloutlintError, match=r"no-such: there is no such folder of rule sheets"):
        load_rulebook([house / "no-such"])
    with pytest.raises(CalloutlintError, match=r"own\.toml: this is a file; name its folder"):
        load_rulebook([house / "gauges" / "own.toml"])
    (house / "none").mkdir()
    with pytest.raises(CalloutlintError, match=r"none: there is no rule sheet \(\.toml\) in this folder"):
        load_rulebook([house / "none"])
    (house / "e.toml").write_bytes(b"\xff\xfe\x00")
    with pytest.raises(RuleSheetError, match=r"e\.toml: a rule sheet must be UTF-8 text"):
        load_rulebook([house])
