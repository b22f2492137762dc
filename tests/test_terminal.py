"""The parts that a terminal report is drawn with."""

import io
from collections.abc import Sequence

import pytest
from rich.cells import cell_len
from rich.text import Text

from calloutlint.callouts.write import Style
from calloutlint.model.callout import Callout
from calloutlint.model.drawing import Package
from calloutlint.redline.prove import Redline
from calloutlint.report.drawn import draw
from calloutlint.report.layout import DatumRow, FrameRow, Piece, Row, TextRow
from calloutlint.report.marks import Mark, Place
from calloutlint.report.printable import printable
from calloutlint.report.redlines import show_redlines
from calloutlint.report.screen import Screen, draws_symbols
from calloutlint.report.styles import ASCII, UNICODE, Glyphs
from calloutlint.report.words import counted
from calloutlint.report.wrap import wrap
from calloutlint.review import Judged, Review
from calloutlint.rulebook.finding import Finding, Grade

FINDING = Finding("WEIR-01", Grade.MAJOR, "A title", "A message.")
REDLINE = Redline("⏥ | .003", False, Callout("4", ()))
A = Mark("a", "")
B = Mark("b", "")


def frame(*texts: str, lower: bool = False, beside: str = "") -> FrameRow:
    return FrameRow(tuple(map(Piece, texts)), lower=lower, beside=beside)


def drawn(
    rows: Sequence[Row],
    marked: dict[Place, list[Mark]] | None = None,
    glyphs: Glyphs = UNICODE,
    width: int = 80,
) -> str:
    return "\n".join(line.plain for line in draw(rows, marked or {}, glyphs, width))


def lines(text: str) -> str:
    """A picture as written in a test, without its margin."""
    return "\n".join(line.removeprefix("    ").rstrip() for line in text.strip("\n").splitlines()).rstrip()


def test_a_frame_is_drawn_in_compartments_with_its_fault_marked_in_place() -> None:
    rows: list[Row] = [TextRow((Piece("4X ⌀.281"), Piece("THRU"))), frame("⌖", "⌀.014", "A", "B")]
    assert drawn(rows, {Place(1, 1): [A], Place(1, 3): [B]}) == lines("""
    4X ⌀.281 THRU
    ┌───┬───────┬───┬───┐
    │ ⌖ │ ⌀.014 │ A │ B │
    └───┶━━━a━━━┵───┶━b━┙
    """)


def test_the_same_frame_in_ascii() -> None:
    rows: list[Row] = [TextRow((Piece("4X DIA .281"), Piece("THRU"))), frame("POS", "DIA .014", "A", "B")]
    assert drawn(rows, {Place(1, 1): [A], Place(1, 3): [B]}, ASCII) == lines("""
    4X DIA .281 THRU
    +-----+----------+---+---+
    | POS | DIA .014 | A | B |
    +-----+====a=====+---+=b=+
    """)


def test_the_symbol_of_a_composite_frame_stands_across_its_lines() -> None:
    rows = [frame("⌖", "⌀.020 Ⓜ", "A", "B", "C"), frame("", "⌀.006 Ⓜ", "A", lower=True)]
    assert drawn(rows, {Place(0, 1): [A], Place(1, 1): [B]}) == lines("""
    ┌───┬─────────┬───┬───┬───┐
    │   │ ⌀.020 Ⓜ │ A │ B │ C │
    │ ⌖ ┝━━━━a━━━━┽───┼───┴───┘
    │   │ ⌀.006 Ⓜ │ A │
    └───┶━━━━b━━━━┵───┘
    """)


def test_a_mark_on_a_composites_symbol_stands_under_its_last_line() -> None:
    rows = [
        frame("⌓", ".02", "A"),
        frame("", ".01", "A", lower=True),
        frame("", ".005", lower=True),
    ]
    assert drawn(rows, {Place(0, 0): [A]}) == lines("""
    ┌───┬──────┬───┐
    │   │ .02  │ A │
    │   ├──────┼───┤
    │ ⌓ │ .01  │ A │
    │   ├──────┼───┘
    │   │ .005 │
    ┕━a━┵──────┘
    """)


