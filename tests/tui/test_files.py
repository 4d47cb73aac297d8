"""What the form does with files, driven by keys: printing, leaving, recovery, the list."""

from __future__ import annotations

import os
import threading
from pathlib import Path

import pytest

from specsheet.tui import dialogs
from specsheet.tui.address import Address
from specsheet.tui.app import FormApp
from specsheet.tui.browse_screen import BrowseScreen, head_line
from specsheet.tui.form_screen import FormScreen
from specsheet.tui.leftovers import survey
from specsheet.tui.lines import Line
from specsheet.tui.opening import open_session
from tests.tui.conftest import AtOnce, screen_text, send, until, words
from tests.tui.driving import at, drive, form_of, ready


def test_printing_prints_what_is_on_the_screen(tag_file: Path, evaluator: AtOnce) -> None:
    async def play(app: FormApp, pilot: object) -> None:
        await at(app, Address("fluid.name"))
        await send(pilot, *"Brine", "f5")
        await until(pilot, lambda: bool(evaluator.printed))
        assert "Brine" in evaluator.printed[0]
        await until(pilot, lambda: "printed" in screen_text(app))

    drive(tag_file, evaluator, play)


@pytest.mark.parametrize(
    ("answer", "in_file", "left"), [("s", True, 0), ("k", False, 1), ("d", False, 0)]
)
def test_quitting_asks_when_something_is_not_saved(
    tag_file: Path, evaluator: AtOnce, answer: str, in_file: bool, left: int
) -> None:
    async def play(app: FormApp, pilot: object) -> None:
        await at(app, Address("fluid.name"))
        await send(pilot, *"Brine", "ctrl+q")
        await until(pilot, lambda: isinstance(app.screen, dialogs.Ask))
        await send(pilot, "escape")
        await until(pilot, lambda: isinstance(app.screen, FormScreen))
        await send(pilot, "ctrl+q")
        await until(pilot, lambda: isinstance(app.screen, dialogs.Ask))
        await send(pilot, answer)
        await until(pilot, lambda: app._exit)

    app = drive(tag_file, evaluator, play)
    assert app.return_value == 0
    assert ("Brine" in tag_file.read_text()) is in_file
    assert len(survey(tag_file).leftovers) == left
    assert evaluator.closed


def test_quitting_with_nothing_unsaved_just_quits(tag_file: Path, evaluator: AtOnce) -> None:
    async def play(app: FormApp, pilot: object) -> None:
        await send(pilot, "ctrl+q")
        await until(pilot, lambda: app._exit)

    assert drive(tag_file, evaluator, play).return_value == 0


@pytest.mark.parametrize(("answer", "name"), [("r", "Brine"), ("l", ""), ("d", "")])
def test_what_an_earlier_session_left_is_offered(
    tag_file: Path, evaluator: AtOnce, answer: str, name: str
) -> None:
    from specsheet.tui.opening import open_session
    from specsheet.tui.session import Session

    earlier = open_session(tag_file)
    assert isinstance(earlier, Session)
    earlier.edit(Address("fluid.name"), "Brine")
    earlier.close()

    async def play(app: FormApp, pilot: object) -> None:
        await until(pilot, lambda: isinstance(app.screen, dialogs.Ask))
        await send(pilot, answer)
        form = form_of(app)
        await until(pilot, lambda: app.screen is form)
        await until(pilot, lambda: form.session.get(Address("fluid.name")) == name)
        form.session.close()
        assert len(survey(tag_file).leftovers) == (0 if answer == "d" else 1)

    drive(tag_file, evaluator, play)


@pytest.mark.parametrize(("answer", "kept"), [("o", "mine"), ("l", "theirs")])
def test_a_file_changed_on_disk_is_asked_about(
    tag_file: Path, evaluator: AtOnce, answer: str, kept: str
) -> None:
    name = Address("fluid.name")

    async def play(app: FormApp, pilot: object) -> None:
        form = form_of(app)
        await at(app, name)
        await send(pilot, *"mine", "enter")
        await until(pilot, lambda: form.session.get(name) == "mine")
        theirs = tag_file.read_text().replace("[fluid]", '[fluid]\nname = "theirs"')
        tag_file.write_text(theirs)
        await send(pilot, "ctrl+s")
        await until(pilot, lambda: isinstance(app.screen, dialogs.Ask))
        await send(pilot, answer)
        await until(pilot, lambda: app.screen is form and not form.session.dirty)
        assert form.session.get(name) == kept
        assert f'name = "{kept}"' in tag_file.read_text()

    drive(tag_file, evaluator, play)


