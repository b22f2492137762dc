"""Datum targets: how many contacts they make, and whether they are complete.

Source: ASME Y14.5 and ISO 5459, datum targets: three points out of line fix a primary plane.
"""

from collections.abc import Iterable

from calloutlint.model.callout import DatumTarget, TargetKind

_CONTACTS = {TargetKind.POINT: 1, TargetKind.LINE: 2, TargetKind.AREA: 1}


def contacts_of(targets: Iterable[DatumTarget]) -> int:
    """Contacts that targets make: a point or an area one, a line two."""
    return sum(_CONTACTS[kind] for kind in {(t.number): t.kind for t in targets}.values())


def missing_numbers(targets: Iterable[DatumTarget]) -> tuple[int, ...]:
    """Numbers left out between 1 and the highest target number of a letter."""
    numbers = {target.number for target in targets}
    return tuple(number for number in range(1, max(numbers, default=0)) if number not in numbers)
