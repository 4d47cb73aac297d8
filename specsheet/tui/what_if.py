"""What if an entry held another value: a panel that shows it and leaves no trace.

The value goes to the worker with the question and nowhere else: neither into the file nor into the
session, its journal or its undo.
"""

from __future__ import annotations

import re
from collections.abc import Callable

from textual.app import ComposeResult
from textual.containers import Vertical
from textual.screen import ModalScreen

from specsheet.tui.dialogs import DialogField
from specsheet.tui.lines import Bar, Line, Lines, wrap

_RANGE = re.compile(r"\s+(?:to|\.\.)\s+")
_MARK = "WHAT IF - nothing here is written to the file"
_TONES = {"comes": "caution", "goes": "good", "now": "text"}


def ends(text: str) -> tuple[str, str]:
    """Return first and last value of "80 m3/h to 200 m3/h"; the last is "" for one value."""
    first, *rest = _RANGE.split(text.strip(), maxsplit=1)
    return first, rest[0] if rest else ""


class WhatIf(ModalScreen[None]):
    """A value tried for one entry."""

    CSS_PATH = "dialogs.tcss"

    def __init__(self, name: str, present: str, ask: Callable[[str, str], int]) -> None:
        """Make the panel.

        Args:
            name: words for the entry.
            present: its present value.
            ask: asks for one value, or for several from first to last; returns a number.
        """
        super().__init__()
        self._name = name
        self._present = present
        self._ask = ask
        self._asked = 0
        self._field = DialogField(present)
        self._lines = Lines(id="dialog-lines")

    def compose(self) -> ComposeResult:
        """Lay out mark, title, field, result and keys."""
        with Vertical(classes="dialog -tall -broad"):
            yield Bar(id="dialog-mark")
            yield Bar(id="dialog-title")
            yield self._field
            yield self._lines
            yield Bar(id="dialog-keys")

    def on_mount(self) -> None:
        """Write mark, title and keys."""
        self.query_one("#dialog-mark", Bar).set_line(((_MARK, "caution"),))
        title = f"{self._name} (now {self._present or 'not stated'})"
        self.query_one("#dialog-title", Bar).set_line(((title, "head"),))
        keys = 'Enter tries a value, or "80 m3/h to 200 m3/h"; arrows scroll, Esc leaves no trace'
        self.query_one("#dialog-keys", Bar).set_line(((keys, "dim"),))
        self._lines.can_focus = False
        self._field.focus()

    def action_accept(self) -> None:
        """Ask for what the field holds."""
        first, last = ends(self._field.value)
        if first:
            self._asked = self._ask(first, last)
            self._lines.set_content([((f"trying {self._field.value}", "dim"),)], ())

    def action_leave(self) -> None:
        """Go back."""
        self.dismiss(None)

    def action_step(self, step: int) -> None:
        """Scroll the result."""
        self._lines.action_step(step)

    def refuse(self, number: int, reason: str) -> None:
        """Say in full why a value cannot be tried."""
        room = self._lines.size.width - 1
        self.show(number, tuple(wrap(f"cannot be tried: {reason}", room)))

    def show(self, number: int, lines: tuple[str, ...]) -> None:
        """Show an answer, unless another question was asked since."""
        if number != self._asked:
            return
        content: list[Line] = [((line, _TONES.get(line[:6].strip(), "text")),) for line in lines]
        self._lines.set_content(content, range(len(content)), cursor=0)
