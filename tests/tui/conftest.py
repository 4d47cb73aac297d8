"""What the tests of the form share: a clean environment, a tag, an evaluator without a process."""

from __future__ import annotations

import asyncio
import os
import time
from collections.abc import Awaitable, Callable
from pathlib import Path

import pytest

from specsheet.findings import Level, Origin
from specsheet.sheet.model import (
    Cell,
    FindingRow,
    Mark,
    Row,
    Ruler,
    Sheet,
    Table,
    Tick,
    Window,
)
from specsheet.tui.protocol import Answer, Compare, Derived, Printed, Suppose
from specsheet.tui.worker import answer

TAG = """\
schema = 1
tag = "FT-1001" # the first one
service = "Cooling water return"
family = "vortex"
status = "draft"

[fluid]
kind = "substance"
substance = "water"
phase = "liquid"

[line]
size = "DN 80"

[[points]]
name = "minimum"
flow = "8 m3/h"
pressure = "3 bar(g)"
temperature = "25 degC"

[[points]]
name = "normal"
flow = "30 m3/h"
pressure = "3 bar(g)"
temperature = "25 degC"
"""

#: a text that markup would swallow or choke on
HOSTILE = "a [/h] [kg] bar[g]"

_VARIABLES = ("NO_COLOR", "SPECSHEET_ASCII", "TEXTUAL_THEME", "TEXTUAL_FILTERS", "LOCALAPPDATA")


@pytest.fixture(autouse=True)
def _clean(tmp_path: Path, monkeypatch: pytest.MonkeyPatch) -> None:
    """Keep the developer's settings and state out."""
    for name in _VARIABLES:
        monkeypatch.delenv(name, raising=False)
    monkeypatch.setenv("TEXTUAL_ANIMATIONS", "none")
    monkeypatch.setenv("XDG_STATE_HOME", str(tmp_path / "state"))


@pytest.fixture
def tag_file(tmp_path: Path) -> Path:
    """A tag file in a folder of its own."""
    folder = tmp_path / "job"
    folder.mkdir()
    path = folder / "FT-1001.toml"
    path.write_text(TAG, encoding="utf-8")
    return path


def sheet(text: str = "cooling") -> Sheet:
    """A small finished sheet that holds ``text`` wherever a user's text can stand."""
    two = (Cell("1.2", Origin.GIVEN), Cell("4.5", Origin.DERIVED))
    table = Table(
        "points",
        f"Points {text}",
        ("minimum", "normal"),
        (Row("velocity", "Velocity", "v", two, "m/s"),),
    )
    return Sheet(
        tag=text,
        title="Vortex meter",
        service=text,
        status="draft",
        revision="",
        date=None,
        paper="A4",
        confidentiality="",
        verdict="",
        worst=Level.CAUTION,
        head=(),
        points=table,
        ruler=Ruler(
            "Mass flow",
            "t/h",
            (Tick(0.0, "1"), Tick(0.5, "10"), Tick(1.0, "100")),
            (Window(f"velocity {text}", 0.2, 0.8, False, True, "3", "", Level.CAUTION),),
            (Mark(f"normal {text}", "30", 0.6, True), Mark("minimum", "8", 0.3, True)),
            (0.2, 0.8),
        ),
        findings=(
            FindingRow(
                Level.CAUTION,
                "velocity-high",
                "points.normal.flow",
                "normal",
                f"The velocity is high: {text}.",
                "common practice, no source",
                "",
            ),
        ),
        cautions=(f"Confirm with a licensed engineer ({text}).",),
    )


class AtOnce:
    """An evaluator that answers in the same loop, without a process."""

    def __init__(self, text: str = "cooling") -> None:
        self.texts: list[str] = []
        self.printed: list[str] = []
        self.closed = False
        self.answer: Callable[[int], Answer] = lambda number: Derived(number, sheet(text))
        self._listener: Callable[[Answer], None] = lambda _: None
        self._number = 0

    def listen(self, listener: Callable[[Answer], None]) -> None:
        self._listener = listener

    def derive(self, text: str, path: str) -> None:  # noqa: ARG002
        self._number += 1
        self.texts.append(text)
        asyncio.get_running_loop().call_soon(self._listener, self.answer(self._number))

    def print(self, text: str, path: str, folder: str) -> int:  # noqa: ARG002
        self._number += 1
        self.printed.append(text)
        answer = Printed(self._number, f"{folder}/FT-1001.pdf")
        asyncio.get_running_loop().call_soon(self._listener, answer)
        return self._number

    def compare(self, text: str, path: str) -> int:
        """Answer as the worker would."""
        self._number += 1
        return self._answered(Compare(self._number, text, path))

    def suppose(self, text: str, path: str, entry: str, first: str, last: str = "") -> int:
        """Answer as the worker would."""
        self._number += 1
        return self._answered(Suppose(self._number, text, path, entry, first, last))

    def _answered(self, request: Compare | Suppose) -> int:
        asyncio.get_running_loop().call_soon(self._listener, answer(request))
        return request.number

    async def close(self) -> None:
        self.closed = True


@pytest.fixture
def evaluator() -> AtOnce:
    """An evaluator that answers at once."""
    return AtOnce()


def run(main: Callable[[], Awaitable[None]]) -> None:
    """Run one asynchronous test."""
    asyncio.run(main())


def screen_text(app: object) -> str:
    """Return what stands on the screen, line by line, without trailing blanks."""
    strips = app.screen._compositor.render_strips()  # type: ignore[attr-defined]
    lines = ["".join(segment.text for segment in strip).rstrip() for strip in strips]
    return "\n".join(lines) + "\n"


def words(app: object) -> str:
    """Return the words on the screen in one line: where they wrap, a path decides."""
    return " ".join(screen_text(app).split())


async def until(pilot: object, holds: Callable[[], bool], timeout: float = 5.0) -> None:
    """Let the application work until ``holds``; fail with the screen after ``timeout`` seconds."""
    end = time.monotonic() + timeout
    while not holds():
        if time.monotonic() > end:
            raise AssertionError(screen_text(pilot.app))  # type: ignore[attr-defined]
        await pilot.pause(0.01)  # type: ignore[attr-defined]


async def send(pilot: object, *keys: str) -> None:
    """Send keys in one burst, as a slow line or a pasted macro delivers them."""
    from textual import events
    from textual.keys import _character_to_key

    app = pilot.app  # type: ignore[attr-defined]
    for key in keys:
        if len(key) == 1:
            app._driver.send_message(events.Key(_character_to_key(key), key))
        else:
            app._driver.send_message(events.Key(key, None))
    await pilot.pause(0.02)  # type: ignore[attr-defined]


@pytest.fixture
def write_golden() -> bool:
    """Whether golden screens are written anew: SPECSHEET_GOLDEN=write."""
    return os.environ.get("SPECSHEET_GOLDEN") == "write"
