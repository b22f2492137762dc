"""From the pieces of a thread callout to the thread."""

import re
from decimal import Decimal

from lark import Token, Tree

from calloutlint.callouts.parts.drafts import ThreadDraft
from calloutlint.callouts.parts.line import Line
from calloutlint.callouts.value import number_value, parse_value
from calloutlint.model.source import Span
from calloutlint.model.thread import ThreadSystem
from calloutlint.model.values import Value
from calloutlint.trade.inches import is_number_size
from calloutlint.units import Unit

_UNIFIED = re.compile(
    r'(?P<size>#\s?\d+|(?i:no)\.?\s?\d+|[\d./ ]+?(?:-\d+/\d+)?)"?\s?-\s?(?P<tpi>\d+(?:\.5)?)'
).fullmatch
_METRIC = re.compile(
    r"(MJ?)\s?([\d.]+)(?:\s?[xX×]\s?(?:[Pp][Hh]\s?([\d.]+)\s?P\s?)?([\d.]+)(?:\s?mm)?)?", re.I
).fullmatch
_TRAPEZOIDAL = re.compile(r"[Tt][Rr]\s?([\d.]+)\s?[xX×]\s?([\d.]+)(?:\s?\(?P\s?([\d.]+)\)?)?").fullmatch
_PIPE = re.compile(
    r"(?P<size>(?:\d+[ -])?\d+/\d+|[\d.]+)(?:\s?-\s?(?P<tpi>\d+(?:\.5|\s1/2)?))?"
    r"\s*-?\s*(?P<series>[A-Z][A-Z\d-]+)"
).fullmatch
_PARALLEL_PIPE = re.compile(r"(G|R[cp])\s?([\d /-]+?)\s?([AB]?)", re.IGNORECASE).fullmatch


def read_thread(tree: Tree[Token], line: Line) -> ThreadDraft:
    """The thread that a `thread` node states."""
    pieces = [child for child in tree.children if isinstance(child, Token)]
    span = line.span(pieces[0], pieces[-1])
    build = _BUILDERS[pieces[0].type]
    draft = build(str(pieces[0]).strip(), span)
    for piece in pieces[1:]:
        text = str(piece).strip(" -")
        if piece.type == "SERIES":
            draft.series = text
        elif piece.type == "ACME":
            draft.system, draft.series = ThreadSystem.ACME, " ".join(text.upper().split())
        elif piece.type == "LEFT_HAND_BEFORE":
            draft.left_hand = True
        elif piece.type != "UNREAD":
            draft.class_ = text.replace(" ", "")
    return draft


def _inch_diameter(size: str) -> Value | None:
    """Basic major diameter of an inch thread size: `.250`, `1/4`, `#10`; None for a number that is no size."""
    return number_value(int(size[1:])) if size.startswith("#") else parse_value(size, Unit.INCH)


def _unified(text: str, span: Span) -> ThreadDraft:
    match = _UNIFIED(text)
    if match is None:
        raise ValueError(f"'{text}' is not an inch thread.")
    tpi = Value(match["tpi"], Decimal(match["tpi"]), None)
    size = _inch_size(match["size"])
    if size.isdigit() and is_number_size(int(size), tpi.amount):
        size = f"#{size}"
    return ThreadDraft(ThreadSystem.UNIFIED, size, _inch_diameter(size), "", span, tpi=tpi)


def _inch_size(text: str) -> str:
    numbered = re.fullmatch(r"(?:#|no\.?)\s?(\d+)", text, re.IGNORECASE)
    if numbered:
        return f"#{numbered[1]}"
    return parse_value(text, Unit.INCH).text


def _metric(text: str, span: Span) -> ThreadDraft:
    match = _METRIC(text)
    if match is None:
        raise ValueError(f"'{text}' is not a metric thread.")
    series, diameter, lead, pitch = match.groups()
    value = parse_value(diameter, Unit.MM)
    draft = ThreadDraft(ThreadSystem.METRIC, f"M{diameter}", value, series, span)
    draft.pitch = parse_value(pitch, Unit.MM) if pitch else None
    draft.starts = _starts(lead, pitch)
    return draft


def _trapezoidal(text: str, span: Span) -> ThreadDraft:
    match = _TRAPEZOIDAL(text)
    if match is None:
        raise ValueError(f"'{text}' is not a trapezoidal thread.")
    diameter, lead, pitch = match.groups()
    value = parse_value(diameter, Unit.MM)
    draft = ThreadDraft(ThreadSystem.TRAPEZOIDAL, f"Tr{diameter}", value, "Tr", span)
    draft.pitch = parse_value(pitch or lead, Unit.MM)
    draft.starts = _starts(lead, pitch)
    return draft


def _starts(lead: str | None, pitch: str | None) -> int:
    if not lead or not pitch or not Decimal(pitch):
        return 1
    starts = Decimal(lead) / Decimal(pitch)
    return int(starts) if starts == int(starts) and starts >= 1 else 1


def _pipe(text: str, span: Span) -> ThreadDraft:
    match = _PIPE(text)
    if match is not None:
        tpi = match["tpi"]
        draft = ThreadDraft(ThreadSystem.PIPE, _inch_size(match["size"]), None, match["series"], span)
        draft.tpi = parse_value(tpi, None) if tpi else None
        return draft
    parallel = _PARALLEL_PIPE(text)
    if parallel is None:
        raise ValueError(f"'{text}' is not a pipe thread.")
    draft = ThreadDraft(ThreadSystem.PIPE, _inch_size(parallel[2]), None, parallel[1].capitalize(), span)
    draft.class_ = parallel[3] or None
    return draft


_BUILDERS = {
    "UNIFIED": _unified,
    "BARE_UNIFIED": _unified,
    "METRIC": _metric,
    "TRAPEZOIDAL": _trapezoidal,
    "PIPE": _pipe,
}