def test_a_line_at_fault_as_a_whole_is_pointed_at_from_the_right() -> None:
    rows = [frame("⌓", ".012", "A", beside="ALL AROUND"), frame("⟂", ".002")]
    assert drawn(rows, {Place(0, None): [A], Place(1, None): [B]}) == lines("""
    ┌───┬──────┬───┐
    │ ⌓ │ .012 │ A │ ALL AROUND ← a
    ├───┼──────┼───┘
    │ ⟂ │ .002 │ ← b
    └───┴──────┘
    """)


def test_datum_feature_symbols_hang_from_what_stands_above_them() -> None:
    rows: list[Row] = [frame("⟂", ".002", "A"), DatumRow((Piece("B"), Piece("C")))]
    assert drawn(rows, {Place(1, 1): [A]}) == lines("""
    ┌───┬──────┬───┐
    │ ⟂ │ .002 │ A │
    └───┴──────┴───┘
      ▼     ▼
    ┌─┴─┐ ┌─┴─┐
    │ B │ │ C │
    └───┘ ┕━a━┙
    """)


def test_marks_in_one_place_share_it_and_marks_that_overlap_stand_under_each_other() -> None:
    rows: list[Row] = [TextRow((Piece("4 HOLES .281 +.01 -.002"),))]
    marked = {
        Place(0, 0): [A, B],
        Place(0, 0, (0, 7)): [Mark("c", "")],
        Place(0, 0, (13, 17)): [Mark("d", "")],
    }
    assert drawn(rows, marked) == lines("""
    4 HOLES .281 +.01 -.002
    ━━━c━━━      ━d━━
    ━━━━━━━━━━━ab━━━━━━━━━━
    """)


def test_a_mark_at_the_end_of_a_line_is_still_seen() -> None:
    assert drawn([TextRow((Piece("⌀.5 x"),))], {Place(0, 0, (5, 5)): [A]}) == lines("""
    ⌀.5 x
        a
    """)


def test_more_letters_than_a_compartment_is_wide_widen_it() -> None:
    marks = [Mark(letter, "") for letter in "abcdefg"]
    assert drawn([frame("⏥", ".1")], {Place(0, 1): marks}) == lines("""
    ┌───┬─────────┐
    │ ⏥ │   .1    │
    └───┶━abcdefg━┙
    """)


def test_a_frame_too_long_for_the_screen_goes_on_below_with_torn_sides() -> None:
    rows = [frame("⌖", "⌀.014 Ⓜ Ⓟ .50", "A Ⓜ", "B-C Ⓜ", "D")]
    assert drawn(rows, {Place(0, 3): [A]}, width=34) == lines("""
    ┌───┬───────────────┬─────┐
    │ ⌖ │ ⌀.014 Ⓜ Ⓟ .50 │ A Ⓜ ┊
    └───┴───────────────┴─────┘
        ┌───────┬───┐
        ┊ B-C Ⓜ │ D │
        ┕━━━a━━━┵───┘
    """)


@pytest.mark.parametrize("width", [24, 40, 57])
def test_nothing_drawn_is_wider_than_the_screen(width: int) -> None:
    rows: list[Row] = [
        TextRow((Piece("REMOVE ALL BURRS AND SHARP EDGES " * 3), Piece("x" * 90))),
        frame(
            "⌖",
            "⌀.014 Ⓜ Ⓟ .50",
            "A",
            "乙乙乙乙乙乙乙乙乙乙乙乙乙乙乙乙乙乙乙乙乙乙乙乙乙乙乙乙乙乙乙乙乙",
            "Q" * 200,
        ),
    ]
    marked = {Place(0, 1): [A], Place(1, 3): [B], Place(1, 4): [A]}
    found = draw(rows, marked, UNICODE, width)
    assert max(cell_len(line.plain) for line in found) <= width
    told = "".join(line.plain for line in found)
    assert (told.count("x"), told.count("乙"), told.count("Q")) == (90, 33, 200)


def test_wide_characters_keep_the_sides_in_line() -> None:
    assert drawn([frame("⌖", "軸 .1", "A")]) == lines("""
    ┌───┬───────┬───┐
    │ ⌖ │ 軸 .1 │ A │
    └───┴───────┴───┘
    """)


@pytest.mark.parametrize(
    ("text", "width", "expected"),
    [
        ("a bc def", 8, ["a bc def"]),
        ("a bc def", 7, ["a bc", "def"]),
        ("abcdefgh", 3, ["abc", "def", "gh"]),
        ("a abcdefgh", 4, ["a", "abcd", "efgh"]),
        ("軸軸軸", 5, ["軸軸", "軸"]),
        ("one\ntwo", 10, ["one", "two"]),
        ("", 10, []),
    ],
)
def test_text_is_wrapped_by_terminal_columns(text: str, width: int, expected: list[str]) -> None:
    assert wrap(text, width) == expected


