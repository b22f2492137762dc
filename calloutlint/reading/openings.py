"""What the first words of a line open: a feature, a frame or a datum feature."""

import re

from calloutlint.callouts.spelling import normalise, opens_feature

_FRAME = re.compile(r"\s*(?:[^\W\d][\w'-]*\s+){0,3}[\[(]?\s*[⏤⏥○⌭⌒⌓∠⟂∥⌖◎⌯↗⌰]|[^|]*\|")
_DATUM = re.compile(r"\s*(?:▲|-\s?[A-Z]{1,2}\s?-(?:\s|$))")
_LONGEST_OPENING = 200


def opens_frame(line: str) -> bool:
    """Whether a line holds a feature control frame or the lower segment of one, but for words before it."""
    return _FRAME.match(normalise(line[:_LONGEST_OPENING]).text) is not None


def opens_datum(line: str) -> bool:
    """Whether a line begins with a datum feature symbol."""
    return _DATUM.match(normalise(line[:_LONGEST_OPENING]).text) is not None


def opens_something(line: str) -> bool:
    """Whether a line opens a feature, a frame or a datum feature, as against a note or the rest of a line."""
    return opens_feature(line) or opens_frame(line) or opens_datum(line)
