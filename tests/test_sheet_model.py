"""A rule sheet is refused as a whole, with every mistake, its file and its key."""

from __future__ import annotations

import pytest

from calloutlint.errors import RuleSheetError
from calloutlint.model.drawing import Standard, System
from calloutlint.rulebook.build import build_rules
from calloutlint.rulebook.finding import Grade
from calloutlint.rulebook.holds import applies, holding
from calloutlint.rulebook.rule import Rule
from calloutlint.rulebook.sheet import Amendment, Filed, Sheet, read_sheet

SHEET = """
id       = "HOUSE-01"
title    = "Position without a diameter"
grade    = "minor"
examine  = "frame"
holds    = ["ASME Y14.5", "ISO GPS"]
basis    = "common practice"
when     = "frame is position"
demand   = "tolerance.shape is diameter"
say      = "{tolerance} is not round"
redline  = "add diameter to tolerance"
"""

LIMIT = 'a number, or a length or an angle with its unit such as "0.05 mm", "0.002 in" or "0.5 deg" is expected'


def build(text: str) -> Rule:
    sheet = read_sheet(text, "h.toml")
    assert isinstance(sheet, Sheet)
    return build_rules([Filed("h.toml", sheet)])[0]


def problems(text: str) -> str:
    with pytest.raises(RuleSheetError) as caught:
        build(text)
    return str(caught.value)


def test_a_sheet_states_a_rule() -> None:
    rule = build(SHEET)
    assert (rule.id, rule.subject, rule.grade) == ("HOUSE-01", "frame", Grade.MINOR)
    assert rule.sheet.redline == "add diameter to tolerance"
    assert {fact: set(words) for fact, words in rule.required_words.items()} == {"characteristic": {"position"}}


