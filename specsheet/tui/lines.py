"""Widgets that draw lines of text without a child widget a line, and never read markup."""

from __future__ import annotations

import textwrap
from collections.abc import Sequence
from typing import ClassVar

from rich.cells import cell_len, set_cell_size
from rich.segment import Segment
from rich.style import Style
from textual.binding import Binding, BindingType
from textual.geometry import Region, Size
from textual.message import Message
from textual.scroll_view import ScrollView
from textual.strip import Strip
from textual.widget import Widget

from specsheet.tui.glyphs import plain_ascii, printable, wants_ascii
from specsheet.tui.theme import INK, PLAIN_TONES, TONES

#: a piece of text with the name of its tone
Piece = tuple[str, str]
#: one line
Line = tuple[Piece, ...]

_ASCII = wants_ascii()


def safe(text: str) -> str:
    """Return a text that is harmless on one line, in ASCII where the terminal needs it."""
    text = printable(text)
    return plain_ascii(text) if _ASCII else text


def wrap(text: str, width: int) -> list[str]:
    """Return a text in lines of at most ``width`` cells; never no line."""
    return textwrap.wrap(text, max(10, width)) or [""]


def strip_of(
    pieces: Sequence[tuple[str, Style]],
    width: int,
    filler: Style,
) -> Strip:
    """Return pieces of text cut or filled to ``width`` cells."""
    segments: list[Segment] = []
    left = max(0, width)
    for text, style in pieces:
        text = safe(text)
        size = cell_len(text)
        if size > left:
            # A cut text shows that it is cut: the rest of a number would be another number.
            mark = safe("…")[:1] if left else ""
            text, size = set_cell_size(text, max(0, left - 1)) + mark, left
        if text:
            segments.append(Segment(text, style))
        left -= size
    if left:
        segments.append(Segment(" " * left, filler))
    return Strip(segments)


class Box(Widget, inherit_css=False):
    """A container that our style sheet alone lays out.

    The rules that the library gives to each of its containers would be read and applied for
    nothing; the other widgets here do without them for the same reason.
    """


class Toned(Widget, inherit_css=False):
    """A widget whose lines are pieces in named tones."""

    def toned(self, line: Line, width: int, *, ground: str = "") -> Strip:
        """Return a line drawn in its tones, on the ground of another tone where one is named."""
        tones = TONES if self.app.theme == INK else PLAIN_TONES
        base = self.rich_style
        if ground:
            base += tones[ground]
        pieces = [(text, base if ground else base + tones[tone]) for text, tone in line]
        return strip_of(pieces, width, base)


class Column(Toned):
    """A column of lines beside editors, one line a row; it does not take the focus."""

    def __init__(self, lines: Sequence[Line], *, classes: str = "") -> None:
        super().__init__(classes=classes)
        self._lines = list(lines)
        self.styles.height = max(1, len(self._lines))

    def set_line(self, row: int, line: Line) -> None:
        """Change one line; nothing is drawn when it did not change."""
        if self._lines[row] != line:
            self._lines[row] = line
            self.refresh(Region(0, row, self.size.width, 1))

    def set_lines(self, lines: Sequence[Line]) -> None:
        """Change all lines, and the height with them."""
        self._lines = list(lines)
        self.styles.height = max(1, len(self._lines))
        self.refresh()

    def render_line(self, y: int) -> Strip:
        """Draw one line."""
        line = self._lines[y] if y < len(self._lines) else ()
        return self.toned(line, self.size.width)


class Bar(Toned):
    """One line of the frame: title, scale of sections, summary, keys."""

    def __init__(self, *, id: str) -> None:
        super().__init__(id=id)
        self._left: Line = ()
        self._right: Line = ()

    def set_line(self, left: Line, right: Line = ()) -> None:
        """Change the line; nothing is drawn when it did not change."""
        if (left, right) != (self._left, self._right):
            self._left, self._right = left, right
            self.refresh()

    @property
    def text(self) -> str:
        """What the line says."""
        return "".join(text for text, _ in (*self._left, *self._right))

    def render_line(self, y: int) -> Strip:
        """Draw the line: the right part keeps its place, the left one is cut."""
        width = self.size.width
        if y:
            return Strip.blank(width, self.rich_style)
        right = min(width, sum(cell_len(safe(text)) for text, _ in self._right))
        left = self.toned(self._left, width - right)
        return Strip.join([left, self.toned(self._right, right)]) if right else left


