"""Corrections written into a sheet's file touch nothing else in it."""

import os
from pathlib import Path

import pytest

from calloutlint.errors import CalloutlintError
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
        ("4 B2) 4 HOLES ⌀.281 +.007 -.002   THRU", "4 B2) 4X ⌀.281 +.007 -.002 THRU"),
        ("      FLATNESS |  .004 | A", "      ⏥ | .004"),
    ]


def test_a_second_run_changes_nothing(tmp_path: Path, rulebook: Rulebook) -> None:
    path = tmp_path / "sg-1.txt"
    path.write_bytes(SHEET.encode())
    correct(path, rulebook)
    once = path.read_bytes()
    assert correct(path, rulebook) == 0
    assert path.read_bytes() == once


@pytest.mark.parametrize(
    ("encoding", "mark"), [("utf-8", b""), ("utf-8", b"\xef\xbb\xbf"), ("utf-16-le", b"\xff\xfe"), ("cp1252", b"")]
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


def test_a_size_stacked_on_two_lines_is_written_anew_as_a_whole(tmp_path: Path, rulebook: Rulebook) -> None:
    path = tmp_path / "sg-1.txt"
    head = "drawing: SG-1\nrevision: A\nstandard: ASME Y14.5-2018\nunits: inch\n"
    path.write_text(head + "1) ⌀.50\n   ⌀.505\n2) ⏥ | .002\n", encoding="utf-8")
    correct(path, rulebook)
    assert path.read_text(encoding="utf-8").endswith("2) ⏥ | .002\n")
    assert not [f for f in rulebook.check(Package("one", (read_sheet(path),))) if f.rule == "SIZE-03"]


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
