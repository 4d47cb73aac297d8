"""The list of the tags in a folder or job: open one, begin a new one."""

from __future__ import annotations

from pathlib import Path
from typing import ClassVar

from textual.app import ComposeResult
from textual.binding import Binding, BindingType

from specsheet import job
from specsheet.tagfile.source import BOM, read_text
from specsheet.tagfile.syntax import parse
from specsheet.tui.commands import BROWSE
from specsheet.tui.compat import CalmScreen
from specsheet.tui.dialogs import Choice, Pick, Prompt, Tell, matching
from specsheet.tui.evaluator import Evaluator
from specsheet.tui.families import family_choices
from specsheet.tui.form_screen import FormScreen
from specsheet.tui.frame import footer
from specsheet.tui.lines import Bar, Line, Lines
from specsheet.tui.opening import new_session, open_session
from specsheet.tui.values import shown

_AT_ONCE = 20
_COLUMNS = (("tag", 16), ("service", 40), ("family", 24), ("status", 14))


class BrowseScreen(CalmScreen):
    """The tags of a folder."""

    BINDINGS: ClassVar[list[BindingType]] = [
        Binding(command.keys, command.action, command.title, show=False) for command in BROWSE
    ]

    def __init__(self, folder: Path, evaluator: Evaluator, *, trouble: str = "") -> None:
        super().__init__()
        self.folder = folder
        self.evaluator = evaluator
        self._trouble = trouble
        self._paths: tuple[Path, ...] = ()
        self._lines: list[Line] = []

    def compose(self) -> ComposeResult:
        """Lay out the frame and the list."""
        yield Bar(id="title")
        yield Bar(id="columns")
        yield Lines(id="tags")
        yield Bar(id="summary")
        yield Bar(id="foot")

    def on_mount(self) -> None:
        """Show the names at once; what stands in the files follows."""
        self.query_one("#title", Bar).set_line(((f" Tags in {self.folder}", "head"),))
        self.query_one("#foot", Bar).set_line(footer(BROWSE))
        heads = "".join(f"{key.capitalize():<{width}} " for key, width in _COLUMNS)
        self.query_one("#columns", Bar).set_line(((f" {heads}", "label"),))
        self.call_after_refresh(self.read)

    def on_screen_resume(self) -> None:
        """Look at the folder again: tags may have come and gone."""
        self.call_after_refresh(self.read)

    def read(self) -> None:
        """List the folder."""
        opened = job.open(self.folder)
        problem = str(opened.problems[0]) if opened.problems else ""
        self._paths = opened.paths
        self._lines = [((f" {path.name}", "text"),) for path in self._paths]
        self._show()
        count = len(self._paths)
        told = problem or f"{count} tag{'' if count == 1 else 's'}"
        if not count:
            told = f"{told}: no tag file in this folder; N begins one"
        self.say(told)
        self.query_one("#tags", Lines).focus()
        self._read_on(0)
        if self._trouble:
            self.app.push_screen(Tell("Not opened", [self._trouble]))
            self._trouble = ""

    def say(self, message: str) -> None:
        """Say something in the line above the keys."""
        self.query_one("#summary", Bar).set_line(((f" {message}", "accent"),))

    def _read_on(self, start: int) -> None:
        """Read the heads of some files and come back for the next: the keys go on working."""
        stop = min(start + _AT_ONCE, len(self._paths))
        for place in range(start, stop):
            self._lines[place] = head_line(self._paths[place])
        self._show()
        if stop < len(self._paths):
            self.set_timer(0.001, lambda: self._read_on(stop))

    def _show(self) -> None:
        self.query_one("#tags", Lines).set_content(self._lines, range(len(self._lines)))

    def on_lines_chosen(self, message: Lines.Chosen) -> None:
        """Open a tag."""
        self.open(self._paths[message.item])

    def open(self, path: Path) -> None:
        """Open a tag file, or say why it cannot be opened."""
        session = open_session(path)
        if isinstance(session, str):
            self.app.push_screen(Tell("Not opened", [session]))
        else:
            self.app.switch_screen(FormScreen(session, self.evaluator))

    def action_new(self) -> None:
        """Begin a new tag: its number, then its family."""

        def named(tag: str | None) -> None:
            if not tag:
                return
            path = self._place_of_new(tag)
            if path.exists():
                told = [f"{path} exists already. Open it, or take another number."]
                self.app.push_screen(Tell("Not begun", told))
                return

            def chosen(family: str | None) -> None:
                if family:
                    session = new_session(path, tag, family)
                    self.app.switch_screen(FormScreen(session, self.evaluator))

            self.app.push_screen(
                Pick("Meter family of the new tag", matching(family_choices())), chosen
            )

        self.app.push_screen(Prompt("Tag number of the new tag"), named)

    def _place_of_new(self, tag: str) -> Path:
        folder = self._paths[0].parent if self._paths else self.folder
        return folder / f"{job.file_stem(tag)}.toml"

    def action_read(self) -> None:
        """Look at the folder again."""
        self.read()

    def action_keys(self) -> None:
        """List the keys."""
        told = [f"{c.key_text}: {c.title}. {c.help}".strip() for c in BROWSE]
        told.append("Arrows, Home, End, J, K, G: move in the list.")
        self.app.push_screen(Tell("Keys", told))

    def action_palette(self) -> None:
        """Choose a command by its words."""

        async def chosen(value: str | None) -> None:
            if value:
                await self.run_action(value)

        choices = [Choice(c.action, f"{c.title}   {c.key_text}", c.help) for c in BROWSE]
        self.app.push_screen(Pick("Commands", matching(choices)), chosen)

    def action_find(self) -> None:
        """Find a tag by anything in its line."""

        def chosen(value: str | None) -> None:
            if value:
                self.open(self._paths[int(value)])

        choices = [
            Choice(str(place), "".join(text for text, _ in line).strip())
            for place, line in enumerate(self._lines)
        ]
        self.app.push_screen(Pick("Open a tag", matching(choices)), chosen)

    def action_open_here(self) -> None:
        """Open the tag under the cursor."""
        self.query_one("#tags", Lines).action_choose()

    def action_quit(self) -> None:
        """Quit."""
        self.app.exit(0)


def head_line(path: Path) -> Line:
    """Return the line of one file: what it says of itself, or that it cannot be read."""
    text = read_text(path)
    if not isinstance(text, str):
        return ((f" {path.name:<16} ", "text"), ("cannot be read", "stop"))
    data = parse(text.removeprefix(BOM), str(path))
    if not isinstance(data, dict):
        return ((f" {path.name:<16} ", "text"), ("cannot be read as a tag file", "stop"))
    texts = [shown(data.get(key)) for key, _ in _COLUMNS]
    texts[0] = texts[0] or path.stem
    cut = [f"{text[:width]:<{width}} " for text, (_, width) in zip(texts, _COLUMNS, strict=True)]
    return ((f" {cut[0]}", "head"), ("".join(cut[1:]), "text"))