@pytest.mark.parametrize(
    ("old", "new", "message"),
    [
        ("redline ", "redlin ", "h.toml: key 'redlin' is not known; the nearest is 'redline'"),
        (
            '"minor"',
            '"mnior"',
            "h.toml: key 'grade': expected is critical, major, minor or observation, not 'mnior'",
        ),
        (
            '"HOUSE-01"',
            '"house-1"',
            "h.toml: key 'id': 'house-1' is no rule id: "
            "expected capitals, a hyphen and a number, such as HOUSE-01",
        ),
        ("title    =", "#", "h.toml: key 'title' is missing"),
        ('"frame"', '"fram"', "h.toml: key 'examine': 'fram' is no subject; the nearest is 'frame'"),
        ('"ISO GPS"', "3", "h.toml: key 'holds.2': a text is expected, not 3"),
        (
            '"ISO GPS"',
            '"ISO"',
            "h.toml: key 'holds.2': 'ISO' is no standard that rules know: "
            "expected ASME Y14.5, ASME Y14.5-2018, ASME Y14.5-2009 and later, "
            "ASME Y14.5-1994 and earlier, or ISO GPS",
        ),
        (
            '"ISO GPS"',
            '"ASME Y14.5-2010"',
            "h.toml: key 'holds.2': 'ASME Y14.5-2010' names an edition that is not known: "
            "expected 1982, 1994, 2009, 2018",
        ),
        (
            "holds    = [",
            "holds = [] #",
            "h.toml: key 'holds': this list is empty",
        ),
        (
            "add diameter",
            "add diametre",
            "h.toml: key 'redline': 'diametre' says nothing of a tolerance; the nearest is 'diameter'\n"
            "    add diametre to tolerance\n        ^^^^^^^^",
        ),
        (
            "add diameter to tolerance",
            "add diameter",
            "h.toml: key 'redline': the text ends too early: expected 'to'\n"
            "    add diameter\n                ^",
        ),
        (
            "add diameter to tolerance",
            "drop composite",
            "h.toml: key 'redline': 'composite' is a yes or no, not a part of the callout\n"
            "    drop composite\n         ^^^^^^^^^",
        ),
        (
            "{tolerance}",
            "{tolerence}",
            "h.toml: key 'say': 'tolerence' is not known here; the nearest is 'tolerance'\n"
            "    {tolerence} is not round\n     ^^^^^^^^^",
        ),
        (
            "say ",
            "stands_on = 'composite'\nsay ",
            "h.toml: key 'stands_on': a finding cannot stand on a yes or no\n    composite\n    ^^^^^^^^^",
        ),
        (
            "redline ",
            "limits.size = '3 mm'\nredline ",
            "h.toml: key 'limits.size': 'size' already means something in a rule",
        ),
        (
            "redline ",
            "limits.reach = 'three'\nredline ",
            "h.toml: key 'limits.reach': " + LIMIT + "\n    three\n    ^^^^^",
        ),
        (
            "redline ",
            "assumed = '{reach}'\nlimits.reach = '3 km'\nredline ",
            "h.toml: key 'limits.reach': " + LIMIT + "\n    3 km\n    ^^^^",
        ),
        ("redline ", "limits.reach = true\nredline ", f"h.toml: key 'limits.reach': {LIMIT}, not True"),
        ("redline ", "limits = 3\nredline ", "h.toml: key 'limits': a table is expected, not 3"),
        ('["ASME Y14.5", "ISO GPS"]', "3", "h.toml: key 'holds': a list is expected, not 3"),
        ('"common practice"', '""', "h.toml: key 'basis': this is empty: a text is expected"),
        (
            "tolerance.shape is diameter",
            "tolerance.value 3",
            "h.toml: key 'demand': '3' cannot stand here: expected 'and', 'has', 'in', 'is', 'not', 'or', "
            "an operator or the end\n    tolerance.value 3\n                    ^",
        ),
        (
            "redline ",
            "figures = ['hole.mmc', 'hole.mcm']\nredline ",
            "h.toml: key 'figures.2': a hole has no fact 'mcm'; the nearest is 'mmc'\n"
            "    hole.mcm\n         ^^^",
        ),
    ],
)
def test_each_mistake_names_the_file_and_the_key(old: str, new: str, message: str) -> None:
    assert old in SHEET
    told = problems(SHEET.replace(old, new, 1))
    assert told == message or ("\n    " not in message and told.startswith(message)), told


def test_all_mistakes_are_told_at_once() -> None:
    text = (
        SHEET.replace("is position", "is positon").replace("is diameter", "is diametre").replace("{tol", "{tal")
    )
    told = problems(text)
    assert [line for line in told.splitlines() if line.startswith("h.toml")] == [
        "h.toml: key 'when': 'positon' says nothing of a frame; the nearest is 'position'",
        "h.toml: key 'demand': 'diametre' is not one of its words; the nearest is 'diameter'",
        "h.toml: key 'say': 'talerance' is not known here; the nearest is 'tolerance'",
    ]


def test_mistakes_in_variants_and_cases_are_told_with_their_number() -> None:
    variant = "\n[[variant]]\nwhen = 'composite'\n[[variant]]\nwhen = 'composit'\n"
    assert problems(SHEET + variant).startswith("h.toml: key 'variant.2.when': 'composit' is not known here")
    assert problems(SHEET + variant + "greade = 'minor'\n") == (
        "h.toml: key 'variant.2.greade' is not known; the nearest is 'grade'"
    )
    assert problems(SHEET + "\n[[case]]\nsheet = ''\n") == "h.toml: key 'case.1.finds' is missing"


@pytest.mark.parametrize("deep", ["(never or " * 400 + "composite" + ")" * 400, "not " * 3000 + "composite"])
def test_what_is_nested_too_deeply_is_refused(deep: str) -> None:
    told = problems(SHEET.replace("frame is position", deep))
    assert told == "h.toml: key 'when': this is nested too deeply: state it in fewer steps"


