"""Where frame lines refer to datums."""

from collections.abc import Iterable, Iterator
from dataclasses import dataclass

from calloutlint.model.callout import Callout
from calloutlint.model.frame import DatumRef, Frame, Modifier, ModifierUse, Segment

_BOUNDARY = {Modifier.MMC: "M", Modifier.LMC: "L"}

Boundaries = tuple[tuple[str, str], ...]


@dataclass(frozen=True, slots=True, eq=False)
class Use:
    """One line of a frame where it stands, told by its identity: callouts that read alike share their lines.

    `lower` is a line of a composite frame below the first. `order` has the names of the datums in order of
    precedence; a common datum is the same whichever letter is first.
    """

    callout: Callout
    frame: Frame
    segment: Segment
    lower: bool
    order: tuple[str, ...]

    @property
    def boundaries(self) -> tuple[Boundaries, ...]:
        """The material boundary modifiers of each reference, letter by letter."""
        return tuple(_boundaries(ref) for ref in self.segment.datums)


def uses_in(callouts: Iterable[Callout]) -> Iterator[Use]:
    """Every frame line of the callouts in reading order, without datums too."""
    for callout in callouts:
        for frame in callout.frames:
            for number, segment in enumerate(frame.segments):
                yield Use(callout, frame, segment, number > 0, tuple(map(_name, segment.datums)))


def _name(ref: DatumRef) -> str:
    letters = ref.letters
    return letters[0].letter if len(letters) == 1 else "-".join(sorted(letter.letter for letter in letters))


def _boundaries(ref: DatumRef) -> Boundaries:
    return tuple(sorted((m.letter, _signs((*ref.modifiers, *m.modifiers))) for m in ref.letters))


def _signs(uses: Iterable[ModifierUse]) -> str:
    return "".join(_BOUNDARY[use.kind] for use in uses if use.kind in _BOUNDARY)