class Lines(ScrollView, Toned, can_focus=True, inherit_css=False):
    """Lines to read and scroll; with items, a cursor goes over them and Enter chooses one."""

    BINDINGS: ClassVar[list[BindingType]] = [
        Binding("up,k", "step(-1)", show=False),
        Binding("down,j", "step(1)", show=False),
        Binding("pageup", "leap(-1)", show=False),
        Binding("pagedown", "leap(1)", show=False),
        Binding("home,g", "end(-1)", show=False),
        Binding("end,G", "end(1)", show=False),
        Binding("enter", "choose", show=False),
    ]

    class Chosen(Message):
        """An item was chosen with Enter."""

        def __init__(self, lines: Lines, item: int) -> None:
            super().__init__()
            self.lines = lines
            self.item = item

        @property
        def control(self) -> Lines:
            """The widget."""
            return self.lines

    def __init__(self, *, id: str) -> None:
        super().__init__(id=id)
        self._lines: list[Line] = []
        self._items: list[int] = []
        self._cursor = 0

    @property
    def cursor(self) -> int:
        """The item under the cursor."""
        return self._cursor

    def set_content(
        self, lines: Sequence[Line], items: Sequence[int] = (), *, cursor: int | None = None
    ) -> None:
        """Change what is shown.

        Args:
            lines: the lines.
            items: the item that each line belongs to, rising from 0, -1 for none; empty where
                there is nothing to choose.
            cursor: item to put the cursor on; by default it stays where it is.
        """
        place = self._cursor if cursor is None else cursor
        if (list(lines), list(items), place) == (self._lines, self._items, self._cursor):
            return
        self._lines, self._items = list(lines), list(items)
        self._cursor = max(0, min(place, self.item_count - 1))
        self.virtual_size = Size(self.size.width, len(self._lines))
        if cursor is not None:
            self.action_step(0)
        self.refresh()

    @property
    def item_count(self) -> int:
        """How many items can be chosen."""
        return max(self._items, default=-1) + 1

    @property
    def texts(self) -> tuple[str, ...]:
        """What the lines say."""
        return tuple("".join(text for text, _ in line) for line in self._lines)

    def action_step(self, step: int) -> None:
        """Move the cursor, or scroll where there is none."""
        if not self.item_count:
            self.scroll_relative(y=step, animate=False)
            return
        self._cursor = max(0, min(self.item_count - 1, self._cursor + step))
        first = self._items.index(self._cursor)
        size = self._items.count(self._cursor)
        self.scroll_to_region(Region(0, first, 1, size), animate=False)
        self.refresh()

    def cycle(self) -> None:
        """Put the cursor on the next item, after the last on the first."""
        if self.item_count:
            self._cursor = (self._cursor + 1) % self.item_count
            self.action_step(0)

    def action_leap(self, pages: int) -> None:
        """Scroll by a page."""
        self.scroll_relative(y=pages * max(1, self.size.height - 1), animate=False)

    def action_end(self, way: int) -> None:
        """Go to the first or the last line."""
        if self.item_count:
            self.action_step(way * self.item_count)
        elif way < 0:
            self.scroll_home(animate=False)
        else:
            self.scroll_end(animate=False)

    def action_choose(self) -> None:
        """Choose the item under the cursor."""
        if self.item_count:
            self.post_message(self.Chosen(self, self._cursor))

    def on_focus(self) -> None:
        """Show the cursor."""
        self.refresh()

    def on_blur(self) -> None:
        """Hide the cursor."""
        self.refresh()

    def render_line(self, y: int) -> Strip:
        """Draw one line, on another ground under the cursor."""
        row = y + round(self.scroll_offset.y)
        width = self.size.width
        if row >= len(self._lines):
            return Strip.blank(width, self.rich_style)
        active = self.has_focus or not self.can_focus
        here = bool(self._items) and self._items[row] == self._cursor and active
        return self.toned(self._lines[row], width, ground="here" if here else "")
