"""Which symbols each characteristic may have, by the standards' own tables.

Sources: ASME Y14.5-2009 and -2018, geometric characteristic symbols (type of tolerance, datums) and the
sections on each characteristic; ISO 1101, symbols for geometrical characteristics ("datum needed: no, yes,
yes or no") and ISO 2692 for Ⓜ and Ⓛ. The tables are entered from memory of the published ones.
"""

from typing import NamedTuple

import pytest

from calloutlint.model.drawing import Package
from calloutlint.reading.sheet import parse_sheet
from calloutlint.rulebook.rulebook import Rulebook, load_rulebook

NO, YES, EITHER = "no datum", "a datum", "either"


class Legal(NamedTuple):
    """What a characteristic may have: datums, a ⌀ zone, Ⓜ on a feature of size under ASME and under ISO."""

    symbol: str
    datums: str
    round_zone: bool
    asme: bool
    iso: bool

    @property
    def zone(self) -> str:
        """A zone that it may have on a diameter; concentricity and position need theirs round."""
        return "⌀0.02" if self.symbol in "◎⌖" else "0.02"

    @property
    def references(self) -> tuple[str, ...]:
        """Datums that it may have."""
        return () if self.datums == NO else ("A",)


TABLE = [
    Legal("⏤", NO, True, True, True),
    Legal("⏥", NO, False, True, True),
    Legal("○", NO, False, False, False),
    Legal("⌭", NO, False, False, False),
    Legal("⌒", EITHER, False, False, False),
    Legal("⌓", EITHER, False, False, False),
    Legal("∠", YES, True, True, True),
    Legal("⟂", YES, True, True, True),
    Legal("∥", YES, True, True, True),
    Legal("⌖", EITHER, True, True, True),
    Legal("◎", YES, True, False, True),
    Legal("⌯", YES, False, False, True),
    Legal("↗", YES, False, False, False),
    Legal("⌰", YES, False, False, False),
]
STANDARDS = ["ASME Y14.5-2009", "ISO 1101"]


@pytest.fixture(scope="module")
def rulebook() -> Rulebook:
    return load_rulebook()


def found(rulebook: Rulebook, standard: str, symbol: str, tolerance: str, *datums: str) -> set[str]:
    """Rules found on one frame of a toleranced diameter; A is another diameter."""
    frame = " | ".join([symbol, tolerance, *datums])
    title = f"drawing: X\nrevision: A\nstandard: {standard}\nunits: mm\n"
    callouts = f"1) ⌀30 +0.1 -0.1\n   DATUM A\n2) ⌀20 +0.2 -0.2\n   {frame}\n"
    drawing = parse_sheet(title + callouts, "x.txt")
    findings = rulebook.check(Package("x", (drawing,)))
    return {finding.rule for finding in findings if finding.callout and finding.callout.balloon == "2"}


@pytest.mark.parametrize("standard", STANDARDS)
@pytest.mark.parametrize("legal", TABLE, ids=lambda legal: legal.symbol)
class TestCharacteristic:
    def test_datums(self, rulebook: Rulebook, standard: str, legal: Legal) -> None:
        with_datum = found(rulebook, standard, legal.symbol, legal.zone, "A")
        without = found(rulebook, standard, legal.symbol, legal.zone)
        assert ("FRAME-01" in with_datum) == (legal.datums == NO)
        assert ("FRAME-02" in without) == (legal.datums == YES)

    def test_diametral_zone(self, rulebook: Rulebook, standard: str, legal: Legal) -> None:
        rules = found(rulebook, standard, legal.symbol, "⌀0.02", *legal.references)
        assert ("FRAME-03" in rules) == (not legal.round_zone)

    def test_maximum_material(self, rulebook: Rulebook, standard: str, legal: Legal) -> None:
        allowed = legal.asme if standard.startswith("ASME") else legal.iso
        rules = found(rulebook, standard, legal.symbol, f"{legal.zone} Ⓜ", *legal.references)
        assert ("FRAME-05" in rules) == (not allowed)


MODIFIERS = [("CZ", False, True), ("SZ", False, True), ("Ⓡ", False, True), ("Ⓤ 0.01", True, False)]


@pytest.mark.parametrize(("modifier", "asme", "iso"), MODIFIERS)
def test_modifiers_belong_to_their_system(rulebook: Rulebook, modifier: str, asme: bool, iso: bool) -> None:
    """ASME Y14.5 has Ⓤ; ISO 1101 has CZ and SZ, ISO 2692 has Ⓡ."""
    symbol, before = ("⌖", "⌀0.02 Ⓜ") if modifier == "Ⓡ" else ("⌓", "0.02")
    for standard, allowed in zip(STANDARDS, (asme, iso), strict=True):
        rules = found(rulebook, standard, symbol, f"{before} {modifier}", "A")
        assert ("FRAME-17" in rules) == (not allowed)


@pytest.mark.parametrize("symbol", ["◎", "⌯"])
def test_what_the_2018_edition_withdrew(rulebook: Rulebook, symbol: str) -> None:
    """ASME Y14.5-2018 withdrew concentricity and symmetry; 2009 and ISO 1101 have them."""
    zone = "⌀0.02" if symbol == "◎" else "0.02"
    assert "FRAME-15" in found(rulebook, "ASME Y14.5-2018", symbol, zone, "A")
    assert all("FRAME-15" not in found(rulebook, standard, symbol, zone, "A") for standard in STANDARDS)
