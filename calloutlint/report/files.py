"""Writes reports to files, whole or not at all."""

import os
import tempfile
from collections.abc import Callable
from contextlib import suppress
from pathlib import Path
from typing import TYPE_CHECKING

from calloutlint.errors import CalloutlintError

if TYPE_CHECKING:
    from calloutlint.review import Review


def check_report_path(path: Path) -> None:
    """Make sure that a report can be written to `path`, before any work is done.

    Raises:
        CalloutlintError: the suffix is of no report that can be written, or the folder does not take files.
    """
    if path.suffix.lower() not in _WRITERS:
        known = ", ".join(_WRITERS)
        given = f"'{path.suffix}'" if path.suffix else "none"
        raise CalloutlintError(
            f"No report can be written to '{path}': the suffix says which kind is wanted, and it has {given}. "
            f"What can be written now: {known}."
        )
    if path.is_dir():
        raise CalloutlintError(f"No report can be written to '{path}': there is a folder of that name.")
    if not path.parent.is_dir():
        raise CalloutlintError(f"No report can be written to '{path}': there is no folder '{path.parent}'.")


def write_report(path: Path, review: "Review") -> None:
    """Write the report of a review that the suffix of `path` asks for.

    Raises:
        CalloutlintError: the file cannot be written; what stood there before is left as it was.
    """
    write_whole(path, _WRITERS[path.suffix.lower()](review))


def write_whole(path: Path, text: str) -> None:
    """Write `text` to `path` as UTF-8 through a file beside it, so that a reader never sees half of it.

    Raises:
        CalloutlintError: the folder or the file does not let itself be written.
    """
    target = Path(os.path.realpath(path))
    try:
        if target.exists() and not os.access(target, os.W_OK):
            raise PermissionError(13, "the file is write-protected")
        _replace(target, text)
    except OSError as error:
        raise CalloutlintError(f"'{path}' cannot be written: {_reason(error, target.parent)}.") from error


def _replace(target: Path, text: str) -> None:
    mode = target.stat().st_mode & 0o777 if target.exists() else 0o666 & ~_umask()
    handle, name = tempfile.mkstemp(prefix=f".{target.name[:40]}.", dir=target.parent)
    try:
        with os.fdopen(handle, "w", encoding="utf-8", newline="\n") as stream:
            stream.write(text)
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


def _json(review: "Review") -> str:
    from calloutlint.report.record import record_text

    return record_text(review)


_WRITERS: dict[str, Callable[["Review"], str]] = {".json": _json}
