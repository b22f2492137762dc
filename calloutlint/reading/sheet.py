"""The callout sheet: text of a drawing's title block and callouts, read into a `Drawing`."""

import re
from collections.abc import Iterable, Iterator
from pathlib import Path

from calloutlint.callouts.parse import parse_callout
from calloutlint.model.callout import Callout
from calloutlint.model.drawing import Drawing, SheetLine
from calloutlint.reading.encoding import read_text_file, split_lines
from calloutlint.reading.layout import Block, Layout, lay_out
from calloutlint.reading.title_block import TitleBlock, read_title_block
from calloutlint.units import Unit

_COMMA = re.compile(r"(?<![\d.,])(?![1-9]\d{0,2},\d{3}(?!\d))\d+,\d+")
_POINT = re.compile(r"\d\.\d|(?<![\w.])\.\d")


def read_sheet(path: Path) -> Drawing:
    """The drawing that a sheet file states; `SheetError` where the file cannot be read as text."""
    source = read_text_file(path)
    remarks = (source.remark,) if source.remark else ()
    return parse_sheet(source.text, str(path), remarks)


def parse_sheet(text: str, file: str, remarks: tuple[str, ...] = ()) -> Drawing:
    """The drawing that a sheet's text states.

    Any text gives a drawing: what is not understood is kept in its `lines` and the callouts' unread parts.
    """
    layout = lay_out(split_lines(text.removeprefix("\ufeff").rstrip("\x1a")))
    commas = has_decimal_commas(layout)
    title = read_title_block(layout.pairs, decimal_comma=commas)
    return Drawing(
        file=file,
        number=title.texts.get("drawing"),
        revision=title.texts.get("revision"),
        sheet=title.texts.get("sheet"),
        title=title.texts.get("title"),
        standard=title.standard,
        unit=title.unit,
        general=title.general,
        fasteners=tuple(title.fasteners),
        joints=tuple(title.joints),
        process=title.process,
        notes=tuple(title.notes),
        callouts=tuple(_callouts(layout.blocks, title.unit, commas)),
        lines=_outside_lines(title, layout),
        remarks=(*remarks, *_remarks(layout)),
    )


def _remarks(layout: Layout) -> Iterator[str]:
    if layout.style:
        yield f"balloons are written as {layout.style.name}"


def has_decimal_commas(layout: Layout) -> bool:
    """Whether a sheet writes its decimals with a comma.

    So it is if more numbers can only have a decimal comma (`12,5`, `0,025`; not `1,500`) than have a point,
    over all callouts and general tolerances.
    """
    texts = [line.text for block in layout.blocks for line in block.lines]
    texts += [pair.value for pair in layout.pairs if pair.key == "tolerances"]
    commas = sum(len(_COMMA.findall(text)) for text in texts if "," in text)
    return commas > 0 and commas > sum(len(_POINT.findall(text)) for text in texts)


def _callouts(blocks: Iterable[Block], unit: Unit | None, decimal_comma: bool) -> Iterator[Callout]:
    for block in blocks:
        lines = [line.text for line in block.lines]
        parts = parse_callout(lines, unit, decimal_comma=decimal_comma)
        yield Callout(block.balloon, parts, block.zone, tuple(block.lines))


def _outside_lines(title: TitleBlock, layout: Layout) -> tuple[SheetLine, ...]:
    return tuple(sorted(title.lines + layout.strays, key=lambda line: line.number))
