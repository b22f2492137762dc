"""What each correction does to a callout, and that it is proven by checking again."""

from collections.abc import Callable
from pathlib import Path

import pytest

from calloutlint.callouts.write import Style, write_callout
from calloutlint.model.drawing import Package
from calloutlint.reading.sheet import parse_sheet
from calloutlint.redline.prove import redlines
from calloutlint.redline.settle import settle
from calloutlint.review import Judged, review
from calloutlint.rulebook.rulebook import Rulebook, load_rulebook

TITLE = "drawing: SG-1\nrevision: A\n"
INCH = TITLE + "standard: ASME Y14.5-2018\nunits: inch\ntolerances: .XX ±.01, .XXX ±.005\n"
OLD = TITLE + "standard: ASME Y14.5M-1994\nunits: inch\ntolerances: .XX ±.01, .XXX ±.005\n"
MM = TITLE + "standard: ASME Y14.5-2018\nunits: mm\ntolerances: ISO 2768-m\n"
DATUMS = "1) ⏥ | .001\n   DATUM A\n2) ⟂ | .001 | A\n   DATUM B\n3) ⟂ | .001 | A | B\n   DATUM C\n"


@pytest.fixture(scope="module")
def rulebook() -> Rulebook:
    return load_rulebook()


def package_of(text: str) -> Package:
    return Package("one", (parse_sheet(text, "one.txt"),))


@pytest.fixture
def judged(rulebook: Rulebook) -> Callable[[str, str], Judged]:
    def find(text: str, rule: str) -> Judged:
        found = review(package_of(text), rulebook).findings
        return next(one for one in found if one.finding.rule == rule)

    return find


CORRECTIONS = [
    ("FRAME-01", INCH + DATUMS + "4) SURFACE\n   ⏥ | .004 | A | B", "SURFACE\n⏥ | .004"),
    ("FRAME-04", INCH + DATUMS + "4) ⌀.28 THRU\n   ⌖ | .014 Ⓜ | A | B | C", "⌖ | ⌀.014 Ⓜ | A | B | C"),
    ("FRAME-05", INCH + DATUMS + "4) FACE\n   ⟂ | .003 Ⓜ | A", "⟂ | .003 | A"),
    ("FRAME-06", OLD + DATUMS + "4) ⌀.5 THRU\n   ⌖ | ⌀.014 Ⓜ | A | B Ⓜ | C", "⌖ | ⌀.014 Ⓜ | A | B | C"),
    ("FRAME-16", INCH + DATUMS + "4) ⌀.50 THRU\n   ⌖ | ⌀.014 Ⓢ | A | B | C", "⌖ | ⌀.014 | A | B | C"),
    ("FRAME-18", INCH + DATUMS + "4) ⌀.50 THRU\n   ⌖ | ⌀.000 | A | B | C", "⌖ | ⌀.000 Ⓜ | A | B | C"),
    (
        "FRAME-27",
        INCH + DATUMS + "4) .250-20 UNC-2B ↧ .50\n   ⌖ | ⌀.010 Ⓟ .50 Ⓜ | A | B | C",
        "⌖ | ⌀.010 Ⓜ Ⓟ .50 | A | B | C",
    ),
    ("SIZE-01", INCH + "4) ⌀.500 +.002/+.005 THRU", "⌀.500 +.005 +.002 THRU"),
    ("SIZE-03", INCH + "4) ⌀0.281 ±.01 THRU", "⌀.281 ±.010 THRU"),
    ("SIZE-03", INCH + "4) ⌀.500 +.005 -0 ↧ 0.75", "⌀.500 +.005 -.000 ↧ .75"),
    ("SIZE-04", MM + "4) ⌀12.50 +.25 -0.1 THRU", "⌀12.5 +0.25 -0.10 THRU"),
    ("SIZE-04", MM + "4) 12.5 +0.2 -0", "12.5 +0.2 0"),
    ("SIZE-04", MM + "4) 25-25.4", "25.0-25.4"),
    ("SIZE-10", INCH + "4) 4 HOLES ⌀.281 +.007 -.002 THRU", "4X ⌀.281 +.007 -.002 THRU"),
    (
        "FIT-06",
        INCH
        + "joint: cover = 4 with .250-20 UNC screw\n"
        + DATUMS
        + "4) 4X ⌀.281 +.007 -.002 THRU\n   ⌖ | ⌀.014 | A | B | C",
        "⌖ | ⌀.014 Ⓜ | A | B | C",
    ),
]


@pytest.mark.parametrize(("rule", "sheet", "expected"), CORRECTIONS)
def test_a_rule_corrects_and_proves(
    judged: Callable[[str, str], Judged], rule: str, sheet: str, expected: str
) -> None:
    redline = judged(sheet, rule).redline
    assert redline is not None
    assert expected in redline.text
    assert redline.proven


def test_a_typical_count_has_no_correction(judged: Callable[[str, str], Judged]) -> None:
    """TYP does not say how many, so nothing can be written for it."""
    assert judged(INCH + "4) ⌀.500 ±.002 THRU TYP", "SIZE-10").redline is None


def test_a_correction_that_leaves_its_finding_is_not_proven(rulebook: Rulebook) -> None:
    """Proof rests on the check of the corrected sheet: a check that always finds the same proves nothing."""
    package = package_of(INCH + DATUMS + "4) SURFACE\n   ⏥ | .004 | A")
    findings = rulebook.check(package)
    stubborn = redlines(package, findings, lambda _: findings)
    assert stubborn
    assert not any(redline.proven for redline in stubborn.values())


def test_a_correction_with_a_new_finding_of_its_grade_is_not_proven(rulebook: Rulebook) -> None:
    package = package_of(INCH + DATUMS + "4) SURFACE\n   ⏥ | .004 | A\n5) ⌀.50 THRU\n   ○ | .03")
    findings = [finding for finding in rulebook.check(package) if finding.rule == "FRAME-01"]
    assert findings
    again = redlines(package, findings, lambda changed: rulebook.check(changed))
    assert not any(redline.proven for redline in again.values())


def test_corrections_of_one_callout_build_on_each_other(rulebook: Rulebook) -> None:
    package = package_of(INCH + DATUMS + "4) 2 HOLES ⌀0.281 ±.01 THRU\n   ⌖ | .014 Ⓜ | A | B | C")
    (correction,) = settle(package, rulebook.check)
    assert write_callout(correction.new, Style.UNICODE) == ["2X ⌀.281 ±.010 THRU", "⌖ | ⌀.014 Ⓜ | A | B | C"]


def test_the_demo_is_settled_once_and_for_all(rulebook: Rulebook, project: Path) -> None:
    """What is corrected stays corrected: a second run has nothing left to change."""
    from calloutlint.reading.package import demo_package
    from calloutlint.redline.prove import with_callouts

    package = demo_package()
    corrections = settle(package, rulebook.check)
    assert len(corrections) >= 4
    settled = with_callouts(package, {id(one.old): one.new for one in corrections})
    assert settle(settled, rulebook.check) == []
