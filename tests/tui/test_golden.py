"""A few whole screens as plain text. A change here is a change of what users see: read the diff.

``SPECSHEET_GOLDEN=write pytest tests/tui/test_golden.py`` writes them anew.
"""

from __future__ import annotations

from pathlib import Path

import pytest

from specsheet.tui import dialogs
from specsheet.tui.app import FormApp
from specsheet.tui.form_screen import FormScreen
from tests.tui.conftest import AtOnce, run, screen_text, send, until
from tests.tui.driving import ready

FOLDER = Path(__file__).parent / "golden"

#: name -> size, section, keys
SCREENS = {
    "fluid-80x24": ((80, 24), "fluid", ()),
    "points-160x50": ((160, 50), "points", ()),
    "refused-80x24": ((80, 24), "points", ("down", *"30 apples", "enter", "up")),
    "range-80x24": ((80, 24), "points", ("f7", "f7")),
    "leaving-80x24": ((80, 24), "fluid", ("down", "x", "ctrl+q")),
}


@pytest.mark.parametrize("name", SCREENS)
def test_the_screen_is_as_it_was(tag_file: Path, name: str, write_golden: bool) -> None:
    size, section, keys = SCREENS[name]
    app = FormApp(tag_file, AtOnce())
    shown = ""

    async def main() -> None:
        nonlocal shown
        async with app.run_test(size=size) as pilot:
            await until(pilot, lambda: ready(app))
            form = app.screen
            assert isinstance(form, FormScreen)
            await form.open_section(section)
            await until(pilot, lambda: form.frame.sheet is not None and not form.frame.state)
            await send(pilot, *keys[:-1])
            await pilot.pause(0.1)  # what was typed is told, and gone with the next move
            await send(pilot, *keys[-1:])
            asked = "ctrl+q" in keys
            await until(pilot, lambda: isinstance(app.screen, dialogs.Ask) is asked)
            await pilot.pause(0.3)
            shown = screen_text(app)
            form.session.give_up()

    run(main)
    path = FOLDER / f"{name}.txt"
    if write_golden:
        path.write_text(shown, encoding="utf-8")
    assert shown == path.read_text(encoding="utf-8")
