"""What sizes and fasteners state: limits, deviations, the spelling, exact diameters."""

from dataclasses import replace
from decimal import Decimal

from calloutlint.model.callout import Callout
from calloutlint.model.size import Deviations, Limits, PlusMinus, Size, SizeForm
from calloutlint.model.thread import Thread
from calloutlint.model.values import Value
from calloutlint.trade import iso286
from calloutlint.trade.inches import nominal_size
from calloutlint.units import Unit, convert

SIGNS = {
    SizeForm.DIAMETER: "⌀",
    SizeForm.SPHERICAL_DIAMETER: "S⌀",
    SizeForm.RADIUS: "R",
    SizeForm.CONTROLLED_RADIUS: "CR",
    SizeForm.SPHERICAL_RADIUS: "SR",
    SizeForm.SQUARE: "□",
}


def amount_in(value: Value | None, unit: Unit | None) -> Decimal | None:
    """The amount of a drawn value in `unit`; as it stands where either unit is not known, None for None."""
    if value is None:
        return None
    if value.unit is None or unit is None or value.unit is Unit.DEGREE:
        return value.amount
    return convert(value.amount, value.unit, unit)


def bounds(size: Size, unit: Unit | None) -> tuple[Decimal, Decimal] | None:
    """Smallest and largest size in `unit` from explicit limits or deviations; None where there are none.

    Limits count whichever is written first. A size with MAX or MIN alone has no bounds.
    """
    tolerance = size.tolerance
    if isinstance(tolerance, Limits):
        ends = (amount_in(tolerance.first, unit), amount_in(tolerance.second, unit))
        return None if None in ends else (min(ends), max(ends))  # type: ignore[type-var, return-value]
    nominal = amount_in(size.nominal, unit)
    spread = deviations(size, unit)
    if nominal is None or spread is None:
        return None
    return nominal + min(spread), nominal + max(spread)


def deviations(size: Size, unit: Unit | None) -> tuple[Decimal, Decimal] | None:
    """Upper and lower deviation as written, in `unit`; None where the tolerance is not given by deviations."""
    match size.tolerance:
        case PlusMinus(amount):
            value = amount_in(amount, unit)
            return None if value is None else (value, -value)
        case Deviations(upper, lower):
            ends = amount_in(upper, unit), amount_in(lower, unit)
            return None if None in ends else ends  # type: ignore[return-value]
        case _:
            return None


def written_values(size: Size) -> tuple[Value, ...]:
    """Every number of a size in its own unit: nominal, deviations or limits; the dual dimension left out."""
    tolerance = size.tolerance.values if size.tolerance else ()
    return tolerance if size.nominal is None else (size.nominal, *tolerance)


def spelled(size: Size) -> str:
    """A size with its tolerance as the drawing writes it: `⌀.281 ±.01`, `25-25.4`."""
    nominal = SIGNS.get(size.form, "") + size.nominal.text if size.nominal else ""
    match size.tolerance:
        case PlusMinus(amount):
            return f"{nominal} ±{amount.text}"
        case Deviations(upper, lower):
            return f"{nominal} {upper.text} {lower.text}"
        case Limits(first, second, named):
            return f"{first.text} MAX {second.text} MIN" if named else f"{first.text}-{second.text}"
    return nominal


def leading_size(callout: Callout) -> Size | None:
    """The size that says what the feature is: the first that is no angle."""
    return next((size for size in callout.sizes if size.form is not SizeForm.ANGLE), None)


def stated_limits(pin: Size) -> tuple[Decimal, Decimal] | None:
    """Smallest and largest size by its own tolerance or fit code, in its own unit; None where it has neither.

    General tolerances are not looked at. Source of fit codes: ISO 286-1.
    """
    unit = unit_of(pin)
    if pin.tolerance is not None:
        return bounds(pin, unit)
    if pin.fit is None or pin.nominal is None or unit not in {Unit.MM, Unit.INCH}:
        return None
    nominal = convert(pin.nominal.amount, unit, Unit.MM)
    found = iso286.limits(nominal, pin.fit)
    if found is None:
        return None
    lower, upper = nominal + found.lower, nominal + found.upper
    return convert(lower, Unit.MM, unit), convert(upper, Unit.MM, unit)


def unit_of(size: Size) -> Unit | None:
    """The unit that a size is written in; None where its drawing states none."""
    return next((value.unit for value in written_values(size)), None)


def basic_major(thread: Thread) -> Value | None:
    """Basic major diameter: of an inch size rounded to three places (`.312`), the exact one (`.3125`)."""
    diameter = thread.diameter
    if diameter is None or diameter.unit is not Unit.INCH:
        return diameter
    named = nominal_size(diameter.amount)
    return replace(diameter, amount=named.diameter) if named else diameter
