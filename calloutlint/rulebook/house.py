"""House rule sheets: rules of one's own, and sheets that retire or amend a shipped rule."""

from collections.abc import Mapping, Sequence

from calloutlint.errors import RuleSheetError
from calloutlint.rulebook.files import SheetText
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
        RuleSheetError: an id is used twice.
    """
    rules: dict[str, Filed] = {}
    problems: list[str] = []
    for file, sheet in sheets:
        if isinstance(sheet, Amendment):
            continue
        if sheet.id in rules:
            problems.append(f"{file}: {sheet.id} is the id of another rule already, in {rules[sheet.id].file}")
        rules[sheet.id] = Filed(file, sheet)
    if problems:
        raise RuleSheetError("\n".join(problems))
    return [rules[id_] for id_ in sorted(rules)]


def amended(written: Sequence[Filed], sheets: Sequence[tuple[str, Sheet | Amendment]]) -> list[Filed]:
    """Rules with what amendments change in them.

    Raises:
        RuleSheetError: an amendment does not fit a rule; every problem is told.
    """
    rules = {filed.sheet.id: filed for filed in written}
    problems: list[str] = []
    for file, sheet in sheets:
        if isinstance(sheet, Amendment):
            try:
                _amend(rules, sheet, file)
            except RuleSheetError as error:
                problems.append(str(error))
    if problems:
        raise RuleSheetError("\n".join(problems))
    return list(rules.values())


def _amend(rules: dict[str, Filed], amendment: Amendment, file: str) -> None:
    filed = rules.get(amendment.rule)
    if filed is None:
        raise RuleSheetError(f"{file}: there is no rule {amendment.rule}{nearest(amendment.rule, rules)}")
    if amendment.retires:
        del rules[amendment.rule]
        return
    changes: dict[str, object] = {"limits": _limits(filed.sheet, amendment.limits, file)}
    if amendment.grade:
        changes["grade"] = amendment.grade
    rules[amendment.rule] = Filed(filed.file, filed.sheet.model_copy(update=changes))


def _limits(sheet: Sheet, changed: Mapping[str, LimitAmount], file: str) -> dict[str, LimitAmount]:
    for name in changed:
        if name not in sheet.limits:
            raise RuleSheetError(f"{file}: {sheet.id} has no limit '{name}'{nearest(name, sheet.limits)}")
    return {**sheet.limits, **changed}
