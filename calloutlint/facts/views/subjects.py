"""Everything rules may examine, and the order in which it is examined."""

from collections.abc import Iterator

from calloutlint.facts.view import View
from calloutlint.facts.views.callout import CalloutView
from calloutlint.facts.views.datum import DatumView
from calloutlint.facts.views.drawing import DrawingView, LineView
from calloutlint.facts.views.fastener import FastenerView
from calloutlint.facts.views.fixing import FixingView
from calloutlint.facts.views.frame import FrameView
from calloutlint.facts.views.joint import JointView, MemberView
from calloutlint.facts.views.marks import DefinitionView, GapView, SymbolView, TargetView, UnreadView
from calloutlint.facts.views.package import PackageView
from calloutlint.facts.views.passage import PassageView
from calloutlint.facts.views.size import SizeView
from calloutlint.facts.views.step import StepView
from calloutlint.facts.views.thread import ThreadView
from calloutlint.model.drawing import Package

SUBJECTS: dict[str, type[View]] = {
    view.subject: view
    for view in (
        PackageView,
        DrawingView,
        LineView,
        CalloutView,
        UnreadView,
        GapView,
        SizeView,
        ThreadView,
        StepView,
        FrameView,
        DatumView,
        SymbolView,
        DefinitionView,
        TargetView,
        JointView,
        MemberView,
        PassageView,
        FixingView,
        FastenerView,
    )
}


def subjects(package: Package) -> PackageView:
    """The view of a package, from which every other view is reached."""
    return PackageView(package)


def walk(package: PackageView) -> Iterator[View]:
    """Every view that rules may examine, in document order."""
    yield package
    for drawing in package.drawings:
        yield drawing
        yield from drawing.lines
        for callout in drawing.callouts:
            yield from walk_callout(callout)
    yield from walk_joints(package)


def walk_joints(package: PackageView) -> Iterator[View]:
    """Every stated joint with its holes, the holes taken for clearance holes, the parts lists."""
    for joint in package.joints:
        yield joint
        yield from joint.members
        yield from joint.passages
        yield from joint.fixings
    yield from package.presumed_passages()
    yield from package.listed_fasteners()


def walk_callout(callout: CalloutView) -> Iterator[View]:
    """A callout and every view of its parts."""
    yield callout
    yield from callout.unread
    yield from callout.gaps
    yield from callout.sizes
    yield from callout.threads
    yield from callout.steps
    for frame in callout.frames:
        yield frame
        yield from frame.datums
    yield from callout.symbols
    yield from callout.definitions
    yield from callout.targets
