"""The two editors of the form: a line of text, and a choice."""

from __future__ import annotations

from typing import ClassVar

from textual import events
from textual.binding import Binding, BindingType
from textual.message import Message
from textual.strip import Strip
from textual.widget import Widget

from specsheet.tui.compat import Field, run_own_binding
from specsheet.tui.form import Row
from specsheet.tui.lines import Toned


class Committed(Message):
    """The text of an editor is final: the focus left it, or a choice was made."""

    def __init__(self, editor: Editor) -> None:
        super().__init__()
        self.editor = editor


class Editor(Widget):
    """What both editors share; ``committed`` is the text the session knows.

    Attributes:
        row: the row of the form.
        index: which operating point or revision, None outside the lists.
        value: the text shown.
        committed: the text last committed or loaded.
    """

    row: Row
    index: int | None
    committed: str
    value: str

    @property
    def changed(self) -> bool:
        """Whether something typed is not committed yet."""
        return self.value != self.committed

    def load(self, text: str) -> None:
        """Show a text that the session holds; what was typed and not committed goes."""
        self.committed = text
        if self.value != text:
            self.value = text

    def revert(self) -> None:
        """Go back to the committed text."""
        self.load(self.committed)

    def mark(self, refused: bool) -> None:
        """Show whether the text is refused."""
        self.set_class(refused, "-refused")


class TextEditor(Field, Editor):
    """A line of text."""

    BINDINGS: ClassVar[list[BindingType]] = [Binding("escape", "revert", show=False)]

    def __init__(self, row: Row, text: str, index: int | None = None) -> None:
        super().__init__(text)
        self.row = row
        self.index = index
        self.committed = text

    def action_revert(self) -> None:
        """Go back to the committed text."""
        self.revert()

    def on_blur(self) -> None:
        """Commit: the value includes every key typed before the focus moved."""
        self.cursor_position = 0  # a long text shows its beginning again
        if self.changed:
            self.post_message(Committed(self))


class ChoiceEditor(Toned, Editor, can_focus=True):
    """A value out of a few: left and right change it, space opens the list."""

    BINDINGS: ClassVar[list[BindingType]] = [
        Binding("right,plus", "cycle(1)", show=False),
        Binding("left,minus", "cycle(-1)", show=False),
        Binding("delete,backspace", "clear", show=False),
        Binding("space", "screen.choose", show=False),
        Binding("escape", "revert", show=False),
    ]

    def __init__(self, row: Row, text: str, index: int | None = None) -> None:
        super().__init__()
        self.row = row
        self.index = index
        self.value = self.committed = text

    def load(self, text: str) -> None:
        """Show a text that the session holds; a text that is no choice is shown as it is."""
        self.value = self.committed = text
        self.refresh()

    def action_cycle(self, step: int) -> None:
        """Go to the next choice, or the one before; the empty one is among them."""
        ring = ("", *self.row.choices)
        place = ring.index(self.value) if self.value in ring else 0
        self.value = ring[(place + step) % len(ring)]
        self.refresh()

    def action_revert(self) -> None:
        """Go back to the committed choice."""
        self.revert()

    def action_clear(self) -> None:
        """State nothing."""
        self.value = ""
        self.refresh()

    async def _on_key(self, event: events.Key) -> None:
        await run_own_binding(self, event)
        self._go_to_letter(event)

    def _go_to_letter(self, event: events.Key) -> None:
        """Go to the next choice that starts with the letter typed."""
        letter = (event.character or "").casefold()
        if event.is_printable is False or not letter.strip():
            return
        ring = self.row.choices
        start = ring.index(self.value) + 1 if self.value in ring else 0
        for choice in (*ring[start:], *ring[:start]):
            if choice.casefold().startswith(letter):
                self.value = choice
                self.refresh()
                return

    def on_blur(self) -> None:
        """Commit."""
        if self.changed:
            self.post_message(Committed(self))

    def render_line(self, y: int) -> Strip:
        """Draw the choice between two arrows, which show that it is one."""
        width = self.size.width
        if y:
            return Strip.blank(width, self.rich_style)
        value = self.toned((("< ", "dim"), (self.value, "own")), width - 2)
        return Strip.join([value, self.toned(((" >", "dim"),), 2)])
