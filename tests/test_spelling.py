"""The spelling table, the normaliser and its way back to the source columns."""

import re

import pytest

from calloutlint._resources import read_text
from calloutlint.callouts import table
from calloutlint.callouts.parse import FRAGMENTS
from calloutlint.callouts.spelling import SPELLINGS, normalise, opens_feature
from calloutlint.callouts.symbols import ANY_CHARACTERISTIC, CHARACTERISTICS, MODIFIERS
from calloutlint.callouts.table import Spelling


@pytest.mark.parametrize(
    ("written", "normal"),
    [
        ("4X Ø.281 thru", "4X ⌀.281 ‹THRU›"),
        ("%%c.266%%p.004", "⌀.266±.004"),
        ("POSITION DIA .014 MMC A B C", "⌖ ⌀ .014 Ⓜ A B C"),
        ("pos|.014(m)|a", "⌖|.014Ⓜ|a"),
        ("1½-6 UNC", "1 1/2-6 UNC"),
        ("30º 15′ 20″", "30° 15' 20\""),
        ("C’BORE ⌀.438", "⌴ ⌀.438"),
        (r"{\Fgdt;j}%%v{\Fgdt;n}.014{\Fgdt;m}%%vA", "⌖|⌀.014Ⓜ|A"),
        ("⌀30 −0.1 –0.3", "⌀30 -0.1 -0.3"),
        ("⌴ SF ⌀.75", "‹SF› ⌀.75"),
    ],
)
def test_spellings_come_to_one_form(written: str, normal: str) -> None:
    assert normalise(written).text == normal


@pytest.mark.parametrize("meaningful", ["25 h6", "25 H6", "Ⓜ", "ﬁ", "SLOT", "M6x1-6g", "2º", "①"])
def test_letters_that_mean_something_keep_their_case_and_form(meaningful: str) -> None:
    assert normalise(meaningful).text == meaningful.replace("º", "°")


@pytest.mark.parametrize(
    "prose", ["FLAT HEAD", "HOLE(S)", "POSITIVE STOP", "CYLINDER", "PARTS", "STRAP", "DEEPLY"]
)
def test_words_that_only_begin_like_a_symbol_stay_words(prose: str) -> None:
    assert normalise(prose).text == prose


def test_columns_lead_back_to_the_source() -> None:
    source = "%%c.266%%p.004 THROUGH POSITION|DIA .014 (M)"
    normal = normalise(source)
    for piece, written in (("⌀", "%%c"), (".266", ".266"), ("±", "%%p"), ("‹THRU›", "THROUGH"), ("Ⓜ", "(M)")):
        at = normal.text.index(piece)
        assert source[normal.start(at) : normal.end(at + len(piece))] == written


def test_columns_of_a_line_without_exchanges_are_the_source_columns() -> None:
    normal = normalise("⌖ | ⌀.014 Ⓜ | A")
    assert normal.shifts == ()
    assert [normal.start(column) for column in range(15)] == list(range(15))


@pytest.mark.parametrize(("written", "normal"), [("25,4 ±0,1", "25.4 ±0.1"), ("⌀,5", "⌀.5"), ("A, B", "A, B")])
def test_the_decimal_comma_is_a_point_where_the_sheet_says_so(written: str, normal: str) -> None:
    assert normalise(written, decimal_comma=True).text == normal


def test_no_spelling_stands_for_two_things() -> None:
    meant: dict[str, str] = {}
    for row in SPELLINGS:
        for spelling in row.every:
            assert meant.setdefault(spelling.upper(), row.symbol) == row.symbol


def test_every_characteristic_has_an_ascii_form_that_is_read() -> None:
    assert len(table.CHARACTERISTICS) == 14
    for row in table.CHARACTERISTICS:
        assert normalise(f"{row.ascii} | .014").text == f"{row.symbol} | .014"


@pytest.mark.parametrize("row", [row for row in SPELLINGS if row.symbol != "×"], ids=lambda row: row.name)
def test_both_canonical_forms_of_a_row_are_read_alike(row: Spelling) -> None:
    assert row.ascii.isascii()
    before, after = (
        ("1 ", "") if row.symbol in {"°", "'", '"'} else ("", " | 1" if row in table.CHARACTERISTICS else " 1")
    )
    assert normalise(f"{before}{row.ascii}{after}").text == normalise(f"{before}{row.symbol}{after}").text


@pytest.mark.parametrize(
    "line",
    [
        "4X ⌀.281 THRU",
        ".250 ±.003 SLOT",
        "SLOT .250 ±.003",
        ".250-20 UNC-2B",
        "#10-32 UNF",
        "M6x1",
        "4 HOLES ⌀.2",
        "R.25",
    ],
)
def test_a_size_a_thread_or_a_hole_opens_a_feature(line: str) -> None:
    assert opens_feature(line)


@pytest.mark.parametrize(
    "line",
    [
        "⌖ | ⌀.014 | A",
        "PERP|%%c.002|A",
        "DATUM A",
        "-A-",
        "| ⌀.006 | A",
        "⌴ ⌀.438 ↧ .25",
        "-.002",
        "SEE NOTE 3",
        "",
        "CLEARANCE FOR M6",
        "SURFACE FLATNESS|.003 -A-",
        "REMOVE BURRS",
        "ALL AROUND",
        "TP [DIA .014] [A]",
        "PERPENDICULAR TO A WITHIN .002",
        "CONCENTRIC TO A WITHIN .003",
    ],
)
def test_what_speaks_of_a_feature_above_opens_none(line: str) -> None:
    assert not opens_feature(line)


def test_every_symbol_of_the_table_has_its_meaning() -> None:
    """The trade's name of a characteristic has the words of its name in the model."""
    assert {row.symbol for row in table.MODIFIERS} <= set(MODIFIERS)
    assert [row.symbol for row in table.CHARACTERISTICS] == list(CHARACTERISTICS)
    for row in table.CHARACTERISTICS:
        words = row.name.replace(" of a", "").split()
        assert sorted(words) == sorted(CHARACTERISTICS[row.symbol].value.split())


def test_the_grammar_names_every_characteristic() -> None:
    """Inside its patterns it has to write them out."""
    for fragment in FRAGMENTS:
        for written in re.findall("⏤[^\\]]*", read_text("grammar", f"{fragment}.lark")):
            assert written.startswith(ANY_CHARACTERISTIC)
