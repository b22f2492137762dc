"""The second pass: groups the pieces of all lines into the parts of a callout."""

import re
from collections.abc import Callable, Sequence

from lark import Token, Tree

from calloutlint.callouts.drafts import (
    DepthDraft,
    FrameDraft,
    SizeDraft,
    StepDraft,
    TargetDraft,
    ThreadDraft,
)
from calloutlint.callouts.expected import BY_PLACE
from calloutlint.callouts.frames import FrameRead, read_frame
from calloutlint.callouts.line import Line, Node
from calloutlint.callouts.sizes import add_tolerance, read_count, read_size, size_form
from calloutlint.callouts.threads import read_thread
from calloutlint.callouts.words import meanings_of, nearest_spelling, slip_of
from calloutlint.model.callout import DatumFeature, Part, TargetKind, Unread, Words
from calloutlint.model.frame import Scope, ScopeKind
from calloutlint.model.hole import StepKind
from calloutlint.model.size import Count, Deviations, Limits, SizeForm, SizeModifier, SizeStatus, Through
from calloutlint.model.source import Span
from calloutlint.model.values import Value

Draft = SizeDraft | ThreadDraft | StepDraft | FrameDraft | TargetDraft
Piece = Draft | Part

_STEPS = {
    "⌴": StepKind.COUNTERBORE,
    "⌵": StepKind.COUNTERSINK,
    "‹SF›": StepKind.SPOTFACE,
    "‹DRILL›": StepKind.DRILL,
    "‹REAM›": StepKind.REAM,
    "‹TAP›": StepKind.TAP,
}
_SPEAKS_OF_SIZE_BEFORE = {StepKind.DRILL, StepKind.REAM, StepKind.TAP}
_SIZE_MODIFIERS = {
    "⟨ST⟩": SizeModifier.STATISTICAL,
    "⟨CF⟩": SizeModifier.CONTINUOUS_FEATURE,
    "Ⓔ": SizeModifier.ENVELOPE,
    "Ⓘ": SizeModifier.INDEPENDENCY,
    "Ⓕ": SizeModifier.FREE_STATE,
    "CT": SizeModifier.COMMON_TOLERANCE,
}
_TARGET_KINDS = {"LINE": TargetKind.LINE, "AREA": TargetKind.AREA, "POINT": TargetKind.POINT}
_REFERRING = {"TO", "FROM", "WITH", "OF", "BY", "ON", "IN", "AT", "WRT", "RELATIVE", "AND", "&", "OR", "ABOUT"}
_PUNCTUATION = set(",;.:")
_COUNTABLE = (SizeDraft, ThreadDraft, StepDraft)


def build(lines: Sequence[Line]) -> tuple[Part, ...]:
    """The parts of a callout from its parsed lines, in reading order."""
    builder = _Builder()
    for line in lines:
        builder.read(line)
    return tuple(part.finish() if isinstance(part, _DRAFTS) else part for part in builder.parts)


_DRAFTS = (SizeDraft, ThreadDraft, StepDraft, FrameDraft, TargetDraft)


