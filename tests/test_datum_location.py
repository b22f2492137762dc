"""Positions that only orient, references with named freedoms, freedoms in plain words."""

import pytest

from calloutlint.facts.datums.location import positions_have_datums, positions_of, unlocated
from calloutlint.facts.datums.motion import Freedom
from calloutlint.facts.datums.named import named_faults
from calloutlint.facts.datums.scheme import DatumScheme, scheme_of
from calloutlint.facts.datums.words import in_words, letters
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
4) S⌀12 ±0.1
   ⌓ | 0.1
   DATUM D
"""


def scheme(*callouts: str, standard: str = "ASME Y14.5-2018") -> DatumScheme:
    """A drawing with datum features A to D, and callouts from balloon 5 on, `;` between their lines."""
    body = "".join(
        f"{number}) " + text.replace("; ", "\n") + "\n" for number, text in enumerate(callouts, start=5)
    )
    return scheme_of(parse_sheet(f"drawing: T-1\nstandard: {standard}\nunits: mm\n{DATUMS}{body}", "sheet.txt"))


@pytest.mark.parametrize(
    ("callout", "found"),
    [
        ("⌀5 THRU; ⌖ | ⌀0.2", "no datum"),
        ("⌀5 THRU; ⌖ | ⌀0.2 | A", "one plane"),
        ("⌀5 THRU; ⌖ | ⌀0.2 | C", "one plane"),
        ("M6x1-6H; ⌖ | ⌀0.2 | A", "one plane"),
        ("⌀5 THRU; ⌖ | ⌀0.2 | A | C", None),
        ("⌀5 THRU; ⌖ | ⌀0.2 | B", None),
        ("⌀5 THRU; ⌖ | ⌀0.2 | A | B", None),
        ("4X ⌀5 THRU; ⌖ | ⌀0.2 | A", None),
        ("4X ⌀5 THRU; ⌖ | ⌀0.2", None),
        ("⌀5 THRU TYP; ⌖ | ⌀0.2 | A", None),
        ("SLOT 5 ±0.1; ⌖ | 0.2 | A", None),
        ("⌀5 THRU; ⌖ | ⌀0.2 | A | B | C; ⌖ | ⌀0.1 | A", None),
        ("⌀5 THRU; ⌖ | ⌀0.2 | A | B | C; | ⌀0.1 | A", None),
        ("⌀5 THRU; ⌀8 THRU; ⌖ | ⌀0.2", None),
        ("⌀5 THRU; ⟂ | ⌀0.2 | A", None),
        ("⌀5 THRU; ⌖ | ⌀0.2 | E", None),
    ],
)
def test_a_single_feature_that_is_only_oriented(callout: str, found: str | None) -> None:
    drawing = scheme(callout)
    reasons = {unlocated(use, drawing) for use in positions_of(drawing.callouts[-1])} - {None}
    assert reasons == ({found} if found else set())


def test_holes_tied_by_a_simultaneous_requirement_locate_each_other() -> None:
    """ASME Y14.5: positions to the same frame are one pattern; ISO 5458: only with SIM."""
    holes = ["⌀5 THRU; ⌖ | ⌀0.2 | A", "⌀8 THRU; ⌖ | ⌀0.2 | A"]
    for standard, expected in (("ASME Y14.5-2018", None), ("ISO 1101", "one plane")):
        drawing = scheme(*holes, standard=standard)
        assert [unlocated(positions_of(c)[0], drawing) for c in drawing.callouts[-2:]] == [expected] * 2


@pytest.mark.parametrize(
    ("callout", "found"),
    [
        ("⌀5 THRU; ⌖ | ⌀0.2", False),
        ("⌀5 THRU; ⌖ | ⌀0.2 | A", True),
        ("⌀5 THRU; ⌖ | ⌀0.2 | A; ⌖ | ⌀0.1", True),
        ("⌀5 THRU; ⟂ | ⌀0.2 | A", None),
        ("⌀5 THRU", None),
    ],
)
def test_whether_positions_refer_to_datums(callout: str, found: bool | None) -> None:
    assert positions_have_datums(scheme(callout).callouts[-1]) is found


@pytest.mark.parametrize(
    ("frame", "faults"),
    [
        ("A[z,u,v] | B[x,y] | C[w]", []),
        ("A[z,u,v] | B[x,y,z] | C[w]", [("B", "z", "")]),
        ("A[x,y,z] | B[u,v] | C[w]", [("A", "", "xy")]),
        ("A[x,v,w]", []),
        ("A[y,u,w]", []),
        ("A[x,u,v]", [("A", "", "x")]),
        ("A[u,v]", []),
        ("A[z,z]", [("A", "z", "")]),
        ("B[x,y,u,v]", []),
        ("B[y,z,v,w]", []),
        ("B[x,y,z]", [("B", "", "z")]),
        ("B[z,w]", []),
        ("B[x,u]", []),
        ("B[x,y,u,v] | A[z]", []),
        ("B[x,y,u,v] | A[w]", [("A", "", "w")]),
        ("D[x,y,z]", []),
        ("D[x,y,z,u]", [("D", "", "u")]),
        ("D[x,y,z] | B[u,v] | C[w]", []),
        ("A[z,u,v] | B[x,y] | D[w]", []),
        ("A[z,u,v] | C[x,w] | B[y]", []),
        ("E[x,y,z,u,v,w]", []),
        ("A | B[x,y]", []),
    ],
)
def test_named_freedoms_within_what_the_datum_holds(frame: str, faults: list[tuple[str, str, str]]) -> None:
    """ASME Y14.5, customized frames: u turns about x, v about y, w about z, whichever axis is which."""
    drawing = scheme(f"4X ⌀5 THRU; ⌖ | ⌀0.2 | {frame}")
    segment = next(drawing.callouts[-1].segments)
    found = [(f.ref.name, "".join(f.repeated), "".join(f.beyond)) for f in named_faults(segment, drawing)]
    assert found == faults


@pytest.mark.parametrize(
    ("freedoms", "words"),
    [
        ("", ""),
        ("w", "turn about one axis"),
        ("xyw", "slide in two directions and turn about one axis"),
        ("xyz", "slide in every direction"),
        ("xuv", "slide in one direction and turn about two axes"),
        ("xyzuvw", "slide in every direction and turn about every axis"),
    ],
)
def test_freedoms_in_words(freedoms: str, words: str) -> None:
    assert in_words([Freedom(letter) for letter in freedoms]) == words


def test_letters_stand_in_their_usual_order() -> None:
    assert letters({Freedom.W, Freedom.X}) == "x w"
