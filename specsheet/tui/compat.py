"""Everything that is done against the grain of Textual 8.2.8, in one place; a test holds each.

* Keys that arrive together must land in the field they were typed for: a :class:`Field` runs its
  own bindings where it handles its characters, and the keys that move the focus are priority
  bindings of the screen (:class:`CalmScreen`).
* A key in a field must not lay the screen out again, nor a focus move repaint it.
* A field must not outlive its removal.
* The first screen can be switched for another.
* No text of the user is ever markup: :func:`plain` and :func:`show`.
"""

from __future__ import annotations

import os
from typing import Any, ClassVar

from textual import events
from textual.app import App
from textual.binding import Binding, BindingType
from textual.content import Content
from textual.geometry import Size
from textual.reactive import Reactive
from textual.screen import Screen
from textual.widget import Widget
from textual.widgets import Input, Static

from specsheet.tui.glyphs import printable

#: keys of Input that the form needs for itself
_TAKEN = {"ctrl+f", "enter"}


def _kept() -> list[BindingType]:
    """Return the bindings of Input, one key each, without the keys that the form needs."""
    return [
        Binding(key, binding.action, show=False)
        for binding in Input.BINDINGS
        if isinstance(binding, Binding)
        for key in binding.key.split(",")
        if key not in _TAKEN
    ]


def plain(text: str) -> Content:
    """Return ``text`` as content that Textual does not read as markup."""
    return Content(printable(text))


def show(widget: Static, text: str) -> None:
    """Change the text of a widget of fixed size, without laying the screen out again."""
    widget.update(plain(text), layout=False)


def wants_no_colour() -> bool:
    """Tell whether NO_COLOR is set and not empty, as its convention demands."""
    return bool(os.environ.get("NO_COLOR"))


async def run_own_binding(widget: Widget, event: events.Key) -> None:
    """Run the widget's own binding of a key here and now, in the order the keys were typed.

    Left to itself Textual sends the key up to the application first, which looks for bindings of
    whatever has the focus by then.
    """
    for binding in widget._bindings.key_to_bindings.get(event.key, ()):
        event.stop()
        event.prevent_default()
        await widget.run_action(binding.action)
        return


class Field(Input, inherit_bindings=False, inherit_css=False):
    """A one-line editor in one row, with its keys in the order in which they were typed."""

    COMPONENT_CLASSES: ClassVar[set[str]] = Input.COMPONENT_CLASSES  # gone with its style sheet
    BINDINGS: ClassVar[list[BindingType]] = _kept()

    # Input sets its virtual size at every key; with layout=True that lays out the whole screen.
    virtual_size = Reactive(Size(0, 0), layout=False)

    def __init__(self, value: str = "", *, placeholder: str = "") -> None:
        super().__init__(value, placeholder=placeholder, compact=True)

    async def _on_key(self, event: events.Key) -> None:
        # Textual goes on to Input._on_key by itself unless the default is prevented.
        if not event.is_printable:
            await run_own_binding(self, event)

    def on_unmount(self) -> None:
        """Let go of the signal that would keep a removed field alive."""
        self.screen.text_selection_started_signal.unsubscribe(self)


def make_switchable(app: App[Any], screen: Screen[Any]) -> None:
    """Let the first screen of an application be switched for another, as pushed screens can be."""
    screen._push_result_callback(app, None)


class CalmScreen(Screen[None], inherit_css=False):
    """A screen that does not repaint itself when the focus moves."""

    COMPONENT_CLASSES: ClassVar[set[str]] = Screen.COMPONENT_CLASSES  # gone with its style sheet

    focused: Reactive[Widget | None] = Reactive(None, repaint=False)
