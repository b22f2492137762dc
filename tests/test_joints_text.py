"""Joints as text: what reads, and what is said of what does not."""

import pytest

from calloutlint.model.fastener import Hold, HoleRef, Joint
from calloutlint.reading.joints import JointTextError, parse_holes, parse_joint
from calloutlint.reading.transcribe import joint_text
from calloutlint.units import Unit


def test_a_joint_in_full() -> None:
    joint = parse_joint(
        "cover screws = 4 with .250-20 UNC-2A socket head cap screw, fixed in SG-2210:7, projection .50", 12
    )
    assert (joint.name, joint.holes, joint.mates) == (
        "cover screws",
        (HoleRef(None, "4"),),
        (HoleRef("SG-2210", "7"),),
    )
    assert joint.hold is Hold.FIXED
    assert joint.fastener.text == ".250-20 UNC-2A socket head cap screw"
    assert joint.fastener.thread is not None
    assert joint.projection is not None
    assert (joint.projection.text, joint.projection.unit) == (".50", None)
    assert joint.stated_at == 12


@pytest.mark.parametrize(
    ("text", "hold", "mates"),
    [
        ("x = 4 with M6", None, ()),
        ("x = 4 with M6, floating", Hold.FLOATING, ()),
        ("x = 4 with M6, floating through 5", Hold.FLOATING, (HoleRef(None, "5"),)),
        ("x = 4 WITH M6, FIXED IN B:5", Hold.FIXED, (HoleRef("B", "5"),)),
        ("x = 4 with M6 x 20, ISO 4762, fixed in B:5", Hold.FIXED, (HoleRef("B", "5"),)),
        ("x = 4 with M6, thickness 12, fixed in B:5", Hold.FIXED, (HoleRef("B", "5"),)),
    ],
)
def test_how_a_joint_is_held(text: str, hold: Hold | None, mates: tuple[HoleRef, ...]) -> None:
    joint = parse_joint(text)
    assert (joint.hold, joint.mates) == (hold, mates)


@pytest.mark.parametrize(
    ("text", "holes"),
    [
        ("4", (HoleRef(None, "4"),)),
        ("4.1+4A", (HoleRef(None, "4.1"), HoleRef(None, "4A"))),
        ("SG-1:4 + SG-2:5", (HoleRef("SG-1", "4"), HoleRef("SG-2", "5"))),
        ("SG-1:4 + 5", (HoleRef("SG-1", "4"), HoleRef("SG-1", "5"))),
        ("Pumpe 7:3", (HoleRef("Pumpe 7", "3"),)),
    ],
)
def test_holes(text: str, holes: tuple[HoleRef, ...]) -> None:
    assert parse_holes(text) == holes


@pytest.mark.parametrize(
    ("text", "amount", "unit"),
    [("12", "12", None), ("12 mm", "12", Unit.MM), (".5 in", "0.5", Unit.INCH), ("1/2 in", "0.5", Unit.INCH)],
)
def test_lengths(text: str, amount: str, unit: Unit | None) -> None:
    thickness = parse_joint(f"x = 4 with M6, thickness {text}").thickness
    assert thickness is not None
    assert (str(thickness.amount), thickness.unit) == (amount, unit)


@pytest.mark.parametrize(
    ("text", "message"),
    [
        ("cover screws", "'cover screws' is no joint; expected NAME = HOLES with FASTENER"),
        ("= 4 with M6", "'= 4 with M6' is no joint"),
        ("x = 4", "'x = 4' is no joint"),
        ("x = lid with M6", "'lid' names no hole; expected a balloon such as 4, or DRAWING:4"),
        ("x = 4 + with M6", "'' names no hole"),
        ("x = 4 with M6, fixed in :7", "':7' names no hole"),
        ("x = 4 with M6, projection two", "'projection two' does not read; expected a length"),
        ("x = 4 with M6, thickness 1/0", "'thickness 1/0' does not read"),
        (
            "x = 4 with M6, projection 1, projection 2",
            "'projection 2' does not read; expected a length, such as",
        ),
        ("x = " + "4 + " * 200, "803 characters; at most 500 are read as a joint"),
        ("x = 4 with M6, fixed in B:2, floating", "'floating': how the joint is held is said twice"),
    ],
)
def test_what_does_not_read_is_said(text: str, message: str) -> None:
    with pytest.raises(JointTextError) as error:
        parse_joint(text)
    assert str(error.value).startswith(message)


@pytest.mark.parametrize(
    "text",
    [
        "cover screws = 4 with .250-20 UNC-2A socket head cap screw, fixed in SG-2210:7, projection .50",
        "bolts = 4 + SG-2:5 with M6, floating through SG-3:1 + SG-3:2, thickness 12 mm",
        "pins = 4 with ⌀6 m6 dowel pin",
        "studs = 4 with M8, floating, projection 1.5 in, thickness 3",
    ],
)
def test_a_joint_written_out_reads_the_same(text: str) -> None:
    joint: Joint = parse_joint(text)
    assert joint_text(joint) == text
    assert parse_joint(joint_text(joint)) == joint
