"""What the form does to the tag: commit, undo, choose, add and remove."""

from __future__ import annotations

from collections.abc import Callable, Sequence
from datetime import date
from typing import TYPE_CHECKING

from specsheet import tagfile
from specsheet.fields import SECTIONS
from specsheet.tui import form
from specsheet.tui.address import LISTS, Address
from specsheet.tui.commands import EDITING, FORM
from specsheet.tui.fields import Committed, Editor
from specsheet.tui.form_focus import FormFocus
from specsheet.tui.late import late
from specsheet.tui.pages import GridPage, address_in
from specsheet.tui.session import COMPOSITION

if TYPE_CHECKING:
    from specsheet import job
    from specsheet.fluid import names
    from specsheet.tui import dialogs, families
else:
    job = late("specsheet.job")
    names = late("specsheet.fluid.names")
    dialogs = late("specsheet.tui.dialogs")
    families = late("specsheet.tui.families")

_SUBSTANCES = ("fluid.substance", COMPOSITION)


class FormEditing(FormFocus):
    """The part of the form that edits."""

    async def on_committed(self, message: Committed) -> None:
        """Take over what was typed in an editor."""
        await self.commit(message.editor)

    async def commit(self, editor: Editor) -> None:
        """Take over what stands in an editor; nothing happens where nothing changed."""
        if not editor.changed:
            return
        text = editor.value
        address = address_in(editor)
        if editor.row.adds:
            refused = self.session.add_component(text)
            editor.load(self.session.refused_component)
        else:
            refused = self.session.edit(address, text)
            editor.load(self.session.get(address))
        self.frame.message = f"not stored: {refused}" if refused else ""
        await self._changed()

    async def commit_all(self) -> None:
        """Take over whatever is typed and not committed, before something else is done."""
        for editor in self.editors:
            await self.commit(editor)

    async def _changed(self) -> None:
        if self.session.trouble:
            self.frame.message = self.session.trouble
        await self.refresh_form()
        self.request()

    def action_to_form(self) -> None:
        """Go back from a pane to the field."""
        self.set_focus(self.editor)

    async def action_undo(self) -> None:
        """Take back what is being typed, else the last committed edit."""
        if self.editor is not None and self.editor.changed:
            self.editor.revert()
            return
        await self.moved("undone", self.session.undo())

    async def action_redo(self) -> None:
        """Make the last undone edit again."""
        await self.commit_all()
        await self.moved("made again", self.session.redo())

    async def moved(self, verb: str, name: str) -> None:
        """Show the document after a step through its history, and say which."""
        self.frame.message = f"{verb}: {name}" if name else f"nothing to be {verb}"
        await self.sync_pages()
        await self._changed()

    # Lists to choose from

    def action_choose(self) -> None:
        """Open the list of what the entry can be."""
        editor = self.editor
        if editor is None:
            return
        row = editor.row
        if row.entry.path == "family":
            self._pick(editor, "Meter family", dialogs.matching(families.family_choices()))
        elif row.entry.path in _SUBSTANCES:
            self._pick(editor, row.entry.label, _substances, free=True)
        elif row.choices or row.entry.words:
            values = (*row.entry.words, *row.choices)
            choices = [dialogs.Choice(value, value) for value in values]
            self._pick(editor, row.entry.label, dialogs.matching(choices))
        else:
            self.say(f"{row.entry.label} is typed: there is no list to choose from")

    def _pick(
        self,
        editor: Editor,
        title: str,
        find: Callable[[str], Sequence[dialogs.Choice]],
        *,
        free: bool = False,
    ) -> None:
        async def chosen(value: str | None) -> None:
            if not value:
                return
            editor.value = f"{value} " if editor.row.adds else value
            editor.refresh()
            if not editor.row.adds:
                await self.commit(editor)

        self.app.push_screen(dialogs.Pick(title, find, now=editor.value, free=free), chosen)

    def action_find(self) -> None:
        """Find an entry of any section by its words, path or help."""

        async def chosen(value: str | None) -> None:
            if value:
                await self._go_to_path(value)

        choices = [
            dialogs.Choice(entry.path, f"{entry.label}   {entry.path}", entry.help)
            for section in SECTIONS
            for entry in form.entries_of(self.session, section.key)
        ]
        self.app.push_screen(dialogs.Pick("Find an entry", dialogs.matching(choices)), chosen)

    async def _go_to_path(self, path: str) -> None:
        index = 0 if path.split(".")[0] in LISTS else None
        await self.go_to(Address(path, index))

    def action_palette(self) -> None:
        """Choose a command by its words."""

        async def chosen(value: str | None) -> None:
            if value:
                await self.run_action(value)

        choices = [
            dialogs.Choice(command.action, f"{command.title}   {command.key_text}", command.help)
            for command in FORM
            if command.action != "palette"
        ]
        choices += [
            dialogs.Choice(
                f"open_section({section.key!r})", f"Open section {section.title}", section.help
            )
            for section in SECTIONS
        ]
        self.app.push_screen(dialogs.Pick("Commands", dialogs.matching(choices)), chosen)

    async def action_open_section(self, section: str) -> None:
        """Show a section."""
        await self.open_section(section)

    # Help

    def action_help_entry(self) -> None:
        """Explain the entry that has the focus."""
        editor = self.editor
        if editor is None:
            self.action_keys()
            return
        entry = editor.row.entry
        told = [entry.help, ""]
        told += [f"Needed: {entry.needed}"] if entry.needed else []
        told += [f"Example: {form.example(entry)}"] if entry.example else []
        told += [f"Choices: {', '.join(editor.row.choices)}"] if editor.row.choices else []
        told += [f"Or the words: {', '.join(entry.words)}"] if entry.words else []
        told += [f"Assumed when nothing is stated: {entry.default}"] if entry.default else []
        told += [f"In the file: {entry.path}"]
        refused = self.session.refusal(address_in(editor))
        told += ["", f"Refused: {refused}"] if refused else []
        note = self.notes().get(address_in(editor))
        told += ["", f"{note.letter}: {note.message}"] if note else []
        symbol = f" ({entry.symbol})" if entry.symbol else ""
        self.app.push_screen(dialogs.Tell(f"{entry.label}{symbol}", told))

    def action_keys(self) -> None:
        """List every key and say how the form works."""
        told = [
            "Every text is kept when the focus leaves its field, and written to a journal at once; "
            "Save writes the file. A text that cannot be read stays in its field, marked, and is "
            "left out of the file.",
            "Letters: S stop (do not buy this), C caution (somebody must decide), n note. "
            "Beside values: g given, a assumed, t typical; no letter: derived.",
            "",
        ]
        told += [f"{keys}: {does}" for keys, does in EDITING]
        told += [f"{command.key_text}: {command.title}. {command.help}".strip() for command in FORM]
        told += [
            "",
            "Ctrl+Z undoes an edit here and does not suspend the program. Where Esc comes late "
            "inside a terminal multiplexer, shorten its escape time.",
        ]
        self.app.push_screen(dialogs.Tell("Keys", told))

    # Rows and columns

    async def action_everything(self) -> None:
        """Show all entries of the section, or only those that the fluid calls for."""
        self.page.everything = not self.page.everything
        await self.refresh_form()
        shown = "all entries" if self.page.everything else "the usual entries"
        self.say(f"{shown} of this section are shown")

    async def action_add_item(self) -> None:
        """Add an operating point, or a revision in its section."""
        await self.commit_all()
        if self.section == "revisions":
            tag = tagfile.loads(self.session.text).tag
            mark = "A" if tag is None else job.next_mark(tag)
            await self._added("revisions", self.session.add_revision(mark, date.today()))
            return

        async def named(name: str | None) -> None:
            if name:
                await self._added("points", self.session.add_point(name))

        self.app.push_screen(
            dialogs.Prompt("Name of the new operating point", self._next_name()), named
        )

    def _next_name(self) -> str:
        taken = self.session.point_names()
        usual = ("minimum", "normal", "maximum")
        return next((name for name in usual if name not in taken), f"case {len(taken) + 1}")

    async def _added(self, section: str, refused: str) -> None:
        self.frame.message = refused
        await self.open_section(section)
        await self._changed()
        page = self.page
        if not refused and isinstance(page, GridPage):
            last = max((e.index or 0 for e in page.editors), default=0)
            column = [e for e in page.editors if e.index == last]
            self.set_focus(column[min(1, len(column) - 1)])

    async def action_remove_item(self) -> None:
        """Remove the operating point that has the focus; undo brings it back."""
        editor = self.editor
        if self.section != "points" or editor is None or editor.index is None:
            self.say("no operating point has the focus; revisions are history and stay")
            return
        name = self.session.point_names()[editor.index]
        refused = self.session.remove_point(editor.index)
        await self.sync_pages()
        await self._changed()
        self.say(refused or f"{name} removed; Ctrl+Z brings it back")
        if self.focused is None:
            self.set_focus(next(iter(self.page.editors), None))


def _substances(text: str) -> Sequence[dialogs.Choice]:
    """Return the substances found for a text."""
    return [
        dialogs.Choice(
            item.key, item.name, " ".join(word for word in (item.formula, item.cas) if word)
        )
        for item in names.search(text, 50)
    ]
