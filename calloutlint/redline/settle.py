"""All proven corrections of a package applied, one after another, until nothing is left to correct."""

from collections.abc import Sequence
from typing import NamedTuple

from calloutlint.model.callout import Callout
from calloutlint.model.drawing import Drawing, Package
from calloutlint.redline.prove import Check, Redline, redlines, with_callouts
from calloutlint.rulebook.finding import Finding

MOST_ROUNDS = 100


class Correction(NamedTuple):
    """A callout of a drawing as read, and as it is after every proven correction."""

    drawing: Drawing
    old: Callout
    new: Callout


def settle(package: Package, check: Check) -> list[Correction]:
    """Every proven correction of a package.

    Corrections are made rule by rule, one for each callout at a time, each proven on top of those before it:
    so they cannot spoil each other, and of two cures for one joint only the first is taken.
    """
    current = package
    for _ in range(MOST_ROUNDS):
        findings = check(current)
        changes = _first_proven(findings, redlines(current, findings, check))
        if not changes:
            break
        current = with_callouts(current, changes)
    return [
        Correction(before, old, new)
        for before, after in zip(package.drawings, current.drawings, strict=True)
        for old, new in zip(before.callouts, after.callouts, strict=True)
        if old is not new
    ]


def _first_proven(findings: Sequence[Finding], found: dict[int, Redline]) -> dict[int, Callout]:
    """The proven corrections that the first rule with any prescribes, one for each callout."""
    proven = [(findings[i], redline) for i, redline in sorted(found.items()) if redline.proven]
    changes: dict[int, Callout] = {}
    for finding, redline in proven:
        if finding.rule == proven[0][0].rule:
            changes.setdefault(id(finding.callout), redline.callout)
    return changes
