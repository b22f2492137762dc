"""Freedoms held by combinations of datum features, worked by hand.

Worked from the invariance classes of ISO 5459 and the constraint of degrees of freedom in ASME Y14.5 (a
primary plane holds one translation and two rotations, a primary axis two and two, a primary point three
translations), from memory of both; each row gives the reason. Letters: x y z translations, u v w rotations
about them; the first datum stands along z.
"""

import re
from typing import NamedTuple

import pytest

from calloutlint.callouts.parse import parse_callout
from calloutlint.facts.datums.held import held, left, redundant
from calloutlint.facts.datums.scheme import DatumScheme, scheme_of
from calloutlint.model.callout import Callout
from calloutlint.model.drawing import Drawing
from calloutlint.model.frame import Segment
from calloutlint.units import Unit

NOUNS = {
    "plane": "SURFACE",
    "hole": "⌀10 H7 THRU",
    "shaft": "SHAFT ⌀30 h6",
    "slot": "SLOT 6 +0.03 0",
    "sphere": "S⌀20 ±0.05",
    "thread": "M12x1.75-6H",
    "cone": "CONE",
    "contour": "⌓ | 0.2\nALL AROUND",
}
ROUND = {"hole", "shaft", "thread", "cone"}
SIGNS = {"at": "⌖", "⟂": "⟂", "∥": "∥", "∠": "∠", "⌰": "⌰"}


def callout(letter: str, phrase: str) -> str:
    """`4 holes at A|B` as a callout that establishes the datum feature; `targets …` lists its datum targets."""
    if phrase.startswith("targets "):
        return "\n".join(["SURFACE", *phrase.removeprefix("targets ").split(", "), f"DATUM {letter}"])
    found = re.fullmatch(r"(?:(\d+) )?(\w+?)s?(?: (at|⟂|∥|∠|⌰) ?([\w|-]*))?( INDIVIDUALLY)?", phrase)
    assert found, phrase
    count, noun, sign, datums, alone = found.groups()
    text = (f"{count}X " if count else "") + NOUNS[noun] + (alone or "")
    if sign:
        zone = "⌀" if noun in ROUND and sign != "⌰" else "S⌀" if noun == "sphere" else ""
        text += "\n" + " | ".join([SIGNS[sign], f"{zone}0.1", *filter(None, datums.split("|"))])
    return f"{text}\nDATUM {letter}"


def drawing(features: str, frame: str) -> tuple[DatumScheme, Segment]:
    """A drawing of the datum features `A plane; B hole ⟂A`, and a position to the frame `A|B`."""
    texts = [callout(*entry.strip().split(" ", 1)) for entry in features.split(";")]
    texts.append("⌀5 THRU\n⌖ | ⌀0.2 | " + " | ".join(frame.split("|")))
    callouts = tuple(
        Callout(str(number), parse_callout(text.splitlines(), Unit.MM)) for number, text in enumerate(texts, start=1)
    )
    assert not [part for each in callouts for part in each.unread], texts
    return scheme_of(Drawing("table", callouts=callouts)), next(callouts[-1].segments)


class Row(NamedTuple):
    """`holds` is what each reference takes in order, `-` for nothing; `free` what stays."""

    features: str
    frame: str
    holds: str
    free: str
    reason: str


