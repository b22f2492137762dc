"""The datum scheme of a drawing: its datum features, what they are, how they stand to each other.

A drawing may have several sheets; they share one scheme.
"""

from collections.abc import Iterable, Mapping
from dataclasses import dataclass, replace
from functools import cached_property

from calloutlint.facts.datums.arrangement import Reference
from calloutlint.facts.datums.kinds import DatumGeometry, DatumKind, geometry_of
from calloutlint.facts.datums.motion import FREEDOMS, Freedom
from calloutlint.facts.datums.relations import Relations, relations_of
from calloutlint.facts.datums.targets import contacts_of
from calloutlint.facts.datums.uses import Use, uses_in
from calloutlint.model.callout import Callout, DatumFeature, DatumTarget
from calloutlint.model.drawing import Drawing, Package, System
from calloutlint.model.frame import DatumRef, Modifier, Segment


@dataclass(frozen=True, slots=True)
class Established:
    """A datum feature of a drawing.

    `callouts` carry its datum feature symbol (more than one only by mistake, none where targets alone
    establish it); `targets` are its datum targets with the callouts they stand in; `geometry` is None
    where the callouts do not tell what it is.
    """

    letter: str
    callouts: tuple[Callout, ...]
    targets: tuple[tuple[Callout, DatumTarget], ...]
    geometry: DatumGeometry | None


@dataclass(frozen=True, eq=False)
class DatumScheme:
    """All datum features of a drawing by letter, in the order they are established, and their relations."""

    sheets: tuple[Drawing, ...]
    features: Mapping[str, Established]
    relations: Relations

    @cached_property
    def callouts(self) -> tuple[Callout, ...]:
        """The callouts of all sheets in order."""
        return tuple(callout for sheet in self.sheets for callout in sheet.callouts)

    @cached_property
    def uses(self) -> tuple[Use, ...]:
        """Every frame line with datum references, in the order of the drawing; doubtful ones left out."""
        return tuple(u for u in uses_in(self.callouts) if u.segment.datums and not u.segment.doubtful)

    @cached_property
    def idle(self) -> dict[object, tuple[int, ...]]:
        """Places of references that add nothing, by the references of a line, as far as worked out."""
        return {}

    @property
    def iso(self) -> bool:
        """Whether the drawing is made to ISO GPS."""
        return any(sheet.standard and sheet.standard.system is System.ISO for sheet in self.sheets)

    def kind(self, ref: DatumRef) -> DatumKind | None:
        """The kind of datum a reference stands for; None where unknown, or where a common datum mixes kinds."""
        geometries = [self._geometry(letter.letter) for letter in ref.letters]
        kinds = {geometry.kind if geometry else None for geometry in geometries}
        return kinds.pop() if len(kinds) == 1 else None

    def reference(self, ref: DatumRef) -> Reference | None:
        """A reference ready to be computed; None where one of its features is not known.

        Of a common datum the first four members stand for all: as a rule one more of them adds nothing.
        """
        letters = list(dict.fromkeys(letter.letter for letter in ref.letters))[:_MOST_MEMBERS]
        members = [(letter, self._geometry(letter)) for letter in letters]
        known = tuple((letter, geometry) for letter, geometry in members if geometry is not None)
        uses = _modifiers(ref)
        if not known or len(known) < len(members) or _reduced({g.kind for _, g in known}, uses):
            return None
        named = tuple(freedom for freedom in map(freedom_named, ref.freedoms) if freedom is not None)
        return Reference(known, named, Modifier.ORIENTATION_ONLY in uses)

    def references(self, segment: Segment) -> tuple[Reference | None, ...]:
        """The references of a frame line in order of precedence."""
        return tuple(self.reference(ref) for ref in segment.datums)

    def _geometry(self, letter: str) -> DatumGeometry | None:
        feature = self.features.get(letter)
        return feature.geometry if feature else None


