"""From the pieces of a feature control frame to its segments."""

import re
from collections.abc import Sequence
from dataclasses import dataclass, field

from lark import Token

from calloutlint.callouts.build.drafts import SegmentDraft
from calloutlint.callouts.build.line import Line, joined
from calloutlint.model.frame import (
    Characteristic,
    DatumLetter,
    DatumRef,
    Modifier,
    ModifierUse,
    PerUnit,
    Zone,
    ZoneShape,
)
from calloutlint.model.source import Span
from calloutlint.model.values import Value

CHARACTERISTIC_OF = dict(zip("⏤⏥○⌭⌒⌓∠⟂∥⌖◎⌯↗⌰", Characteristic, strict=True))
MODIFIER_OF = {
    "Ⓜ": Modifier.MMC,
    "Ⓛ": Modifier.LMC,
    "Ⓢ": Modifier.RFS,
    "Ⓟ": Modifier.PROJECTED,
    "Ⓕ": Modifier.FREE_STATE,
    "Ⓣ": Modifier.TANGENT,
    "Ⓤ": Modifier.UNEQUAL,
    "Ⓘ": Modifier.INDEPENDENCY,
    "Ⓔ": Modifier.ENVELOPE,
    "Ⓡ": Modifier.RECIPROCITY,
    "⟨ST⟩": Modifier.STATISTICAL,
    "⟨CF⟩": Modifier.CONTINUOUS_FEATURE,
    "△": Modifier.DYNAMIC,
    "▷": Modifier.TRANSLATION,
    "[CF]": Modifier.CONTACTING,
}
_MODIFIER_WORDS = {modifier.value: modifier for modifier in Modifier if len(modifier.value) in {2, 3}}
_SHAPES = {"⌀": ZoneShape.DIAMETER, "S⌀": ZoneShape.SPHERE}
_BARE = frozenset("MLSPFTUIER")
_WITH_NUMBER = frozenset({Modifier.PROJECTED, Modifier.UNEQUAL, Modifier.OFFSET_ZONE, Modifier.SIMULTANEOUS})
_PASSED_OVER = {"FILLER", "OPEN_GROUP", "CLOSE_GROUP"}
_NO_COMPOSITE = frozenset(Characteristic) - {
    Characteristic.POSITION,
    Characteristic.SURFACE_PROFILE,
    Characteristic.LINE_PROFILE,
}
_PER = re.compile(r"/⌀?\s?(.+?)(?:\s?[xX×]\s?(.+))?").fullmatch


@dataclass(slots=True)
class _Use:
    """A modifier while the number that belongs to it may still come."""

    kind: Modifier
    span: Span
    value: Value | None = None

    def finish(self) -> ModifierUse:
        return ModifierUse(self.kind, self.value, self.span)


@dataclass(slots=True)
class _Letter:
    letter: str
    span: Span
    uses: list[_Use] = field(default_factory=list)

    def finish(self) -> DatumLetter:
        return DatumLetter(self.letter, tuple(use.finish() for use in self.uses), self.span)


@dataclass(slots=True)
class _Datum:
    """A datum compartment in the making; `open` while a hyphen waits for its letter."""

    letters: list[_Letter]
    freedoms: tuple[str, ...] = ()
    joining: bool = False
    closed: bool = False
    uses: list[_Use] = field(default_factory=list)
    spans: list[Span] = field(default_factory=list)

    def finish(self) -> DatumRef:
        span = joined(self.spans)
        letters = tuple(letter.finish() for letter in self.letters)
        if len(letters) > 1:
            return DatumRef(letters, tuple(use.finish() for use in self.uses), self.freedoms, span)
        uses = letters[0].modifiers
        return DatumRef((DatumLetter(letters[0].letter, (), letters[0].span),), uses, self.freedoms, span)


