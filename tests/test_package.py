"""Packages: folders with and without a definition, lists of files, and what is wrong with them said."""

from pathlib import Path

import pytest

from calloutlint.errors import SheetError
from calloutlint.model.fastener import HoleRef
from calloutlint.reading.joints import FORM
from calloutlint.reading.package import demo_package, read_package
from calloutlint.rulebook.finding import Grade
from calloutlint.rulebook.rulebook import load_rulebook

KEYS = "name, drawings, joints, house, gate"
SHEET = "drawing: {}\nrevision: A\nstandard: ASME Y14.5-2018\nunits: mm\n\n4) 4X ⌀6.6 +0.2 0 THRU\n"


@pytest.fixture
def folder(tmp_path: Path) -> Path:
    """A folder of two sheets and a file that is none."""
    folder = tmp_path / "Rechen 7 – übersicht"
    folder.mkdir()
    (folder / "tr-1.txt").write_text(SHEET.format("TR-1"), encoding="utf-8")
    (folder / "TR-2.TXT").write_text(SHEET.format("TR-2"), encoding="utf-8")
    (folder / "photo.png").write_bytes(b"\x89PNG\r\n")
    (folder / ".hidden.txt").write_bytes(b"\x00")
    return folder


def define(folder: Path, text: str) -> Path:
    (folder / "package.toml").write_text(text, encoding="utf-8")
    return folder


def refusal(*paths: Path) -> str:
    with pytest.raises(SheetError) as error:
        read_package(paths)
    return str(error.value)


def test_a_folder_without_a_definition_gives_its_text_files(folder: Path) -> None:
    package = read_package([folder])
    assert package.name == "Rechen 7 – übersicht"
    assert sorted(drawing.name for drawing in package.drawings) == ["TR-1", "TR-2"]
    assert package.joints == ()


def test_a_definition_names_sheets_joints_gate_and_rules(folder: Path) -> None:
    define(
        folder,
        'name = "Trash rack"\r\n'
        'drawings = ["tr-*.txt"]\r\ngate = "minor"\r\nhouse = ["rules"]\r\n'
        'joints = ["bar bolts = TR-1:4 with M6 hex head bolt, fixed in TR-9:1"]\r\n',
    )
    package = read_package([folder])
    assert (package.name, package.gate) == ("Trash rack", "minor")
    assert [drawing.name for drawing in package.drawings] == ["TR-1"]
    assert package.house == (str(folder / "rules"),)
    (joint,) = package.joints
    assert (joint.holes, joint.mates) == ((HoleRef("TR-1", "4"),), (HoleRef("TR-9", "1"),))
    assert read_package([folder / "package.toml"]) == package


def test_files_are_read_in_the_order_given_and_once(folder: Path) -> None:
    one, two = folder / "tr-1.txt", folder / "TR-2.TXT"
    package = read_package([two, one, two, folder])
    assert [drawing.name for drawing in package.drawings] == ["TR-2", "TR-1"]


def test_two_names_of_one_file_are_read_once(folder: Path) -> None:
    (folder / "tr-0.txt").symlink_to(folder / "tr-1.txt")
    assert len(read_package([folder]).drawings) == 2
    roundabout = folder / ".." / folder.name / "tr-1.txt"
    assert len(read_package([folder / "tr-1.txt", folder / "tr-0.txt", roundabout]).drawings) == 1


@pytest.mark.parametrize("gate", ["critical", "Critical", "CRITICAL", " critical "])
def test_a_grade_is_written_in_any_case(folder: Path, gate: str) -> None:
    assert read_package([define(folder, f'gate = "{gate}"')]).gate == "critical"


def test_a_number_of_too_many_digits_is_said(folder: Path) -> None:
    define(folder, "x = " + "1" * 5000)
    assert "package.toml: this is no TOML: Exceeds the limit (4300 digits)" in refusal(folder)


def test_a_single_file_is_a_package(folder: Path) -> None:
    package = read_package([folder / "tr-1.txt"])
    assert (package.name, len(package.drawings)) == ("tr-1.txt", 1)


def test_a_file_named_outright_needs_no_suffix(tmp_path: Path) -> None:
    sheet = tmp_path / "export"
    sheet.write_text(SHEET.format("X"), encoding="utf-8")
    assert read_package([sheet]).drawings[0].name == "X"


def test_every_bad_file_is_named(folder: Path) -> None:
    (folder / "tr-3.txt").write_bytes(b"")
    (folder / "tr-4.txt").write_bytes(b"a\x00")
    lines = refusal(folder, folder / "gone.txt").splitlines()
    assert [line.rsplit("/", 1)[1].split(":")[0] for line in lines] == ["tr-3.txt", "tr-4.txt", "gone.txt"]


def test_a_folder_without_sheets_is_refused(tmp_path: Path) -> None:
    assert refusal(tmp_path) == f"{tmp_path}: no callout sheets in this folder; files named *.txt were expected"


