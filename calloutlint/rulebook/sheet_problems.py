"""What is wrong with the keys of a rule sheet, in plain words."""

from collections.abc import Iterator, Sequence
from reprlib import repr as shortened
from typing import Any

from pydantic import BaseModel, ValidationError

from calloutlint.rulebook.text_error import nearest

_EXPECTED = {
    "string_type": "a text is expected",
    "list_type": "a list is expected",
    "dict_type": "a table is expected",
    "model_type": "a table is expected",
}
_EMPTY = {"string_too_short": "this is empty: a text is expected", "too_short": "this list is empty"}

Details = Any
"""One problem as pydantic lists it: `type`, `loc`, `input`, `ctx`."""


def problems(file: str, error: ValidationError, form: type[BaseModel]) -> str:
    """A line for each thing that is wrong: the file, the key, what was found there and what is expected."""
    return "\n".join(dict.fromkeys(f"{file}: {_problem(detail, form)}" for detail in error.errors()))


def _problem(detail: Details, form: type[BaseModel]) -> str:
    path, kind = detail["loc"], detail["type"]
    key = f"key '{_path(path)}'"
    if kind == "missing":
        return f"{key} is missing"
    if kind == "extra_forbidden":
        return f"{key} is not known{nearest(str(path[-1]), _keys_beside(form, path))}"
    return f"{key}: {_EMPTY.get(kind) or _expected(detail)}"


def _expected(detail: Details) -> str:
    kind, given = detail["type"], detail["input"]
    if kind == "literal_error":
        words = detail["ctx"]["expected"].replace("'", "")
        return f"expected is {words}, not {shortened(given)}"
    if kind == "value_error":
        return str(detail["ctx"]["error"])
    return f"{_EXPECTED.get(kind, 'another kind of value is expected')}, not {shortened(given)}"


def _path(path: Sequence[str | int]) -> str:
    """A path with the items of lists counted from 1."""
    return ".".join(str(step + 1) if isinstance(step, int) else step for step in path)


def _keys_beside(form: type[BaseModel], path: Sequence[str | int]) -> list[str]:
    """The keys that may stand where the last one of a path stands."""
    for step in path[:-1]:
        form = next(_forms_under(form, step), form)
    return list(form.model_fields)


def _forms_under(form: type[BaseModel], key: str | int) -> Iterator[type[BaseModel]]:
    """The form of the tables in the list under a key, if that is what stands there."""
    field = form.model_fields.get(str(key))
    for item in getattr(field.annotation, "__args__", ()) if field else ():
        if isinstance(item, type) and issubclass(item, BaseModel):
            yield item
