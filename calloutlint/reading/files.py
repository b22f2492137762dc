"""Files and folders as they are on disk, with one clear message where they cannot be read."""

from pathlib import Path

from calloutlint.errors import SheetError

LARGEST_FILE = 256 * 1024 * 1024


def is_folder(path: Path) -> bool:
    """Whether `path` is a folder; False too where it cannot be looked at, which reading it then says."""
    try:
        return path.is_dir()
    except OSError:
        return False


def is_file(path: Path) -> bool:
    """Whether something that is no folder stands at `path`; False too where it cannot be looked at."""
    try:
        return path.exists() and not path.is_dir()
    except OSError:
        return False


def read_bytes(path: Path) -> bytes:
    """The bytes of a file; `SheetError` where it cannot be read or is larger than `LARGEST_FILE`."""
    if is_folder(path):
        raise SheetError(f"{path}: this is a folder; a file was expected")
    try:
        with path.open("rb") as stream:
            data = stream.read(LARGEST_FILE + 1)
    except FileNotFoundError:
        raise SheetError(f"{path}: there is no such file") from None
    except PermissionError:
        raise SheetError(f"{path}: the file may not be read; permission is denied") from None
    except OSError as error:
        raise SheetError(f"{path}: the file cannot be read: {error.strerror or error}") from None
    if len(data) > LARGEST_FILE:
        raise SheetError(f"{path}: the file is larger than {LARGEST_FILE // 2**20} MB; split it into sheets")
    return data
