"""What holds for every callout: canonical text is read back, spellings do not matter, nothing crashes."""

import random
import re

from hypothesis import given, settings
from hypothesis import strategies as st

from calloutlint.callouts.parse import parse_callout
from calloutlint.callouts.spelling import SPELLINGS
from calloutlint.callouts.write import Style, write_parts
from calloutlint.model.callout import Part, Unread
from tests.property.strategies import UNIT, parts


@settings(max_examples=250, deadline=None)
@given(part=parts, style=st.sampled_from(Style))
def test_canonical_text_of_a_part_is_read_as_that_part(part: Part, style: Style) -> None:
    assert parse_callout(write_parts([part], style, UNIT), UNIT) == (part,)


@settings(max_examples=100, deadline=None)
@given(drawn=st.lists(parts, min_size=2, max_size=4), style=st.sampled_from(Style))
def test_writing_what_was_read_changes_nothing_more(drawn: list[Part], style: Style) -> None:
    """Neighbours may join, as two stacked limits do; what has been read once is stable from then on."""
    read = parse_callout(write_parts(drawn, style, UNIT), UNIT)
    assert parse_callout(write_parts(read, style, UNIT), UNIT) == read


@settings(max_examples=100, deadline=None)
@given(part=parts, seed=st.integers(0, 2**16))
def test_spelling_variants_give_the_same_model(part: Part, seed: int) -> None:
    lines = write_parts([part], Style.UNICODE, UNIT)
    assert parse_callout([_respelled(line, random.Random(seed)) for line in lines], UNIT) == (part,)


_SAFE = {"Ⓜ", "Ⓛ", "Ⓟ", "Ⓕ", "Ⓣ", "⌀", "±", "↧", "⌴", "⌵", "⌖", "⟂", "∥", "⏥", "⌓", "⌭", "↗", "⌰", "◎", "⌯"}


_LEFT_OUT = {"DEPTH", "SQUARENESS", "—", "PERPENDICULAR", "PARALLEL"}
_SAID = re.compile(r" (?:TO|WITH|WITHIN)$").search  # read only where the rest of the sentence follows


def _respelled(line: str, chance: random.Random) -> str:
    """The line with each symbol in one of its spellings, in either case, and bars drawn or narrow."""
    for row in SPELLINGS:
        if row.symbol in _SAFE and row.symbol in line and not (row.symbol == "⌀" and "S⌀" in line):
            spelling = chance.choice([text for text in row.every if text not in _LEFT_OUT and not _SAID(text)])
            spaced = f" {spelling} " if spelling[0].isalpha() else spelling
            line = line.replace(row.symbol, spaced)
    return line.replace(" | ", chance.choice([" | ", "|", " │ ", "¦"]))


_PIECES = [spelling for row in SPELLINGS for spelling in row.every]
_PIECES += list("ABCMR|[]()/-+.,#'\"° 0123456789XxØ\t\x00\x1f\ufffd\ufffc")
_strange = st.one_of(st.text(max_size=60), st.lists(st.sampled_from(_PIECES), max_size=25).map("".join))


@settings(max_examples=250, deadline=None)
@given(lines=st.lists(_strange, max_size=4))
def test_no_text_is_too_strange(lines: list[str]) -> None:
    """Parts come back for anything, their spans lie on their lines, and they can be written."""
    parts_read = parse_callout(lines, UNIT)
    for part in parts_read:
        span = getattr(part, "span", None)
        if span is not None:
            assert 0 <= span.line < max(1, len(lines))
            assert 0 <= span.start <= span.end <= len(lines[span.line])
    for style in Style:
        write_parts(parts_read, style, UNIT)


def test_a_line_that_no_drawing_has_is_said_to_be_too_long() -> None:
    (part,) = parse_callout(["⌀.5 " * 100_000], UNIT)
    assert isinstance(part, Unread)
    assert part.expected == ("a line of at most 2000 characters, not 400000",)
