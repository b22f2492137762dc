"""Encodings, line ends, and files that are no text: read right, written back byte by byte, or refused."""

import time
from pathlib import Path

import pytest

from calloutlint.errors import SheetError
from calloutlint.reading.encoding import LONGEST_LINE, Text, decode, encode, read_text_file, split_lines

SHEET = "units: mm\r\n\r\n1) ⌀6.6 +0.2 0 THRU\r\n"
UTF16 = "read as UTF-16 with a byte order mark"
WESTERN = "units: mm\n1) Ø6.6 ±0.2 THRU 90°\n"


@pytest.mark.parametrize(
    ("data", "encoding", "bom", "remark"),
    [
        (SHEET.encode(), "utf-8", b"", None),
        (SHEET.encode("utf-8-sig"), "utf-8", b"\xef\xbb\xbf", "read as UTF-8 with a byte order mark"),
        (SHEET.encode("utf-16"), "utf-16-le", b"\xff\xfe", UTF16),
        (
            b"\xfe\xff" + SHEET.encode("utf-16-be"),
            "utf-16-be",
            b"\xfe\xff",
            "read as UTF-16 with a byte order mark",
        ),
        (WESTERN.encode("cp1252"), "cp1252", b"", "read as Windows-1252"),
    ],
    ids=["utf-8", "utf-8 mark", "utf-16 little", "utf-16 big", "windows-1252"],
)
def test_an_encoding_is_told_and_written_back_byte_by_byte(
    data: bytes, encoding: str, bom: bytes, remark: str | None
) -> None:
    text = decode(data)
    assert (text.encoding, text.bom, text.remark) == (encoding, bom, remark)
    assert text.text == (WESTERN if encoding == "cp1252" else SHEET)
    assert encode(text) == data


@pytest.mark.parametrize(
    ("text", "newline"),
    [("a\nb\n", "\n"), ("a\r\nb\r\n", "\r\n"), ("a\rb\r", "\r"), ("a\r\nb\r\nc\n", "\r\n"), ("a", "\n")],
)
def test_the_usual_line_end_is_told_and_mixed_ones_are_kept(text: str, newline: str) -> None:
    read = decode(text.encode())
    assert read.newline == newline
    assert encode(read) == text.encode()


def test_only_line_ends_end_a_line() -> None:
    assert split_lines("a\x0bb\u2028c\x85d\r\ne\rf\ng") == ["a\x0bb\u2028c\x85d", "e", "f", "g"]


@pytest.mark.parametrize(
    ("data", "message"),
    [
        (b"", "x.txt: the file is empty; a callout sheet in plain text was expected"),
        (b" \r\n\t\n", "x.txt: the file is empty; a callout sheet in plain text was expected"),
        (b"\xef\xbb\xbf", "x.txt: the file is empty; a callout sheet in plain text was expected"),
        (b"%PDF-1.7\n", "x.txt: this is a PDF document; a callout sheet in plain text was expected"),
        (
            b"ok\n\x00\x01\x02",
            "x.txt: this is no text (character 0x00 in line 2); a callout sheet in plain text was expected, "
            "in UTF-8, UTF-16 with a byte order mark, or Windows-1252",
        ),
        (
            "1) ⌀5".encode("utf-16-le"),
            "x.txt: this is no text (character 0x00 in line 1); a callout sheet in plain text was expected, "
            "in UTF-8, UTF-16 with a byte order mark, or Windows-1252",
        ),
        (
            b"ab\x81",
            "x.txt: byte 3 is no Windows-1252 text; a callout sheet in plain text was expected, "
            "in UTF-8, UTF-16 with a byte order mark, or Windows-1252",
        ),
        (
            "1) ⌀5\n2) ⌀6\n".encode() + b"3) \xff\n",
            "x.txt: line 3 is not valid UTF-8, though the text before it is; save the sheet as UTF-8",
        ),
        (
            b"\xff\xfe\x00",
            "x.txt: byte 1 is no UTF-16 text; a callout sheet in plain text was expected, "
            "in UTF-8, UTF-16 with a byte order mark, or Windows-1252",
        ),
        (
            "1) 5".encode("utf-32"),
            "x.txt: the text is UTF-32; UTF-8, UTF-16 or Windows-1252 was expected",
        ),
        (
            b"a\n" + b"x" * (LONGEST_LINE + 1),
            "x.txt: line 2 has 20,001 characters; at most 20,000 are read",
        ),
    ],
)
def test_what_is_no_sheet_is_refused_with_one_message(data: bytes, message: str) -> None:
    with pytest.raises(SheetError) as error:
        decode(data, "x.txt")
    assert str(error.value) == message


def test_a_line_of_50_megabytes_is_refused_at_once() -> None:
    started = time.perf_counter()
    with pytest.raises(SheetError, match="line 1 has 50,000,000 characters"):
        decode(b"4" * 50_000_000)
    assert time.perf_counter() - started < 10


def test_a_symbol_the_encoding_lacks_is_refused() -> None:
    with pytest.raises(SheetError, match="'⌖' cannot be written in Windows-1252"):
        encode(Text("⌖ | .014", "cp1252"))


def test_a_missing_file_and_a_folder_are_refused(tmp_path: Path) -> None:
    with pytest.raises(SheetError, match=r"none\.txt: there is no such file"):
        read_text_file(tmp_path / "none.txt")
    with pytest.raises(SheetError, match="this is a folder; a file was expected"):
        read_text_file(tmp_path)


def test_a_file_that_may_not_be_read_is_refused(tmp_path: Path, monkeypatch: pytest.MonkeyPatch) -> None:
    def refuse(*_: object, **__: object) -> None:
        raise PermissionError(13, "Permission denied")

    monkeypatch.setattr(Path, "open", refuse)
    with pytest.raises(SheetError, match="may not be read; permission is denied"):
        read_text_file(tmp_path / "locked.txt")


def test_a_loop_of_links_is_refused(tmp_path: Path) -> None:
    (tmp_path / "a.txt").symlink_to(tmp_path / "b.txt")
    (tmp_path / "b.txt").symlink_to(tmp_path / "a.txt")
    with pytest.raises(SheetError, match=r"a\.txt: the file cannot be read"):
        read_text_file(tmp_path / "a.txt")