def test_a_folder_lists_its_tags_opens_one_and_comes_back(
    tag_file: Path, evaluator: AtOnce
) -> None:
    tag_file.with_name("broken.toml").write_text("tag = \n")

    async def play(app: FormApp, pilot: object) -> None:
        await until(pilot, lambda: "Cooling water return" in screen_text(app))
        await until(pilot, lambda: "2 tags" in screen_text(app))
        assert "broken.toml" in screen_text(app)
        await send(pilot, "enter")
        await until(pilot, lambda: "is not valid" in words(app))
        await send(pilot, "escape")
        await until(pilot, lambda: isinstance(app.screen, BrowseScreen))
        await send(pilot, "end", "enter")
        await until(pilot, lambda: isinstance(app.screen, FormScreen) and ready(app))
        await send(pilot, "ctrl+o")
        await until(pilot, lambda: isinstance(app.screen, BrowseScreen))

    drive(tag_file.parent, evaluator, play)


def test_a_new_tag_is_begun_from_the_list(tag_file: Path, evaluator: AtOnce) -> None:
    async def play(app: FormApp, pilot: object) -> None:
        await send(pilot, "n")
        await until(pilot, lambda: isinstance(app.screen, dialogs.Prompt))
        await send(pilot, *"FT-77", "enter")
        await until(pilot, lambda: isinstance(app.screen, dialogs.Pick))
        await send(pilot, *"vortex", "enter")
        await until(pilot, lambda: isinstance(app.screen, FormScreen) and ready(app))
        await until(pilot, lambda: "new file" in screen_text(app))
        await send(pilot, "ctrl+s")
        path = tag_file.with_name("FT-77.toml")
        await until(pilot, path.exists)
        assert 'family = "vortex"' in path.read_text()

    drive(tag_file.parent, evaluator, play)


def test_an_empty_folder_says_how_to_begin(tmp_path: Path, evaluator: AtOnce) -> None:
    async def play(app: FormApp, pilot: object) -> None:
        await until(pilot, lambda: "N begins one" in screen_text(app))

    folder = tmp_path / "empty"
    folder.mkdir()
    drive(folder, evaluator, play)


def test_a_file_that_cannot_be_read_leads_to_the_list(tag_file: Path, evaluator: AtOnce) -> None:
    tag_file.write_text("tag = \n")

    async def play(app: FormApp, pilot: object) -> None:
        await until(pilot, lambda: "is not valid" in words(app))

    drive(tag_file, evaluator, play)


def test_a_signal_keeps_what_is_being_typed(tag_file: Path, evaluator: AtOnce) -> None:
    async def play(app: FormApp, pilot: object) -> None:
        await at(app, Address("fluid.name"))
        await send(pilot, *"Brine")
        await app._end(143)

    app = drive(tag_file, evaluator, play)
    assert app.return_code == 143
    (leftover,) = survey(tag_file).leftovers
    assert "Brine" in leftover.state.text


@pytest.mark.skipif(not hasattr(os, "mkfifo"), reason="needs a pipe with a name")
def test_a_pipe_among_the_tags_does_not_hold_up_the_list(tmp_path: Path) -> None:
    pipe = tmp_path / "FT-1.toml"
    os.mkfifo(pipe)
    lines: list[Line] = []
    reading = threading.Thread(target=lambda: lines.append(head_line(pipe)), daemon=True)
    reading.start()
    reading.join(10.0)
    assert "cannot be read" in str(lines)


def test_a_byte_order_mark_does_not_spoil_the_list(tmp_path: Path) -> None:
    file = tmp_path / "FT-1.toml"
    file.write_bytes(b'\xef\xbb\xbftag = "FT-1"\nservice = "Brine"\n')
    assert "Brine" in str(head_line(file))


@pytest.mark.skipif(os.name != "posix", reason="needs symbolic links")
def test_links_that_lead_in_a_circle_are_no_new_tag(tmp_path: Path) -> None:
    link = tmp_path / "FT-1.toml"
    link.symlink_to(link)
    said = open_session(link)
    assert isinstance(said, str)
    assert "cannot be read" in said
