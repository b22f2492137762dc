"""Bytes to text and back: encodings, byte order marks, line ends, and files that are no text at all."""

import re
from dataclasses import dataclass
from pathlib import Path

from calloutlint.errors import SheetError
from calloutlint.reading.files import read_bytes

LONGEST_LINE = 20_000

_MARKS = (
    (b"\xef\xbb\xbf", "utf-8"),
    (b"\xff\xfe\x00\x00", "utf-32-le"),
    (b"\x00\x00\xfe\xff", "utf-32-be"),
    (b"\xff\xfe", "utf-16-le"),
    (b"\xfe\xff", "utf-16-be"),
)
_NAMES = {"utf-8": "UTF-8", "utf-16-le": "UTF-16", "utf-16-be": "UTF-16", "cp1252": "Windows-1252"}
_DOCUMENTS = (
    (b"%PDF", "a PDF document"),
    (b"PK\x03\x04", "a zipped file such as a spreadsheet or text document"),
    (b"\xd0\xcf\x11\xe0", "an old office document"),
    (b"\x89PNG", "a PNG picture"),
    (b"\xff\xd8\xff", "a JPEG picture"),
    (b"AC10", "a DWG drawing"),
    (b"{\\rtf", "a rich text document"),
)
_EXPECTED = "a callout sheet in plain text was expected"
_NOT_TEXT = re.compile("[\x00-\x08\x0e-\x19\x1c-\x1f]")
_LINE_END = re.compile("\r\n|\r|\n")


@dataclass(frozen=True, slots=True)
class Text:
    """A file's text with all that is needed to write it back byte by byte.

    `text` keeps the line ends of the file; `newline` is the one used most, for lines that are added. `bom` is
    the byte order mark, empty where there is none.
    """

    text: str
    encoding: str = "utf-8"
    bom: bytes = b""
    newline: str = "\n"

    @property
    def remark(self) -> str | None:
        """What the record says about the encoding; None for plain UTF-8."""
        if self.encoding == "utf-8" and not self.bom:
            return None
        mark = " with a byte order mark" if self.bom else ""
        return f"read as {_NAMES[self.encoding]}{mark}"


def read_text_file(path: Path) -> Text:
    """The text of a file; `SheetError` where it cannot be opened, is too large or is no text."""
    return decode(read_bytes(path), str(path))


def decode(data: bytes, file: str = "sheet") -> Text:
    """The text that `data` holds: UTF-8, UTF-16 with a mark, or Windows-1252.

    Raises `SheetError`, naming `file`, for an empty or binary file, broken text or a line longer than
    `LONGEST_LINE` characters.
    """
    for start, kind in _DOCUMENTS:
        if data.startswith(start):
            raise SheetError(f"{file}: this is {kind}; {_EXPECTED}")
    bom, encoding = next((mark for mark in _MARKS if data.startswith(mark[0])), (b"", ""))
    body = data[len(bom) :]
    if not bom:
        _refuse_what_is_no_text(body.decode("latin-1"), file)
    encoding = encoding or _guess(body, file)
    text = _decoded(body, encoding, file)
    _refuse_what_is_no_text(text, file)
    _refuse_long_lines(text, file)
    return Text(text, encoding, bom, _newline(text))


def encode(text: Text, file: str = "sheet") -> bytes:
    """The bytes of a text as its file had them; `SheetError` for a character its encoding does not have."""
    try:
        return text.bom + text.text.encode(text.encoding)
    except UnicodeEncodeError as error:
        missing = text.text[error.start]
        raise SheetError(
            f"{file}: {missing!r} cannot be written in {_NAMES[text.encoding]}; "
            "save the sheet as UTF-8, or use plain spelling"
        ) from None


def split_lines(text: str) -> list[str]:
    """The lines of a text without their ends; only CR LF, LF and CR end a line, as editors count them."""
    return _LINE_END.split(text)


def _guess(body: bytes, file: str) -> str:
    try:
        body.decode("utf-8")
    except UnicodeDecodeError as error:
        if not body[: error.start].isascii():
            line = body.count(b"\n", 0, error.start) + 1
            raise SheetError(
                f"{file}: line {line} is not valid UTF-8, though the text before it is; save the sheet as UTF-8"
            ) from None
        return "cp1252"
    return "utf-8"


def _decoded(body: bytes, encoding: str, file: str) -> str:
    if encoding not in _NAMES:
        raise SheetError(f"{file}: the text is UTF-32; UTF-8, UTF-16 or Windows-1252 was expected")
    try:
        return body.decode(encoding)
    except UnicodeDecodeError as error:
        raise SheetError(
            f"{file}: byte {error.start + 1} is no {_NAMES[encoding]} text; {_EXPECTED}, "
            "in UTF-8, UTF-16 with a byte order mark, or Windows-1252"
        ) from None


def _refuse_what_is_no_text(text: str, file: str) -> None:
    if not text.strip():
        raise SheetError(f"{file}: the file is empty; {_EXPECTED}")
    found = _NOT_TEXT.search(text)
    if found is None:
        return
    line = text.count("\n", 0, found.start()) + 1
    raise SheetError(
        f"{file}: this is no text (character {ord(found[0]):#04x} in line {line}); {_EXPECTED}, "
        "in UTF-8, UTF-16 with a byte order mark, or Windows-1252"
    )


def _refuse_long_lines(text: str, file: str) -> None:
    for number, line in enumerate(split_lines(text), 1):
        if len(line) > LONGEST_LINE:
            raise SheetError(
                f"{file}: line {number} has {len(line):,} characters; at most {LONGEST_LINE:,} are read"
            )


def _newline(text: str) -> str:
    pairs = text.count("\r\n")
    ends = {"\n": text.count("\n") - pairs, "\r\n": pairs, "\r": text.count("\r") - pairs}
    return max(ends, key=ends.__getitem__)
