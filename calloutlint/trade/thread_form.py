"""What thread standards compute: the basic sizes of a thread and its limits of size for a class."""

from decimal import Decimal
from typing import NamedTuple

from calloutlint.units import Unit

PITCH_LINE = Decimal("0.64951905283833")
"""3/8 √3: from the major diameter down to the pitch diameter, in pitches."""

INTERNAL_CREST = Decimal("1.08253175473055")
"""5/8 √3: from the major diameter down to the minor diameter of the basic profile, in pitches."""

UNJ_CREST = Decimal("0.97427857925750")
"""9/16 √3: the same for the threads of a controlled root, UNJ and MJ."""


class ThreadForm(NamedTuple):
    """A thread by its basic sizes, in `unit`; `series` is `UNC`, `UNJF`, `UN`, `M`, `MJ`.

    `minor` is the basic minor diameter of the internal thread, larger for the controlled root of UNJ.
    """

    size: str
    series: str
    unit: Unit
    diameter: Decimal
    pitch: Decimal
    minor: Decimal

    @property
    def pitch_diameter(self) -> Decimal:
        """Basic pitch diameter D - 0.64951905 P. Sources: ASME B1.1, ISO 724."""
        return self.diameter - PITCH_LINE * self.pitch


class ThreadLimits(NamedTuple):
    """Limits of size of a thread for a class, in the thread's unit.

    None where the standard sets no limit: the largest major diameter of an internal thread, the smallest
    minor diameter of an external one.
    """

    class_: str
    internal: bool
    major_max: Decimal | None
    major_min: Decimal
    pitch_max: Decimal
    pitch_min: Decimal
    minor_max: Decimal | None
    minor_min: Decimal | None
