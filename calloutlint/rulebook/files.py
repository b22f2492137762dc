"""Finds and reads the files of rule sheets."""

from collections.abc import Iterator, Sequence
from importlib.resources.abc import Traversable
from pathlib import Path

from calloutlint.errors import CalloutlintError, RuleSheetError

Place = Path | Traversable
SheetText = tuple[str, str]


def read_texts(places: Sequence[Place]) -> list[SheetText]:
    """Name and text of every .toml file in some folders and the folders in them, by folder, then by name.

    Raises:
        CalloutlintError: there is no such folder, or it holds no rule sheet.
        RuleSheetError: a file cannot be read or is not UTF-8.
    """
    return [(str(file), _text(file)) for place in places for file in _sheet_files(place)]


def _sheet_files(place: Place) -> list[Place]:
    if place.is_file():
        raise CalloutlintError(f"{place}: this is a file; name its folder, whose rule sheets are read together")
    if not place.is_dir():
        raise CalloutlintError(f"{place}: there is no such folder of rule sheets")
    found = list(_found(place))
    if not found:
        raise CalloutlintError(f"{place}: there is no rule sheet (.toml) in this folder")
    return found


def _found(place: Place) -> Iterator[Place]:
    for entry in sorted(place.iterdir(), key=lambda entry: entry.name):
        if entry.name.endswith(".toml"):
            yield entry
        elif entry.is_dir():
            yield from _found(entry)


def _text(file: Place) -> str:
    try:
        return file.read_text(encoding="utf-8")
    except UnicodeDecodeError:
        raise RuleSheetError(f"{file}: a rule sheet must be UTF-8 text") from None
    except OSError as error:
        raise RuleSheetError(f"{file}: cannot be read: {error.strerror}") from None
