"""Corrections of a rule as they are made for a view."""

from decimal import Decimal
from typing import NamedTuple

from calloutlint.facts.view import View
from calloutlint.rulebook.code import Code
from calloutlint.rulebook.finding import Edit


class Change(NamedTuple):
    """One change.

    `target` gives the view or views to change, `word` the symbol or the fact, `new` the value to write.
    """

    verb: str
    word: str | None
    target: Code
    new: Code | None = None

    def edit(self, view: View) -> Edit | None:
        """The change for an examined view; None where it has no target, or target or value is unknown."""
        target = self.target.read(view)
        new = self.new.read(view) if self.new else None
        if target is None or target == () or (self.new is not None and new is None):
            return None
        part = tuple(item.part for item in target) if isinstance(target, tuple) else target.part
        value = new if new is None or isinstance(new, str | Decimal) else Decimal(new)
        return Edit(self.verb, self.word, part, value)


class Correction(NamedTuple):
    """Changes that together correct what a rule finds."""

    changes: tuple[Change, ...] = ()

    def edits(self, view: View) -> tuple[Edit, ...]:
        """The changes for an examined view; none at all where one of them is unknown."""
        edits = [change.edit(view) for change in self.changes]
        return tuple(edit for edit in edits if edit) if all(edits) else ()
