"""The cases inside rule sheets: they pass as shipped, and fail once a rule no longer does what it says."""

from __future__ import annotations

import pytest

from calloutlint.rulebook.build import build_rules
from calloutlint.rulebook.proof import Proof, prove
from calloutlint.rulebook.rulebook import Rulebook, load_rulebook
from calloutlint.rulebook.sheet import Filed, Sheet, read_sheet

HEAD = "drawing: WG-1\\nrevision: A\\nstandard: ASME Y14.5-2018\\nunits: inch\\n\\n"
SHEET = f"""
id = "HOUSE-01"
title = "Form tolerance wider than its datum allows"
grade = "major"
examine = "frame"
holds = ["ASME Y14.5", "ISO GPS"]
basis = "house practice"
when = "frame is flatness"
demand = "tolerance.value <= .005 in"
say = "{{tolerance}} is too wide"

[[case]]
sheet = "{HEAD}1) ⏥ | .010\\n2) ⏥ | .005"
finds = ["1"]
grade = "major"
says = [".010 is"]
figures = {{tolerance = ".010 in"}}
[[case]]
note = "two drawings"
finds = ["WG-1:3", "WG-2:3", "WG-2:3"]
[case.package]
"a.txt" = "{HEAD}3) ⏥ | .006"
"b.txt" = "{HEAD.replace("WG-1", "WG-2")}3) ⏥ | .006\\n   ⏥ | .007"
[[case]]
sheet = "{HEAD}1) ⏥ | .005"
finds = []
[[case]]
sheet = "{HEAD}1) ⌭ | .010"
finds = []
"""


def proof_of(text: str) -> Proof:
    sheet = read_sheet(text, "h.toml")
    assert isinstance(sheet, Sheet)
    (proof,) = prove(Rulebook(build_rules([Filed("h.toml", sheet)])))
    return proof


def test_a_sheet_whose_cases_come_out_holds() -> None:
    assert proof_of(SHEET) == Proof("HOUSE-01", 4, ())


@pytest.mark.parametrize(
    ("old", "new", "failures"),
    [
        (
            "<= .005 in",
            "<= .006 in",
            [
                "case 2 (two drawings): nothing found at WG-1:3",
                "case 2 (two drawings): nothing found at WG-2:3",
            ],
        ),
        (
            "<= .005 in",
            "<= .004 in",
            [
                "case 1: found 1 at 2, where 0 is expected: .005 is too wide",
                "case 3: found 1 at 1, where 0 is expected: .005 is too wide",
            ],
        ),
        (
            'grade = "major"\nexamine',
            'grade = "minor"\nexamine',
            ["case 1: the grade is minor, major is expected"],
        ),
        ("is too wide", "was too wide", ["case 1: no message says '.010 is': .010 was too wide"]),
        (
            'tolerance = ".010 in"',
            'tolerance = ".011 in"',
            ["case 1: no finding has tolerance = .011 in: tolerance = .010 in"],
        ),
        (
            "{tolerance} is",
            "{tolerance.projected} is",
            [
                "case 1: it fires, but its message meets a value that is unknown, so it stays silent",
                "case 1: nothing found at 1",
                "case 2 (two drawings): it fires, but its message meets a value that is unknown, "
                "so it stays silent",
                "case 2 (two drawings): nothing found at WG-1:3",
                "case 2 (two drawings): nothing found at WG-2:3",
                "case 2 (two drawings): nothing found at WG-2:3",
            ],
        ),
        (
            '⌭ | .010"\nfinds = []',
            "⏥ | .010\"\nfinds = ['1']",
            ["a sheet needs at least 2 that are found and 2 that are clean; this one has 3 and 1"],
        ),
        (
            'sheet = "' + HEAD + '1) ⌭ | .010"',
            "note = 'no drawing'",
            ["case 4 (no drawing): the drawing cannot be read: a case needs either 'sheet' or 'package'"],
        ),
    ],
)
def test_each_way_to_fail_is_told(old: str, new: str, failures: list[str]) -> None:
    assert old in SHEET
    told = list(dict.fromkeys(proof_of(SHEET.replace(old, new, 1)).failures))
    assert told == list(dict.fromkeys(failures))


@pytest.fixture(scope="module")
def shipped() -> Rulebook:
    return load_rulebook()


def test_every_shipped_rule_holds(shipped: Rulebook) -> None:
    assert [(proof.rule, failure) for proof in prove(shipped) for failure in proof.failures] == []


@pytest.mark.parametrize("demand", ["never", "not never"])
def test_a_shipped_rule_with_a_broken_demand_fails_its_proof(shipped: Rulebook, demand: str) -> None:
    """Whatever it demanded: now it finds wherever it looks, or nowhere."""
    for rule in shipped.rules:
        if rule.sheet.demand == demand:
            continue
        broken = rule.sheet.model_copy(update={"demand": demand})
        (changed,) = build_rules([Filed(rule.id, broken)])
        others = tuple(other for other in shipped.rules if other.id != rule.id)
        (proof,) = prove(Rulebook((*others, changed)), [rule.id])
        assert not proof.holds, f"{rule.id} proves nothing of its demand"
