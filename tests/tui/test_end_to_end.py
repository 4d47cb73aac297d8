"""The real program in a real terminal: a pseudo-terminal for signals, tmux for what is drawn."""

from __future__ import annotations

import os
import re
import shutil
import signal
import subprocess
import sys
import time
import uuid
from collections.abc import Callable, Iterator
from pathlib import Path

import pytest

from specsheet.tui.leftovers import survey

ROOT = Path(__file__).parents[2]
CODE = "import sys; from specsheet.tui import run; sys.exit(run(sys.argv[1]))"

pytestmark = pytest.mark.skipif(sys.platform == "win32", reason="needs a pseudo-terminal")


class Terminal:
    """The form on a pseudo-terminal of 80 by 24."""

    def __init__(self, path: Path, code: str = CODE, **environment: str) -> None:
        import fcntl
        import pty
        import struct
        import termios

        self.seen = b""
        self.code: int | None = None
        self.process, self._line = pty.fork()
        if self.process == 0:
            os.environ.update(TERM="xterm-256color", PYTHONPATH=str(ROOT), **environment)
            os.execv(sys.executable, [sys.executable, "-c", code, str(path)])
        fcntl.ioctl(self._line, termios.TIOCSWINSZ, struct.pack("HHHH", 24, 80, 0, 0))
        os.kill(self.process, signal.SIGWINCH)

    def read(self, until: Callable[[str], bool], timeout: float = 30.0) -> str:
        """Read what is drawn until it holds what is waited for."""
        import select

        end = time.monotonic() + timeout
        while not until(self.text):
            if time.monotonic() > end:
                raise AssertionError(self.text[-2000:])
            if not select.select([self._line], [], [], 0.1)[0]:
                continue
            try:
                self.seen += os.read(self._line, 65536)
            except OSError:
                break
        return self.text

    @property
    def text(self) -> str:
        """All that was drawn, without the control sequences."""
        return re.sub(r"\x1b\[[0-9;?<>=]*[a-zA-Z]", " ", self.seen.decode(errors="replace"))

    def write(self, text: str) -> None:
        """Type."""
        os.write(self._line, text.encode())

    def end(self, timeout: float = 15.0) -> int:
        """Read to the end of the program and return its exit status."""
        self.read(lambda _: self.ended(), timeout)
        last = time.monotonic() + timeout
        while not self.ended():  # the line closes a moment before the process is gone
            assert time.monotonic() < last, self.text
            time.sleep(0.01)
        os.close(self._line)
        assert self.code is not None
        return self.code

    def hang_up(self) -> None:
        """Take the terminal away."""
        os.close(self._line)

    def ended(self) -> bool:
        """Tell whether the program has ended."""
        if self.code is None:
            done, status = os.waitpid(self.process, os.WNOHANG)
            if done:
                self.code = os.waitstatus_to_exitcode(status)
        return self.code is not None


def test_a_tag_is_edited_derived_and_saved(tag_file: Path) -> None:
    terminal = Terminal(tag_file)
    terminal.read(lambda text: "Kind of fluid" in text)
    terminal.write("\r")  # to the name
    terminal.write("Brine\r")
    terminal.read(lambda text: "not saved" in text)
    terminal.read(lambda text: "reserve" in text)  # the worker has answered
    terminal.write("\x13")
    terminal.read(lambda text: "saved FT-1001.toml" in text)
    terminal.write("\x11")
    assert terminal.end() == 0
    assert 'name = "Brine"' in tag_file.read_text()


@pytest.mark.parametrize("number", [signal.SIGTERM, signal.SIGHUP])
def test_a_signal_restores_the_terminal_and_keeps_the_edits(
    tag_file: Path, number: signal.Signals
) -> None:
    terminal = Terminal(tag_file)
    terminal.read(lambda text: "Kind of fluid" in text)
    terminal.write("\rBrine")
    terminal.read(lambda text: "Brine" in text)
    os.kill(terminal.process, number)
    assert terminal.end() == 128 + number
    for restored in (b"\x1b[?1049l", b"\x1b[?25h", b"\x1b[?1000l"):
        assert restored in terminal.seen
    (leftover,) = survey(tag_file).leftovers
    assert "Brine" in leftover.state.text
    assert "are kept" in terminal.text


def test_a_mistake_of_ours_ends_with_a_status_and_keeps_the_edits(tag_file: Path) -> None:
    broken = (
        "import specsheet.tui.form_screen as module;"
        "module.FormScreen.action_print = lambda self: 1 / 0;"
    )
    terminal = Terminal(tag_file, broken + CODE)
    terminal.read(lambda text: "Kind of fluid" in text)
    terminal.write("\rBrine\r")
    terminal.read(lambda text: "not saved" in text)
    terminal.write("\x1b[15~")
    assert terminal.end() == 1
    assert survey(tag_file).leftovers