PLANES = [
    Row("A plane", "A", "zuv", "xyw", "a plane stops its normal and both tilts; sliding and turning in it stay"),
    Row("A plane; B plane ⟂A", "A|B", "zuv yw", "x", "at right angles: one more slide, the last turn"),
    Row("A plane; B plane ⟂A; C plane ⟂A|B", "A|B|C", "zuv yw x", "", "three planes at right angles: 3-2-1"),
    Row("A plane; B plane; C plane", "A|B|C", "zuv yw x", "", "nothing said: the usual right angles are assumed"),
    Row("A plane; B plane ∥A", "A|B", "zuv -", "xyw", "parallel to the first: all it could stop is stopped"),
    Row("A plane; B plane ⟂A; C plane ∥B", "A|B|C", "zuv yw -", "x", "third parallel to the second"),
    Row("A plane; B plane ⟂A; C plane ∥A", "A|B|C", "zuv yw -", "x", "third parallel to the first"),
    Row("A plane; B plane ∠A", "A|B", "zuv yw", "x", "any plane not parallel stops one slide and the turn"),
    Row("A plane; B plane ⟂A", "B|A", "zuv yw", "x", "precedence turned: the first takes three, the second two"),
    Row("A plane; B plane ⟂A; C plane ⟂A|B", "C|B|A", "zuv yw x", "", "any order of three planes is 3-2-1"),
    Row("A slot", "A", "zuv", "xyw", "a width's centre plane is a plane"),
    Row("A slot; B slot ⟂A", "A|B", "zuv yw", "x", "two centre planes at right angles"),
    Row("A slot; B plane ⟂A; C plane ⟂A|B", "A|B|C", "zuv yw x", "", "centre plane first, then two planes"),
    Row("A plane; B slot ⟂A", "A|B", "zuv yw", "x", "face and width: free along the slot only"),
    Row("A plane; B slot ⟂A; C hole ⟂A", "A|B|C", "zuv yw x", "", "the hole stops the slide along the slot"),
    Row("A plane; B plane ⟂A; C hole ⟂A", "A|B|C", "zuv yw x", "", "two edges are not needed where a hole is there"),
    Row("A plane; B slot ∥A", "A|B", "zuv -", "xyw", "a centre plane parallel to the face adds nothing"),
]
PLANE_AND_AXIS = [
    Row("A plane; B hole ⟂A", "A|B", "zuv xy", "w", "the hole stops both slides; turning about it stays"),
    Row("A plane; B hole ⟂A; C slot at A|B", "A|B|C", "zuv xy w", "", "plane, axis, centre plane: the slot clocks"),
    Row("A plane; B hole ⟂A; C hole ⟂A", "A|B|C", "zuv xy w", "", "two holes in a face: the second clocks"),
    Row("A plane; B hole ⟂A; C plane ⟂A", "A|B|C", "zuv xy w", "", "an edge clocks about the hole"),
    Row("A plane; B hole ⟂A; C slot ⟂A", "A|C|B", "zuv yw x", "", "slot before hole: it takes a slide and the turn"),
    Row("A plane; B hole ⟂A", "B|A", "xyuv z", "w", "axis first: two slides, two tilts; the face stops the third"),
    Row("A plane; B hole ⟂A; C slot ⟂A", "B|A|C", "xyuv z w", "", "axis, shoulder, keyway"),
    Row("A plane; B hole ∥A", "A|B", "zuv xw", "y", "a cross hole leaves the slide along itself"),
    Row("A plane; B hole ∥A; C plane ⟂B", "A|B|C", "zuv xw y", "", "a face across the cross hole stops that slide"),
    Row("A plane; B shaft ⟂A; C shaft ⌰B", "A|B|C", "zuv xy -", "w", "coaxial with the second: nothing new"),
    Row("A plane; B thread ⟂A", "A|B", "zuv xy", "w", "a thread is the axis of its pitch cylinder"),
    Row("A plane; B hole at A", "A|B", "zuv xy", "w", "a hole positioned to a face alone stands square on it"),
    Row("A slot; B hole ∥A", "A|B", "zuv xw", "y", "an axis in the direction of the centre plane"),
    Row("A slot; B hole ⟂A", "A|B", "zuv xy", "w", "an axis square to the centre plane"),
    Row("A plane; B cone ⟂A", "A|B", "zuv xy", "w", "of a cone's five freedoms three are taken by the face"),
    Row("A plane; B plane ⟂A; C sphere", "A|B|C", "zuv yw x", "", "a ball stops the one slide that is left"),
]
AXIS_FIRST = [
    Row("A shaft", "A", "xyuv", "zw", "an axis stops two slides and two tilts"),
    Row("A thread", "A", "xyuv", "zw", "a thread stops what its pitch cylinder stops; its helix is not used"),
    Row("A cone", "A", "xyzuv", "w", "a cone stops all but turning about itself"),
    Row("A shaft; B plane ⟂A", "A|B", "xyuv z", "w", "the shoulder stops the slide"),
    Row("A shaft; B plane ⟂A; C slot at A", "A|B|C", "xyuv z w", "", "the keyway stops the turn"),
    Row("A shaft; B slot at A", "A|B", "xyuv w", "z", "a slot along the shaft, as keyways are, stops the turn"),
    Row("A shaft; B plane ∥A", "A|B", "xyuv w", "z", "a flat parallel to the axis stops the turn"),
    Row("A shaft; B plane ∥A; C plane ⟂A", "A|B|C", "xyuv w z", "", "flat, then end face"),
    Row("A shaft; B plane ⟂A; C plane ∥B", "A|B|C", "xyuv z -", "w", "a second end face adds nothing"),
    Row("A shaft; B shaft ⌰A", "A|B", "xyuv -", "zw", "coaxial with the first: nothing new"),
    Row("A shaft; B hole ⟂A", "A|B", "xyuv zw", "", "a cross hole stops the slide and the turn"),
    Row("A shaft; B hole ∥A", "A|B", "xyuv w", "z", "a hole beside the axis stops the turn"),
    Row("A shaft; B plane ⟂A; C hole ∥A", "A|B|C", "xyuv z w", "", "bore, face, dowel hole beside it"),
    Row("A shaft; B plane ⟂A; C hole ⟂A", "A|B|C", "xyuv z w", "", "of a cross hole only the turn is left to take"),
    Row("A shaft; B sphere", "A|B", "xyuv z", "w", "a ball on the axis stops the slide"),
    Row("A shaft; B slot ∥A", "A|B", "xyuv w", "z", "a keyway stops the turn only"),
    Row("A cone; B slot ∥A", "A|B", "xyzuv w", "", "cone and keyway hold everything"),
    Row("A cone; B plane ⟂A", "A|B", "xyzuv -", "w", "the face after a cone adds nothing"),
]
POINTS = [
    Row("A sphere", "A", "xyz", "uvw", "a point stops three slides and no rotation"),
    Row("A sphere; B plane", "A|B", "xyz uv", "w", "after the ball a plane has only its tilts to take"),
    Row("A sphere; B plane; C plane ⟂B", "A|B|C", "xyz uv w", "", "a second plane stops the last turn"),
    Row("A sphere; B plane; C plane ∥B", "A|B|C", "xyz uv -", "w", "a parallel plane has no turn to take"),
    Row("A sphere; B shaft at A", "A|B", "xyz uv", "w", "a stem through the ball stops two tilts"),
    Row("A sphere; B shaft at A; C slot ∥B", "A|B|C", "xyz uv w", "", "ball, stem, key"),
    Row("A sphere; B sphere", "A|B", "xyz uv", "w", "two balls leave the turn about their line"),
    Row("A sphere; B sphere; C sphere", "A|B|C", "xyz uv w", "", "three balls out of line hold everything"),
    Row("A plane; B sphere", "A|B", "zuv xy", "w", "a ball on a face acts as a hole in it"),
    Row("A plane; B sphere; C sphere", "A|B|C", "zuv xy w", "", "two balls on a face"),
]
COMMON = [
    Row("A shaft ⌰A-B; B shaft ⌰A-B", "A-B", "xyuv", "zw", "two bearing seats make one axis"),
    Row("A shaft ⌰A-B; B shaft ⌰A-B; C plane ⟂A-B", "A-B|C", "xyuv z", "w", "common axis, then a shoulder"),
    Row("A shaft ⌰A-B; B shaft ⌰A-B; C plane ⟂A-B; D slot at A-B|C", "A-B|C|D", "xyuv z w", "", "and a keyway"),
    Row("A shaft ⌰A-B; B shaft ⌰A-B; C shaft ⌰A-B", "A-B|C", "xyuv -", "zw", "a third seat on the axis adds nothing"),
    Row("A hole; B hole", "A-B", "xyuv", "zw", "two holes in one common datum: assumed in line"),
    Row("A plane; B plane", "A-B", "zuv", "xyw", "two pads in one plane are one plane"),
    Row("A plane; B plane; C plane ⟂A-B", "A-B|C", "zuv yw", "x", "two pads, then an edge"),
    Row("A plane; B hole ⟂A", "A-B", "xyzuv", "w", "face and bore at once: all but the turn"),
    Row("A plane; B hole ⟂A; C hole ⟂A", "A|B-C", "zuv xyw", "", "two dowel holes at once hold the plate on its face"),
    Row("A plane; B shaft ⌰B-C; C shaft ⌰B-C", "A|B-C", "zuv xy", "w", "a face, then a common axis"),
]
PATTERNS = [
    Row("A plane; B 4 holes at A", "A|B", "zuv xyw", "", "holes in a face hold all that the face leaves"),
    Row("A plane; B 2 holes at A", "A|B", "zuv xyw", "", "two holes are enough for that"),
    Row("A plane; D 4 holes at A; B hole ⟂A", "A|D|B", "zuv xyw -", "", "after face and pattern nothing is left"),
    Row("A plane; D 4 holes at A; B plane ⟂A", "A|D|B", "zuv xyw -", "", "an edge after the pattern adds nothing"),
    Row("A 2 holes at", "A", "xyuvw", "z", "two parallel axes leave the slide along them"),
    Row("A 2 holes at; B plane ⟂A", "A|B", "xyuvw z", "", "the face stops the slide"),
    Row("A 3 threads at; B plane ⟂A", "A|B", "xyuvw z", "", "tapped holes hold as holes do"),
    Row("A shaft; B 6 holes at A", "A|B", "xyuv w", "z", "a bolt circle about the axis stops the turn"),
    Row("A plane; B hole ⟂A; C 6 holes at A|B", "A|B|C", "zuv xy w", "", "the pattern clocks about the bore"),
    Row("A 2 spheres at", "A", "xyzuv", "w", "two balls at once leave the turn about their line"),
    Row("A 3 spheres at", "A", "xyzuvw", "", "three balls at once hold everything"),
    Row("A plane; B 4 slots at A", "A|B", "zuv xyw", "", "slots around a centre hold the plate on its face"),
    Row("A plane; B 2 slots at A", "A|B", "zuv yw", "x", "two slots in line are one centre plane"),
    Row("A plane; B 2 holes at A INDIVIDUALLY", "A|B", "zuv xy", "w", "each hole for itself is an axis"),
]
TARGETS = [
    Row("A targets A1, A2, A3; B targets B1, B2; C targets C1", "A|B|C", "zuv yw x", "", "three, two and one points"),
    Row("A targets A1, A2, A3; B targets B1; C targets C1, C2", "A|B|C", "zuv y xw", "", "the turn falls to the third"),
    Row("A targets A1, A2 LINE", "A", "zuv", "xyw", "a point and a line touch like three points"),
    Row("A targets A1, A2", "A", "zv", "xyuw", "two points leave a rocking about their line"),
    Row("A targets A1 ⌀10, A2 ⌀10, A3 ⌀10; B plane ⟂A", "A|B", "zuv yw", "x", "areas count as points"),
]
MODIFIED = [
    Row("A plane; B hole ⟂A; C slot at A|B", "A|B Ⓜ|C Ⓜ", "zuv xy w", "", "a boundary changes the fit, not the freedoms"),
    Row("A plane; B hole ⟂A; C hole ⟂A", "A|B|C ▷", "zuv xy w", "", "the counterpart may travel, and still clocks"),
    Row("A plane; B plane ⟂A; C plane ⟂A|B", "A|B ><|C", "zuv w x", "y", "orientation only: no slide is taken"),
    Row("A shaft; B plane ⟂A", "A ><|B", "uv z", "xyw", "an axis for orientation alone stops two tilts"),
    Row("A sphere; B plane", "B|A ><", "zuv -", "xyw", "a point has no orientation to give"),
    Row("A plane; B hole ⟂A; C slot at A|B", "A[z,u,v]|B[x,y]|C[w]", "zuv xy w", "", "named as they would be anyway"),
    Row("A plane; B hole ⟂A", "A[u,v]|B[x,y]", "uv xy", "zw", "named freedoms only: the height is left open"),
    Row("A plane; B plane ⟂A", "A[x,v,w]|B", "xvw zu", "y", "the names say that the face is square to x"),
]
ROWS = [*PLANES, *PLANE_AND_AXIS, *AXIS_FIRST, *POINTS, *COMMON, *PATTERNS, *TARGETS, *MODIFIED]


