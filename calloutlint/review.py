"""A review: what was found in a package, with the correction of each finding."""

from dataclasses import dataclass
from typing import NamedTuple

from calloutlint.model.drawing import Package
from calloutlint.redline.prove import Redline, redlines
from calloutlint.rulebook.finding import Finding, Grade
from calloutlint.rulebook.house_change import HouseChange
from calloutlint.rulebook.rulebook import Rulebook


class Judged(NamedTuple):
    """A finding, and its correction where one is determined."""

    finding: Finding
    redline: Redline | None = None


@dataclass(frozen=True, slots=True)
class Review:
    """The outcome of checking a package.

    `findings` are in the order of the drawings; `house` is what house sheets changed in the rules applied.
    """

    package: Package
    rulebook_size: int
    rulebook_digest: str
    gate: Grade
    findings: tuple[Judged, ...]
    house: tuple[HouseChange, ...] = ()

    def count(self, grade: Grade) -> int:
        """How many findings are of a grade."""
        return sum(judged.finding.grade is grade for judged in self.findings)

    @property
    def at_gate(self) -> int:
        """How many findings stand at the gate or above it."""
        return sum(self.count(grade) for grade in Grade if grade >= self.gate)

    @property
    def unread(self) -> int:
        """How many parts of callouts, and lines of no callout, could not be read."""
        callouts = (callout for drawing in self.package.drawings for callout in drawing.callouts)
        stray = (line for drawing in self.package.drawings for line in drawing.lines if line.key is None)
        return sum(len(callout.unread) for callout in callouts) + sum(not line.known for line in stray)


def review(package: Package, rulebook: Rulebook, gate: Grade = Grade.MAJOR) -> Review:
    """Check a package against a rulebook and work out the correction of each finding that has one."""
    findings = rulebook.check(package)
    corrections = redlines(package, findings, rulebook.check)
    judged = tuple(Judged(finding, corrections.get(i)) for i, finding in enumerate(findings))
    return Review(package, len(rulebook.rules), rulebook.digest, gate, judged, rulebook.changes)
