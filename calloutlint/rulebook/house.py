"""House rule sheets: rules of one's own, and sheets that retire or amend a shipped rule."""

from collections.abc import Iterator, Mapping, Sequence
from typing import NamedTuple

from calloutlint.errors import RuleSheetError
from calloutlint.rulebook.files import SheetText
from calloutlint.rulebook.house_change import HouseChange
from calloutlint.rulebook.sheet import Amendment, Filed, LimitAmount, Sheet, read_sheet
from calloutlint.rulebook.text_error import nearest


def read_sheets(texts: Sequence[SheetText]) -> list[tuple[str, Sheet | Amendment]]:
    """The sheets in some files, with their names.

    Raises:
        RuleSheetError: sheets are broken; every problem is told.
    """
    problems: list[str] = []
    sheets = []
    for file, text in texts:
        try:
            sheets.append((file, read_sheet(text, file)))
        except RuleSheetError as error:
            problems.append(str(error))
    if problems:
        raise RuleSheetError("\n".join(problems))
    return sheets


def filed_rules(sheets: Sequence[tuple[str, Sheet | Amendment]]) -> list[Filed]:
    """The sheets that state rules, sorted by id.

    Raises:
        RuleSheetError: an id is used twice, or a rule yields to one that there is not.
    """
    rules: dict[str, Filed] = {}
    problems: list[str] = []
    for file, sheet in sheets:
        if isinstance(sheet, Amendment):
            continue
        if sheet.id in rules:
            problems.append(f"{file}: {sheet.id} is the id of another rule already, in {rules[sheet.id].file}")
        rules[sheet.id] = Filed(file, sheet)
    problems += [problem for filed in rules.values() for problem in _yielding_wrongly(filed, rules)]
    if problems:
        raise RuleSheetError("\n".join(problems))
    return [rules[id_] for id_ in sorted(rules)]


def _yielding_wrongly(filed: Filed, rules: Mapping[str, Filed]) -> Iterator[str]:
    for number, id_ in enumerate(filed.sheet.yields_to, start=1):
        place = f"{filed.file}: key 'yields_to.{number}'"
        if id_ == filed.sheet.id:
            yield f"{place}: a rule cannot yield to itself"
        elif id_ not in rules:
            yield f"{place}: there is no rule {id_}{nearest(id_, rules)}"


class InForce(NamedTuple):
    """Rules after what house sheets change, and those changes in the order they were made."""

    rules: list[Filed]
    changes: tuple[HouseChange, ...]


def amended(written: Sequence[Filed], sheets: Sequence[tuple[str, Sheet | Amendment]]) -> InForce:
    """Rules with what amendments change in them.

    Raises:
        RuleSheetError: an amendment does not fit a rule; every problem is told.
    """
    rules = {filed.sheet.id: filed for filed in written}
    problems: list[str] = []
    changes: list[HouseChange] = []
    for file, sheet in sheets:
        if isinstance(sheet, Amendment):
            try:
                changes.append(HouseChange(sheet.rule, _amend(rules, sheet, file), sheet.why, file))
            except RuleSheetError as error:
                problems.append(str(error))
    if problems:
        raise RuleSheetError("\n".join(problems))
    return InForce(list(rules.values()), tuple(changes))


def _amend(rules: dict[str, Filed], amendment: Amendment, file: str) -> str:
    """Carry out an amendment; what it did, in words."""
    filed = rules.get(amendment.rule)
    if filed is None:
        raise RuleSheetError(f"{file}: there is no rule {amendment.rule}{nearest(amendment.rule, rules)}")
    if amendment.retires:
        del rules[amendment.rule]
        return "retired"
    before = filed.sheet
    after = before.model_copy(
        update={
            "limits": _limits(before, amendment.limits, file),
            "grade": amendment.grade or before.grade,
        }
    )
    rules[amendment.rule] = Filed(filed.file, after)
    done = [f"grade {after.grade}, was {before.grade}"] if amendment.grade else []
    done += [f"{name} {after.limits[name]}, was {before.limits[name]}" for name in amendment.limits]
    return f"amended ({'; '.join(done)})"


def _limits(sheet: Sheet, changed: Mapping[str, LimitAmount], file: str) -> dict[str, LimitAmount]:
    for name in changed:
        if name not in sheet.limits:
            raise RuleSheetError(f"{file}: {sheet.id} has no limit '{name}'{nearest(name, sheet.limits)}")
    return {**sheet.limits, **changed}