def test_a_long_sum_is_refused_before_python_chokes_on_it() -> None:
    long = SHEET.replace("frame is position", "count of datums" + " + 1" * 140 + " > 1")
    assert build(long).broken.read.__name__ == "<lambda>"
    longer = SHEET.replace("frame is position", "count of datums" + " + 1" * 400 + " > 1")
    assert "nested too deeply" in problems(longer)


def test_what_is_not_toml_says_where() -> None:
    assert problems("id = HOUSE").startswith("h.toml: this is no TOML: Invalid value (at line 1, column 6)")


@pytest.mark.parametrize(
    ("text", "problem"),
    [
        ("retires = 'FIT-06'", "h.toml: key 'why' is missing"),
        ("amends = 'FIT-06'\nwhy = 'x'", "h.toml: amends FIT-06, but states neither a grade nor a limit"),
        (
            "retires = 'FIT-06'\nwhy = 'x'\ngrade = 'minor'",
            "h.toml: a sheet that retires a rule can change nothing else",
        ),
        ("amends = 'FIT-06'\nwhy = 'x'\nsay = ''", "h.toml: key 'say' is not known"),
    ],
)
def test_an_amendment_must_change_one_thing_and_say_why(text: str, problem: str) -> None:
    with pytest.raises(RuleSheetError) as caught:
        read_sheet(text, "h.toml")
    assert str(caught.value).startswith(problem)


@pytest.mark.parametrize("text", ["", "# nothing yet\n", "title = 'A gauge'"])
def test_a_sheet_that_is_about_no_rule_is_told_in_one_line(text: str) -> None:
    assert problems(text) == "h.toml: a rule sheet needs 'id', 'amends' or 'retires'"


def test_toml_that_is_nested_without_end_is_refused() -> None:
    assert problems("id = " + "[" * 5000) == "h.toml: this is no TOML that is read: it is nested too deeply"


def test_an_amendment_is_read() -> None:
    sheet = read_sheet("amends = 'FIT-06'\nwhy = 'our shop'\ngrade = 'minor'", "h.toml")
    assert isinstance(sheet, Amendment)
    assert (sheet.rule, sheet.grade) == ("FIT-06", "minor")


ASME, ISO = System.ASME, System.ISO


@pytest.mark.parametrize(
    ("holds", "standard", "expected"),
    [
        (["ASME Y14.5", "ISO GPS"], None, True),
        (["ASME Y14.5", "ISO GPS"], Standard("DIN 7167"), True),
        (["ASME Y14.5"], None, False),
        (["ASME Y14.5-2009 and later", "ISO GPS"], None, False),
        (["ASME Y14.5"], Standard("ASME Y14.5", ASME), True),
        (["ASME Y14.5-2018"], Standard("ASME Y14.5", ASME), False),
        (["ASME Y14.5-2018"], Standard("ASME Y14.5-2018", ASME, 2018), True),
        (["ASME Y14.5-2018"], Standard("ASME Y14.5-2009", ASME, 2009), False),
        (["ASME Y14.5-2009 and later"], Standard("ASME Y14.5M-1994", ASME, 1994), False),
        (["ASME Y14.5-2009 and later"], Standard("ASME Y14.5-2018", ASME, 2018), True),
        (["ASME Y14.5-1994 and earlier"], Standard("ANSI Y14.5M-1982", ASME, 1982), True),
        (["ASME Y14.5-1994 and earlier"], Standard("ASME Y14.5-2009", ASME, 2009), False),
        (["ASME Y14.5-1994 and earlier", "ASME Y14.5-2009 and later"], Standard("ASME Y14.5", ASME), True),
        (["ISO GPS"], Standard("ISO 8015", ISO), True),
        (["ISO GPS"], Standard("ISO 1101:2017", ISO, 2017), True),
        (["ISO GPS"], Standard("ASME Y14.5-2018", ASME, 2018), False),
    ],
)
def test_a_rule_holds_under_the_standards_that_it_names(
    holds: list[str], standard: Standard | None, expected: bool
) -> None:
    assert applies([holding(text) for text in holds], standard) is expected
