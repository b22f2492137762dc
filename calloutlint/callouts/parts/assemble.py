"""The second pass: groups the pieces of all lines into the parts of a callout."""

from collections.abc import Sequence

from lark import Token, Tree

from calloutlint.callouts.expected import BY_PLACE
from calloutlint.callouts.parts import place_count, place_extent
from calloutlint.callouts.parts.dispatch import MAY_BE_WORDS, TOKENS, TREES
from calloutlint.callouts.parts.drafts import FrameDraft, SizeDraft
from calloutlint.callouts.parts.line import Line, tokens
from calloutlint.callouts.parts.state import DRAFTS, HOLES, State
from calloutlint.model.callout import Part, Unread, Words


def assemble(lines: Sequence[Line]) -> tuple[Part, ...]:
    """The parts of a callout from its parsed lines, in reading order."""
    state = State()
    for line in lines:
        _read(state, line)
    _end(state)
    return tuple(part.finish() if isinstance(part, DRAFTS) else part for part in state.parts)


def _read(state: State, line: Line) -> None:
    state.begin(line)
    for state.at, item in enumerate(line.items):
        kind = state.kinds[state.at]
        if kind not in MAY_BE_WORDS:
            state.end_words()
        if isinstance(item, Tree):
            _take_tree(state, item, kind)
        else:
            TOKENS[kind](state, item)
        state.previous = item
        if state.broken and _is_misspelled_frame(state):
            _take_rest(state)
            break
    state.end_words()
    place_count.end_count(state)
    if state.depth is not None and state.depth.size is None:
        place_extent.place_extent(state, state.depth)
    if state.broken:
        _mark_doubtful(state)


def _take_tree(state: State, tree: Tree[Token], kind: str) -> None:
    """Takes a node; one whose numbers make no sense, such as `1/0-20 UNC`, cannot be read."""
    try:
        TREES[kind](state, tree)
    except ValueError:
        pieces = tokens(tree)
        state.unread_span(state.line.span(pieces[0], pieces[-1]), BY_PLACE["value"])


def _is_misspelled_frame(state: State) -> bool:
    last = state.last
    return isinstance(last, Unread) and last.in_frame and not _holds_frame(state)


def _holds_frame(state: State) -> bool:
    return any(isinstance(part, FrameDraft) for part in state.parts[state.first :])


def _take_rest(state: State) -> None:
    """Keeps as plain words what follows a misspelled characteristic: what it would mean is not known."""
    rest = state.line.items[state.at + 1 :]
    if not rest:
        return
    start, end = _first_token(rest[0]), _last_token(rest[-1])
    span = state.line.span(start, end)
    state.add_words(state.line.written(span), span)


def _first_token(node: Token | Tree[Token]) -> Token:
    return node if isinstance(node, Token) else next(node.scan_values(lambda _: True))


def _last_token(node: Token | Tree[Token]) -> Token:
    return node if isinstance(node, Token) else list(node.scan_values(lambda _: True))[-1]


def _end(state: State) -> None:
    """A deviation whose partner never came cannot be read; a scope without a frame is words."""
    state.end_scope()
    for at, part in reversed(list(enumerate(state.parts))):
        if isinstance(part, SizeDraft) and part.deviation is not None:
            part.doubtful = True
            text = part.deviation.text
            state.parts.insert(at + 1, Unread(text, BY_PLACE["deviation"], None, False, part.span))


def _mark_doubtful(state: State) -> None:
    """Marks the parts right beside unread text on this line."""
    here = state.parts[state.first :]
    for at, part in enumerate(here):
        if not isinstance(part, Unread) or part.in_frame:
            continue
        for beside in (here[:at][::-1], here[at + 1 :]):
            neighbour = next((other for other in beside if not isinstance(other, Words | Unread)), None)
            if isinstance(neighbour, HOLES):
                neighbour.doubtful = True
            elif isinstance(neighbour, FrameDraft):
                neighbour.segments[-1 if beside is not here[at + 1 :] else 0].doubtful = True
