"""The form of one tag: what it does with files, and nothing lost on the way."""

from __future__ import annotations

from collections.abc import Callable
from pathlib import Path

from specsheet.tagfile.problem import Problem
from specsheet.tagfile.source import read_text
from specsheet.tagfile.syntax import parse
from specsheet.tui.dialogs import Ask, Choice, Prompt, Tell
from specsheet.tui.evaluator import Evaluator
from specsheet.tui.form_asking import FormAsking
from specsheet.tui.journal import Leftover, survey
from specsheet.tui.saving import Conflict, Outcome
from specsheet.tui.session import Session

#: folder that printed sheets go into, below the folder the program was started in
OUTPUT = "output"

_RECOVERING = (
    Choice("recover", "Recover them; undo takes them out again", key="r"),
    Choice("later", "Leave them for the next open", key="l"),
    Choice("discard", "Discard them for good", key="d"),
)
_ELSEWHERE = Choice("elsewhere", "Save under another name", key="n")
_OVERWRITE = Choice("overwrite", "Write my text over what is on disk", key="o")
_RELOAD = Choice("reload", "Take what is on disk; undo brings my text back", key="l")


class FormScreen(FormAsking):
    """One tag."""

    def __init__(self, session: Session, evaluator: Evaluator) -> None:
        """Make the screen of a session."""
        super().__init__(session, evaluator)
        self._leftovers: list[Leftover] = []  # unsaved edits of earlier sessions, newest first

    def begin(self) -> None:
        """Ask for the values, then offer what earlier sessions left behind."""
        super().begin()
        found = survey(self.session.path)
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

        self.app.push_screen(Ask(self._left_behind(leftover), _RECOVERING), answered)

    def _left_behind(self, leftover: Leftover) -> str:
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

        self.app.push_screen(Prompt("Save under the name", str(self.session.path)), named)

    async def _after_save(self, outcome: Outcome) -> None:
        if outcome.conflict is Conflict.NONE:
            left = len(self.session.refused)
            kept = f"; {left} refused kept here, not in the file" if left else ""
            await self.refresh_form()
            self.say(f"{outcome.message}{kept}")
        elif outcome.conflict in (Conflict.CHANGED, Conflict.VANISHED):
            self._ask_conflict(outcome)
        else:
            self.app.push_screen(Tell("Not saved", [outcome.message]))

    def _ask_conflict(self, outcome: Outcome) -> None:
        async def answered(value: str | None) -> None:
            if value == "overwrite":
                await self._after_save(self.session.save(force=True))
            elif value == "reload":
                await self._reload()
            elif value == "elsewhere":
                self.action_save_as()

        gone = outcome.conflict is Conflict.VANISHED
        choices = [_OVERWRITE, _ELSEWHERE] if gone else [_OVERWRITE, _RELOAD, _ELSEWHERE]
        self.app.push_screen(Ask(f"{outcome.message} What shall be done?", choices), answered)

    async def _reload(self) -> None:
        text = read_text(self.session.path)
        data = text if isinstance(text, Problem) else parse(text, str(self.session.path))
        if isinstance(text, Problem) or isinstance(data, Problem):
            self.app.push_screen(Tell("Not loaded", [str(data), "Your edits are kept."]))
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
                if outcome.conflict is not Conflict.NONE:
                    return
            elif value == "discard":
                self.session.give_up()
            elif not value:
                return
            self.session.close()
            go()

        self.app.push_screen(Ask(self._question(), _leaving(bool(self.session.refused))), answered)

    def _question(self) -> str:
        left = self.session.refused
        told = f" {len(left)} refused text(s) cannot go into the file." if left else ""
        return f"{self.session.path.name} has edits that are not saved.{told}"


def _leaving(refused: bool) -> list[Choice]:
    """Return the ways to leave with unsaved edits."""
    rest = "; the refused texts are offered at the next open" if refused else ""
    return [
        Choice("save", f"Save and leave{rest}", key="s"),
        Choice("keep", "Leave; keep the edits, to be offered at the next open", key="k"),
        Choice("discard", "Leave and discard the edits", key="d"),
    ]


def _resolved(path: Path, name: str) -> Path:
    """Return the path a name means: beside the present file, with its ending."""
    target = path.parent / Path(name).expanduser()
    return target if target.suffix else target.with_suffix(".toml")
