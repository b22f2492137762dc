"""Joints as a sheet or a package states them.

`NAME = HOLES with FASTENER[, floating through HOLES | fixed in HOLES][, projection LENGTH][, thickness LENGTH]`
"""

import re
from collections.abc import Iterable

from calloutlint.callouts.fastener import parse_fastener
from calloutlint.callouts.value import parse_value
from calloutlint.model.fastener import Hold, HoleRef, Joint
from calloutlint.model.values import Value
from calloutlint.units import Unit

FORM = "NAME = HOLES with FASTENER, fixed in HOLES (or floating through HOLES), projection LENGTH"
LONGEST_JOINT = 500

_WITH = re.compile(r"\swith\s", re.IGNORECASE)
_CLAUSE = re.compile(r"\s*[,;]\s*(?=(?:floating|fixed|projection|thickness)\b)", re.IGNORECASE)
_HELD = re.compile(r"(?P<hold>floating|fixed)(?:\s+(?:through|into|in|to|by)?\s*(?P<holes>.+))?", re.IGNORECASE)
_LENGTH = re.compile(
    r"(?P<what>projection|thickness)\s*[=:]?\s*(?P<amount>(?:\d+\s+)?\d+/[1-9]\d*|\d*[.,]\d+|\d+)\s*"
    r"(?P<unit>mm|in(?:ch(?:es)?)?\.?|[\"″])?",
    re.IGNORECASE,
)
_BALLOON = re.compile(r"\d{1,7}(?:\.\d{1,2})?[A-Za-z]?")


class JointTextError(ValueError):
    """A joint that does not read; the message says what stands there and what was expected."""


def parse_joint(text: str, line: int = 0) -> Joint:
    """The joint that `text` states, at `line` of its file; `JointTextError` where it does not read."""
    text = " ".join(text.split())
    if len(text) > LONGEST_JOINT:
        raise JointTextError(f"{len(text):,} characters; at most {LONGEST_JOINT} are read as a joint")
    name, _, stated = text.partition("=")
    holes, *rest = _WITH.split(stated, maxsplit=1)
    if not name.strip() or not rest:
        raise JointTextError(f"{text!r} is no joint; expected {FORM}")
    fastener, *clauses = _CLAUSE.split(rest[0])
    hold, mates, lengths = _read_clauses(clauses)
    return Joint(
        name=name.strip(),
        holes=parse_holes(holes),
        fastener=parse_fastener(spelled_fastener(fastener)),
        hold=hold,
        mates=mates,
        projection=lengths.get("projection"),
        thickness=lengths.get("thickness"),
        stated_at=line,
    )


def parse_holes(text: str) -> tuple[HoleRef, ...]:
    """Balloons joined by `+`, each alone or as `DRAWING:balloon`; a drawing named holds for those after it."""
    holes: list[HoleRef] = []
    drawing: str | None = None
    for piece in text.split("+"):
        named, colon, balloon = piece.rpartition(":")
        drawing = named.strip() or drawing
        if not _BALLOON.fullmatch(balloon.strip()) or (colon and not named.strip()):
            raise JointTextError(f"{piece.strip()!r} names no hole; expected a balloon such as 4, or DRAWING:4")
        holes.append(HoleRef(drawing, balloon.strip()))
    return tuple(holes)


def spelled_fastener(fastener: str) -> str:
    """A fastener's text with the diameter symbol for its other spellings."""
    return re.sub(r"(?:%%c|\bDIA\b\.?)\s*", "⌀", fastener, flags=re.IGNORECASE)


def _read_clauses(clauses: Iterable[str]) -> tuple[Hold | None, tuple[HoleRef, ...], dict[str, Value]]:
    hold: Hold | None = None
    mates: tuple[HoleRef, ...] = ()
    lengths: dict[str, Value] = {}
    for clause in clauses:
        if held := _HELD.fullmatch(clause.strip()):
            if hold:
                raise JointTextError(f"{clause!r}: how the joint is held is said twice")
            hold = Hold(held["hold"].lower())
            mates = parse_holes(held["holes"]) if held["holes"] else ()
        elif (length := _LENGTH.fullmatch(clause.strip())) and length["what"].lower() not in lengths:
            lengths[length["what"].lower()] = _length(length)
        else:
            raise JointTextError(f"{clause!r} does not read; expected a length, such as projection .50, once")
    return hold, mates, lengths


def _length(match: re.Match[str]) -> Value:
    unit = match["unit"]
    own = (Unit.MM if unit.lower() == "mm" else Unit.INCH) if unit else None
    return parse_value(match["amount"].replace(",", "."), own)
