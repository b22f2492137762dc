"""The engine: which rules are asked, where findings stand, in what order, and what yields to what."""

from __future__ import annotations

import os
import subprocess
import sys
from decimal import Decimal
from pathlib import Path

import pytest

from calloutlint.model.callout import Callout
from calloutlint.model.drawing import Drawing, Package
from calloutlint.model.frame import DatumRef, Segment, Zone
from calloutlint.reading.sheet import parse_sheet
from calloutlint.redline.edits import VERBS
from calloutlint.rulebook.build import build_rules
from calloutlint.rulebook.engine import agenda_of, balloon_key
from calloutlint.rulebook.finding import Edit, Finding, Grade
from calloutlint.rulebook.rule import Rule
from calloutlint.rulebook.rulebook import Rulebook, load_rulebook
from calloutlint.rulebook.sheet import Filed, Sheet

HEAD = "drawing: WG-1\nrevision: A\nstandard: ASME Y14.5-2018\nunits: inch\n\n"
COVER = (
    HEAD
    + "4) 4X ⌀.281 +.007 -.002 THRU\n   ⌖ | ⌀.014 | A | B\n   ⟂ | ⌀.005 | A\n2) .500 ±.005\n   ⏥ | .010 | B\n"
)


def rule(id_: str = "HOUSE-01", **keys: object) -> Rule:
    stated: dict[str, object] = {
        "id": id_,
        "title": "A test",
        "grade": "major",
        "examine": "frame",
        "holds": ["ASME Y14.5", "ISO GPS"],
        "basis": "common practice",
        "demand": "never",
        "say": "{frame.characteristic}",
    }
    sheet = Sheet.model_validate(stated | keys)
    return build_rules([Filed("h.toml", sheet)])[0]


def package(*sheets: str) -> Package:
    return Package("test", tuple(parse_sheet(text, f"{n}.txt") for n, text in enumerate(sheets, start=1)))


def check(rules: list[Rule], *sheets: str) -> list[Finding]:
    return Rulebook(tuple(rules)).check(package(*(sheets or (COVER,))))


def test_a_finding_stands_on_the_line_that_breaks_the_rule() -> None:
    finding = check([rule(when="frame is perpendicularity")])[0]
    assert finding.message == "perpendicularity"
    assert isinstance(finding.callout, Callout)
    assert finding.callout.balloon == "4"
    assert isinstance(finding.part, Segment)
    assert finding.span == finding.part.span
    assert finding.span.line == 2
    assert isinstance(finding.drawing, Drawing)
    assert finding.drawing.number == "WG-1"


def test_findings_come_by_drawing_balloon_place_and_grade() -> None:
    second = COVER.replace("WG-1", "WG-2").replace("2)", "10)")
    rules = [
        rule("HOUSE-01", grade="minor"),
        rule("HOUSE-02", grade="critical", when="frame is not flatness"),
        rule("HOUSE-03", examine="drawing", say="{drawing.number}"),
    ]
    found = [
        (f.drawing.number, f.callout.balloon if f.callout else "", f.message, f.grade.word)
        for f in check(rules, COVER, second)
        if f.drawing
    ]
    assert found == [
        ("WG-1", "", "WG-1", "major"),
        ("WG-1", "2", "flatness", "minor"),
        ("WG-1", "4", "position", "critical"),
        ("WG-1", "4", "position", "minor"),
        ("WG-1", "4", "perpendicularity", "critical"),
        ("WG-1", "4", "perpendicularity", "minor"),
        ("WG-2", "", "WG-2", "major"),
        ("WG-2", "4", "position", "critical"),
        ("WG-2", "4", "position", "minor"),
        ("WG-2", "4", "perpendicularity", "critical"),
        ("WG-2", "4", "perpendicularity", "minor"),
        ("WG-2", "10", "flatness", "minor"),
    ]


def test_balloons_sort_as_people_count() -> None:
    balloons = ["10", "4A", "4", "4.10", "2", "4.2", "A1"]
    assert sorted(balloons, key=balloon_key) == ["2", "4", "4.2", "4.10", "4A", "10", "A1"]


def test_a_rule_yields_on_the_same_frame_line_only() -> None:
    strong = rule("HOUSE-01", when="frame is position")
    weak = rule("HOUSE-02", yields_to=["HOUSE-01"])
    found = [(f.rule, f.message) for f in check([strong, weak])]
    assert found == [("HOUSE-02", "flatness"), ("HOUSE-01", "position"), ("HOUSE-02", "perpendicularity")]


