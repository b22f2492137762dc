"""Corrections written into a sheet's file touch nothing else in it."""

import os
from pathlib import Path

import pytest

from calloutlint.callouts.parse import parse_callout
from calloutlint.errors import CalloutlintError
from calloutlint.model.callout import Callout
from calloutlint.model.drawing import Package
from calloutlint.reading.sheet import read_sheet
from calloutlint.redline.incorporate import incorporate
from calloutlint.redline.settle import settle
from calloutlint.rulebook.rulebook import Rulebook, load_rulebook

SHEET = """\
# typed by hand,   with odd  spacing
drawing:  SG-1
revision: A
standard: ASME Y14.5-2018
units:    inch

1)   SURFACE
     ⏥ | .003
     DATUM A
4 B2) 4 HOLES ⌀.281 +.007 -.002   THRU
# a comment between two lines of a callout
      FLATNESS |  .004 | A
note: REMOVE BURRS   """


@pytest.fixture(scope="module")
def rulebook() -> Rulebook:
    return load_rulebook()


def correct(path: Path, rulebook: Rulebook) -> int:
    drawing = read_sheet(path)
    found = settle(Package("one", (drawing,)), rulebook.check)
    if found:
        incorporate(path, drawing.unit, [(one.old, one.new) for one in found])
    return len(found)


def changed_lines(before: str, after: str) -> list[tuple[str, str]]:
    pairs = zip(before.split("\n"), after.split("\n"), strict=True)
    return [(one, other) for one, other in pairs if one != other]


def test_only_the_changed_parts_are_written(tmp_path: Path, rulebook: Rulebook) -> None:
    path = tmp_path / "sg-1.txt"
    path.write_bytes(SHEET.encode())
    assert correct(path, rulebook) == 1
    assert changed_lines(SHEET, path.read_bytes().decode()) == [
        ("4 B2) 4 HOLES ⌀.281 +.007 -.002   THRU", "4 B2) 4X ⌀.281 +.007 -.002   THRU"),
        ("      FLATNESS |  .004 | A", "      FLATNESS |  .004"),
    ]


def test_a_second_run_changes_nothing(tmp_path: Path, rulebook: Rulebook) -> None:
    path = tmp_path / "sg-1.txt"
    path.write_bytes(SHEET.encode())
    correct(path, rulebook)
    once = path.read_bytes()
    assert correct(path, rulebook) == 0
    assert path.read_bytes() == once


@pytest.mark.parametrize(
    ("encoding", "mark"),
    [("utf-8", b""), ("utf-8", b"\xef\xbb\xbf"), ("utf-16-le", b"\xff\xfe"), ("cp1252", b"")],
)
@pytest.mark.parametrize("newline", ["\n", "\r\n"])
def test_encoding_mark_and_line_ends_stay(
    tmp_path: Path, rulebook: Rulebook, encoding: str, mark: bytes, newline: str
) -> None:
    """A sheet in Windows-1252 gets the ASCII spelling, since it cannot hold the symbols."""
    plain = SHEET.replace("⏥", "FLAT").replace("⌀", "DIA ").replace("hand", "händ")
    path = tmp_path / "sg-1.txt"
    path.write_bytes(mark + plain.replace("\n", newline).encode(encoding))
    assert correct(path, rulebook) == 1
    data = path.read_bytes()
    assert data.startswith(mark)
    after = data[len(mark) :].decode(encoding)
    assert after.count(newline) == SHEET.count("\n")
    assert len(changed_lines(plain, after.replace(newline, "\n"))) == 2


TITLE = "drawing: SG-1\nrevision: A\nstandard: {}\nunits: {}\n"


@pytest.mark.parametrize(
    ("standard", "units", "before", "after"),
    [
        (
            "ASME Y14.5-2018",
            "inch",
            "1) 4 HOLES ⌀.281\n   +.007\n   -.002\n   THRU",
            "1) 4X ⌀.281\n   +.007\n   -.002\n   THRU",
        ),
        (
            "ASME Y14.5-2018",
            "inch",
            "1) BORE DIA .750 +.002/+.005, FREE  OF BURRS",
            "1) BORE DIA .750 +.005 +.002, FREE  OF BURRS",
        ),
        ("ASME Y14.5-2018", "inch", "1) %%c.500 +.005 -0", "1) %%c.500 +.005 -.000"),
        ("ISO 1101", "mm", "1) ⌀12,5 -0,3 -0,1", "1) ⌀12,5 -0,1 -0,3"),
        (
            "ASME Y14.5-2018",
            "inch",
            "1) SURFACE  FLATNESS .003 A\n    HONE  SMOOTH",
            "1) SURFACE  FLATNESS .003\n    HONE  SMOOTH",
        ),
    ],
)
def test_only_the_words_at_fault_change(
    tmp_path: Path, rulebook: Rulebook, standard: str, units: str, before: str, after: str
) -> None:
    path = tmp_path / "sg-1.txt"
    title = TITLE.format(standard, units)
    path.write_text(title + before + "\n", encoding="utf-8")
    correct(path, rulebook)
    assert path.read_text(encoding="utf-8") == title + after + "\n"


def test_what_cannot_be_placed_is_left_for_the_hand(tmp_path: Path) -> None:
    """A correction that would run over two lines of the sheet is not written, and the callout is given back."""
    path = tmp_path / "sg-1.txt"
    path.write_text("units: inch\n1) ⌀.28\n   ±.005\n", encoding="utf-8")
    drawing = read_sheet(path)
    (old,) = drawing.callouts
    new = Callout("1", parse_callout(["R.280-.290"], drawing.unit), source=old.source)
    assert incorporate(path, drawing.unit, [(old, new)]) == [old]
    assert path.read_text(encoding="utf-8") == "units: inch\n1) ⌀.28\n   ±.005\n"


@pytest.mark.skipif(os.geteuid() == 0, reason="permissions do not bind the superuser")
def test_a_read_only_folder_is_said(tmp_path: Path, rulebook: Rulebook) -> None:
    path = tmp_path / "sg-1.txt"
    path.write_bytes(SHEET.encode())
    tmp_path.chmod(0o500)
    try:
        with pytest.raises(CalloutlintError, match="cannot be written"):
            correct(path, rulebook)
    finally:
        tmp_path.chmod(0o700)
    assert path.read_bytes() == SHEET.encode()


def test_a_failed_write_leaves_the_file_as_it_was(
    tmp_path: Path, rulebook: Rulebook, monkeypatch: pytest.MonkeyPatch
) -> None:
    path = tmp_path / "sg-1.txt"
    path.write_bytes(SHEET.encode())

    def refuse(_self: Path, _target: Path) -> None:
        raise OSError(28, "No space left on device")

    monkeypatch.setattr(Path, "replace", refuse)
    with pytest.raises(CalloutlintError, match="no space left"):
        correct(path, rulebook)
    assert path.read_bytes() == SHEET.encode()
    assert [one.name for one in tmp_path.iterdir()] == ["sg-1.txt"]
