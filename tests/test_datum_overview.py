"""The datum overview as printed, whole, at 80 columns."""

import io

from calloutlint.facts.datums.scheme import scheme_of
from calloutlint.model.drawing import Package
from calloutlint.reading.sheet import parse_sheet
from calloutlint.report.datum_data import datum_overview
from calloutlint.report.datums import show_datums
from calloutlint.report.screen import Screen

SHEET = """\
drawing:    SG-2207
revision:   B
title:      Sluice gate actuator cover
standard:   ASME Y14.5-2018
units:      inch

1)  SURFACE
    ⏥ | .003
    DATUM A
2)  ⌀1.5000 +.0010 -.0000 THRU
    ⟂ | ⌀.002 | A
    DATUM B
3)  SLOT .250 ±.003
    ⌖ | .006 Ⓜ | A | B
    DATUM C
4)  4X ⌀.281 +.007 -.002 THRU
    ⌖ | ⌀.014 Ⓜ | A | B Ⓜ | C Ⓜ
    DATUM D
5)  ⌓ | .020 | A | B Ⓜ | C Ⓜ
6)  E1
    E2
7)  2X ⌀.190 ±.003 THRU
    ⌖ | ⌀.010 | A | F
"""

PLAIN = """\
--------------------------------------------------------------------------------
 SG-2207  revision B  Sluice gate actuator cover
 ASME Y14.5-2018, inch, 7 callouts, from gate.txt
--------------------------------------------------------------------------------

 Datum features
   A  plane              (1)  FLAT .003
   B  axis               (2)  size, PERP DIA .002 to A
   C  centre plane       (3)  size, POS .006 (M) to A B
   D  pattern of 4 axes  (4)  size, POS DIA .014 (M) to A B(M) C(M)
   E  plane              (6)  E1 E2
   F  defined nowhere

 Frames in force
                    x  y  z    u  v  w
   A                .  .  A    A  A  .  (2); may still slide in two directions
                                        and turn about one axis
   A | B            B  B  A    A  A  .  (3); may still turn about one axis
   A | B(M) | C(M)  B  B  A    A  A  C  (4, 5) together
   A | F            ?  ?  A    A  A  ?  (7); what is left is not known

 Assumed: C taken in its usual direction to A and B.

 x y z: slides along the axes; u v w: turns about them. A letter is the datum
 that takes the freedom, a dot is one that stays. The first datum stands along
 z.
"""


def shown(text: str, *, plain: bool) -> str:
    stream = io.TextIOWrapper(io.BytesIO(), encoding="utf-8", newline="")
    show_datums(Package("gate", (parse_sheet(text, "gate.txt"),)), Screen(stream, plain=plain, width=80))
    stream.seek(0)
    return stream.read()


def test_overview_in_plain_text() -> None:
    assert shown(SHEET, plain=True) == PLAIN


def test_overview_of_a_drawing_without_datums() -> None:
    sheet = "drawing: P-1\nunits: mm\n\n1) ⌀5 ±0.1 THRU\n"
    assert "The drawing has no datum features, and no frame refers to any." in shown(sheet, plain=True)


def test_no_line_is_wider_than_the_screen() -> None:
    for plain in (True, False):
        assert max(map(len, shown(SHEET, plain=plain).splitlines())) <= 80


def test_overview_as_data() -> None:
    overview = datum_overview(scheme_of(parse_sheet(SHEET, "gate.txt")))
    frame = overview.frames[2]
    assert frame.takers == ("B", "B", "A", "A", "A", "C")
    assert (frame.balloons, frame.tied, frame.left, frame.idle) == (("4", "5"), ("4", "5"), "", ())
    assert overview.frames[3].takers == (None, None, "A", "A", "A", None)


def test_a_reference_that_takes_nothing_is_said() -> None:
    sheet = SHEET.replace("| A | B Ⓜ | C Ⓜ\n    DATUM D", "| A\n    DATUM D").replace("A | F", "A | D | B")
    assert "(7); B takes nothing" in shown(sheet, plain=True)
