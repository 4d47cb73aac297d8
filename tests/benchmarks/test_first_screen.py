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
FORM = ("-m", "specsheet", "form", "tags/FT-2104.toml")
ROUNDS = 12


def _until(arguments: tuple[str, ...], marker: str, cwd: Path) -> tuple[float, float]:
    """Return the time on the wall and the processor time until a text has been drawn [s]."""
    with Terminal(arguments, cwd) as terminal:
        return terminal.until(marker), terminal.spent()


def test_first_screen(tmp_path: Path) -> None:
    job = demo_job(tmp_path)
    bare, form = [], []
    for _ in range(ROUNDS):  # in turn: a machine that is busy for a while delays both
        bare.append(_until(("-c", BARE), "HERE", job))
        form.append(_until(FORM, "Kind of fluid", job))
    wall, spent = (
        min(with_form) / min(without)
        for with_form, without in zip(zip(*form, strict=True), zip(*bare, strict=True), strict=True)
    )
    report("form filled in, by a bare application's first screen", wall, "", 1.35)
    report("the same in processor time", spent, "")
    assert wall <= 1.35
