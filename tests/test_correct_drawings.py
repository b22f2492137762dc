"""Correct, rich drawings: everything in them is read, and nothing above an observation is found."""

from pathlib import Path

import pytest

from calloutlint.reading.package import read_package
from calloutlint.reading.sheet import parse_sheet, read_sheet
from calloutlint.reading.transcribe import transcribe
from calloutlint.rulebook.finding import Grade
from calloutlint.rulebook.rulebook import load_rulebook

CORRECT = sorted((Path(__file__).parent / "cases" / "correct").rglob("*.txt"))


def test_there_are_four_rich_ones_and_six_with_unusual_datums() -> None:
    folders = [path.parent.name for path in CORRECT]
    assert (folders.count("correct"), folders.count("datums")) == (4, 6)
    assert all(len(read_sheet(path).callouts) >= 12 for path in CORRECT)


@pytest.mark.parametrize("path", CORRECT, ids=lambda path: path.stem)
def test_all_of_it_is_read(path: Path) -> None:
    drawing = read_sheet(path)
    assert [part.text for callout in drawing.callouts for part in callout.unread] == []
    assert [line.text for line in drawing.lines if not line.known] == []


@pytest.mark.parametrize("path", CORRECT, ids=lambda path: path.stem)
def test_nothing_above_an_observation_is_found(path: Path) -> None:
    findings = load_rulebook().check(read_package([path]))
    assert [(f.callout and f.callout.balloon, f.rule) for f in findings if f.grade > Grade.OBSERVATION] == []


@pytest.mark.parametrize("path", CORRECT, ids=lambda path: path.stem)
def test_it_is_transcribed_without_loss(path: Path) -> None:
    drawing = read_sheet(path)
    assert parse_sheet(transcribe(drawing), str(path)) == drawing
