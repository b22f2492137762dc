"""Writes reports to files, whole or not at all."""

from collections.abc import Callable
from pathlib import Path
from typing import TYPE_CHECKING

from calloutlint._whole import check_writable, write_whole
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
    check_writable(path)


def write_report(path: Path, review: "Review") -> None:
    """Write the report of a review that the suffix of `path` asks for.

    Raises:
        CalloutlintError: the file cannot be written; what stood there before is left as it was.
    """
    write_whole(path, _WRITERS[path.suffix.lower()](review).encode())


def _json(review: "Review") -> str:
    from calloutlint.report.record import record_text

    return record_text(review)


_WRITERS: dict[str, Callable[["Review"], str]] = {".json": _json}
