"""What a datum feature is, read from its callout."""

import pytest

from calloutlint.callouts.parse import parse_callout
from calloutlint.facts.datums.kinds import geometry_of
from calloutlint.facts.datums.scheme import scheme_of
from calloutlint.model.callout import Callout
from calloutlint.model.drawing import Drawing
from calloutlint.units import Unit

KINDS = [
    ("⌀30 H7 THRU", "axis"),
    ("⌀30 H7 THRU; ⌴ ⌀40 ↧ 5", "axis"),
    ("30 ±0.1", "centre plane"),
    ("SLOT 6 +0.03/0", "centre plane"),
    ("TAB 8 0/-0.1; ⌖ | 0.1 | A", "centre plane"),
    ("S⌀20 ±0.05", "point"),
    ("SR10", "point"),
    ("M12x1.75-6H ↧ 20", "axis"),
    ("⌀10.2 ↧ 24; M12x1.75-6H ↧ 20", "axis"),
    ("SURFACE; ⏥ | 0.1", "plane"),
    ("⏥ | 0.1", "plane"),
    ("⟂ | 0.1 | A", "plane"),
    ("⌓ | 0.1 | A", "plane"),
    ("FACE; ↗ | 0.05 | A", "plane"),
    ("SHAFT; ↗ | 0.05 | A", "axis"),
    ("⌭ | 0.01", "axis"),
    ("⟂ | ⌀0.1 | A", "axis"),
    ("⌖ | 0.1 | A", "centre plane"),
    ("SPHERE; ○ | 0.01", "point"),
    ("CONE; ⌓ | 0.05", "cone"),
    ("2X SURFACE; ⏥ | 0.1", "plane"),
    ("4X ⌀5 THRU; ⌖ | ⌀0.1 | A", "pattern"),
    ("4X ⌀5 THRU; ⌓ | 0.1 | A", "pattern"),
    ("4X M6x1-6H; ⌖ | ⌀0.1 | A", "pattern"),
    ("2X SLOT 6 ±0.1; ⌖ | 0.1 | A", "pattern"),
    ("4X ⌀5 THRU INDIVIDUALLY; ⌖ | ⌀0.1 | A", "axis"),
    ("2X ⌀20 h6; ↗ | 0.02 | A", "axis"),
    ("[25]; ⟂ | 0.1 | A", "plane"),
    ("⌀[25]; ⌓ | 0.1 | A", "axis"),
    ("(25); ⟂ | 0.1 | A", "plane"),
    ("SURFACE 12 ±0.1; ∥ | 0.1 | A", "plane"),
]
UNKNOWN = [
    ("R5 ±0.1", "a radius is no feature of size"),
    ("⌓ | 0.2 | A; ALL AROUND", "a contour may have any form"),
    ("↗ | 0.05 | A", "a face or a cylinder"),
    ("○ | 0.05", "a cylinder, a cone or a sphere"),
    ("4X ⌀5 THRU", "several holes that nothing ties together"),
    ("⌀5 THRU TYP; ⌖ | ⌀0.1 | A", "how many is not said"),
    ("HOLE 8 ±0.1", "an elongated hole, or a diameter sign left out"),
    ("⌀5..0 H7; ⟂ | 0.1 | A", "the size cannot be read"),
]


def callout(text: str) -> Callout:
    return Callout("1", parse_callout(text.split("; "), Unit.MM))


@pytest.mark.parametrize(("text", "kind"), KINDS)
def test_kind_of_a_datum_feature(text: str, kind: str) -> None:
    geometry = geometry_of(callout(text))
    assert geometry is not None
    assert geometry.kind == kind


@pytest.mark.parametrize(("text", "why"), UNKNOWN)
def test_unknown_stays_unknown(text: str, why: str) -> None:
    assert geometry_of(callout(text)) is None, why


def test_a_plane_without_any_sign_of_it_is_an_assumption() -> None:
    geometry = geometry_of(callout("DATUM A"))
    assert geometry is not None
    assert geometry.assumed == "taken as a plane surface"


def test_a_letter_on_features_of_two_kinds_has_none() -> None:
    drawing = Drawing("f", callouts=(callout("⌀5 THRU; DATUM A"), callout("SURFACE; DATUM A")))
    assert scheme_of(drawing).features["A"].geometry is None


def test_a_pattern_knows_its_members() -> None:
    geometry = geometry_of(callout("4X ⌀5 THRU; ⌖ | ⌀0.1 | A"))
    assert geometry is not None
    assert (geometry.member, geometry.count) == ("axis", 4)


def test_sheets_of_one_drawing_share_their_datum_features() -> None:
    first = Drawing("1", callouts=(callout("SURFACE; DATUM A"),))
    second = Drawing("2", callouts=(callout("⌀5 THRU; ⟂ | ⌀0.1 | A; DATUM B"),))
    scheme = scheme_of(first, second)
    assert list(scheme.features) == ["A", "B"]
    assert scheme.relations.tell("A", "B")
