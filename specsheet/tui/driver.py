"""The driver of a POSIX terminal: it outlives the terminal, and takes it back whole after a stop.

Against the grain of Textual 8.2.8, as :mod:`specsheet.tui.compat`:

* Its writing thread ends at the first error, and the program then waits for it for ever. The
  window of a form can be closed, or its connection lost, at any time: what is drawn after that
  goes nowhere, and the program ends by the hang-up signal.
* It takes the terminal again at every SIGCONT. The system sends one with a hang-up, to a program
  that never gave its terminal back.
"""

from __future__ import annotations

from contextlib import suppress
from typing import Any

from textual.drivers.linux_driver import LinuxDriver


class Outlet:
    """A file to write to for as long as somebody reads it."""

    def __init__(self, file: Any) -> None:
        self._file = file

    def write(self, text: str) -> None:
        """Write a text, or drop it where the terminal has gone."""
        with suppress(OSError):
            self._file.write(text)

    def flush(self) -> None:
        """Send what was written, or drop it."""
        with suppress(OSError):
            self._file.flush()


class TerminalDriver(LinuxDriver):
    """A terminal that may go away, or be given back for a while."""

    def __init__(self, *arguments: Any, **options: Any) -> None:
        """Make the driver, as Textual does."""
        super().__init__(*arguments, **options)
        self._file: Any = Outlet(self._file)

    def _sigcont_application(self, *_: object) -> None:
        if self._must_signal_resume:
            super()._sigcont_application()
