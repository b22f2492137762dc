"""`fit`: one joint worked out, forward and backward, as a checker would by hand (ASME Y14.5, Appendix B)."""

import json
import re
from pathlib import Path
from typing import Any

import pytest

from calloutlint.cli import main

M6 = ("--fastener", "M6 ISO 4762")
HOLE = ("--hole", "⌀6.6 +0.15/0")


class Run:
    """What a run of `fit` gave."""

    def __init__(self, status: int, out: str, err: str) -> None:
        self.status, self.out, self.err = status, out, err

    @property
    def words(self) -> str:
        """The output with every run of spaces and line ends as one space."""
        return " ".join(self.out.split())


@pytest.fixture
def fit(capsys: pytest.CaptureFixture[str]) -> Any:
    def run(*arguments: str) -> Run:
        status = main(["fit", *arguments])
        captured = capsys.readouterr()
        return Run(status, captured.out, captured.err)

    return run


FIXED = ("--fixed", "⌀0.2", "--projection", "12", "--depth", "16")

ANSWERS = [
    (
        (*M6, *HOLE, "--position", "⌀0.3 Ⓜ"),
        0,
        "Fits: smallest hole 6.6 − position 0.3 = 6.3 is always free, the fastener needs 6 → 0.3 is left over.",
    ),
    (
        (*M6, *HOLE, "--position", "⌀0.6 Ⓜ"),
        0,
        "Fits, line to line: smallest hole 6.6 − position 0.6 = 6 is always free, the fastener needs 6",
    ),
    (
        (*M6, *HOLE, "--position", "⌀0.601"),
        1,
        "→ short by 0.001. Cures: position ⌀0.6 or less; a hole of at least",
    ),
    (
        (*M6, *HOLE, "--position", "⌀0.3 Ⓜ", *FIXED),
        1,
        "the fixing hole takes 0.2 × (1 + 2 × 12/16) = 0.5 → short by 0.2. Cures: a projected zone on",
    ),
    (
        (*M6, *HOLE, "--position", "⌀0.3 Ⓜ", "--fixed", "⌀0.2 Ⓟ 12"),
        0,
        "fixing hole takes 0.2 → 0.1 is left over",
    ),
    ((*M6, *HOLE, "--position", "⌀0.3 Ⓜ", "--fixed", "⌀0.2"), 0, "the tilt of the fastener is left out"),
    ((*M6, *HOLE), 0, "Position up to ⌀0.6: smallest hole 6.6 − fastener 6 = 0.6."),
    (
        (*M6, *HOLE, *FIXED),
        0,
        "6.6 − fastener 6 = 0.6 − fixing hole 0.5 = 0.1. The fixing hole takes 0.2 × (1 + 2 × 12/16) = 0.5.",
    ),
    ((*M6, *HOLE, "--fixed"), 0, "may add up to 0.6, such as 0.3 each"),
    ((*M6, "--hole", "⌀5.8 +0.1/0"), 1, "No position tolerance fits: smallest hole 5.8 − fastener 6 = -0.2."),
    (
        ("--fastener", ".250-20 UNC-2A", "--position", "DIA .014 (M)"),
        0,
        "Hole of at least .264 at MMC: fastener .250 + position .014 = .264. The next stock drill that fits as "
        "it is usually drilled is 17/64, ⌀.26562: .26462 to .27162.",
    ),
    (
        ("--hole", ".281 +.007/-.002", "--position", "DIA .014 (M)"),
        0,
        "Fastener up to ⌀.265: smallest hole .279 − position .014 = .265. The largest screws: 1/4 and M6.",
    ),
]


@pytest.mark.parametrize(("arguments", "status", "words"), ANSWERS)
def test_the_third_is_found_and_all_three_are_judged(
    fit: Any, arguments: tuple[str, ...], status: int, words: str
) -> None:
    run = fit(*arguments)
    assert words in run.words
    assert run.status == status


@pytest.mark.parametrize(
    ("arguments", "words"),
    [
        (
            ("--fastener", ".250-20 UNC-2A", "--hole", "⌀7.15 +0.2/0", "--position", "⌀0.8 Ⓜ"),
            "Fits, line to line",
        ),
        (("--fastener", "M6", "--hole", ".250 +.010/-.000", "--position", "⌀0.35"), "Fits, line to line"),
        (("--fastener", "M6", "--hole", "6.6-6.8 mm", "--position", ".6 mm"), "Fits, line to line"),
        (("--fastener", "1/4-20", "--hole", "9/32 ±.005 in", "--position", ".02625"), "Fits, line to line"),
        (("--fastener", "M6", "--hole", "6.6 H13", "--position", "0.6"), "Fits, line to line"),
        (
            ("--fastener", "⌀6 m6 dowel pin", "--hole", "⌀6.012 +0.01/0", "--position", "0"),
            "Fits, line to line",
        ),
        (
            ("--units", "inch", "--fastener", "1/4-20", "--hole", "1.250-1.260", "--position", "1"),
            "Fits, line to",
        ),
    ],
)
def test_units_may_be_mixed(fit: Any, arguments: tuple[str, ...], words: str) -> None:
    assert words in fit(*arguments).words


def test_plain_output_is_ascii_and_to_scale(fit: Any) -> None:
    """The clearance of 0.6 is drawn as wide as it is: half position, half left over."""
    run = fit(*M6, *HOLE, "--position", "⌀0.3 Ⓜ", "--plain")
    assert run.out.isascii()
    drawn = dict(re.findall(r"^   (\D+?)  +[\d.]+  ( *[|\[].*)$", run.out, re.MULTILINE))
    wide = {name: len(bar.strip()) for name, bar in drawn.items()}
    assert wide["clearance"] == pytest.approx(2 * wide["position"], abs=2)
    assert wide["position"] == pytest.approx(wide["left over"], abs=1)
    assert wide["smallest hole, off left"] > wide["always free"] >= wide["fastener"]


