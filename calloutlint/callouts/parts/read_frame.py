"""From the pieces of a feature control frame to its segments."""

from collections.abc import Sequence
from dataclasses import dataclass

from lark import Token

from calloutlint.callouts.parts.drafts import SegmentDraft
from calloutlint.callouts.parts.line import Line
from calloutlint.callouts.parts.read_segment import SegmentReader
from calloutlint.callouts.symbols import CHARACTERISTICS
from calloutlint.model.frame import Characteristic

_COMPOSITE = {Characteristic.POSITION, Characteristic.SURFACE_PROFILE, Characteristic.LINE_PROFILE}


@dataclass(frozen=True, slots=True)
class FrameRead:
    """What a frame node gave: segments, words after it, what cannot be read, where it applies."""

    segments: list[SegmentDraft]
    words: list[Token]
    unread: list[tuple[Token, str]]
    scopes: list[Token]


BESIDE = {"SCOPE"}
"""What may stand on a frame's line without being of the frame."""


def read_frame(pieces: Sequence[Token], line: Line, above: Characteristic | None = None) -> FrameRead:
    """The segments on one line; `above` is the characteristic that a composite's lower segment goes on with."""
    characteristic = above or CHARACTERISTICS[pieces[0][-1]]
    content = pieces if above else pieces[1:]
    bars = [piece.type in {"BAR", "OPEN_BOX"} for piece in content]
    boxed = bars[:1] == [True] and sum(bars[:-1]) > 1
    read = FrameRead([], [], [], [])
    for segment in _split(content, characteristic):
        reader = SegmentReader(line, barred=any(bars), boxed=boxed)
        reader.read(segment)
        first = segment[0] if read.segments else pieces[0]
        own = [piece for piece in segment if piece.type not in BESIDE]
        span = line.span(first, own[-1] if own else first)
        read.segments.append(reader.finish(characteristic, span))
        read.words.extend(reader.words)
        read.unread.extend(reader.unread)
        read.scopes.extend([] if reader.scope is None else [reader.scope])
    return read


def _split(pieces: Sequence[Token], characteristic: Characteristic) -> list[Sequence[Token]]:
    """The pieces of each segment. A spaced `/` before a bare number is per unit where no composite can be."""
    if not any(piece.type == "NEXT_SEGMENT" for piece in pieces):
        return [pieces]
    segments: list[list[Token]] = [[]]
    for at, piece in enumerate(pieces):
        following = pieces[at + 1] if at + 1 < len(pieces) else None
        if piece.type != "NEXT_SEGMENT":
            segments[-1].append(piece)
        elif following is not None and following.type == "FRAME_NUMBER" and characteristic not in _COMPOSITE:
            segments[-1].append(Token("PER_MARK", "/", start_pos=piece.start_pos, end_pos=piece.end_pos))
        else:
            segments.append([])
    return [segments[0], *(segment for segment in segments[1:] if segment)]
