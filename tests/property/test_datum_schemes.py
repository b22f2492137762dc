"""Whatever stands on a drawing, its datum scheme can be worked out, and what is said of it agrees."""

from hypothesis import given, settings
from hypothesis import strategies as st

from calloutlint.callouts.parse import parse_callout
from calloutlint.facts.datums.chains import loop_use, loops, self_references
from calloutlint.facts.datums.completeness import target_faults
from calloutlint.facts.datums.conflicts import boundary_conflicts, order_conflicts
from calloutlint.facts.datums.control import uncontrolled
from calloutlint.facts.datums.frames import frames_in_force
from calloutlint.facts.datums.held import held, left, redundant
from calloutlint.facts.datums.location import positions_of, unlocated
from calloutlint.facts.datums.named import named_faults
from calloutlint.facts.datums.scheme import DatumScheme, scheme_of
from calloutlint.model.callout import Callout
from calloutlint.model.drawing import Drawing
from calloutlint.report.datum_data import datum_overview
from calloutlint.units import Unit

letters = st.sampled_from("ABCDE")
names = st.one_of(letters, st.lists(letters, min_size=2, max_size=5).map("-".join))
marks = st.sampled_from(["", "", "", " Ⓜ", " ▷", " ><", "[x,y]", "[z,u,v]", "[w]", "[x,u,v]"])
references = st.lists(st.tuples(names, marks).map("".join), max_size=4)
controls = st.sampled_from([f"{sign} | {zone}0.1" for sign in "⌖⟂∥∠⌰⌓" for zone in ("", "⌀")])
lines = st.tuples(controls, references).map(lambda line: " | ".join([line[0], *line[1]]))
single = st.sampled_from(["SURFACE", "⌀9 THRU", "SLOT 6 ±0.1", "S⌀8 ±0.1", "M6x1-6H", "CONE", "R5", ""])
features = st.tuples(st.sampled_from(["", "", "2X ", "4X "]), single).map("".join)
endings = st.one_of(
    letters.map("DATUM {}".format), st.tuples(letters, st.sampled_from("134")).map("".join), st.just("SEP REQT")
)
callouts = st.tuples(features, st.lists(lines, max_size=2), st.lists(endings, max_size=2)).map(
    lambda parts: [line for line in (parts[0], *parts[1], *parts[2]) if line]
)


@st.composite
def schemes(draw: st.DrawFn) -> DatumScheme:
    texts = draw(st.lists(callouts, min_size=1, max_size=8))
    read = (Callout(str(number), parse_callout(text, Unit.MM)) for number, text in enumerate(texts))
    return scheme_of(Drawing("sheet", callouts=tuple(read)))


@settings(max_examples=60)
@given(schemes())
def test_what_is_said_of_references_agrees(scheme: DatumScheme) -> None:
    for use in scheme.uses:
        taken = [each.new for each in held(use.segment, scheme)]
        known = [freedom for new in taken if new is not None for freedom in new]
        assert len(known) == len(set(known))
        stays = left(use.segment, scheme)
        assert stays is None or set(stays).isdisjoint(known)
        idle = {id(ref) for ref in redundant(use.segment, scheme)}
        assert all(not new for ref, new in zip(use.segment.datums, taken, strict=True) if id(ref) in idle)
        assert all(fault.ref in use.segment.datums for fault in named_faults(use.segment, scheme))


@settings(max_examples=60)
@given(schemes())
def test_what_is_said_of_frames_and_chains_agrees(scheme: DatumScheme) -> None:
    assert sum(len(frame.uses) for frame in frames_in_force(scheme)) == len(scheme.uses)
    for ring in loops(scheme):
        assert len(ring) > 1
        assert loop_use(ring, scheme) in scheme.uses
    for conflict in (*order_conflicts(scheme), *boundary_conflicts(scheme)):
        assert scheme.callouts.index(conflict.use.callout) > scheme.callouts.index(conflict.other.callout)
    for callout in scheme.callouts:
        assert not (self_references(callout) and callout.datum_targets)
        assert all(len(use.segment.datums) < 2 for use in positions_of(callout) if unlocated(use, scheme))
    assert {lack.feature.letter for lack in uncontrolled(scheme)} <= set(scheme.features)
    assert all(fault.missing or fault.contacts for fault in target_faults(scheme))
    assert len(datum_overview(scheme).frames) == len(frames_in_force(scheme))
