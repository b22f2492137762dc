"""Corrections of joints and fits: what each writes, each proven by checking again."""

import pytest

from calloutlint.model.drawing import Package
from calloutlint.reading.sheet import parse_sheet
from calloutlint.review import Judged, review
from calloutlint.rulebook.rulebook import Rulebook, load_rulebook


@pytest.fixture(scope="module")
def rulebook() -> Rulebook:
    return load_rulebook()


INCH = "drawing: SG-1\nrevision: A\nstandard: ASME Y14.5-2018\nunits: inch\n"
OLD = INCH.replace("-2018", "M-1994")
MM = INCH.replace("inch", "mm")
ISO = MM.replace("ASME Y14.5-2018", "ISO 1101")
DATUMS = "1) ⏥ | .1\nDATUM A\n2) ⟂ | .1 | A\nDATUM B\n3) ⟂ | .1 | A | B\nDATUM C\n"
TAPPED = "7) 4X .250-20 UNC-2B ↧ 1.00\n⌖ | ⌀.010{} | A | B | C"

CORRECTIONS = [
    (  # a smaller tolerance, where at least half of it is left
        "FIT-02",
        INCH + "joint: c = 4 with .250-20 UNC screw, floating\n" + DATUMS,
        "4) 4X ⌀.281 +.007 -.002 THRU\n⌖ | ⌀.030 Ⓜ | A | B | C",
        "4X ⌀.281 +.007 -.002 THRU\n⌖ | ⌀.029 Ⓜ | A | B | C",
    ),
    (  # else the next stock drill: .257 + .008 = .265, 17/64 is .266
        "FIT-02",
        INCH + "joint: c = 4 with .250-20 UNC screw, floating\n" + DATUMS,
        "4) 4X ⌀.257 +.004 -.001 THRU\n⌖ | ⌀.014 Ⓜ | A | B | C",
        "4X ⌀.266 +.004 -.001 THRU\n⌖ | ⌀.014 Ⓜ | A | B | C",
    ),
    (
        "FIT-02",
        ISO + "joint: c = 4 with M6 ISO 4762, floating\n" + DATUMS,
        "4) 4X ⌀6.6 H13 THRU\n⌖ | ⌀1.5 Ⓜ | A | B | C",
        "4X ⌀7.5 H13 THRU\n⌖ | ⌀1.5 Ⓜ | A | B | C",
    ),
    (
        "FIT-01",
        MM + "joint: c = 4 with M6 ISO 4762, floating\n" + DATUMS,
        "4) 4X ⌀5.8 +0.2 0 THRU\n⌖ | ⌀0.3 Ⓜ | A | B | C",
        "4X ⌀6.3 +0.2 0 THRU\n⌖ | ⌀0.3 Ⓜ | A | B | C",
    ),
    (
        "FIT-03",
        INCH + "joint: c = 4 with .250-20 UNC screw, fixed in 7\n" + DATUMS + TAPPED.format(" Ⓟ .50") + "\n",
        "4) 4X ⌀.281 +.007 -.000 THRU\n⌖ | ⌀.0215 Ⓜ | A | B | C",
        "4X ⌀.281 +.007 -.000 THRU\n⌖ | ⌀.0210 Ⓜ | A | B | C",
    ),
    (
        "FIT-04",
        INCH
        + "joint: c = 4 with .250-20 UNC screw, fixed in 7, projection .50\n"
        + DATUMS
        + "4) 4X ⌀.281 +.007 -.000 THRU\n⌖ | ⌀.010 Ⓜ | A | B | C\n",
        TAPPED.format(""),
        "4X .250-20 UNC-2B ↧ 1.00\n⌖ | ⌀.010 Ⓟ .500 | A | B | C",
    ),
    (
        "FIT-05",
        INCH
        + "joint: c = 4 with .250-20 UNC screw, fixed in 7, thickness 12.7 mm\n"
        + DATUMS
        + "4) 4X ⌀.281 +.007 -.000 THRU\n⌖ | ⌀.010 Ⓜ | A | B | C\n",
        TAPPED.format(" Ⓜ Ⓟ .38"),
        "4X .250-20 UNC-2B ↧ 1.00\n⌖ | ⌀.010 Ⓜ Ⓟ .500 | A | B | C",
    ),
    (
        "FIT-06",
        OLD + "joint: c = 4 with .250-20 UNC screw, floating\n" + DATUMS,
        "4) 4X ⌀.281 +.007 -.002 THRU\n⌖ | ⌀.014 Ⓢ | A | B | C",
        "4X ⌀.281 +.007 -.002 THRU\n⌖ | ⌀.014 Ⓜ | A | B | C",
    ),
    ("SIZE-08", ISO, "4) ⌀25 H7 (+0.033 0) THRU", "⌀25 H7 (+0.021 0) THRU"),
    ("SIZE-08", ISO, "4) ⌀25 g6 (24.980-24.992)", "⌀25 g6 (24.980-24.993)"),
    ("SIZE-08", ISO, "4) ⌀25 g6 (24.99/24.98)", "⌀25 g6 (24.993-24.980)"),
    ("SIZE-08", ISO, "4) ⌀25 g6 (+0.007 +0.020)", "⌀25 g6 (-0.007 -0.020)"),
    ("SIZE-08", INCH, "4) ⌀.500 H7 (+.0008 -.0000) THRU", "⌀.500 H7 (+.0007 -.0000) THRU"),
    ("SIZE-12", ISO, "4) 4X M6-6g ↧ 12", "4X M6-6H ↧ 12"),
    ("SIZE-12", INCH, "4) 4X .250-20 UNC-3A ↧ .50", "4X .250-20 UNC-3B ↧ .50"),
]


