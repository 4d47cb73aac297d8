"""The journal: what is typed outlives the session, whatever ends it."""

from __future__ import annotations

import errno
import os
import subprocess
import sys
from pathlib import Path

import pytest

from specsheet.tui import journal
from specsheet.tui.address import Address
from specsheet.tui.journal import state_folder
from specsheet.tui.leftovers import survey
from specsheet.tui.opening import open_session
from specsheet.tui.saving import Conflict
from specsheet.tui.session import Session

SIZE = Address("line.size")

needs_permissions = pytest.mark.skipif(
    sys.platform == "win32" or not hasattr(os, "geteuid") or os.geteuid() == 0,
    reason="the superuser may write anywhere",
)


def opened(path: Path) -> Session:
    session = open_session(path)
    assert isinstance(session, Session)
    return session


def files() -> list[Path]:
    return list(state_folder().glob(".*")) if state_folder().exists() else []


def test_what_is_committed_is_found_by_the_next_session(tag_file: Path) -> None:
    session = opened(tag_file)
    session.edit(SIZE, "DN 100")
    session.edit(Address("points.flow", 1), "30 apples")
    session.close()
    (leftover,) = survey(tag_file).leftovers
    assert leftover.edits == 2
    assert leftover.name == "Flow, normal"
    after = opened(tag_file)
    after.recover(leftover)
    assert after.get(SIZE) == "DN 100"
    assert after.get(Address("points.flow", 1)) == "30 apples"
    assert "apples" in after.refusal(Address("points.flow", 1))
    assert after.undo() == "recovered edits"
    assert after.get(SIZE) == "DN 80"


def test_a_killed_process_leaves_its_edits(tag_file: Path) -> None:
    code = (
        "import os, sys; from pathlib import Path;"
        "from specsheet.tui.opening import open_session; from specsheet.tui.address import Address;"
        "s = open_session(Path(sys.argv[1])); s.edit(Address('line.size'), 'DN 125');"
        "os.kill(os.getpid(), 9)"
    )
    subprocess.run([sys.executable, "-c", code, str(tag_file)], check=False)
    (leftover,) = survey(tag_file).leftovers
    assert 'size = "DN 125"' in leftover.state.text


def test_a_session_does_not_take_its_own_journal_for_that_of_another(tag_file: Path) -> None:
    session = opened(tag_file)
    assert session.journal is None
    session.edit(SIZE, "DN 100")
    found = survey(tag_file, session.journal)
    assert not found.busy
    assert found.leftovers == ()
    session.close()


def test_a_running_session_is_told_of_and_its_edits_are_not_offered(tag_file: Path) -> None:
    session = opened(tag_file)
    session.edit(SIZE, "DN 100")
    found = survey(tag_file)
    assert found.busy
    assert found.leftovers == ()
    session.close()


@pytest.mark.parametrize("way", ["save", "undo", "give_up"])
def test_nothing_is_left_when_nothing_is_unsaved(tag_file: Path, way: str) -> None:
    session = opened(tag_file)
    session.edit(SIZE, "DN 100")
    assert files()
    getattr(session, way)()
    assert files() == []
    assert survey(tag_file).leftovers == ()


def test_a_line_cut_short_by_a_full_disk_is_passed_over(tag_file: Path) -> None:
    session = opened(tag_file)
    session.edit(SIZE, "DN 100")
    session.edit(SIZE, "DN 125")
    session.close()
    (file,) = files()
    file.write_bytes(file.read_bytes()[:-40])
    (leftover,) = survey(tag_file).leftovers
    assert 'size = "DN 100"' in leftover.state.text


def test_the_folder_is_private(tag_file: Path) -> None:
    session = opened(tag_file)
    session.edit(SIZE, "DN 100")
    if sys.platform != "win32":
        assert state_folder().stat().st_mode & 0o077 == 0
    session.close()


def test_without_a_state_folder_the_journal_stands_beside_the_file(
    tag_file: Path, monkeypatch: pytest.MonkeyPatch
) -> None:
    blocked = tag_file.parent / "blocked"
    blocked.write_text("a file where a folder is wanted")
    monkeypatch.setenv("XDG_STATE_HOME", str(blocked))
    session = opened(tag_file)
    session.edit(SIZE, "DN 100")
    assert session.trouble == ""
    session.close()
    assert [f.parent for f in tag_file.parent.glob(".*.unsaved")] == [tag_file.parent]
    assert survey(tag_file).leftovers


def test_where_no_journal_can_be_written_the_user_is_told(
    tag_file: Path, monkeypatch: pytest.MonkeyPatch
) -> None:
    blocked = tag_file.parent / "blocked"
    blocked.write_text("")
    monkeypatch.setattr(journal, "places", lambda _: (blocked / "x", blocked / "y"))
    session = opened(tag_file)
    assert session.edit(SIZE, "DN 100") == ""
    assert "memory only" in session.trouble
    assert session.get(SIZE) == "DN 100"


def test_a_file_changed_on_disk_is_not_overwritten(tag_file: Path) -> None:
    session = opened(tag_file)
    session.edit(SIZE, "DN 100")
    theirs = tag_file.read_text() + "# theirs\n"
    tag_file.write_text(theirs)
    outcome = session.save()
    assert outcome.conflict is Conflict.CHANGED
    assert tag_file.read_text() == theirs
    assert session.dirty
    session.reload(theirs, theirs.encode())
    assert session.text == theirs
    session.undo()
    assert session.get(SIZE) == "DN 100"
    assert session.save().conflict is Conflict.NONE


def test_a_file_removed_from_disk_is_asked_about(tag_file: Path) -> None:
    session = opened(tag_file)
    session.edit(SIZE, "DN 100")
    tag_file.unlink()
    assert session.save().conflict is Conflict.VANISHED
    assert session.save(force=True).conflict is Conflict.NONE
    assert tag_file.exists()


def test_saving_under_another_name_replaces_nothing(tag_file: Path) -> None:
    session = opened(tag_file)
    session.edit(SIZE, "DN 100")
    other = tag_file.with_name("FT-2.toml")
    other.write_text("mine")
    assert session.save_as(other).conflict is Conflict.EXISTS
    assert other.read_text() == "mine"
    fresh = tag_file.with_name("FT-3.toml")
    assert session.save_as(fresh).conflict is Conflict.NONE
    assert session.path == fresh
    assert "DN 80" in tag_file.read_text()
    assert not session.dirty


def test_a_disk_that_refuses_keeps_the_edits(
    tag_file: Path, monkeypatch: pytest.MonkeyPatch
) -> None:
    def full(*_: object) -> None:
        raise OSError(errno.ENOSPC, "No space left on device")

    session = opened(tag_file)
    session.edit(SIZE, "DN 100")
    monkeypatch.setattr(sys.modules["specsheet.tagfile.writing"], "_replace", full)
    outcome = session.save()
    assert outcome.conflict is Conflict.FAILED
    assert "full" in outcome.message
    assert "edits are kept" in outcome.message
    assert session.dirty
    session.close()
    assert survey(tag_file).leftovers


@needs_permissions
def test_a_read_only_folder_keeps_the_edits(tag_file: Path) -> None:
    session = opened(tag_file)
    session.edit(SIZE, "DN 100")
    tag_file.parent.chmod(0o500)
    try:
        outcome = session.save()
    finally:
        tag_file.parent.chmod(0o700)
    assert outcome.conflict is Conflict.FAILED
    assert "permissions" in outcome.message
    assert session.dirty
