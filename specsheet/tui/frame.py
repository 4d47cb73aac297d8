"""The frame round the form: title, scale of sections, summary, keys. Plain text, no widgets."""

from __future__ import annotations

from collections.abc import Sequence
from typing import TYPE_CHECKING

from specsheet.fields import SECTIONS
from specsheet.tui import form
from specsheet.tui.address import Address
from specsheet.tui.commands import Command
from specsheet.tui.glyphs import LEVEL_LETTERS
from specsheet.tui.late import late
from specsheet.tui.lines import Line
from specsheet.tui.session import Session

if TYPE_CHECKING:
    from specsheet.sheet.model import Sheet
    from specsheet.tui import readout
    from specsheet.tui.protocol import Trouble
    from specsheet.tui.readout import Item
else:
    readout = late("specsheet.tui.readout")


class Frame:
    """What the screen knows besides the session.

    Attributes:
        message: what was said last, "" when the next edit or move took it away.
        state: why the values shown are not those of the present text, "" when they are.
        sheet: the last sheet derived.
        troubles: entries that the last reading could not use.
        prints: numbers of the requests to print.
        begun: whether the first screen is drawn; the title of the family, for which its profile
            must be read, comes after it.
    """

    def __init__(self) -> None:
        self.message = ""
        self.state = "deriving"
        self.sheet: Sheet | None = None
        self.troubles: tuple[Trouble, ...] = ()
        self.prints: set[int] = set()
        self.begun = False

    @property
    def quiet(self) -> str:
        """What an empty pane says."""
        if self.state:
            return f"{self.state[:1].upper()}{self.state[1:]}."
        return "Nothing to say." if self.sheet else "Nothing could be derived: see the findings."

    def title(self, session: Session) -> tuple[Line, Line]:
        """Return the first line: which tag, and whether it is saved."""
        left = [(f" {session.get(Address('tag')) or session.path.name}", "head")]
        family = form.family_title(session.get(Address("family"))) if self.begun else ""
        told = (session.get(Address("service")), family, session.get(Address("status")))
        left += [(f"  {text}", "label") for text in told if text]
        words = []
        if session.refused:
            words.append(f"{len(session.refused)} refused")
        if session.is_new:
            words.append("new file")
        words.append("not saved" if session.dirty else "saved")
        tone = "caution" if session.dirty or session.is_new else "good"
        return tuple(left), ((f" {', '.join(words)} ", tone),)

    def summary(self, items: Sequence[Item]) -> Line:
        """Return the line above the keys: what was said last, else the state of the tag."""
        if self.message:
            return ((f" {self.message}", "accent"),)
        worst = readout.worst(items) if items else None
        letter = " " if worst is None else LEVEL_LETTERS[worst]
        tone = "good" if worst is None else worst.value
        text = readout.summary(self.sheet, items) if not self.state else f"{self.state} ..."
        return ((f" {letter} ", tone), (text, "text"))

    def rule(self, title: str, extra: str, width: int, here: bool) -> Line:
        """Return the head line of a pane, drawn as a piece of scale."""
        words = f" {title} "
        tail = f" {extra} " if extra else ""
        rest = max(0, width - len(words) - len(tail) - 3)
        tone = "accent" if here else "dim"
        return (("┴─", tone), (words, "head"), ("─" * rest, tone), (tail, "dim"), ("┴", tone))


def scale(section: str, items: Sequence[Item]) -> Line:
    """Return the sections as a scale, the open one marked, the worst finding beside each."""
    pieces: list[tuple[str, str]] = []
    for item in SECTIONS:
        worst = _worst_in(item.key, items)
        sign = f" {LEVEL_LETTERS[worst]}" if worst is not None else ""
        pieces.append((" ", "dim") if not pieces else ("╷", "dim"))
        here = item.key == section
        words = f"▸{form.short_title(item)}" if here else f" {form.short_title(item)}"
        pieces.append((words, "here" if here else "label"))
        if worst is not None:
            pieces.append((sign, worst))
        pieces.append((" ", "dim"))
    return tuple(pieces)


def _worst_in(section: str, items: Sequence[Item]) -> str | None:
    levels = {i.level for i in items if i.field and form.section_of(i.field) == section}
    return next((level for level in ("stop", "caution") if level in levels), None)


def footer(commands: Sequence[Command]) -> Line:
    """Return the keys worth a place in the footer."""
    pieces: list[tuple[str, str]] = []
    for command in commands:
        if command.foot:
            pieces += [(f" {command.foot_key}", "accent"), (f" {command.foot} ", "dim")]
    return tuple(pieces)