def judged(rulebook: Rulebook, text: str, rule: str) -> Judged:
    found = review(Package("one", (parse_sheet(text, "one.txt"),)), rulebook).findings
    return next(one for one in found if one.finding.rule == rule)


@pytest.mark.parametrize(("rule", "head", "callout", "corrected"), CORRECTIONS)
def test_the_correction_is_as_a_checker_writes_it_and_proven(
    rulebook: Rulebook, rule: str, head: str, callout: str, corrected: str
) -> None:
    redline = judged(rulebook, f"{head}{callout}\n", rule).redline
    assert redline is not None
    assert redline.text == corrected
    assert redline.proven


def test_no_tolerance_is_left_and_no_nominal_to_enlarge(rulebook: Rulebook) -> None:
    """Limits without a nominal: the finding says how large the hole has to be, and proposes nothing."""
    text = MM + "joint: c = 4 with M6 ISO 4762, floating\n" + DATUMS
    found = judged(rulebook, text + "4) 4X ⌀6.1-6.3 THRU\n⌖ | ⌀0.5 Ⓜ | A | B | C\n", "FIT-02")
    assert found.redline is None
    assert "at least 6.5 at MMC" in found.finding.message


UNCORRECTED = {
    "not said how it is held": (
        "FIT-02",
        "4) 4X ⌀6.6 +0.2 0 THRU CLEARANCE FOR M6\n⌖ | ⌀0.7 Ⓜ | A | B | C\n",
    ),
    "the part that fixes is not at hand": (
        "FIT-03",
        "joint: c = 4 with M6 ISO 4762, fixed in MOTOR-9:7\n4) 4X ⌀6.6 +0.2 0 THRU\n⌖ | ⌀0.7 Ⓜ | A | B | C\n",
    ),
    "only the missing projected zone is the cause": (
        "FIT-03",
        "joint: c = 4 with M6 ISO 4762, fixed in 7, projection 20\n"
        "4) 4X ⌀6.6 +0.2 0 THRU\n⌖ | ⌀0.3 Ⓜ | A | B | C\n7) 4X M6-6H ↧ 12\n⌖ | ⌀0.25 | A | B | C\n",
    ),
    "a fit code that locates a pin": (
        "FIT-01",
        "joint: c = 4 with ⌀6 m6 pin, floating\n4) 2X ⌀6 F8 THRU\n⌖ | ⌀0 Ⓜ | A | B | C\n",
    ),
    "a slot, which no drill makes": (
        "FIT-01",
        "joint: c = 4 with M6 hex head bolt, floating\n4) SLOT 5.9 ±0.1\n⌖ | 0.1 Ⓜ | A | B | C\n",
    ),
}


@pytest.mark.parametrize("name", UNCORRECTED)
def test_nothing_is_proposed_that_would_not_settle_the_joint(rulebook: Rulebook, name: str) -> None:
    rule, body = UNCORRECTED[name]
    head, _, callouts = body.rpartition("\n4) ")
    joint, callouts = (head + "\n", "4) " + callouts) if head else ("", body)
    assert judged(rulebook, MM + joint + DATUMS + callouts, rule).redline is None


def test_without_a_position_the_published_close_hole_is_proposed(rulebook: Rulebook) -> None:
    """ISO 273: fine for M6 is 6.4 (from memory)."""
    text = MM + "joint: c = 4 with M6 ISO 4762, floating\n" + DATUMS + "4) 4X ⌀5.8 +0.2 0 THRU\n"
    redline = judged(rulebook, text, "FIT-01").redline
    assert redline is not None
    assert redline.text == "4X ⌀6.4 +0.2 0 THRU"


def test_cures_from_another_unit_are_rounded_to_the_safe_side(rulebook: Rulebook) -> None:
    """An M8 is .31496 in: .350 − .31496 = .03504 holds .0350; .31496 + .040 = .35496 asks for .3550."""
    text = INCH + "joint: c = 4 with M8 ISO 4762, floating\n" + DATUMS
    found = judged(rulebook, text + "4) 4X ⌀.350 +.006 -.000 THRU\n⌖ | ⌀.040 Ⓜ | A | B | C\n", "FIT-02")
    assert "position ⌀.035 or less, or a hole of at least .355 at MMC" in found.finding.message
    assert found.redline is not None
    assert found.redline.text == "4X ⌀.350 +.006 -.000 THRU\n⌖ | ⌀.035 Ⓜ | A | B | C"
    assert found.redline.proven
