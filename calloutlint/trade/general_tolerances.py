"""General tolerances: ISO 2768-1 and -2 by class, and which tolerance a title block gives to a size."""

from decimal import Decimal

from calloutlint.model.drawing import GeneralTolerances
from calloutlint.model.frame import Characteristic
from calloutlint.model.size import Size, SizeForm, SizeStatus
from calloutlint.model.values import Value
from calloutlint.trade.tables import read_table
from calloutlint.units import Unit, convert

_BROKEN_EDGE_FORMS = frozenset({SizeForm.RADIUS, SizeForm.CONTROLLED_RADIUS})
_GEOMETRICAL_TABLE = {
    Characteristic.STRAIGHTNESS: "straightness",
    Characteristic.FLATNESS: "straightness",
    Characteristic.PERPENDICULARITY: "perpendicularity",
    Characteristic.SYMMETRY: "symmetry",
    Characteristic.CIRCULAR_RUNOUT: "circular runout",
}
_MINUTES_PER_DEGREE = 60


def linear(size_mm: Decimal, class_: str) -> Decimal | None:
    """± tolerance of a linear size in mm, class `f`, `m`, `c` or `v`; None outside the table.

    Source: ISO 2768-1:1989, Table 1. Sizes under 0.5 mm and over 4000 mm have no general tolerance.
    """
    return _look_up(read_table("general_linear"), size_mm, class_)


def broken_edge(size_mm: Decimal, class_: str) -> Decimal | None:
    """± tolerance of an external radius or chamfer height in mm, by class; None outside the table.

    Source: ISO 2768-1:1989, Table 2.
    """
    return _look_up(read_table("general_broken_edges"), size_mm, class_)


def angle(shorter_side_mm: Decimal, class_: str) -> Decimal | None:
    """± tolerance of an angle in minutes of arc, by class and the length of its shorter side in mm.

    Source: ISO 2768-1:1989, Table 3.
    """
    return _look_up(read_table("general_angles"), shorter_side_mm, class_)


def geometrical(characteristic: Characteristic, length_mm: Decimal, class_: str) -> Decimal | None:
    """General geometrical tolerance in mm, class `H`, `K` or `L`; None where the standard tabulates none.

    Source: ISO 2768-2:1989 (withdrawn 2021), Tables 1 to 4. Circular run-out does not depend on the length.
    """
    table = _GEOMETRICAL_TABLE.get(characteristic)
    rows = tuple(row for row in read_table("general_geometrical") if row["characteristic"] == table)
    return _look_up(rows, length_mm, class_)


def general_tolerance(general: GeneralTolerances, size: Size, unit: Unit | None) -> Decimal | None:
    """The ± amount that the title block gives to a size, in the drawing's `unit`; degrees for an angle.

    By places or as a fraction, as written, or by ISO 2768-1 class, whose ranges are in mm and are converted
    exactly; radii go by its table of broken edges. A drawing that states no unit is taken to be in mm there,
    as ISO drawings are. A tolerance of the size's own does not matter here. None where nothing covers the
    size: basic, reference, MAX and MIN sizes, limits, a fraction where only places are stated, a size outside
    the table.
    """
    if size.nominal is None or size.status is not SizeStatus.TOLERANCED:
        return None
    if size.form is SizeForm.ANGLE:
        return general_angle(general)
    as_written = _as_written(general, size.nominal)
    if as_written is not None or general.iso_2768 is None:
        return as_written
    return _by_class(general.iso_2768, size.form, size.nominal, unit or Unit.MM)


def general_angle(general: GeneralTolerances, shorter_side_mm: Decimal | None = None) -> Decimal | None:
    """The ± amount in degrees that the title block gives to angles.

    A stated angle tolerance holds before an ISO 2768-1 class, which needs the length of the shorter side;
    None where there is neither, or the side is not known.
    """
    if general.angle is not None:
        return general.angle.amount
    if general.iso_2768 is None or shorter_side_mm is None:
        return None
    minutes = angle(shorter_side_mm, general.iso_2768)
    return None if minutes is None else minutes / _MINUTES_PER_DEGREE


def covers_angles(general: GeneralTolerances) -> bool:
    """Whether the title block says anything on the tolerance of angles."""
    return general.angle is not None or general.iso_2768 is not None


def _as_written(general: GeneralTolerances, nominal: Value) -> Decimal | None:
    """By places; a fraction, and a whole number where its places say nothing, by the tolerance of fractions."""
    by_places = [entry.amount for entry in general.places if entry.places == nominal.places]
    amounts = [] if "/" in nominal.text else by_places
    if general.fractions is not None and nominal.places == 0:
        amounts.append(general.fractions)
    return next((amount.amount for amount in amounts if _same_unit(amount.unit, nominal.unit)), None)


def _same_unit(first: Unit | None, second: Unit | None) -> bool:
    return first is None or second is None or first is second


def _by_class(class_: str, form: SizeForm, nominal: Value, unit: Unit) -> Decimal | None:
    table = broken_edge if form in _BROKEN_EDGE_FORMS else linear
    amount = table(convert(nominal.amount, nominal.unit or unit, Unit.MM), class_)
    return None if amount is None else convert(amount, Unit.MM, unit)


def _look_up(rows: tuple[dict[str, str], ...], size: Decimal, column: str) -> Decimal | None:
    """The value in `column` of the row whose range, over its lower end up to and with its upper, holds `size`.

    The first range includes its lower end; an empty `to` has no end.
    """
    for row in rows:
        over, to = Decimal(row["over"]), row["to"]
        starts = size > over or (row is rows[0] and size == over)
        if starts and (not to or size <= Decimal(to)):
            return Decimal(row[column]) if row.get(column) else None
    return None
