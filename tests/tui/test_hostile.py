"""Texts that markup would swallow or choke on, in every place a user can put one."""

from __future__ import annotations

from datetime import date
from pathlib import Path

import pytest

from specsheet.fields import COMMON, REVISION, SECTIONS
from specsheet.tui import dialogs
from specsheet.tui.address import Address
from specsheet.tui.app import FormApp
from specsheet.tui.browse_screen import BrowseScreen
from specsheet.tui.form_screen import FormScreen
from specsheet.tui.opening import open_session
from specsheet.tui.session import Session
from tests.tui.conftest import HOSTILE, AtOnce, run, screen_text, send, until
from tests.tui.driving import ready

_CLEAN = {"family", "fluid.kind", "fluid.mixture"}  # they decide which entries there are


@pytest.fixture
def hostile_file(tag_file: Path) -> Path:
    """A tag file with the hostile text in every text, and refused in every other entry."""
    session = open_session(tag_file)
    assert isinstance(session, Session)
    session.edit(Address("fluid.kind"), "mixture")
    for entry in COMMON:
        if entry.path not in _CLEAN and entry.section != "points":
            session.edit(Address(entry.path), HOSTILE)
    for entry in COMMON:
        if entry.section == "points" and entry.key != "name":
            session.edit(Address(entry.path, 1), HOSTILE)
    session.edit(Address("points.name", 1), HOSTILE)
    session.edit(Address(f"fluid.mixture.{HOSTILE}"), "0.5")
    session.add_component(HOSTILE)
    session.add_revision(HOSTILE, date(2031, 3, 4))
    for entry in REVISION:
        if entry.key not in ("mark", "date"):
            session.edit(Address(entry.path, 0), HOSTILE)
    for entry in session.family_entries:
        session.edit(Address(entry.path), HOSTILE)
    session.save()
    session.close()
    return tag_file


@pytest.mark.parametrize("size", [(80, 24), (160, 50)])
def test_every_screen_shows_the_text_as_typed(hostile_file: Path, size: tuple[int, int]) -> None:
    app = FormApp(hostile_file, AtOnce(HOSTILE))
    shown: list[str] = []

    async def main() -> None:
        async with app.run_test(size=size, notifications=True) as pilot:
            await until(pilot, lambda: isinstance(app.screen, dialogs.Ask))
            await send(pilot, "r")
            form = app.screen_stack[0]
            assert isinstance(form, FormScreen)
            await until(pilot, lambda: app.screen is form and bool(form.session.refused))
            for section in SECTIONS:
                await form.open_section(section.key)
                await form.action_everything()
                for key in ("f7", "f7", "f7") if size[0] < 110 else ():
                    await send(pilot, key)
                    shown.append(screen_text(app))
                await send(pilot, "f1")
                await until(pilot, lambda: isinstance(app.screen, dialogs.Tell))
                shown.append(screen_text(app))
                await send(pilot, "escape")
                await until(pilot, lambda: app.screen is form)
            for key in ("f10", "ctrl+p", "ctrl+f", "f12", "ctrl+q"):
                await send(pilot, key)
                await until(pilot, lambda: app.screen is not form)
                shown.append(screen_text(app))
                await send(pilot, "escape")
                await until(pilot, lambda: app.screen is form)
            form.session.give_up()
            await form.open_section("")
            await send(pilot, "ctrl+s", "ctrl+o")
            await until(pilot, lambda: app.screen is not form)
            if isinstance(app.screen, dialogs.Ask):
                await send(pilot, "d")
            await until(pilot, lambda: isinstance(app.screen, BrowseScreen))
            await until(pilot, lambda: HOSTILE in screen_text(app))
            await send(pilot, "slash")
            await until(pilot, lambda: isinstance(app.screen, dialogs.Pick))
            shown.append(screen_text(app))

    run(main)
    together = "\n".join(shown)
    assert together.count(HOSTILE) > 20
    assert app.return_code in (None, 0)


def test_a_hostile_name_of_a_file(tag_file: Path) -> None:
    path = tag_file.with_name("a [b] [kg].toml")
    path.write_text(tag_file.read_text())
    app = FormApp(path, AtOnce())

    async def main() -> None:
        async with app.run_test() as pilot:
            await until(pilot, lambda: ready(app))
            form = app.screen
            assert isinstance(form, FormScreen)
            form.session.edit(Address("service"), "x")
            await send(pilot, "ctrl+s")
            await until(pilot, lambda: "saved a [b] [kg].toml" in screen_text(app))

    run(main)
