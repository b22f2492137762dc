"""Boundaries, datum shift and coordinates as facts that a house rule can ask.

The numbers are worked by hand with the definitions of ASME Y14.5: virtual condition of a hole at MMC is MMC
less tolerance, of a shaft MMC plus tolerance; resultant condition of a hole LMC + tolerance + bonus.
"""

from decimal import Decimal

import pytest

from calloutlint.facts.views.frame import FrameView
from calloutlint.facts.views.subjects import subjects
from calloutlint.model.drawing import Package
from calloutlint.reading.sheet import parse_sheet

SHEET = """\
standard: ASME Y14.5-2018
units: inch
1) ⏥ | .003
   DATUM A
2) ⌀1.500 +.002 -.000 THRU
   ⟂ | ⌀.003 Ⓜ | A
   DATUM B
3) 4X ⌀.281 +.007 -.002 THRU
   ⌖ | ⌀.014 Ⓜ | A | B Ⓜ
4) SHAFT ⌀.500 +.000 -.004
   ⟂ | ⌀.002 Ⓜ | A
5) ⌀.281 +.007 -.002 THRU
   ⌖ | ⌀.014 | A | B
6) ⌀.281 +.007 -.002 THRU
   ⌖ | ⌀.014 Ⓛ | A | B
7) ⌀.250 ±.002
   ⌖ | ⌀.010 Ⓜ | A | B
8) ⌓ | .020 | A
"""


def frame(balloon: str) -> FrameView:
    package = subjects(Package("one", (parse_sheet(SHEET, "one.txt"),)))
    callout = next(view for view in package.drawings[0].callouts if view.balloon == balloon)
    return callout.frames[0]


@pytest.mark.parametrize(
    ("balloon", "virtual", "resultant", "inner", "outer"),
    [
        ("3", ".265", ".311", ".265", ".311"),
        ("4", ".502", ".490", ".490", ".502"),
        ("5", None, None, ".265", ".302"),
        ("6", ".302", ".256", ".256", ".302"),
    ],
)
def test_boundaries_are_facts_of_a_frame(
    balloon: str, virtual: str | None, resultant: str | None, inner: str, outer: str
) -> None:
    boundary = frame(balloon).boundary
    known = (boundary.virtual_condition, boundary.resultant_condition, boundary.inner, boundary.outer)
    assert known == tuple(Decimal(text) if text else None for text in (virtual, resultant, inner, outer))


@pytest.mark.parametrize("balloon", ["7", "8"])
def test_a_boundary_is_unknown_where_the_side_or_the_size_is(balloon: str) -> None:
    boundary = frame(balloon).boundary
    assert boundary.virtual_condition is None
    assert boundary.inner is None


def test_datum_shift_is_a_fact_of_a_reference() -> None:
    """B at LMC 1.502, its MMB 1.500 − .003 = 1.497: the part may shift by .005."""
    flat, bore = frame("3").datums
    assert flat.shift is None
    assert bore.shift == Decimal(".005")


def test_a_zone_may_be_read_as_coordinates() -> None:
    """A ⌀.014 zone holds a square of ±.014 / (2√2) = ±.00495."""
    amount = frame("3").tolerance.as_coordinates
    assert amount is not None
    assert round(amount, 5) == Decimal(".00495")
    assert frame("8").tolerance.as_coordinates is None
