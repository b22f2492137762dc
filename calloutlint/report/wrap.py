"""Breaks text into lines by terminal columns, at spaces where there are any."""

from collections.abc import Iterator

from rich.cells import cell_len


def breaks(text: str, width: int) -> Iterator[tuple[int, int]]:
    """Start and end of each line of `text`, none wider than `width`; the space at a break is left out."""
    start = 0
    while cell_len(text[start:]) > width:
        end = _fitting(text, start, width)
        space = text.rfind(" ", start + 1, end + 1)
        if space > start:
            yield start, space
            start = space + 1
        else:
            yield start, end
            start = end
    yield start, len(text)


def wrap(text: str, width: int) -> list[str]:
    """The paragraphs of `text` on lines of at most `width` columns."""
    return [line[start:end] for line in text.splitlines() for start, end in breaks(line, width)]


def _fitting(text: str, start: int, width: int) -> int:
    """Where the longest run of characters from `start` that is at most `width` wide ends, one at least."""
    end, used = start, 0
    while used + cell_len(text[end]) <= width or end == start:
        used += cell_len(text[end])
        end += 1
    return end
