"""Keeps what is costly to build in a private folder of the user, from one run to the next.

What is kept is pickled: it is therefore read only from a folder that nobody else can write.
"""

import os
import platform
import stat
import tempfile
from collections.abc import Callable
from contextlib import suppress
from hashlib import sha256
from pathlib import Path
from typing import IO, TypeVar

from calloutlint import __version__

T = TypeVar("T")

KEPT = 24


def saved_path(*made_of: object) -> Path | None:
    """Where to keep what is made of `made_of` by this version; None where there is no private folder."""
    folder = _private_folder()
    if folder is None:
        return None
    key = repr((made_of, __version__, platform.python_version()))
    return folder / f"{sha256(key.encode()).hexdigest()}.tables"


def load(path: Path, read: Callable[[IO[bytes]], T]) -> T | None:
    """What `read` makes of the file; None where there is none or it does not load, whatever is wrong."""
    with suppress(Exception), path.open("rb") as file:
        return read(file)
    return None


def save(path: Path, write: Callable[[IO[bytes]], object]) -> None:
    """Keep what `write` writes, whole or not at all; a folder that cannot be written is no error.

    What was written longest ago is thrown away, so that the folder does not grow from version to version.
    """
    with suppress(OSError):
        handle, unfinished = tempfile.mkstemp(dir=path.parent)
        with os.fdopen(handle, "wb") as file:
            write(file)
        Path(unfinished).replace(path)
        kept = sorted(path.parent.glob("*.tables"), key=lambda file: file.stat().st_mtime, reverse=True)
        for old in kept[KEPT:]:
            old.unlink()


def _private_folder() -> Path | None:
    """The folder, made if need be; None where it cannot be had or is open to others."""
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
