"""Loads a grammar from its fragments, and keeps the built parser in a private folder of the user.

Building the tables takes longer than everything else at start-up. They are saved with Lark's own
`save`, which pickles: the file is therefore read only from a folder that nobody else can write.
"""

import os
import platform
import stat
import tempfile
from collections.abc import Sequence
from contextlib import suppress
from hashlib import sha256
from pathlib import Path
from typing import Any

import lark
from lark import Lark

from calloutlint import __version__
from calloutlint._resources import read_text


def load_grammar(names: tuple[str, ...], start: Sequence[str], **options: Any) -> Lark:
    """The LALR parser for the fragments `grammar/<name>.lark`, joined in this order.

    `options` go to `Lark`; a transformer among them must be an instance of an importable class.
    """
    text = "\n".join(read_text("grammar", f"{name}.lark") for name in names)
    path = _saved_path(text, repr((start, sorted(options.items(), key=str))))
    if path is not None and (saved := _load(path)) is not None:
        return saved
    built = Lark(text, parser="lalr", lexer="contextual", start=list(start), **options)
    if path is not None:
        _save(built, path)
    return built


def _saved_path(text: str, options: str) -> Path | None:
    folder = _private_folder()
    if folder is None:
        return None
    plain_options = options.partition(" object at ")[0]
    made_of = (text, plain_options, __version__, lark.__version__, platform.python_version())
    return folder / f"{sha256(repr(made_of).encode()).hexdigest()}.tables"


def _private_folder() -> Path | None:
    """The cache folder, made if need be; None where it cannot be had or is open to others."""
    with suppress(OSError, RuntimeError):
        base = os.environ.get("XDG_CACHE_HOME") or Path.home() / ".cache"
        folder = Path(base) / "calloutlint"
        folder.mkdir(mode=0o700, parents=True, exist_ok=True)
        if folder.is_absolute() and _is_private(folder):
            return folder
    return None


def _is_private(folder: Path) -> bool:
    if not hasattr(os, "getuid"):
        return True
    status = folder.lstat()
    open_to_others = stat.S_IMODE(status.st_mode) & (stat.S_IWGRP | stat.S_IWOTH)
    return stat.S_ISDIR(status.st_mode) and status.st_uid == os.getuid() and not open_to_others


def _load(path: Path) -> Lark | None:
    """The saved parser; None where there is none or it does not load, whatever is wrong with the file."""
    with suppress(Exception), path.open("rb") as file:
        return Lark.load(file)
    return None


def _save(parser: Lark, path: Path) -> None:
    with suppress(OSError):
        handle, unfinished = tempfile.mkstemp(dir=path.parent)
        with os.fdopen(handle, "wb") as file:
            parser.save(file)
        os.replace(unfinished, path)