def test_bonus_table_and_gauges(fit: Any) -> None:
    out = fit(*M6, *HOLE, "--position", "⌀0.3 Ⓜ").words
    assert "6.6 0 0.3 MMC 6.63 0.03 0.33 6.66 0.06 0.36 6.69 0.09 0.39 6.72 0.12 0.42 6.75 0.15 0.45 LMC" in out
    assert "go ⌀6.6, not go ⌀6.75. Pin for position: ⌀6.3, the virtual condition." in out
    assert "Up to ⌀10: a counterbore for it is at least ⌀10.45." in out  # ISO 4762, M6; 10 + 0.45


@pytest.mark.parametrize(
    ("position", "size", "off", "words"),
    [
        (
            "DIA .014",
            ".285",
            ".016",
            "allowed .014: reject. At Ⓜ it would be accepted: .014 + bonus .006 = .020.",
        ),
        ("DIA .014 (M)", ".285", ".016", "allowed .014 + bonus .006 = .020: accept, by its bonus"),
        ("DIA .014 (M)", ".285", ".014", "accept."),
        ("DIA .014 (M)", ".280", ".020", "rework, opening the hole to .285."),
        ("DIA .014 (M)", ".280", ".0231", "reject; no larger size brings it in."),
        ("DIA .014 (M)", ".278", ".010", "the size is outside its limits: rework, opening the hole to .279."),
    ],
)
def test_decision_on_a_measured_hole(fit: Any, position: str, size: str, off: str, words: str) -> None:
    run = fit("--hole", ".281 +.007/-.002", "--position", position, "--measured", size, off)
    assert words in run.words


def test_acceptance_with_a_stated_and_with_a_typical_spread(fit: Any) -> None:
    """Within ±2.5 σ of size, 98.76 %; of the axes 1 − exp(−0.2²/(8·0.06²)) = 75.07 % without the bonus."""
    stated = fit(
        "--fastener", "M8", "--hole", "9 +0.2/0", "--position", "0.2", "--process", "location 0.06, size 0.04"
    )
    assert "74.1 % of the holes pass regardless of feature size, 93.2 % at Ⓜ" in stated.words
    typical = fit("--fastener", "M8", "--hole", "9 +0.2/0", "--position", "⌀0.2 Ⓜ")
    assert "a typical spread" in typical.words


def test_record(fit: Any, tmp_path: Path) -> None:
    target = tmp_path / "joint.json"
    fit(*M6, *HOLE, "--position", "⌀0.3 Ⓜ", *FIXED, "--measured", "6.7", "0.35", "--report", str(target))
    record = json.loads(target.read_text(encoding="utf-8"))
    assert record["fits"] is False
    assert record["spare"] == "-0.2"
    assert record["held"] == {
        "how": "fixed",
        "position": "0.2",
        "projected": False,
        "projection": "12",
        "depth": "16",
        "takes": "0.5",
    }
    assert record["largest_position"] == "0.1"
    assert record["smallest_hole"] == "6.8"
    assert record["gauge_pin"] == "6.3"
    assert record["bonus"][0] == {"size": "6.6", "bonus": "0", "position": "0.3"}
    assert record["measured"]["decision"] == "accept with bonus"
    assert 0 < record["acceptance"]["regardless_of_size"] < record["acceptance"]["with_bonus"] <= 1


@pytest.mark.parametrize(
    ("arguments", "words"),
    [
        ((), "needs two of --fastener, --hole and --position; none is given"),
        (HOLE, "only --hole is given"),
        ((*M6, "--hole", "foo"), "--hole: 'foo' is not understood. Expected is a size with its limits"),
        ((*M6, "--hole", "⌀6.6"), "--hole: '⌀6.6' has no tolerance"),
        ((*M6, "--hole", "6.6 Q7"), "ISO 286 gives no limits for '6.6 Q7'"),
        ((*M6, "--hole", "0 ±0.1"), "hold no size"),
        ((*HOLE, "--position", "0.3 foo"), "--position: '0.3 foo' is not understood"),
        ((*HOLE, "--position", "-0.3"), "--position: '-0.3' is negative"),
        ((*HOLE, "--position", "⏥ | 0.3"), "is not understood"),
        ((*HOLE, "--position", "⌀0.3 Ⓜ Ⓛ"), "at Ⓜ and at Ⓛ"),
        ((*HOLE, "--position", "⌀7"), "no fastener passes"),
        (("--fastener", "thumb screw", *HOLE), "--fastener: 'thumb screw' is not understood"),
        (("--fastener", "M90", "--position", "0.3"), "no stock drill is large enough"),
        ((*M6, *HOLE, "--depth", "12"), "give --fixed too"),
        ((*M6, *HOLE, "--fixed", "0.2", "--depth", "0"), "--depth: nothing is fixed"),
        ((*M6, *HOLE, "--fixed", "0.2", "--projection", "far"), "--projection: 'far' is not understood"),
        ((*M6, *HOLE, "--process", "good"), "--process: 'good' is not understood"),
        ((*M6, *HOLE, "--report", "joint.html"), "'fit' writes .json"),
        ((*M6, *HOLE, "joint.txt"), "joint.txt"),
    ],
)
def test_bad_input_is_said_plainly(fit: Any, arguments: tuple[str, ...], words: str) -> None:
    run = fit(*arguments)
    assert run.status == 2
    assert words in run.err
    assert run.out == ""
