"""The title block: what its `key: value` lines say of the drawing as a whole."""

from collections.abc import Callable, Mapping, Sequence
from dataclasses import dataclass, field, replace

from calloutlint.callouts.fastener import parse_fastener
from calloutlint.model.drawing import GeneralTolerances, Process, SheetLine, Standard
from calloutlint.model.fastener import Fastener, Joint
from calloutlint.reading.joints import JointTextError, parse_joint, spelled_fastener
from calloutlint.reading.keys import READ, REPEATABLE
from calloutlint.reading.standards import read_standard, read_unit
from calloutlint.reading.tolerances import decimal_points, read_general_tolerances, read_process
from calloutlint.units import Unit


@dataclass(slots=True)
class TitleBlock:
    """What a title block states; `lines` are its lines, each marked where it could not be understood."""

    decimal_comma: bool = False
    texts: dict[str, str] = field(default_factory=dict)
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
    block = TitleBlock(decimal_comma=decimal_comma)
    block.unit = next((read_unit(pair.value) for pair in pairs if pair.key == "units" and pair.value), None)
    block.lines = [_read_line(block, pair) for pair in pairs]
    return block


def _read_line(block: TitleBlock, pair: SheetLine) -> SheetLine:
    """Takes one line into the block; the line comes back with a reason where it could not be understood."""
    if not pair.known:
        return replace(pair, reason=f"{pair.key!r} is no title-block key that is known")
    if pair.key not in READ or not pair.value:
        return pair
    if pair.key not in REPEATABLE and block.texts.setdefault(pair.key, pair.value) != pair.value:
        return replace(pair, known=False, reason=f"{pair.key!r} is stated a second time; the first is used")
    reason = _TAKE[pair.key](block, pair) if pair.key in _TAKE else None
    return replace(pair, known=False, reason=reason) if reason else pair


def _take_standard(block: TitleBlock, pair: SheetLine) -> None:
    before = f"{block.standard.written}, " if block.standard else ""
    block.standard = read_standard(before + pair.value)


def _take_tolerances(block: TitleBlock, pair: SheetLine) -> str | None:
    before, understood = (f"{block.general.written}, ", block.general.unread) if block.general else ("", ())
    block.general = read_general_tolerances(before + pair.value, block.unit)
    pieces = ", ".join(repr(piece) for piece in block.general.unread if piece not in understood)
    if not pieces:
        return None
    return f"not understood: {pieces}; expected such as .XX ±.01, X.X ±0.2, angles ±1° or ISO 2768-m"


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
