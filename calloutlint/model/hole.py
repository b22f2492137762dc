"""What else is done to a hole: counterbore, countersink, drill, ream."""

from dataclasses import dataclass, field
from enum import StrEnum

from calloutlint.model.size import Count, Depth, Size, Through
from calloutlint.model.source import NOWHERE, Span


class StepKind(StrEnum):
    """Kinds of hole step."""

    COUNTERBORE = "counterbore"
    SPOTFACE = "spotface"
    COUNTERSINK = "countersink"
    DRILL = "drill"
    REAM = "ream"
    BORE = "bore"
    TAP = "tap"


@dataclass(frozen=True, slots=True)
class HoleStep:
    """One step of a hole after its main size: `⌴ ⌀.438 ↧ .25`, `⌵ ⌀.50 X 82°`, `#7 DRILL ↧ .75`.

    `size` is the step's diameter, None where it is missing; `angle` a countersink's included angle; `drill`
    the stock name where a drill is called by number or letter (`#7`, `F`). A bare THRU or depth that follows
    a size or thread is that part's `extent`, not a step. REAM or DRILL after a size (`⌀.250 REAM`,
    `17/64 DRILL`) is a step without a size of its own that speaks of the size before it.
    """

    kind: StepKind
    size: Size | None = None
    angle: Size | None = None
    drill: str | None = None
    count: Count | None = None
    extent: Through | Depth | None = None
    span: Span = field(default=NOWHERE, compare=False)
    doubtful: bool = field(default=False, compare=False)
