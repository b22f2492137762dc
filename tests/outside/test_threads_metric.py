"""ISO metric threads against published values; each row of the CSV names its source and provenance."""

import csv
import re
from decimal import Decimal
from pathlib import Path

import pytest

from calloutlint.trade import metric, metric_tolerances
from calloutlint.trade.tables import read_table
from calloutlint.trade.thread_form import ThreadForm

_VALUES = Path(__file__).with_name("values")
_FORM = re.compile(r"thread=M(?P<size>[\d.]+)(?:x(?P<pitch>[\d.]+))?(?:; class=(?P<class>\w+))?")


def published(name: str) -> list[dict[str, str]]:
    lines = (_VALUES / name).read_text(encoding="utf-8").splitlines()
    return list(csv.DictReader(line for line in lines if not line.startswith("# ")))


def form_and_class(inputs: str) -> tuple[ThreadForm, str]:
    match = _FORM.fullmatch(inputs)
    assert match, inputs
    form = metric.thread(Decimal(match["size"]), Decimal(match["pitch"]) if match["pitch"] else None)
    assert form is not None
    return form, match["class"] or ""


def computed(quantity: str, inputs: str) -> Decimal | None:
    form, class_ = form_and_class(inputs)
    if quantity == "coarse_pitch":
        return metric.coarse_pitch(form.diameter)
    if quantity == "basic_pitch_diameter":
        return form.pitch_diameter.quantize(Decimal("0.001"))
    limits = metric.limits(form, class_)
    assert limits is not None
    side, diameter, _, end = quantity.split("_")
    assert limits.internal is (side == "internal")
    value: Decimal | None = getattr(limits, f"{diameter}_{end}")
    return value


def tolerance(row: dict[str, str], grade: int) -> Decimal | None:
    pitch = Decimal(row["pitch"])
    if row["quantity"] == "minor":
        return metric_tolerances.minor(pitch, grade)
    if row["quantity"] == "major":
        return metric_tolerances.major(pitch, grade)
    internal = row["quantity"] == "pitch internal"
    return metric_tolerances.pitch_diameter(Decimal(row["to"]), pitch, grade, internal)


@pytest.mark.parametrize("row", published("metric_threads.csv"), ids=lambda r: f"{r['quantity']}-{r['inputs']}")
def test_published_value(row: dict[str, str]) -> None:
    assert computed(row["quantity"], row["inputs"]) == Decimal(row["value"])


@pytest.mark.parametrize(
    "row",
    [
        row
        for row in published("package_differences.csv")
        if row["inputs"].startswith("thread=M") and "x" in row["inputs"]
    ],
    ids=lambda row: f"{row['quantity']}-{row['inputs']}",
)
def test_where_the_package_differs(row: dict[str, str]) -> None:
    assert computed(row["quantity"], row["inputs"]) == Decimal(row["published"]) != Decimal(row["value"])
    assert row["reason"]


@pytest.mark.parametrize(
    "row",
    [row for row in published("tap_drills.csv") if row["unit"] == "mm"],
    ids=lambda row: row["inputs"],
)
def test_the_drill_of_iso_2306_lies_within_class_6h(row: dict[str, str]) -> None:
    form, _ = form_and_class(row["inputs"].split(";")[0])
    limits = metric.limits(form, "6H")
    assert limits is not None
    assert limits.minor_min is not None
    assert limits.minor_max is not None
    assert limits.minor_min <= Decimal(row["value"]) <= limits.minor_max


@pytest.mark.parametrize(
    "row", published("iso_965_tolerances.csv"), ids=lambda r: f"{r['quantity']}-{r['pitch']}-{r['over']}"
)
def test_tolerances_in_every_grade_as_iso_965_1_prints_them(row: dict[str, str]) -> None:
    """The printed rows, from memory of ISO 965-1 Tables 2 to 5, against the formulas and their rounding."""
    grades = [int(grade) for grade in row["grades"].split()]
    found = [tolerance(row, grade) for grade in grades]
    assert found == [Decimal(value) / 1000 for value in row["micrometres"].split()]


@pytest.mark.parametrize(("letter", "constant"), [("e", 50), ("f", 30), ("g", 15)])
def test_printed_deviations_stay_near_their_formula(letter: str, constant: int) -> None:
    """ISO 965-1: constant + 11 P µm; the printed values are rounded, none by more than a tenth or 2 µm."""
    for row in read_table("metric_deviations"):
        if row[letter]:
            formula = constant + 11 * Decimal(row["pitch"])
            assert abs(Decimal(row[letter]) - formula) <= max(Decimal(2), formula / 10), row


@pytest.mark.parametrize(
    ("inputs", "expected"),
    [
        # Major, pitch, from memory of ISO 965-2 (6g) and of the tolerance tables of ISO 965-1.
        ("thread=M8x1.25; class=6g", "7.972 7.760 7.160 7.042"),
        ("thread=M10x1.5; class=6g", "9.968 9.732 8.994 8.862"),
        ("thread=M12x1.75; class=6g", "11.966 11.701 10.829 10.679"),
        ("thread=M20x2.5; class=6g", "19.958 19.623 18.334 18.164"),
        ("thread=M6x1; class=4g6g", "5.974 5.794 5.324 5.253"),
        ("thread=M6x1; class=4h", "6.000 5.888 5.350 5.279"),
        ("thread=M6x1; class=8g", "5.974 5.694 5.324 5.144"),
    ],
)
def test_external_limits_as_printed(inputs: str, expected: str) -> None:
    limits = metric.limits(*form_and_class(inputs))
    assert limits is not None
    found = [limits.major_max, limits.major_min, limits.pitch_max, limits.pitch_min]
    assert found == [Decimal(value) for value in expected.split()]


@pytest.mark.parametrize(
    ("inputs", "expected"),
    [
        # Minor, pitch, from memory of ISO 965-2 (6H) and of the tolerance tables of ISO 965-1.
        ("thread=M8x1.25; class=6H", "6.647 6.912 7.188 7.348"),
        ("thread=M10x1.5; class=6H", "8.376 8.676 9.026 9.206"),
        ("thread=M20x2.5; class=6H", "17.294 17.744 18.376 18.600"),
        ("thread=M6x1; class=5H", "4.917 5.107 5.350 5.468"),
        ("thread=M6x1; class=7H", "4.917 5.217 5.350 5.540"),
        ("thread=M6x1; class=4H5H", "4.917 5.107 5.350 5.445"),
        ("thread=M6x1; class=6G", "4.943 5.179 5.376 5.526"),
    ],
)
def test_internal_limits_as_printed(inputs: str, expected: str) -> None:
    limits = metric.limits(*form_and_class(inputs))
    assert limits is not None
    found = [limits.minor_min, limits.minor_max, limits.pitch_min, limits.pitch_max]
    assert found == [Decimal(value) for value in expected.split()]
