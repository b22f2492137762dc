"""Joints across drawings, sheets and units: what a checker finds, and the unusual that is legal."""

import re
from decimal import Decimal

import pytest

from calloutlint.model.drawing import Package
from calloutlint.reading.sheet import parse_sheet
from calloutlint.rulebook.finding import Finding, Grade
from calloutlint.rulebook.rulebook import Rulebook, load_rulebook


@pytest.fixture(scope="module")
def rulebook() -> Rulebook:
    return load_rulebook()


def sheet(number: str, body: str, unit: str = "mm", standard: str = "ASME Y14.5-2018") -> str:
    return f"drawing: {number}\nrevision: A\nstandard: {standard}\nunits: {unit}\n{body}"


def checked(rulebook: Rulebook, *texts: str) -> list[Finding]:
    """FIT findings of a package, those that only observe left out."""
    drawings = tuple(parse_sheet(text, f"{place}.txt") for place, text in enumerate(texts))
    found = rulebook.check(Package("package", drawings))
    return [f for f in found if f.rule.startswith("FIT") and f.grade > Grade.OBSERVATION]


def places(findings: list[Finding]) -> list[tuple[str, str, str]]:
    return [
        (
            finding.rule,
            finding.drawing.name if finding.drawing else "",
            finding.callout.balloon if finding.callout else "",
        )
        for finding in findings
    ]


LEGAL = {
    "notes that make no joint": (
        "4) KEYSEAT FOR NO. 606 WOODRUFF KEY\n5) FLAT FOR SET SCREW\n6) SLOT 6 H9 FOR PIN 6\n"
        "7) WRENCH CLEARANCE FOR 3/4 NUT\n8) ⌀12 ±0.1 SHAFT FOR SET SCREW HUB\n"
        "9) 2X ⌀8 H7 FOR PIN ⌀8 m6\n10) 4X ⌀6.6 +0.2 0 THRU FOR MOUNTING BOLTS, SEE NOTE 4\n"
    ),
    "pins and screws in one pattern": (
        "joint: screws = 4 with M6 ISO 4762, fixed in 6\n"
        "joint: pins = 5 with ⌀6 m6 dowel pin, fixed in 7\n"
        "4) 4X ⌀6.6 +0.2 0 THRU\n⌖ | ⌀0.3 Ⓜ | A | B | C\n"
        "5) 2X ⌀6.1 +0.05 0 THRU\n⌖ | ⌀0.04 Ⓜ | A | B | C\n"
        "6) 4X M6-6H ↧ 12\n⌖ | ⌀0.2 Ⓟ 12 | A | B | C\n"
        "7) 2X ⌀6 M7 ↧ 12\n⌖ | ⌀0.03 Ⓟ 12 | A | B | C\n"
    ),
    "two balloons that add up": (
        "joint: cover = 4+5 with M6 ISO 4762, fixed in 7\n"
        "4) 4X ⌀6.6 +0.2 0 THRU\n⌖ | ⌀0.3 Ⓜ | A | B | C\n"
        "5) 2X ⌀6.6 +0.2 0 THRU\n⌖ | ⌀0.3 Ⓜ | A | B | C\n"
        "7) 6X M6-6H ↧ 12\n⌖ | ⌀0.2 Ⓟ 12 | A | B | C\n"
    ),
    "an adjusting slot": (
        "joint: cover = 4 + 5 with M6 ISO 4762, fixed in 7\n"
        "4) 2X SLOT 6.6 +0.2 0 X 12 ±0.3\n⌖ | 0.8 Ⓜ | A | B | C\n"
        "5) 2X ⌀6.6 +0.2 0 THRU\n⌖ | ⌀0.3 Ⓜ | A | B | C\n"
        "7) 4X M6-6H ↧ 12\n⌖ | ⌀0.2 Ⓟ 12 | A | B | C\n"
    ),
    "a countersunk screw": (
        "joint: cover = 4 with M6 ISO 10642, fixed in 7\n"
        "4) 4X ⌀6.6 +0.2 0 THRU\n⌵ ⌀13 +0.3 0 X 90°\n⌖ | ⌀0.3 Ⓜ | A | B | C\n"
        "7) 4X M6-6H ↧ 12\n⌖ | ⌀0.2 Ⓟ 12 | A | B | C\n"
    ),
    "a washer where the head alone would not bear": (
        "joint: cover = 4 with M8 hex head bolt and washer, floating\n"
        "4) 4X ⌀11 +0.2 0 THRU\n⌖ | ⌀2.5 Ⓜ | A | B | C\n"
    ),
    "a welded stud, a pressed pin": (
        "joint: cover = 4 with M8 stud, fixed in 7\n"
        "joint: gauge = 5 with ⌀6 m6 pin, fixed in 8\n"
        "4) 4X ⌀9 +0.2 0 THRU\n⌖ | ⌀0.5 Ⓜ | A | B | C\n"
        "5) 2X ⌀6.2 +0.1 0 THRU\n⌖ | ⌀0.1 Ⓜ | A | B | C\n"
        "7) 4X STUD M8-6g\n⌖ | ⌀0.3 Ⓟ 20 | A | B | C\n"
        "8) 2X PIN ⌀6 m6\n⌖ | ⌀0.05 Ⓟ 20 | A | B | C\n"
    ),
    "zero tolerance at maximum material": (
        "joint: cover = 4 with M6 ISO 4762, floating\n4) 4X ⌀6 +0.8 0 THRU\n⌖ | ⌀0 Ⓜ | A | B | C\n"
    ),
    "profile locates the holes": (
        "joint: cover = 4 with M6 ISO 4762, fixed in 7\n"
        "4) 4X ⌀6.6 +0.2 0 THRU\n⌓ | 0.2 | A | B | C\n"
        "7) 4X M6-6H ↧ 12\n⌖ | ⌀0.2 Ⓟ 12 | A | B | C\n"
    ),
    "dowel holes that name their pin": (
        "4) 2X ⌀6 H7 ↧ 12 FOR ⌀6 m6 DOWEL PIN\n⌖ | ⌀0.02 | A | B | C\n"
        "5) 2X ⌀8 H7 THRU FOR DOWEL PIN\n⌖ | ⌀0.02 | A | B | C\n"
        "6) 2X ⌀6 H7 THRU PRESS FIT FOR ⌀6 n6 PIN\n⌖ | ⌀0.02 | A | B | C\n"
    ),
    "a count that is not stated": (
        "joint: cover = 4 with M6 ISO 4762, fixed in 7\n"
        "4) ⌀6.6 +0.2 0 THRU TYP\n⌖ | ⌀0.3 Ⓜ | A | B | C\n"
        "7) 4X M6-6H ↧ 12\n⌖ | ⌀0.2 Ⓟ 12 | A | B | C\n"
    ),
    "a single datum bore": (
        "joint: pilot = 4 with ⌀10 h6 pin, floating\n4) ⌀10 F7 THRU\n⟂ | ⌀0.01 Ⓜ | A\nDATUM D\n"
    ),
    "a fit code on a clearance hole, line to line": (
        "joint: cover = 4 with M6 ISO 4762, floating\n4) 4X ⌀6.6 H13 THRU\n⌖ | ⌀0.6 Ⓜ | A | B | C\n"
    ),
}


