"""The record of a review for programs: the JSON that `--report FILE.json` writes, and its schema."""

from typing import Any, Literal

from pydantic import BaseModel, ConfigDict, Field

from calloutlint import __version__
from calloutlint.model.drawing import Drawing
from calloutlint.report.faulty import faulty_span
from calloutlint.review import Judged, Review
from calloutlint.rulebook.finding import Finding, Grade

GradeWord = Literal["critical", "major", "minor", "observation"]


class _Entry(BaseModel):
    model_config = ConfigDict(extra="forbid", frozen=True)


class Program(_Entry):
    """The program that made the record."""

    name: Literal["calloutlint"] = "calloutlint"
    version: str


class HouseEntry(_Entry):
    """A rule that a house sheet retired or amended."""

    rule: str
    done: str = Field(description="retired, or amended with what changed")
    why: str


class RulebookStamp(_Entry):
    """The rulebook that was applied: how many rules, and a digest of their sheets."""

    rules: int
    digest: str
    house: list[HouseEntry] = Field(description="what house sheets changed in the rules, in their order")


class Tally(_Entry):
    """How many findings there are by grade."""

    critical: int
    major: int
    minor: int
    observation: int


class RedlineEntry(_Entry):
    """A proposed correction: the whole callout in canonical text."""

    text: str
    proven: bool = Field(
        description="the corrected sheet, checked again, has lost the finding and gained none as grave"
    )


class FindingEntry(_Entry):
    """A finding. What has no place in a sheet has null for its line and span."""

    rule: str
    grade: GradeWord
    balloon: str | None = Field(description="null for a finding about the drawing or the package")
    zone: str | None
    line: int | None = Field(description="line of the file, from 1")
    span: tuple[int, int] | None = Field(description="columns of that line, from 0, the end excluded")
    callout: str | None = Field(description="the callout as the sheet has it")
    title: str
    message: str
    figures: dict[str, str] = Field(description="the numbers behind the message, by the name of the fact")
    assumed: str | None
    redline: RedlineEntry | None
    waived: None = Field(default=None, description="always null: this version reads no waivers")


class DrawingEntry(_Entry):
    """A drawing and its findings."""

    drawing: str | None
    revision: str | None
    file: str
    standard: str | None
    units: Literal["inch", "mm"] | None
    callouts: int
    remarks: list[str] = Field(description="how the file had to be read, such as its encoding")
    findings: list[FindingEntry]


class PackageEntry(_Entry):
    """The package, with the findings that stand on no drawing."""

    name: str
    findings: list[FindingEntry]


class Record(_Entry):
    """A review as a record."""

    program: Program
    rulebook: RulebookStamp
    gate: GradeWord
    tally: Tally
    drawings: list[DrawingEntry]
    package: PackageEntry


def record(review: Review) -> Record:
    """The record of a review."""
    package = review.package
    return Record(
        program=Program(version=__version__),
        rulebook=_stamp(review),
        gate=_word(review.gate),
        tally=Tally(**{grade.word: review.count(grade) for grade in Grade}),
        drawings=[_drawing(drawing, review) for drawing in package.drawings],
        package=PackageEntry(name=_encodable(package.name), findings=_findings(review, None)),
    )


def record_text(review: Review) -> str:
    """The record as JSON text."""
    return record(review).model_dump_json(indent=2) + "\n"


def record_schema() -> dict[str, Any]:
    """The JSON schema of the record."""
    schema = Record.model_json_schema(mode="serialization")
    return {"$schema": "https://json-schema.org/draft/2020-12/schema", **schema, "title": "calloutlint record"}


def _stamp(review: Review) -> RulebookStamp:
    house = [HouseEntry(rule=each.rule, done=each.done, why=each.why) for each in review.house]
    return RulebookStamp(rules=review.rulebook_size, digest=review.rulebook_digest, house=house)


def _drawing(drawing: Drawing, review: Review) -> DrawingEntry:
    return DrawingEntry(
        drawing=drawing.number,
        revision=drawing.revision,
        file=_encodable(drawing.file),
        standard=drawing.standard.written if drawing.standard else None,
        units=_units(drawing),
        callouts=len(drawing.callouts),
        remarks=list(drawing.remarks),
        findings=_findings(review, drawing),
    )


def _units(drawing: Drawing) -> Literal["inch", "mm"] | None:
    return None if drawing.unit is None else ("inch" if drawing.unit.value == "inch" else "mm")


def _findings(review: Review, drawing: Drawing | None) -> list[FindingEntry]:
    return [_finding(judged) for judged in review.findings if judged.finding.drawing is drawing]


def _finding(judged: Judged) -> FindingEntry:
    finding, redline = judged.finding, judged.redline
    callout = finding.callout
    line, span = _place(finding)
    return FindingEntry(
        rule=finding.rule,
        grade=_word(finding.grade),
        balloon=callout.balloon if callout else None,
        zone=callout.zone if callout else None,
        line=line,
        span=span,
        callout="\n".join(source.text for source in callout.source) if callout else None,
        title=finding.title,
        message=finding.message,
        figures=dict(finding.figures),
        assumed=finding.assumed,
        redline=RedlineEntry(text=redline.text, proven=redline.proven) if redline else None,
    )


def _place(finding: Finding) -> tuple[int | None, tuple[int, int] | None]:
    """The line of the file and the columns on it; the callout's first line where no part is meant."""
    if finding.callout is None:
        number = getattr(finding.part, "number", None)
        return (number if isinstance(number, int) else None), None
    source = finding.callout.source
    span = faulty_span(finding)
    if span is not None and span.line < len(source):
        line = source[span.line]
        return line.number, (line.column + span.start, line.column + span.end)
    return (source[0].number if source else None), None


def _word(grade: Grade) -> GradeWord:
    words: dict[Grade, GradeWord] = {
        Grade.CRITICAL: "critical",
        Grade.MAJOR: "major",
        Grade.MINOR: "minor",
        Grade.OBSERVATION: "observation",
    }
    return words[grade]


def _encodable(text: str) -> str:
    """A file name as valid text: bytes that are no UTF-8 become `�`."""
    return text.encode("utf-8", "surrogateescape").decode("utf-8", "replace")
