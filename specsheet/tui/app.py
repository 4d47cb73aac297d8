"""The application round the screens: theme, signals, the worker's end."""

from __future__ import annotations

import asyncio
import gc
import signal
import sys
from collections.abc import Callable
from pathlib import Path
from typing import ClassVar

from textual.app import App
from textual.binding import Binding, BindingType
from textual.driver import Driver
from textual.reactive import Reactive
from textual.screen import Screen
from textual.theme import Theme

from specsheet.tui.compat import make_switchable, wants_no_colour
from specsheet.tui.evaluator import Evaluator, WorkerEvaluator
from specsheet.tui.start import first_screen
from specsheet.tui.theme import INK, THEME

#: signals that end the program; the terminal is put back and edits stay in the journal
_SIGNALS = ("SIGTERM", "SIGHUP")

#: the library's theme of the terminal's own colours
_NO_COLOUR = "ansi-dark"


class FormApp(App[int], inherit_bindings=False, inherit_css=False):
    """The form in a terminal."""

    CSS_PATH = "look.tcss"
    ENABLE_COMMAND_PALETTE = False
    TITLE = "specsheet"
    BINDINGS: ClassVar[list[BindingType]] = [
        Binding("ctrl+c", "how_to_quit", show=False),
    ]

    # The theme of the class and not one set later: that would read all style sheets twice.
    theme: Reactive[str] = Reactive(lambda: _NO_COLOUR if wants_no_colour() else INK)

    def __init__(self, path: Path, evaluator: Evaluator | None = None) -> None:
        """Make the application.

        Args:
            path: a tag file, or the folder of a job or of tags.
            evaluator: what derives; by default a worker process.
        """
        super().__init__(driver_class=_driver_class(), ansi_color=wants_no_colour())
        self.path = path
        self.evaluator: Evaluator = WorkerEvaluator() if evaluator is None else evaluator
        self.register_theme(THEME)

    def get_theme(self, theme_name: str) -> Theme | None:
        """Return a theme; ours is known before it can be registered."""
        return THEME if theme_name == INK else super().get_theme(theme_name)

    def get_default_screen(self) -> Screen[object]:
        """Return the screen that is drawn first: what was asked for, with nothing before it."""
        screen = first_screen(self.path, self.evaluator)
        make_switchable(self, screen)
        return screen

    def on_mount(self) -> None:
        """Take the signals; look for garbage again once the first screen is drawn."""
        self.call_after_refresh(_collect_garbage)
        self.app_resume_signal.subscribe(self, self._on_resume)
        if sys.platform != "win32":
            loop = asyncio.get_running_loop()
            for name in _SIGNALS:
                number = getattr(signal, name)
                loop.add_signal_handler(number, self._on_signal(number))

    def _on_resume(self, _: object) -> None:
        """Draw the whole screen again: what was on the terminal meanwhile is not known."""
        self.screen.refresh(layout=True)

    async def on_unmount(self) -> None:
        """End the worker."""
        await self.evaluator.close()

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


def _driver_class() -> type[Driver] | None:
    """Return the driver of this system's terminals; None for the library's own."""
    if sys.platform == "win32":
        return None
    from specsheet.tui.driver import TerminalDriver

    return TerminalDriver


def _collect_garbage() -> None:
    """Collect garbage from now on, without what the start has made: that stays to the end."""
    gc.freeze()
    gc.enable()
