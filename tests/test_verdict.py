"""What a checker decides on a measured hole, and the bonus table, by the MMC and LMC rules of ASME Y14.5."""

from decimal import Decimal

import pytest

from calloutlint.facts.formulas.boundaries import FeatureOfSize, GeometricTolerance, virtual_condition
from calloutlint.facts.formulas.verdict import Decision, Verdict, bonus_table, decide
from calloutlint.model.frame import Modifier

D = Decimal
HOLE = FeatureOfSize(D(".279"), D(".288"))
AT_MMC = GeometricTolerance(D(".014"), Modifier.MMC)
AT_LMC = GeometricTolerance(D(".014"), Modifier.LMC)
RIGID = GeometricTolerance(D(".014"))


@pytest.mark.parametrize(
    ("size", "deviation", "decision", "allowed", "rework_to"),
    [
        (".283", ".0140", Decision.ACCEPT, ".018", None),
        (".279", ".0140", Decision.ACCEPT, ".014", None),
        (".283", ".0141", Decision.ACCEPT_WITH_BONUS, ".018", None),
        (".283", ".0180", Decision.ACCEPT_WITH_BONUS, ".018", None),
        (".283", ".0181", Decision.REWORK, ".018", ".2831"),
        (".279", ".0230", Decision.REWORK, ".014", ".288"),
        (".279", ".0231", Decision.REJECT, ".014", None),
        (".288", ".0230", Decision.ACCEPT_WITH_BONUS, ".023", None),
        (".288", ".0231", Decision.REJECT, ".023", None),
        (".2789", ".0140", Decision.REWORK, None, ".279"),
        (".2789", ".0200", Decision.REWORK, None, ".285"),
        (".2789", ".0231", Decision.REJECT, None, None),
        (".2881", ".0000", Decision.REJECT, None, None),
    ],
)
def test_hole_at_mmc(
    size: str, deviation: str, decision: Decision, allowed: str | None, rework_to: str | None
) -> None:
    """⌀.279-.288, ⌀.014 Ⓜ: each decision at the last deviation that it holds for, and the next."""
    expected = Verdict(decision, D(allowed) if allowed else None, D(rework_to) if rework_to else None)
    assert decide(HOLE, AT_MMC, D(size), D(deviation)) == expected


@pytest.mark.parametrize(
    ("tolerance", "size", "deviation", "decision", "rework_to"),
    [
        (RIGID, ".283", ".0140", Decision.ACCEPT, None),
        (RIGID, ".283", ".0141", Decision.REJECT, None),  # opening it does not help
        (RIGID, ".278", ".0140", Decision.REWORK, ".279"),
        (RIGID, ".278", ".0141", Decision.REJECT, None),
        (AT_LMC, ".279", ".0230", Decision.ACCEPT_WITH_BONUS, None),
        (AT_LMC, ".279", ".0231", Decision.REJECT, None),
        (AT_LMC, ".288", ".0141", Decision.REJECT, None),
        (AT_LMC, ".278", ".0230", Decision.REWORK, ".279"),
    ],
)
def test_hole_regardless_of_size_and_at_lmc(
    tolerance: GeometricTolerance, size: str, deviation: str, decision: Decision, rework_to: str | None
) -> None:
    found = decide(HOLE, tolerance, D(size), D(deviation))
    assert (found.decision, found.rework_to) == (decision, D(rework_to) if rework_to else None)


@pytest.mark.parametrize(
    ("size", "deviation", "decision", "rework_to"),
    [
        ("12.2", "0.1", Decision.ACCEPT, None),
        ("12.1", "0.2", Decision.ACCEPT_WITH_BONUS, None),
        ("12.1", "0.25", Decision.REWORK, "12.05"),
        ("12.3", "0.1", Decision.REWORK, "12.2"),
        ("12.3", "0.3", Decision.REWORK, "12.0"),
        ("12.1", "0.31", Decision.REJECT, None),
        ("11.9", "0", Decision.REJECT, None),
    ],
)
def test_shaft_at_mmc_is_turned_down(
    size: str, deviation: str, decision: Decision, rework_to: str | None
) -> None:
    shaft = FeatureOfSize(D("12.0"), D("12.2"), internal=False)
    found = decide(shaft, GeometricTolerance(D("0.1"), Modifier.MMC), D(size), D(deviation))
    assert (found.decision, found.rework_to) == (decision, D(rework_to) if rework_to else None)


def test_a_stated_maximum_ends_what_rework_can_do() -> None:
    """⌀.000 Ⓜ ⌀.004 MAX: beyond .004 no size helps."""
    capped = GeometricTolerance(D(0), Modifier.MMC, maximum=D(".004"))
    assert decide(HOLE, capped, D(".280"), D(".004")) == Verdict(Decision.REWORK, D(".001"), D(".283"))
    assert decide(HOLE, capped, D(".280"), D(".0041")).decision is Decision.REJECT


def test_accepted_at_mmc_is_what_the_functional_gauge_accepts() -> None:
    """At every size within limits: accepted exactly if the hole clears a pin of its virtual condition."""
    pin = virtual_condition(HOLE, AT_MMC)
    assert pin == D(".265")
    for size in (HOLE.smallest + D(step) / 10000 for step in range(91)):
        for deviation in (D(step) / 10000 for step in range(0, 260, 5)):
            verdict = decide(HOLE, AT_MMC, size, deviation).decision
            assert (verdict in {Decision.ACCEPT, Decision.ACCEPT_WITH_BONUS}) == (size - deviation >= pin)


def test_bonus_table_of_a_hole() -> None:
    """⌀.279-.288, ⌀.014 Ⓜ, by thousandths."""
    rows = bonus_table(HOLE, AT_MMC)
    assert [(row.size, row.bonus, row.allowed) for row in rows] == [
        (D(".279") + D(n) / 1000, D(n) / 1000, D(".014") + D(n) / 1000) for n in range(10)
    ]


@pytest.mark.parametrize("steps", [1, 7, 9, 90, 900])
def test_bonus_table_is_right_at_every_size(steps: int) -> None:
    """The bonus is what the hole is larger than its smallest at Ⓜ, smaller than its largest at Ⓛ."""
    at_mmc, at_lmc = bonus_table(HOLE, AT_MMC, steps), bonus_table(HOLE, AT_LMC, steps)
    assert len(at_mmc) == len(at_lmc) == steps + 1
    assert (at_mmc[0].size, at_mmc[-1].size) == (D(".279"), D(".288"))
    for rising, falling in zip(at_mmc, at_lmc, strict=True):
        assert rising.bonus == rising.size - D(".279")
        assert falling.bonus == D(".288") - falling.size
        assert rising.allowed - rising.bonus == falling.allowed - falling.bonus == D(".014")


def test_bonus_table_of_a_shaft_runs_down_from_mmc() -> None:
    shaft = FeatureOfSize(D("12.0"), D("12.2"), internal=False)
    rows = bonus_table(shaft, GeometricTolerance(D(0), Modifier.MMC))
    assert [row.size for row in rows] == [D("12.2") - D("0.02") * n for n in range(11)]
    assert rows[-1].allowed == D("0.2")


def test_bonus_table_needs_a_step_and_stands_still_without_size_tolerance() -> None:
    exact = FeatureOfSize(D("6"), D("6"))
    assert [row.size for row in bonus_table(exact, AT_MMC)] == [D("6")]
    with pytest.raises(ValueError, match="at least one step, not 0"):
        bonus_table(HOLE, AT_MMC, 0)
