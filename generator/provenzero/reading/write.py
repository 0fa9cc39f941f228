"""Bytes to a file that is either the whole new one or the old one, never half of either."""

import errno
import os
from contextlib import suppress
from pathlib import Path
from typing import Final

from provenzero.finding import Finding, Place

_TRIES: Final = 100
_FULL: Final = frozenset({errno.ENOSPC, errno.EDQUOT})


def write_atomically(path: Path, content: bytes) -> Finding | None:
    """Write a file in one step; a finding if that could not be done, and then nothing has changed.

    The bytes go to a file beside the target, are forced to the disk, and take its name last. A target
    that is a link stays one: what it leads to is replaced.
    """
    part: Path | None = None
    try:
        target = Path(os.path.realpath(path))
        if target.is_dir():
            return _finding(path, "a folder of that name", "the path of a file")
        part = _part(target)
        with part.open("r+b") as stream:
            stream.write(content)
            stream.flush()
            os.fsync(stream.fileno())
        with suppress(OSError):
            part.chmod(target.stat().st_mode)
        part.replace(target)
    except (OSError, ValueError) as error:
        if part is not None:
            with suppress(OSError):
                part.unlink()
        return _reason(error, path, len(content))
    _force(target.parent)
    return None


def _part(target: Path) -> Path:
    """A new empty file in the folder of the target."""
    for count in range(_TRIES):
        part = target.parent / f".part-{os.getpid()}-{count}"
        with suppress(FileExistsError):
            part.touch(exist_ok=False)
            return part
    raise FileExistsError(errno.EEXIST, "too many unfinished files", str(target.parent))


def _force(folder: Path) -> None:
    """Force the folder's entry to the disk, where the system can do that."""
    with suppress(OSError):
        handle = os.open(folder, os.O_RDONLY)
        try:
            os.fsync(handle)
        finally:
            os.close(handle)


def _reason(error: OSError | ValueError, path: Path, size: int) -> Finding:
    folder = path.parent
    match error:
        case FileNotFoundError() | NotADirectoryError():
            return _finding(path, f"no folder {folder}", "a folder that exists")
        case PermissionError():
            return _finding(path, f"the folder {folder} closed to you", "a folder that you may write in")
        case OSError() if error.errno in _FULL:
            return _finding(path, "a full disk; nothing was written", f"room for {size} bytes in {folder}")
        case OSError() if error.errno == errno.EROFS:
            return _finding(path, f"the folder {folder} on a read-only disk", "a folder that can be written in")
        case OSError() if error.strerror:
            return _finding(path, f"a file that cannot be written ({error.strerror})", "another path")
        case _:
            return _finding(path, "a name that no file can have", "another path")


def _finding(path: Path, found: str, expected: str) -> Finding:
    return Finding(place=Place(file=str(path)), found=found, expected=expected)
