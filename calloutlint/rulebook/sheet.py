"""The rule sheet: one TOML file with a rule, its wording and its proof."""

import re
import tomllib
from collections.abc import Mapping
from dataclasses import dataclass
from decimal import Decimal
from typing import Annotated, Any, Literal

from pydantic import AfterValidator, BaseModel, ConfigDict, Field, ValidationError

from calloutlint.errors import RuleSheetError
from calloutlint.rulebook.holds import holding
from calloutlint.rulebook.text_error import nearest


def _known_standard(text: str) -> str:
    holding(text)
    return text


def _rule_id(text: str) -> str:
    if not re.fullmatch(r"[A-Z]+-\d{2,3}", text):
        raise ValueError(f"'{text}' is no rule id: expected capitals, a hyphen and a number, such as HOUSE-01")
    return text


RuleId = Annotated[str, AfterValidator(_rule_id)]
GradeWord = Literal["critical", "major", "minor", "observation"]
Text = Annotated[str, Field(min_length=1)]
LimitAmount = str | int | Decimal


class Form(BaseModel):
    """Base of everything in a sheet: unknown keys are refused."""

    model_config = ConfigDict(extra="forbid", frozen=True)


class Variant(Form):
    """What a sheet says otherwise where `when` holds."""

    when: Text
    grade: GradeWord | None = None
    say: str | None = None
    redline: str | None = None
    assumed: str | None = None


class Case(Form):
    """A drawing, or a package of drawings by file name, and where the rule must find something.

    `finds` lists one place for each finding: a balloon; `sheet` for the drawing as a whole; `package` for the
    package. In a package the drawing number and a colon stand before the first two. The other keys say more
    of the findings, where given: `grade` of each; `says`, texts each in some message; `figures`, each in some
    finding.
    """

    note: str = ""
    sheet: str | None = None
    package: dict[str, str] = Field(default_factory=dict)
    finds: list[str]
    grade: GradeWord | None = None
    says: list[str] = Field(default_factory=list)
    figures: dict[str, str] = Field(default_factory=dict)


class Sheet(Form):
    """A rule as its sheet states it."""

    id: RuleId
    title: Text
    grade: GradeWord
    examine: Text
    holds: Annotated[list[Annotated[str, AfterValidator(_known_standard)]], Field(min_length=1)]
    basis: Text
    why: str = ""
    when: str = ""
    demand: Text
    say: Text
    figures: list[Text] = Field(default_factory=list)
    assumed: str = ""
    redline: str = ""
    stands_on: str = ""
    yields_to: list[RuleId] = Field(default_factory=list)
    limits: dict[str, LimitAmount] = Field(default_factory=dict)
    variant: list[Variant] = Field(default_factory=list)
    case: list[Case] = Field(default_factory=list)


class Amendment(Form):
    """A house sheet that retires a shipped rule, or changes its grade or its limits, and says why."""

    retires: RuleId | None = None
    amends: RuleId | None = None
    why: Text
    grade: GradeWord | None = None
    limits: dict[str, LimitAmount] = Field(default_factory=dict)

    @property
    def rule(self) -> str:
        """The rule that it is about."""
        return self.retires or self.amends or ""


@dataclass(frozen=True, slots=True)
class Filed:
    """A sheet with the name of its file, for messages."""

    file: str
    sheet: Sheet


def read_sheet(text: str, file: str) -> Sheet | Amendment:
    """The sheet in a file's text.

    Raises:
        RuleSheetError: the text is not TOML, or a key is unknown, missing or wrong.
    """
    data = _toml(text, file)
    model: type[Sheet] | type[Amendment] = Amendment if {"retires", "amends"} & data.keys() else Sheet
    try:
        sheet = model.model_validate(data)
    except ValidationError as error:
        raise RuleSheetError("\n".join(_problem(file, detail, model) for detail in error.errors())) from None
    if isinstance(sheet, Amendment):
        _check_amendment(sheet, file)
    return sheet


def _toml(text: str, file: str) -> dict[str, Any]:
    try:
        return tomllib.loads(text, parse_float=Decimal)
    except tomllib.TOMLDecodeError as error:
        raise RuleSheetError(f"{file}: this is not TOML: {error}") from None


def _check_amendment(sheet: Amendment, file: str) -> None:
    changes = sheet.grade is not None or bool(sheet.limits)
    if sheet.retires and (sheet.amends or changes):
        raise RuleSheetError(f"{file}: a sheet that retires a rule can change nothing else")
    if sheet.amends and not changes:
        raise RuleSheetError(f"{file}: amends {sheet.amends}, but states neither a grade nor a limit")


def _problem(file: str, detail: Any, model: type[Form]) -> str:
    """One line for one thing that pydantic found: the file, the key, what is wrong."""
    path = [part for part in detail["loc"] if isinstance(part, int) or part in _keys()]
    key = ".".join(str(part + 1) if isinstance(part, int) else part for part in path)
    if detail["type"] == "extra_forbidden":
        *_, last = detail["loc"]
        return f"{file}: key '{last}' is not known{nearest(str(last), _keys_of(model, detail['loc']))}"
    message = detail["msg"].removeprefix("Value error, ")
    given = detail["input"]
    shown = "" if isinstance(given, Mapping | list) or detail["type"] == "value_error" else f", not {given!r}"
    return f"{file}: key '{key}': {message[0].lower()}{message[1:]}{shown}"


def _keys() -> set[str]:
    models: tuple[type[Form], ...] = (Sheet, Amendment, Variant, Case)
    return {name for model in models for name in model.model_fields}


def _keys_of(model: type[Form], path: tuple[str | int, ...]) -> list[str]:
    inner: dict[str, type[Form]] = {"variant": Variant, "case": Case}
    return list((inner.get(str(path[0]), model) if len(path) > 1 else model).model_fields)
