"""What must hold of freedoms whatever the datum features are and however they stand.

Source of the properties: a rigid part has six degrees of freedom; datum references only take them away
(ASME Y14.5, ISO 5459).
"""

from itertools import permutations

from hypothesis import given, settings
from hypothesis import strategies as st

from calloutlint.facts.datums.arrangement import Reference, constraints
from calloutlint.facts.datums.claims import holds_all, takes_nothing, usual
from calloutlint.facts.datums.kinds import DatumGeometry, DatumKind
from calloutlint.facts.datums.motion import FREEDOMS, ORIGIN, Constraints, Freedom, Vector, cross, dot
from calloutlint.facts.datums.placement import Layout, Placement, placements
from calloutlint.facts.datums.relations import Link, Relation

vectors = st.tuples(*[st.integers(-6, 6)] * 3)
directions = vectors.filter(any)
rows = st.tuples(*[st.integers(-9, 9)] * 6)
single = st.sampled_from([kind for kind in DatumKind if kind is not DatumKind.PATTERN])
members = st.sampled_from([DatumKind.AXIS, DatumKind.CENTRE_PLANE, DatumKind.POINT])
geometries = st.one_of(
    st.builds(DatumGeometry, single),
    st.builds(DatumGeometry, st.just(DatumKind.PATTERN), members, st.integers(2, 8)),
    st.builds(DatumGeometry, st.just(DatumKind.PLANE), contacts=st.integers(1, 4)),
)
placed = st.builds(Placement, geometries, directions, vectors, st.sampled_from(Layout))


@st.composite
def frames(draw: st.DrawFn) -> tuple[Reference, ...]:
    """One to three references; the last may be a common datum of two features."""
    chosen = draw(st.lists(geometries, min_size=1, max_size=3))
    references = [Reference(((letter, geometry),)) for letter, geometry in zip("ABC", chosen, strict=False)]
    if draw(st.booleans()):
        references[-1] = Reference((*references[-1].members, ("D", draw(geometries))))
    return tuple(references)


@given(st.lists(rows, max_size=12), rows)
def test_constraints_are_at_most_six_and_never_fewer_after_one_more(some: list[Vector], one: Vector) -> None:
    before = Constraints().and_also(some)
    after = before.and_also([one])
    assert 0 <= before.rank <= after.rank <= min(6, before.rank + 1)
    assert after.rows[: before.rank] == before.rows
    assert len(set(after.held)) == after.rank


@given(st.lists(rows, max_size=6))
def test_order_of_constraints_does_not_change_how_many_hold(some: list[Vector]) -> None:
    assert Constraints().and_also(some).rank == Constraints().and_also(reversed(some)).rank


@given(st.lists(rows, max_size=8))
def test_a_freedom_is_forbidden_exactly_if_holding_it_adds_nothing(some: list[Vector]) -> None:
    held = Constraints().and_also(some)
    for freedom in FREEDOMS:
        assert held.forbids(freedom) == (held.and_also([freedom.row]).rank == held.rank)


@given(st.lists(rows, max_size=8))
def test_orientation_never_stops_a_slide(some: list[Vector]) -> None:
    held = Constraints().and_also(some).orientation()
    assert held.rank <= 3
    assert all(freedom.turns for freedom in held.held)


@given(single.filter(lambda kind: kind is not DatumKind.CONE), directions, vectors)
def test_a_datum_alone_takes_what_its_invariance_class_says(kind: DatumKind, along: Vector, at: Vector) -> None:
    """ISO 5459: plane 3, cylinder 4, sphere 3, wherever and in whatever direction they stand."""
    expected = {DatumKind.PLANE: 3, DatumKind.CENTRE_PLANE: 3, DatumKind.AXIS: 4, DatumKind.POINT: 3}
    found = Constraints().and_also(Placement(DatumGeometry(kind), along, at).constraints())
    assert found.rank == expected[kind]


