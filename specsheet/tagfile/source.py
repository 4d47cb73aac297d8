"""A file on disk -> its text, or the one problem that prevents it."""

from __future__ import annotations

import os
import stat
from pathlib import Path

from specsheet.tagfile.problem import WHOLE_FILE, Problem

#: a tag file takes a few thousand bytes; anything above this is not one
LARGEST = 1_000_000

BOM = "\ufeff"
_WIDE_BOMS = {b"\xff\xfe": "UTF-16", b"\xfe\xff": "UTF-16"}


def read_text(path: str | Path) -> str | Problem:
    """Return the text of a file as it is, line ends and byte-order mark included.

    Never raises on what stands at ``path``: nothing, a directory, a device, a file that may not
    be read, is larger than :data:`LARGEST` bytes or is not UTF-8 gives a problem.
    """
    try:
        status = Path(path).stat()
        refusal = _refuse(status)
        if refusal:
            return Problem(str(path), 1, WHOLE_FILE, refusal)
        raw = Path(path).read_bytes()
    except FileNotFoundError:
        return Problem(str(path), 1, WHOLE_FILE, "there is no such file")
    except PermissionError:
        return Problem(str(path), 1, WHOLE_FILE, "may not be read; look at its permissions")
    except OSError as error:
        return Problem(str(path), 1, WHOLE_FILE, f"cannot be read: {error.strerror}")
    except ValueError as error:  # a NUL in the name
        return Problem(str(path), 1, WHOLE_FILE, f"is no name of a file: {error}")
    return _decode(raw, str(path))


def objection(text: str, path: str) -> Problem | None:
    """Return the problem that makes parsing ``text`` pointless, if there is one."""
    if len(text) > LARGEST:
        return Problem(path, 1, WHOLE_FILE, _too_large(len(text)))
    place = text.find("\0")
    if place >= 0:
        line = text.count("\n", 0, place) + 1
        message = f"a NUL byte at character {place}: this is no text file; restore it from a copy"
        return Problem(path, line, WHOLE_FILE, message)
    if not text.removeprefix(BOM).strip():
        message = 'the file is empty; "specsheet new TAG --family KEY" writes one to start from'
        return Problem(path, 1, WHOLE_FILE, message)
    return None


def _refuse(status: os.stat_result) -> str:
    if stat.S_ISDIR(status.st_mode):
        return "is a directory; a file was wanted"
    if not stat.S_ISREG(status.st_mode):
        return "is a device or pipe; a file was wanted"
    return _too_large(status.st_size) if status.st_size > LARGEST else ""


def _too_large(size: int) -> str:
    return (
        f"holds {size / 1e6:.1f} MB; at most {LARGEST / 1e6:.0f} MB is read, "
        "and a tag file takes a few thousand bytes: is it the right file?"
    )


def _decode(raw: bytes, path: str) -> str | Problem:
    wide = _WIDE_BOMS.get(raw[:2])
    if wide:
        message = f"is encoded as {wide}; UTF-8 was wanted: save it again as UTF-8"
        return Problem(path, 1, WHOLE_FILE, message)
    try:
        text = raw.decode("utf-8")
    except UnicodeDecodeError as error:
        line = raw.count(b"\n", 0, error.start) + 1
        message = (
            f"byte {error.start} (0x{raw[error.start]:02X}) is not UTF-8; open the file in the "
            "encoding it was written in and save it as UTF-8"
        )
        return Problem(path, line, WHOLE_FILE, message)
    return objection(text, path) or text
