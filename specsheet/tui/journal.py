"""The journal: every committed edit on disk at once, so that no ending of the program loses it.

One file a session, one JSON line a commit. A session holds a lock on its file; a file that nobody
holds was left by a session that did not end in order, and is offered for recovery. A line is
handed to the operating system at once (it outlives the process, not a power cut within seconds).
"""

from __future__ import annotations

import contextlib
import hashlib
import os
import sys
from io import BufferedRandom, FileIO
from pathlib import Path

from specsheet.tui.history import State

SUFFIX = ".unsaved"


def digest(content: bytes) -> str:
    """Return the fingerprint by which a changed file is told."""
    return hashlib.sha256(content).hexdigest()


def state_folder() -> Path:
    """Return the user's folder for unsaved edits (XDG base directories; local data on Windows)."""
    root = os.environ.get("XDG_STATE_HOME") or os.environ.get("LOCALAPPDATA")
    base = Path(root) if root else Path.home() / ".local" / "state"
    return base / "specsheet" / "unsaved"


def places(path: Path) -> tuple[Path, ...]:
    """Folders where a journal of ``path`` may stand, the preferred one first."""
    return (state_folder(), path.parent)


def stem(path: Path) -> str:
    """Return how the name of each journal of ``path`` begins."""
    return "." + digest(os.fsencode(path.absolute()))[:16]


def take_lock(file: FileIO | BufferedRandom) -> bool:
    """Take the lock of an open journal; False when another session holds it.

    Windows keeps no lock here: every journal found there counts as left behind.
    """
    if sys.platform == "win32":
        return True
    import fcntl

    try:
        fcntl.flock(file, fcntl.LOCK_EX | fcntl.LOCK_NB)
    except OSError:
        return False
    return True


class Journal:
    """The journal of one session.

    Attributes:
        trouble: why edits cannot be journalled, in words for the user; "" when they are.
    """

    def __init__(self, path: Path) -> None:
        self.path = path
        self.trouble = ""
        self._file: FileIO | None = None
        self._name: Path | None = None
        self._closed = False

    @property
    def file(self) -> Path | None:
        """Where the journal stands; None while there is nothing in it."""
        return self._name

    def record(self, state: State, name: str, saved: str) -> None:
        """Write the state after a change; never raises for a full or read-only disk.

        Args:
            state: the present state.
            name: words for the change.
            saved: fingerprint of the tag file as it was last read or written, "" for a new file.
        """
        if self._closed:
            return
        import json  # the first screen does without

        line = json.dumps(
            {
                "path": str(self.path),
                "name": name,
                "saved": saved,
                "text": state.text,
                "refused": [[a.path, a.index, r.text, r.reason] for a, r in state.refused.items()],
            }
        )
        try:
            # A leading newline keeps this line apart from one that a full disk cut short.
            content = b"\n" + line.encode() + b"\n"
            if self._open().write(content) != len(content):
                raise OSError("the disk is full")
            self.trouble = ""
        except OSError as error:
            reason = error.strerror or str(error)
            self.trouble = f"edits are kept in memory only: no journal can be written ({reason})"

    def clear(self) -> None:
        """Forget everything: the edits are saved, or given up on purpose."""
        if self._file is not None:
            self._file.close()
        if self._name is not None:
            with contextlib.suppress(OSError):
                self._name.unlink()
        self._file = self._name = None

    def close(self) -> None:
        """Let go of the file without removing it; its edits will be offered at the next open."""
        if self._file is not None:
            self._file.close()
        self._file = None
        self._closed = True

    def _open(self) -> FileIO:
        if self._file is not None:
            return self._file
        trouble: OSError | None = None
        for folder in places(self.path):
            name = folder / f"{stem(self.path)}-{os.getpid()}-{id(self):x}{SUFFIX}"
            try:
                if folder == state_folder():
                    folder.mkdir(parents=True, exist_ok=True, mode=0o700)
                file = FileIO(name, "a")
            except OSError as error:
                trouble = error
                continue
            take_lock(file)
            self._file, self._name = file, name
            return file
        raise trouble or OSError("no folder for the journal")