@pytest.mark.parametrize("name", LEGAL)
def test_what_is_unusual_but_right_is_let_pass(rulebook: Rulebook, name: str) -> None:
    assert places(checked(rulebook, sheet("SG-1", LEGAL[name]))) == []


STACK = """\
joint: stack = 4 with M8 bolt, floating through SG-2:4 + SG-3:4
4) 4X ⌀9 +0.2 0 THRU
   ⌖ | ⌀0.8 Ⓜ | A
"""


def test_three_stacked_parts_are_each_held_to_the_fastener(rulebook: Rulebook) -> None:
    """The middle part's wide hole has no head on it; the third lacks 8 - (8.4 - 0.5) = 0.1."""
    found = checked(
        rulebook,
        sheet(
            "SG-1",
            STACK,
        ),
        sheet("SG-2", "4) 4X ⌀13 +0.2 0 THRU\n⌖ | ⌀1 Ⓜ | A\n"),
        sheet("SG-3", "4) 4X ⌀8.4 +0.2 0 THRU\n⌖ | ⌀0.5 Ⓜ | A\n"),
    )
    assert places(found) == [("FIT-02", "SG-3", "4")]
    assert found[0].figures["-room"] == "0.1 mm"


def test_a_joint_stated_on_both_sheets_is_said_once(rulebook: Rulebook) -> None:
    found = checked(
        rulebook,
        sheet(
            "SG-1", "joint: c = 4 with M6 ISO 4762, fixed in SG-2:7\n4) 4X ⌀6.6 +0.2 0 THRU\n⌖ | ⌀0.5 Ⓜ | A\n"
        ),
        sheet("SG-2", "joint: c = SG-1:4 with M6 ISO 4762, fixed in 7\n7) 4X M6-6H ↧ 12\n⌖ | ⌀0.2 Ⓟ 12 | A\n"),
    )
    assert places(found) == [("FIT-03", "SG-1", "4")]


