"""From a session to its form: first what other sessions left behind is offered."""

from __future__ import annotations

from textual.app import App

from specsheet.tui.dialogs import Ask, Choice
from specsheet.tui.evaluator import Evaluator
from specsheet.tui.form_screen import FormScreen
from specsheet.tui.journal import Leftover, survey
from specsheet.tui.session import Session

_CHOICES = (
    Choice("recover", "Recover them; undo takes them out again", key="r"),
    Choice("later", "Leave them for the next open", key="l"),
    Choice("discard", "Discard them for good", key="d"),
)


def enter(app: App[int], session: Session, evaluator: Evaluator) -> None:
    """Show the form of a session, in place of the list it was chosen from."""
    found = survey(session.path)
    greeting = (
        f"{session.path.name} has unsaved edits in another window: whoever saves last is asked"
        if found.busy
        else ""
    )
    screen = FormScreen(session, evaluator, greeting=greeting)
    app.switch_screen(screen)
    if found.leftovers:
        app.call_after_refresh(_offer, app, screen, list(found.leftovers))


def _offer(app: App[int], screen: FormScreen, leftovers: list[Leftover]) -> None:
    """Offer what was left behind, the newest first; one recovered ends the offers."""
    leftover = leftovers.pop(0)

    async def answered(value: str | None) -> None:
        if value == "recover":
            screen.session.recover(leftover)
            await screen.moved("recovered", leftover.name)
            return
        if value == "discard":
            leftover.discard()
        if leftovers:
            _offer(app, screen, leftovers)

    app.push_screen(Ask(_question(screen.session, leftover), _CHOICES), answered)


def _question(session: Session, leftover: Leftover) -> str:
    other = "" if leftover.saved == session.saved else " The file on disk has changed since then."
    return (
        f"An earlier session ended before its edits of {session.path.name} were saved "
        f"({leftover.edits} edit(s), the last: {leftover.name}).{other}"
    )
