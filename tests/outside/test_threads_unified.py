"""Unified threads against published values of ASME B1.1; each row of the CSV says where it comes from."""

import csv
import re
from decimal import Decimal
from pathlib import Path

import pytest

from calloutlint.trade import unified, unified_series
from calloutlint.trade.inches import inches, named_size
from calloutlint.trade.thread_form import ThreadForm, ThreadLimits

_VALUES = Path(__file__).with_name("values")
_FORM = re.compile(r"thread=(?P<size>#?[\d/ ]+)-(?P<tpi>\d+)(?: (?P<series>UN\w*))?(?:; class=(?P<class>\w+))?")
_CHART_DRILLS_ABOVE_2B = {
    # The usual chart drill of these two lies less than .001 above the largest minor diameter of class 2B.
    "9/16-18": ("0.51562", "0.515"),
    "5/8-18": ("0.57812", "0.578"),
}


def published(name: str) -> list[dict[str, str]]:
    lines = (_VALUES / name).read_text(encoding="utf-8").splitlines()
    return list(csv.DictReader(line for line in lines if not line.startswith("# ")))


def form_and_class(inputs: str) -> tuple[ThreadForm, str]:
    match = _FORM.fullmatch(inputs)
    assert match, inputs
    bare_number = match["size"].isdecimal() and match["size"] != "1"
    size = f"#{match['size']}" if bare_number else match["size"]
    return unified.thread(size, Decimal(match["tpi"]), match["series"] or ""), match["class"] or ""


def limit(limits: ThreadLimits | None, quantity: str) -> Decimal | None:
    """`external_major_diameter_max` of the limits."""
    assert limits is not None
    side, diameter, _, end = quantity.split("_")
    assert limits.internal is (side == "internal")
    value: Decimal | None = getattr(limits, f"{diameter}_{end}")
    return value


def computed(quantity: str, inputs: str) -> Decimal | None:
    if quantity == "basic_major_diameter":
        size = named_size(inputs.removeprefix("size="))
        return size.diameter if size else None
    if quantity == "threads_per_inch":
        series, size_name = (part.split("=")[1] for part in inputs.split("; "))
        return unified_series.only_tpi(unified.thread(size_name, Decimal(1)).diameter, series)
    form, class_ = form_and_class(inputs)
    if quantity == "basic_pitch_diameter":
        return form.pitch_diameter.quantize(Decimal("0.0001"))
    return limit(unified.limits(form, class_), quantity)


@pytest.mark.parametrize(
    "row", published("unified_threads.csv"), ids=lambda row: f"{row['quantity']}-{row['inputs']}"
)
def test_published_value(row: dict[str, str]) -> None:
    assert computed(row["quantity"], row["inputs"]) == Decimal(row["value"])


@pytest.mark.parametrize(
    "row",
    [row for row in published("package_differences.csv") if "UN" in row["inputs"]],
    ids=lambda row: row["inputs"],
)
def test_where_the_2019_edition_prints_another_last_place(row: dict[str, str]) -> None:
    assert computed(row["quantity"], row["inputs"]) == Decimal(row["published"]) != Decimal(row["value"])
    assert row["reason"]


@pytest.mark.parametrize(
    ("inputs", "expected"),
    [
        # Largest and smallest major, pitch; from memory of ASME B1.1-2003, Table 2.
        ("thread=1/4-20 UNC; class=1A", ".2489 .2367 .2164 .2108"),
        ("thread=1/4-20 UNC; class=2A", ".2489 .2408 .2164 .2127"),
        ("thread=1/4-20 UNC; class=3A", ".2500 .2419 .2175 .2147"),
        ("thread=3/8-16 UNC; class=2A", ".3737 .3643 .3331 .3287"),
        ("thread=1/2-13 UNC; class=2A", ".4985 .4876 .4485 .4435"),
        ("thread=5/8-11 UNC; class=2A", ".6234 .6113 .5644 .5589"),
        ("thread=1-8 UNC; class=2A", ".9980 .9830 .9168 .9100"),
        ("thread=#10-32 UNF; class=2A", ".1891 .1831 .1688 .1658"),
        # The worked example of the standard's formulas, length of engagement 9 pitches.
        ("thread=1/2-28 UNEF; class=2A", ".4989 .4924 .4757 .4720"),
    ],
)
def test_external_limits_as_printed(inputs: str, expected: str) -> None:
    limits = unified.limits(*form_and_class(inputs))
    assert limits is not None
    found = [limits.major_max, limits.major_min, limits.pitch_max, limits.pitch_min]
    assert found == [Decimal(value) for value in expected.split()]


@pytest.mark.parametrize(
    ("inputs", "expected"),
    [
        # Smallest and largest minor, pitch; from memory of ASME B1.1-2003, Table 2.
        ("thread=1/4-20 UNC; class=1B", ".196 .207 .2175 .2248"),
        ("thread=1/4-20 UNC; class=2B", ".196 .207 .2175 .2224"),
        ("thread=1/4-20 UNC; class=3B", ".1960 .2067 .2175 .2211"),
        ("thread=#10-32 UNF; class=2B", ".156 .164 .1697 .1736"),
        ("thread=1/2-28 UNEF; class=2B", ".461 .470 .4768 .4816"),
    ],
)
def test_internal_limits_as_printed(inputs: str, expected: str) -> None:
    limits = unified.limits(*form_and_class(inputs))
    assert limits is not None
    found = [limits.minor_min, limits.minor_max, limits.pitch_min, limits.pitch_max]
    assert found == [Decimal(value) for value in expected.split()]


@pytest.mark.parametrize(
    ("size", "tpi", "series", "smallest"),
    [
        # ASME B1.15: D - 0.97427858 P; the formula and these results are from memory.
        ("#10", "32", "UNJF", ".1596"),
        ("1/4", "28", "UNJF", ".2152"),
        ("3/4", "10", "UNJC", ".6526"),
        ("1", "12", "UNJF", ".9188"),
    ],
)
def test_controlled_root_has_a_larger_minor_diameter(size: str, tpi: str, series: str, smallest: str) -> None:
    limits = unified.limits(unified.thread(size, Decimal(tpi), series), "3B")
    assert limits is not None
    assert limits.minor_min == Decimal(smallest)
    assert limits.minor_max is None


@pytest.mark.parametrize(
    "row",
    [row for row in published("tap_drills.csv") if row["unit"] == "in"],
    ids=lambda row: row["inputs"].split(";")[0],
)
def test_the_usual_tap_drill_lies_within_class_2b(row: dict[str, str]) -> None:
    """The chart is common practice; two of its drills are known to lie a hair above the standard's limit."""
    form, _ = form_and_class(row["inputs"].split(";")[0])
    limits = unified.limits(form, "2B")
    assert limits is not None
    assert limits.minor_min is not None
    assert limits.minor_max is not None
    name = row["inputs"].split(";")[0].removeprefix("thread=")
    if name in _CHART_DRILLS_ABOVE_2B:
        assert (row["value"], str(limits.minor_max)) == _CHART_DRILLS_ABOVE_2B[name]
    else:
        assert limits.minor_min <= inches(row["value"]) <= limits.minor_max
