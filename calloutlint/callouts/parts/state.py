"""What the second pass knows while it reads: the parts so far, and what waits for its partner on this line."""

import re

from lark import Token, Tree

from calloutlint.callouts.expected import BY_PLACE
from calloutlint.callouts.parts.drafts import (
    DepthDraft,
    FrameDraft,
    SizeDraft,
    StepDraft,
    TargetDraft,
    ThreadDraft,
)
from calloutlint.callouts.parts.line import Line, Node, joined
from calloutlint.callouts.words import meanings_behind, meanings_of, nearest_spelling
from calloutlint.model.callout import Part, Unread, Words
from calloutlint.model.frame import Scope
from calloutlint.model.hole import StepKind
from calloutlint.model.size import Count, SizeForm, SizeStatus
from calloutlint.model.source import Span

Draft = SizeDraft | ThreadDraft | StepDraft | FrameDraft | TargetDraft
Hole = SizeDraft | ThreadDraft | StepDraft
_COMMA = re.compile(r"\d,\d").search
DRAFTS = (SizeDraft, ThreadDraft, StepDraft, FrameDraft, TargetDraft)
HOLES = (SizeDraft, ThreadDraft, StepDraft)
SPEAKS_OF_SIZE_BEFORE = {StepKind.DRILL, StepKind.REAM, StepKind.TAP}


class State:
    """The parts of a callout in the making; everything but `parts` and `scope` starts anew on each line."""

    def __init__(self) -> None:
        self.parts: list[Draft | Part] = []
        self.scope: Scope | None = None
        self.scope_text = ""
        self.line: Line

    def begin(self, line: Line) -> None:
        """Turns to the next line."""
        self.line = line
        self.kinds = [str(node.data) if isinstance(node, Tree) else node.type for node in line.items]
        self.first = len(self.parts)
        self.previous: Node | None = None
        self.at = 0
        self.broken = False
        self.size: SizeDraft | None = None
        self.count: Count | None = None
        self.count_at = 0
        self.step: StepDraft | None = None
        self.depth: DepthDraft | None = None
        self.target: TargetDraft | None = None
        self.form: SizeForm | None = None
        self.drill: str | None = None
        self.drill_size: SizeDraft | None = None
        self.box: SizeStatus | None = None
        self.outer: SizeStatus | None = None
        self.dual_of: SizeDraft | None = None
        self.dual_statuses: list[SizeStatus] = []
        self.status: SizeStatus | None = None
        self.words: list[Token] = []

    @property
    def last(self) -> Draft | Part | None:
        """The last part on this line."""
        return self.parts[-1] if len(self.parts) > self.first else None

    def last_of(self, kind: type[ThreadDraft] | type[FrameDraft]) -> ThreadDraft | FrameDraft | None:
        """The last part of a kind on any line."""
        return next((part for part in reversed(self.parts) if isinstance(part, kind)), None)

    @property
    def after_size(self) -> bool:
        """Whether a size stands right before, closed with its brackets and modifiers."""
        if isinstance(self.previous, Tree):
            return bool(self.previous.data == "size")
        return self.previous is not None and self.previous.type in {"CLOSE_BOX", "SIZE_MODIFIER"}

    def follows(self, kind: str, at: int = 0) -> bool:
        """Whether the next node but `at` is a rule or a terminal called `kind`."""
        place = self.at + 1 + at
        return place < len(self.kinds) and self.kinds[place] == kind

    @property
    def following_text(self) -> str:
        """The next node as normalised text; empty where it is more than one piece, or none."""
        following = self.line.items[self.at + 1 : self.at + 2]
        return str(following[0]) if following and isinstance(following[0], Token) else ""

    def give_count(self, owner: Hole | FrameDraft) -> None:
        """Gives the count that waits to the part it stands before."""
        if self.count is not None:
            owner.count, self.count = self.count, None

    def add_words(self, text: str, span: Span) -> None:
        """Adds plain words to the parts."""
        self.parts.append(Words(text, meanings_of(text), span))

    def end_words(self) -> None:
        """Closes a run of plain words."""
        if not self.words:
            return
        span = self.line.span(self.words[0], self.words[-1])
        before = self.line.normal.text[: self.words[0].start_pos]
        self.words = []
        text = self.line.written(span)
        if self.step is not None and not self.step.size and text.upper() in {"TO", "FOR"}:
            return
        if self.step is not None and self.step.kind in SPEAKS_OF_SIZE_BEFORE:
            self.step = None
        self.target = None
        self.parts.append(Words(text, meanings_behind(before, text), span))

    def end_scope(self) -> None:
        """A scope that no frame took is plain words."""
        if self.scope is not None:
            self.add_words(self.scope_text, self.scope.span)
            self.scope = None

    def unread(
        self, token: Token, expected: tuple[str, ...], nearest: str | None = None, *, in_frame: bool = False
    ) -> None:
        """Adds text that cannot be read."""
        if token.type == "UNREAD" and not in_frame:
            expected = self.line.expected.get(token.start_pos or 0) or expected
        self.unread_span(self.line.span(token), expected, nearest, in_frame=in_frame)

    def unread_span(
        self, span: Span, expected: tuple[str, ...], nearest: str | None = None, *, in_frame: bool = False
    ) -> None:
        """Adds a stretch of text that cannot be read."""
        self.broken = True
        last = self.last
        if isinstance(last, Unread) and last.in_frame is in_frame and self._touch(last.span, span):
            span, expected, nearest = joined((last.span, span)), last.expected, last.nearest or nearest
            self.parts.pop()
        text = self.line.written(span)
        if _COMMA(self.line.normal.text) and _COMMA(text):
            expected = BY_PLACE["comma"]
        self.parts.append(Unread(text, expected, nearest or nearest_spelling(text), in_frame, span))

    def _touch(self, one: Span, other: Span) -> bool:
        """Whether nothing but spaces stands between two stretches of this line."""
        return not self.line.normal.source[one.end : other.start].strip()
