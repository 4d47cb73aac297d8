"""Writing the tag file: what may stand in the way, and the words for it."""

from __future__ import annotations

from dataclasses import dataclass
from enum import Enum, auto
from pathlib import Path

from specsheet.tagfile.writing import SaveError, save
from specsheet.tui.journal import digest


class Conflict(Enum):
    """What stood in the way of writing a file."""

    NONE = auto()
    CHANGED = auto()  # on disk since it was read
    VANISHED = auto()  # from disk since it was read
    EXISTS = auto()  # under the name of a new file
    FAILED = auto()  # the operating system refused


@dataclass(frozen=True, slots=True)
class Outcome:
    """What came of saving.

    Attributes:
        conflict: what stood in the way; nothing was written unless it is NONE.
        message: words for the user.
        digest: fingerprint of what was written.
    """

    conflict: Conflict
    message: str
    digest: str = ""


def write(path: Path, text: str, expected: str | None) -> Outcome:
    """Write ``text``, if what stands on disk is what the edits were made on.

    Args:
        path: the file.
        text: what to write.
        expected: fingerprint of the file as it should stand on disk, "" where no file should
            stand there, None to write whatever stands there.
    """
    try:
        present = digest(path.read_bytes())
    except FileNotFoundError:
        present = ""
    except OSError as error:
        return _failed(f"{path} could not be read: {error.strerror or error}")
    if expected is not None and present != expected:
        return _conflict(path, present, expected)
    try:
        save(path, text)
    except SaveError as error:
        return _failed(str(error))
    return Outcome(Conflict.NONE, f"saved {path.name}", digest(text.encode()))


def _conflict(path: Path, present: str, expected: str) -> Outcome:
    if not expected:
        message = f"{path.name} exists already; nothing was written. Choose another name."
        return Outcome(Conflict.EXISTS, message)
    if not present:
        message = f"{path.name} is no longer on disk; it was removed or renamed since it was read."
        return Outcome(Conflict.VANISHED, message)
    message = f"{path.name} was changed on disk by somebody else since it was read."
    return Outcome(Conflict.CHANGED, message)


def _failed(reason: str) -> Outcome:
    return Outcome(
        Conflict.FAILED,
        f"{reason}. Your edits are kept: mend the cause and save again, or save elsewhere.",
    )