class _Builder:
    """Holds the parts so far, and what on this line still waits for its partner."""

    def __init__(self) -> None:
        self.parts: list[Piece] = []
        self.line: Line
        self.begin()

    def begin(self) -> None:
        """Forgets what waited on the line before."""
        self.first = len(self.parts)
        self.previous: Node | None = None
        self.size: SizeDraft | None = None
        self.count: Count | None = None
        self.step: StepDraft | None = None
        self.depth: DepthDraft | None = None
        self.target: TargetDraft | None = None
        self.form: SizeForm | None = None
        self.drill: str | None = None
        self.box: str | None = None
        self.boxed: SizeDraft | None = None
        self.status: SizeStatus | None = None
        self.words: list[Token] = []
        self.scope: Scope | None = getattr(self, "scope", None)

    def read(self, line: Line) -> None:
        """Takes in one line."""
        self.line = line
        self.begin()
        for at, item in enumerate(line.items):
            self.following = line.items[at + 1 :]
            if isinstance(item, Tree):
                _TREES[item.data](self, item)
            elif item.type == "WORD" or item.type in _ALWAYS_WORDS:
                self.word(item)
            else:
                self.end_words()
                _TOKENS[item.type](self, item)
            self.previous = item
        self.end_line()

    def end_line(self) -> None:
        self.end_words()
        if self.count is not None:
            self.trailing_count(self.count)
        if self.depth is not None and self.depth.size is None:
            self.place_extent(self.depth)
        self.mark_doubtful()

    # sizes

    def on_size(self, tree: Tree[Token]) -> None:
        self.end_words()
        dual = self.box is not None and self.boxed is not None
        draft = read_size(tree, self.line.in_other_unit() if dual else self.line)
        if self.form is not None:
            draft.form, self.form = self.form, None
        self.take_size(draft)
        self.size = draft

    def take_size(self, draft: SizeDraft) -> None:
        """Puts a size where it belongs: a box, a target, a depth, a step, or the callout."""
        following = self.following[0] if self.following else None
        deep = isinstance(following, Token) and following.type == "DEEP"
        if self.box is not None and self.boxed is not None:
            draft.form = self.boxed.form if draft.form is SizeForm.LINEAR else draft.form
            self.boxed.dual = draft
        elif self.target is not None and draft.nominal is not None:
            self.target.sizes.append(draft.nominal)
        elif self.depth is not None and self.depth.size is None:
            self.depth.size = draft
            self.place_extent(self.depth)
        elif deep:
            self.place_depth(DepthDraft(draft.span, draft))
        elif self.step is not None and self.fits_step(self.step, draft):
            self.put_in_step(self.step, draft)
        else:
            self.append_size(draft)
        if self.box == "basic" and self.boxed is None:
            draft.status = SizeStatus.BASIC
        elif self.box == "reference":
            draft.status = SizeStatus.REFERENCE
        if self.status is not None:
            self.set_status(self.status, draft)
            self.status = None

    def append_size(self, draft: SizeDraft) -> None:
        if not self.merges_with_last(draft):
            self.parts.append(draft)
            self.give_count(draft)

    def merges_with_last(self, draft: SizeDraft) -> bool:
        """Whether a bare number under or beside another one is its second limit."""
        last = self.parts[-1] if self.parts else None
        if not isinstance(last, SizeDraft) or last.extent is not None or not draft.bare:
            return False
        if draft.nominal is None or last.nominal is None or draft.form not in {last.form, SizeForm.LINEAR}:
            return False
        if last.deviation is not None and not draft.nominal.amount:
            return _complete(last, draft.nominal)
        plain = last.tolerance is None and last.fit is None and last.deviation is None and last.dual is None
        toleranced = last.status is SizeStatus.TOLERANCED and self.status is None and self.box is None
        if not plain or not toleranced or not _near(last.nominal, draft.nominal) or self.status_follows():
            return False
        last.tolerance, last.nominal = Limits(last.nominal, draft.nominal), None
        return True

    def status_follows(self) -> bool:
        following = self.following[0] if self.following else None
        return isinstance(following, Token) and following.type in {"MAX", "MIN", "REFERENCE", "BASIC"}

    def on_stacked(self, tree: Tree[Token]) -> None:
        """A tolerance at the start of a line belongs to the size above it."""
        piece = tree.children[0]
        size = self.parts[-1] if self.parts else None
        if isinstance(piece, Token):
            if isinstance(size, SizeDraft) and size.tolerance is None and size.fit is None:
                add_tolerance(size, piece, self.line)
                self.size = size
            else:
                self.unread(piece, ("a size before the tolerance",))

    def on_status(self, token: Token) -> None:
        status = _STATUSES[token.type]
        adjacent = self.previous
        after_size = isinstance(adjacent, Tree) and adjacent.data == "size"
        after_size = after_size or (
            isinstance(adjacent, Token) and adjacent.type in {"CLOSE_BOX", "SIZE_MODIFIER"}
        )
        if self.size is not None and after_size:
            self.set_status(status, self.size)
        elif self.number_follows():
            self.status = status
        else:
            self.as_word(token)

    def number_follows(self) -> bool:
        following = self.following[0] if self.following else None
        return isinstance(following, Tree) and following.data == "size"

    def set_status(self, status: SizeStatus, size: SizeDraft) -> None:
        size.status = status
        pair = [part for part in self.parts[-2:] if isinstance(part, SizeDraft)]
        if len(pair) == 2 and {part.status for part in pair} == {SizeStatus.MAXIMUM, SizeStatus.MINIMUM}:
            one, other = pair
            upper, lower = (one, other) if one.status is SizeStatus.MAXIMUM else (other, one)
            if upper.nominal and lower.nominal and upper.tolerance is None and lower.tolerance is None:
                one.tolerance = Limits(upper.nominal, lower.nominal, named=True)
                one.nominal, one.status = None, SizeStatus.TOLERANCED
                self.parts.pop()
                self.size = one

    def on_size_modifier(self, token: Token) -> None:
        if self.size is None:
            self.as_word(token)
        else:
            self.size.modifiers.append(_SIZE_MODIFIERS[token])

    def on_boxed_form(self, token: Token) -> None:
        self.form = size_form(token)

    def on_open_box(self, token: Token) -> None:
        last = self.previous
        after_size = isinstance(last, Tree) and last.data == "size"
        after_box = isinstance(last, Token) and last.type in {"CLOSE_BOX", "MAX", "MIN", "REFERENCE", "BASIC"}
        self.box = "basic"
        self.boxed = self.size if after_size or after_box else None

    def on_open(self, token: Token) -> None:
        self.box, self.boxed = "reference", None

    def on_close(self, token: Token) -> None:
        if self.box is None:
            self.unread(token, ("an opening bracket before it",))
        if self.box == "reference":
            self.fit_after_limits()
        self.box = self.boxed = None

    def fit_after_limits(self) -> None:
        """`30.000-29.979 (30 f7)`: the limits and the code they come from are one size."""
        if len(self.parts) < 2:
            return
        limits, coded = self.parts[-2:]
        if not isinstance(limits, SizeDraft) or not isinstance(coded, SizeDraft) or coded.fit is None:
            return
        if isinstance(limits.tolerance, Limits) and limits.nominal is None and coded.tolerance is None:
            limits.nominal, limits.fit = coded.nominal, coded.fit
            self.parts.pop()
            self.size = limits

    # counts

    def on_count(self, token: Token) -> None:
        count = read_count(token, self.line)
        if count.in_words and (owner := self.uncounted()) is not None:
            owner.count = count
        elif self.count is None:
            self.count = count
        else:
            self.as_word(token)

    def uncounted(self) -> SizeDraft | ThreadDraft | StepDraft | None:
        for part in self.parts[self.first :]:
            if isinstance(part, _COUNTABLE) and part.count is None:
                return part
        return None

    def trailing_count(self, count: Count) -> None:
        owner = self.uncounted()
        frame = self.parts[-1] if self.parts[self.first :] else None
        if owner is not None:
            owner.count = count
        elif isinstance(frame, FrameDraft) and frame.count is None:
            frame.count = count
        else:
            self.parts.append(count)

    def give_count(self, draft: SizeDraft | ThreadDraft | StepDraft | FrameDraft) -> None:
        if self.count is not None:
            draft.count, self.count = self.count, None

    # holes

    def on_thread(self, tree: Tree[Token]) -> None:
        self.end_words()
        draft = read_thread(tree, self.line)
        last = self.parts[-1] if self.parts else None
        if (
            isinstance(last, StepDraft)
            and last.kind is StepKind.TAP
            and last.size is None
            and last.extent is None
        ):
            self.parts[-1] = Words("TAP", meanings_of("TAP"), last.span)
            self.step = None
        self.parts.append(draft)
        self.give_count(draft)
        unread = tree.children[-1]
        if isinstance(unread, Token) and unread.type == "UNREAD":
            self.unread(unread, ("a thread series such as UNC or UNF",))

    def on_left_hand(self, token: Token) -> None:
        thread = next((part for part in reversed(self.parts) if isinstance(part, ThreadDraft)), None)
        if thread is None:
            self.as_word(token)
        else:
            thread.left_hand = True

    def on_starts(self, token: Token) -> None:
        thread = next((part for part in reversed(self.parts) if isinstance(part, ThreadDraft)), None)
        if thread is None:
            self.as_word(token)
            return
        number = re.search(r"\d+", token)
        thread.starts = int(number[0]) if number else 3 if token.upper().lstrip("- ").startswith("T") else 2

    def on_step(self, token: Token) -> None:
        kind = _STEPS[token]
        last = self.parts[-1] if len(self.parts) > self.first else None
        span = self.line.span(token)
        if kind is StepKind.TAP and isinstance(last, ThreadDraft):
            self.as_word(token)
            return
        draft = StepDraft(kind, span, drill=self.drill)
        self.drill = None
        speaks_of_last = kind in _SPEAKS_OF_SIZE_BEFORE and isinstance(last, SizeDraft)
        if kind not in _SPEAKS_OF_SIZE_BEFORE and isinstance(last, SizeDraft) and self.is_postfix():
            self.claim(draft, last)
        self.parts.append(draft)
        self.give_count(draft)
        self.step = None if speaks_of_last else draft
        self.size = None

    def is_postfix(self) -> bool:
        """Whether a counterbore or countersink word stands after its number: `.438 CBORE`."""
        if not (isinstance(self.previous, Tree) and self.previous.data == "size"):
            return False
        if not self.number_follows():
            return True
        after = self.following[1] if len(self.following) > 1 else None
        return isinstance(after, Token) and after.type == "DEEP"

    def claim(self, draft: StepDraft, last: SizeDraft) -> None:
        self.parts.pop()
        if last.count is not None:
            draft.count, last.count = last.count, None
        self.put_in_step(draft, last)

    def fits_step(self, step: StepDraft, draft: SizeDraft) -> bool:
        if draft.form is SizeForm.ANGLE:
            return step.kind is StepKind.COUNTERSINK and step.angle is None
        return step.size is None and draft.form in {SizeForm.LINEAR, SizeForm.DIAMETER}

    def put_in_step(self, step: StepDraft, draft: SizeDraft) -> None:
        if draft.form is SizeForm.ANGLE:
            step.angle = draft
        else:
            draft.form = SizeForm.DIAMETER
            step.size = draft
        if draft.span.start > step.span.start:
            step.span = Span(step.span.line, step.span.start, draft.span.end)
        else:
            step.span = Span(step.span.line, draft.span.start, step.span.end)

    def on_drill_name(self, token: Token) -> None:
        name = re.sub(r"(?i)^no\.?\s*", "#", str(token)).replace(" ", "")
        if self.step is not None and self.step.kind is StepKind.DRILL and self.step.size is None:
            self.step.drill = name
        else:
            self.drill = name

    def on_through(self, token: Token) -> None:
        self.place_extent(Through(token.strip("‹›"), self.line.span(token)))

    def on_depth(self, token: Token) -> None:
        self.depth = DepthDraft(self.line.span(token))

    def on_deep(self, token: Token) -> None:
        """DEEP after its number was seen with the number; alone it is a depth without one, or stands before it."""
        if isinstance(self.previous, Tree) and self.previous.data == "size":
            return
        self.depth = DepthDraft(self.line.span(token))

    def place_depth(self, depth: DepthDraft) -> None:
        last = self.parts[-1] if self.parts else None
        if isinstance(last, Words) and last.text == "X":
            self.parts.pop()
        self.place_extent(depth)

    def place_extent(self, extent: Through | DepthDraft) -> None:
        """Gives THRU or a depth to the nearest hole, thread or step before it."""
        self.depth = None
        for part in reversed(self.parts):
            if not isinstance(part, _COUNTABLE):
                continue
            if isinstance(part, StepDraft) and part.kind in _SPEAKS_OF_SIZE_BEFORE and part.size is None:
                if self.speaks_of_size(part):
                    continue
            if part.extent is None:
                part.extent = extent
                return
            break
        self.without_hole(extent)

    def speaks_of_size(self, step: StepDraft) -> bool:
        """Whether a size or thread without a depth stands before the step, so that the depth is its own."""
        at = next(i for i, part in enumerate(self.parts) if part is step)
        before = self.parts[at - 1] if at else None
        return isinstance(before, SizeDraft | ThreadDraft) and before.extent is None

    def without_hole(self, extent: Through | DepthDraft) -> None:
        if isinstance(extent, DepthDraft) and extent.size is not None:
            self.parts.append(extent.size)
            self.give_count(extent.size)
        text = extent.written if isinstance(extent, Through) else "DEEP"
        self.parts.append(Words(text, (), extent.span))

    def on_by(self, token: Token) -> None:
        if self.step is None and self.target is None:
            self.parts.append(Words("X", (), self.line.span(token)))

    # frames and datums

    def on_frame(self, tree: Tree[Token]) -> None:
        self.end_words()
        read = read_frame(_tokens(tree), self.line)
        draft = FrameDraft(read.segments, self.scope)
        self.scope = None
        self.parts.append(draft)
        self.give_count(draft)
        self.after_frame(read)

    def on_lower(self, tree: Tree[Token]) -> None:
        above = next(part for part in reversed(self.parts) if isinstance(part, FrameDraft))
        read = read_frame(_tokens(tree), self.line, above.segments[-1].characteristic)
        above.segments += read.segments
        self.after_frame(read)

    def after_frame(self, read: FrameRead) -> None:
        for token, place in read.unread:
            self.unread(token, BY_PLACE[place], in_frame=True)
        for token in read.words:
            if len(token) < 3 or slip_of(token) is not None:
                self.unread(token, BY_PLACE["frame"], in_frame=True)
                read.segments[-1].doubtful = True
            else:
                self.words.append(token)
        self.end_words()

    def on_scope(self, token: Token) -> None:
        scope = _scope(token, self.line.span(token))
        frame = next((part for part in reversed(self.parts) if isinstance(part, FrameDraft)), None)
        if frame is not None and frame.scope is None:
            frame.scope = scope
        else:
            self.scope = scope

    def on_datum_feature(self, token: Token) -> None:
        before = self.parts[-1] if len(self.parts) > self.first else None
        referring = isinstance(before, Words) and before.text.split()[-1].upper() in _REFERRING
        if referring and token[0] == "▲":
            self.as_word(token)
            return
        letter = token.strip("▲-[] ")
        self.parts.append(DatumFeature(letter, self.line.span(token)))

    def on_target(self, tree: Tree[Token]) -> None:
        self.end_words()
        token = _tokens(tree)[0]
        last = self.parts[-1] if len(self.parts) > self.first else None
        if isinstance(last, Words) and not re.search(r"(?i)\b(target|movable)s?$", last.text):
            self.as_word(token)
            return
        draft = TargetDraft(token[0], int(token[1:]), self.line.span(token))
        if isinstance(last, Words):
            draft.movable = "MOVABLE" in last.text.upper()
            self.parts.pop()
        elif isinstance(last, SizeDraft) and last.bare and last.nominal is not None:
            draft.sizes.append(last.nominal)
            self.parts.pop()
        self.parts.append(draft)
        self.target = draft

    # words and what cannot be read

    def word(self, token: Token) -> None:
        if self.target is not None and token.upper() in _TARGET_KINDS:
            self.target.kind = _TARGET_KINDS[token.upper()]
        elif self.target is not None and token.upper() == "MOVABLE":
            self.target.movable = True
        elif token in _PUNCTUATION:
            self.end_words()
        elif token == "CT" and self.size is not None:
            self.size.modifiers.append(SizeModifier.COMMON_TOLERANCE)
        elif (near := slip_of(token)) is not None:
            self.end_words()
            self.unread(token, BY_PLACE["word"], near)
        else:
            self.words.append(token)

    def as_word(self, token: Token) -> None:
        """A known word or symbol that has nothing to act on: plain words, if it is made of letters."""
        span = self.line.span(token)
        text = self.line.written(span)
        if not text[:1].isascii():
            self.unread(token, BY_PLACE["number"])
            return
        self.words.append(token)

    def end_words(self) -> None:
        """Closes a run of plain words; with it ends a drill or ream step that waited for its size."""
        if not self.words:
            return
        span = self.line.between(self.words[0].start_pos or 0, self.words[-1].end_pos or 0)
        text = self.line.written(span)
        self.words = []
        if self.step is not None and self.step.kind in _SPEAKS_OF_SIZE_BEFORE:
            self.step = None
        if self.step is not None and self.step.size is None and text.upper() in {"TO", "X"}:
            return
        self.target = None
        self.parts.append(Words(text, meanings_of(text), span))

    def unread(
        self, token: Token, expected: tuple[str, ...], near: str | None = None, in_frame: bool = False
    ) -> None:
        span = self.line.span(token)
        text = self.line.written(span)
        if token.type == "UNREAD":
            known = dict(self.line.expected).get(token.start_pos or 0)
            expected = known or expected
        self.parts.append(Unread(text, expected, near or nearest_spelling(text), in_frame, span))

    def on_unread(self, token: Token) -> None:
        self.unread(token, BY_PLACE["word"])

    def mark_doubtful(self) -> None:
        """Marks the parts right beside unread text on this line, and a lone deviation as unread."""
        here = self.parts[self.first :]
        for at, part in enumerate(here):
            if isinstance(part, Unread) and not part.in_frame:
                for beside in (here[:at][::-1], here[at + 1 :]):
                    neighbour = next((p for p in beside if not isinstance(p, Words | Unread)), None)
                    if isinstance(neighbour, _COUNTABLE):
                        neighbour.doubtful = True
                    elif isinstance(neighbour, FrameDraft):
                        neighbour.segments[0].doubtful = True