def test_a_loop_of_folders_is_no_trap(folder: Path) -> None:
    (folder / "again").symlink_to(folder)
    define(folder, 'drawings = ["**/*.txt"]')
    assert [drawing.name for drawing in read_package([folder]).drawings] == ["TR-1"]


@pytest.mark.parametrize(
    ("text", "message"),
    [
        ("name = ]", "this is no TOML: Invalid value (at line 1, column 8)"),
        ("colour = 1", "'colour' is no key of a package; known are " + KEYS),
        ("x = " + "[" * 5000, "this is no TOML that is read: it is nested too deeply"),
        ("x = " + "{a=" * 5000, "this is no TOML that is read: it is nested too deeply"),
        ("name = 3", "name: 3 stands here; a text was expected"),
        (
            'drawings = "x.txt"',
            "drawings: 'x.txt' stands here; a list of texts was expected, such as drawings = [\"sg-*.txt\"]",
        ),
        (
            "house = {file = 'x.toml'}",
            "house: {'file': 'x.toml'} stands here; a list of texts was expected, such as house = [\"rules\"]",
        ),
        (
            'house = "' + "x" * 400 + '"',
            f"house: '{'x' * 12}...{'x' * 13}' stands here; "
            'a list of texts was expected, such as house = ["rules"]',
        ),
        (
            "waivers = ['waivers.toml']",
            "waivers: this version reads none, and would report what is waived as if it were not",
        ),
        ("drawings = [1]", "drawings[0]: 1 stands here; a text was expected"),
        ('drawings = ["zz*.txt"]', "drawings[0]: no file matches 'zz*.txt'"),
        (
            'drawings = ["/etc/*"]',
            "drawings[0]: '/etc/*' is no pattern; expected one inside the folder, such as sg-*.txt",
        ),
        ('gate = "urgent"', "gate: 'urgent' is no grade; expected critical, major, minor, observation"),
        ("gate = [1]", "gate: [1] is no grade; expected critical, major, minor, observation"),
        ('joints = ["x = TR-1:4"]', "joints[0]: 'x = TR-1:4' is no joint; expected " + FORM),
        ('joints = ["x = 4 with M6"]', "joints[0]: balloon 4 names no drawing; expected DRAWING:4"),
    ],
)
def test_a_broken_definition_names_the_file_and_the_key(folder: Path, text: str, message: str) -> None:
    define(folder, text)
    assert refusal(folder) == f"{folder / 'package.toml'}: {message}"


def test_the_demo_is_a_package_of_mating_drawings() -> None:
    demo = demo_package()
    assert [drawing.number for drawing in demo.drawings] == ["SG-2207", "SG-2210", "SG-2230"]
    assert sum(len(drawing.callouts) for drawing in demo.drawings) == 40
    assert len(demo.joints) == 4
    assert all(line.known for drawing in demo.drawings for line in drawing.lines)


MISTAKES = {
    ("SG-2207", "5", "FIT-06"),
    ("SG-2207", "6", "FRAME-01"),
    ("SG-2207", "7", "FRAME-04"),
    ("SG-2207", "8", "FRAME-15"),
    ("SG-2207", "14", "READ-01"),
    ("SG-2210", "5", "FIT-02"),
    ("SG-2210", "6", "DATUM-01"),
    ("SG-2210", "7", "SIZE-01"),
    ("SG-2210", "9", "SIZE-09"),
    ("SG-2230", None, "NOTE-05"),
    ("SG-2230", "5", "SIZE-10"),
    ("SG-2230", "6", "FIT-03"),
}
"""What is wrong in the demo, on purpose; all else in it is sound."""


def test_the_mistakes_of_the_demo_are_found_and_no_others() -> None:
    found = [
        (finding.drawing and finding.drawing.number, finding.callout and finding.callout.balloon, finding.rule)
        for finding in load_rulebook().check(demo_package())
        if finding.grade > Grade.OBSERVATION
    ]
    assert sorted(found, key=str) == sorted(MISTAKES, key=str)


def test_paths_that_cannot_be_looked_at_say_so(tmp_path: Path) -> None:
    (tmp_path / "a.txt").symlink_to(tmp_path / "a.txt")
    assert "a.txt: the file cannot be read" in refusal(tmp_path / "a.txt")
    assert "the file cannot be read" in refusal(tmp_path / ("x" * 300))


def test_an_empty_definition_and_one_with_a_byte_order_mark_are_read(folder: Path) -> None:
    (folder / "package.toml").write_bytes(b"")
    assert len(read_package([folder]).drawings) == 2
    (folder / "package.toml").write_bytes("\ufeffname = 'Rechen'\r\n".encode())
    assert read_package([folder]).name == "Rechen"
    (folder / "package.toml").write_bytes("name = 'Überlauf'".encode("cp1252"))
    assert refusal(folder).endswith("package.toml: this is no TOML: the text is not UTF-8")
