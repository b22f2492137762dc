"""The definition of a package: what its package.toml states."""

from collections.abc import Callable, Iterable
from pathlib import Path
from reprlib import repr as shortened
from typing import Any, NamedTuple

from calloutlint.errors import SheetError
from calloutlint.model.fastener import HoleRef, Joint
from calloutlint.reading.files import is_file, read_bytes
from calloutlint.reading.joints import JointTextError, parse_joint
from calloutlint.reading.toml import read_toml

DEFINITION = "package.toml"
GATES = ("critical", "major", "minor", "observation")

_EXAMPLES = {
    "drawings": "sg-*.txt",
    "joints": "cover screws = SG-2207:4 with M6 socket head cap screw, fixed in SG-2210:7, projection 12",
    "house": "rules",
}


class Definition(NamedTuple):
    """What a package.toml states; paths are not yet resolved."""

    file: Path
    name: str | None = None
    drawings: tuple[str, ...] = ()
    joints: tuple[Joint, ...] = ()
    house: tuple[str, ...] = ()
    gate: str | None = None


def read_definition(folder: Path) -> Definition:
    """What the package.toml of a folder states, an empty definition where there is none.

    Raises `SheetError` naming the file and the key for unknown keys, wrong types and joints that do not read.
    """
    file = folder / DEFINITION
    if not is_file(file):
        return Definition(file)
    try:
        text = read_bytes(file).decode("utf-8")
    except UnicodeDecodeError:
        raise SheetError(f"{file}: this is no TOML: the text is not UTF-8") from None
    table = read_toml(text, str(file))
    if "waivers" in table:
        raise SheetError(
            f"{file}: waivers: this version reads none, and would report what is waived as if it were not"
        )
    unknown = [key for key in table if key not in _CHECKS]
    if unknown:
        raise SheetError(f"{file}: {unknown[0]!r} is no key of a package; known are {', '.join(_CHECKS)}")
    return Definition(file, **{key: _CHECKS[key](file, key, value) for key, value in table.items()})


def _text(file: Path, key: str, value: Any) -> str:
    if not isinstance(value, str) or not value.strip():
        raise SheetError(f"{file}: {key}: {shortened(value)} stands here; a text was expected")
    return value


def _texts(file: Path, key: str, value: Any) -> tuple[str, ...]:
    if not isinstance(value, list):
        expected = f'a list of texts was expected, such as {key} = ["{_EXAMPLES[key]}"]'
        raise SheetError(f"{file}: {key}: {shortened(value)} stands here; {expected}")
    return tuple(_text(file, f"{key}[{number}]", item) for number, item in enumerate(value))


def _gate(file: Path, key: str, value: Any) -> str:
    gate = value.strip().lower() if isinstance(value, str) else ""
    if gate not in GATES:
        raise SheetError(f"{file}: {key}: {shortened(value)} is no grade; expected {', '.join(GATES)}")
    return gate


def _joints(file: Path, key: str, value: Any) -> tuple[Joint, ...]:
    joints = []
    for number, text in enumerate(_texts(file, key, value)):
        try:
            joint = parse_joint(text)
        except JointTextError as error:
            raise SheetError(f"{file}: {key}[{number}]: {error}") from None
        _refuse_bare_balloons(f"{file}: {key}[{number}]", joint.holes + joint.mates)
        joints.append(joint)
    return tuple(joints)


def _refuse_bare_balloons(place: str, holes: Iterable[HoleRef]) -> None:
    for hole in holes:
        if hole.drawing is None:
            expected = f"DRAWING:{hole.balloon}"
            raise SheetError(f"{place}: balloon {hole.balloon} names no drawing; expected {expected}")


_CHECKS: dict[str, Callable[[Path, str, Any], Any]] = {
    "name": _text,
    "drawings": _texts,
    "joints": _joints,
    "house": _texts,
    "gate": _gate,
}
