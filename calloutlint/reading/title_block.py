"""The title block: what its `key: value` lines say of the drawing as a whole."""

from collections.abc import Callable, Mapping, Sequence
from dataclasses import dataclass, field, replace

from calloutlint.callouts.fastener import parse_fastener
from calloutlint.model.drawing import GeneralTolerances, Process, SheetLine, Standard
from calloutlint.model.fastener import Fastener, Joint
from calloutlint.reading.joints import JointTextError, parse_joint, spelled_fastener
from calloutlint.reading.keys import READ, REPEATABLE
from calloutlint.reading.standards import read_standard, read_unit
from calloutlint.reading.tolerance_words import decimal_points
from calloutlint.reading.tolerances import ToleranceLines, read_process
from calloutlint.units import Unit

LONGEST_VALUE = 500
"""Characters of a value that is read for what it means; no title block has as many."""
_SHOWN = 60
_TOLERANCES_FORM = "expected such as .XX ±.01, X.X ±0.2, fractions ±1/64, angles ±1° or ISO 2768-m"


@dataclass(slots=True)
class TitleBlock:
    """What a title block states; `lines` are its lines, each marked where it could not be understood."""

    tolerances: ToleranceLines
    decimal_comma: bool = False
    texts: dict[str, str] = field(default_factory=dict)
    standards: list[str] = field(default_factory=list)
    standard: Standard | None = None
    unit: Unit | None = None
    general: GeneralTolerances | None = None
    process: Process | None = None
    fasteners: list[Fastener] = field(default_factory=list)
    joints: list[Joint] = field(default_factory=list)
    notes: list[str] = field(default_factory=list)
    lines: list[SheetLine] = field(default_factory=list)


def read_title_block(pairs: Sequence[SheetLine], *, decimal_comma: bool = False) -> TitleBlock:
    """The title block of a sheet from its `key: value` lines; the unit is read first, wherever it stands."""
    unit = next((_unit(pair.value) for pair in pairs if pair.key == "units" and pair.value), None)
    block = TitleBlock(ToleranceLines(unit), decimal_comma, unit=unit)
    block.lines = [_read_line(block, pair) for pair in pairs]
    if block.standards:
        block.standard = read_standard(", ".join(block.standards))
    if block.tolerances.written:
        block.general = block.tolerances.general
    return block


def _unit(value: str) -> Unit | None:
    return read_unit(value) if len(value) <= LONGEST_VALUE else None


def _read_line(block: TitleBlock, pair: SheetLine) -> SheetLine:
    """Takes one line into the block; the line comes back with a reason where it could not be understood."""
    if not pair.known:
        return replace(pair, reason=f"{pair.key!r} is no title-block key that is known")
    if pair.key not in READ or not pair.value:
        return pair
    if pair.key not in REPEATABLE and block.texts.setdefault(pair.key, pair.value) != pair.value:
        return replace(pair, known=False, reason=f"{pair.key!r} is stated a second time; the first is used")
    if pair.key in _READ_FOR_MEANING and len(pair.value) > LONGEST_VALUE:
        reason = f"{len(pair.value):,} characters; at most {LONGEST_VALUE} are read as {pair.key}"
        return replace(pair, text=pair.text[:_SHOWN] + "…", known=False, reason=reason)
    refused = _TAKE[pair.key](block, pair) if pair.key in _TAKE else None
    return replace(pair, known=False, reason=refused) if refused else pair


def _take_standard(block: TitleBlock, pair: SheetLine) -> None:
    block.standards.append(pair.value)


def _take_tolerances(block: TitleBlock, pair: SheetLine) -> str | None:
    pieces = block.tolerances.read(pair.value)
    if not pieces:
        return None
    told = "is no general tolerance" if len(pieces) == 1 else "are no general tolerances"
    return f"{', '.join(map(repr, pieces))} {told}; {_TOLERANCES_FORM}"


def _take_process(block: TitleBlock, pair: SheetLine) -> str | None:
    block.process = read_process(pair.value, block.unit)
    return None if block.process else f"{pair.value!r} is no spread; expected such as location 0.05, size 0.02"


def _take_fastener(block: TitleBlock, pair: SheetLine) -> None:
    block.fasteners.append(parse_fastener(spelled_fastener(_with_points(block, pair.value))))


def _take_joint(block: TitleBlock, pair: SheetLine) -> str | None:
    try:
        block.joints.append(parse_joint(_with_points(block, pair.value), pair.number))
    except JointTextError as error:
        return str(error)
    return None


def _take_note(block: TitleBlock, pair: SheetLine) -> None:
    block.notes.append(pair.value)


def _with_points(block: TitleBlock, text: str) -> str:
    return decimal_points(text) if block.decimal_comma else text


_TAKE: Mapping[str, Callable[[TitleBlock, SheetLine], str | None]] = {
    "standard": _take_standard,
    "tolerances": _take_tolerances,
    "process": _take_process,
    "fastener": _take_fastener,
    "joint": _take_joint,
    "note": _take_note,
}
_READ_FOR_MEANING = (_TAKE.keys() | {"units"}) - {"note"}