def test_one_cause_is_said_once(rulebook: Rulebook) -> None:
    """What cannot enter is not also called short; a missing projected zone is the cause of what is short."""
    blocked = "joint: c = 4 with M6 ISO 4762, fixed in MOTOR-9:7\n4) 4X ⌀5.8 +0.1 0 THRU\n⌖ | ⌀0.5 Ⓜ | A\n"
    tilted = (
        "joint: c = 4 with M6 ISO 4762, fixed in 7, projection 12\n4) 4X ⌀6.6 +0.2 0 THRU\n⌖ | ⌀0.3 Ⓜ | A\n"
        "7) 4X M6-6H ↧ 16\n⌖ | ⌀0.2 | A\n"
    )
    assert places(checked(rulebook, sheet("SG-1", blocked))) == [("FIT-01", "SG-1", "4")]
    assert places(checked(rulebook, sheet("SG-1", tilted))) == [("FIT-03", "SG-1", "4")]


UNC, M6 = ".250-20 UNC screw", "M6 ISO 4762"
FIXED = "fixed in SG-2:7"
LEANING = "fixed in SG-2:7, projection <.500>"
TWINS = {
    "floating, line to line": (UNC, "floating", "<.281> +<.007> -<.002>", "<.029> Ⓜ", "", ""),
    "floating, short": (UNC, "floating", "<.281> +<.007> -<.002>", "<.0291> Ⓜ", "", ""),
    "regardless of size": (UNC, "floating", "<.281> +<.007> -<.002>", "<.010>", "", ""),
    "fixed, line to line": (UNC, FIXED, "<.281> +<.007> -<.000>", "<.021> Ⓜ", "<.500>", "<.010> Ⓟ <.500>"),
    "fixed, short": (UNC, FIXED, "<.281> +<.007> -<.000>", "<.0211> Ⓜ", "<.500>", "<.010> Ⓟ <.500>"),
    "leaning": (UNC, LEANING, "<.281> +<.007> -<.000>", "<.014> Ⓜ", "<.750>", "<.010>"),
    "zone and thread": (UNC, LEANING, "<.281> +<.007> -<.000>", "<.014> Ⓜ", "<.240>", "<.010> Ⓟ <.490>"),
    "cannot enter": (UNC, "floating", "<.249> +<.007> -<.000>", "<.001> Ⓜ", "", ""),
    "head": (".250-20 UNC SHCS", "floating", "<.312> +<.006> -<.000>", "<.050> Ⓜ", "", ""),
    "metric screw": (M6, FIXED, "<.250> +<.010> -<.000>", "<.001> Ⓜ", "<.500>", "<.013> Ⓟ <.500>"),
}
"""Fastener, how it is held, hole, position; of the fixing hole depth and position. Lengths in <inch>."""


def in_unit(text: str, unit: str) -> str:
    def written(match: re.Match[str]) -> str:
        amount = Decimal(match[1])
        return f"{amount * Decimal('25.4'):f}" if unit == "mm" else match[1]

    return re.sub(r"<([\d.]+)>", written, text)


def twin(name: str, first: str, second: str) -> tuple[str, ...]:
    fastener, hold, hole, position, depth, fixing = TWINS[name]
    thread = "M6-6H" if fastener == M6 else ".250-20 UNC-2B"
    body = f"joint: cover = 4 with {fastener}, {hold}\n4) 4X ⌀{hole} THRU\n⌖ | ⌀{position} | A\n"
    texts = [sheet("SG-1", in_unit(body, first), first)]
    if fixing:
        body = f"7) 4X {thread} ↧ {depth}\n⌖ | ⌀{fixing} | A\n"
        texts.append(sheet("SG-2", in_unit(body, second), second))
    return tuple(texts)


@pytest.mark.parametrize("name", TWINS)
@pytest.mark.parametrize(("first", "second"), [("mm", "mm"), ("inch", "mm"), ("mm", "inch")])
def test_a_package_in_mm_has_the_findings_that_it_has_in_inch(
    rulebook: Rulebook, name: str, first: str, second: str
) -> None:
    expected = checked(rulebook, *twin(name, "inch", "inch"))
    found = checked(rulebook, *twin(name, first, second))
    assert places(found) == places(expected)
    assert [f.grade for f in found] == [f.grade for f in expected]
    assert bool(expected) is ("line to line" not in name)


def test_unknown_units_are_not_guessed(rulebook: Rulebook) -> None:
    """Without a unit nothing can be compared with the fastener."""
    text = sheet("SG-1", "joint: c = 4 with M6 ISO 4762\n4) 4X ⌀5 +0.1 0 THRU\n⌖ | ⌀0.5 Ⓜ | A\n")
    assert places(checked(rulebook, text)) == [("FIT-01", "SG-1", "4")]
    assert places(checked(rulebook, text.replace("units: mm\n", ""))) == []
