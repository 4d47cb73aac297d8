"""From a session to its form, with what other sessions of the same file left behind."""

from __future__ import annotations

from textual.app import App

from specsheet.tui.evaluator import Evaluator
from specsheet.tui.form_screen import FormScreen
from specsheet.tui.journal import survey
from specsheet.tui.session import Session


def enter(app: App[int], session: Session, evaluator: Evaluator) -> None:
    """Show the form of a session, in place of the screen it was chosen from."""
    found = survey(session.path)
    busy = f"{session.path.name} has unsaved edits in another window: the later save is asked about"
    app.switch_screen(
        FormScreen(
            session,
            evaluator,
            greeting=busy if found.busy else "",
            leftovers=found.leftovers,
        )
    )