def test_without_colour_no_colour_is_sent(tag_file: Path) -> None:
    terminal = Terminal(tag_file, NO_COLOR="1")
    terminal.read(lambda text: "Kind of fluid" in text and "reserve" in text)
    terminal.write("\x11")
    assert terminal.end() == 0
    codes = re.findall(rb"\x1b\[([0-9;]*)m", terminal.seen)
    parts = {part for code in codes for part in code.split(b";")}
    assert not parts & {b"38", b"48", b"31", b"32", b"33", b"34", b"41", b"42"}, parts


@pytest.fixture
def tmux(tmp_path: Path) -> Iterator[Callable[..., str]]:
    """A tmux server of its own, 80 by 24."""
    if shutil.which("tmux") is None:
        pytest.skip("tmux is not installed")
    name = f"specsheet-{uuid.uuid4().hex[:8]}"

    def call(*arguments: str) -> str:
        command = ["tmux", "-L", name, "-f", "/dev/null", *arguments]
        return subprocess.run(command, capture_output=True, text=True, cwd=tmp_path).stdout

    yield call
    call("kill-server")


def test_in_tmux_keys_arrive_and_the_terminal_is_given_back(
    tag_file: Path, tmux: Callable[..., str]
) -> None:
    command = (
        f"XDG_STATE_HOME={os.environ['XDG_STATE_HOME']} PYTHONPATH={ROOT} "
        f"{sys.executable} -c '{CODE}' {tag_file}; echo STATUS $?; sleep 60"
    )
    tmux("new-session", "-d", "-x", "80", "-y", "24", command)

    def wait(words: str) -> str:
        end = time.monotonic() + 30
        while words not in (shown := tmux("capture-pane", "-p")):
            assert time.monotonic() < end, shown
            time.sleep(0.05)
        return shown

    wait("Kind of fluid")
    tmux("send-keys", "PageDown")
    wait("▸Line")
    tmux("send-keys", "-l", "DN 100")
    tmux("send-keys", "Tab")
    wait("not saved")
    tmux("send-keys", "C-s")
    wait("saved FT-1001.toml")
    tmux("send-keys", "C-q")
    wait("STATUS 0")
    assert tmux("display", "-p", "#{alternate_on} #{cursor_flag} #{mouse_any_flag}") == "0 1 0\n"
    assert 'size = "DN 100"' in tag_file.read_text()


def test_a_terminal_that_has_gone_ends_the_program_and_keeps_the_edits(tag_file: Path) -> None:
    """As when a window is closed or a connection is lost: hang-up, go on, and nowhere to draw."""
    terminal = Terminal(tag_file)
    terminal.read(lambda text: "Kind of fluid" in text)
    terminal.write("\rBrine")
    terminal.read(lambda text: "Brine" in text)
    terminal.hang_up()
    end = time.monotonic() + 15.0
    while not terminal.ended():
        assert time.monotonic() < end, "it waits for a terminal that has gone"
        time.sleep(0.05)
    (leftover,) = survey(tag_file).leftovers
    assert "Brine" in leftover.state.text


def test_after_a_stop_the_whole_screen_is_drawn_again(tag_file: Path) -> None:
    terminal = Terminal(tag_file)
    terminal.read(lambda text: "Kind of fluid" in text and "reserve" in text)
    os.kill(terminal.process, signal.SIGTSTP)
    terminal.read(lambda _: b"\x1b[?1049l" in terminal.seen)
    os.waitpid(terminal.process, os.WUNTRACED)
    terminal.seen = b""
    os.kill(terminal.process, signal.SIGCONT)
    terminal.read(lambda text: "Kind of fluid" in text and "Quit" in text)
    terminal.write("\x11")
    assert terminal.end() == 0


def test_a_terminal_that_was_not_given_back_is_not_taken_twice(tag_file: Path) -> None:
    """A hang-up brings this signal as well; a second taking leaves threads that never end."""
    terminal = Terminal(tag_file)
    terminal.read(lambda text: "Kind of fluid" in text and "reserve" in text)
    os.kill(terminal.process, signal.SIGCONT)
    terminal.write("\x1b[21~")
    terminal.read(lambda text: "Ctrl+Left, Ctrl+Right" in text)  # the keys, in a terminal as before
    terminal.write("\x1b")
    time.sleep(0.5)  # a lone Esc is known by what does not follow it
    terminal.write("\x11")
    assert terminal.end() == 0
    assert terminal.seen.count(b"\x1b[?1049h") == 1
