"""How the focus moves in the form: rows, columns, sections, panes, findings."""

from __future__ import annotations

from typing import ClassVar

from textual.binding import Binding, BindingType

from specsheet.fields import SECTIONS
from specsheet.tui import form
from specsheet.tui.commands import FORM
from specsheet.tui.fields import ChoiceEditor, Editor, TextEditor
from specsheet.tui.form_view import PANES, FormView
from specsheet.tui.lines import Lines
from specsheet.tui.pages import GridPage

_MOVES = (
    ("enter,down", "go(1)"),
    ("up", "go(-1)"),
    ("tab", "along(1)"),
    ("shift+tab", "along(-1)"),
)


def _bindings() -> list[BindingType]:
    moves: list[BindingType] = [
        Binding(keys, action, show=False, priority=True) for keys, action in _MOVES
    ]
    commands = [
        Binding(command.keys, command.action, command.title, show=False, priority=command.moves)
        for command in FORM
    ]
    return [*moves, *commands, Binding("escape", "to_form", show=False)]


class FormFocus(FormView):
    """The part of the form that moves the focus."""

    BINDINGS: ClassVar[list[BindingType]] = _bindings()

    def check_action(
        self,
        action: str,
        parameters: tuple[object, ...],  # noqa: ARG002 (the signature is Textual's)
    ) -> bool | None:
        """Leave the keys of movement to whatever is no editor."""
        editing = isinstance(self.focused, TextEditor | ChoiceEditor)
        if action in ("go", "along"):
            return editing
        if action == "section":
            return editing or self.focused is None
        return True

    def action_go(self, step: int) -> None:
        """Go to the next row, or the one before; at the end stay."""
        order = [e for e in self.page.editors if self.editor and e.index == self.editor.index]
        self._focus_next(order, step)

    def action_along(self, step: int) -> None:
        """Go to the next editor: along the points in a grid, else the next row."""
        editor = self.editor
        if isinstance(self.page, GridPage) and editor is not None:
            target = self.page.next_along(editor, step)
            self.set_focus(target or editor)
        else:
            self._focus_next(list(self.page.editors), step)

    def action_across(self, step: int) -> None:
        """Go to the same entry of the next operating point."""
        if isinstance(self.page, GridPage) and self.editor is not None:
            self.set_focus(self.page.beside(self.editor, step) or self.editor)

    def _focus_next(self, order: list[Editor], step: int) -> None:
        if self.editor in order:
            place = order.index(self.editor) + step
            self.set_focus(order[max(0, min(len(order) - 1, place))])

    async def action_section(self, step: int) -> None:
        """Go to the next section, or the one before."""
        keys = [section.key for section in SECTIONS]
        await self.open_section(keys[(keys.index(self.section) + step) % len(keys)])

    def action_pane(self, step: int) -> None:
        """Move the focus round form and panes."""
        ring = ("form", *PANES)
        here = self.focused.id if isinstance(self.focused, Lines) else "form"
        pane = ring[(ring.index(here or "form") + step) % len(ring)]
        if pane == "form":
            self.set_focus(self.editor or next(iter(self.page.editors), None))
        else:
            self.show_pane(pane)
            self.query_one(f"#{pane}", Lines).focus()

    def action_side(self) -> None:
        """Show the next pane below the form, without leaving the field."""
        place = PANES.index(self.shown_pane)
        self.show_pane(PANES[(place + 1) % len(PANES)])

    async def action_next_finding(self) -> None:
        """Go to the entry of the next finding, round the list."""
        lines = self.query_one("#findings", Lines)
        for _ in self.found:
            lines.cycle()
            address = form.address_of(self.session, self.found[lines.cursor].field)
            if address is not None:
                await self.go_to(address)
                self.say(self.found[lines.cursor].message)
                return
        self.say("no finding points at an entry")

    async def on_lines_chosen(self, message: Lines.Chosen) -> None:
        """Go to the entry that a finding is about."""
        item = self.found[message.item]
        address = form.address_of(self.session, item.field) if item.field else None
        if address is None:
            self.say("this finding is about no single entry")
        else:
            await self.go_to(address)
