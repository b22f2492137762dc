"""What is said of text that cannot be read, and what is still read beside it."""

import pytest

from calloutlint.callouts.parse import parse_callout
from calloutlint.model.callout import Part, Unread
from calloutlint.model.frame import Frame
from calloutlint.model.hole import HoleStep
from calloutlint.model.size import Depth, Size
from calloutlint.model.thread import Thread
from calloutlint.units import Unit


def read(*lines: str) -> tuple[Part, ...]:
    return parse_callout(lines, Unit.INCH)


@pytest.mark.parametrize(
    ("written", "wrong"),
    [
        ("⌀.25O THRU", "⌀.25O"),
        ("⌀..250 THRU", "⌀..250"),
        ("⌀.500 ..250", "..250"),
        ("1.2.3", "1.2.3"),
        ("⌀ THRU", "⌀"),
        (".250 ±", "±"),
        ("⌖ | ⌀.0I4 | A", "⌀.0I4"),
        ("⌖ | ⌀.014 | A | BBQ", "BBQ"),
        ("⌖ | ⌀.014 FOO | A", "FOO"),
        ("⌖ | ⌀.014 .020 | A", ".020"),
        (".250-20 UNX", "UNX"),
        ("30-0.1", "30-0.1"),
        (".250 | .003", "| .003"),
    ],
)
def test_unreadable_text_is_kept_with_its_place(written: str, wrong: str) -> None:
    (unread,) = [part for part in read(written) if isinstance(part, Unread)]
    assert unread.text == wrong
    assert written[unread.span.start : unread.span.end] == wrong
    assert unread.expected


@pytest.mark.parametrize(
    ("written", "wrong", "expected"),
    [
        ("⌀..250 ±.002 THRU", "⌀..250 ±.002", "a number"),
        ("⌀.28l +.005 -.000", "⌀.28l +.005 -.000", "digits, not letters"),
        ("⌀O.500 ±.002", "⌀O.500 ±.002", "digits, not letters"),
        ("12,5 ±0,1", "12,5 ±0,1", "a decimal point as elsewhere on the sheet"),
        ("⌀12,5 +0,1 0", "⌀12,5 +0,1 0", "a decimal point as elsewhere on the sheet"),
        ("⌀.500 +0.1 -0.2 ±0.3", "±0.3", "one tolerance for a size"),
        ("⌀.500 ±.005 +.003 -.001", "+.003 -.001", "one tolerance for a size"),
        ("POLISH ±.005", "±.005", "a size before the tolerance"),
        ("DATUM 1", "DATUM 1", "a datum letter"),
        ("[DIA .014] [A] [B]", "[A] [B]", "a geometric characteristic before its compartments"),
        ("[A] [B] [C]", "[A] [B] [C]", "a geometric characteristic before its compartments"),
        ("⌀.500 ±.002 [A] [B]", "[A] [B]", "a geometric characteristic before its compartments"),
        ("CONCENTRIC TO A WITHIN .003", "CONCENTRIC TO A WITHIN .003", "a feature control frame"),
        ("SQUARE WITHIN .005 TIR", "SQUARE WITHIN .005 TIR", "a feature control frame"),
        ("⌀.500 .002 TIR", ".002 TIR", "a feature control frame"),
        ("TIR .002", "TIR .002", "a feature control frame"),
        ("⟂ | ⌀.002 Q | A", "Q", "a modifier such as Ⓜ"),
    ],
)
def test_one_slip_is_told_once_with_what_should_stand_there(written: str, wrong: str, expected: str) -> None:
    (unread,) = [part for part in read(written) if isinstance(part, Unread)]
    assert unread.text == wrong
    assert unread.expected[0] == expected


@pytest.mark.parametrize(
    ("written", "meant"),
    [("O.500", "0.500"), (".O10", ".010"), ("⌀.5OO", "⌀.500"), ("⌀.28l +.005 -.000", "⌀.281"), ("I.5", "1.5")],
)
def test_letters_among_digits_are_told_with_the_number_meant(written: str, meant: str) -> None:
    (unread,) = read(written)
    assert isinstance(unread, Unread)
    assert unread.nearest == meant


@pytest.mark.parametrize("written", ["⌖ | ⌀.014 | A | MAX", "DATUM 1", "⌀.500 DIA"])
def test_what_is_spelled_rightly_has_no_nearest_spelling(written: str) -> None:
    assert all(part.nearest is None for part in read(written) if isinstance(part, Unread))


@pytest.mark.parametrize(
    ("written", "meant"),
    [
        ("POSITON | ⌀.014 | A", "POSITION"),
        ("FLATNES .003", "FLATNESS"),
        ("PERPENDICULARTY | .002 | A", "PERPENDICULARITY"),
        ("COUNTERBROE ⌀.438", "COUNTERBORE"),
        ("SPOTFCAE ⌀.75", "SPOTFACE"),
        ("⌀.5 THUR", "THRU"),
        ("⌀.5 TYPCIAL", "TYPICAL"),
    ],
)
def test_a_slip_is_told_with_the_nearest_spelling(written: str, meant: str) -> None:
    unread = next(part for part in read(written) if isinstance(part, Unread))
    assert unread.nearest == meant


def test_what_stands_right_beside_unreadable_text_is_doubtful() -> None:
    parts = read("4X ⌀.281 THRU FLATNES", "⌴ ⌀.438 ↧ .25O")
    assert [getattr(part, "doubtful", None) for part in parts if not isinstance(part, Unread)] == [False, True]
    (thread, _) = read(".250-20 UNX")
    assert isinstance(thread, Thread)
    assert thread.doubtful
    frame = read("⌖ | ⌀.014 FOO | A", "⟂ | .002 | A")[0]
    assert isinstance(frame, Frame)
    assert frame.segments[0].doubtful


def test_one_broken_line_leaves_the_others_whole() -> None:
    parts = read("⌀.5 @@.1@@ THRU", "⌖ | ⌀.014 | A", "DATUM B")
    assert parts[-2:] == read("⌖ | ⌀.014 | A", "DATUM B")


@pytest.mark.parametrize("frame", ["⌖ | ⌀ | A", "⌖ | Ⓜ | A"])
def test_a_frame_without_its_tolerance_says_so(frame: str) -> None:
    (part,) = read(frame)
    assert isinstance(part, Frame)
    assert part.segments[0].zone is not None
    assert part.segments[0].zone.value is None


def test_symbols_without_their_number_say_so() -> None:
    (frame,) = read("⌖ | A | B")
    (size,) = read("⌀.5 ↧")
    (step,) = read("⌴ ↧ .25")
    assert isinstance(frame, Frame)
    assert isinstance(size, Size)
    assert isinstance(step, HoleStep)
    assert frame.segments[0].zone is None
    assert size.extent == Depth(None)
    assert step.size is None
