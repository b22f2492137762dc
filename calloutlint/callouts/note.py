"""A fastener named in a callout: `FOR .250-20 UNC SCREW`, `CLEARANCE FOR M6 FLOATING`."""

import re

from calloutlint.callouts.fastener import parse_fastener
from calloutlint.callouts.symbols import ANY_CHARACTERISTIC
from calloutlint.model.fastener import Fastener, Hold

_NAMED = re.compile(
    r"(?<!\w)(?P<clear>(?:clearance|clear|clr)\.?\s+(?:holes?\s+)?)?"
    rf"for\s+(?:an?\s+)?(?P<what>[^|{ANY_CHARACTERISTIC}▲]+)",
    re.IGNORECASE,
)
_STOPS = re.compile(
    r"\s*(?:[,;](?!\s*(?:fixed|floating)(?!\w))|(?<!\S)-[A-Z]-|(?<!\w)(?:press|interference|force|shrink|drive|slip|sliding|slide|running"
    r"|clearance|transition|loose|free)[ -]fit|‹(?:THRU|PL|TYP)).*",
    re.IGNORECASE,
)
_DESIGNATION = re.compile(
    r"(?:#\s?\d|MJ?\s?\d|(?:no\.?\s?)\d|\d*\.?\d+(?:/\d+)?-\d|\d \d/\d+-\d)", re.IGNORECASE
).match
_NOUN = re.compile(
    r"(?<!\w)(?:screws?|bolts?|studs?|dowels?|pins?|capscrews?|fasteners?|rivets?|[SBF]HS?CS|HHCS|SHSS)(?!\w)",
    re.IGNORECASE,
).search
_OTHER = re.compile(
    r"(?<!\w)(?:taps?|‹TAP›|thds?|threads?|helicoil|inserts?|wrench|heads?\b(?!\s+\w))", re.IGNORECASE
).search
_HOLD = re.compile(r"(?<!\w)(fixed|floating)(?:\s+fasteners?)?(?!\w)", re.IGNORECASE)


def find_note(text: str) -> tuple[int, int] | None:
    """Where a normalised line names a fastener, from FOR or CLEARANCE on; None where it names none."""
    named = _NAMED.search(text)
    if named is None:
        return None
    what = _STOPS.sub("", named["what"]).rstrip()
    sized = _DESIGNATION(what) or (named["clear"] and re.match(r"‹?⌀?›?\s*\.?\d", what))
    if _OTHER(what) or not (_NOUN(what) or sized):
        return None
    return named.start(), named.start("what") + len(what)


def read_note(text: str) -> tuple[Fastener, Hold | None]:
    """The fastener that such a note names, and how it is held if it says so."""
    named = _NAMED.search(text)
    what = named["what"] if named else text
    hold = _HOLD.search(what)
    return parse_fastener(_HOLD.sub("", what).rstrip(" ,;")), Hold(hold[1].lower()) if hold else None


def names_fastener(text: str) -> bool:
    """Whether `FOR` before the text is enough to make it a fastener."""
    return find_note(f"FOR {text}") is not None
