"""A drawing: title block and callouts."""

from dataclasses import dataclass, field
from enum import StrEnum

from calloutlint.model.callout import Callout
from calloutlint.model.fastener import Fastener, Joint
from calloutlint.model.values import Value
from calloutlint.units import Unit


class System(StrEnum):
    """The two systems of standards that drawings are made to."""

    ASME = "ASME Y14.5"
    ISO = "ISO GPS"


@dataclass(frozen=True, slots=True)
class Standard:
    """A stated standard: `written` as in the title block; `system` None where it is not known.

    `edition` is the year (1982, 1994, 2009, 2018 for ASME), None where not stated or not tied to a year.
    """

    written: str
    system: System | None = None
    edition: int | None = None


@dataclass(frozen=True, slots=True)
class PlacesTolerance:
    """A general tolerance by decimal places: `.XX ±.01`."""

    places: int
    amount: Value


@dataclass(frozen=True, slots=True)
class GeneralTolerances:
    """General tolerances of the title block: by places, or an ISO 2768 class; angles beside either.

    `fractions` holds for sizes written as fractions. `iso_2768` is the linear and angular class of ISO 2768-1
    (`f`, `m`, `c`, `v`); `iso_2768_2` the geometrical class of the withdrawn ISO 2768-2 (`H`, `K`, `L`).
    `unchecked` holds general tolerances that are known but not tabulated (`ISO 13920-BF`), `unread` what was
    not understood: either may cover a size that nothing else does.
    """

    written: str
    places: tuple[PlacesTolerance, ...] = ()
    angle: Value | None = None
    iso_2768: str | None = None
    iso_2768_2: str | None = None
    unread: tuple[str, ...] = ()
    fractions: Value | None = None
    unchecked: tuple[str, ...] = ()


@dataclass(frozen=True, slots=True)
class Process:
    """A stated process spread (standard deviations): hole location in each direction, and hole size."""

    written: str
    location: Value | None = None
    size: Value | None = None


@dataclass(frozen=True, slots=True)
class SheetLine:
    """A line of a sheet outside the callouts. `key` is None for a line that is no `key: value` pair.

    `known` is False for a line that belongs nowhere, a key that is not known, and a value that cannot be
    read; `reason` then says which, in words.
    """

    number: int
    text: str
    key: str | None = None
    value: str = ""
    known: bool = True
    reason: str | None = None


@dataclass(frozen=True, slots=True)
class Drawing:
    """One drawing as read. `lines` are the title-block lines and stray lines, for the rules that need them.

    `number` and `revision` are None where the sheet states none. `remarks` are things said about reading
    the file itself, such as its encoding.
    """

    file: str = field(compare=False)
    number: str | None = None
    revision: str | None = None
    sheet: str | None = None
    title: str | None = None
    standard: Standard | None = None
    unit: Unit | None = None
    general: GeneralTolerances | None = None
    fasteners: tuple[Fastener, ...] = ()
    joints: tuple[Joint, ...] = ()
    process: Process | None = None
    notes: tuple[str, ...] = ()
    callouts: tuple[Callout, ...] = ()
    lines: tuple[SheetLine, ...] = field(default=(), compare=False)
    remarks: tuple[str, ...] = field(default=(), compare=False)

    @property
    def name(self) -> str:
        """The drawing number, or the file name where there is none."""
        return self.number or self.file


@dataclass(frozen=True, slots=True)
class Package:
    """Drawings reviewed together, with the joints that tie them.

    `gate` is the grade at which a run fails; `house` are folders of house rule sheets, as paths that can be
    opened.
    """

    name: str
    drawings: tuple[Drawing, ...]
    joints: tuple[Joint, ...] = ()
    gate: str | None = None
    house: tuple[str, ...] = ()
