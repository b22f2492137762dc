"""Shipped folders are found inside the package and beside a checkout's pyproject.toml, and nowhere else."""

from pathlib import Path

import pytest

from calloutlint import _resources
from calloutlint.errors import CalloutlintError


@pytest.fixture
def package(tmp_path: Path, monkeypatch: pytest.MonkeyPatch) -> Path:
    """An empty package folder that the look-up takes for the installed one."""
    home = tmp_path / "calloutlint"
    home.mkdir()
    monkeypatch.setattr(_resources, "files", lambda _name: home)
    return home


def write(folder: Path, text: str) -> None:
    folder.mkdir()
    (folder / "size.lark").write_text(text, encoding="utf-8")


@pytest.mark.parametrize(("name", "suffix"), [("grammar", ".lark"), ("rules", ".toml"), ("demo", ".txt")])
def test_this_installation_has_every_shipped_folder(name: str, suffix: str) -> None:
    assert any(Path(str(_resources.folder(name))).rglob(f"*{suffix}"))


def test_a_folder_inside_the_package_is_found(package: Path) -> None:
    write(package / "grammar", 'DIAMETER: "⌀"\n')
    assert _resources.read_text("grammar", "size.lark") == 'DIAMETER: "⌀"\n'


def test_a_folder_beside_pyproject_is_found(package: Path) -> None:
    write(package.parent / "grammar", "beside\n")
    (package.parent / "pyproject.toml").touch()
    assert _resources.read_text("grammar", "size.lark") == "beside\n"


def test_the_folder_inside_the_package_wins(package: Path) -> None:
    write(package.parent / "grammar", "beside\n")
    (package.parent / "pyproject.toml").touch()
    write(package / "grammar", "inside\n")
    assert _resources.read_text("grammar", "size.lark") == "inside\n"


def test_a_neighbour_of_an_installed_package_is_not_taken_for_ours(package: Path) -> None:
    write(package.parent / "grammar", "somebody else's\n")
    with pytest.raises(CalloutlintError, match="'grammar' that ships with calloutlint is missing"):
        _resources.folder("grammar")
