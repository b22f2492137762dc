"""Canonical text of feature control frames."""

from collections.abc import Iterator, Sequence

from calloutlint.callouts.symbols import CHARACTERISTICS, MODIFIERS, ZONE_SHAPES
from calloutlint.callouts.writing import Style, Writing
from calloutlint.model.frame import (
    DatumRef,
    Frame,
    Modifier,
    ModifierUse,
    Scope,
    ScopeKind,
    Segment,
    Zone,
)

_SYMBOL_OF = {characteristic: symbol for symbol, characteristic in CHARACTERISTICS.items()}
_MODIFIER_SYMBOLS = {modifier: symbol for symbol, modifier in MODIFIERS.items()}
_BOXED = {Modifier.POINT, Modifier.LINE, Modifier.PLANE}
_SYMBOL_OF_SHAPE = {shape: symbol for symbol, shape in ZONE_SHAPES.items()}


def write_frame(frame: Frame, writing: Writing) -> Iterator[str]:
    """The lines of a frame: `⌖ | ⌀.014 Ⓜ | A | B | C`, then `| ⌀.006 | A`."""
    for at, segment in enumerate(frame.segments):
        line = write_segment(segment, writing, lower=at > 0)
        yield f"{frame.count.written} {line}" if frame.count is not None and not at else line


def write_segment(segment: Segment, writing: Writing, *, lower: bool = False) -> str:
    """One line of a frame, `lower` without its symbol."""
    compartments = [] if lower else [writing.symbol(_SYMBOL_OF[segment.characteristic])]
    if segment.zone is not None:
        compartments.append(_zone(segment.zone, writing))
    compartments += [_datum(datum, writing) for datum in segment.datums]
    text = " | ".join(compartments)
    if lower:
        return f"| {text}"
    return text if len(compartments) > 1 else f"{text} |"


def write_scope(scope: Scope, writing: Writing) -> str:
    """`ALL AROUND`, `ALL OVER`, `A ↔ B`, `A → B`."""
    if scope.kind in {ScopeKind.ALL_AROUND, ScopeKind.ALL_OVER}:
        return scope.kind.upper()
    arrow = writing.symbol("↔" if scope.kind is ScopeKind.BETWEEN else "→")
    return f"{scope.start} {arrow} {scope.end}"


def _zone(zone: Zone, writing: Writing) -> str:
    symbol = _SYMBOL_OF_SHAPE[zone.shape]
    shape = writing.form(symbol) if symbol else ""
    first = shape + (writing.value(zone.value) if zone.value is not None else "")
    if zone.per is not None:
        first += f"/{writing.value(zone.per.length)}"
        first += f"X{writing.value(zone.per.width)}" if zone.per.width is not None else ""
    words = [first.strip()] if first.strip() else []
    words += [_use(use, writing) for use in zone.modifiers]
    if zone.maximum is not None:
        words.append(f"{shape}{writing.value(zone.maximum)} MAX")
    return " ".join(words)


def _use(use: ModifierUse, writing: Writing) -> str:
    symbol = modifier_symbol(use.kind, writing)
    return symbol if use.value is None else f"{symbol} {writing.value(use.value)}"


def modifier_symbol(kind: Modifier, writing: Writing) -> str:
    """A modifier as a compartment shows it: `Ⓜ`, `CZ`, `[PL]`."""
    if kind in _MODIFIER_SYMBOLS:
        return writing.symbol(_MODIFIER_SYMBOLS[kind])
    return f"[{kind.value}]" if kind in _BOXED else kind.value


def _datum(datum: DatumRef, writing: Writing) -> str:
    letters = [
        _modified(letter.letter, letter.modifiers, writing) if len(datum.letters) > 1 else letter.letter
        for letter in datum.letters
    ]
    name = "-".join(letters)
    if len(letters) > 1 and datum.modifiers:
        name = f"({name})"
    if datum.freedoms:
        name += f"[{','.join(datum.freedoms)}]"
    text = _modified(name, datum.modifiers, writing)
    return f"{text} [{_boundary(datum.boundary, writing)}]" if datum.boundary else text


def _boundary(text: str, writing: Writing) -> str:
    """The stated size of a datum's boundary: `BSC`, `⌀1.020`."""
    number = text.lstrip("S⌀")
    form = text.removesuffix(number)
    return text if text.isalpha() or not form else writing.form(form) + number


def _modified(name: str, uses: Sequence[ModifierUse], writing: Writing) -> str:
    """Letters with their modifiers; in ASCII a circled letter stands close, `B(M)`."""
    text = name
    for use in uses:
        written = _use(use, writing)
        close = writing.style is Style.ASCII and written.startswith("(")
        text += written if close else f" {written}"
    return text
