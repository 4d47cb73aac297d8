"""Unsaved edits that other sessions of the same file hold or left behind."""

from __future__ import annotations

import contextlib
import json
from dataclasses import dataclass
from pathlib import Path

from specsheet.tui.address import Address
from specsheet.tui.history import Refused, State
from specsheet.tui.journal import SUFFIX, places, stem, take_lock


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


def survey(path: Path, own: Path | None = None) -> Survey:
    """Look for unsaved edits of ``path`` that other sessions hold or left.

    Args:
        path: the tag file.
        own: the journal of the session that asks, which is no other's.
    """
    found: list[tuple[float, Leftover]] = []
    busy = False
    for folder in places(path):
        for name in folder.glob(f"{stem(path)}-*{SUFFIX}"):
            if name == own:
                continue
            try:
                with name.open("r+b") as file:
                    if not take_lock(file):
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
