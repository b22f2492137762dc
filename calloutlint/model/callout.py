"""A callout: everything a balloon points at."""

from collections.abc import Iterator
from dataclasses import dataclass, field
from enum import StrEnum

from calloutlint.model.fastener import Fastener, Hold
from calloutlint.model.frame import Frame, Segment
from calloutlint.model.hole import HoleStep
from calloutlint.model.size import Count, Size
from calloutlint.model.source import NOWHERE, SourceLine, Span
from calloutlint.model.thread import Thread
from calloutlint.model.values import Value


class Meaning(StrEnum):
    """What plain words in a callout say that rules can use."""

    HOLE = "hole"
    SLOT = "slot"
    GROOVE = "groove"
    BORE = "bore"
    SHAFT = "shaft"
    PIN = "pin"
    BOSS = "boss"
    TAB = "tab"
    SURFACE = "surface"
    FACE = "face"
    SPHERE = "sphere"
    CYLINDER = "cylinder"
    WIDTH = "width"
    CLEARANCE_FIT = "clearance fit"
    INTERFERENCE_FIT = "interference fit"
    TRANSITION_FIT = "transition fit"
    FORM_TAP = "form tap"
    SEPARATE_REQUIREMENT = "separate requirement"
    SIMULTANEOUS_REQUIREMENT = "simultaneous requirement"
    INDIVIDUALLY = "individually"
    BOUNDARY = "boundary"
    EACH_ELEMENT = "each element"


@dataclass(frozen=True, slots=True)
class Words:
    """Plain words beside the symbols. `text` is as written, spaces folded."""

    text: str
    meanings: tuple[Meaning, ...] = ()
    span: Span = field(default=NOWHERE, compare=False)


def _counted(count: Count) -> set[Meaning]:
    """What a count says it counts: `4 HOLES` counts holes."""
    noun = count.written.rpartition(" ")[2].lower()
    return {meaning for meaning in Meaning if noun in {meaning.value, f"{meaning}s", f"{meaning}es"}}


@dataclass(frozen=True, slots=True)
class FastenerNote:
    """A fastener named in the callout: `FOR .250-20 UNC SCREW`, `CLEARANCE FOR M6 FLOATING`."""

    fastener: Fastener
    hold: Hold | None = None
    span: Span = field(default=NOWHERE, compare=False)


@dataclass(frozen=True, slots=True)
class DatumFeature:
    """A datum feature symbol attached to the callout."""

    letter: str
    span: Span = field(default=NOWHERE, compare=False)


class TargetKind(StrEnum):
    """Geometry of a datum target."""

    POINT = "point"
    LINE = "line"
    AREA = "area"


@dataclass(frozen=True, slots=True)
class DatumTarget:
    """A datum target: `A1`, `A1 ⌀.50`, `A1 LINE`, `A1 10x20`. `sizes` holds a diameter, or two sides."""

    letter: str
    number: int
    kind: TargetKind = TargetKind.POINT
    sizes: tuple[Value, ...] = ()
    movable: bool = False
    span: Span = field(default=NOWHERE, compare=False)


@dataclass(frozen=True, slots=True)
class Unread:
    """Text that could not be read, with what was expected there and the nearest known spelling."""

    text: str
    expected: tuple[str, ...] = ()
    nearest: str | None = None
    in_frame: bool = False
    span: Span = field(default=NOWHERE, compare=False)


Part = Size | Thread | HoleStep | Frame | DatumFeature | DatumTarget | FastenerNote | Words | Count | Unread


@dataclass(frozen=True, slots=True)
class Callout:
    """All that stands under one balloon, in reading order.

    `parts` is the meaning; `source` where it stands. A `Count` among the parts is one that belongs to no
    other part (`4X` alone on its line). Callouts are equal if they mean the same, wherever they stand.
    """

    balloon: str
    parts: tuple[Part, ...]
    zone: str | None = None
    source: tuple[SourceLine, ...] = field(default=(), compare=False)

    @property
    def sizes(self) -> tuple[Size, ...]:
        """Sizes in reading order, those inside hole steps left out."""
        return tuple(part for part in self.parts if isinstance(part, Size))

    @property
    def threads(self) -> tuple[Thread, ...]:
        """Threads in reading order."""
        return tuple(part for part in self.parts if isinstance(part, Thread))

    @property
    def steps(self) -> tuple[HoleStep, ...]:
        """Hole steps in reading order."""
        return tuple(part for part in self.parts if isinstance(part, HoleStep))

    @property
    def frames(self) -> tuple[Frame, ...]:
        """Feature control frames in reading order."""
        return tuple(part for part in self.parts if isinstance(part, Frame))

    @property
    def segments(self) -> Iterator[Segment]:
        """Every line of every frame, in reading order."""
        return (segment for frame in self.frames for segment in frame.segments)

    @property
    def datum_features(self) -> tuple[DatumFeature, ...]:
        """Datum features that the callout establishes."""
        return tuple(part for part in self.parts if isinstance(part, DatumFeature))

    @property
    def datum_targets(self) -> tuple[DatumTarget, ...]:
        """Datum targets in reading order."""
        return tuple(part for part in self.parts if isinstance(part, DatumTarget))

    @property
    def unread(self) -> tuple[Unread, ...]:
        """What could not be read."""
        return tuple(part for part in self.parts if isinstance(part, Unread))

    @property
    def meanings(self) -> frozenset[Meaning]:
        """What the plain words of the callout say, those of its counts (`4 HOLES`) included."""
        said = {meaning for part in self.parts if isinstance(part, Words) for meaning in part.meanings}
        counts = (part if isinstance(part, Count) else getattr(part, "count", None) for part in self.parts)
        return frozenset(said.union(*(_counted(count) for count in counts if count is not None)))

    @property
    def count(self) -> Count | None:
        """The first count written in the callout."""
        for part in self.parts:
            count = part if isinstance(part, Count) else getattr(part, "count", None)
            if isinstance(count, Count):
                return count
        return None