@pytest.mark.parametrize("row", ROWS, ids=lambda row: f"{row.features} in {row.frame}")
def test_each_reference_holds_what_it_holds_by_hand(row: Row) -> None:
    scheme, segment = drawing(row.features, row.frame)
    taken = [each.new for each in held(segment, scheme)]
    assert [None if new is None else "".join(new) or "-" for new in taken] == row.holds.split(), row.reason
    assert "".join(left(segment, scheme) or ()) == row.free, row.reason


def test_the_table_has_the_standards_subjects() -> None:
    assert len({(row.features, row.frame) for row in ROWS}) == len(ROWS) >= 60


# A reference is called redundant only if it holds nothing wherever the features may stand.
REDUNDANT = [
    ("A plane; B plane ∥A", "A|B", "B"),
    ("A plane; B plane ⟂A; C plane ∥B", "A|B|C", "C"),
    ("A plane; B plane ⟂A; C plane ∥A", "A|B|C", "C"),
    ("A plane; D 4 holes at A; B hole ⟂A", "A|D|B", "B"),
    ("A plane; D 4 holes at A; B contour", "A|D|B", "B"),
    ("A plane; B hole ⟂A; D 6 holes at A|B", "A|D|B", "B"),
    ("A shaft; B shaft ⌰A", "A|B", "B"),
    ("A shaft ⌰A-B; B shaft ⌰A-B; C shaft ⌰A-B", "A-B|C", "C"),
    ("A shaft; B plane ⟂A; C plane ∥B", "A|B|C", "C"),
    ("A cone; B plane ⟂A", "A|B", "B"),
    ("A 2 holes at; B plane ⟂A; C plane", "A|B|C", ""),  # the two may be in line, as in a hinge
    ("A 3 spheres at; B plane", "A|B", "B"),
    ("A plane; B plane ⟂A; C plane ⟂A|B", "A|B|C", ""),
    ("A plane; B plane; C plane", "A|B|C", ""),
    ("A plane; B hole; C hole", "A|B|C", ""),
    ("A shaft; B hole", "A|B", ""),
    ("A shaft; B plane; C plane", "A|B|C", ""),
    ("A plane; B hole ⟂A; C 6 holes at A|B", "A|B|C", ""),
    ("A plane; B contour; C plane", "A|B|C", ""),
    ("A sphere; B sphere; C sphere", "A|B|C", ""),
    ("A plane; B plane ∥A", "A[u,v]|B[z]", ""),
    ("A plane; B plane ⟂A; C plane ⟂A; D 4 holes at A|B|C", "A|D|B", ""),
]


@pytest.mark.parametrize(("features", "frame", "letters"), REDUNDANT, ids=lambda text: text or "none")
def test_a_reference_is_redundant_only_in_every_arrangement(features: str, frame: str, letters: str) -> None:
    scheme, segment = drawing(features, frame)
    assert "".join(ref.name for ref in redundant(segment, scheme)) == letters


def test_a_feature_of_unknown_kind_silences_what_follows_it() -> None:
    scheme, segment = drawing("A plane; B contour; C plane ⟂A", "A|B|C")
    assert [each.new is None for each in held(segment, scheme)] == [False, True, True]
    assert left(segment, scheme) is None
