"""Fasteners and the joints they make."""

from dataclasses import dataclass, field
from enum import StrEnum

from calloutlint.model.size import Size
from calloutlint.model.thread import Thread
from calloutlint.model.values import Value


class Hold(StrEnum):
    """How a joint holds its fastener."""

    FLOATING = "floating"
    FIXED = "fixed"


class Head(StrEnum):
    """Head forms that the tables know."""

    SOCKET_CAP = "socket head cap"
    SOCKET_BUTTON = "socket button head"
    SOCKET_COUNTERSUNK = "socket countersunk head"
    HEX = "hex head"
    PAN = "pan head"
    FLAT = "flat head"
    FILLISTER = "fillister head"
    STUD = "stud"
    NONE = "none"


@dataclass(frozen=True, slots=True)
class Fastener:
    """A fastener as designated: `1/4-20 UNC-2A x .75 SHCS`, `ISO 4762 - M6 x 20`, `⌀6 m6 dowel pin`.

    `text` is as written, spaces folded. A screw has `thread`, a pin or plain bolt has `pin`; both None
    where the designation is not understood. `head` is None where not said; `knurled` only where said.
    """

    text: str
    thread: Thread | None = None
    pin: Size | None = None
    head: Head | None = None
    standard: str | None = None
    length: Value | None = None
    knurled: bool = False
    washer: bool = False


@dataclass(frozen=True, slots=True)
class HoleRef:
    """A balloon of a drawing as a joint names it; `drawing` is None for the drawing it is written on."""

    drawing: str | None
    balloon: str


@dataclass(frozen=True, slots=True)
class Joint:
    """A joint as stated in a sheet or a package.

    `holes` are the clearance holes, `mates` those the fastener also floats through or is fixed in, and
    `hold` says which (None: not said). `projection` and `thickness` are lengths, in the unit of the drawing
    of the first hole unless their `Value.unit` says otherwise. `stated_at` is the line of its file.
    """

    name: str
    holes: tuple[HoleRef, ...]
    fastener: Fastener
    hold: Hold | None = None
    mates: tuple[HoleRef, ...] = ()
    projection: Value | None = None
    thickness: Value | None = None
    stated_at: int = field(default=0, compare=False)