@dataclass(slots=True)
class _SegmentReader:
    """Reads the pieces of one segment from left to right."""

    line: Line
    barred: bool
    shape: ZoneShape = ZoneShape.WIDTH
    value: Value | None = None
    uses: list[_Use] = field(default_factory=list)
    per: PerUnit | None = None
    maximum: Value | None = None
    zone_spans: list[Span] = field(default_factory=list)
    datums: list[_Datum] = field(default_factory=list)
    compartment: int = 0
    filled: bool = False
    per_follows: bool = False
    loose: tuple[Value, Token] | None = None
    unread: list[tuple[Token, str]] = field(default_factory=list)
    words: list[Token] = field(default_factory=list)

    def read(self, pieces: Sequence[Token]) -> None:
        for at, piece in enumerate(pieces):
            following = pieces[at + 1] if at + 1 < len(pieces) else None
            if self.words and piece.type not in {"WORD", "BAR", "CLOSE_BOX"}:
                self.unread += [(word, "frame") for word in self.words]
                self.words.clear()
            self.piece(piece, following)
        if self.loose is not None:
            self.unread.append((self.loose[1], "bar"))

    @property
    def in_zone(self) -> bool:
        return self.compartment == 0 and not self.datums

    def piece(self, piece: Token, following: Token | None) -> None:
        span = self.line.span(piece)
        kind = piece.type
        if kind == "BAR":
            self.bar()
            return
        if kind in _PASSED_OVER:
            if kind == "CLOSE_GROUP" and self.datums:
                self.datums[-1].closed = True
            return
        if kind in {"WORD", "UNREAD", "ON_CIRCLE"}:
            self.word(piece)
            return
        if piece == "LE" and not self.in_zone:
            self.words.append(piece)
            return
        self.filled = True
        if kind == "LETTERS":
            self.letters(piece, span, following)
        elif kind in {"MODIFIER", "MODIFIER_WORD"}:
            self.modifier(_modifier(piece), span)
        elif kind == "HYPHEN" and self.datums and not self.in_zone:
            self.datums[-1].joining = True
        elif kind == "FREEDOMS" and self.datums:
            self.datums[-1].freedoms = tuple(re.findall("[a-z]", piece))
            self.datums[-1].spans.append(span)
        elif self.in_zone:
            self.zone_piece(piece, span)
        elif kind == "FRAME_NUMBER" and self.number_of_modifier(self.line.value(piece)):
            pass
        elif kind != "CLOSE_BOX":
            self.unread.append((piece, "datum"))

    def bar(self) -> None:
        if self.words:
            self.unread += [(word, "datum") for word in self.words]
            self.words.clear()
        if self.filled or self.compartment:
            self.compartment += 1
        self.filled = False

    def word(self, piece: Token) -> None:
        if piece.type == "UNREAD" or not self.filled:
            self.unread.append((piece, "datum" if self.compartment else "zone"))
            self.filled = True
        else:
            self.words.append(piece)

    def zone_piece(self, piece: Token, span: Span) -> None:
        self.zone_spans.append(span)
        kind = piece.type
        if kind == "ZONE_FORM":
            if self.value is None or not self.uses:
                self.shape = _SHAPES[piece]
        elif kind == "FRAME_NUMBER":
            self.number(self.line.value(piece), piece)
        elif kind == "PER":
            match = _PER(piece)
            if match is not None:
                self.per = PerUnit(self.line.value(match[1]), self.line.value(match[2]) if match[2] else None)
        elif kind == "PER_MARK":
            self.per_follows = True
        elif kind == "MAX" and self.loose is not None:
            self.maximum, self.loose = self.loose[0], None
        elif kind != "CLOSE_BOX":
            self.unread.append((piece, "zone"))

    def number(self, value: Value, piece: Token) -> None:
        if self.per_follows:
            self.per, self.per_follows = PerUnit(value), False
        elif self.value is None:
            self.value = value
        elif not self.number_of_modifier(value):
            self.loose = (value, piece)

    def number_of_modifier(self, value: Value) -> bool:
        use = self.uses[-1] if self.uses and self.in_zone else None
        if use is None or use.kind not in _WITH_NUMBER or use.value is not None:
            return False
        use.value = value
        return True

    def modifier(self, kind: Modifier, span: Span) -> None:
        use = _Use(kind, span)
        if self.in_zone:
            self.zone_spans.append(span)
            if kind in _WITH_NUMBER and self.loose is not None:
                use.value, self.loose = self.loose[0], None
            self.uses.append(use)
        elif self.datums:
            datum = self.datums[-1]
            (datum.uses if datum.closed and len(datum.letters) > 1 else datum.letters[-1].uses).append(use)
            datum.spans.append(span)

    def letters(self, piece: Token, span: Span, following: Token | None) -> None:
        datum = self.datums[-1] if self.datums else None
        if self.in_zone and self.is_bare_modifier(piece, following):
            self.modifier(_BARE_MODIFIER[piece], span)
        elif datum is not None and datum.joining:
            datum.joining = False
            datum.letters.append(_Letter(str(piece), span))
            datum.spans.append(span)
        elif datum is not None and self.follows_its_letter(piece):
            self.modifier(_BARE_MODIFIER[piece], span)
        else:
            self.compartment = max(self.compartment, 1)
            self.datums.append(_Datum([_Letter(str(piece), span)], spans=[span]))

    def is_bare_modifier(self, piece: Token, following: Token | None) -> bool:
        """Whether a letter after the tolerance is a modifier typed without its circle: `.014 M`."""
        if self.value is None or piece not in _BARE:
            return False
        if self.barred or piece in "ML":
            return True
        expected = "FRAME_NUMBER" if piece in "PU" else "LETTERS"
        return following is not None and following.type == expected

    def follows_its_letter(self, piece: Token) -> bool:
        """Whether a letter after a datum letter, with no bar between, is its modifier: `A M`."""
        return piece in "MLS" and (piece in "ML" or self.barred)

    def finish(self, characteristic: Characteristic, span: Span) -> SegmentDraft:
        zone = None
        if self.zone_spans:
            uses = tuple(use.finish() for use in self.uses)
            zone = Zone(self.shape, self.value, uses, self.per, self.maximum, joined(self.zone_spans))
        datums = [datum.finish() for datum in self.datums]
        return SegmentDraft(characteristic, span, zone, datums, bool(self.unread))