@pytest.mark.parametrize(
    ("text", "expected"),
    [
        ("⌖ | ⌀.014 Ⓜ | A", "POS | DIA .014 (M) | A"),
        ("at Ⓜ it would grow to ⌀.023 – “bonus” ±30°", 'at (M) it would grow to DIA .023 - "bonus" +/-30 DEG'),
        ("⟨ST⟩ □.5 ↧ .25 é", "<ST> SQ .5 DEPTH .25 e"),
        ("漢 μ⌀, ⌀", "U+6F22 uDIA, DIA"),
        ("\x1b[31m\x00\u202e", "?[31m??"),
    ],
)
def test_plain_text_holds_only_ascii(text: str, expected: str) -> None:
    assert printable(text, Style.ASCII) == expected


def test_characters_that_steer_a_terminal_are_never_passed_on() -> None:
    assert printable("⌀.5\x1b[2J\r\u202e\udcff\tx", Style.UNICODE) == "⌀.5�[2J��� x"


def test_a_head_that_leaves_no_room_stands_alone_without_blanks_behind_it() -> None:
    stream = io.StringIO()
    Screen(stream, width=40).paragraph("Not a word too many", head=Text("a  OBSERVATION  WEIR-06  "), indent=3)
    assert stream.getvalue() == "   a  OBSERVATION  WEIR-06\n      Not a word too many\n"


@pytest.mark.parametrize(("number", "told"), [(0, "no callouts"), (1, "1 callout"), (3, "3 callouts")])
def test_a_count_is_told_in_words(number: int, told: str) -> None:
    assert counted(number, "callout") == told


@pytest.mark.parametrize(
    ("findings", "told"),
    [
        ((), "No findings."),
        ((Judged(FINDING),), "1 finding, none with a correction."),
        ((Judged(FINDING), Judged(FINDING, REDLINE)), "2 findings, 1 correction, none of them proven."),
    ],
)
def test_corrections_are_counted_in_plain_words(findings: tuple[Judged, ...], told: str) -> None:
    stream = io.StringIO()
    review = Review(Package("Weir", ()), 81, "5eed", Grade.MAJOR, findings)
    show_redlines(review, Screen(stream, width=80))
    assert stream.getvalue().splitlines()[-1].strip() == told


def test_what_looks_like_markup_is_printed_as_it_stands() -> None:
    stream = io.StringIO()
    screen = Screen(stream, width=80)
    screen.paragraph("[bold]25.4[/bold] [link=x] :smile: [19.05]")
    assert stream.getvalue() == "[bold]25.4[/bold] [link=x] :smile: [19.05]\n"


@pytest.mark.parametrize(
    ("encoding", "environment", "expected"),
    [
        ("utf-8", {}, True),
        ("utf-8", {"LANG": "de_DE.UTF-8"}, True),
        ("utf-8", {"LANG": "C.UTF-8"}, True),
        ("utf-8", {"LANG": "C"}, False),
        ("utf-8", {"LANG": "C", "LC_CTYPE": "C.UTF-8"}, False),
        ("utf-8", {"LANG": "C", "LC_CTYPE": "de_DE.UTF-8"}, True),
        ("utf-8", {"LANG": "de_DE.UTF-8", "LC_ALL": "POSIX"}, False),
        ("ascii", {}, False),
        ("cp1252", {}, False),
        ("cp850", {}, False),
        ("no-such-encoding", {}, False),
    ],
)
def test_symbols_are_drawn_only_where_they_can_be_seen(
    encoding: str, environment: dict[str, str], expected: bool
) -> None:
    assert draws_symbols(encoding, environment) is expected


def test_colour_can_be_declined_without_losing_the_symbols(monkeypatch: pytest.MonkeyPatch) -> None:
    monkeypatch.setenv("NO_COLOR", "1")
    monkeypatch.setenv("FORCE_COLOR", "1")
    stream = io.StringIO()
    screen = Screen(stream, width=80)
    screen.line("⌖ position", "red")
    assert "⌖ position" in stream.getvalue()
    assert "\x1b[31m" not in stream.getvalue()
