"""Canonical text, and that reading it gives the same model back."""

from pathlib import Path

import pytest

from calloutlint.callouts.parse import parse_callout
from calloutlint.callouts.write import Style, write_callout, write_part
from calloutlint.model.callout import Callout, Part
from calloutlint.model.frame import Frame, Segment
from calloutlint.units import Unit

Case = tuple[str, str, Unit]


def _cases() -> list[Case]:
    unit, cases = Unit.INCH, []
    for line in (Path(__file__).parent / "cases" / "round_trips.txt").read_text("utf-8").splitlines():
        if line in ("[inch]", "[mm]"):
            unit = Unit(line.strip("[]"))
        elif line and not line.startswith("# "):
            written, _, canonical = line.partition(" => ")
            cases.append((written, canonical, unit))
    return cases


CASES = _cases()


def _parts(text: str, unit: Unit) -> tuple[Part, ...]:
    return parse_callout(text.split(" ¶ "), unit)


def test_there_are_cases_of_every_kind() -> None:
    assert len(CASES) >= 400


@pytest.mark.parametrize(("written", "canonical", "unit"), CASES)
def test_a_callout_has_one_canonical_text(written: str, canonical: str, unit: Unit) -> None:
    callout = Callout("1", _parts(written, unit))
    assert " ¶ ".join(write_callout(callout, Style.UNICODE, unit)) == canonical


@pytest.mark.parametrize("style", Style)
@pytest.mark.parametrize(("written", "canonical", "unit"), CASES)
def test_canonical_text_is_read_as_the_same_callout(
    written: str, canonical: str, unit: Unit, style: Style
) -> None:
    callout = Callout("1", _parts(written, unit))
    lines = write_callout(callout, style, unit)
    assert parse_callout(lines, unit) == callout.parts
    if style is Style.ASCII and not {"⌀", "Ⓜ", "↔", "°"} & set("".join(_kept(callout))):
        assert "".join(lines).isascii()


def _kept(callout: Callout) -> list[str]:
    """Words and fastener texts, which are kept as they are written."""
    return [str(getattr(part, "text", "") or getattr(part, "fastener", "")) for part in callout.parts]


def _segment(text: str) -> Segment:
    frame = parse_callout([text], Unit.INCH)[0]
    assert isinstance(frame, Frame)
    return frame.segments[0]


def test_a_lower_segment_is_written_without_its_symbol() -> None:
    segment = _segment("⌖ | ⌀.006 Ⓜ | A")
    assert write_part(segment, Style.UNICODE, lower=True) == "| ⌀.006 Ⓜ | A"
    assert write_part(segment, Style.ASCII, lower=True) == "| DIA .006 (M) | A"
    assert write_part(segment, Style.UNICODE) == "⌖ | ⌀.006 Ⓜ | A"


def test_a_number_in_another_unit_carries_it() -> None:
    callout = Callout("1", parse_callout(["⌀6 mm THRU"], Unit.INCH))
    assert write_callout(callout, Style.UNICODE, Unit.INCH) == ["⌀6 mm THRU"]
    assert write_callout(callout, Style.UNICODE) == ["⌀6 THRU"]
