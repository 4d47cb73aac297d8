"""The pages of the form: one a section, mounted once, kept, and brought up to date by difference.

A page never replaces an editor that still has its row, so that keys typed ahead reach the field
they were meant for.
"""

from __future__ import annotations

from collections.abc import Iterable, Mapping
from typing import TYPE_CHECKING

from textual.app import ComposeResult
from textual.containers import ScrollableContainer

from specsheet.tui import form
from specsheet.tui.address import Address
from specsheet.tui.fields import ChoiceEditor, Editor, TextEditor
from specsheet.tui.form import Row
from specsheet.tui.glyphs import LEVEL_LETTERS
from specsheet.tui.lines import Box, Column, Line
from specsheet.tui.session import Session

if TYPE_CHECKING:
    from specsheet.tui.readout import Item

_BAD = "✗"
_HERE = "▸"

_EMPTY = {
    "points": "No operating point yet: F2 adds one.",
    "revisions": "No revision yet: F2 adds one.",
    "meter": "Choose a meter family first: section Tag, entry Family, F4.",
}


def _editor(row: Row, session: Session, index: int | None) -> Editor:
    kind = ChoiceEditor if row.choices and not row.entry.words else TextEditor
    editor = kind(row, form.text_in(session, row, index), index)
    editor.set_class(bool(session.refusal(address_in(editor))), "-refused", update=False)
    return editor


class Page(ScrollableContainer, can_focus=False, inherit_css=False):
    """One section.

    Attributes:
        section: its key.
        everything: whether the entries that the fluid does not call for are shown as well.
    """

    def __init__(self, section: str, rows: tuple[Row, ...]) -> None:
        super().__init__(classes="page")
        self.section = section
        self.everything = False
        self._rows = rows
        self._here: str | None = None
        self._notes: Mapping[Address, Item] = {}
        self._labels = Column((), classes="labels")

    @property
    def editors(self) -> Iterable[Editor]:
        """All editors of the page, in the order of the screen."""
        raise NotImplementedError

    def editor(self, address: Address) -> Editor | None:
        """Return the editor of an address, or None when it is not on the page."""
        return next((e for e in self.editors if address_in(e) == address), None)

    def mark_here(self, editor: Editor | None) -> None:
        """Point at the row that has the focus."""
        here = None if editor is None else _key(editor.row)
        if here != self._here:
            self._here = here
            self._draw_labels()

    async def sync(self, session: Session, notes: Mapping[Address, Item]) -> None:
        """Bring the page up to date with the session and what is to say about its entries."""
        raise NotImplementedError

    def _kept(self) -> set[str]:
        """Paths of the rows that must stay although nothing calls for them: what is typed in."""
        return {e.row.entry.path for e in self.editors if e.has_focus or e.changed}

    def _load(self, session: Session) -> None:
        for editor in self.editors:
            text = form.text_in(session, editor.row, editor.index)
            if text != editor.committed:
                editor.load(text)
            editor.mark(bool(session.refusal(address_in(editor))))

    def _draw_labels(self) -> None:
        self.set_class(not self._rows, "-empty", update=self.is_attached)
        self._labels.set_lines([self._label(row) for row in self._rows] or [self._nothing()])

    def _nothing(self) -> Line:
        return ((f"  {_EMPTY.get(self.section, '')}", "dim"),)

    def _label(self, row: Row) -> Line:
        here = _HERE if _key(row) == self._here else " "
        return ((here, "accent"), self._sign(row), (row.label, "label"))

    def _sign(self, row: Row) -> tuple[str, str]:
        """Return the sign of the worst that is to say about a row."""
        if any(e.has_class("-refused") for e in self.editors if _key(e.row) == _key(row)):
            return (f"{_BAD} ", "stop")
        levels = [
            note.level for address, note in self._notes.items() if address.path == row.address.path
        ]
        worst = next((level for level in LEVEL_LETTERS if level in levels), None)
        return ("  ", "label") if worst is None else (f"{LEVEL_LETTERS[worst]} ", worst)


def address_in(editor: Editor) -> Address:
    """Return the address that an editor edits."""
    return Address(editor.row.address.path, editor.index)


def _key(row: Row) -> str:
    return f"{row.address.path}+" if row.adds else row.address.path


