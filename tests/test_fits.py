"""Kinds of fit by ISO 286-1, from published limits of ISO 286-2 (from memory)."""

from decimal import Decimal

import pytest

from calloutlint.facts.formulas.fits import FitKind, coded_fit, fit, states_class
from calloutlint.model.size import Deviations, FitCode, Limits, PlusMinus
from calloutlint.model.values import Value
from calloutlint.trade.iso286 import LimitDeviations
from calloutlint.units import Unit

D = Decimal


@pytest.mark.parametrize(
    ("nominal", "hole", "shaft", "kind", "least", "greatest"),
    [
        ("25", ("H", "7"), ("g", "6"), FitKind.CLEARANCE, "0.007", "0.041"),
        ("25", ("H", "7"), ("h", "6"), FitKind.CLEARANCE, "0", "0.034"),
        ("25", ("H", "7"), ("k", "6"), FitKind.TRANSITION, "-0.015", "0.019"),
        ("25", ("H", "7"), ("n", "6"), FitKind.TRANSITION, "-0.028", "0.006"),
        ("25", ("H", "7"), ("p", "6"), FitKind.INTERFERENCE, "-0.035", "-0.001"),
        ("25", ("P", "7"), ("h", "6"), FitKind.INTERFERENCE, "-0.035", "-0.001"),
        ("25", ("H", "11"), ("c", "11"), FitKind.CLEARANCE, "0.110", "0.370"),
    ],
)
def test_preferred_fits_are_what_they_are_called(
    nominal: str, hole: tuple[str, str], shaft: tuple[str, str], kind: FitKind, least: str, greatest: str
) -> None:
    """The preferred fits of ISO 286-1 and ASME B4.2 at 25 mm."""
    found = coded_fit(D(nominal), FitCode(*hole), FitCode(*shaft))
    assert found
    assert (found.kind, found.least_clearance, found.greatest_clearance) == (kind, D(least), D(greatest))
    assert (found.greatest_interference, found.least_interference) == (-D(least), -D(greatest))


@pytest.mark.parametrize(
    ("hole", "shaft", "kind"),
    [
        (("1.0000", "1.0005"), ("0.9990", "1.0000"), FitKind.CLEARANCE),  # line to line at the tightest
        (("1.0000", "1.0005"), ("0.9990", "1.0001"), FitKind.TRANSITION),
        (("1.0000", "1.0005"), ("1.0005", "1.0010"), FitKind.INTERFERENCE),  # line to line at the loosest
        (("1.0000", "1.0005"), ("1.0004", "1.0010"), FitKind.TRANSITION),
        (("1", "1"), ("1", "1"), FitKind.CLEARANCE),
    ],
)
def test_line_to_line_belongs_to_the_kind_it_bounds(
    hole: tuple[str, str], shaft: tuple[str, str], kind: FitKind
) -> None:
    """ISO 286-1: clearance may be nil at the least, interference too."""
    limits = [LimitDeviations(upper=D(upper), lower=D(lower)) for lower, upper in (hole, shaft)]
    assert fit(*limits).kind is kind


def test_a_fit_that_iso_286_lacks_is_unknown_and_a_swapped_one_refused() -> None:
    assert coded_fit(D(20), FitCode("H", "7"), FitCode("t", "6")) is None
    with pytest.raises(ValueError, match="not g6/H7"):
        coded_fit(D(20), FitCode("g", "6"), FitCode("H", "7"))


def value(text: str, unit: Unit | None = Unit.MM) -> Value:
    return Value(text, D(text), unit)


@pytest.mark.parametrize(
    ("code", "written", "right"),
    [
        (("H", "7"), Deviations(value("+0.021"), value("0")), True),
        (("H", "7"), Deviations(value("+0.020"), value("0")), False),
        (("H", "7"), Deviations(value("+0.02"), value("0")), False),  # rounded too far
        (("H", "11"), Deviations(value("+0.13"), value("0")), True),
        (("H", "7"), Deviations(value("0"), value("+0.021")), True),  # the order is another matter
        (("g", "6"), Limits(value("24.980"), value("24.993")), True),
        (("g", "6"), Limits(value("24.993"), value("24.98")), True),
        (("g", "6"), Limits(value("24.980"), value("24.994")), False),
        (("js", "7"), PlusMinus(value("0.0105")), True),
        (("js", "7"), PlusMinus(value("0.010")), True),
        (("js", "7"), PlusMinus(value("0.0100")), True),
        (("js", "7"), PlusMinus(value("0.0104")), False),
        (("js", "7"), PlusMinus(value("0.012")), False),
        (("t", "19"), PlusMinus(value("0.010")), None),
    ],
)
def test_limits_beside_a_class(
    code: tuple[str, str], written: PlusMinus | Deviations | Limits, right: bool | None
) -> None:
    """Limits of ISO 286-2 at 25 mm (from memory), written as drafters do."""
    assert states_class(value("25"), FitCode(*code), written) is right
    assert states_class(value("25", None), FitCode(*code), written) is right


@pytest.mark.parametrize(
    ("upper", "lower", "right"),
    [("+.0008", "-.0000", True), ("+.0009", "-.0000", False), ("+.00083", "0", True), ("+.001", "0", False)],
)
def test_limits_of_a_class_on_an_inch_drawing(upper: str, lower: str, right: bool) -> None:
    """25.4 H7 is +0.021 mm, which is .00083 in."""
    written = Deviations(value(upper, Unit.INCH), value(lower, Unit.INCH))
    assert states_class(value("1.0000", Unit.INCH), FitCode("H", "7"), written) is right
