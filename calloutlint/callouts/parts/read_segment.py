"""Reads one segment of a frame from left to right: the tolerance zone first, then the datum compartments."""

import re
from collections.abc import Callable, Sequence

from lark import Token

from calloutlint.callouts.parts.compartment import Compartment
from calloutlint.callouts.parts.drafts import SegmentDraft
from calloutlint.callouts.parts.line import Line, joined
from calloutlint.callouts.parts.modifiers import BARE_MODIFIERS, WITH_NUMBER, modifier_of
from calloutlint.callouts.symbols import ZONE_SHAPES
from calloutlint.model.frame import (
    Characteristic,
    Modifier,
    ModifierUse,
    PerUnit,
    Zone,
    ZoneShape,
)
from calloutlint.model.source import Span
from calloutlint.model.values import Value

_PER = re.compile(r"/⌀?\s*(.+?)(?:\s?[xX×]\s?(.+))?").fullmatch
_FREEDOM = re.compile("[a-z]")
_WORDS = {"WORD", "UNREAD", "ON_CIRCLE"}
_KEEPS_WORDS = _WORDS | {"BAR", "CLOSE_BOX", "SCOPE"}


class SegmentReader:
    """Takes the pieces of a segment; what it cannot place is in `unread`, words after it in `words`.

    `barred` where bars part any compartments, `boxed` where they part the tolerance from what is around it.
    """

    def __init__(self, line: Line, *, barred: bool, boxed: bool = False) -> None:
        self.line = line
        self.barred = barred
        self.boxed = boxed
        self.shape = ZoneShape.WIDTH
        self.value: Value | None = None
        self.uses: list[ModifierUse] = []
        self.per: PerUnit | None = None
        self.per_follows = False
        self.maximum: Value | None = None
        self.zone_spans: list[Span] = []
        self.datums: list[Compartment] = []
        self.compartment = 0
        self.filled = False
        self.turned_back = False
        self.loose: Token | None = None
        self.scope: Token | None = None
        self.following: Token | None = None
        self.words: list[Token] = []
        self.unread: list[tuple[Token, str]] = []

    def read(self, pieces: Sequence[Token]) -> None:
        """Reads all pieces."""
        last = len(pieces) - 1
        for at, piece in enumerate(pieces):
            self.following = pieces[at + 1] if at < last else None
            if self.words and piece.type not in _KEEPS_WORDS:
                self._refuse_words("frame")
            _TAKE[piece.type](self, piece)
        if self.loose is not None:
            self.unread.append((self.loose, "bar"))

    def finish(self, characteristic: Characteristic, span: Span) -> SegmentDraft:
        """The segment that the pieces make."""
        zone = None
        if self.zone_spans:
            span_of_zone = joined(self.zone_spans)
            zone = Zone(self.shape, self.value, tuple(self.uses), self.per, self.maximum, span_of_zone)
        datums = [datum.finish() for datum in self.datums]
        return SegmentDraft(characteristic, span, zone, datums, bool(self.unread))

    @property
    def _in_zone(self) -> bool:
        return self.turned_back or (self.compartment == 0 and not self.datums)

    def _refuse_words(self, place: str) -> None:
        self.unread += [(word, place) for word in self.words]
        self.words.clear()

    def _refuse(self, piece: Token) -> None:
        self.filled = True
        self.unread.append((piece, "zone" if self._in_zone else "datum"))

    def _bar(self, piece: Token) -> None:
        self._refuse_words("datum")
        if self.filled or self.compartment:
            self.compartment += 1
        self.filled = self.turned_back = False

    def _word(self, piece: Token) -> None:
        if piece.type == "UNREAD" or not self.filled:
            self._refuse(piece)
        else:
            self.words.append(piece)

    def _shape(self, piece: Token) -> None:
        if not self._in_zone:
            self._refuse(piece)
            return
        self.filled = True
        self.zone_spans.append(self.line.span(piece))
        if self.value is None or not self.uses:
            self.shape = ZONE_SHAPES[piece]

    def _number(self, piece: Token) -> None:
        self.filled = True
        value = self.line.value(piece)
        if not self._in_zone:
            self.unread.append((piece, "datum"))
            return
        self.zone_spans.append(self.line.span(piece))
        if self.per_follows:
            self.per, self.per_follows = PerUnit(value), False
        elif self.value is None:
            self.value = value
        elif self.uses and self.uses[-1].kind in WITH_NUMBER and self.uses[-1].value is None:
            use = self.uses[-1]
            self.uses[-1] = ModifierUse(use.kind, value, use.span)
        else:
            self.loose = piece

    def _per_unit(self, piece: Token) -> None:
        match = _PER(piece)
        if not self._in_zone or match is None:
            self._refuse(piece)
            return
        self.zone_spans.append(self.line.span(piece))
        self.per = PerUnit(self.line.value(match[1]), self.line.value(match[2]) if match[2] else None)

    def _per_mark(self, piece: Token) -> None:
        self.per_follows = True

    def _max(self, piece: Token) -> None:
        if self.loose is None:
            self._refuse(piece)
            return
        self.zone_spans.append(self.line.span(piece))
        self.maximum, self.loose = self.line.value(self.loose), None

    def _modifier(self, piece: Token) -> None:
        if piece == "LE" and not self._in_zone:
            self.words.append(piece)
            return
        self._add(modifier_of(piece), piece)

    def _add(self, kind: Modifier, piece: Token) -> None:
        self.filled = True
        span = self.line.span(piece)
        if not self._in_zone:
            if self.datums:
                self.datums[-1].add(ModifierUse(kind, None, span))
            else:
                self._refuse(piece)
            return
        self.zone_spans.append(span)
        value = None
        if kind in WITH_NUMBER and self.loose is not None:
            value, self.loose = self.line.value(self.loose), None
        self.uses.append(ModifierUse(kind, value, span))

    def _letters(self, piece: Token) -> None:
        datum = self.datums[-1] if self.datums else None
        if datum is not None and datum.joining:
            datum.joining = False
            span = self.line.span(piece)
            datum.letters.append((str(piece), span, []))
            datum.spans.append(span)
        elif self._is_bare_modifier(piece, datum):
            self._add(BARE_MODIFIERS[piece], piece)
        elif self.boxed and self.compartment == 0 and self.value is not None:
            self.unread.append((piece, "letter in zone"))
        else:
            self.turned_back = False
            self.compartment = max(self.compartment, 1)
            self.datums.append(Compartment(str(piece), self.line.span(piece)))
            self.filled = True

    def _is_bare_modifier(self, piece: Token, datum: Compartment | None) -> bool:
        """Whether a letter is a modifier typed without its circle: `.014 M A M B`."""
        if piece not in BARE_MODIFIERS:
            return False
        if not self._in_zone:
            in_its_compartment = datum is not None and self.filled
            return in_its_compartment and (piece in "ML" or (piece == "S" and self.barred))
        if self.value is None:
            return False
        if self.barred or piece in "ML":
            return True
        expected = "FRAME_NUMBER" if piece in "PU" else "LETTERS"
        return self.following is not None and self.following.type == expected

    def _hyphen(self, piece: Token) -> None:
        if self.datums:
            self.datums[-1].joining = True
        else:
            self._refuse(piece)

    def _freedoms(self, piece: Token) -> None:
        if not self.datums:
            self._refuse(piece)
            return
        self.datums[-1].freedoms = tuple(_FREEDOM.findall(piece))
        self.datums[-1].spans.append(self.line.span(piece))

    def _boundary(self, piece: Token) -> None:
        if not self.datums:
            self._refuse(piece)
            return
        self.datums[-1].boundary = re.sub(r"[\[\]‹›\s]", "", piece)
        self.datums[-1].spans.append(self.line.span(piece))

    def _close_group(self, piece: Token) -> None:
        if self.datums:
            self.datums[-1].closed = True

    def _scope(self, piece: Token) -> None:
        self.scope = piece

    def _filler(self, piece: Token) -> None:
        """In words the tolerance may follow the datum: `PERPENDICULAR TO A WITHIN .002`."""
        self.turned_back = piece.lower().startswith("within") and not self.zone_spans

    def _nothing(self, piece: Token) -> None:
        """Closing brackets say nothing of their own."""


_TAKE: dict[str, Callable[[SegmentReader, Token], None]] = {
    "BAR": SegmentReader._bar,
    "WORD": SegmentReader._word,
    "UNREAD": SegmentReader._word,
    "ON_CIRCLE": SegmentReader._word,
    "ZONE_FORM": SegmentReader._shape,
    "FRAME_NUMBER": SegmentReader._number,
    "PER": SegmentReader._per_unit,
    "PER_MARK": SegmentReader._per_mark,
    "MAX": SegmentReader._max,
    "MODIFIER": SegmentReader._modifier,
    "MODIFIER_WORD": SegmentReader._modifier,
    "MODIFIER_BOX": SegmentReader._modifier,
    "LETTERS": SegmentReader._letters,
    "HYPHEN": SegmentReader._hyphen,
    "FREEDOMS": SegmentReader._freedoms,
    "BOUNDARY_BOX": SegmentReader._boundary,
    "CLOSE_GROUP": SegmentReader._close_group,
    "OPEN_GROUP": SegmentReader._nothing,
    "OPEN_BOX": SegmentReader._bar,
    "CLOSE_BOX": SegmentReader._nothing,
    "FILLER": SegmentReader._filler,
    "SCOPE": SegmentReader._scope,
}
