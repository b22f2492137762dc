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
    target = Path(os.path.realpath(path))
    try:
        if target.exists() and not os.access(target, os.W_OK):
            raise PermissionError(13, "the file is write-protected")
        _replace(target, data)
    except OSError as error:
        raise CalloutlintError(f"'{path}' cannot be written: {_reason(error, target.parent)}.") from error


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


def _reason(error: OSError, folder: Path) -> str:
    if isinstance(error, PermissionError) and not os.access(folder, os.W_OK):
        return f"the folder '{folder}' takes no new files"
    reason = error.strerror or str(error)
    return reason[:1].lower() + reason[1:]
