"""Writes a file whole or not at all."""

import os
import tempfile
from contextlib import suppress
from pathlib import Path

from calloutlint.errors import CalloutlintError


def write_whole(path: Path, data: bytes) -> None:
    """Write `data` to `path` through a file beside it, so that a reader never sees half of it.

    The permissions of a file that stands there are kept, and a link is followed.

    Raises:
        CalloutlintError: it cannot be written; what stood there is left as it was.
    """
    check_writable(path)
    target = Path(os.path.realpath(path))
    try:
        _replace(target, data)
    except OSError as error:
        raise _unwritable(path, (error.strerror or str(error))) from error


def check_writable(path: Path) -> None:
    """Make sure, as far as can be told without writing, that a file can be written.

    Raises:
        CalloutlintError: the file is write-protected, or its folder takes no new files.
    """
    target = Path(os.path.realpath(path))
    if target.exists() and not os.access(target, os.W_OK):
        raise _unwritable(path, "the file is write-protected")
    if target.parent.is_dir() and not os.access(target.parent, os.W_OK | os.X_OK):
        raise _unwritable(path, f"the folder '{target.parent}' takes no new files")


def _replace(target: Path, data: bytes) -> None:
    mode = target.stat().st_mode & 0o777 if target.exists() else 0o666 & ~_umask()
    handle, name = tempfile.mkstemp(prefix=f".{target.name[:40]}.", dir=target.parent)
    try:
        with os.fdopen(handle, "wb") as stream:
            stream.write(data)
        Path(name).chmod(mode)
        Path(name).replace(target)
    except BaseException:
        with suppress(OSError):
            Path(name).unlink()
        raise


def _umask() -> int:
    mask = os.umask(0)
    os.umask(mask)
    return mask


def _unwritable(path: Path, reason: str) -> CalloutlintError:
    return CalloutlintError(f"'{path}' cannot be written: {reason[:1].lower()}{reason[1:]}.")
