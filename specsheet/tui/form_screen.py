"""The form of one tag: what it does with files, and nothing lost on the way."""

from __future__ import annotations

from collections.abc import Callable
from pathlib import Path
from typing import TYPE_CHECKING

from specsheet.tagfile.problem import Problem
from specsheet.tagfile.source import read_text
from specsheet.tagfile.syntax import parse
from specsheet.tui.evaluator import Evaluator
from specsheet.tui.form_asking import FormAsking
from specsheet.tui.late import late
from specsheet.tui.session import Session

if TYPE_CHECKING:
    from specsheet.tui import answers, dialogs, leftovers, saving
else:
    answers = late("specsheet.tui.answers")
    dialogs = late("specsheet.tui.dialogs")
    leftovers = late("specsheet.tui.leftovers")
    saving = late("specsheet.tui.saving")

#: folder that printed sheets go into, below the folder the program was started in
OUTPUT = "output"


class FormScreen(FormAsking):
    """One tag."""

    def __init__(self, session: Session, evaluator: Evaluator) -> None:
        """Make the screen of a session."""
        super().__init__(session, evaluator)
        self._leftovers: list[
            leftovers.Leftover
        ] = []  # unsaved edits of earlier sessions, newest first

    def begin(self) -> None:
        """Ask for the values, then offer what earlier sessions left behind."""
        super().begin()
        found = leftovers.survey(self.session.path, self.session.journal)
        if found.busy:
            name = self.session.path.name
            self.say(f"{name} has unsaved edits in another window: the later save is asked about")
        self._leftovers = list(found.leftovers)
        self._offer()

    def _offer(self) -> None:
        if not self._leftovers:
            return
        leftover = self._leftovers.pop(0)

        async def answered(value: str | None) -> None:
            if value == "recover":
                self.session.recover(leftover)
                await self.moved("recovered", leftover.name)
                return
            if value == "discard":
                leftover.discard()
            self._offer()

        self.app.push_screen(dialogs.Ask(self._left_behind(leftover), answers.RECOVERING), answered)

    def _left_behind(self, leftover: leftovers.Leftover) -> str:
        same = leftover.saved == self.session.saved
        other = "" if same else " The file on disk has changed since then."
        return (
            f"An earlier session ended before its edits of {self.session.path.name} were saved "
            f"(edits: {leftover.edits}, the last one: {leftover.name}).{other}"
        )

    async def action_save(self) -> None:
        """Save, or ask what to do where somebody changed the file."""
        await self.commit_all()
        if not self.session.dirty and not self.session.is_new:
            self.say("nothing to save")
            return
        await self._after_save(self.session.save())

    def action_save_as(self) -> None:
        """Save under another name and go on with that file."""

        async def named(name: str | None) -> None:
            if name:
                await self.commit_all()
                await self._after_save(self.session.save_as(_resolved(self.session.path, name)))

        self.app.push_screen(dialogs.Prompt("Save under the name", str(self.session.path)), named)

    async def _after_save(self, outcome: saving.Outcome) -> None:
        if outcome.conflict is saving.Conflict.NONE:
            left = len(self.session.refused)
            kept = f"; {left} refused kept here, not in the file" if left else ""
            await self.refresh_form()
            self.say(f"{outcome.message}{kept}")
        elif outcome.conflict in (saving.Conflict.CHANGED, saving.Conflict.VANISHED):
            self._ask_conflict(outcome)
        else:
            self.app.push_screen(dialogs.Tell("Not saved", [outcome.message]))

    def _ask_conflict(self, outcome: saving.Outcome) -> None:
        async def answered(value: str | None) -> None:
            if value == "overwrite":
                await self._after_save(self.session.save(force=True))
            elif value == "reload":
                await self._reload()
            elif value == "elsewhere":
                self.action_save_as()

        gone = outcome.conflict is saving.Conflict.VANISHED
        choices = answers.saving_over(gone)
        self.app.push_screen(
            dialogs.Ask(f"{outcome.message} What shall be done?", choices), answered
        )

    async def _reload(self) -> None:
        text = read_text(self.session.path)
        data = text if isinstance(text, Problem) else parse(text, str(self.session.path))
        if isinstance(text, Problem) or isinstance(data, Problem):
            self.app.push_screen(dialogs.Tell("Not loaded", [str(data), "Your edits are kept."]))
            return
        self.session.reload(text, self.session.path.read_bytes())
        await self.moved("taken from disk", self.session.path.name)

    async def action_print(self) -> None:
        """Print what is on the screen, saved or not, refused entries left out."""
        await self.commit_all()
        text = self.session.text_to_derive()
        if text is None:
            self.say("not printed: mend the refused entry first")
            return
        folder = str(Path.cwd() / OUTPUT)
        self.frame.prints.add(self.evaluator.print(text, str(self.session.path), folder))
        left = f", {len(self.session.refused)} refused left out" if self.session.refused else ""
        self.say(f"printing into {OUTPUT}{left} ...")

    async def action_back(self) -> None:
        """Go back to the list of tags."""
        await self._leave(self._to_list)

    async def action_quit(self) -> None:
        """Quit; ask where something is not saved."""
        await self._leave(lambda: self.app.exit(0))

    async def keep(self) -> None:
        """Put what is typed into the journal and end the session."""
        await self.commit_all()
        self.session.close()

    def _to_list(self) -> None:
        from specsheet.tui.browse_screen import BrowseScreen

        self.app.switch_screen(BrowseScreen(self.session.path.parent, self.evaluator))

    async def _leave(self, go: Callable[[], object]) -> None:
        await self.commit_all()
        if not self.session.dirty:
            self.session.close()
            go()
            return

        async def answered(value: str | None) -> None:
            if value == "save":
                outcome = self.session.save()
                await self._after_save(outcome)
                if outcome.conflict is not saving.Conflict.NONE:
                    return
            elif value == "discard":
                self.session.give_up()
            elif not value:
                return
            self.session.close()
            go()

        choices = answers.leaving(bool(self.session.refused))
        self.app.push_screen(dialogs.Ask(self._question(), choices), answered)

    def _question(self) -> str:
        left = self.session.refused
        told = f" {len(left)} refused text(s) cannot go into the file." if left else ""
        return f"{self.session.path.name} has edits that are not saved.{told}"


def _resolved(path: Path, name: str) -> Path:
    """Return the path a name means: beside the present file, with its ending."""
    target = path.parent / Path(name).expanduser()
    return target if target.suffix else target.with_suffix(".toml")
