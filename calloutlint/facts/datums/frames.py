"""Datum reference frames in force: which callouts share one, and which differ by order or by a modifier.

Source: ASME Y14.5 (datum reference frames, simultaneous requirements), ISO 5459 (datum systems),
ISO 5458 (simultaneous requirement only where SIM is written).
"""

from collections.abc import Iterable, Iterator
from dataclasses import dataclass

from calloutlint.facts.datums.scheme import DatumScheme
from calloutlint.model.callout import Callout, Meaning
from calloutlint.model.frame import Characteristic, DatumRef, Frame, Modifier, ModifierUse, Segment

_LOCATING = {Characteristic.POSITION, Characteristic.SURFACE_PROFILE, Characteristic.LINE_PROFILE}
_BOUNDARY = {Modifier.MMC: "M", Modifier.LMC: "L"}

Boundaries = tuple[tuple[str, str], ...]


@dataclass(frozen=True, slots=True)
class Use:
    """One line of a frame where it stands. `lower` is a line of a composite frame below the first."""

    callout: Callout
    frame: Frame
    segment: Segment
    lower: bool

    @property
    def order(self) -> tuple[str, ...]:
        """Names of the datums in order of precedence; a common datum is the same whichever letter is first."""
        return tuple(_name(ref) for ref in self.segment.datums)

    @property
    def boundaries(self) -> tuple[Boundaries, ...]:
        """The material boundary modifiers of each reference, letter by letter."""
        return tuple(_boundaries(ref) for ref in self.segment.datums)


@dataclass(frozen=True, slots=True)
class FrameInForce:
    """A datum reference frame with all lines that refer to it, in the order of the drawing.

    Two lines share it if letters, order, material boundaries and named freedoms are the same. `simultaneous`
    are the lines that one setting of the part has to satisfy together, empty where fewer than two callouts
    are tied.
    """

    refs: tuple[DatumRef, ...]
    uses: tuple[Use, ...]
    simultaneous: tuple[Use, ...]


def uses_of(scheme: DatumScheme) -> Iterator[Use]:
    """Every frame line with datum references, in the order of the drawing; doubtful ones left out."""
    for callout in scheme.callouts:
        for frame in callout.frames:
            for number, segment in enumerate(frame.segments):
                if segment.datums and not segment.doubtful:
                    yield Use(callout, frame, segment, lower=number > 0)


def frames_in_force(scheme: DatumScheme) -> tuple[FrameInForce, ...]:
    """The datum reference frames of a drawing in the order they first appear."""
    groups: dict[object, list[Use]] = {}
    for use in uses_of(scheme):
        names = tuple(ref.freedoms for ref in use.segment.datums)
        groups.setdefault((use.order, use.boundaries, names), []).append(use)
    return tuple(
        FrameInForce(uses[0].segment.datums, tuple(uses), _simultaneous(uses, scheme))
        for uses in groups.values()
    )


def _simultaneous(uses: list[Use], scheme: DatumScheme) -> tuple[Use, ...]:
    """Position and profile of one frame go together unless parted; under ISO only where SIM says so."""
    tied = tuple(use for use in uses if may_be_tied(use) and (not scheme.iso or _says_so(use)))
    return tied if len({id(use.callout) for use in tied}) > 1 else ()


def may_be_tied(use: Use) -> bool:
    """Whether a frame line could share a simultaneous requirement: it locates, and nothing parts it."""
    locates = use.segment.characteristic in _LOCATING and not use.lower
    return locates and Meaning.SEPARATE_REQUIREMENT not in use.callout.meanings


def _says_so(use: Use) -> bool:
    zone = use.segment.zone
    written = zone is not None and zone.modifier(Modifier.SIMULTANEOUS) is not None
    return written or Meaning.SIMULTANEOUS_REQUIREMENT in use.callout.meanings


def _name(ref: DatumRef) -> str:
    return "-".join(sorted(letter.letter for letter in ref.letters))


def _boundaries(ref: DatumRef) -> Boundaries:
    return tuple(sorted((m.letter, _signs((*ref.modifiers, *m.modifiers))) for m in ref.letters))


def _signs(uses: Iterable[ModifierUse]) -> str:
    return "".join(_BOUNDARY[use.kind] for use in uses if use.kind in _BOUNDARY)
