"""The look of the form: sections at the top, entries, and beside or below what they come to."""

from __future__ import annotations

import asyncio
from collections.abc import Mapping
from typing import TYPE_CHECKING

from textual.app import ComposeResult
from textual.widget import Widget

from specsheet.fields import SECTIONS
from specsheet.tui import form
from specsheet.tui.address import LISTS, Address
from specsheet.tui.commands import FORM
from specsheet.tui.compat import CalmScreen
from specsheet.tui.evaluator import Evaluator
from specsheet.tui.fields import ChoiceEditor, Editor, TextEditor
from specsheet.tui.frame import Frame, footer, scale
from specsheet.tui.late import late
from specsheet.tui.lines import Bar, Box, Column, Line, Lines, wrap
from specsheet.tui.pages import GridPage, Page, SectionPage, address_in
from specsheet.tui.session import Session

if TYPE_CHECKING:
    from specsheet.tui import protocol, readout
    from specsheet.tui.readout import Item
else:
    protocol = late("specsheet.tui.protocol")
    readout = late("specsheet.tui.readout")

PANES = ("findings", "derived", "ruler")

_NO_RULER = "The ruler appears as soon as one operating point can be derived."


class FormView(CalmScreen):
    """What the form shows and how the focus moves in it."""

    HORIZONTAL_BREAKPOINTS = [  # noqa: RUF012 (as Textual declares it)
        (0, "-tiny"),
        (60, "-narrow"),
        (110, "-wide"),
    ]
    VERTICAL_BREAKPOINTS = [  # noqa: RUF012
        (0, "-flat"),
        (16, "-low"),
        (36, "-high"),
    ]

    def __init__(self, session: Session, evaluator: Evaluator) -> None:
        super().__init__(classes=self._breakpoints())
        self.session = session
        self.evaluator = evaluator
        self.frame = Frame()
        self.section = "fluid" if session.get(Address("tag")) else ""
        self.pages: dict[str, Page] = {}
        self._last_editor: Editor | None = None
        self.shown_pane = "findings"
        self.found: tuple[Item, ...] = ()
        # Answers arrive while a page is being mounted: pages change one at a time.
        self._syncing = asyncio.Lock()

    def _breakpoints(self) -> str:
        """Return the classes of the present size: set later, they would style everything twice."""
        width, height = self.app.size
        across = self._get_breakpoint_classes(width, self.HORIZONTAL_BREAKPOINTS)
        return " ".join(across | self._get_breakpoint_classes(height, self.VERTICAL_BREAKPOINTS))

    def _new_page(self, section: str) -> Page:
        kind = GridPage if section in LISTS else SectionPage
        self.pages[section] = kind(section, self.session)
        return self.pages[section]

    def compose(self) -> ComposeResult:
        """Lay out the frame and the first page; the others come when they are first looked at."""
        yield Bar(id="title")
        yield Bar(id="scale")
        with Box(id="body"):
            with Box(id="left"):
                yield Box(self._new_page(self.section), id="pages")
                yield Column(((), ()), classes="detail")
            with Box(id="side"):
                yield Bar(id="derived-head")
                yield Lines(id="derived")
                yield Bar(id="findings-head")
                yield Lines(id="findings")
        with Box(id="below"):
            yield Bar(id="ruler-head")
            yield Lines(id="ruler")
        yield Bar(id="summary")
        yield Bar(id="foot")
        yield Bar(id="too-small")

    def on_mount(self) -> None:
        """Draw everything there is; what takes longer begins behind the drawing."""
        self.evaluator.listen(self.take)
        self.query_one("#foot", Bar).set_line(footer(FORM))
        told = "Too small: 60 x 16 is the least. Nothing is lost."
        self.query_one("#too-small", Bar).set_line(((told, "head"),))
        self.show_pane(self.shown_pane)
        self._draw_frame()
        self.call_after_refresh(self.begin)

    def begin(self) -> None:
        """Ask for the values."""
        self.frame.begun = True
        self.request()

    # What is shown

    @property
    def editors(self) -> list[Editor]:
        """Every editor that is mounted."""
        return [editor for page in self.pages.values() for editor in page.editors]

    @property
    def page(self) -> Page:
        """The page on the screen."""
        return self.pages[self.section]

    @property
    def editor(self) -> Editor | None:
        """The editor that has the focus, or had it before a pane took it."""
        focused = self.focused
        if isinstance(focused, TextEditor | ChoiceEditor):
            return focused
        return self._last_editor if self._last_editor in list(self.page.editors) else None

    async def open_section(self, section: str, address: Address | None = None) -> None:
        """Show a section with the focus on an address, or on its first editor."""
        async with self._syncing:
            if section not in self.pages:
                await self.query_one("#pages").mount(self._new_page(section))
            self.section = section
            for key, other in self.pages.items():
                other.display = key == section
            await self.page.sync(self.session, self.notes())
        target = self.page.editor(address) if address is not None else None
        first = next(iter(self.page.editors), None)
        chosen = target or first
        self.set_focus(chosen if isinstance(chosen, Widget) else None)
        self._draw_frame()
        if chosen is None:
            self._draw_detail()

    async def go_to(self, address: Address) -> None:
        """Show an address, wherever it stands."""
        await self.open_section(address.section, address)
        if self.page.editor(address) is None:
            self.page.everything = True
            await self.open_section(address.section, address)

    async def refresh_form(self) -> None:
        """Bring page, frame and panes up to date with the session."""
        async with self._syncing:
            if self.section in self.pages:
                await self.page.sync(self.session, self.notes())
        self._draw_frame()
        self._draw_detail()
        self._draw_panes()

    async def sync_pages(self) -> None:
        """Bring every page up to date, also those that are not on the screen."""
        async with self._syncing:
            for page in self.pages.values():
                await page.sync(self.session, self.notes())

    def request(self) -> None:
        """Ask for the values of the present text; the screen goes on at once."""
        text = self.session.text_to_derive()
        if text is None:
            self.frame.state = "cannot be derived until the refused entry is mended"
            self.frame.sheet = None
        else:
            self.frame.state = "deriving"
            self.evaluator.derive(text, str(self.session.path))
        self._draw_panes()

    def take(self, answer: protocol.Answer) -> None:
        """Show what the evaluator answered."""
        if isinstance(answer, protocol.Printed):
            self.say(f"printed {answer.target}")
        elif isinstance(answer, protocol.Failed) and answer.number in self.frame.prints:
            self.say(f"not printed: {answer.message}")
        elif isinstance(answer, protocol.Failed):
            self.frame.state = f"out of date: {answer.message}"
            self._draw_panes()
        elif isinstance(answer, protocol.Derived):
            self.frame.sheet, self.frame.troubles = answer.sheet, answer.troubles
            self.frame.state = ""
            self.call_later(self.refresh_form)

    def say(self, message: str) -> None:
        """Say something in the summary line until the next edit or move."""
        self.frame.message = message
        self._draw_frame()

    def notes(self) -> Mapping[Address, Item]:
        """Return the worst thing to say about each address."""
        found: dict[Address, Item] = {}
        for item in reversed(self._collect()):
            address = form.address_of(self.session, item.field) if item.field else None
            if address is not None:
                found[address] = item
        return found

    def _collect(self) -> tuple[Item, ...]:
        frame, refused = self.frame, self.session.refused
        if frame.sheet is None and not frame.troubles and not refused:
            self.found = ()  # as at first, when nothing of the readout is loaded
            return self.found
        texts = [
            readout.not_stored(str(address), self.session.name(address), told.reason)
            for address, told in refused.items()
        ]
        self.found = readout.items(frame.sheet, frame.troubles, texts, self._name_of_field)
        return self.found

    def _name_of_field(self, field: str) -> str:
        address = form.address_of(self.session, field) if field else None
        return field if address is None else self.session.name(address)

    def _draw_frame(self) -> None:
        session = self.session
        self.query_one("#title", Bar).set_line(*self.frame.title(session))
        self.query_one("#scale", Bar).set_line(scale(self.section, self.found))
        self.query_one("#summary", Bar).set_line(self.frame.summary(self.found))

    def _draw_detail(self) -> None:
        detail = self.query_one(".detail", Column)
        width = max(20, detail.size.width - 2)
        text, tone = self._detail()
        parts = wrap(text, width)[: 2 if self.has_class("-low") else 3]
        detail.set_lines([((f" {part}", tone),) for part in parts])

    def _detail(self) -> tuple[str, str]:
        editor = self.editor
        if editor is None:
            section = next(s for s in SECTIONS if s.key == self.section)
            return f"{section.title}: {section.help}", "dim"
        refused = self.session.refusal(address_in(editor))
        if refused:
            return refused, "stop"
        note = self.notes().get(address_in(editor))
        if note is not None:
            return note.message, note.tone
        entry = editor.row.entry
        example = f" For example: {form.example(entry)}" if entry.example else ""
        return f"{entry.label}. {entry.help}{example}", "dim"

    def _draw_panes(self) -> None:
        self._collect()
        for pane in PANES:
            self._draw_pane(pane)
        self._draw_frame()

    def _draw_pane(self, pane: str) -> None:
        lines = self.query_one(f"#{pane}", Lines)
        width = max(30, lines.size.width - 2)
        lines.set_content(*self._content(pane, width))
        title = {"findings": "Findings", "derived": "Derived", "ruler": "Range"}[pane]
        extra = self.frame.state
        if pane == "findings":
            extra = readout.counts(self.found) if self.found else ""
        elif pane == "derived" and not extra:
            extra = readout.LEGEND
        head = self.query_one(f"#{pane}-head", Bar)
        head.set_line(self.frame.rule(title, extra, head.size.width, lines.has_focus))

    def _content(self, pane: str, width: int) -> tuple[list[Line], list[int]]:
        """Return the lines of a pane, and the item of each where there are items."""
        sheet = self.frame.sheet
        if pane == "findings" and self.found:
            return readout.finding_lines(self.found, width)
        if pane == "derived" and sheet is not None:
            return readout.derived(sheet, width), []
        if pane == "ruler" and sheet is not None and sheet.ruler is not None:
            return readout.ruler_lines(sheet.ruler, width), []
        return [((_NO_RULER if pane == "ruler" else self.frame.quiet, "dim"),)], []

    def show_pane(self, pane: str) -> None:
        """Show a pane where only one has room. (A class on the screen would restyle all of it.)"""
        self.shown_pane = pane
        wide, low = self.has_class("-wide"), self.has_class("-low")
        for name in ("findings", "derived"):
            for part in (f"#{name}", f"#{name}-head"):
                self.query_one(part).display = wide or name == pane
        fits = not (self.has_class("-tiny") or self.has_class("-flat"))
        self.query_one("#side").display = fits and (wide or pane != "ruler")
        self.query_one("#below").display = fits and (pane == "ruler" or (wide and not low))
        self.call_after_refresh(self._draw_panes)

    # Events

    def on_descendant_focus(self) -> None:
        """Point at the row, tell about its entry."""
        focused = self.focused
        if isinstance(focused, TextEditor | ChoiceEditor):
            self._last_editor = focused
            self.frame.message = ""
            self.page.mark_here(focused)
            self._draw_detail()
            self._draw_frame()
        else:
            self._draw_panes()

    def on_resize(self) -> None:
        """Break all texts anew."""
        self.call_after_refresh(self._redraw)

    def _redraw(self) -> None:
        self._draw_detail()
        self.show_pane(self.shown_pane)
