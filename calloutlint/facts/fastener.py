"""Facts about a fastener: how thick it is, what its head needs."""

from __future__ import annotations

from decimal import Decimal

from calloutlint.facts.size import bounds
from calloutlint.facts.view import Length, View, fact
from calloutlint.model.callout import Callout
from calloutlint.model.drawing import Drawing
from calloutlint.model.fastener import Fastener, Head
from calloutlint.model.size import Size
from calloutlint.trade import iso286
from calloutlint.trade.clearance import ClearanceSizes, clearance_sizes
from calloutlint.trade.heads import HeadSize, room_for, seat_of
from calloutlint.trade.threads import series_has
from calloutlint.units import Unit, convert

COUNTERSUNK = {Head.SOCKET_COUNTERSUNK, Head.FLAT}


def pin_limits(pin: Size) -> tuple[Decimal, Decimal] | None:
    """Smallest and largest diameter of a pin, in the pin's own unit; None where it has no tolerance."""
    if pin.tolerance is not None:
        return bounds(pin, pin.nominal.unit if pin.nominal else None)
    if pin.fit is None or pin.nominal is None or pin.nominal.unit not in {Unit.MM, Unit.INCH}:
        return None
    nominal = convert(pin.nominal.amount, pin.nominal.unit, Unit.MM)
    found = iso286.limits(nominal, pin.fit)
    if found is None:
        return None
    ends = (nominal + found.lower, nominal + found.upper)
    return convert(ends[0], Unit.MM, pin.nominal.unit), convert(ends[1], Unit.MM, pin.nominal.unit)


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
    def diameter(self) -> Length | None:
        """Its largest size: basic major diameter of a thread, largest diameter of a pin."""
        thread, pin = self.part.thread, self.part.pin
        if thread is not None and thread.diameter is not None:
            return self._here(thread.diameter.amount, thread.diameter.unit)
        if pin is None or pin.nominal is None:
            return None
        limits = pin_limits(pin)
        return self._here(limits[1] if limits else pin.nominal.amount, pin.nominal.unit)

    @property
    def _clearance(self) -> ClearanceSizes | None:
        thread = self.part.thread
        if thread is None or thread.diameter is None or thread.diameter.unit is None:
            return None
        return clearance_sizes(thread.diameter.amount, thread.diameter.unit)

    @fact
    def close(self) -> Length | None:
        """Published close (fine) clearance hole."""
        return self._here(self._clearance.close, self._clearance.unit) if self._clearance else None

    @fact
    def loose(self) -> Length | None:
        """Published loose (coarse) clearance hole."""
        return self._here(self._clearance.loose, self._clearance.unit) if self._clearance else None

    @fact
    def head(self) -> Head | None:
        """Form of its head; unknown where it is not said."""
        return self.part.head

    @property
    def _seat(self) -> HeadSize | None:
        return seat_of(self.part)

    @fact
    def seat(self) -> str:
        """What it bears with: `head` or `washer`."""
        return "washer" if self.part.washer else "head"

    @fact
    def seat_source(self) -> str:
        """The published standard of its head or washer; empty where no table has it."""
        return self._seat.source if self._seat else ""

    @fact
    def seat_smallest(self) -> Length | None:
        """Smallest bearing diameter of its head or washer by the standard; unknown for countersunk heads."""
        if self._seat is None or self.part.head in COUNTERSUNK:
            return None
        return self._here(self._seat.bearing, self._seat.unit)

    @fact
    def seat_largest(self) -> Length | None:
        """Largest diameter of its head or washer by the standard: a head plain unless knurled is said."""
        return self._here(room_for(self._seat, self.part.knurled), self._seat.unit) if self._seat else None
