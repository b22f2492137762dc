"""Sizes: what a dimension states, with its tolerance."""

from dataclasses import dataclass, field
from enum import StrEnum

from calloutlint.model.source import NOWHERE, Span
from calloutlint.model.values import Value


class SizeForm(StrEnum):
    """What the symbol before a size says it measures."""

    LINEAR = "linear"
    DIAMETER = "diameter"
    SPHERICAL_DIAMETER = "spherical diameter"
    RADIUS = "radius"
    CONTROLLED_RADIUS = "controlled radius"
    SPHERICAL_RADIUS = "spherical radius"
    SQUARE = "square"
    ANGLE = "angle"


class SizeStatus(StrEnum):
    """How a size is meant: toleranced in its own right, exact, or for information."""

    TOLERANCED = "toleranced"
    BASIC = "basic"
    REFERENCE = "reference"
    MAXIMUM = "maximum"
    MINIMUM = "minimum"


@dataclass(frozen=True, slots=True)
class PlusMinus:
    """An equal bilateral tolerance, `±.005`."""

    amount: Value

    @property
    def values(self) -> tuple[Value, ...]:
        """Its numbers."""
        return (self.amount,)


@dataclass(frozen=True, slots=True)
class Deviations:
    """Two signed deviations, `+.002 -.001`, upper and lower as the drawing means them."""

    upper: Value
    lower: Value

    @property
    def values(self) -> tuple[Value, ...]:
        """Its numbers."""
        return self.upper, self.lower


@dataclass(frozen=True, slots=True)
class Limits:
    """Two limits of size, whatever their layout. `first` is the one written first or on top.

    `named` is True where MAX and MIN are written out; then `first` is the one called MAX.
    """

    first: Value
    second: Value
    named: bool = False

    @property
    def values(self) -> tuple[Value, ...]:
        """Its numbers."""
        return self.first, self.second


@dataclass(frozen=True, slots=True)
class FitCode:
    """An ISO 286 tolerance class, `H7`, `js6`: deviation letters and standard tolerance grade."""

    letters: str
    grade: str

    def __str__(self) -> str:
        return self.letters + self.grade


class SizeModifier(StrEnum):
    """Symbols that may follow a size."""

    STATISTICAL = "ST"
    CONTINUOUS_FEATURE = "CF"
    ENVELOPE = "E"
    INDEPENDENCY = "I"
    FREE_STATE = "F"
    COMMON_TOLERANCE = "CT"


@dataclass(frozen=True, slots=True)
class Count:
    """How many features a callout speaks for; `written` is the canonical spelling, `4X`, `4 HOLES`, `TYP`.

    `number` is None for TYP without a number.
    """

    number: int | None
    written: str
    span: Span = field(default=NOWHERE, compare=False)

    @property
    def in_words(self) -> bool:
        """Whether the count is written other than as `4X`."""
        return self.written != f"{self.number}X"


@dataclass(frozen=True, slots=True)
class Through:
    """A hole or thread that goes through. `written` is `THRU` or `THRU ALL`."""

    written: str = "THRU"
    span: Span = field(default=NOWHERE, compare=False)


@dataclass(frozen=True, slots=True)
class Depth:
    """A depth, `↧ .50 ±.01`. `size` is None where the symbol stands without its number."""

    size: "Size | None"
    span: Span = field(default=NOWHERE, compare=False)


@dataclass(frozen=True, slots=True)
class Size:
    """One dimension: `4X ⌀.281 +.007 -.002 THRU`, `[2.000]`, `(1.25)`, `.288-.279`, `25 H7`, `30°`.

    `nominal` is None where only limits are given. `tolerance` holds explicit deviations or limits; beside a
    fit code it holds the limits in parentheses. `dual` is the bracketed size in the other unit.
    """

    form: SizeForm
    nominal: Value | None
    tolerance: PlusMinus | Deviations | Limits | None = None
    fit: FitCode | None = None
    status: SizeStatus = SizeStatus.TOLERANCED
    count: Count | None = None
    extent: Through | Depth | None = None
    modifiers: tuple[SizeModifier, ...] = ()
    dual: "Size | None" = None
    span: Span = field(default=NOWHERE, compare=False)
    doubtful: bool = field(default=False, compare=False)
