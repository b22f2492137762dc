"""Callouts as hypothesis draws them: models that a drawing can state, and the many ways to write one."""

from decimal import Decimal

from hypothesis import strategies as st

from calloutlint.callouts.words import meanings_of
from calloutlint.model.callout import DatumFeature, DatumTarget, Part, TargetKind, Words
from calloutlint.model.frame import (
    Characteristic,
    DatumLetter,
    DatumRef,
    Frame,
    Modifier,
    ModifierUse,
    PerUnit,
    Scope,
    ScopeKind,
    Segment,
    Zone,
    ZoneShape,
)
from calloutlint.model.hole import HoleStep, StepKind
from calloutlint.model.size import (
    Count,
    Depth,
    Deviations,
    FitCode,
    Limits,
    PlusMinus,
    Size,
    SizeForm,
    SizeModifier,
    SizeStatus,
    Through,
)
from calloutlint.model.thread import Thread, ThreadSystem
from calloutlint.model.values import Value
from calloutlint.units import Unit

UNIT = Unit.INCH
LETTERS = "ABCDEFGHJKNPRTVWXYZ"


def _value(text: str, unit: Unit | None = UNIT) -> Value:
    return Value(text, Decimal(text), unit)


@st.composite
def values(draw: st.DrawFn, sign: str = "") -> Value:
    """A decimal of an inch drawing, larger than nothing."""
    whole = draw(st.sampled_from(["", "1", "12"]))
    decimals = draw(st.text("0123456789", min_size=2, max_size=4).filter(lambda digits: digits.strip("0")))
    return _value(f"{sign}{whole}.{decimals}")


angles = st.builds(lambda n: Value(f"{n}°", Decimal(n), Unit.DEGREE), st.integers(1, 179))
plus_minus = st.builds(PlusMinus, values())
nil = st.sampled_from([_value("0"), _value("+.000"), _value("-.000")])
deviations = st.one_of(
    st.builds(Deviations, values("+"), values("-")),
    st.builds(Deviations, values("+"), values("+")),
    st.builds(Deviations, values("-"), values("-")),
    st.builds(Deviations, values("+"), nil),
    st.builds(Deviations, nil, values("-")),
)
tolerances = st.one_of(st.none(), plus_minus, deviations)
counts = st.one_of(
    st.none(),
    st.integers(1, 48).map(lambda n: Count(n, f"{n}X")),
    st.integers(2, 12).map(lambda n: Count(n, f"{n} HOLES")),
    st.integers(2, 12).map(lambda n: Count(n, f"{n} PL")),
    st.just(Count(None, "TYP")),
)
forms = st.sampled_from([form for form in SizeForm if form is not SizeForm.ANGLE])


@st.composite
def limits(draw: st.DrawFn) -> Limits:
    """Two limits close enough to be those of one size."""
    first = draw(values())
    second = first.amount + draw(st.integers(-9, 9)) * Decimal("0.01").scaleb(-2)
    return Limits(first, _value(format(max(second, first.amount / 2), "f")), draw(st.booleans()))


depths = st.builds(Depth, st.one_of(st.none(), st.builds(Size, st.just(SizeForm.LINEAR), values(), tolerances)))
extents = st.one_of(st.none(), st.just(Through()), st.just(Through("THRU ALL")), depths)
modifiers = st.lists(st.sampled_from(SizeModifier), unique=True, max_size=2).map(tuple)
plain_sizes = st.builds(
    Size,
    form=forms,
    nominal=values(),
    tolerance=tolerances,
    status=st.sampled_from(SizeStatus),
    count=counts,
    extent=extents,
    modifiers=modifiers,
)
limit_sizes = st.builds(Size, form=forms, nominal=st.none(), tolerance=limits(), count=counts, extent=extents)
fit_codes = st.builds(
    FitCode, st.sampled_from(["H", "h", "g", "f", "js", "JS", "P", "m", "R"]), st.sampled_from("6789")
)
fit_sizes = st.builds(
    Size,
    form=st.sampled_from([SizeForm.DIAMETER, SizeForm.LINEAR]),
    nominal=values(),
    tolerance=st.one_of(st.none(), deviations, limits().map(lambda pair: Limits(pair.first, pair.second))),
    fit=fit_codes,
    count=counts,
    extent=extents,
)
angle_sizes = st.builds(
    Size, st.just(SizeForm.ANGLE), angles, st.one_of(st.none(), st.builds(PlusMinus, angles)), count=counts
)
sizes = st.one_of(plain_sizes, limit_sizes, fit_sizes, angle_sizes)

step_sizes = st.builds(Size, st.just(SizeForm.DIAMETER), values(), tolerances)
steps = st.one_of(
    st.builds(
        HoleStep,
        st.sampled_from([StepKind.COUNTERBORE, StepKind.SPOTFACE]),
        st.one_of(st.none(), step_sizes),
        count=counts,
        extent=st.one_of(st.none(), depths),
    ),
    st.builds(
        HoleStep,
        st.just(StepKind.COUNTERSINK),
        step_sizes,
        st.one_of(st.none(), st.builds(Size, st.just(SizeForm.ANGLE), angles)),
        count=counts,
    ),
    st.builds(
        HoleStep, st.just(StepKind.DRILL), drill=st.sampled_from(["#7", "#21", "F", "Q"]), extent=extents
    ),
)


