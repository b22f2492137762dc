"""How numbers are written: the rules of ASME Y14.5 for zeros and decimal places.

ASME Y14.5, the subjects of millimetre and decimal inch dimensioning and of the tolerances written with them.
"""

from collections.abc import Iterator
from decimal import Decimal

from calloutlint.facts.sizes import spelled, written_values
from calloutlint.model.callout import Callout
from calloutlint.model.size import Depth, Deviations, Limits, Size, SizeForm, SizeStatus
from calloutlint.model.thread import Thread
from calloutlint.model.values import Value
from calloutlint.units import Unit

EXACT = {SizeStatus.BASIC, SizeStatus.REFERENCE}
UNEQUAL = "unequal decimal places"
NEEDLESS = "a needless zero"
SIGNED_NIL = "a sign on its nil deviation"


def sizes_of(callout: Callout) -> Iterator[Size]:
    """Every size of a callout: of the feature, of its steps, depths."""
    for part in callout.parts:
        if isinstance(part, Size):
            yield part
        inner = getattr(part, "size", None)
        if isinstance(inner, Size):
            yield inner
        extent = getattr(part, "extent", None)
        if isinstance(extent, Depth) and extent.size is not None:
            yield extent.size


def values_of(callout: Callout) -> Iterator[Value]:
    """Every number of a callout: sizes, tolerances, heights, unit lengths; not those of dual sizes."""
    for size in sizes_of(callout):
        yield from written_values(size)
    for segment in callout.segments:
        if segment.zone is None:
            continue
        zone = segment.zone
        optional = (zone.value, zone.maximum, *(use.value for use in zone.modifiers))
        yield from (value for value in optional if value is not None)
        if zone.per is not None:
            yield zone.per.length


def zero_led(callout: Callout) -> tuple[str, ...]:
    """Inch values, and inch thread sizes, written with a zero before the point."""
    values = [value.text for value in values_of(callout) if value.unit is Unit.INCH and value.has_leading_zero]
    threads = [part.size for part in callout.parts if isinstance(part, Thread) and part.size.startswith("0.")]
    return tuple(values + threads)


def uneven(callout: Callout, unit: Unit | None) -> tuple[str, ...]:
    """What breaks the rule for places and zeros in the drawing's unit: `12.0 ±0.1 has a needless zero`."""
    fault_of = {Unit.INCH: _inch_fault, Unit.MM: _mm_fault}.get(unit) if unit else None
    if fault_of is None:
        return ()
    own = (size for size in sizes_of(callout) if size.form is not SizeForm.ANGLE and _in_unit(size, unit))
    faults = ((size, fault_of(size)) for size in own)
    return tuple(f"{spelled(size)} has {fault}" for size, fault in faults if fault)


def _in_unit(size: Size, unit: Unit | None) -> bool:
    return all(value.unit is unit and "/" not in value.text for value in written_values(size))


def _inch_fault(size: Size) -> str | None:
    if size.status in EXACT or size.fit:
        return None
    return UNEQUAL if len({value.places for value in written_values(size)}) > 1 else None


def _mm_fault(size: Size) -> str | None:
    match size.tolerance:
        case Limits(first, second):
            needless = _needless_zero(first) and _needless_zero(second)
            return UNEQUAL if first.places != second.places else NEEDLESS if needless else None
        case Deviations(upper, lower) if fault := _pair_fault(upper, lower):
            return fault
    return NEEDLESS if size.nominal is not None and _needless_zero(size.nominal) else None


def _pair_fault(upper: Value, lower: Value) -> str | None:
    nil = [value for value in (upper, lower) if value.amount == 0]
    if any(value.signed for value in nil):
        return SIGNED_NIL
    return UNEQUAL if not nil and upper.places != lower.places else None


def _needless_zero(value: Value) -> bool:
    return value.places > 0 and value.text.endswith("0") and value.amount != Decimal(0)


def bare_points(callout: Callout) -> tuple[str, ...]:
    """Millimetre values below one written without a zero before the point."""
    return tuple(v.text for v in values_of(callout) if v.unit is Unit.MM and v.is_bare_point)
