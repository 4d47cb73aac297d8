"""What stands in front of the form for a moment: questions, lists to choose from, texts to read.

Keys of a dialog with a field run inside the field, in the order typed: Enter takes what the field
holds at that moment.
"""

from __future__ import annotations

from collections.abc import Callable, Sequence
from dataclasses import dataclass
from typing import ClassVar

from textual import events
from textual.app import ComposeResult
from textual.binding import Binding, BindingType
from textual.containers import Vertical
from textual.screen import ModalScreen

from specsheet.tui.compat import Field
from specsheet.tui.lines import Bar, Line, Lines, wrap


@dataclass(frozen=True, slots=True)
class Choice:
    """One thing to choose.

    Attributes:
        value: what choosing it returns.
        label: words for it.
        detail: more about it, or "".
        key: letter that chooses it at once (questions only).
    """

    value: str
    label: str
    detail: str = ""
    key: str = ""


class Tell(ModalScreen[None]):
    """A text to read."""

    CSS_PATH = "dialogs.tcss"
    BINDINGS: ClassVar[list[BindingType]] = [
        Binding("escape,f1,f10,q,space", "close", show=False),
    ]

    def __init__(self, title: str, paragraphs: Sequence[str]) -> None:
        super().__init__()
        self._title = title
        self._paragraphs = paragraphs
        self._lines = Lines(id="dialog-lines")

    def compose(self) -> ComposeResult:
        """Lay out the title, the text and the keys."""
        with Vertical(classes="dialog"):
            yield Bar(id="dialog-title")
            yield self._lines
            yield Bar(id="dialog-keys")

    def on_mount(self) -> None:
        """Write the text."""
        self.query_one("#dialog-title", Bar).set_line(((self._title, "head"),))
        self.query_one("#dialog-keys", Bar).set_line((("Esc closes, arrows scroll", "dim"),))
        self._lines.focus()

    def on_resize(self) -> None:
        """Break the text anew."""
        self.call_after_refresh(self._fill)

    def _fill(self) -> None:
        width = self._lines.size.width - 1
        told = [part for text in self._paragraphs for part in wrap(text, width)]
        self._lines.set_content([((part, "text"),) for part in told])

    def action_close(self) -> None:
        """Go back."""
        self.dismiss(None)


class Ask(ModalScreen[str]):
    """A question with a few answers; Esc answers "" and changes nothing."""

    CSS_PATH = "dialogs.tcss"
    BINDINGS: ClassVar[list[BindingType]] = [Binding("escape", "answer('')", show=False)]

    def __init__(self, question: str, choices: Sequence[Choice]) -> None:
        super().__init__()
        self._question = question
        self._choices = choices
        self._lines = Lines(id="dialog-lines")

    def compose(self) -> ComposeResult:
        """Lay out the question, the answers and the keys."""
        with Vertical(classes="dialog"):
            yield Lines(id="dialog-question")
            yield self._lines
            yield Bar(id="dialog-keys")

    def on_mount(self) -> None:
        """Write question and answers."""
        self.query_one("#dialog-question", Lines).can_focus = False
        self._lines.set_content(
            [((f" {c.key} ", "accent"), (f" {c.label}", "text")) for c in self._choices],
            range(len(self._choices)),
        )
        self._lines.styles.height = len(self._choices)
        keys = "Letter or Enter answers, Esc goes back to where you were"
        self.query_one("#dialog-keys", Bar).set_line(((keys, "dim"),))
        self._lines.focus()

    def on_resize(self) -> None:
        """Break the question anew."""
        self.call_after_refresh(self._fill)

    def _fill(self) -> None:
        question = self.query_one("#dialog-question", Lines)
        told = wrap(self._question, question.size.width)
        question.styles.height = len(told) + 1
        question.set_content([((part, "head"),) for part in told])

    def on_key(self, event: events.Key) -> None:
        """Answer by letter."""
        for choice in self._choices:
            if choice.key and event.character == choice.key:
                event.stop()
                self.dismiss(choice.value)

    def on_lines_chosen(self, message: Lines.Chosen) -> None:
        """Answer by Enter."""
        self.dismiss(self._choices[message.item].value)

    def action_answer(self, value: str) -> None:
        """Answer."""
        self.dismiss(value)


class DialogField(Field):
    """The field of a dialog: Enter, Esc and the arrows belong to the dialog."""

    BINDINGS: ClassVar[list[BindingType]] = [
        Binding("enter", "screen.accept", show=False),
        Binding("escape", "screen.leave", show=False),
        Binding("down", "screen.step(1)", show=False),
        Binding("up", "screen.step(-1)", show=False),
        Binding("pagedown", "screen.step(10)", show=False),
        Binding("pageup", "screen.step(-10)", show=False),
    ]


