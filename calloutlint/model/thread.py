"""Screw threads as called out."""

from dataclasses import dataclass, field
from enum import StrEnum

from calloutlint.model.size import Count, Depth, Through
from calloutlint.model.source import NOWHERE, Span
from calloutlint.model.values import Value


class ThreadSystem(StrEnum):
    """Families of threads that are told apart."""

    UNIFIED = "unified"
    METRIC = "metric"
    PIPE = "pipe"
    TRAPEZOIDAL = "trapezoidal"
    ACME = "acme"


@dataclass(frozen=True, slots=True)
class Thread:
    """A thread: `.250-20 UNC-2B`, `1/4-20 UNC-2A LH`, `M6x1-6H`, `MJ6x1-4H5H`, `1/4-18 NPT`, `G 1/2`.

    `size` is the canonical spelling of the size alone (`.250`, `1/4`, `#10`, `M6`, `1/2`); `diameter` the
    basic major diameter it stands for (None for pipe threads). `tpi` is given for inch threads, `pitch`
    (mm) for metric ones; both None where not stated (`M8` alone means coarse). `series` is `UNC`, `UNJF`,
    `M`, `MJ`, `NPT`, `G`… or "" where not stated; `class_` is `2B`, `6H`, `4h6h`… or None.
    """

    system: ThreadSystem
    size: str
    diameter: Value | None
    series: str
    tpi: Value | None = None
    pitch: Value | None = None
    class_: str | None = None
    left_hand: bool = False
    starts: int = 1
    count: Count | None = None
    extent: Through | Depth | None = None
    span: Span = field(default=NOWHERE, compare=False)
    doubtful: bool = field(default=False, compare=False)
