"""How soon the first screen stands, as a ratio to the barest application of the same library.

Both run in turn on a pseudo-terminal of 80 by 24, with compiled bytecode, from the start of the
process until the words are drawn: of the form the labels and the texts of the tag's first page,
editors and all; nothing is drawn before it. The ratio of the medians counts.
"""

from __future__ import annotations

import os
import select
import signal
import statistics
import sys
import time
from pathlib import Path

import pytest

pytestmark = [
    pytest.mark.benchmark,
    pytest.mark.skipif(sys.platform == "win32", reason="needs a pseudo-terminal"),
]

ROOT = Path(__file__).parents[2]
RUNS = 9
LIMIT = 1.35

BARE = """
from textual.app import App
from textual.widgets import Label
class Bare(App):
    def compose(self):
        yield Label("READY")
Bare().run()
"""
FORM = "import sys; from specsheet.cli import main; main(['form', sys.argv[1]])"


def first_screen(code: str, path: Path, words: tuple[bytes, ...]) -> float:
    """Return the seconds from the start of a process to the words on its screen."""
    import fcntl
    import pty
    import struct
    import termios

    start = time.perf_counter()
    process, line = pty.fork()
    if process == 0:
        os.environ.pop("PYTHONDONTWRITEBYTECODE", None)
        os.environ.update(TERM="xterm-256color", PYTHONPATH=str(ROOT))
        os.execv(sys.executable, [sys.executable, "-c", code, str(path)])
    fcntl.ioctl(line, termios.TIOCSWINSZ, struct.pack("HHHH", 24, 80, 0, 0))
    seen = b""
    while not all(word in seen for word in words):
        assert select.select([line], [], [], 20.0)[0], seen
        seen += os.read(line, 65536)
    took = time.perf_counter() - start
    os.kill(process, signal.SIGKILL)
    os.waitpid(process, 0)
    os.close(line)
    return took


def test_the_first_screen_stands_nearly_as_soon_as_a_bare_one(tag_file: Path) -> None:
    cases = {
        "bare": (BARE, (b"READY",)),
        "form": (FORM, (b"Kind of fluid", b"substance", b"Phase", b"liquid")),
    }
    times: dict[str, list[float]] = {name: [] for name in cases}
    for number in range(RUNS + 1):
        for name, (code, words) in cases.items():
            took = first_screen(code, tag_file, words)
            if number:  # the first run compiles
                times[name].append(took)
    bare, form = (statistics.median(times[name]) for name in ("bare", "form"))
    print(f"bare {bare * 1000:.0f} ms, form {form * 1000:.0f} ms, ratio {form / bare:.2f}")
    assert form / bare < LIMIT
