"""The rulebook: every rule in force, ready to check a package."""

import hashlib
import json
from collections.abc import Mapping, Sequence
from dataclasses import dataclass
from functools import cached_property
from pathlib import Path

from calloutlint.errors import RuleSheetError
from calloutlint.facts.subjects import SUBJECTS, subjects, walk
from calloutlint.facts.view import View
from calloutlint.model.drawing import Package
from calloutlint.rulebook.build import build_rule
from calloutlint.rulebook.engine import Engine, ordered
from calloutlint.rulebook.finding import Finding
from calloutlint.rulebook.house import gather
from calloutlint.rulebook.rule import Rule
from calloutlint.rulebook.sheet import Filed


@dataclass(frozen=True)
class Rulebook:
    """Rules in force, sorted by id."""

    rules: tuple[Rule, ...]

    @cached_property
    def digest(self) -> str:
        """SHA-256 over what the rules say, the cases left out; it does not depend on where the files are."""
        contents = [{key: rule.stated[key] for key in rule.stated if key != "case"} for rule in self.rules]
        return hashlib.sha256(json.dumps(contents, sort_keys=True).encode()).hexdigest()

    @cached_property
    def engine(self) -> Engine:
        """The rules sorted for speed."""
        return Engine(self.rules)

    def check(self, package: Package) -> list[Finding]:
        """What the rules find in a package, by drawing, balloon, place in the callout, then grade."""
        return ordered(self.engine.findings(walk(subjects(package))), package)


def load_rulebook(house: Sequence[Path] = (), *, cases: bool = False) -> Rulebook:
    """The rules that ship and those of the house folders.

    Args:
        house: folders of house rule sheets.
        cases: whether the cases of the sheets are wanted, to prove them or show them.

    Raises:
        RuleSheetError: sheets are broken; the message tells every problem with its file and key.
        CalloutlintError: a house folder is missing.
    """
    return build_rulebook(gather(house, cases=cases))


def build_rulebook(sheets: Sequence[Filed], known: Mapping[str, type[View]] = SUBJECTS) -> Rulebook:
    """The rulebook of some sheets.

    Raises:
        RuleSheetError: texts of sheets are wrong; the message tells all of them.
    """
    problems: list[str] = []
    rules = []
    for filed in sheets:
        try:
            rules.append(build_rule(filed, known))
        except RuleSheetError as error:
            problems.append(str(error))
    if problems:
        raise RuleSheetError("\n".join(problems))
    return Rulebook(tuple(rules))
