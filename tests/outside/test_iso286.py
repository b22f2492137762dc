"""Limits and fits against published values of ISO 286-1:2010 and ISO 286-2:2010 (entered from memory)."""

import csv
import re
from decimal import Decimal
from pathlib import Path

import pytest

from calloutlint.model.size import FitCode
from calloutlint.trade import iso286
from calloutlint.trade.tables import read_table

_VALUES = Path(__file__).with_name("values")
_MICROMETRE = Decimal("0.001")


def published(name: str) -> list[dict[str, str]]:
    lines = (_VALUES / name).read_text(encoding="utf-8").splitlines()
    return list(csv.DictReader(line for line in lines if not line.startswith("#")))


def code(text: str) -> FitCode:
    match = re.fullmatch(r"([A-Za-z]+)(\d+)", text)
    assert match
    return FitCode(match[1], match[2])


_DEVIATIONS = published("iso_286_deviations.csv")


@pytest.mark.parametrize("row", _DEVIATIONS, ids=lambda row: f"{row['nominal']}-{row['class']}")
def test_limit_deviations_are_the_published_ones(row: dict[str, str]) -> None:
    found = iso286.limits(Decimal(row["nominal"]), code(row["class"]))
    assert found is not None
    for printed, computed in ((row["upper"], found.upper), (row["lower"], found.lower)):
        assert not printed or computed == Decimal(printed) * _MICROMETRE


_GRADES = published("iso_286_grades.csv")


@pytest.mark.parametrize("row", _GRADES, ids=lambda row: f"IT{row['grade']}-{row['to']}")
def test_standard_tolerance_holds_through_its_range(row: dict[str, str]) -> None:
    nominals = (Decimal(row["over"]) + Decimal("1.001"), Decimal(row["to"]))
    assert {iso286.tolerance(n, row["grade"]) for n in nominals} == {Decimal(row["value"]) * _MICROMETRE}


@pytest.mark.parametrize(
    ("nominal", "class_", "why"),
    [
        ("3150.1", "H7", "ISO 286 ends at 3150 mm"),
        ("0", "H7", "no nominal size"),
        ("-5", "H7", "no nominal size"),
        ("1", "a11", "a and b are not used to 1 mm"),
        ("1", "B12", "a and b are not used to 1 mm"),
        ("1", "h14", "IT14 to IT18 are not used to 1 mm"),
        ("1", "JS15", "IT14 to IT18 are not used to 1 mm"),
        ("1", "N9", "N coarser than IT8 is not used to 1 mm"),
        ("25", "H19", "there is no IT19"),
        ("25", "h02", "there is no IT02"),
        ("24", "t6", "t begins over 24 mm"),
        ("20", "T7", "t begins over 24 mm"),
        ("14", "v6", "v begins over 14 mm"),
        ("18", "y6", "y begins over 18 mm"),
        ("60", "cd8", "cd, ef, fg end at 50 mm"),
        ("501", "a11", "a, b, c end at 500 mm"),
        ("501", "C11", "a, b, c end at 500 mm"),
        ("501", "x7", "v to zc end at 500 mm"),
        ("600", "ZC9", "v to zc end at 500 mm"),
        ("600", "j6", "j ends at 500 mm"),
        ("600", "h01", "IT01 and IT0 end at 500 mm"),
        ("25", "j4", "j is j5 to j8 only"),
        ("25", "j8", "j8 is tabulated to 3 mm only"),
        ("25", "J5", "J is J6 to J8 only"),
        ("25", "J9", "J is J6 to J8 only"),
        ("25", "K9", "K coarser than IT8 is tabulated to 3 mm only"),
        ("25", "i6", "no such letter"),
        ("25", "L7", "no such letter"),
        ("25", "o6", "no such letter"),
        ("25", "q6", "no such letter"),
        ("25", "w6", "no such letter"),
        ("25", "Js7", "one class is not both a hole and a shaft"),
        ("25", "to6", "no such letters"),
    ],
)
def test_classes_that_iso_286_does_not_have(nominal: str, class_: str, why: str) -> None:
    assert not iso286.exists(Decimal(nominal), code(class_)), why


