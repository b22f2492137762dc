"""Datum reference frames: which callouts share one, which differ by order or by a material boundary."""

import pytest

from calloutlint.facts.datums.conflicts import boundary_conflicts, order_conflicts
from calloutlint.facts.datums.frames import frames_in_force
from calloutlint.facts.datums.scheme import DatumScheme, scheme_of
from calloutlint.reading.sheet import parse_sheet

DATUMS = """
1) SURFACE
   ⏥ | 0.1
   DATUM A
2) ⌀20 H7 THRU
   ⟂ | ⌀0.1 | A
   DATUM B
3) SLOT 6 +0.03 0
   ⌖ | 0.1 | A | B
   DATUM C
"""


def scheme(*frames: str, standard: str = "ASME Y14.5-2018", head: str = "") -> DatumScheme:
    """A drawing with holes from balloon 4 on, one for each text; a text of several lines is a whole callout."""
    holes = (text if "\n" in text else f"4X ⌀5 THRU\n⌖ | ⌀0.2 Ⓜ | {text}" for text in frames)
    body = DATUMS + "".join(f"{number}) {text}\n" for number, text in enumerate(holes, start=4))
    title = f"drawing: T-1\nstandard: {standard}\nunits: mm\n{head}"
    return scheme_of(parse_sheet(title + body, "sheet.txt"))


def order(found: DatumScheme) -> list[tuple[str, str, str | None]]:
    return [
        (c.use.callout.balloon, c.other.callout.balloon, c.joint.name if c.joint else None)
        for c in order_conflicts(found)
    ]


def boundary(found: DatumScheme) -> list[tuple[str, str]]:
    return [(c.use.callout.balloon, c.other.callout.balloon) for c in boundary_conflicts(found)]


@pytest.mark.parametrize(
    ("frames", "found"),
    [
        (["A | B | C", "A | B | C"], []),
        (["A | B | C", "A | C | B"], [("5", "4", None)]),
        (["A | B | C", "A | C | B", "A | B | C"], [("5", "4", None)]),
        (["A | C | B", "A | B | C", "A | B | C"], [("5", "4", None)]),
        (["A | C | B", "A | C | B", "A | B | C"], [("6", "4", None)]),
        (["A | B", "A | B | C"], []),
        (["A | B | C", "A[z,u,v] | B[x,y] | C[w]"], []),
        (["A | B Ⓜ | C", "A | B | C"], []),
        (["B-C | A", "C-B | A"], []),
        (["A | B", "SURFACE\n↗ | 0.1 | B | A"], []),
        (["A | B | C", "4X ⌀5 THRU\n⌖ | ⌀0.3 | A | B | C\n⌖ | ⌀0.1 | A | C | B"], []),
    ],
)
def test_order_conflicts_stand_on_the_later_callout_that_deviates(
    frames: list[str], found: list[tuple[str, str, str | None]]
) -> None:
    assert order(scheme(*frames)) == found


def test_an_order_conflict_inside_a_joint_names_the_joint() -> None:
    head = "joint: cover screws = 4+5 with M5 socket head cap screw\n"
    assert order(scheme("A | B | C", "A | C | B", "A | C | B", head=head)) == [
        ("5", "4", "cover screws"),
    ]


@pytest.mark.parametrize(
    ("frames", "found"),
    [
        (["A | B Ⓜ | C Ⓜ", "A | B Ⓜ | C Ⓜ"], []),
        (["A | B Ⓜ | C", "A | B | C"], [("5", "4")]),
        (["A | B | C", "A | B Ⓜ | C", "A | B | C"], [("5", "4")]),
        (["A | B | C", "A | B Ⓢ | C"], []),
        (["A | B | C", "A | C Ⓜ | B"], []),
        (["A | B | C", "4X ⌀5 THRU\n⌖ | ⌀0.2 | A | B Ⓜ | C\nSEP REQT"], []),
        (["A | B | C", "SURFACE\n⌓ | 0.2 | A | B Ⓜ | C"], []),
        (["A | B | C", "SURFACE\n⟂ | 0.2 | A | B Ⓜ | C"], []),
        (["A | B | C", "4X ⌀5 THRU\n⌖ | ⌀0.2 | A | B | C\n⌖ | ⌀0.1 | A | B Ⓜ | C"], []),
    ],
)
def test_boundary_conflicts_are_those_of_patterns_that_could_share_a_frame(
    frames: list[str], found: list[tuple[str, str]]
) -> None:
    """ASME Y14.5, simultaneous requirements: same datum features, same order, same material boundaries."""
    assert boundary(scheme(*frames)) == found


def tied(found: DatumScheme) -> list[str]:
    return [use.callout.balloon for frame in frames_in_force(found) for use in frame.simultaneous]


def test_position_and_profile_of_one_frame_are_one_requirement() -> None:
    assert tied(scheme("A | B | C", "A | B | C", "SURFACE\n⌓ | 0.2 | A | B | C")) == ["4", "5", "6"]


def test_a_separate_requirement_and_the_lower_line_of_a_composite_are_not_tied() -> None:
    """ASME Y14.5: the default leaves out lower segments, and what says SEP REQT."""
    assert tied(scheme("A | B | C", "4X ⌀5 THRU\n⌖ | ⌀0.2 | A | B | C\nSEP REQT")) == []
    assert tied(scheme("A", "4X ⌀5 THRU\n⌖ | ⌀0.2 | A | B | C\n| ⌀0.1 | A")) == []


def test_under_iso_nothing_is_simultaneous_unless_it_says_so() -> None:
    """ISO 5458: independency; SIM ties."""
    assert tied(scheme("A | B | C", "A | B | C", standard="ISO 1101")) == []
    sim = "4X ⌀5 THRU\n⌖ | ⌀0.2 SIM | A | B | C"
    assert tied(scheme(sim, sim, standard="ISO 1101")) == ["4", "5"]


def test_frames_are_told_apart_by_letters_order_boundaries_and_names() -> None:
    frames = ["A | B | C", "A | C | B", "A | B Ⓜ | C", "A[z,u,v] | B[x,y] | C[w]", "A | B | C"]
    assert [len(frame.uses) for frame in frames_in_force(scheme(*frames))] == [1, 1, 2, 1, 1, 1]
