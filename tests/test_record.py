"""The record of a review: its keys and their order, its schema, and how it reaches a file."""

import json
import os
import stat
from decimal import Decimal
from pathlib import Path
from typing import Any

import jsonschema
import pytest

from calloutlint import __version__
from calloutlint._whole import write_whole
from calloutlint.errors import CalloutlintError
from calloutlint.model.callout import Callout
from calloutlint.model.drawing import Drawing, Package, SheetLine, Standard
from calloutlint.model.frame import Characteristic, Segment, Zone, ZoneShape
from calloutlint.model.source import SourceLine, Span
from calloutlint.model.values import Value
from calloutlint.redline.prove import Redline
from calloutlint.report.files import check_report_path, write_report
from calloutlint.report.record import record_schema, record_text
from calloutlint.review import Judged, Review
from calloutlint.rulebook.finding import Finding, Grade
from calloutlint.rulebook.house_change import HouseChange
from calloutlint.units import Unit

ZONE = Zone(ZoneShape.DIAMETER, Value(".014", Decimal(".014"), Unit.INCH), span=Span(1, 4, 9))
SEGMENT = Segment(Characteristic.POSITION, ZONE, span=Span(1, 0, 9))
SOURCE = (SourceLine(17, 6, "4X ⌀.281 +.007 -.002 THRU"), SourceLine(18, 10, "⌖ | ⌀.014"))
CALLOUT = Callout("4", (), "C4", SOURCE)
STRAY = SheetLine(9, "finsh: plain", "finsh", "plain", known=False)
DRAWING = Drawing(
    file="gate/sg-2207.txt",
    number="SG-2207",
    revision="B",
    standard=Standard("ASME Y14.5-2018"),
    unit=Unit.INCH,
    callouts=(CALLOUT, Callout("5", ())),
    remarks=("read as UTF-16",),
)
RETIRED = HouseChange("WEIR-09", "retired", "our weirs have no gates", "house/weirs.toml")


def finding(grade: Grade, **place: Any) -> Finding:
    return Finding("WEIR-01", grade, "A title", "A message.", **place)


def review(*findings: Judged, drawings: tuple[Drawing, ...] = (DRAWING,), name: str = "Gate") -> Review:
    return Review(Package(name, drawings), 81, "5eed", Grade.MAJOR, findings, (RETIRED,))


REVIEW = review(
    Judged(finding(Grade.CRITICAL, drawing=DRAWING, part=STRAY)),
    Judged(
        finding(
            Grade.MAJOR,
            drawing=DRAWING,
            callout=CALLOUT,
            part=ZONE,
            span=ZONE.span,
            figures={"hole.mmc": ".279 in"},
            assumed="a clearance hole",
        ),
        Redline("4X ⌀.281\n⌖ | ⌀.014 Ⓜ", True, CALLOUT),
    ),
    Judged(finding(Grade.MINOR, drawing=DRAWING, callout=CALLOUT)),
    Judged(finding(Grade.OBSERVATION)),
)


def test_the_record_has_the_keys_of_its_contract_in_their_order() -> None:
    told = json.loads(record_text(REVIEW))
    assert list(told) == ["program", "rulebook", "gate", "tally", "drawings", "package"]
    assert told["program"] == {"name": "calloutlint", "version": __version__}
    assert told["rulebook"] == {
        "rules": 81,
        "digest": "5eed",
        "house": [{"rule": "WEIR-09", "done": "retired", "why": "our weirs have no gates"}],
    }
    assert told["gate"] == "major"
    assert list(told["tally"].items()) == [("critical", 1), ("major", 1), ("minor", 1), ("observation", 1)]
    drawing = told["drawings"][0]
    findings = drawing.pop("findings")
    assert list(drawing.items()) == [
        ("drawing", "SG-2207"),
        ("revision", "B"),
        ("file", "gate/sg-2207.txt"),
        ("standard", "ASME Y14.5-2018"),
        ("units", "inch"),
        ("callouts", 2),
        ("remarks", ["read as UTF-16"]),
    ]
    assert list(findings[1].items()) == [
        ("rule", "WEIR-01"),
        ("grade", "major"),
        ("balloon", "4"),
        ("zone", "C4"),
        ("line", 18),
        ("span", [14, 19]),
        ("callout", "4X ⌀.281 +.007 -.002 THRU\n⌖ | ⌀.014"),
        ("title", "A title"),
        ("message", "A message."),
        ("figures", {"hole.mmc": ".279 in"}),
        ("assumed", "a clearance hole"),
        ("redline", {"text": "4X ⌀.281\n⌖ | ⌀.014 Ⓜ", "proven": True}),
        ("waived", None),
    ]