class Prompt(ModalScreen[str]):
    """A question answered by a text; Esc answers ""."""

    CSS_PATH = "dialogs.tcss"

    def __init__(self, question: str, text: str = "") -> None:
        super().__init__()
        self._question = question
        self._field = DialogField(text)

    def compose(self) -> ComposeResult:
        """Lay out the question and the field."""
        with Vertical(classes="dialog"):
            yield Bar(id="dialog-title")
            yield self._field
            yield Bar(id="dialog-keys")

    def on_mount(self) -> None:
        """Write the question."""
        self.query_one("#dialog-title", Bar).set_line(((self._question, "head"),))
        self.query_one("#dialog-keys", Bar).set_line((("Enter accepts, Esc goes back", "dim"),))
        self._field.focus()

    def action_accept(self) -> None:
        """Answer with what the field holds."""
        self.dismiss(self._field.value.strip())

    def action_leave(self) -> None:
        """Answer nothing."""
        self.dismiss("")

    def action_step(self, step: int) -> None:
        """Nothing to step through."""


class Pick(ModalScreen[str]):
    """A list to choose from, narrowed down by typing; Esc chooses ""."""

    CSS_PATH = "dialogs.tcss"

    def __init__(
        self,
        title: str,
        find: Callable[[str], Sequence[Choice]],
        *,
        now: str = "",
        free: bool = False,
    ) -> None:
        """Make the list; ``found`` is what it holds for the text typed so far.

        Args:
            title: words above it.
            find: what the list holds for a text typed.
            now: the value chosen at present.
            free: whether a text that matches nothing may be chosen as it is.
        """
        super().__init__()
        self._title = title
        self._find = find
        self._now = now
        self._free = free
        self._field = DialogField("", placeholder="type to search")
        self._lines = Lines(id="dialog-lines")
        self.found: Sequence[Choice] = ()
        self._searched: str | None = None

    def compose(self) -> ComposeResult:
        """Lay out title, field and list."""
        with Vertical(classes="dialog -tall"):
            yield Bar(id="dialog-title")
            yield self._field
            yield self._lines
            yield Bar(id="dialog-keys")

    def on_mount(self) -> None:
        """Fill the list."""
        self.query_one("#dialog-title", Bar).set_line(((self._title, "head"),))
        keys = "Arrows move, Enter chooses, Esc goes back"
        self.query_one("#dialog-keys", Bar).set_line(((keys, "dim"),))
        self._lines.can_focus = False
        self._field.focus()

    def on_resize(self) -> None:
        """Break the details anew."""
        self._searched = None
        self.call_after_refresh(self._search)

    def on_input_changed(self) -> None:
        """Narrow the list down."""
        self._search()

    def action_step(self, step: int) -> None:
        """Move the cursor of the list."""
        self._search()
        self._lines.action_step(step)

    def action_accept(self) -> None:
        """Choose what stands under the cursor, of the list for the text as it is now."""
        self._search()
        if self.found:
            self.dismiss(self.found[self._lines.cursor].value)
        elif self._free:
            self.dismiss(self._field.value.strip())

    def action_leave(self) -> None:
        """Choose nothing."""
        self.dismiss("")

    def _search(self) -> None:
        text = self._field.value.strip()
        if text == self._searched:
            return
        self._searched = text
        self.found = self._find(text)
        lines: list[Line] = []
        owners: list[int] = []
        width = self._lines.size.width - 3
        for number, choice in enumerate(self.found):
            sign = "▸ " if choice.value == self._now else "  "
            told = [((sign, "accent"), (choice.label, "text"))]
            told += [(("    ", "dim"), (part, "dim")) for part in _details(choice, width)]
            lines += told
            owners += [number] * len(told)
        if not lines:
            lines = [(("  nothing matches", "dim"),)]
            owners = []
        self._lines.set_content(lines, owners, cursor=0 if text else self._place_of_now())

    def _place_of_now(self) -> int:
        return next((n for n, c in enumerate(self.found) if c.value == self._now), 0)


def _details(choice: Choice, width: int) -> list[str]:
    return wrap(choice.detail, width - 4) if choice.detail else []


def matching(choices: Sequence[Choice]) -> Callable[[str], Sequence[Choice]]:
    """Return a search over fixed choices: every word typed must stand in label or detail."""

    def find(text: str) -> Sequence[Choice]:
        words = text.casefold().split()
        return [
            choice
            for choice in choices
            if all(word in f"{choice.label} {choice.detail}".casefold() for word in words)
        ]

    return find
