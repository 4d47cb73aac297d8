"""The application round the screens: theme, signals, the worker's end."""

from __future__ import annotations

import asyncio
import signal
import sys
from collections.abc import Callable
from pathlib import Path
from typing import ClassVar

from textual.app import App
from textual.binding import Binding, BindingType

from specsheet.tui.compat import wants_no_colour
from specsheet.tui.evaluator import Evaluator, WorkerEvaluator
from specsheet.tui.theme import INK, THEME
from specsheet.tui.waiting import WaitingScreen

#: signals that end the program; the terminal is put back and edits stay in the journal
_SIGNALS = ("SIGTERM", "SIGHUP")


class FormApp(App[int], inherit_bindings=False):
    """The form in a terminal."""

    CSS_PATH = "look.tcss"
    ENABLE_COMMAND_PALETTE = False
    TITLE = "specsheet"
    BINDINGS: ClassVar[list[BindingType]] = [
        Binding("ctrl+c", "how_to_quit", show=False),
    ]

    def __init__(self, path: Path, evaluator: Evaluator | None = None) -> None:
        """Make the application.

        Args:
            path: a tag file, or the folder of a job or of tags.
            evaluator: what derives; by default a worker process.
        """
        plain = wants_no_colour()
        super().__init__(ansi_color=plain)
        self.path = path
        self.evaluator: Evaluator = WorkerEvaluator() if evaluator is None else evaluator
        self.register_theme(THEME)
        self.theme = "ansi-dark" if plain else INK

    def on_mount(self) -> None:
        """Take the signals and draw the first screen; everything else is loaded behind it."""
        if sys.platform != "win32":
            loop = asyncio.get_running_loop()
            for name in _SIGNALS:
                number = getattr(signal, name)
                loop.add_signal_handler(number, self._on_signal(number))
        self.push_screen(WaitingScreen(self.path, self._open))

    async def on_unmount(self) -> None:
        """End the worker."""
        await self.evaluator.close()

    def _open(self) -> None:
        """Open what was asked for. The rooms below are imported here, behind the first screen."""
        from specsheet.tui.start import first_screen

        first_screen(self, self.path, self.evaluator)

    def _on_signal(self, number: int) -> Callable[[], object]:
        return lambda: self.call_later(self._end, 128 + number)

    async def _end(self, code: int) -> None:
        """Keep what is typed in the journal and leave."""
        from specsheet.tui.form_screen import FormScreen

        for screen in self.screen_stack:
            if isinstance(screen, FormScreen):
                await screen.keep()
        self.exit(code, return_code=code)

    def action_how_to_quit(self) -> None:
        """Say how to quit."""
        say: Callable[[str], None] | None = getattr(self.screen, "say", None)
        if say is not None:
            say("Ctrl+Q quits")
