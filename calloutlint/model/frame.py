"""Feature control frames: characteristic, tolerance zone, datum references."""

from dataclasses import dataclass, field
from enum import StrEnum

from calloutlint.model.size import Count
from calloutlint.model.source import NOWHERE, Span
from calloutlint.model.values import Value


class Characteristic(StrEnum):
    """The fourteen geometric characteristics; the value is the word that rule sheets and messages use."""

    STRAIGHTNESS = "straightness"
    FLATNESS = "flatness"
    CIRCULARITY = "circularity"
    CYLINDRICITY = "cylindricity"
    LINE_PROFILE = "line profile"
    SURFACE_PROFILE = "surface profile"
    ANGULARITY = "angularity"
    PERPENDICULARITY = "perpendicularity"
    PARALLELISM = "parallelism"
    POSITION = "position"
    CONCENTRICITY = "concentricity"
    SYMMETRY = "symmetry"
    CIRCULAR_RUNOUT = "circular runout"
    TOTAL_RUNOUT = "total runout"


class Modifier(StrEnum):
    """Symbols that may stand in a compartment; the value is the letter or word that rule sheets use."""

    MMC = "M"
    LMC = "L"
    RFS = "S"
    GAUSSIAN = "G"
    MINIMUM_CIRCUMSCRIBED = "N"
    MINIMAX = "C"
    MAXIMUM_INSCRIBED = "X"
    PROJECTED = "P"
    FREE_STATE = "F"
    TANGENT = "T"
    UNEQUAL = "U"
    INDEPENDENCY = "I"
    ENVELOPE = "E"
    RECIPROCITY = "R"
    STATISTICAL = "ST"
    CONTINUOUS_FEATURE = "CF"
    DYNAMIC = "DYNAMIC"
    TRANSLATION = "TRANSLATION"
    COMBINED_ZONE = "CZ"
    SEPARATE_ZONES = "SZ"
    OFFSET_ZONE = "UZ"
    UNSPECIFIED_OFFSET = "OZ"
    SIMULTANEOUS = "SIM"
    UNITED_FEATURE = "UF"
    COMMON_TOLERANCE = "CT"
    ANY_CROSS_SECTION = "ACS"
    SPECIFIED_CROSS_SECTION = "SCS"
    ANY_LONGITUDINAL_SECTION = "ALS"
    MAJOR_DIAMETER = "MD"
    MINOR_DIAMETER = "LD"
    PITCH_DIAMETER = "PD"
    NOT_CONVEX = "NC"
    ORIENTATION_ONLY = "><"
    POINT = "PT"
    LINE = "SL"
    PLANE = "PL"
    CONTACTING = "CF_DATUM"
    EACH_ELEMENT = "LE"


class ZoneShape(StrEnum):
    """Shape of a tolerance zone as the compartment states it."""

    WIDTH = "width"
    DIAMETER = "diameter"
    SPHERE = "sphere"


@dataclass(frozen=True, slots=True)
class ModifierUse:
    """A modifier as written, with the number that belongs to it (Ⓟ's height, Ⓤ's or UZ's amount)."""

    kind: Modifier
    value: Value | None = None
    span: Span = field(default=NOWHERE, compare=False)


@dataclass(frozen=True, slots=True)
class PerUnit:
    """A tolerance per unit: `/ 25` or `/ 1.0 X 1.0`. `width` is given for a unit area, `angle` is not read."""

    length: Value
    width: Value | None = None


@dataclass(frozen=True, slots=True)
class Zone:
    """The tolerance compartment: `⌀.014 Ⓜ Ⓟ .50`, `.002 / 1.0`, `⌀.000 Ⓜ ⌀.010 MAX`.

    `value` is None where the number is missing. `modifiers` stand in the order written.
    """

    shape: ZoneShape
    value: Value | None
    modifiers: tuple[ModifierUse, ...] = ()
    per: PerUnit | None = None
    maximum: Value | None = None
    span: Span = field(default=NOWHERE, compare=False)

    def modifier(self, kind: Modifier) -> ModifierUse | None:
        """The first use of a modifier, or None."""
        return next((use for use in self.modifiers if use.kind is kind), None)


@dataclass(frozen=True, slots=True)
class DatumLetter:
    """One datum feature letter inside a compartment, with modifiers of its own in a common datum."""

    letter: str
    modifiers: tuple[ModifierUse, ...] = ()
    span: Span = field(default=NOWHERE, compare=False)


@dataclass(frozen=True, slots=True)
class DatumRef:
    """One datum compartment: `A`, `B Ⓜ`, `A-B`, `A[u,v,z]`, `D Ⓜ ▷`.

    A single datum has one letter; a common datum two or more. `modifiers` apply to the whole compartment
    (for a single datum, always stand here); `freedoms` are the named degrees of freedom, in written order;
    `boundary` is the stated size of the datum's boundary as written, `BSC` or `⌀1.020`.
    """

    letters: tuple[DatumLetter, ...]
    modifiers: tuple[ModifierUse, ...] = ()
    freedoms: tuple[str, ...] = ()
    span: Span = field(default=NOWHERE, compare=False)
    boundary: str = ""

    @property
    def name(self) -> str:
        """The letters as the trade names the datum: `A`, `A-B`."""
        return "-".join(letter.letter for letter in self.letters)


@dataclass(frozen=True, slots=True)
class Segment:
    """One line of a feature control frame. `zone` is None where no tolerance compartment is written."""

    characteristic: Characteristic
    zone: Zone | None
    datums: tuple[DatumRef, ...] = ()
    span: Span = field(default=NOWHERE, compare=False)
    doubtful: bool = field(default=False, compare=False)


class ScopeKind(StrEnum):
    """How far along the part a frame applies."""

    ALL_AROUND = "all around"
    ALL_OVER = "all over"
    BETWEEN = "between"
    FROM_TO = "from to"


@dataclass(frozen=True, slots=True)
class Scope:
    """`ALL AROUND`, `ALL OVER`, `A ↔ B`, `A → B`. `start` and `end` name the points of the last two."""

    kind: ScopeKind
    start: str | None = None
    end: str | None = None
    span: Span = field(default=NOWHERE, compare=False)


@dataclass(frozen=True, slots=True)
class Frame:
    """A feature control frame: one segment, or a composite of several under one characteristic symbol.

    Several frames under each other, each with its own symbol, are several `Frame`s of the callout.
    """

    segments: tuple[Segment, ...]
    scope: Scope | None = None
    count: Count | None = None

    @property
    def composite(self) -> bool:
        """Whether one characteristic symbol governs several lines."""
        return len(self.segments) > 1
