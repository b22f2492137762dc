"""The rulebook: every rule in force, ready to check a package."""

import hashlib
import json
from collections.abc import Iterator, Sequence
from dataclasses import dataclass
from functools import cached_property
from importlib.resources import files
from pathlib import Path

from calloutlint._resources import folder, read_text
from calloutlint._saved import kept
from calloutlint.facts.views.subjects import subjects, walk
from calloutlint.model.drawing import Package
from calloutlint.rulebook.engine import Engine, ordered
from calloutlint.rulebook.files import SheetText, read_texts
from calloutlint.rulebook.finding import Finding
from calloutlint.rulebook.house_change import HouseChange
from calloutlint.rulebook.rule import Rule

CODE_FOLDERS = ("facts", "model", "rulebook")


@dataclass(frozen=True)
class Rulebook:
    """Rules in force, sorted by id; `as_written` are all rules without what house sheets change in them."""

    rules: tuple[Rule, ...]
    as_written: tuple[Rule, ...] = ()
    changes: tuple[HouseChange, ...] = ()

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


def load_rulebook(house: Sequence[Path] = ()) -> Rulebook:
    """The rules that ship and those of the house folders.

    They are kept from one run to the next, since to read and check every sheet again would take longer than
    most drawings do.

    Raises:
        RuleSheetError: sheets are broken; the message tells every problem with its file and key.
        CalloutlintError: a house folder is missing.
    """
    texts = read_texts((folder("rules"), *house))
    return kept(lambda: _built(texts), texts, list(_code_stamps()))


def _built(texts: Sequence[SheetText]) -> Rulebook:
    # Only a first run pays for the libraries that read and check sheets.
    from calloutlint.rulebook.build import build_rules
    from calloutlint.rulebook.house import amended, filed_rules, read_sheets

    sheets = read_sheets(texts)
    written = filed_rules(sheets)
    in_force = amended(written, sheets)
    rules = build_rules(in_force.rules)
    as_written = build_rules(written) if in_force.changes else rules
    rulebook = Rulebook(rules, as_written, in_force.changes)
    _ = rulebook.digest  # kept with it
    return rulebook


def _code_stamps() -> Iterator[object]:
    """What tells one state of the code that rules run on from another, while it is being worked on."""
    yield read_text("grammar", "condition.lark")
    places = (files("calloutlint") / name for name in CODE_FOLDERS)
    for place in (place for place in places if isinstance(place, Path)):
        for file in sorted(place.rglob("*.py")):
            status = file.stat()
            yield str(file.relative_to(place)), status.st_mtime_ns, status.st_size
