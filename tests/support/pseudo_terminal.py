"""A command in a terminal of its own, without anybody in front of it (POSIX)."""

from __future__ import annotations

import fcntl
import os
import pty
import select
import signal
import struct
import subprocess
import sys
import termios
import time
from collections.abc import Sequence
from pathlib import Path
from types import TracebackType

import psutil
from cli_process import environment


def _environment() -> dict[str, str]:
    """Return the environment of a terminal; a size told there would overrule the terminal's own."""
    made = environment(TERM="xterm-256color", TEXTUAL_ANIMATIONS="none")
    return {key: text for key, text in made.items() if key not in ("COLUMNS", "LINES")}


class Terminal:
    """The interpreter with arguments, in a pseudo-terminal; a context manager that ends it."""

    def __init__(
        self, arguments: Sequence[str], cwd: Path, size: tuple[int, int] = (120, 40)
    ) -> None:
        self._master, slave = pty.openpty()
        columns, rows = size
        fcntl.ioctl(slave, termios.TIOCSWINSZ, struct.pack("HHHH", rows, columns, 0, 0))
        self.started = time.perf_counter()
        self.seen = b""
        self._child = subprocess.Popen(
            [sys.executable, *arguments],
            cwd=cwd,
            stdin=slave,
            stdout=slave,
            stderr=slave,
            start_new_session=True,
            env=_environment(),
        )
        os.close(slave)

    def __enter__(self) -> Terminal:
        return self

    def __exit__(
        self,
        kind: type[BaseException] | None,
        error: BaseException | None,
        trace: TracebackType | None,
    ) -> None:
        if self._child.poll() is None:
            os.killpg(self._child.pid, signal.SIGKILL)
            self._child.wait()
        os.close(self._master)

    def until(self, marker: str, patience: float = 30.0) -> float:
        """Read until a text has been drawn; return the seconds since the start."""
        wanted = marker.encode()
        while wanted not in self.seen:
            left = self.started + patience - time.perf_counter()
            ready, _, _ = select.select([self._master], [], [], max(0.0, left))
            if not ready or not self._read():
                raise AssertionError(f"{marker!r} was not drawn; seen: {self.seen[-2000:]!r}")
        return time.perf_counter() - self.started

    def spent(self) -> float:
        """Return the processor time of the command so far [s], without that of its children."""
        used = psutil.Process(self._child.pid).cpu_times()
        return used.user + used.system

    def press(self, keys: bytes) -> None:
        """Send keys, and forget what was drawn before them."""
        self.seen = b""
        os.write(self._master, keys)

    def end(self, patience: float = 30.0) -> int:
        """Read until the program has ended; return its exit status."""
        limit = time.perf_counter() + patience
        while self._child.poll() is None and time.perf_counter() < limit:
            if select.select([self._master], [], [], 0.05)[0]:
                self._read()
        return self._child.wait(1.0)

    def _read(self) -> bool:
        try:
            got = os.read(self._master, 65536)
        except OSError:  # how Linux says that the other side has gone
            return False
        self.seen += got
        return bool(got)