def test_a_rule_about_a_datum_yields_to_one_about_its_frame_line() -> None:
    strong = rule("HOUSE-01", when="frame is position")
    weak = rule("HOUSE-02", examine="datum", say="{datum.name}", yields_to=["HOUSE-01"])
    found = [(f.rule, f.message, isinstance(f.part, DatumRef)) for f in check([strong, weak]) if f.callout]
    assert found == [("HOUSE-02", "B", True), ("HOUSE-01", "position", False), ("HOUSE-02", "A", True)]


def test_a_rule_about_a_size_yields_to_one_about_its_callout() -> None:
    strong = rule("HOUSE-01", when="frame is position")
    weak = rule("HOUSE-02", examine="size", say="{nominal}", yields_to=["HOUSE-01"])
    assert [(f.rule, f.message) for f in check([strong, weak])] == [
        ("HOUSE-02", ".500"),
        ("HOUSE-01", "position"),
    ]


def test_only_rules_for_the_drawings_standard_are_asked() -> None:
    rules = [
        rule("HOUSE-01", holds=["ISO GPS"], say="iso"),
        rule("HOUSE-02", holds=["ASME Y14.5-2018"], say="2018"),
        rule("HOUSE-03", say="both"),
    ]
    for standard, expected in [
        ("ASME Y14.5-2018", {"2018", "both"}),
        ("ASME Y14.5-2009", {"both"}),
        ("ISO 8015", {"iso", "both"}),
        ("OUR OWN BOOK", {"both"}),
    ]:
        text = COVER.replace("ASME Y14.5-2018", standard)
        assert {f.message for f in check(rules, text)} == expected


def test_parts_beside_unread_text_are_skipped() -> None:
    text = HEAD + "1) .500 ±.005\n   ⌖ | .010 Ⓜ | A\n2) .500 ±.005\n   ⌖ | .010 Ⓜ | ?!? | B\n"
    for examined, expected in [("frame", ["1"]), ("datum", ["1"]), ("symbol", ["1"]), ("size", ["1", "2"])]:
        found = check([rule(examine=examined, say=examined)], text)
        assert [f.callout.balloon for f in found if f.callout] == expected


def test_rules_sorted_by_a_fact_find_what_all_rules_would() -> None:
    rules = [
        rule("HOUSE-01", when="frame is position"),
        rule("HOUSE-02", when="frame in [flatness, position] and count of datums > 1"),
        rule("HOUSE-03"),
    ]
    agenda = agenda_of(rules)
    assert agenda.fact == "characteristic"
    assert {word.value: [r.id for _, r in few] for word, few in agenda.by_word.items()} == {
        "position": ["HOUSE-01", "HOUSE-02", "HOUSE-03"],
        "flatness": ["HOUSE-02", "HOUSE-03"],
    }
    assert [r.id for _, r in agenda.always] == ["HOUSE-03"]


def test_the_first_variant_that_holds_gives_the_words_and_the_rest_falls_to_the_next() -> None:
    variants = [
        {"when": "frame is position", "grade": "critical"},
        {"when": "hole.clearance", "say": "of a clearance hole", "grade": "observation"},
        {"when": "frame is flatness", "say": "flat"},
    ]
    found = [(f.message, f.grade) for f in check([rule(variant=variants, say="plain")])]
    assert found == [
        ("flat", Grade.MAJOR),
        ("of a clearance hole", Grade.CRITICAL),
        ("of a clearance hole", Grade.OBSERVATION),
    ]


def test_wording_that_meets_an_unknown_gives_way_and_a_rule_without_words_is_silent() -> None:
    variants = [{"when": "frame is position", "say": "{tolerance.projected} high"}]
    assert [f.message for f in check([rule(when="frame is position", variant=variants)])] == ["position"]
    assert check([rule(when="frame is position", say="{tolerance.projected}")]) == []


