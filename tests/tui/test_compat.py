"""Each override against the grain of Textual, with a test that fails when upstream changes."""

from __future__ import annotations

import gc
import weakref
from typing import ClassVar

import pytest
import textual
from textual.app import App, ComposeResult
from textual.binding import Binding
from textual.screen import Screen
from textual.widgets import Input, Static

from specsheet.tui.compat import CalmScreen, Field, make_switchable, plain, show, wants_no_colour
from tests.tui.conftest import HOSTILE, run, send


def test_the_version_that_the_overrides_were_measured_with() -> None:
    assert textual.__version__ == "8.2.8"


class _Screen(CalmScreen):
    BINDINGS: ClassVar = [
        Binding("tab,enter", "focus_step(1)", priority=True),
        Binding("shift+tab", "focus_step(-1)", priority=True),
    ]

    def compose(self) -> ComposeResult:
        for _ in range(6):
            yield Field()

    def action_focus_step(self, step: int) -> None:
        fields = list(self.query(Field))
        place = fields.index(self.focused) + step  # type: ignore[arg-type]
        self.set_focus(fields[max(0, min(len(fields) - 1, place))])


class _App(App[None]):
    def on_mount(self) -> None:
        self.push_screen(_Screen())


BURSTS = {
    "tabs": (["a", "tab", "b", "tab", "c", "tab", "d"], ["a", "b", "c", "d"]),
    "enter": ([*"12", "enter", *"34", "enter", *"56"], ["12", "34", "56"]),
    "correction": ([*"axx", "backspace", "backspace", "tab", "b"], ["a", "b"]),
    "kill line": ([*"abc", "ctrl+u", "d", "tab", "e"], ["d", "e"]),
    "back": (["a", "tab", "b", "shift+tab", "end", "c"], ["ac", "b"]),
    "home": ([*"bc", "home", "a", "tab", "d"], ["abc", "d"]),
}


@pytest.mark.parametrize("name", BURSTS)
def test_keys_that_come_together_land_where_they_belong(name: str) -> None:
    keys, wanted = BURSTS[name]

    async def main() -> None:
        app = _App()
        async with app.run_test() as pilot:
            await pilot.pause()
            await send(pilot, *keys)
            await pilot.pause(0.05)
            values = [field.value for field in app.screen.query(Field)]
            assert values[: len(wanted)] == wanted
            assert not any(values[len(wanted) :])

    run(main)


def test_a_key_in_a_field_does_not_lay_the_screen_out() -> None:
    async def main() -> None:
        app = _App()
        async with app.run_test() as pilot:
            await pilot.pause()
            count = 0
            screen = app.screen
            layout = screen._refresh_layout

            def counted(*args: object, **kwargs: object) -> None:
                nonlocal count
                count += 1
                layout(*args, **kwargs)  # type: ignore[arg-type]

            screen._refresh_layout = counted  # type: ignore[method-assign]
            await send(pilot, *"abcdefgh")
            await pilot.pause(0.05)
            assert count == 0

    run(main)


def test_upstream_still_lays_out_at_every_key() -> None:
    """When this fails the override of the virtual size can go."""
    assert Input.virtual_size._layout  # type: ignore[attr-defined]


def test_a_focus_move_does_not_repaint_the_screen() -> None:
    from textual.screen import Screen

    assert not CalmScreen.focused._repaint  # type: ignore[attr-defined]
    assert Screen.focused._repaint  # type: ignore[attr-defined]


def test_a_removed_field_does_not_live_on() -> None:
    async def main() -> None:
        app = _App()
        async with app.run_test() as pilot:
            await pilot.pause()
            seen: list[weakref.ref[Field]] = []
            for _ in range(20):
                field = Field("x")
                seen.append(weakref.ref(field))
                await app.screen.mount(field)
                await field.remove()
                del field
            await pilot.pause(0.05)
            gc.collect()
            assert sum(ref() is not None for ref in seen) <= 5

    run(main)


def test_text_of_the_user_is_never_markup() -> None:
    assert plain(HOSTILE).plain == HOSTILE
    assert not plain(HOSTILE).spans

    class Shown(App[None]):
        def compose(self) -> ComposeResult:
            yield Static(id="told")

        def on_mount(self) -> None:
            show(self.query_one("#told", Static), HOSTILE)

    async def main() -> None:
        app = Shown()
        async with app.run_test() as pilot:
            await pilot.pause()
            assert str(app.query_one("#told", Static).render()) == HOSTILE

    run(main)


@pytest.mark.parametrize(("value", "wanted"), [(None, False), ("", False), ("1", True)])
def test_no_colour_follows_its_convention(
    value: str | None, wanted: bool, monkeypatch: pytest.MonkeyPatch
) -> None:
    if value is not None:
        monkeypatch.setenv("NO_COLOR", value)
    assert wants_no_colour() is wanted


def test_the_first_screen_can_be_switched_for_another() -> None:
    class Switched(App[None]):
        def get_default_screen(self) -> Screen[None]:
            screen: Screen[None] = CalmScreen(id="first")
            make_switchable(self, screen)
            return screen

    async def main() -> None:
        app = Switched()
        async with app.run_test() as pilot:
            await app.switch_screen(CalmScreen(id="second"))
            await pilot.pause()
            assert [screen.id for screen in app.screen_stack] == ["second"]

    run(main)
