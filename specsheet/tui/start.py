"""What is shown first: a tag, a list of tags, or why neither can be."""

from __future__ import annotations

from pathlib import Path

from textual.app import App

from specsheet.tui.browse_screen import BrowseScreen
from specsheet.tui.entrance import enter
from specsheet.tui.evaluator import Evaluator
from specsheet.tui.opening import open_session


def first_screen(app: App[int], path: Path, evaluator: Evaluator) -> None:
    """Open a tag file or list a folder; for an unreadable file, list its folder."""
    if path.is_dir():
        app.switch_screen(BrowseScreen(path, evaluator))
        return
    session = open_session(path)
    if isinstance(session, str):
        app.switch_screen(BrowseScreen(path.parent, evaluator, trouble=session))
    else:
        enter(app, session, evaluator)