def _modifier(piece: Token) -> Modifier:
    text = piece.replace(" ", "").replace("‹", "").replace("›", "")
    if text in MODIFIER_OF:
        return MODIFIER_OF[text]
    return _MODIFIER_WORDS[text.strip("[]")]


_BARE_MODIFIER = {letter: Modifier(letter) for letter in _BARE}


@dataclass(frozen=True, slots=True)
class FrameRead:
    """What a `frame` or `lower` node gave: segments, the words after it, and what could not be read."""

    segments: list[SegmentDraft]
    words: list[Token]
    unread: list[tuple[Token, str]]


def read_frame(pieces: Sequence[Token], line: Line, above: Characteristic | None = None) -> FrameRead:
    """The segments on one line; `above` is the characteristic that a composite's lower segment goes on with."""
    if above is None:
        characteristic = CHARACTERISTIC_OF[pieces[0][-1]]
        content: Sequence[Token] = pieces[1:]
    else:
        characteristic, content = above, pieces
    barred = any(piece.type == "BAR" for piece in content)
    drafts, words, unread = [], [], []
    for number, segment in enumerate(_split(content, characteristic)):
        reader = _SegmentReader(line, barred)
        reader.read(segment)
        first = pieces[0] if not number else segment[0]
        drafts.append(reader.finish(characteristic, line.span(first, segment[-1] if segment else first)))
        words += reader.words
        unread += reader.unread
    return FrameRead(drafts, words, unread)


def _split(pieces: Sequence[Token], characteristic: Characteristic) -> list[list[Token]]:
    """The pieces of each segment. A spaced `/` before a bare number of a form tolerance is per unit."""
    segments: list[list[Token]] = [[]]
    for at, piece in enumerate(pieces):
        following = pieces[at + 1] if at + 1 < len(pieces) else None
        if piece.type != "NEXT_SEGMENT":
            segments[-1].append(piece)
        elif following is not None and following.type == "FRAME_NUMBER" and characteristic in _NO_COMPOSITE:
            segments[-1].append(Token("PER_MARK", "/", start_pos=piece.start_pos, end_pos=piece.end_pos))
        else:
            segments.append([])
    return segments[:1] + [segment for segment in segments[1:] if segment]
