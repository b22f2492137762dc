"""Facts about a fastener: how thick it is, what its head needs."""

from __future__ import annotations

import re
from decimal import Decimal
from functools import cached_property

from calloutlint.facts.sizes import basic_major, stated_limits, unit_of
from calloutlint.facts.view import Length, View, fact
from calloutlint.model.callout import Callout
from calloutlint.model.drawing import Drawing
from calloutlint.model.fastener import Fastener, Head
from calloutlint.model.values import Value
from calloutlint.trade.clearance import ClearanceSizes, clearance_sizes
from calloutlint.trade.heads import HeadSize, room_for, seat_of
from calloutlint.trade.pins import PinLimits, dowel_limits
from calloutlint.trade.threads import series_has
from calloutlint.units import Unit, convert

_BESIDE = re.compile(r"\b(?:WASHERS?|NUTS?)\b", re.IGNORECASE)
SEVERAL_STANDARDS: dict[str, dict[Head | None, str]] = {
    "ISO 7045, ISO 7046-1 and ISO 1207": {
        Head.PAN: "ISO 7045",
        Head.FLAT: "ISO 7046-1",
        Head.FILLISTER: "ISO 1207",
    }
}
"""Tables that hold several standards: which one a head is from."""
COUNTERSUNK = {Head.SOCKET_COUNTERSUNK, Head.FLAT}


class FastenerView(View):
    """A fastener as designated; its lengths are in the unit of the drawing that asks."""

    subject = "fastener"
    part: Fastener

    def __init__(
        self, part: Fastener, unit: Unit | None, drawing: Drawing | None = None, callout: Callout | None = None
    ) -> None:
        self.part = part
        self.unit = unit
        self.drawing_model = drawing
        self.callout_model = callout

    def _here(self, amount: Decimal | None, unit: Unit | None) -> Decimal | None:
        if amount is None or unit is None or self.unit is None:
            return None
        return convert(amount, unit, self.unit)

    @fact
    def text(self) -> str:
        """The fastener as designated."""
        return self.part.text

    @fact
    def known(self) -> bool:
        """Whether the tables have its size."""
        if self.part.thread is None:
            return self.part.pin is not None
        return self._clearance is not None and series_has(self.part.thread) is not False

    @fact
    def goes_with_one(self) -> bool:
        """Whether it is no fastener itself but a washer or a nut."""
        return bool(_BESIDE.search(self.part.text))

    @fact
    def pin(self) -> bool:
        """Whether it is a pin or a plain bolt, without a thread where it passes."""
        return self.part.thread is None and self.part.pin is not None

    @cached_property
    def largest(self) -> Value | None:
        """Its largest size with the unit that it is known in; None for a thread that the tables do not have."""
        if self.part.thread is not None:
            return basic_major(self.part.thread) if self.known else None
        pin = self.part.pin
        if pin is None:
            return None
        unit, limits = unit_of(pin) or self.unit, stated_limits(pin)
        if limits is not None:
            return Value(str(limits[1]), limits[1], unit)
        if self._dowel is not None:
            return Value(str(self._dowel.largest), self._dowel.largest, unit)
        return Value(pin.nominal.text, pin.nominal.amount, unit) if pin.nominal else None

    @cached_property
    def _dowel(self) -> PinLimits | None:
        """Limits of a dowel pin that states none, by its standard."""
        pin = self.part.pin
        if pin is None or pin.nominal is None or stated_limits(pin) is not None:
            return None
        unit = pin.nominal.unit or self.unit
        if "DOWEL" not in self.part.text.upper() or unit not in {Unit.MM, Unit.INCH}:
            return None
        return dowel_limits(pin.nominal.amount, unit)

    @fact
    def diameter(self) -> Length | None:
        """Its largest size: basic major diameter of a thread, largest diameter of a pin."""
        return self._here(self.largest.amount, self.largest.unit) if self.largest else None

    @fact
    def smallest(self) -> Length | None:
        """Smallest diameter of a pin; unknown for a screw, and for a pin without limits."""
        pin = self.part.pin
        if pin is None or self.part.thread is not None:
            return None
        limits, unit = stated_limits(pin), unit_of(pin) or self.unit
        if limits is None and self._dowel is not None:
            return self._here(self._dowel.smallest, unit)
        return self._here(limits[0], unit) if limits else None

    @fact
    def limits_from(self) -> str:
        """The standard that the largest diameter of a pin without a tolerance is taken from; else empty."""
        return self._dowel.source if self._dowel else ""

    @cached_property
    def _clearance(self) -> ClearanceSizes | None:
        diameter = basic_major(self.part.thread) if self.part.thread else None
        if diameter is None or diameter.unit is None:
            return None
        return clearance_sizes(diameter.amount, diameter.unit)

    @fact
    def close(self) -> Length | None:
        """Published close (fine) clearance hole."""
        return self._here(self._clearance.close, self._clearance.unit) if self._clearance else None

    @fact
    def loose(self) -> Length | None:
        """Published loose (coarse) clearance hole."""
        return self._here(self._clearance.loose, self._clearance.unit) if self._clearance else None

    @fact
    def clearance_source(self) -> str:
        """The published standard of its clearance holes; empty where no table has them."""
        return self._clearance.source if self._clearance else ""

    def admits(self, nominal: Decimal) -> bool | None:
        """Whether a hole nominal, in this view's unit, is close to loose for it; None where no table has it."""
        if self._clearance is None or self.unit is None:
            return None
        close, loose = self._clearance.span
        return close <= convert(nominal, self.unit, self._clearance.unit) <= loose

    @fact
    def head(self) -> Head | None:
        """Form of its head; unknown where it is not said."""
        return self.part.head

    @cached_property
    def _seat(self) -> HeadSize | None:
        return seat_of(self.part)

    @fact
    def seat(self) -> str:
        """What it bears with: `head` or `washer`."""
        return "washer" if self.part.washer else "head"

    @fact
    def seat_source(self) -> str:
        """The published standard of its head or washer; empty where no table has it."""
        if self._seat is None:
            return ""
        several = SEVERAL_STANDARDS.get(self._seat.source, {})
        own = self.part.standard if self.part.standard in self._seat.source.split(" and ") else None
        return own or several.get(self.part.head, self._seat.source)

    @property
    def _bears_flat(self) -> bool:
        return self.part.washer or self.part.head not in COUNTERSUNK

    @fact
    def seat_smallest(self) -> Length | None:
        """Smallest diameter of its head or washer by the standard; unknown for countersunk heads."""
        if self._seat is None or not self._bears_flat:
            return None
        return self._here(self._seat.smallest, self._seat.unit)

    @fact
    def bearing_smallest(self) -> Length | None:
        """Smallest diameter of its bearing face by the standard; unknown for countersunk heads."""
        if self._seat is None or not self._bears_flat:
            return None
        return self._here(self._seat.bearing, self._seat.unit)

    @fact
    def seat_largest(self) -> Length | None:
        """Largest diameter of its head or washer by the standard: a head plain unless knurled is said."""
        return self._here(room_for(self._seat, self.part.knurled), self._seat.unit) if self._seat else None
