"""A drawing package: sheets reviewed together, from a folder, from files, or from the shipped demo."""

from collections.abc import Callable, Iterable, Sequence
from pathlib import Path

from calloutlint import _resources
from calloutlint.errors import SheetError
from calloutlint.model.drawing import Drawing, Package
from calloutlint.reading.definition import DEFINITION, GATES, Definition, read_definition
from calloutlint.reading.files import is_folder
from calloutlint.reading.sheet import read_sheet

READERS: dict[str, Callable[[Path], Drawing]] = {".txt": read_sheet}
"""Suffixes that are taken from a folder, and what reads them; a file named outright is read as a sheet."""
_PATTERN = "expected one inside the folder, such as sg-*.txt"


def read_package(paths: Sequence[Path]) -> Package:
    """The package that files and folders make together, drawings in the order given and no file twice.

    Raises `SheetError` with one line for each file that cannot be read, or for a broken package.toml.
    """
    paths = [path.parent if path.name == DEFINITION else path for path in paths]
    folders = {path: read_definition(path) for path in paths if is_folder(path)}
    files: dict[Path, Path] = {}
    for path in paths:
        for file in _sheets(path, folders[path]) if path in folders else [path]:
            files.setdefault(_resolved(file), file)
    definitions = list(folders.values())
    return Package(
        name=", ".join(_name(path, folders.get(path)) for path in paths),
        drawings=_read_all(files.values()),
        joints=tuple(joint for definition in definitions for joint in definition.joints),
        gate=max((d.gate for d in definitions if d.gate), key=GATES.index, default=None),
        house=tuple(str(d.file.parent / folder) for d in definitions for folder in d.house),
    )


def demo_package() -> Package:
    """The package that ships with the program: an invented waterworks assembly."""
    return read_package([Path(str(_resources.folder("demo")))])


def _name(path: Path, definition: Definition | None) -> str:
    return (definition and definition.name) or _resolved(path).name or str(path)


def _resolved(path: Path) -> Path:
    try:
        return path.resolve()
    except (OSError, RuntimeError):  # a loop of links
        return path.absolute()


def _read_all(files: Iterable[Path]) -> tuple[Drawing, ...]:
    drawings, problems = [], []
    for file in files:
        try:
            drawings.append(READERS.get(file.suffix.lower(), read_sheet)(file))
        except SheetError as error:
            problems.append(str(error))
    if problems:
        raise SheetError("\n".join(problems))
    return tuple(drawings)


def _sheets(folder: Path, definition: Definition) -> list[Path]:
    """The sheet files of a folder: those that its definition names, else those with a known suffix, by name."""
    try:
        found = _named(folder, definition) if definition.drawings else _with_suffix(folder)
    except OSError as error:
        raise SheetError(f"{folder}: the folder cannot be read: {error.strerror or error}") from None
    if not found:
        raise SheetError(f"{folder}: no callout sheets in this folder; files named *.txt were expected")
    return found


def _named(folder: Path, definition: Definition) -> list[Path]:
    found: dict[Path, None] = {}
    for number, pattern in enumerate(definition.drawings):
        try:
            matches = sorted(path for path in folder.glob(pattern) if _is_visible_file(path))
        except (NotImplementedError, ValueError, IndexError):
            raise SheetError(
                f"{definition.file}: drawings[{number}]: {pattern!r} is no pattern; {_PATTERN}"
            ) from None
        if not matches:
            raise SheetError(f"{definition.file}: drawings[{number}]: no file matches {pattern!r}")
        found.update(dict.fromkeys(matches))
    return list(found)


def _with_suffix(folder: Path) -> list[Path]:
    return sorted(
        path for path in folder.iterdir() if path.suffix.lower() in READERS and _is_visible_file(path)
    )


def _is_visible_file(path: Path) -> bool:
    return not path.name.startswith(".") and not is_folder(path)