def _tokens(tree: Tree[Token]) -> list[Token]:
    return [child for child in tree.children if isinstance(child, Token)]


def _complete(size: SizeDraft, nil: Value) -> bool:
    if size.deviation is None:
        return False
    size.tolerance, size.deviation = Deviations(size.deviation, nil), None
    return True


def _near(one: Value, other: Value) -> bool:
    """Whether two numbers can be limits of one size: neither is twice the other."""
    smaller, larger = sorted((one.amount, other.amount))
    return 0 < smaller and larger < 2 * smaller


def _scope(token: Token, span: Span) -> Scope:
    if token == "⌮":
        return Scope(ScopeKind.ALL_AROUND, span=span)
    if token == "‹ALL OVER›":
        return Scope(ScopeKind.ALL_OVER, span=span)
    letters = re.findall(r"(?<![A-Za-z])[A-Z](?![A-Za-z])", token)
    kind = ScopeKind.FROM_TO if "→" in token or token[0] in "Ff" and len(token) > 5 else ScopeKind.BETWEEN
    return Scope(kind, letters[0], letters[-1], span)


_STATUSES = {
    "MAX": SizeStatus.MAXIMUM,
    "MIN": SizeStatus.MINIMUM,
    "REFERENCE": SizeStatus.REFERENCE,
    "BASIC": SizeStatus.BASIC,
}
_ALWAYS_WORDS = {"ON_CIRCLE", "NUMBERED_NOTE"}
_TREES: dict[str, Callable[[_Builder, Tree[Token]], None]] = {
    "size": _Builder.on_size,
    "stacked": _Builder.on_stacked,
    "thread": _Builder.on_thread,
    "frame": _Builder.on_frame,
    "lower": _Builder.on_lower,
    "target": _Builder.on_target,
}
_TOKENS: dict[str, Callable[[_Builder, Token], None]] = {
    "COUNT": _Builder.on_count,
    "THRU": _Builder.on_through,
    "DEPTH": _Builder.on_depth,
    "DEEP": _Builder.on_deep,
    "STEP": _Builder.on_step,
    "DRILL_NAME": _Builder.on_drill_name,
    "MAX": _Builder.on_status,
    "MIN": _Builder.on_status,
    "REFERENCE": _Builder.on_status,
    "BASIC": _Builder.on_status,
    "SIZE_MODIFIER": _Builder.on_size_modifier,
    "OPEN_BOX": _Builder.on_open_box,
    "CLOSE_BOX": _Builder.on_close,
    "OPEN": _Builder.on_open,
    "CLOSE": _Builder.on_close,
    "BY": _Builder.on_by,
    "BOXED_FORM": _Builder.on_boxed_form,
    "LEFT_HAND": _Builder.on_left_hand,
    "STARTS": _Builder.on_starts,
    "SCOPE": _Builder.on_scope,
    "DATUM_FEATURE": _Builder.on_datum_feature,
    "DATUM_BOX": _Builder.on_datum_feature,
    "STRAY": _Builder.as_word,
    "UNREAD": _Builder.on_unread,
}
