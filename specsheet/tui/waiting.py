"""The first screen: the frame, drawn before anything else is loaded."""

from __future__ import annotations

from collections.abc import Callable
from pathlib import Path

from textual.app import ComposeResult

from specsheet.tui.compat import CalmScreen
from specsheet.tui.lines import Bar

#: time [s] in which the screen paints itself: its update timer runs 60 times a second
_PAINTED = 1 / 30


class WaitingScreen(CalmScreen):
    """What is opened, and that it is being opened."""

    def __init__(self, path: Path, go_on: Callable[[], None]) -> None:
        super().__init__()
        self._path = path
        self._go_on = go_on

    def compose(self) -> ComposeResult:
        """Lay out the first and the last lines of the frame."""
        yield Bar(id="title")
        yield Bar(id="summary")

    def on_mount(self) -> None:
        """Draw, and go on behind the drawing."""
        self.query_one("#title", Bar).set_line(((f" specsheet  {self._path}", "head"),))
        self.query_one("#summary", Bar).set_line(((" opening ...", "dim"),))
        self.call_after_refresh(self.set_timer, _PAINTED, self._go_on)
