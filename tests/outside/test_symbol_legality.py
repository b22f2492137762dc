"""Which symbols each characteristic may have, by the standards' own tables.

Sources: ASME Y14.5-2009 and -2018, geometric characteristic symbols (type of tolerance, datums) and the
sections on each characteristic; ISO 1101, symbols for geometrical characteristics ("datum needed: no, yes,
yes or no") and ISO 2692 for Ⓜ and Ⓛ. The tables are entered from memory of the published ones.
"""

from collections.abc import Iterable

import pytest

from calloutlint.model.drawing import Package
from calloutlint.reading.sheet import parse_sheet
from calloutlint.rulebook.rulebook import Rulebook, load_rulebook

NO, YES, EITHER = "no datum", "a datum", "either"
# symbol, datums, ⌀ zone, Ⓜ on a feature of size under ASME Y14.5-2009, Ⓜ under ISO
TABLE = [
    ("⏤", NO, True, True, True),
    ("⏥", NO, False, True, True),
    ("○", NO, False, False, False),
    ("⌭", NO, False, False, False),
    ("⌒", EITHER, False, False, False),
    ("⌓", EITHER, False, False, False),
    ("∠", YES, True, True, True),
    ("⟂", YES, True, True, True),
    ("∥", YES, True, True, True),
    ("⌖", EITHER, True, True, True),
    ("◎", YES, True, False, True),
    ("⌯", YES, False, False, True),
    ("↗", YES, False, False, False),
    ("⌰", YES, False, False, False),
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


def datums_of(rule: str) -> Iterable[str]:
    return () if rule == NO else ("A",)


def zone_of(symbol: str, round_zone: bool) -> str:
    """A zone that the characteristic may have on a diameter; concentricity and position need theirs round."""
    return "⌀0.02" if round_zone and symbol in "◎⌖" else "0.02"


@pytest.mark.parametrize("standard", STANDARDS)
@pytest.mark.parametrize(("symbol", "datums", "round_zone", "asme", "iso"), TABLE)
class TestCharacteristic:
    def test_datums(
        self,
        rulebook: Rulebook,
        standard: str,
        symbol: str,
        datums: str,
        round_zone: bool,
        asme: bool,
        iso: bool,
    ) -> None:
        zone = zone_of(symbol, round_zone)
        with_datum = found(rulebook, standard, symbol, zone, "A")
        without = found(rulebook, standard, symbol, zone)
        assert ("FRAME-01" in with_datum) == (datums == NO)
        assert ("FRAME-02" in without) == (datums == YES)

    def test_diametral_zone(
        self,
        rulebook: Rulebook,
        standard: str,
        symbol: str,
        datums: str,
        round_zone: bool,
        asme: bool,
        iso: bool,
    ) -> None:
        rules = found(rulebook, standard, symbol, "⌀0.02", *datums_of(datums))
        assert ("FRAME-03" in rules) == (not round_zone)

    def test_maximum_material(
        self,
        rulebook: Rulebook,
        standard: str,
        symbol: str,
        datums: str,
        round_zone: bool,
        asme: bool,
        iso: bool,
    ) -> None:
        allowed = asme if standard.startswith("ASME") else iso
        rules = found(rulebook, standard, symbol, zone_of(symbol, round_zone) + " Ⓜ", *datums_of(datums))
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
    zone = zone_of(symbol, round_zone=True)
    assert "FRAME-15" in found(rulebook, "ASME Y14.5-2018", symbol, zone, "A")
    assert all("FRAME-15" not in found(rulebook, standard, symbol, zone, "A") for standard in STANDARDS)
