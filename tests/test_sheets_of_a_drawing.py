"""Which sheets of a package are one drawing, and that the same drawing twice is borne."""

import pytest

from calloutlint.facts.datums.scheme import sheets_of
from calloutlint.model.drawing import Package
from calloutlint.reading.sheet import parse_sheet
from calloutlint.rulebook.rulebook import load_rulebook

BODY = "standard: ISO 1101\nunits: mm\n1) ⏥ | 0.1\n   DATUM A\n2) FACE\n   ∥ | 0.2 | A\n"


def package_of(*titles: str) -> Package:
    return Package("one", tuple(parse_sheet(f"{title}\n{BODY}", f"{i}.txt") for i, title in enumerate(titles)))


@pytest.mark.parametrize(
    ("titles", "sizes"),
    [
        (("drawing: A\nsheet: 1 of 2", "drawing: A\nsheet: 2 of 2"), [2]),
        (("drawing: A\nsheet: 1 of 2", "drawing: B\nsheet: 2 of 2"), [1, 1]),
        (("drawing: A\nrevision: A\nsheet: 1", "drawing: A\nrevision: B\nsheet: 2"), [1, 1]),
        (("drawing: A", "drawing: A"), [1, 1]),
        (("drawing: A\nsheet: 1", "drawing: A\nsheet: 1"), [1, 1]),
        (("", ""), [1, 1]),
    ],
)
def test_sheets_of_one_drawing_stand_together(titles: tuple[str, ...], sizes: list[int]) -> None:
    assert [len(group) for group in sheets_of(package_of(*titles))] == sizes


def test_the_same_drawing_twice_is_said_and_checked() -> None:
    findings = load_rulebook().check(package_of("drawing: A\nrevision: A", "drawing: A\nrevision: A"))
    assert [finding.rule for finding in findings] == ["NOTE-06"]
