"""Driving the application by keys until its screens stand."""

from __future__ import annotations

import asyncio
from collections.abc import Awaitable, Callable
from pathlib import Path

from specsheet.tui import dialogs
from specsheet.tui.address import Address
from specsheet.tui.app import FormApp
from specsheet.tui.browse_screen import BrowseScreen
from specsheet.tui.form_screen import FormScreen
from tests.tui.conftest import AtOnce, run, until

Drive = Callable[[FormApp, object], Awaitable[None]]
FLOW = Address("points.flow", 1)


def drive(path: Path, evaluator: AtOnce, play: Drive, size: tuple[int, int] = (80, 24)) -> FormApp:
    """Run the application on ``path`` and play with it once its first screen stands."""
    app = FormApp(path, evaluator)

    async def main() -> None:
        async with app.run_test(size=size) as pilot:
            await until(pilot, lambda: ready(app))
            await play(app, pilot)

    run(main)
    return app


def ready(app: FormApp) -> bool:
    screen = app.screen
    if isinstance(screen, FormScreen):
        return screen.section in screen.pages and screen.focused is not None
    return isinstance(screen, BrowseScreen | dialogs.Ask)


def form_of(app: FormApp) -> FormScreen:
    return next(s for s in app.screen_stack if isinstance(s, FormScreen))


async def at(app: FormApp, address: Address) -> None:
    """Put the focus on an address."""
    await form_of(app).go_to(address)
    await asyncio.sleep(0)
