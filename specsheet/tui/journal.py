"""The journal: every committed edit on disk at once, so that no ending of the program loses it.

One file a session, one JSON line a commit. A session holds a lock on its file; a file that nobody
holds was left by a session that did not end in order, and is offered for recovery. A line is
handed to the operating system at once (it outlives the process, not a power cut within seconds).
"""

from __future__ import annotations

import contextlib
import hashlib
import json
import os
import sys
from dataclasses import dataclass
from io import BufferedRandom, FileIO
from pathlib import Path

from specsheet.tui.address import Address
from specsheet.tui.history import Refused, State

_SUFFIX = ".unsaved"


def digest(content: bytes) -> str:
    """Return the fingerprint by which a changed file is told."""
    return hashlib.sha256(content).hexdigest()


def state_folder() -> Path:
    """Return the user's folder for unsaved edits (XDG base directories; local data on Windows)."""
    root = os.environ.get("XDG_STATE_HOME") or os.environ.get("LOCALAPPDATA")
    base = Path(root) if root else Path.home() / ".local" / "state"
    return base / "specsheet" / "unsaved"


def _places(path: Path) -> tuple[Path, ...]:
    """Folders where a journal of ``path`` may stand, the preferred one first."""
    return (state_folder(), path.parent)


def _stem(path: Path) -> str:
    return "." + digest(os.fsencode(path.absolute()))[:16]


def _lock(file: FileIO | BufferedRandom) -> bool:
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

    def record(self, state: State, name: str, saved: str) -> None:
        """Write the state after a change; never raises for a full or read-only disk.

        Args:
            state: the present state.
            name: words for the change.
            saved: fingerprint of the tag file as it was last read or written, "" for a new file.
        """
        if self._closed:
            return
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
        for folder in _places(self.path):
            name = folder / f"{_stem(self.path)}-{os.getpid()}-{id(self):x}{_SUFFIX}"
            try:
                if folder == state_folder():
                    folder.mkdir(parents=True, exist_ok=True, mode=0o700)
                file = FileIO(name, "a")
            except OSError as error:
                trouble = error
                continue
            _lock(file)
            self._file, self._name = file, name
            return file
        raise trouble or OSError("no folder for the journal")


@dataclass(frozen=True)
class Leftover:
    """Unsaved edits that an earlier session left behind.

    Attributes:
        file: the journal.
        state: the last complete state in it.
        edits: how many edits it holds.
        name: words for the last one.
        saved: fingerprint of the tag file that the edits were made on, "" for a new file.
    """

    file: Path
    state: State
    edits: int
    name: str
    saved: str

    def discard(self) -> None:
        """Delete the journal: the edits are taken over, or not wanted."""
        with contextlib.suppress(OSError):
            self.file.unlink()


@dataclass(frozen=True)
class Survey:
    """What stands on disk about unsaved edits of one file.

    Attributes:
        leftovers: of sessions that ended out of order, newest first.
        busy: whether another session that still runs has unsaved edits of the file.
    """

    leftovers: tuple[Leftover, ...]
    busy: bool


def survey(path: Path) -> Survey:
    """Look for unsaved edits of ``path`` that other sessions hold or left."""
    found: list[tuple[float, Leftover]] = []
    busy = False
    for folder in _places(path):
        for name in folder.glob(f"{_stem(path)}-*{_SUFFIX}"):
            try:
                with name.open("r+b") as file:
                    if not _lock(file):
                        busy = True
                        continue
                    leftover = _read(name, file.read())
                    when = name.stat().st_mtime
            except OSError:
                continue
            if leftover is not None:
                found.append((when, leftover))
    found.sort(key=lambda pair: pair[0], reverse=True)
    return Survey(tuple(leftover for _, leftover in found), busy)


def _read(name: Path, content: bytes) -> Leftover | None:
    """Return the last complete line of a journal; a line cut short by a crash is passed over."""
    last = None
    edits = 0
    for line in content.splitlines():
        with contextlib.suppress(ValueError, KeyError, TypeError):
            raw = json.loads(line)
            refused = {Address(p, i): Refused(*told) for p, i, *told in raw["refused"]}
            last = Leftover(name, State(raw["text"], refused), 0, raw["name"], raw["saved"])
            edits += 1
    return None if last is None else Leftover(name, last.state, edits, last.name, last.saved)
