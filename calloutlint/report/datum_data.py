"""What the datum overview of a drawing says, as data: its datum features, its frames, what was assumed."""

from collections.abc import Iterator
from dataclasses import dataclass

from calloutlint.facts.datums.control import controls
from calloutlint.facts.datums.frames import FrameInForce, frames_in_force
from calloutlint.facts.datums.held import held, left, redundant
from calloutlint.facts.datums.kinds import DatumGeometry, DatumKind
from calloutlint.facts.datums.motion import Freedom
from calloutlint.facts.datums.scheme import DatumScheme, Established
from calloutlint.facts.datums.words import in_words
from calloutlint.model.frame import Segment


@dataclass(frozen=True, slots=True)
class FeatureLine:
    """A datum feature: what it is, the balloons that establish it, how it is itself controlled.

    `targets` are its datum targets, `A1`, `A2`; `sized` whether it has a size; `lines` the frame lines on it.
    """

    letter: str
    kind: str
    balloons: tuple[str, ...]
    targets: tuple[str, ...]
    sized: bool
    lines: tuple[Segment, ...]


@dataclass(frozen=True, slots=True)
class FrameLine:
    """A datum reference frame: a frame line that refers to it, the balloons of all, who takes each freedom.

    `takers` has one name for each of x y z u v w: "" for a freedom that stays, None where it is not known.
    `left` says what stays in plain words; `tied` are the balloons that one setting has to satisfy together;
    `idle` names datums that take nothing.
    """

    segment: Segment
    balloons: tuple[str, ...]
    tied: tuple[str, ...]
    takers: tuple[str | None, ...]
    left: str
    idle: tuple[str, ...]


@dataclass(frozen=True, slots=True)
class DatumOverview:
    """The datum scheme of a drawing at a glance."""

    features: tuple[FeatureLine, ...]
    frames: tuple[FrameLine, ...]
    assumed: tuple[str, ...]


def datum_overview(scheme: DatumScheme) -> DatumOverview:
    """The overview of one drawing."""
    frames = frames_in_force(scheme)
    told = [each for frame in frames for each in held(frame.uses[0].segment, scheme)]
    assumed = dict.fromkeys(words for each in told if each.assumed for words in each.assumed.split("; "))
    return DatumOverview(
        (*map(_feature_line, scheme.features.values()), *_undefined(frames, scheme)),
        tuple(_frame_line(frame, scheme) for frame in frames),
        tuple(assumed),
    )


def _feature_line(feature: Established) -> FeatureLine:
    control = controls(feature)
    carriers = feature.callouts or tuple(callout for callout, _ in feature.targets)
    return FeatureLine(
        feature.letter,
        _kind(feature.geometry),
        tuple(dict.fromkeys(callout.balloon for callout in carriers)),
        tuple(f"{target.letter}{target.number}" for _, target in feature.targets),
        control.size,
        (*control.form, *control.related),
    )


def _kind(geometry: DatumGeometry | None) -> str:
    if geometry is None:
        return "kind not known"
    if geometry.kind is not DatumKind.PATTERN or geometry.member is None:
        return geometry.kind.value
    plural = "axes" if geometry.member is DatumKind.AXIS else f"{geometry.member}s"
    return f"pattern of {geometry.count} {plural}"


def _undefined(frames: tuple[FrameInForce, ...], scheme: DatumScheme) -> Iterator[FeatureLine]:
    """Letters that frames refer to and no callout establishes."""
    named = dict.fromkeys(member.letter for frame in frames for ref in frame.refs for member in ref.letters)
    for letter in named:
        if letter not in scheme.features:
            yield FeatureLine(letter, "defined nowhere", (), (), sized=False, lines=())


def _frame_line(frame: FrameInForce, scheme: DatumScheme) -> FrameLine:
    segment = frame.uses[0].segment
    stays = left(segment, scheme)
    return FrameLine(
        segment,
        tuple(dict.fromkeys(use.callout.balloon for use in frame.uses)),
        tuple(dict.fromkeys(use.callout.balloon for use in frame.simultaneous)),
        tuple(_taker(freedom, segment, scheme) for freedom in Freedom),
        "not known" if stays is None else in_words(stays),
        tuple(ref.name for ref in redundant(segment, scheme)),
    )


def _taker(freedom: Freedom, segment: Segment, scheme: DatumScheme) -> str | None:
    """The name of the datum that takes a freedom, "" for none; None after a datum that is not known."""
    for each in held(segment, scheme):
        if each.new is None:
            return None
        if freedom in each.new:
            return each.ref.name
    return ""
