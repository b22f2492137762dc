"""Which threads the series have, and which thread goes with which."""

from decimal import Decimal

import pytest

from calloutlint.callouts.fastener import parse_fastener
from calloutlint.model.thread import Thread, ThreadSystem
from calloutlint.trade import metric, unified, unified_series
from calloutlint.trade.inches import inches, nominal_size
from calloutlint.trade.threads import form_of, limits_of, pitch_of, screws_into, series_has, tpi_of


def thread(text: str) -> Thread:
    found = parse_fastener(text).thread
    assert found is not None, text
    return found


@pytest.mark.parametrize(
    "text",
    [
        "1/4-20 UNC", ".250-20 UNC", "#10-24 UNC", ".190-24 UNC", "1 1/2-6 UNC", "2-4.5 UNC",
        "#0-80 UNF", "1/4-28 UNF", "1-12 UNF", ".312-24 UNF", ".3125-24 UNF",
        "#12-32 UNEF", "11/16-24 UNEF", "1 1/16-18 UNEF",
        "1 1/8-8 UN", "1-8 UN", "5/8-12 UN", "3/4-12 UN", "7/16-16 UN", "1-32 UN", "1 1/2-8UN", "#8-32 UN",
        "1/4-28 UNJF", "3/8-16 UNJC", "1/4-20 UNRC", "1/4-20 NC", "1/4 UNC",
        "M6", "M6x1", "M6x0.75", "M8x1", "M10x1.25", "M14x1.25", "M64x6", "M64x4", "M15x1", "M1.6x0.35",
        "M8x0.5", "M12x0.75", "MJ6x1",
    ],
)  # fmt: skip
def test_series_that_have_it(text: str) -> None:
    """ASME B1.1; ISO 261, which admits still finer pitches of its list."""
    assert series_has(thread(text)) is True


@pytest.mark.parametrize(
    "text",
    [
        "1/4-28 UNC", "1/4-20 UNF", ".250-24 UNC", "#10-32 UNC", "#0-80 UNC", "1-14 UNF", "3/8-20 UNC",
        "11/16-11 UNC", "1/4-36 UNEF", ".300-20 UNC", "1/2-13 UN", "#4-40 UN", "3/8-12 UN", "1 3/4-12 UNF",
        "1/4-20 UNJF", "11/16 UNC",
        "M6x1.5", "M6x0.8", "M8x1.5", "M10x2", "M12x2", "M20x3", "M13x1", "M19", "M15", "M10x1.2", "M8x0.9",
    ],
)  # fmt: skip
def test_series_that_do_not_have_it(text: str) -> None:
    assert series_has(thread(text)) is False


@pytest.mark.parametrize("text", ["1-14 UNS", "1/4-24 UNS", "1/4-20", "#10", "2-12 UN", "M80x2", "M100"])
def test_where_any_pitch_will_do_or_the_tables_end(text: str) -> None:
    assert series_has(thread(text)) is None


def test_pipe_threads_are_not_looked_up() -> None:
    pipe = Thread(ThreadSystem.PIPE, "1/4", None, "NPT")
    assert series_has(pipe) is None
    assert (form_of(pipe), limits_of(pipe, "2B"), pitch_of(pipe)) == (None, None, None)
    assert screws_into(pipe, pipe) is None


@pytest.mark.parametrize(
    ("screw", "hole", "expected"),
    [
        ("1/4-20 UNC-2A", ".250-20 UNC-2B", True),
        ("1/4-20", "1/4-20 UNC-2B", True),
        ("1/4 UNC", "1/4-20 UNC-2B", True),
        (".312-18 UNC-2A", "5/16-18 UNC-2B", True),
        ("#10-32 UNF-2A", ".190-32 UNF-2B", True),
        ("1/4-20 UNC-2A", "1/4-28 UNF-2B", False),
        ("1/4-20 UNC-2A", "5/16-18 UNC-2B", False),
        ("1/4-20 UNC-2A", "1/4-20 UNC-2B LH", False),
        ("1/4 SCREW", "1/4-20 UNC-2B", None),
        ("1/4 SCREW", "5/16-18 UNC-2B", False),
        ("#10", "#10-32 UNF-2B", None),
        ("M8", "M8x1.25-6H", True),
        ("M8", "M8x1-6H", False),
        ("M8x1", "M8", False),
        ("M6", "M8", False),
        ("M6x1.0-6g", "M6-6H", True),
        ("M6", "1/4-20 UNC-2B", False),
    ],
)
def test_which_screw_goes_into_which_hole(screw: str, hole: str, expected: bool | None) -> None:
    """A metric size alone is coarse (ISO 261 and 965-1); an inch size alone leaves its pitch open."""
    assert screws_into(thread(screw), thread(hole)) is expected


@pytest.mark.parametrize(
    ("text", "tpi"),
    [("1/4 UNC", "20"), ("#10 UNF", "32"), ("1/4-20", "20"), ("3/4 UNEF", "20"), ("1/4 UN", None)],
)
def test_threads_per_inch_stated_or_fixed_by_the_series(text: str, tpi: str | None) -> None:
    assert tpi_of(thread(text)) == (Decimal(tpi) if tpi else None)


@pytest.mark.parametrize(
    ("text", "pitch"), [("M8", "1.25"), ("M8x1", "1"), ("M15", None), ("1/4-20", ".05"), ("1/4 SCREW", None)]
)
def test_pitch_stated_or_coarse(text: str, pitch: str | None) -> None:
    assert pitch_of(thread(text)) == (Decimal(pitch) if pitch else None)


