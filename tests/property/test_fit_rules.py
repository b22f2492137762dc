"""The FIT rules against the formulas of ASME Y14.5, Appendix B, worked out apart, in fractions."""

from dataclasses import dataclass
from fractions import Fraction

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from calloutlint.model.drawing import Package
from calloutlint.reading.sheet import parse_sheet
from calloutlint.rulebook.rulebook import Rulebook, load_rulebook

SCREWS = {"M6 screw": Fraction(6), ".250-20 UNC screw": Fraction(635, 100), "⌀6 +0.2 0 pin": Fraction(62, 10)}
TENTH = Fraction(1, 10)


@pytest.fixture(scope="module")
def rulebook() -> Rulebook:
    return load_rulebook()


@dataclass(frozen=True)
class Case:
    """A joint in tenths of a millimetre: smallest hole, size tolerance, position, fixing hole."""

    screw: str
    hole: int
    width: int
    position: int
    modifier: str
    fixing: int | None
    projected: bool
    projection: int | None
    depth: int

    @property
    def inner(self) -> Fraction:
        bonus = self.width if self.modifier == "Ⓛ" else 0
        return (self.hole - self.position - bonus) * TENTH

    @property
    def demand(self) -> Fraction:
        if self.fixing is None:
            return Fraction(0)
        tolerance = self.fixing * TENTH
        if self.projected or self.projection is None:
            return tolerance
        return tolerance * (1 + Fraction(2 * self.projection, self.depth))

    @property
    def expected(self) -> set[str]:
        fastener = SCREWS[self.screw]
        if self.hole * TENTH < fastener:
            return {"FIT-01"}
        if self.inner - fastener >= self.demand:
            return set()
        return {"FIT-02" if self.fixing is None else "FIT-03"}

    @property
    def sheet(self) -> str:
        """The joint as a sheet; the mating hole fixes by a bore, whatever its fastener."""
        reach = "" if self.projection is None else f", projection {self.projection}"
        hold = "floating" if self.fixing is None else f"fixed in 7{reach}"
        lines = [
            "standard: ASME Y14.5-2018\nunits: mm",
            f"joint: cover = 4 with {self.screw}, {hold}",
            f"4) 4X ⌀{self.hole / 10} +{self.width / 10} 0 THRU",
            f"⌖ | ⌀{self.position / 10} {self.modifier} | A | B | C",
        ]
        if self.fixing is not None:
            zone = f" Ⓟ {self.projection or 10}" if self.projected else ""
            lines += [f"7) 4X ⌀5.5 H7 ↧ {self.depth}", f"⌖ | ⌀{self.fixing / 10}{zone} | A | B | C"]
        return "\n".join(lines) + "\n"


CASES = st.builds(
    Case,
    screw=st.sampled_from(sorted(SCREWS)),
    hole=st.integers(59, 80),
    width=st.integers(1, 4),
    position=st.integers(0, 12),
    modifier=st.sampled_from(["Ⓜ", "Ⓛ", ""]),
    fixing=st.none() | st.integers(1, 6),
    projected=st.booleans(),
    projection=st.none() | st.integers(4, 20),
    depth=st.integers(4, 20),
)


@settings(max_examples=120)
@given(case=CASES)
def test_a_joint_is_found_short_where_the_formulas_say_so_and_nowhere_else(
    rulebook: Rulebook, case: Case
) -> None:
    findings = rulebook.check(Package("one", (parse_sheet(case.sheet, "one.txt"),)))
    assert {f.rule for f in findings} & {"FIT-01", "FIT-02", "FIT-03"} == case.expected
