"""Facts about a package: its drawings, and what ties them together."""

from __future__ import annotations

from collections.abc import Iterator

from calloutlint.facts.assembly import Assembly
from calloutlint.facts.datums.index import DatumIndex
from calloutlint.facts.datums.scheme import sheets_of
from calloutlint.facts.view import View, fact, kept
from calloutlint.facts.views.callout import CalloutView
from calloutlint.facts.views.drawing import DrawingView
from calloutlint.facts.views.fastener import FastenerView
from calloutlint.facts.views.joint import JointView, MemberView
from calloutlint.facts.views.passage import PassageView
from calloutlint.model.callout import Callout
from calloutlint.model.drawing import Drawing, Package

Call = tuple[str | None, str | None, str | None]
"""Number, revision and sheet."""


class PackageView(View):
    """Drawings reviewed together."""

    subject = "package"
    part: Package

    def __init__(self, part: Package) -> None:
        self.part = part
        self.unit = None

    @fact
    def name(self) -> str:
        """The package's name."""
        return self.part.name

    @fact
    def drawings(self) -> tuple[DrawingView, ...]:
        """Its drawings, sheet by sheet."""
        return tuple(DrawingView(drawing, self) for drawing in self.part.drawings)

    @property
    def assembled(self) -> bool:
        """Whether several drawings are at hand, so that one that a joint names ought to be among them."""
        return len(self.part.drawings) > 1 or bool(self.part.joints)

    @kept
    def joints(self) -> tuple[JointView, ...]:
        """The stated joints of the package."""
        return tuple(JointView(joint, self) for joint in self.assembly.joints)

    def presumed_passages(self) -> Iterator[MemberView | PassageView]:
        """Holes taken for clearance holes: of a fastener in the parts list, or by their size alone."""
        for view in self._views.values():
            if view.part.sizes and view.hole.presumed:
                yield MemberView(view, view.hole.thinnest_presumed, None)
                yield PassageView(view, view.hole.thinnest_presumed, None)
            elif view.part.sizes and (thinnest := view.hole.thinnest_guessed) is not None:
                yield PassageView(view, thinnest, None)

    def listed_fasteners(self) -> Iterator[FastenerView]:
        """Fasteners of joints, and those of the parts lists that no joint of their drawing uses."""
        yield from (joint.fastener for joint in self.joints)
        used = {(id(joint.drawing_model), joint.fastener.part.text) for joint in self.joints}
        for drawing in self.part.drawings:
            for fastener in drawing.fasteners:
                if (id(drawing), fastener.text) not in used:
                    yield FastenerView(fastener, drawing.unit, drawing)

    @kept
    def assembly(self) -> Assembly:
        """The stated joints of the package."""
        return Assembly(self.part)

    @kept
    def _views(self) -> dict[int, CalloutView]:
        return {id(view.part): view for drawing in self.drawings for view in drawing.callouts}

    def view_of(self, callout: Callout) -> CalloutView:
        """The view of a callout of the package."""
        return self._views[id(callout)]

    @kept
    def _indexes(self) -> dict[int, DatumIndex]:
        groups = ((sheets, DatumIndex(sheets, self.part.joints)) for sheets in sheets_of(self.part))
        return {id(sheet): index for sheets, index in groups for sheet in sheets}

    def datum_index(self, drawing: Drawing) -> DatumIndex:
        """The datum letters of a drawing, all its sheets together."""
        return self._indexes[id(drawing)]

    def is_duplicate(self, drawing: Drawing) -> bool:
        """Whether an earlier drawing has the same number, revision and sheet."""
        return drawing.number is not None and self._first_called[_called(drawing)] is not drawing

    @kept
    def _first_called(self) -> dict[Call, Drawing]:
        return {_called(drawing): drawing for drawing in reversed(self.part.drawings)}


def _called(drawing: Drawing) -> Call:
    return drawing.number, drawing.revision, drawing.sheet