def test_limits_of_a_called_out_thread() -> None:
    """ASME B1.1: 1/4-20 UNC-2B minor .196 to .207; ISO 965-2: M8 6H minor 6.647 to 6.912."""
    inch, coarse = limits_of(thread(".250-20 UNC-2B")), limits_of(thread("M8"), "6H")
    assert inch is not None
    assert coarse is not None
    assert (inch.minor_min, inch.minor_max) == (Decimal(".196"), Decimal(".207"))
    assert (coarse.minor_min, coarse.minor_max) == (Decimal("6.647"), Decimal("6.912"))
    assert limits_of(thread(".250-20 UNC")) is None


@pytest.mark.parametrize("class_", ["4A", "6H", "2", "", "2C"])
def test_classes_that_unified_threads_do_not_have(class_: str) -> None:
    assert unified.limits(unified.thread("1/4", Decimal(20)), class_) is None


@pytest.mark.parametrize("class_", ["2A", "6", "6x", "3H", "9H", "5g", "6g6H", "6H6g", "6Hx", "", "66"])
def test_classes_that_metric_threads_do_not_have(class_: str) -> None:
    form = metric.thread(Decimal(8))
    assert form is not None
    assert metric.limits(form, class_) is None


@pytest.mark.parametrize("pitch", ["0.9", "0", "1.1", "7"])
def test_pitches_without_published_deviations_have_no_limits(pitch: str) -> None:
    form = metric.thread(Decimal(20), Decimal(pitch))
    assert form is not None
    assert metric.limits(form, "6H") is None


def test_closer_classes_lie_within_wider_ones() -> None:
    """Pitch diameter tolerance of class 3 is smaller than of class 2, and that smaller than of class 1."""
    form = unified.thread("3/8", Decimal(16))
    for side in "AB":
        widths = [unified.pitch_diameter_tolerance(form, f"{number}{side}") for number in (3, 2, 1)]
        assert widths == sorted(set(widths))


@pytest.mark.parametrize(
    ("diameter", "name"),
    [(".25", "1/4"), (".312", "5/16"), (".3125", "5/16"), (".19", "#10"), (".164", "#8"), ("1.125", "1 1/8"),
     (".3", None), (".203", None), ("0", None), (".24", None)],
)  # fmt: skip
def test_nominal_size_of_a_diameter(diameter: str, name: str | None) -> None:
    found = nominal_size(Decimal(diameter))
    assert (found.name if found else None) == name


@pytest.mark.parametrize(
    ("text", "expected"), [("17/64", ".265625"), ("1 1/32", "1.03125"), (".257", ".257"), ("2", "2")]
)
def test_inches_of_a_fraction(text: str, expected: str) -> None:
    assert inches(text) == Decimal(expected)


@pytest.mark.parametrize("text", ["", "a", "1/", "/2", "1/0", "1.2.3", "-1", "1/2/3"])
def test_what_is_no_size_in_inches(text: str) -> None:
    with pytest.raises(ValueError, match="no size in inches"):
        inches(text)


def every_unified() -> list[tuple[str, Decimal, str]]:
    return [
        (name, tpi, series)
        for name, listed in unified_series.all_series().items()
        for series in ("UNC", "UNF", "UNEF", "UN")
        for tpi in listed.of(series)
    ]


@pytest.mark.parametrize(("external", "internal"), [("1A", "1B"), ("2A", "2B"), ("3A", "3B"), ("2A", "3B")])
def test_every_unified_screw_enters_every_hole_of_its_size(external: str, internal: str) -> None:
    """At their closest the pitch and major diameters of ASME B1.1 just meet, and never cross."""
    for name, tpi, series in every_unified():
        form = unified.thread(name, tpi, series)
        screw, hole = unified.limits(form, external), unified.limits(form, internal)
        assert screw is not None
        assert hole is not None
        assert screw.pitch_min < screw.pitch_max <= hole.pitch_min < hole.pitch_max, (name, tpi)
        assert screw.major_max is not None
        assert screw.pitch_max < screw.major_min < screw.major_max <= hole.major_min, (name, tpi)
        assert hole.minor_min is not None
        assert hole.minor_max is not None
        assert hole.minor_min < hole.minor_max < hole.pitch_min, (name, tpi)


@pytest.mark.parametrize(
    ("external", "internal"), [("6g", "6H"), ("4h", "4H"), ("6f", "6G"), ("8g", "7H"), ("5g6g", "5H6H")]
)
def test_every_metric_screw_enters_every_hole_of_its_size(external: str, internal: str) -> None:
    """The pitches of ISO 261 from 0.5 mm, where all these classes are in use (ISO 965-1)."""
    for diameter, listed in metric.pitches().items():
        for pitch in filter(None, (listed.coarse, *listed.fine)):
            form = metric.thread(diameter, pitch)
            assert form is not None
            screw, hole = metric.limits(form, external), metric.limits(form, internal)
            if pitch < Decimal("0.5"):
                continue
            assert screw is not None
            assert hole is not None
            assert screw.pitch_min < screw.pitch_max <= hole.pitch_min < hole.pitch_max, (diameter, pitch)
            assert screw.major_max is not None
            assert screw.pitch_max < screw.major_min < screw.major_max <= hole.major_min, (diameter, pitch)
            assert hole.minor_min is not None
            assert hole.minor_max is not None
            assert hole.minor_min < hole.minor_max < hole.pitch_min, (diameter, pitch)


def test_coarse_is_the_coarsest() -> None:
    """In every row of ISO 261 and of ASME B1.1 the series get finer from left to right."""
    for listed in metric.pitches().values():
        found = [pitch for pitch in (listed.coarse, *listed.fine) if pitch]
        assert found == sorted(set(found), reverse=True)
    for series in unified_series.all_series().values():
        tpis = [tpi for tpi in (series.coarse, series.fine, series.extra_fine) if tpi]
        assert tpis == sorted(set(tpis))
