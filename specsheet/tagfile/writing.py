"""Files replaced whole or not at all."""

from __future__ import annotations

import contextlib
import errno
import os
import stat
import tempfile
from dataclasses import dataclass
from pathlib import Path

_REASONS = {
    errno.ENOSPC: "the disk is full; free some space and save again",
    errno.EDQUOT: "your quota of disk space is used up; free some space and save again",
    errno.EROFS: "the file system is read-only; save to another folder",
    errno.EACCES: "it may not be written; look at the permissions of the file and its folder",
    errno.EPERM: "it may not be written; look at the permissions of the file and its folder",
    errno.ENOENT: "its folder does not exist; make the folder first",
    errno.ENOTDIR: "what should be its folder is a file; choose another name",
    errno.ENAMETOOLONG: "its name is too long; choose a shorter one",
    errno.ELOOP: "its symbolic links lead in a circle; mend the links",
}


class SaveError(OSError):
    """A file could not be saved. What stood there before is untouched; the message says why."""


@dataclass(frozen=True, slots=True)
class Stamp:
    """What a file looked like at one moment; two stamps are equal while nobody has changed it."""

    modified: int
    size: int
    inode: int


def stamp(path: str | Path) -> Stamp | None:
    """Return the stamp of a file as it is now, None where there is none."""
    try:
        status = Path(path).stat()
    except (OSError, ValueError):
        return None
    return Stamp(status.st_mtime_ns, status.st_size, status.st_ino)


def save(path: str | Path, content: str | bytes, *, flush: bool = True) -> Stamp:
    """Replace a file by bytes, or by text (UTF-8, line ends as they are); return its stamp.

    The content is written beside the file, flushed to the disk and moved into its place, so that a
    reader sees the old file or the new one and a failure leaves the old one. A symbolic link stays
    one (its target is replaced) and the mode of the file is kept.

    Args:
        path: the file.
        content: what it is to hold.
        flush: False does not wait for the disk, for what can be made again after a power cut.

    Raises:
        SaveError: the file could not be saved; nothing has changed.
    """
    try:
        target = Path(os.path.realpath(path))
        mode = _mode(target)
        _replace(target, content if isinstance(content, bytes) else content.encode(), mode, flush)
    except SaveError:
        raise
    except OSError as error:
        reason = _REASONS.get(error.errno or 0, error.strerror or str(error))
        raise SaveError(f"{path} was not saved: {reason}") from error
    except ValueError as error:  # a NUL in the name, half a surrogate pair in the text
        raise SaveError(f"{path} was not saved: {error}") from error
    found = stamp(target)
    if found is None:
        raise SaveError(f"{path} was saved, and removed by somebody at once")
    return found


def _mode(target: Path) -> int:
    """Return the mode the file is to have; refuse what is no file."""
    try:
        status = target.stat()
    except FileNotFoundError:
        mask = os.umask(0)
        os.umask(mask)
        return 0o666 & ~mask
    if stat.S_ISDIR(status.st_mode):
        raise SaveError(f"{target} was not saved: it is a directory; choose the name of a file")
    if not stat.S_ISREG(status.st_mode):
        raise SaveError(f"{target} was not saved: it is a device or pipe; choose another name")
    if not os.access(target, os.W_OK):
        sealed = hasattr(os, "statvfs") and os.statvfs(target).f_flag & os.ST_RDONLY
        number = errno.EROFS if sealed else errno.EACCES
        raise OSError(number, os.strerror(number))
    return stat.S_IMODE(status.st_mode)


def _replace(target: Path, raw: bytes, mode: int, flush: bool) -> None:
    handle, name = tempfile.mkstemp(
        prefix=f".{target.name[:40]}.", suffix=".tmp", dir=target.parent
    )
    try:
        try:
            _write(handle, raw)
            os.fchmod(handle, mode)
            if flush:
                os.fsync(handle)
        finally:
            os.close(handle)
        Path(name).replace(target)
    except BaseException:
        with contextlib.suppress(OSError):
            Path(name).unlink()
        raise
    if flush:
        _flush_folder(target.parent)


def _write(handle: int, raw: bytes) -> None:
    view = memoryview(raw)
    while view:
        view = view[os.write(handle, view) :]


def _flush_folder(folder: Path) -> None:
    """Make the move itself last; some file systems cannot, and the file is in place already."""
    with contextlib.suppress(OSError):
        handle = os.open(folder, os.O_RDONLY)
        try:
            os.fsync(handle)
        finally:
            os.close(handle)
