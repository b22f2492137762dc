"""What a datum feature is: plane, axis, point … read from the callout that establishes it.

Source: ASME Y14.5 (datum features and the datums they establish) and ISO 5459 (situation features of the
invariance classes). What a callout without a size is follows the way callout sheets are written.
"""

from dataclasses import dataclass
from enum import StrEnum

from calloutlint.model.callout import Callout, DatumFeature, Meaning, Words
from calloutlint.model.frame import Characteristic, ZoneShape
from calloutlint.model.size import SizeForm, SizeStatus


class DatumKind(StrEnum):
    """The datum that a datum feature establishes."""

    PLANE = "plane"
    CENTRE_PLANE = "centre plane"
    AXIS = "axis"
    POINT = "point"
    CONE = "cone"
    PATTERN = "pattern"


@dataclass(frozen=True, slots=True)
class DatumGeometry:
    """A datum feature as geometry: `kind`, and for a pattern the kind and number of its `members`.

    `contacts` is the number of points that its datum targets give, None where the whole feature is used.
    `assumed` says what was taken for granted.
    """

    kind: DatumKind
    member: DatumKind | None = None
    count: int = 1
    contacts: int | None = None
    assumed: str | None = None


_ROUND = {Meaning.HOLE, Meaning.BORE, Meaning.SHAFT, Meaning.PIN, Meaning.CYLINDER}
_WIDE = {Meaning.SLOT, Meaning.GROOVE, Meaning.TAB, Meaning.WIDTH}
_FLAT = {Meaning.SURFACE, Meaning.FACE}

_BY_FORM = {
    SizeForm.SPHERICAL_DIAMETER: DatumKind.POINT,
    SizeForm.SPHERICAL_RADIUS: DatumKind.POINT,
    SizeForm.DIAMETER: DatumKind.AXIS,
    SizeForm.LINEAR: DatumKind.CENTRE_PLANE,
}
_NO_FEATURE_OF_SIZE = {SizeForm.RADIUS, SizeForm.CONTROLLED_RADIUS, SizeForm.SQUARE}
_LOCATES = {Characteristic.POSITION, Characteristic.SURFACE_PROFILE, Characteristic.LINE_PROFILE}
_COAXIAL = {Characteristic.CIRCULAR_RUNOUT, Characteristic.TOTAL_RUNOUT, Characteristic.CONCENTRICITY}


def geometry_of(callout: Callout) -> DatumGeometry | None:
    """The datum geometry of the feature a callout speaks of; None where the callout does not tell."""
    single = _single(callout)
    count = callout.count
    if single is None or count is None or count.number == 1 or Meaning.INDIVIDUALLY in callout.meanings:
        return single
    if count.number is None:
        return None
    return _several(callout, single, count.number)


def _single(callout: Callout) -> DatumGeometry | None:
    """The feature as if there were one of it. Words are stronger than sizes, sizes than frames."""
    sized, named = _kind_by_size(callout), _kind_by_words(callout)
    if sized is DatumKind.CENTRE_PLANE and named is DatumKind.AXIS and Meaning.HOLE in callout.meanings:
        return None  # an elongated hole, or a hole whose ⌀ was left out
    if sized is DatumKind.AXIS and named is DatumKind.PLANE and Meaning.FACE not in callout.meanings:
        named = None  # the surface of a cylinder
    kind = named or sized
    if kind is not None:
        return DatumGeometry(kind)
    if callout.unread or any(size.form in _NO_FEATURE_OF_SIZE for size in callout.sizes):
        return None
    return _by_frames(callout)


def _kind_by_size(callout: Callout) -> DatumKind | None:
    """A thread is its pitch cylinder, ⌀ an axis, S⌀ a point, any other size a centre plane."""
    if callout.threads:
        return DatumKind.AXIS
    sizes = [size for size in callout.sizes if size.status is not SizeStatus.REFERENCE]
    kinds = [
        _BY_FORM[size.form]
        for size in sizes
        if size.form in _BY_FORM and (size.form is not SizeForm.LINEAR or size.status is not SizeStatus.BASIC)
    ]
    order = (DatumKind.POINT, DatumKind.AXIS, DatumKind.CENTRE_PLANE)
    return next((kind for kind in order if kind in kinds), None)


def _kind_by_words(callout: Callout) -> DatumKind | None:
    meanings = callout.meanings
    if Meaning.SPHERE in meanings:
        return DatumKind.POINT
    if any(word in text for text in _texts(callout) for word in ("CONE", "CONICAL")):
        return DatumKind.CONE
    if meanings & _WIDE and not _has_diameter(callout):
        return DatumKind.CENTRE_PLANE
    if meanings & _FLAT:
        return DatumKind.PLANE
    return DatumKind.AXIS if meanings & _ROUND else None


def _texts(callout: Callout) -> list[str]:
    return [part.text.upper() for part in callout.parts if isinstance(part, Words)]


def _has_diameter(callout: Callout) -> bool:
    return bool(callout.threads) or any(size.form is SizeForm.DIAMETER for size in callout.sizes)


def _by_frames(callout: Callout) -> DatumGeometry | None:
    """A callout without size or telling words is a plane, unless its frames speak of something else."""
    characteristics = {segment.characteristic for segment in callout.segments}
    shapes = {segment.zone.shape for segment in callout.segments if segment.zone is not None}
    if any(frame.scope is not None for frame in callout.frames):
        return None
    if ZoneShape.SPHERE in shapes:
        return DatumGeometry(DatumKind.POINT)
    if ZoneShape.DIAMETER in shapes or Characteristic.CYLINDRICITY in characteristics:
        return DatumGeometry(DatumKind.AXIS)
    if characteristics & {Characteristic.POSITION, Characteristic.SYMMETRY}:
        return DatumGeometry(DatumKind.CENTRE_PLANE)
    if characteristics & {*_COAXIAL, Characteristic.CIRCULARITY}:
        return None
    return DatumGeometry(DatumKind.PLANE, assumed=None if characteristics else "taken as a plane surface")


def _several(callout: Callout, single: DatumGeometry, number: int) -> DatumGeometry | None:
    """Several features under one datum letter: a pattern where a tolerance locates them to each other."""
    characteristics = {segment.characteristic for segment in callout.segments}
    if single.kind is DatumKind.PLANE:
        return DatumGeometry(DatumKind.PLANE, assumed=f"with its {number} surfaces taken as one plane")
    if characteristics & _LOCATES:
        return DatumGeometry(DatumKind.PATTERN, member=single.kind, count=number)
    if single.kind is DatumKind.AXIS and characteristics & _COAXIAL:
        return DatumGeometry(DatumKind.AXIS, assumed=f"with its {number} features taken as coaxial")
    return None


def letters_of(callout: Callout) -> tuple[str, ...]:
    """Letters of the datum features that a callout establishes, in reading order."""
    return tuple(part.letter for part in callout.parts if isinstance(part, DatumFeature))
