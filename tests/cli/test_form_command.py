"""The form as a shell starts it, in terminals of several kinds."""

from __future__ import annotations

import sys
from pathlib import Path

import pytest
from cli_process import DEMO_TAGS, demo_job

if sys.platform == "win32":
    pytest.skip("needs a pseudo-terminal", allow_module_level=True)

from pseudo_terminal import Terminal

FORM = ("-m", "specsheet", "form")
QUIT = b"\x11"  # ctrl+q
ESCAPE = b"\x1b"


@pytest.mark.parametrize("size", [(80, 24), (120, 40)], ids=str)
def test_tag_opens_and_ctrl_q_ends_it(size: tuple[int, int], tmp_path: Path) -> None:
    with Terminal((*FORM, "tags/FT-2104.toml"), demo_job(tmp_path), size) as terminal:
        terminal.until("Steam to digester")
        terminal.press(QUIT)
        assert terminal.end() == 0
        assert b"Traceback" not in terminal.seen


def test_job_opens_as_a_list(tmp_path: Path) -> None:
    with Terminal((*FORM, "."), demo_job(tmp_path)) as terminal:
        terminal.until("FT-7103")
        terminal.press(QUIT)
        assert terminal.end() == 0


def test_without_a_command_the_form_opens_on_this_folder(tmp_path: Path) -> None:
    with Terminal(("-m", "specsheet"), demo_job(tmp_path)) as terminal:
        terminal.until("FT-7103")
        terminal.press(QUIT)
        assert terminal.end() == 0


def test_terminal_that_is_too_small_says_so_and_still_ends(tmp_path: Path) -> None:
    with Terminal((*FORM, "tags/FT-2104.toml"), demo_job(tmp_path), (50, 12)) as terminal:
        terminal.until("Too small")
        terminal.press(QUIT)
        assert terminal.end() == 0
        assert b"Traceback" not in terminal.seen


def test_file_that_cannot_be_read_is_explained(tmp_path: Path) -> None:
    job = demo_job(tmp_path)
    (job / "tags" / "FT-0001.toml").write_bytes(b"\xff\xfe\x00")
    with Terminal((*FORM, "tags/FT-0001.toml"), job) as terminal:
        terminal.until("UTF-8")
        terminal.press(ESCAPE)
        terminal.until("FT-7103")  # the other tags of the folder
        terminal.press(QUIT)
        assert terminal.end() == 0


def test_demo_ends_in_the_form(tmp_path: Path) -> None:
    with Terminal(("-m", "specsheet", "demo"), tmp_path) as terminal:
        terminal.until("printing")
        terminal.until("\x1b[?1049h")  # the form takes the whole screen
        terminal.seen = b""
        terminal.until("FT-7103")
        terminal.press(QUIT)
        assert terminal.end() == 0
    assert len(list((tmp_path / "output").glob("*.pdf"))) == len(DEMO_TAGS)
