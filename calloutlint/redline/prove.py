"""Redlines for the findings of a package, each proven by checking the corrected sheets again."""

from collections import Counter
from collections.abc import Callable, Iterator, Mapping, Sequence
from dataclasses import replace
from typing import NamedTuple

from calloutlint.callouts.parse import parse_callout
from calloutlint.callouts.write import Style, write_callout
from calloutlint.model.callout import Callout
from calloutlint.model.drawing import Package
from calloutlint.model.source import SourceLine
from calloutlint.redline.edits import UndeterminedError, corrected
from calloutlint.rulebook.finding import Finding
from calloutlint.units import Unit

Check = Callable[[Package], Sequence[Finding]]
Place = tuple[str, str, str]


class Redline(NamedTuple):
    """A corrected callout: `text` in canonical lines, `callout` as a model.

    `proven` says that the corrected sheet, checked again, no longer has the finding and has no new one of
    its grade or worse.
    """

    text: str
    proven: bool
    callout: Callout


def redlines(package: Package, findings: Sequence[Finding], check: Check) -> dict[int, Redline]:
    """The redline of each finding that has one, by the finding's index.

    Corrections of different callouts are proven together, one check for many; only where such a check finds
    something amiss is the batch divided to tell which correction is at fault.
    """
    drafts = {i: draft for i, finding in enumerate(findings) if (draft := _draft(finding)) is not None}
    before = Counter(_place(finding) for finding in findings)
    proven: set[int] = set()
    for batch in _batches(drafts, findings):
        proven |= _proven(batch, drafts, findings, package, check, before)
    return {i: _redline(draft, findings[i], i in proven) for i, draft in drafts.items()}


def _draft(finding: Finding) -> Callout | None:
    """The corrected callout, read back from its canonical text; None where none is determined."""
    callout = finding.callout
    if callout is None or not finding.edits or finding.drawing is None:
        return None
    unit = finding.drawing.unit
    try:
        changed = corrected(callout, finding.edits, unit)
    except UndeterminedError:
        return None
    return None if changed == callout else _read_back(changed, unit)


def _read_back(callout: Callout, unit: Unit | None) -> Callout | None:
    lines = write_callout(callout, Style.UNICODE, unit)
    first = callout.source[0].number if callout.source else 1
    source = tuple(SourceLine(first + place, 0, line) for place, line in enumerate(lines))
    read = replace(callout, parts=parse_callout(lines, unit), source=source)
    return read if read.parts == callout.parts else None


def _redline(callout: Callout, finding: Finding, proven: bool) -> Redline:
    unit = finding.drawing.unit if finding.drawing else None
    return Redline("\n".join(write_callout(callout, Style.UNICODE, unit)), proven, callout)


def _place(finding: Finding) -> Place:
    drawing = finding.drawing.file if finding.drawing else ""
    return finding.rule, drawing, finding.callout.balloon if finding.callout else ""


def _batches(drafts: Mapping[int, Callout], findings: Sequence[Finding]) -> Iterator[list[int]]:
    """Drafts in batches that hold at most one for each callout."""
    waiting: dict[int, list[int]] = {}
    for i in drafts:
        waiting.setdefault(id(findings[i].callout), []).append(i)
    depth = max(map(len, waiting.values()), default=0)
    for level in range(depth):
        yield [queue[level] for queue in waiting.values() if len(queue) > level]


def _proven(
    batch: list[int],
    drafts: Mapping[int, Callout],
    findings: Sequence[Finding],
    package: Package,
    check: Check,
    before: Counter[Place],
) -> set[int]:
    """Those of a batch whose corrections hold, dividing it where something new appears or something stays."""
    changes = {id(findings[i].callout): drafts[i] for i in batch}
    after = check(with_callouts(package, changes))
    tally = Counter(_place(finding) for finding in after)
    gone = {i for i in batch if tally[_place(findings[i])] < before[_place(findings[i])]}
    worst_new = max((f.grade for f in after if tally[_place(f)] > before[_place(f)]), default=None)
    clean = {i for i in gone if worst_new is None or worst_new < findings[i].grade}
    if len(clean) == len(batch) or len(batch) == 1:
        return clean
    half = len(batch) // 2
    parts = (batch[:half], batch[half:])
    return {i for part in parts for i in _proven(part, drafts, findings, package, check, before)}


def with_callouts(package: Package, changes: Mapping[int, Callout]) -> Package:
    """The package with some of its callouts replaced, by the `id` of the old one."""
    drawings = tuple(
        replace(drawing, callouts=tuple(changes.get(id(callout), callout) for callout in drawing.callouts))
        for drawing in package.drawings
    )
    return replace(package, drawings=drawings)
