"""How each datum feature is itself controlled: its size, its form, its relation to earlier datums.

Source: ASME Y14.5 (datum features are controlled in form, and in orientation or location to the datums of
higher precedence).
"""

from dataclasses import dataclass

from calloutlint.facts.datums.scheme import DatumScheme, Established
from calloutlint.model.frame import Characteristic, DatumRef, Segment
from calloutlint.model.size import SizeStatus

FORM = frozenset(
    {
        Characteristic.STRAIGHTNESS,
        Characteristic.FLATNESS,
        Characteristic.CIRCULARITY,
        Characteristic.CYLINDRICITY,
    }
)


@dataclass(frozen=True, slots=True)
class Control:
    """How one datum feature is controlled: whether it has a `size`, its `form` lines, its lines to datums."""

    letter: str
    size: bool
    form: tuple[Segment, ...]
    related: tuple[Segment, ...]


def controls(feature: Established) -> Control:
    """How a datum feature is controlled by the callouts that establish it."""
    segments = [segment for callout in feature.callouts for segment in callout.segments]
    sized = any(
        callout.threads or any(size.status is not SizeStatus.REFERENCE for size in callout.sizes)
        for callout in feature.callouts
    )
    form = tuple(s for s in segments if s.characteristic in FORM or (not s.datums and _is_profile(s)))
    return Control(feature.letter, sized, form, tuple(s for s in segments if s.datums))


@dataclass(frozen=True, slots=True)
class Uncontrolled:
    """A datum feature that lacks a control its place asks for.

    `primary` is None for a primary datum feature without control of size or form, and for a secondary one
    the primary datum that nothing relates it to.
    """

    feature: Established
    primary: DatumRef | None


def uncontrolled(scheme: DatumScheme) -> tuple[Uncontrolled, ...]:
    """Primary features without size or form control, and secondary ones not related to their primary."""
    found: dict[tuple[str, str | None], Uncontrolled] = {}
    leading = {use.order[:2]: use.segment.datums for use in scheme.uses}
    for refs in leading.values():
        for feature in _features(refs[0], scheme):
            if lacks_form(feature):
                found.setdefault((feature.letter, None), Uncontrolled(feature, None))
        for feature in _features(refs[1], scheme) if len(refs) > 1 else ():
            if lacks_relation(feature, refs[0]):
                found.setdefault((feature.letter, refs[0].name), Uncontrolled(feature, refs[0]))
    return tuple(found.values())


def lacks_form(feature: Established) -> bool:
    """Whether nothing on a datum feature limits its form: no size, no form tolerance, none that implies one."""
    control = controls(feature)
    return _is_bare(feature) and not (control.size or control.form or control.related)


def lacks_relation(feature: Established, primary: DatumRef) -> bool:
    """Whether no tolerance on a secondary datum feature relates it to the primary datum."""
    wanted = _names(primary)
    related = controls(feature).related
    return _is_bare(feature) and not any(wanted & _names(ref) for s in related for ref in s.datums)


def _features(ref: DatumRef, scheme: DatumScheme) -> list[Established]:
    return [scheme.features[letter.letter] for letter in ref.letters if letter.letter in scheme.features]


def _is_bare(feature: Established) -> bool:
    """Whether the callouts speak for the feature: it has some, all of them read, and no datum targets."""
    read = not any(callout.unread for callout in feature.callouts)
    return bool(feature.callouts) and read and not feature.targets


def _names(ref: DatumRef) -> set[str]:
    return {letter.letter for letter in ref.letters}


def _is_profile(segment: Segment) -> bool:
    return segment.characteristic in (Characteristic.SURFACE_PROFILE, Characteristic.LINE_PROFILE)