@given(directions, vectors, st.integers(-5, 5), vectors)
def test_a_datum_allows_every_motion_along_itself(along: Vector, at: Vector, turn: int, slide: Vector) -> None:
    """An axis turns about and slides along itself; a plane turns about its normal and slides in itself."""
    moment = cross(at, along)
    screw = (*(turn * m + d for m, d in zip(moment, along, strict=True)), *(turn * d for d in along))
    axis = Placement(DatumGeometry(DatumKind.AXIS), along, at).constraints()
    assert not any(dot(row, screw) for row in axis)
    inside = cross(slide, along)
    sweep = (*(turn * m + d for m, d in zip(moment, inside, strict=True)), *(turn * d for d in along))
    plane = Placement(DatumGeometry(DatumKind.PLANE), along, at).constraints()
    assert not any(dot(row, sweep) for row in plane)


@given(st.lists(placed, min_size=1, max_size=4))
def test_a_reference_more_never_frees_anything(places: list[Placement]) -> None:
    held = Constraints()
    for place in places:
        after = held.and_also(place.constraints())
        assert held.rank <= after.rank <= 6
        assert {f for f in FREEDOMS if held.forbids(f)} <= {f for f in FREEDOMS if after.forbids(f)}
        held = after


@given(st.lists(placed, min_size=2, max_size=3))
def test_the_order_of_references_does_not_change_what_they_hold_together(places: list[Placement]) -> None:
    orders = [
        Constraints().and_also(row for place in order for row in place.constraints())
        for order in permutations(places)
    ]
    assert len({held.rank for held in orders}) == 1
    assert len({frozenset(f for f in FREEDOMS if held.forbids(f)) for held in orders}) == 1


@given(st.permutations(["A", "B", "C"]))
def test_independent_planes_hold_the_same_in_any_order(order: list[str]) -> None:
    pairs = [("A", "B"), ("A", "C"), ("B", "C")]
    relations = tuple(Relation(b, a, Link.RIGHT_ANGLE) for a, b in pairs)
    plane = DatumGeometry(DatumKind.PLANE)
    taken = usual(tuple(Reference(((letter, plane),)) for letter in order), relations)
    assert taken is not None
    assert [len(each.new) for each in taken] == [3, 2, 1]
    assert {freedom for each in taken for freedom in each.new} == set(FREEDOMS)


@given(frames())
def test_no_freedom_is_taken_twice_in_a_frame(references: tuple[Reference, ...]) -> None:
    taken = usual(references, ())
    assert taken is not None
    new = [freedom for each in taken for freedom in each.new]
    assert len(new) == len(set(new)) <= 6
    assert all(len(each.new) <= len(each.alone) for each in taken)


@settings(max_examples=20)
@given(frames())
def test_what_takes_nothing_anywhere_takes_nothing_in_the_usual_arrangement(
    references: tuple[Reference, ...],
) -> None:
    taken = usual(references, ())
    if len(references) > 1 and takes_nothing(references, ()):
        assert taken is not None
        assert taken[-1].new == ()
    if holds_all(references, ()):
        assert taken is not None
        assert sum(len(each.new) for each in taken) == 6


@given(geometries)
def test_the_first_place_tried_is_at_the_origin(geometry: DatumGeometry) -> None:
    assert next(placements(geometry)).point == ORIGIN


@given(st.sets(st.sampled_from(FREEDOMS), min_size=1))
def test_named_freedoms_are_all_that_is_taken(names: set[Freedom]) -> None:
    everything = DatumGeometry(DatumKind.PATTERN, DatumKind.POINT, 3)
    named = tuple(sorted(names))
    taken = usual((Reference((("A", everything),), named),), ())
    assert taken is not None
    assert set(taken[0].new) == names
    place = Placement(everything, (0, 0, 1), ORIGIN)
    assert constraints((Reference((("A", everything),), named),), {"A": place}).rank == len(names)
