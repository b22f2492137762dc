"""House rule sheets: rules of one's own, and sheets that retire or amend a shipped rule."""

from collections.abc import Iterator, Mapping, Sequence
from importlib.resources.abc import Traversable
from pathlib import Path

from calloutlint._resources import folder
from calloutlint.errors import CalloutlintError, RuleSheetError
from calloutlint.rulebook.sheet import Amendment, Filed, LimitAmount, Sheet, read_sheet
from calloutlint.rulebook.text_error import nearest

Place = Path | Traversable


def sheet_files(place: Place) -> list[Place]:
    """Every .toml file of a folder and its folders, sorted by name.

    Raises:
        CalloutlintError: there is no such folder.
    """
    if not place.is_dir():
        raise CalloutlintError(f"{place}: there is no such folder of rule sheets")
    return list(_found(place))


def _found(place: Place) -> Iterator[Place]:
    for entry in sorted(place.iterdir(), key=lambda entry: entry.name):
        if entry.is_dir():
            yield from _found(entry)
        elif entry.name.endswith(".toml"):
            yield entry


def gather(house: Sequence[Path], *, cases: bool) -> list[Filed]:
    """Every sheet that ships and every sheet of the house folders, amendments applied, sorted by id.

    Raises:
        RuleSheetError: sheets are broken, or an id is used twice, or an amendment is about no rule. Every
            problem is told.
        CalloutlintError: a house folder is missing.
    """
    files = [file for place in (folder("rules"), *house) for file in sheet_files(place)]
    return combine(_read(files, cases=cases))


def _read(files: Sequence[Place], *, cases: bool) -> list[tuple[str, Sheet | Amendment]]:
    problems: list[str] = []
    sheets = []
    for file in files:
        try:
            sheets.append((str(file), read_sheet(_text(file), str(file), cases=cases)))
        except RuleSheetError as error:
            problems.append(str(error))
    if problems:
        raise RuleSheetError("\n".join(problems))
    return sheets


def _text(file: Place) -> str:
    try:
        return file.read_text(encoding="utf-8")
    except UnicodeDecodeError:
        raise RuleSheetError(f"{file}: a rule sheet must be UTF-8 text") from None
    except OSError as error:
        raise RuleSheetError(f"{file}: cannot be read: {error.strerror}") from None


def combine(sheets: Sequence[tuple[str, Sheet | Amendment]]) -> list[Filed]:
    """Rules by id, with what amendments change in them.

    Raises:
        RuleSheetError: an id is used twice, or an amendment does not fit a rule.
    """
    rules: dict[str, Filed] = {}
    problems: list[str] = []
    for file, sheet in sheets:
        if isinstance(sheet, Amendment):
            continue
        if sheet.id in rules:
            problems.append(f"{file}: {sheet.id} is the id of another rule already, in {rules[sheet.id].file}")
        rules[sheet.id] = Filed(file, sheet)
    for file, sheet in sheets:
        if isinstance(sheet, Amendment):
            try:
                _amend(rules, sheet, file)
            except RuleSheetError as error:
                problems.append(str(error))
    if problems:
        raise RuleSheetError("\n".join(problems))
    return [rules[id_] for id_ in sorted(rules)]


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
