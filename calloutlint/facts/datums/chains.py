"""Where the control of datum features runs in a circle: a feature held to itself, or each held to the other.

Source: ASME Y14.5 (datum features are controlled in form, and to datums of higher precedence),
ISO 5459. That a feature of a common datum may refer to that common datum (two journals in runout to A-B)
and that surfaces with datum targets may be profiled to the frame which the targets establish are usual
practice under both.
"""

from collections.abc import Iterator, Mapping

from calloutlint.facts.datums.kinds import letters_of
from calloutlint.facts.datums.scheme import DatumScheme, Established
from calloutlint.facts.datums.uses import Use
from calloutlint.model.callout import Callout, DatumFeature
from calloutlint.model.frame import DatumRef, Segment
from calloutlint.model.hole import HoleStep
from calloutlint.model.size import Size
from calloutlint.model.thread import Thread


def self_references(callout: Callout) -> tuple[tuple[Segment, DatumRef], ...]:
    """Frame lines that locate or orient a feature to the datum it establishes itself."""
    letters = dict.fromkeys(letters_of(callout))
    if not letters or callout.datum_targets:
        return ()
    return tuple(
        (segment, ref)
        for letter in letters
        for segment in _governing(callout, letter)
        for ref in segment.datums
        if _names(ref) == {letter}
    )


def loops(scheme: DatumScheme) -> tuple[tuple[str, ...], ...]:
    """Rings of datum features each controlled to the next, the last to the first; letters in drawing order.

    A feature controlled to itself is none of them.
    """
    edges = {letter: _controlled_to(feature, scheme) for letter, feature in scheme.features.items()}
    rings: dict[frozenset[str], tuple[str, ...]] = {}
    for letter in edges:
        ring = _ring(letter, edges)
        if ring and not any(set(ring) >= other for other in rings):
            rings[frozenset(ring)] = tuple(sorted(ring, key=list(edges).index))
    return tuple(rings.values())


def loop_use(ring: tuple[str, ...], scheme: DatumScheme) -> Use:
    """The frame line that closes a ring: of its callouts, the last one in the drawing."""
    uses = [
        use
        for use in scheme.uses
        for letter in letters_of(use.callout)
        if letter in ring and any(letter not in names and names & set(ring) for names in _named(use.segment))
    ]
    return uses[-1]


def _named(segment: Segment) -> list[set[str]]:
    return [_names(ref) for ref in segment.datums]


def _names(ref: DatumRef) -> set[str]:
    return {letter.letter for letter in ref.letters}


def _governing(callout: Callout, letter: str) -> Iterator[Segment]:
    """Frame lines on the feature that carries a datum letter.

    A step or a size written after the datum symbol opens another feature: a counterbore may well be
    positioned to its own hole.
    """
    feature, owner = 0, None
    lines: list[tuple[int, Segment]] = []
    for part in callout.parts:
        if _opens(part):
            feature += 1
        elif isinstance(part, DatumFeature) and part.letter == letter and owner is None:
            owner = feature
        lines += [(feature, segment) for segment in getattr(part, "segments", ()) if not segment.doubtful]
    return (segment for at, segment in lines if at == owner)


def _opens(part: object) -> bool:
    return isinstance(part, Size | Thread) or (isinstance(part, HoleStep) and part.size is not None)


def _controlled_to(feature: Established, scheme: DatumScheme) -> tuple[str, ...]:
    """Letters of other datum features that a feature's own frames refer to.

    None where targets establish it, or where its letter stands on two features and so may be a slip.
    """
    if feature.targets or len(feature.callouts) != 1:
        return ()
    lines = _governing(feature.callouts[0], feature.letter)
    named = [names for segment in lines for names in _named(segment)]
    found = {letter for names in named if feature.letter not in names for letter in names}
    return tuple(letter for letter in scheme.features if letter in found)


def _ring(start: str, edges: Mapping[str, tuple[str, ...]]) -> tuple[str, ...]:
    """The shortest way from a letter along the edges back to it; empty where there is none."""
    paths: list[tuple[str, ...]] = [(start, step) for step in edges[start]]
    seen: set[str] = set()
    for path in paths:
        if path[-1] == start:
            return path[:-1]
        if path[-1] not in seen:
            seen.add(path[-1])
            paths.extend((*path, step) for step in edges[path[-1]])
    return ()
