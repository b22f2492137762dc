"""The rule sheet: one TOML file with a rule, its wording and its proof."""

import re
from dataclasses import dataclass
from decimal import Decimal
from reprlib import repr as shortened
from typing import Annotated, Any, Literal

from pydantic import AfterValidator, BaseModel, ConfigDict, Field, ValidationError

from calloutlint.errors import RuleSheetError, SheetError
from calloutlint.reading.toml import read_toml
from calloutlint.rulebook.holds import holding
from calloutlint.rulebook.sheet_problems import problems

LIMIT_FORM = 'a number, or a length or an angle with its unit such as "0.05 mm", "0.002 in" or "0.5 deg"'


def _known_standard(text: str) -> str:
    holding(text)
    return text


def _rule_id(text: str) -> str:
    if not re.fullmatch(r"[A-Z]+-\d{2,3}", text):
        raise ValueError(f"'{text}' is no rule id: expected capitals, a hyphen and a number, such as HOUSE-01")
    return text


def _limit_amount(given: object) -> object:
    if isinstance(given, bool) or not isinstance(given, str | int | Decimal):
        raise ValueError(f"{LIMIT_FORM} is expected, not {shortened(given)}")
    return given


RuleId = Annotated[str, AfterValidator(_rule_id)]
GradeWord = Literal["critical", "major", "minor", "observation"]
Text = Annotated[str, Field(min_length=1)]
LimitAmount = Annotated[Any, AfterValidator(_limit_amount)]
"""A text, a whole number or a `Decimal`."""


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
    data = _table(text, file)
    if not {"id", "amends", "retires"} & data.keys():
        raise RuleSheetError(f"{file}: a rule sheet needs 'id', 'amends' or 'retires'")
    model: type[Sheet] | type[Amendment] = Amendment if {"retires", "amends"} & data.keys() else Sheet
    try:
        sheet = model.model_validate(data)
    except ValidationError as error:
        raise RuleSheetError(problems(file, error, model)) from None
    if isinstance(sheet, Amendment):
        _check_amendment(sheet, file)
    return sheet


def _table(text: str, file: str) -> dict[str, Any]:
    try:
        return read_toml(text, file)
    except SheetError as error:
        raise RuleSheetError(str(error)) from None


def _check_amendment(sheet: Amendment, file: str) -> None:
    changes = sheet.grade is not None or bool(sheet.limits)
    if sheet.retires and (sheet.amends or changes):
        raise RuleSheetError(f"{file}: a sheet that retires a rule can change nothing else")
    if sheet.amends and not changes:
        raise RuleSheetError(f"{file}: amends {sheet.amends}, but states neither a grade nor a limit")