_MOST_MEMBERS = 4
_SECTIONS = {Modifier.ANY_CROSS_SECTION, Modifier.SPECIFIED_CROSS_SECTION, Modifier.ANY_LONGITUDINAL_SECTION}
_SITUATIONS = {
    Modifier.POINT: DatumKind.POINT,
    Modifier.LINE: DatumKind.AXIS,
    Modifier.PLANE: DatumKind.PLANE,
}


def _modifiers(ref: DatumRef) -> set[Modifier]:
    uses = (*ref.modifiers, *(use for letter in ref.letters for use in letter.modifiers))
    return {use.kind for use in uses}


def _reduced(kinds: set[DatumKind], uses: set[Modifier]) -> bool:
    """Whether a modifier takes a section or a part of the datum, so that less than its kind is held."""
    parts = {_SITUATIONS[use] for use in uses if use in _SITUATIONS}
    return bool(uses & _SECTIONS) or bool(parts - kinds)


def scheme_of(*sheets: Drawing) -> DatumScheme:
    """The datum scheme of a drawing, of all its sheets together."""
    features = _features([callout for sheet in sheets for callout in sheet.callouts])
    geometries = {letter: feature.geometry for letter, feature in features.items()}
    relations = (
        relation
        for feature in features.values()
        if len(feature.callouts) == 1
        for relation in relations_of(feature.letter, feature.callouts[0], geometries)
    )
    return DatumScheme(sheets, features, Relations(relations))


def schemes_of(package: Package) -> tuple[DatumScheme, ...]:
    """The schemes of a package, one for each drawing."""
    return tuple(scheme_of(*sheets) for sheets in sheets_of(package))


def sheets_of(package: Package) -> list[list[Drawing]]:
    """The sheets of a package, those of one drawing together.

    Sheets are of one drawing if they have its number and revision and each a sheet number of its own.
    """
    groups: list[list[Drawing]] = []
    open_groups: dict[tuple[str, str | None], list[Drawing]] = {}
    for sheet in package.drawings:
        group = open_groups.get((sheet.number, sheet.revision)) if sheet.number and sheet.sheet else None
        if group is not None and all(other.sheet != sheet.sheet for other in group):
            group.append(sheet)
            continue
        groups.append([sheet])
        if sheet.number and sheet.sheet:
            open_groups[sheet.number, sheet.revision] = groups[-1]
    return groups


def _features(callouts: Iterable[Callout]) -> dict[str, Established]:
    """The datum features that callouts establish, in the order of their letters on the drawing."""
    carriers: dict[str, list[Callout]] = {}
    targets: dict[str, list[tuple[Callout, DatumTarget]]] = {}
    for callout in callouts:
        for part in callout.parts:
            if isinstance(part, DatumFeature):
                on = carriers.setdefault(part.letter, [])
                on += [callout] if not on or on[-1] is not callout else []
            elif isinstance(part, DatumTarget):
                carriers.setdefault(part.letter, [])
                targets.setdefault(part.letter, []).append((callout, part))
    return {letter: _established(letter, on, targets.get(letter, ())) for letter, on in carriers.items()}


def _established(
    letter: str, callouts: Iterable[Callout], targets: Iterable[tuple[Callout, DatumTarget]]
) -> Established:
    carriers, touched = tuple(callouts), tuple(targets)
    return Established(letter, carriers, touched, _geometry(carriers, touched))


def _geometry(
    callouts: tuple[Callout, ...], targets: tuple[tuple[Callout, DatumTarget], ...]
) -> DatumGeometry | None:
    """What all callouts of a letter agree on; a plane that targets touch has as many contacts as they give."""
    speaking = callouts or tuple(dict.fromkeys(callout for callout, _ in targets))
    found = {geometry_of(callout) for callout in speaking}
    geometry = found.pop() if len(found) == 1 else None
    if geometry is None or not targets or geometry.kind is not DatumKind.PLANE:
        return geometry
    return replace(geometry, contacts=contacts_of(target for _, target in targets))


def freedom_named(name: str) -> Freedom | None:
    """The degree of freedom that a letter names, in either case; None for any other text."""
    return next((freedom for freedom in FREEDOMS if freedom.value == name.lower()), None)
