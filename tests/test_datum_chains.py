"""How datum features are controlled, and where control runs in a circle."""

import pytest

from calloutlint.facts.datums.chains import loop_use, loops, self_references
from calloutlint.facts.datums.completeness import target_faults
from calloutlint.facts.datums.control import uncontrolled
from calloutlint.facts.datums.scheme import DatumScheme, scheme_of
from calloutlint.reading.sheet import parse_sheet


def scheme(*callouts: str) -> DatumScheme:
    """A drawing of callouts, balloons from 1, `;` between their lines."""
    body = "".join(
        f"{number}) " + text.replace("; ", "\n") + "\n" for number, text in enumerate(callouts, start=1)
    )
    return scheme_of(parse_sheet(f"drawing: T-1\nstandard: ASME Y14.5-2018\nunits: mm\n\n{body}", "sheet.txt"))


@pytest.mark.parametrize(
    ("callout", "found"),
    [
        ("⌀10 H7 THRU; ⟂ | ⌀0.1 | A; DATUM A", "A"),
        ("⌀10 H7 THRU; DATUM B; ⟂ | ⌀0.1 | A | B", "B"),
        ("4X ⌀10 H7 THRU; ⌖ | ⌀0.1 | B; DATUM B", "B"),
        ("⌀10 H7 THRU; ⟂ | ⌀0.1 | A; DATUM B", ""),
        ("SHAFT ⌀20 k6; ⌰ | 0.01 | A-B; DATUM A", ""),
        ("⌀10 THRU; DATUM B; ⌴ ⌀18 ↧ 5; ⌖ | ⌀0.1 | B", ""),
        ("SURFACE; ⌓ | 0.5 | A | B | C; A1; A2; A3; DATUM A", ""),
    ],
)
def test_a_feature_controlled_to_itself(callout: str, found: str) -> None:
    """Bearing seats in runout to their common axis, and castings profiled to their targets, are right."""
    only = scheme(callout).callouts[0]
    assert "".join(ref.name for _, ref in self_references(only)) == found


@pytest.mark.parametrize(
    ("callouts", "rings", "stands_on"),
    [
        (["⟂ | 0.1 | B; DATUM A", "⟂ | 0.1 | A; DATUM B"], ["AB"], ["2"]),
        (["⟂ | 0.1 | B; DATUM A", "⟂ | 0.1 | C; DATUM B", "⟂ | 0.1 | A; DATUM C"], ["ABC"], ["3"]),
        (["⏥ | 0.1; DATUM A", "⟂ | 0.1 | A; DATUM B", "⟂ | 0.1 | A | B; DATUM C"], [], []),
        (["⌀9 k6; ⌰ | 0.1 | A-B; DATUM A", "⌀9 k6; ⌰ | 0.1 | A-B; DATUM B"], [], []),
        (["⌓ | 1 | A | B; A1; A2; A3; DATUM A", "⌓ | 1 | A | B; B1; B2; DATUM B"], [], []),
        (["⟂ | 0.1 | A; DATUM A", "⟂ | 0.1 | A; DATUM B"], [], []),
        (["⏥ | 0.1; DATUM A", "⟂ | 0.1 | A; DATUM B", "⟂ | 0.1 | B; DATUM A"], [], []),
    ],
)
def test_rings_of_control(callouts: list[str], rings: list[str], stands_on: list[str]) -> None:
    found = scheme(*callouts)
    assert ["".join(ring) for ring in loops(found)] == rings
    assert [loop_use(ring, found).callout.balloon for ring in loops(found)] == stands_on


@pytest.mark.parametrize(
    ("callouts", "found"),
    [
        (["SURFACE; ⏥ | 0.1; DATUM A", "⌀9 H7 THRU; ⟂ | ⌀0.1 | A; DATUM B"], []),
        (["SURFACE; DATUM A", "⌀9 H7 THRU; ⟂ | ⌀0.1 | A; DATUM B"], [("A", None)]),
        (["SURFACE; ⏥ | 0.1; DATUM A", "⌀9 H7 THRU; DATUM B"], [("B", "A")]),
        (["⌀9 H7 THRU; DATUM A", "SURFACE; ⟂ | 0.1 | A; DATUM B"], []),
        (["SURFACE; ⌓ | 0.1; DATUM A", "⌀9 H7 THRU; ⌖ | ⌀0.1 | A; DATUM B"], []),
    ],
)
def test_datum_features_without_the_control_their_place_asks_for(
    callouts: list[str], found: list[tuple[str, str | None]]
) -> None:
    lacking = uncontrolled(scheme(*callouts, "⌀5 THRU; ⌖ | ⌀0.2 | A | B"))
    assert [(each.feature.letter, each.primary and each.primary.name) for each in lacking] == found


@pytest.mark.parametrize(
    ("targets", "missing", "contacts"),
    [
        ("A1; A2; A3", (), None),
        ("A1; A2; A4", (3,), None),
        ("A2; A3; A4", (1,), None),
        ("A1; A2", (), 2),
        ("A1 LINE; A2", (), None),
        ("A1 10x20", (), 1),
        ("A1 ⌀8; A2 ⌀8; A3 ⌀8", (), None),
        ("A1; A3", (2,), 2),
    ],
)
def test_completeness_of_datum_targets(targets: str, missing: tuple[int, ...], contacts: int | None) -> None:
    """ASME Y14.5, ISO 5459: three points fix a primary plane; a line counts two, an area one."""
    faults = target_faults(scheme(f"SURFACE; {targets}; DATUM A", "⌀5 THRU; ⌖ | ⌀0.2 | A | B"))
    expected = [(missing, contacts)] if missing or contacts else []
    assert [(fault.missing, fault.contacts) for fault in faults] == expected


def test_targets_of_a_secondary_plane_and_of_a_cylinder_need_no_three() -> None:
    secondary = scheme("SURFACE; ⏥ | 0.1; DATUM A", "SURFACE; B1; B2; DATUM B", "⌀5 THRU; ⌖ | ⌀0.2 | A | B")
    cylinder = scheme("SHAFT ⌀30 ±0.1; A1 LINE; DATUM A", "⌀5 THRU; ⌖ | ⌀0.2 | A")
    assert target_faults(secondary) == target_faults(cylinder) == ()


def test_targets_may_stand_under_several_balloons() -> None:
    found = scheme("SURFACE; DATUM A", "A1", "A2", "A3", "⌀5 THRU; ⌖ | ⌀0.2 | A")
    assert target_faults(found) == ()
    assert len(found.features["A"].targets) == 3
