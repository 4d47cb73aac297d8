"""What opening the form costs, and what it refuses to open on."""

from __future__ import annotations

import io
import os
import subprocess
import sys
from pathlib import Path

import pytest

from specsheet import tui
from specsheet.tui import glyphs, terminal

#: never loaded in the process that draws; the worker has them
_HEAVY = ("numpy", "pint", "CoolProp", "reportlab", "tomlkit", "scipy", "openpyxl")

_PLAY = """
import asyncio, sys
from specsheet.tui.app import FormApp
from specsheet.tui.form_screen import FormScreen
from tests.tui.conftest import AtOnce, send, until
from pathlib import Path

async def main():
    app = FormApp(Path(sys.argv[1]), AtOnce())
    async with app.run_test(size=(120, 40)) as pilot:
        await until(pilot, lambda: isinstance(app.screen, FormScreen) and app.screen.focused)
        for section in ("", "fluid", "line", "points", "design", "meter", "require", "revisions"):
            await app.screen.open_section(section)
        await app.screen.open_section("fluid")
        await send(pilot, *"x", "enter", "f4", "escape", "f1", "escape", "ctrl+s")
        await pilot.pause(0.2)

asyncio.run(main())
print(",".join(name for name in %r if name in sys.modules))
"""

_FIRST = """
import asyncio, os, sys
from pathlib import Path
from specsheet.tui.app import FormApp
from specsheet.tui.form_screen import FormScreen

def begin(form):
    # a module that only waits for its first use is of another type
    print(",".join(name for name in sys.modules if type(sys.modules[name]) is type(sys)))
    form.app.exit(0)

FormScreen.begin = begin

async def main():
    async with FormApp(Path(sys.argv[1])).run_test(size=(80, 24)) as pilot:
        await pilot.pause(0.2)

asyncio.run(main())
"""


def _python(code: str, *arguments: str) -> str:
    done = subprocess.run(
        [sys.executable, "-c", code, *arguments],
        capture_output=True,
        text=True,
        timeout=60,
        cwd=Path(__file__).parents[2],
    )
    assert done.returncode == 0, done.stderr
    return done.stdout.strip()


def test_the_form_never_loads_what_the_worker_has(tag_file: Path) -> None:
    assert _python(_PLAY % (_HEAVY,), str(tag_file)) == ""


def test_the_first_screen_needs_next_to_nothing_of_ours(tag_file: Path) -> None:
    loaded = set(_python(_FIRST, str(tag_file)).split(","))
    rooms = ("quantity", "methods", "packs", "line", "meters", "evaluate", "sheet", "job", "render")
    late = (*(f"specsheet.{room}" for room in rooms), "specsheet.tui.dialogs", "json", *_HEAVY)
    assert "specsheet.tui.form_screen" in loaded
    assert not loaded.intersection(late)


class _Terminal(io.StringIO):
    def isatty(self) -> bool:
        return True


def in_terminal(monkeypatch: pytest.MonkeyPatch, without: str = "", kind: str = "xterm") -> None:
    """Pretend to be in a terminal, one of its streams left out."""
    for name in ("stdin", "stdout", "stderr"):
        monkeypatch.setattr(sys, name, io.StringIO() if name == without else _Terminal())
    monkeypatch.setenv("TERM", kind)


@pytest.mark.parametrize("name", ["stdin", "stdout", "stderr"])
def test_without_a_terminal_it_says_what_to_use(
    tag_file: Path, name: str, monkeypatch: pytest.MonkeyPatch
) -> None:
    in_terminal(monkeypatch, without=name)
    assert "needs a terminal" in terminal.objection(tag_file)
    assert tui.run(tag_file) == 2


def test_a_dumb_terminal_is_refused(tag_file: Path, monkeypatch: pytest.MonkeyPatch) -> None:
    in_terminal(monkeypatch, kind="dumb")
    assert "dumb" in terminal.objection(tag_file)


@pytest.mark.parametrize(
    ("name", "said"),
    [
        ("FT-1001.toml", ""),
        (".", ""),
        ("new.toml", ""),
        ("nowhere/new.toml", "folder does not exist"),
        ("nowhere", "no such file or folder"),
    ],
)
def test_what_cannot_be_opened_is_told_before_the_screen_is_taken(
    tag_file: Path, name: str, said: str, monkeypatch: pytest.MonkeyPatch
) -> None:
    in_terminal(monkeypatch)
    message = terminal.objection(tag_file.parent / name)
    assert said in message
    assert bool(message) is bool(said)


def test_ascii_is_drawn_where_it_is_asked_for(tag_file: Path) -> None:
    code = """
import asyncio, sys
from pathlib import Path
from specsheet.tui.app import FormApp
from tests.tui.conftest import AtOnce, screen_text, until
async def main():
    app = FormApp(Path(sys.argv[1]), AtOnce())
    async with app.run_test(size=(160, 50)) as pilot:
        await until(pilot, lambda: "Velocity" in screen_text(app))
        print(screen_text(app))
asyncio.run(main())
"""
    environment = os.environ | {"SPECSHEET_ASCII": "1"}
    done = subprocess.run(
        [sys.executable, "-c", code, str(tag_file)],
        capture_output=True,
        timeout=60,
        cwd=Path(__file__).parents[2],
        env=environment,
    )
    assert done.returncode == 0, done.stderr
    text = done.stdout.decode()
    assert text.isascii(), [char for char in text if not char.isascii()]
    assert "Mass flow" in text


@pytest.mark.parametrize(
    ("encoding", "wanted"), [("UTF-8", False), ("utf8", False), ("ISO-8859-1", True)]
)
def test_the_locale_decides_otherwise(
    encoding: str, wanted: bool, monkeypatch: pytest.MonkeyPatch
) -> None:
    monkeypatch.setattr(glyphs.locale, "getpreferredencoding", lambda _: encoding)
    assert glyphs.wants_ascii() is wanted