class SectionPage(Page):
    """A section whose entries stand one a row: label, editor, words beside it."""

    def __init__(self, section: str, session: Session) -> None:
        """Make the page with all its editors, so that it is drawn whole at once."""
        super().__init__(section, form.rows(session, section))
        self._editors = _new_editors(self._rows, session, None)
        self._fields = _stack(self._editors, "fields")
        self._status = Column([self._beside(session, row) for row in self._rows], classes="status")
        self._draw_labels()

    def compose(self) -> ComposeResult:
        """Lay out the three columns."""
        yield Box(self._labels, self._fields, self._status, classes="rows")

    @property
    def editors(self) -> Iterable[Editor]:
        """All editors of the page."""
        return self._editors.values()

    async def sync(self, session: Session, notes: Mapping[Address, Item]) -> None:
        """Bring the page up to date."""
        self._notes = notes
        self._rows = form.rows(session, self.section, everything=self.everything, keep=self._kept())
        self._editors = await _arrange(self._fields, self._editors, self._rows, session, None)
        self._load(session)
        self._draw_labels()
        self._status.set_lines([self._beside(session, row) for row in self._rows])

    def _beside(self, session: Session, row: Row) -> Line:
        refused = session.refusal(row.address)
        if refused:
            return ((f"{_BAD} {refused}", "stop"),)
        note = self._notes.get(row.address)
        if note is not None and not row.adds:
            return ((f"{note.letter} {note.message}", note.tone),)
        return ((form.beside(session, row), "dim"),)


class GridPage(Page):
    """A list section: one row an entry, one column an operating point or revision."""

    def __init__(self, section: str, session: Session) -> None:
        """Make the page with all its editors, so that it is drawn whole at once."""
        indices = range(len(session.items(section)))
        super().__init__(section, form.rows(session, section) if indices else ())
        self._cells = [_new_editors(self._rows, session, index) for index in indices]
        self._columns = [_stack(cells, "column") for cells in self._cells]
        self._grid = Box(*self._columns, classes="grid")
        self._draw_labels()

    def compose(self) -> ComposeResult:
        """Lay out the labels and the columns."""
        yield Box(self._labels, self._grid, classes="rows")

    @property
    def editors(self) -> Iterable[Editor]:
        """All editors, column by column."""
        return [editor for cells in self._cells for editor in cells.values()]

    def beside(self, editor: Editor, step: int) -> Editor | None:
        """Return the editor of the same entry in the next column, or in the one before."""
        if editor.index is None or not 0 <= editor.index + step < len(self._cells):
            return None
        return self._cells[editor.index + step].get(_key(editor.row))

    def next_along(self, editor: Editor, step: int) -> Editor | None:
        """Return the next editor along the rows: to the right, then the next row from the left."""
        order = [e for row in zip(*(c.values() for c in self._cells), strict=True) for e in row]
        place = order.index(editor) + step
        return order[place] if 0 <= place < len(order) else None

    async def sync(self, session: Session, notes: Mapping[Address, Item]) -> None:
        """Bring the grid up to date; columns come and go at the right end."""
        self._notes = notes
        count = len(session.items(self.section))
        self._rows = (
            form.rows(session, self.section, everything=self.everything, keep=self._kept())
            if count
            else ()
        )
        while len(self._columns) > count:
            self._cells.pop()
            await self._columns.pop().remove()
        for index in range(len(self._columns), count):
            self._columns.append(Box(classes="column"))
            self._cells.append({})
            await self._grid.mount(self._columns[index])
        for index, (column, cells) in enumerate(zip(self._columns, self._cells, strict=True)):
            self._cells[index] = await _arrange(column, cells, self._rows, session, index)
        self._load(session)
        self._draw_labels()


def _new_editors(rows: Iterable[Row], session: Session, index: int | None) -> dict[str, Editor]:
    return {_key(row): _editor(row, session, index) for row in rows}


def _stack(editors: Mapping[str, Editor], classes: str) -> Box:
    """Return editors one below the other."""
    stack = Box(*editors.values(), classes=classes)
    stack.styles.height = max(1, len(editors))
    return stack


async def _arrange(
    parent: Box,
    editors: dict[str, Editor],
    rows: Iterable[Row],
    session: Session,
    index: int | None,
) -> dict[str, Editor]:
    """Mount what is new and remove what has no row any more; return the editors in order."""
    wanted = {_key(row): row for row in rows}
    gone = [
        editor
        for key, editor in editors.items()
        if key not in wanted or wanted[key].choices != editor.row.choices
    ]
    for editor in gone:
        await editor.remove()
    found: dict[str, Editor] = {}
    fresh: list[Editor] = []
    place = 0
    for key, row in wanted.items():
        present = editors.get(key)
        if present is None or present in gone:
            present = _editor(row, session, index)
            fresh.append(present)
        elif fresh:
            await parent.mount_all(fresh, before=present)
            fresh = []
        present.row = row
        found[key] = present
        place += 1
    if fresh:
        await parent.mount_all(fresh)
    parent.styles.height = max(1, place)
    return found