def test_figures_and_assumptions_come_with_the_finding() -> None:
    asked = rule(
        when="frame is position",
        say="{tolerance} at {hole.mmc}",
        figures=["hole.lmc", "count of datums"],
        assumed="taken for a clearance hole of {hole.nominal}",
    )
    (finding,) = check([asked])
    assert finding.message == ".014 at .279"
    assert finding.figures == {
        "tolerance": ".014 in",
        "hole.mmc": ".279 in",
        "hole.lmc": ".288 in",
        "count of datums": "2",
    }
    assert finding.assumed == "taken for a clearance hole of .281"


def test_an_assumption_that_is_unknown_is_left_out() -> None:
    (finding,) = check([rule(when="frame is position", assumed="{tolerance.projected} high")])
    assert finding.assumed is None


@pytest.mark.parametrize(
    ("redline", "expected"),
    [
        ("add M to tolerance", [("add", "M", Zone, None)]),
        ("drop datums", [("drop", None, tuple, None)]),
        ("drop M from tolerance and add L to tolerance", [("drop", "M", Zone, None), ("add", "L", Zone, None)]),
        ("replace tolerance.value with hole.mmc - .277 in", [("replace", "value", Zone, Decimal(".002"))]),
        ("replace callout.count with 2 * 3", [("replace", "count", Callout, Decimal(6))]),
        ("replace tolerance.value with tolerance.projected", []),
        ("add M to tolerance and replace tolerance.value with tolerance.projected", []),
        ("reorder tolerance.modifiers", [("reorder", "modifiers", Zone, None)]),
        ("respell callout", [("respell", None, Callout, None)]),
        ("", []),
    ],
)
def test_a_redline_names_the_parts_to_change(redline: str, expected: list[tuple[object, ...]]) -> None:
    (finding,) = check([rule(when="frame is position", redline=redline)])
    assert [(e.verb, e.word, type(e.target), e.value) for e in finding.edits] == expected
    assert all(isinstance(edit, Edit) for edit in finding.edits)


def test_every_verb_of_the_language_can_be_carried_out() -> None:
    redlines = ["add M to tolerance", "drop datums", "replace tolerance.value with 3 mm", "reorder tolerance"]
    rules = [rule(f"HOUSE-0{n}", redline=text) for n, text in enumerate([*redlines, "respell callout"])]
    assert {edit.verb for finding in check(rules) for edit in finding.edits} == set(VERBS)


def test_a_finding_may_stand_on_another_view_than_the_examined_one() -> None:
    (finding,) = check([rule(examine="size", say="x", when="nominal < .3 in", stands_on="callout.frames")])
    assert isinstance(finding.part, Segment)
    (other,) = check([rule(examine="size", say="x", when="nominal < .3 in", stands_on="callout")])
    assert isinstance(other.part, Callout)


def test_the_same_is_not_said_twice_of_one_part() -> None:
    found = check([rule(examine="datum", say="once", stands_on="datum.frame")])
    assert [f.span.line for f in found if f.span] == [1, 1, 2]


def test_the_digest_follows_what_rules_say_and_nothing_else() -> None:
    plain = Rulebook((rule(),)).digest
    assert Rulebook((rule(),)).digest == plain
    assert len(plain) == 64
    case = [{"sheet": "", "finds": []}]
    assert Rulebook((rule(case=case),)).digest == plain
    for change in ({"grade": "minor"}, {"demand": "composite"}, {"say": "x"}, {"limits": {"far": "3 mm"}}):
        assert Rulebook((rule(**change),)).digest != plain


FIRST = "import sys; from calloutlint.rulebook.rulebook import load_rulebook; book = load_rulebook(); "
TELL = "print(len(book.rules), book.digest, *sorted({'lark', 'pydantic.main', 'tomllib'} & sys.modules.keys()))"


def run_apart(home: Path) -> list[str]:
    env = {**os.environ, "XDG_CACHE_HOME": str(home)}
    done = subprocess.run(
        [sys.executable, "-c", FIRST + TELL], env=env, capture_output=True, text=True, check=True
    )
    return done.stdout.split()


def test_the_checked_rules_are_kept_and_read_back_the_same(tmp_path: Path) -> None:
    book = load_rulebook()
    told = [str(len(book.rules)), book.digest]
    assert run_apart(tmp_path) == [*told, "lark", "pydantic.main", "tomllib"]
    assert run_apart(tmp_path) == told
    for kept in (tmp_path / "calloutlint").glob("*.tables"):
        kept.write_bytes(b"not a pickle")
    assert run_apart(tmp_path)[:2] == told
