"""A review: what was found in a package, with the correction of each finding and what is waived."""

from dataclasses import dataclass
from typing import NamedTuple

from calloutlint.model.drawing import Package
from calloutlint.redline.prove import Redline, redlines
from calloutlint.rulebook.finding import Finding, Grade
from calloutlint.rulebook.rulebook import Rulebook


class Judged(NamedTuple):
    """A finding, its correction where one is determined, and why it is waived where it is."""

    finding: Finding
    redline: Redline | None = None
    waived: str | None = None


@dataclass(frozen=True, slots=True)
class Review:
    """The outcome of checking a package; `findings` in the order of the drawings."""

    package: Package
    rulebook_size: int
    rulebook_digest: str
    gate: Grade
    findings: tuple[Judged, ...]

    def count(self, grade: Grade) -> int:
        """How many findings of a grade stand, waived ones left out."""
        return sum(judged.finding.grade is grade for judged in self.findings if judged.waived is None)

    @property
    def at_gate(self) -> int:
        """How many findings stand at the gate or above it, waived ones left out."""
        return sum(self.count(grade) for grade in Grade if grade >= self.gate)

    @property
    def unread(self) -> int:
        """How many parts of callouts, and lines of no callout, could not be read; waived ones are left out."""
        accepted = {id(judged.finding.part) for judged in self.findings if judged.waived is not None}
        callouts = (callout for drawing in self.package.drawings for callout in drawing.callouts)
        parts = (part for callout in callouts for part in callout.unread)
        stray = (line for drawing in self.package.drawings for line in drawing.lines if line.key is None)
        lost = [*parts, *(line for line in stray if not line.known)]
        return sum(id(part) not in accepted for part in lost)


def review(package: Package, rulebook: Rulebook, gate: Grade = Grade.MAJOR) -> Review:
    """Check a package against a rulebook and work out the correction of each finding that has one."""
    findings = rulebook.check(package)
    corrections = redlines(package, findings, rulebook.check)
    judged = tuple(Judged(finding, corrections.get(i)) for i, finding in enumerate(findings))
    return Review(package, len(rulebook.rules), rulebook.digest, gate, judged)
