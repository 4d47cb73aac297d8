"""What is shown first: a tag, a list of tags, or why neither can be."""

from __future__ import annotations

from pathlib import Path
from typing import Any

from textual.screen import Screen

from specsheet.tui.evaluator import Evaluator
from specsheet.tui.form_screen import FormScreen
from specsheet.tui.opening import open_session


def first_screen(path: Path, evaluator: Evaluator) -> Screen[Any]:
    """Return the form of a tag file, or the list of a folder: also that of an unreadable file."""
    trouble = ""
    if not path.is_dir():
        session = open_session(path)
        if not isinstance(session, str):
            return FormScreen(session, evaluator)
        path, trouble = path.parent, session
    from specsheet.tui.browse_screen import BrowseScreen  # a form is drawn sooner without it

    return BrowseScreen(path, evaluator, trouble=trouble)
