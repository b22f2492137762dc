"""Keeps what is costly to build in a private folder of the user, from one run to the next.

What is kept is pickled: it is therefore read only from a folder that nobody else can write.
"""

import os
import pickle
import re
import stat
import sys
from collections.abc import Callable
from contextlib import suppress
from hashlib import sha256
from pathlib import Path
from typing import Any, TypeVar

from calloutlint import __version__

T = TypeVar("T")

KEPT = 24


def kept(make: Callable[[], T], *made_of: object) -> T:
    """What `make` gives, from an earlier run where this version has made it of the same before.

    `made_of` is everything that the outcome depends on, written out in full by `repr`.
    """
    path = _path(made_of)
    if path is None:
        return make()
    found: T | None = _load(path)
    if found is None:
        found = make()
        _save(path, found)
    return found


def compiled(pattern: str) -> re.Pattern[str]:
    """A pattern so long that to compile it takes longer than to read it back compiled."""
    return kept(lambda: re.compile(pattern), pattern)


def _path(made_of: object) -> Path | None:
    """Where to keep what is made of `made_of` by this version; None where there is no private folder."""
    folder = _private_folder()
    if folder is None:
        return None
    key = repr((made_of, __version__, sys.version))
    return folder / f"{sha256(key.encode()).hexdigest()}.tables"


def _load(path: Path) -> Any:
    """What the file keeps; None where there is none or it does not load, whatever is wrong."""
    with suppress(Exception), path.open("rb") as file:
        return pickle.load(file)
    return None


def _save(path: Path, made: object) -> None:
    """Keep what was made, whole or not at all; what cannot be kept is made again by the next run.

    What was written longest ago is thrown away, so that the folder does not grow from version to version.
    """
    import tempfile  # only a run that finds nothing kept pays for these

    from calloutlint._pickling import write

    with suppress(Exception):
        handle, unfinished = tempfile.mkstemp(dir=path.parent)
        with os.fdopen(handle, "wb") as file:
            write(made, file)
        Path(unfinished).replace(path)
        files = sorted(path.parent.glob("*.tables"), key=lambda file: file.stat().st_mtime, reverse=True)
        for old in files[KEPT:]:
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
