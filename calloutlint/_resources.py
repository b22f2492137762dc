"""Finds the files that ship with the program: the grammar fragments, the rule sheets, the demo package."""

from importlib.resources import files
from importlib.resources.abc import Traversable
from pathlib import Path

from calloutlint.errors import CalloutlintError


def folder(name: str) -> Traversable:
    """The shipped folder `name`: `grammar`, `rules` or `demo`.

    It stands inside the installed package, or else beside the pyproject.toml of a checkout.

    Raises:
        CalloutlintError: it stands in neither place, so the installation is broken.
    """
    package = files("calloutlint")
    inside = package / name
    if inside.is_dir():
        return inside
    if isinstance(package, Path):
        beside = package.parent / name
        if beside.is_dir() and (package.parent / "pyproject.toml").is_file():
            return beside
    raise CalloutlintError(
        f"The folder '{name}' that ships with calloutlint is missing from {package}. Install calloutlint again."
    )


def read_text(folder_name: str, name: str) -> str:
    """The text of the shipped file `name` in the shipped folder `folder_name`, read as UTF-8.

    Raises:
        CalloutlintError: the folder is missing.
        FileNotFoundError: the folder has no such file.
    """
    return (folder(folder_name) / name).read_text(encoding="utf-8")
