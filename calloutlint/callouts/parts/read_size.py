"""From the pieces of a size to the size."""

import re
from collections.abc import Sequence

from lark import Token, Tree

from calloutlint.callouts.parts.drafts import SizeDraft
from calloutlint.callouts.parts.line import Line
from calloutlint.callouts.symbols import SIZE_FORMS
from calloutlint.model.size import Deviations, FitCode, Limits, PlusMinus, SizeForm
from calloutlint.model.values import Value
from calloutlint.units import Unit

_UNIT = r"(?:\"|mm|MM|[iI][nN]\.?)"
_ANGLE_PARTS = r"°(?:\s*\d+\.?\d*\s*')?(?:\s*\d+\.?\d*\s*\")?"
_NUMBER = rf"(?:(?:\d+[ -])?\d+/\d+(?!\d)|\d+\.?\d*|\.\d+)\s*{_UNIT}?(?:{_ANGLE_PARTS}|')?"
_LIMIT = r"(?:\d+\.?\d*|\.\d+)\s*(?:\"|mm|MM|[iI][nN]\.?|°)?"
_FRACTION = r"(?:\d+[ -])?\d+/\d+(?=\s*-)"
_PAIR = re.compile(rf"\s*([+-]?\s*{_NUMBER})\s*[/,]?\s*([+-]?\s*{_NUMBER})\s*").fullmatch
_LIMITS = re.compile(rf"\s*({_FRACTION}|{_LIMIT})(?:-|\s+-\s+|\s*/\s*|\s+)⌀?({_LIMIT}|{_NUMBER})\s*").fullmatch
_MARK = re.compile(r"\"|(?<![a-z])(?:mm|in)(?![a-z])", re.IGNORECASE).search
_WIDEST_LIMITS = 10  # `30-0.1` is neither: a deviation needs a space before its sign


def size_form(token: str) -> SizeForm:
    """The form that a symbol before or after a number stands for."""
    return SIZE_FORMS[token.strip("‹›")]


def read_size(tree: Tree[Token], line: Line) -> SizeDraft:
    """The size that a `size` node states."""
    pieces = [child for child in tree.children if isinstance(child, Token)]
    draft = SizeDraft(SizeForm.LINEAR, None, line.span(pieces[0], pieces[-1]))
    line = line.in_unit(_marked_unit(pieces) or line.unit)
    for piece in pieces:
        if piece.type in {"NUMBER", "NEGATIVE"}:
            draft.nominal = line.value(piece)
            if "°" in piece:
                draft.form = SizeForm.ANGLE
            elif _improper(piece):
                draft.nominal, draft.tolerance = None, _limits(piece, line)
        elif piece.type in {"FORM", "AFTER_FORM"}:
            draft.form = size_form(piece)
        else:
            add_tolerance(draft, piece, line)
    return draft


def _marked_unit(pieces: Sequence[Token]) -> Unit | None:
    """The unit marked on any number of a size: it holds for the others too."""
    for piece in pieces:
        mark = None if "°" in piece or piece.type == "FIT" else _MARK(piece)
        if mark:
            return Unit.MM if mark[0].lower() == "mm" else Unit.INCH
    return None


def add_tolerance(draft: SizeDraft, piece: Token, line: Line) -> None:
    """Gives a size the tolerance that one piece of text states."""
    text = str(piece)
    if piece.type == "PLUS_MINUS":
        draft.tolerance = PlusMinus(line.value(text[1:]))
    elif piece.type == "DEVIATIONS":
        draft.tolerance = _deviations(text, line)
    elif piece.type == "DEVIATION":
        _one_deviation(draft, line.value(text))
    elif piece.type == "LIMITS":
        draft.tolerance = _limits(text, line)
        if "°" in text:
            draft.form = SizeForm.ANGLE
    elif piece.type == "FIT":
        letters = text.rstrip("0123456789")
        draft.fit = FitCode(letters, text[len(letters) :])
    elif piece.type == "FIT_LIMITS":
        draft.tolerance = _limits(text[1:-1].strip(), line)
    elif piece.type == "IN_PARENTHESES":
        inside = text[1:-1].strip()
        equal = inside.startswith("±")
        draft.tolerance = PlusMinus(line.value(inside[1:])) if equal else _deviations(inside, line)


def _one_deviation(draft: SizeDraft, value: Value) -> None:
    if draft.deviation is None:
        draft.deviation = value
    else:
        draft.tolerance, draft.deviation = upper_and_lower(draft.deviation, value), None


def upper_and_lower(first: Value, second: Value) -> Deviations:
    """Two deviations as the drawing means them: of `-.000 +.005` the second is the upper one.

    Two with the same sign stay as written: there the order is what has to be checked.
    """
    lower_first = first.text[0] != "+" and second.text[0] != "-" and first.text[0] != second.text[0]
    return Deviations(second, first) if lower_first else Deviations(first, second)


def _deviations(text: str, line: Line) -> Deviations:
    match = _PAIR(text)
    if match is None:
        raise ValueError(f"'{text}' is not a pair of deviations.")
    return upper_and_lower(line.value(match[1].replace(" ", "")), line.value(match[2].replace(" ", "")))


def _limits(text: str, line: Line) -> Limits:
    match = _LIMITS(text)
    if match is None:
        raise ValueError(f"'{text}' is not a pair of limits.")
    limits = Limits(line.value(match[1]), line.value(match[2]))
    smaller, larger = sorted((limits.first.amount, limits.second.amount))
    if "°" not in text and larger > _WIDEST_LIMITS * smaller:
        raise ValueError(f"'{text}' is too wide a pair of limits to be one.")
    return limits


def _improper(text: str) -> bool:
    """Whether a fraction is none: `10/8` states limits."""
    over, slash, under = text.partition("/")
    return bool(slash) and over.isdigit() and under.isdigit() and int(over) >= int(under)