def _inch(size: str, diameter: str, tpi: str, series: str) -> Thread:
    return Thread(ThreadSystem.UNIFIED, size, _value(diameter), series, tpi=_value(tpi, None))


def _metric(size: str, pitch: str | None) -> Thread:
    number = size.lstrip("MJ")
    series = size.rstrip("0123456789.")
    return Thread(
        ThreadSystem.METRIC,
        f"M{number}",
        _value(number, Unit.MM),
        series,
        pitch=_value(pitch, Unit.MM) if pitch else None,
    )


bare_threads = st.sampled_from(
    [
        (_inch(".250", ".250", "20", "UNC"), ["2A", "2B", "3B"]),
        (_inch("#10", ".190", "32", "UNF"), ["2A", "2B"]),
        (_inch(".500", ".500", "13", "UNJC"), ["3A", "3B"]),
        (_metric("M6", "1"), ["6H", "6g", "4g6g"]),
        (_metric("M8", None), ["6H", "6g"]),
        (_metric("MJ6", "1"), ["4H5H", "4h6h"]),
    ]
)


@st.composite
def threads(draw: st.DrawFn) -> Thread:
    """A thread with or without class, hand, count and depth."""
    thread, classes = draw(bare_threads)
    return Thread(
        thread.system,
        thread.size,
        thread.diameter,
        thread.series,
        thread.tpi,
        thread.pitch,
        draw(st.one_of(st.none(), st.sampled_from(classes))),
        draw(st.booleans()),
        1,
        draw(counts),
        draw(extents),
    )


_WITH_NUMBER = (Modifier.PROJECTED, Modifier.UNEQUAL)
_PLAIN = (
    Modifier.MMC,
    Modifier.LMC,
    Modifier.RFS,
    Modifier.FREE_STATE,
    Modifier.TANGENT,
    Modifier.INDEPENDENCY,
    Modifier.RECIPROCITY,
    Modifier.STATISTICAL,
    Modifier.CONTINUOUS_FEATURE,
    Modifier.DYNAMIC,
    Modifier.COMBINED_ZONE,
    Modifier.UNITED_FEATURE,
)
uses = st.one_of(
    st.builds(ModifierUse, st.sampled_from(_PLAIN)),
    st.builds(ModifierUse, st.sampled_from(_WITH_NUMBER), st.one_of(st.none(), values())),
)
zones = st.builds(
    Zone,
    shape=st.sampled_from(ZoneShape),
    value=values(),
    modifiers=st.lists(uses, max_size=3, unique_by=lambda use: use.kind).map(tuple),
    per=st.one_of(st.none(), st.builds(PerUnit, values(), st.one_of(st.none(), values()))),
)
datum_uses = st.lists(
    st.builds(ModifierUse, st.sampled_from([Modifier.MMC, Modifier.LMC, Modifier.TRANSLATION])),
    max_size=2,
    unique_by=lambda use: use.kind,
).map(tuple)


@st.composite
def datums(draw: st.DrawFn) -> DatumRef:
    """A single datum with modifiers and freedoms, or a common one."""
    letters = draw(st.lists(st.sampled_from(LETTERS), min_size=1, max_size=3))
    freedoms = draw(st.lists(st.sampled_from("uvwxyz"), max_size=3, unique=True))
    if len(letters) == 1:
        return DatumRef((DatumLetter(letters[0]),), draw(datum_uses), tuple(freedoms))
    return DatumRef(tuple(DatumLetter(letter, draw(datum_uses)) for letter in letters), (), tuple(freedoms))


@st.composite
def frames(draw: st.DrawFn) -> Frame:
    """A frame of one to three segments."""
    characteristic = draw(st.sampled_from(Characteristic))
    segment = st.builds(Segment, st.just(characteristic), zones, st.lists(datums(), max_size=3).map(tuple))
    segments = draw(st.lists(segment, min_size=1, max_size=3))
    scope = st.sampled_from(
        [None, Scope(ScopeKind.ALL_AROUND), Scope(ScopeKind.ALL_OVER)]
        + [Scope(kind, "A", "B") for kind in (ScopeKind.BETWEEN, ScopeKind.FROM_TO)]
    )
    return Frame(tuple(segments), draw(scope), draw(st.sampled_from([None, Count(2, "2X"), Count(3, "3 PL")])))


targets = st.builds(
    DatumTarget,
    st.sampled_from("ABCDEF"),
    st.integers(1, 12),
    st.just(TargetKind.AREA),
    st.lists(values(), min_size=1, max_size=2).map(tuple),
    st.booleans(),
)
words = st.sampled_from(
    ["BEARING BORE", "NEAR SIDE", "DEBURR", "SEE NOTE 3", "MATERIAL 6061-T6", "AS SHOWN", "PRESS FIT", "FACE"]
).map(lambda text: Words(text, meanings_of(text)))
parts: st.SearchStrategy[Part] = st.one_of(
    sizes, threads(), steps, frames(), st.builds(DatumFeature, st.sampled_from(LETTERS)), targets, words
)
