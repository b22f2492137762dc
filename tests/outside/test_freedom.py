"""Freedoms held by combinations of datum features, against a table worked by hand.

The table names its sources: ASME Y14.5 (constraint of degrees of freedom), ISO 5459 (invariance classes).
"""

import csv
import re
from pathlib import Path

import pytest

from calloutlint.callouts.parse import parse_callout
from calloutlint.facts.datums.held import held, left, redundant
from calloutlint.facts.datums.scheme import DatumScheme, scheme_of
from calloutlint.model.callout import Callout
from calloutlint.model.drawing import Drawing
from calloutlint.model.frame import Segment
from calloutlint.units import Unit

_VALUES = Path(__file__).with_name("values")

NOUNS = {
    "plane": "SURFACE",
    "hole": "⌀10 H7 THRU",
    "shaft": "SHAFT ⌀30 h6",
    "slot": "SLOT 6 +0.03 0",
    "sphere": "S⌀20 ±0.05",
    "thread": "M12x1.75-6H",
    "cone": "CONE",
    "contour": "⌓ | 0.2\nALL AROUND",
}
ZONES = {"hole": "⌀", "shaft": "⌀", "thread": "⌀", "cone": "⌀", "sphere": "S⌀"}


def table(name: str) -> list[dict[str, str]]:
    lines = (_VALUES / name).read_text(encoding="utf-8").splitlines()
    return list(csv.DictReader(line for line in lines if not line.startswith("#")))


def feature(letter: str, phrase: str) -> str:
    """`4 holes at A|B` as a callout that establishes the datum feature; `targets …` lists its datum targets."""
    if phrase.startswith("targets "):
        return "\n".join(["SURFACE", *phrase.removeprefix("targets ").split(", "), f"DATUM {letter}"])
    found = re.fullmatch(r"(?:(\d+) )?(\w+?)s?(?: (at|⟂|∥|∠|⌰) ?([\w|-]*))?( INDIVIDUALLY)?", phrase)
    assert found, phrase
    count, noun, sign, datums, alone = found.groups()
    lines = [(f"{count}X " if count else "") + NOUNS[noun] + (alone or "")]
    if sign:
        zone = "" if sign == "⌰" else ZONES.get(noun, "")
        lines.append(" | ".join([sign.replace("at", "⌖"), f"{zone}0.1", *filter(None, datums.split("|"))]))
    return "\n".join([*lines, f"DATUM {letter}"])


def drawing(features: str, frame: str) -> tuple[DatumScheme, Segment]:
    """The datum features `A plane; B hole ⟂A` on a drawing, and a position to the frame `A|B`."""
    texts = [feature(*entry.strip().split(" ", 1)) for entry in features.split(";")]
    texts.append("⌀5 THRU\n⌖ | ⌀0.2 | " + " | ".join(frame.split("|")))
    callouts = tuple(
        Callout(str(number), parse_callout(text.splitlines(), Unit.MM))
        for number, text in enumerate(texts, start=1)
    )
    assert not [part for callout in callouts for part in callout.unread], texts
    return scheme_of(Drawing("table", callouts=callouts)), next(callouts[-1].segments)


FREEDOMS = table("freedoms.csv")


@pytest.mark.parametrize("row", FREEDOMS, ids=lambda row: f"{row['features']} in {row['frame']}")
def test_each_reference_takes_what_it_takes_by_hand(row: dict[str, str]) -> None:
    scheme, segment = drawing(row["features"], row["frame"])
    taken = ["?" if each.new is None else "".join(each.new) or "-" for each in held(segment, scheme)]
    assert taken == row["takes"].split(), row["reason"]
    assert "".join(left(segment, scheme) or ()) == row["left"], row["reason"]


def test_the_table_has_every_combination_once() -> None:
    assert len({(row["features"], row["frame"]) for row in FREEDOMS}) == len(FREEDOMS) >= 60


REDUNDANT = table("redundant_references.csv")


@pytest.mark.parametrize("row", REDUNDANT, ids=lambda row: f"{row['features']} in {row['frame']}")
def test_a_reference_is_redundant_only_in_every_arrangement(row: dict[str, str]) -> None:
    scheme, segment = drawing(row["features"], row["frame"])
    assert "".join(ref.name for ref in redundant(segment, scheme)) == row["redundant"]


def test_a_feature_of_unknown_kind_silences_what_follows_it() -> None:
    scheme, segment = drawing("A plane; B contour; C plane ⟂A", "A|B|C")
    assert [each.new is None for each in held(segment, scheme)] == [False, True, True]
    assert left(segment, scheme) is None
