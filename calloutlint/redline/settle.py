"""All proven corrections of a package applied, one after another, until nothing is left to correct."""

from collections.abc import Sequence
from typing import NamedTuple

from calloutlint.model.callout import Callout
from calloutlint.model.drawing import Drawing, Package
from calloutlint.redline.prove import Check, Redline, redlines, with_callouts
from calloutlint.rulebook.finding import Finding

MOST_ROUNDS = 12


class Correction(NamedTuple):
    """A callout of a drawing as read, and as it is after every proven correction."""

    drawing: Drawing
    old: Callout
    new: Callout


def settle(package: Package, check: Check) -> list[Correction]:
    """Every proven correction of a package.

    A callout with several is corrected one at a time, each correction proven on top of those before it, so
    that they cannot spoil each other.
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
    changes: dict[int, Callout] = {}
    for i, redline in sorted(found.items()):
        if redline.proven:
            changes.setdefault(id(findings[i].callout), redline.callout)
    return changes
