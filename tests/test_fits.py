"""Kinds of fit by ISO 286-1, from published limits of ISO 286-2 (from memory)."""

from decimal import Decimal

import pytest

from calloutlint.facts.fits import FitKind, coded_fit, fit
from calloutlint.model.size import FitCode
from calloutlint.trade.iso286 import LimitDeviations

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