def test_findings_stand_on_their_callout_their_drawing_or_the_package() -> None:
    told = json.loads(record_text(REVIEW))
    places = [(f["balloon"], f["line"], f["span"]) for f in told["drawings"][0]["findings"]]
    assert places == [(None, 9, None), ("4", 18, [14, 19]), ("4", 17, None)]
    assert told["package"]["name"] == "Gate"
    assert [(f["balloon"], f["grade"]) for f in told["package"]["findings"]] == [(None, "observation")]


@pytest.mark.parametrize("sample", [REVIEW, review(), review(drawings=(Drawing("x.txt"),))])
def test_every_record_is_valid_under_the_exported_schema(sample: Review) -> None:
    validator = jsonschema.Draft202012Validator(record_schema())
    validator.check_schema(record_schema())
    validator.validate(json.loads(record_text(sample)))


def test_the_schema_refuses_what_is_no_record() -> None:
    validator = jsonschema.Draft202012Validator(record_schema())
    told = json.loads(record_text(REVIEW))
    assert not validator.is_valid({**told, "gate": "severe"})
    assert not validator.is_valid({**told, "more": 1})
    assert not validator.is_valid({key: value for key, value in told.items() if key != "tally"})


def test_a_file_name_that_is_no_text_does_not_spoil_the_record() -> None:
    odd = Drawing("caf\udce9.txt")
    assert json.loads(record_text(review(drawings=(odd,))))["drawings"][0]["file"] == "caf�.txt"


def test_a_report_replaces_an_older_one_and_leaves_nothing_beside_it(tmp_path: Path) -> None:
    path = tmp_path / "with spaces.json"
    path.write_text("old")
    path.chmod(0o640)
    write_report(path, REVIEW)
    assert json.loads(path.read_text(encoding="utf-8"))["gate"] == "major"
    assert stat.S_IMODE(path.stat().st_mode) == 0o640
    assert list(tmp_path.iterdir()) == [path]


def test_a_report_goes_through_a_link_to_the_file_that_it_names(tmp_path: Path) -> None:
    target, link = tmp_path / "target.json", tmp_path / "link.json"
    target.write_text("old")
    link.symlink_to(target)
    write_whole(link, b"new")
    assert link.is_symlink()
    assert target.read_text() == "new"


def test_a_failed_write_leaves_the_old_report(tmp_path: Path, monkeypatch: pytest.MonkeyPatch) -> None:
    path = tmp_path / "r.json"
    path.write_text("old")

    def refuse(_self: Path, _target: Path) -> None:
        raise OSError(28, "No space left on device")

    monkeypatch.setattr(Path, "replace", refuse)
    with pytest.raises(CalloutlintError, match="no space left"):
        write_whole(path, b"new")
    assert path.read_text() == "old"
    assert list(tmp_path.iterdir()) == [path]


SUFFIX = "No report can be written to '{0}': the suffix says which kind is wanted, and it has"
POSSIBLE = "What can be written now: .json."


@pytest.mark.parametrize(
    ("name", "expected"),
    [
        ("r.html", f"{SUFFIX} '.html'. {POSSIBLE}"),
        ("report", f"{SUFFIX} none. {POSSIBLE}"),
        ("folder.json", "No report can be written to '{0}': there is a folder of that name."),
        ("no/r.json", "No report can be written to '{0}': there is no folder '{1}'."),
    ],
)  # fmt: skip
def test_a_report_that_cannot_be_written_is_refused_before_any_work(
    tmp_path: Path, name: str, expected: str
) -> None:
    (tmp_path / "folder.json").mkdir()
    path = tmp_path / name
    with pytest.raises(CalloutlintError) as caught:
        check_report_path(path)
    assert str(caught.value) == expected.format(path, path.parent)


def test_a_report_that_may_not_be_written_is_refused_before_any_work(
    tmp_path: Path, monkeypatch: pytest.MonkeyPatch
) -> None:
    """Whoever runs the tests: what the system says of permissions is made up."""
    path = tmp_path / "r.json"
    monkeypatch.setattr(os, "access", lambda *_: False)
    with pytest.raises(CalloutlintError) as caught:
        check_report_path(path)
    assert str(caught.value) == f"'{path}' cannot be written: the folder '{tmp_path}' takes no new files."
    path.write_text("old")
    with pytest.raises(CalloutlintError) as caught:
        check_report_path(path)
    assert str(caught.value) == f"'{path}' cannot be written: the file is write-protected."