@pytest.mark.parametrize(
    ("nominal", "class_"),
    [
        *(("1", "h13"), ("0.8", "N8"), ("0.5", "H7"), ("3", "K10"), ("3", "j8"), ("14.1", "v6")),
        ("18.1", "y6"),
        *(("24.1", "t6"), ("50", "fg6"), ("500", "a11"), ("500", "zc8"), ("500", "h01"), ("3150", "U8")),
        ("25", "a5"),  # ISO 286-1 lets any letter go with any grade, printed in ISO 286-2 or not
    ],
)
def test_classes_at_the_edge_of_what_iso_286_has(nominal: str, class_: str) -> None:
    assert iso286.exists(Decimal(nominal), code(class_))


def test_ranges_are_over_and_up_to() -> None:
    """ISO 286-1: a range holds its upper end; 18 mm is 10-18, the next range begins just above."""
    assert iso286.tolerance(Decimal(18), "7") == Decimal("0.018")
    assert iso286.tolerance(Decimal("18.001"), "7") == Decimal("0.021")


DELTA = """
    3-6:      1 1.5 1 3 4 6
    6-10:     1 1.5 2 3 6 7
    10-18:    1 2 3 3 7 9
    18-30:    1.5 2 3 4 8 12
    30-50:    1.5 3 4 5 9 14
    50-80:    2 3 5 6 11 16
    80-120:   2 4 5 7 13 19
    120-180:  3 4 6 7 15 23
    180-250:  3 4 6 9 17 26
    250-315:  4 4 7 9 20 29
    315-400:  4 5 7 11 21 32
    400-500:  5 5 7 13 23 34
"""


@pytest.mark.parametrize("line", DELTA.strip().splitlines(), ids=lambda line: line.split(":")[0].strip())
def test_tight_holes_carry_the_printed_delta(line: str) -> None:
    """ISO 286-1:2010 Table 3 prints Δ for IT3 to IT8; N holes are the shaft n with its sign changed, plus Δ."""
    span, printed = line.strip().split(":")
    top = Decimal(span.partition("-")[2])
    for grade, delta in zip(range(3, 9), printed.split(), strict=True):
        hole = iso286.limits(top, FitCode("N", str(grade)))
        shaft = iso286.limits(top, FitCode("n", str(grade)))
        assert hole
        assert shaft
        assert hole.upper + shaft.lower == Decimal(delta) * _MICROMETRE


@pytest.mark.parametrize("letters", ["a", "c", "d", "e", "f", "g", "h", "p", "r", "s", "u", "x", "z", "zc"])
def test_a_coarse_hole_mirrors_the_shaft_of_its_letter(letters: str) -> None:
    """ISO 286-1: where Δ has no part, a hole has the shaft's deviation with the sign changed."""
    hole = iso286.limits(Decimal(90), FitCode(letters.upper(), "9"))
    shaft = iso286.limits(Decimal(90), FitCode(letters, "9"))
    assert hole
    assert shaft
    assert (hole.upper, hole.lower) == (-shaft.lower, -shaft.upper)


def test_every_class_is_as_wide_as_its_grade() -> None:
    for row in read_table("iso286_shafts"):
        nominal = Decimal(row["to"])
        for letters in (*list(row)[2:], "js"):
            for grade in range(4, 12):
                for text in (letters, letters.upper()):
                    found = iso286.limits(nominal, FitCode(text, str(grade)))
                    assert found is None or found.upper - found.lower == iso286.tolerance(nominal, str(grade))


def test_odd_js_has_the_rounding_of_the_1988_edition_too() -> None:
    """ISO 286-1:1988 rounds js7 to js11 of an odd tolerance down to the even one: 25 js7 is ±10.5 or ±10 µm."""
    pairs = iso286.printed_limits(Decimal(25), FitCode("js", "7"))
    assert [pair.upper for pair in pairs] == [Decimal("0.0105"), Decimal("0.010")]
    assert [pair.lower for pair in pairs] == [Decimal("-0.0105"), Decimal("-0.010")]
    assert len(iso286.printed_limits(Decimal(25), FitCode("js", "6"))) == 1
    assert len(iso286.printed_limits(Decimal(25), FitCode("H", "7"))) == 1
    assert iso286.printed_limits(Decimal(25), FitCode("j", "9")) == ()
