"""How soon the form stands, against an application of the terminal library that shows one word."""

from __future__ import annotations

import sys
from pathlib import Path

import pytest
from cli_process import demo_job
from measure import report

if sys.platform == "win32":
    pytest.skip("needs a pseudo-terminal", allow_module_level=True)

from pseudo_terminal import Terminal

pytestmark = pytest.mark.benchmark

BARE = """\
from textual.app import App
from textual.widgets import Static
class Bare(App):
    def compose(self):
        yield Static("HERE")
Bare().run()
"""
ROUNDS = 7


def _seconds(arguments: tuple[str, ...], marker: str, cwd: Path) -> float:
    best = float("inf")
    for _ in range(ROUNDS):
        with Terminal(arguments, cwd) as terminal:
            best = min(best, terminal.until(marker))
    return best


def test_first_screen(tmp_path: Path) -> None:
    job = demo_job(tmp_path)
    bare = _seconds(("-c", BARE), "HERE", job)
    form = _seconds(("-m", "specsheet", "form", "tags/FT-2104.toml"), "Kind of fluid", job)
    report("form filled in, by a bare application's first screen", form / bare, "", 1.35)
    assert form / bare <= 1.35
