"""What is kept from one run to the next comes back as it was made, and never from a folder open to others."""

import re
from pathlib import Path

import pytest

from calloutlint import _saved
from calloutlint._grammar import load_grammar
from calloutlint.callouts.parse import FRAGMENTS

LINES = ("4X ⌀.281 +.007 -.002 ‹THRU›", "⌖ | ⌀.014 Ⓜ | A | B Ⓜ | C", ".250-20 UNC-2B ↧ .50")


@pytest.fixture(autouse=True)
def folder(tmp_path: Path, monkeypatch: pytest.MonkeyPatch) -> Path:
    """The private folder of this test, not yet made."""
    monkeypatch.setenv("XDG_CACHE_HOME", str(tmp_path))
    return tmp_path / "calloutlint"


def never() -> str:
    """Fails: what was kept ought to be read."""
    raise AssertionError("made a second time")


def test_what_was_made_is_read_back(folder: Path) -> None:
    assert _saved.kept(lambda: "made", "of this") == "made"
    assert _saved.kept(never, "of this") == "made"
    assert _saved.kept(lambda: "other", "of that") == "other"
    assert len(list(folder.iterdir())) == 2


def test_a_broken_file_is_made_again(folder: Path) -> None:
    _saved.kept(lambda: "made", "of this")
    next(folder.iterdir()).write_bytes(b"\x80\x05broken")
    assert _saved.kept(lambda: "again", "of this") == "again"


def test_a_folder_open_to_others_is_not_used(folder: Path) -> None:
    folder.mkdir(parents=True)
    folder.chmod(0o777)
    assert _saved.kept(lambda: "made", "of this") == "made"
    assert list(folder.iterdir()) == []


def test_only_the_latest_files_stay(folder: Path) -> None:
    for number in range(_saved.KEPT + 3):
        _saved.kept(lambda: "made", number)
    assert len(list(folder.iterdir())) == _saved.KEPT


def test_a_pattern_is_read_back_compiled(folder: Path, monkeypatch: pytest.MonkeyPatch) -> None:
    text = r"(?P<size>\d+|[A-Z]{2})(?i:mm)|(?<!x)⌀+?(?P<rest>.*)$"
    _saved.compiled(text)
    monkeypatch.setattr(re, "compile", lambda _: never())
    pattern = _saved.compiled(text)
    assert (pattern.pattern, pattern.groupindex) == (text, {"size": 1, "rest": 2})
    assert pattern.groups == 2
    assert [match.lastgroup for match in pattern.finditer("12MM ⌀⌀.5")] == ["size", "rest"]


def test_a_parser_read_back_reads_like_the_one_built(folder: Path) -> None:
    starts = ("line", "lower")
    built = load_grammar(FRAGMENTS, starts, maybe_placeholders=False)
    read = load_grammar(FRAGMENTS, starts, maybe_placeholders=False)
    assert read is not built
    assert [read.parse(line, start="line") for line in LINES] == [
        built.parse(line, start="line") for line in LINES
    ]
    assert len(list(folder.iterdir())) == 1
