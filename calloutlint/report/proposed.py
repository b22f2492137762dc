"""The proposed correction of a callout: only the rows that change, with what changes marked in them."""

from collections.abc import Sequence

from calloutlint.report.layout import FrameRow, Piece, Row
from calloutlint.report.marks import Mark, Place


def changed_rows(
    rows: Sequence[Row], before: Sequence[Row], mark: Mark
) -> tuple[list[Row], dict[Place, list[Mark]]]:
    """The rows of a corrected callout that differ from those before, and where to put the mark.

    A composite frame is kept whole. Where no row differs, all are given, unmarked.
    """
    same = {_texts(row) for row in before}
    kept = [index for index, row in enumerate(rows) if _texts(row) not in same]
    kept = sorted({whole for index in kept for whole in _composite(rows, index)}) or list(range(len(rows)))
    partners = _partners(rows, before)
    marked = {
        place: [mark]
        for number, index in enumerate(kept)
        if _texts(rows[index]) not in same
        for place in _differences(number, rows[index], partners.get(index))
    }
    return [rows[index] for index in kept], marked


def _texts(row: Row) -> tuple[object, ...]:
    return (type(row), *(piece.text for piece in row.pieces))


def _composite(rows: Sequence[Row], index: int) -> range:
    """The rows of the composite frame that row `index` belongs to; the row alone where there is none."""
    first, last = index, index + 1
    while first > 0 and _lower(rows[first]):
        first -= 1
    while last < len(rows) and _lower(rows[last]):
        last += 1
    return range(first, last)


def _lower(row: Row) -> bool:
    return isinstance(row, FrameRow) and row.lower


def _partners(rows: Sequence[Row], before: Sequence[Row]) -> dict[int, Row]:
    """The row before that each row came from: the first of the same kind, the second, and so on."""
    found: dict[int, Row] = {}
    for kind in {type(row) for row in rows}:
        new = [index for index, row in enumerate(rows) if type(row) is kind]
        found.update(zip(new, [row for row in before if type(row) is kind], strict=False))
    return found


def _differences(number: int, row: Row, old: Row | None) -> list[Place]:
    if isinstance(row, FrameRow):
        texts = [piece.text for piece in old.pieces] if old else []
        return [
            Place(number, i) for i, piece in enumerate(row.pieces) if i >= len(texts) or piece.text != texts[i]
        ]
    texts = [piece.text for piece in old.pieces] if old else []
    return [
        Place(number, index, columns)
        for index, piece in enumerate(row.pieces)
        if (columns := _new_words(piece, texts[index] if index < len(texts) else ""))
    ]


def _new_words(piece: Piece, old: str) -> tuple[int, int] | None:
    """The columns of the words that `old` does not have at its beginning or end; None if it has all."""
    new_words, old_words = piece.text.split(" "), old.split(" ")
    head = _common(new_words, old_words)
    tail = _common(new_words[head:][::-1], old_words[head:][::-1])
    if head + tail >= len(new_words):
        return None
    start = len(" ".join(new_words[:head])) + (head > 0)
    return start, len(piece.text) - len(" ".join(new_words[len(new_words) - tail :])) - (tail > 0)


def _common(one: Sequence[str], other: Sequence[str]) -> int:
    """How many leading words agree."""
    count = 0
    for mine, theirs in zip(one, other, strict=False):
        if mine != theirs:
            break
        count += 1
    return count
