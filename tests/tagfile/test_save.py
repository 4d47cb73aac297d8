"""Saving: the new file whole, or the old one untouched and a message that says why."""

from __future__ import annotations

import errno
import os
import stat
from pathlib import Path
from types import SimpleNamespace

import pytest

from specsheet.tagfile import SaveError, save, stamp

OLD, NEW = 'tag = "A"\n', 'tag = "B"\r\n# µ°C\n'


@pytest.fixture
def path(tmp_path: Path) -> Path:
    path = tmp_path / "ft.toml"
    path.write_text(OLD, encoding="utf-8")
    return path


def untouched(path: Path) -> bool:
    """Tell whether the file is as it was and nothing was left beside it."""
    return path.read_text(encoding="utf-8") == OLD and list(path.parent.iterdir()) == [path]


def test_replaces_the_file_byte_by_byte(path: Path) -> None:
    save(path, NEW)
    assert path.read_bytes() == NEW.encode()
    assert list(path.parent.iterdir()) == [path]


def test_writes_a_new_file_with_the_mode_the_user_wants(tmp_path: Path) -> None:
    mask = os.umask(0o027)
    try:
        save(tmp_path / "new.toml", NEW)
    finally:
        os.umask(mask)
    assert stat.S_IMODE((tmp_path / "new.toml").stat().st_mode) == 0o640


@pytest.mark.parametrize("mode", [0o600, 0o664, 0o755])
def test_keeps_the_mode(path: Path, mode: int) -> None:
    path.chmod(mode)
    save(path, NEW)
    assert stat.S_IMODE(path.stat().st_mode) == mode


def test_keeps_a_symbolic_link(path: Path, tmp_path: Path) -> None:
    link = tmp_path / "link.toml"
    link.symlink_to(path)
    save(link, NEW)
    assert link.is_symlink()
    assert path.read_bytes() == NEW.encode()


def test_a_circle_of_links(tmp_path: Path) -> None:
    (tmp_path / "a").symlink_to(tmp_path / "b")
    (tmp_path / "b").symlink_to(tmp_path / "a")
    with pytest.raises(SaveError, match="circle"):
        save(tmp_path / "a", NEW)


@pytest.mark.parametrize("name", ["write", "fsync"])
@pytest.mark.parametrize(
    ("number", "said"),
    [(errno.ENOSPC, "the disk is full"), (errno.EDQUOT, "quota"), (errno.EIO, "output error")],
)
def test_a_full_disk(
    path: Path, monkeypatch: pytest.MonkeyPatch, name: str, number: int, said: str
) -> None:
    def fail(*_: object) -> int:
        raise OSError(number, os.strerror(number))

    monkeypatch.setattr(os, name, fail)
    with pytest.raises(SaveError, match=said) as caught:
        save(path, NEW)
    monkeypatch.undo()
    assert str(caught.value).startswith(f"{path} was not saved: ")
    assert untouched(path)


def test_a_disk_that_fills_half_way(path: Path, monkeypatch: pytest.MonkeyPatch) -> None:
    real, calls = os.write, []

    def half(handle: int, data: memoryview) -> int:
        calls.append(len(data))
        if len(calls) > 1:
            raise OSError(errno.ENOSPC, "No space left on device")
        return real(handle, data[:5])

    monkeypatch.setattr(os, "write", half)
    with pytest.raises(SaveError, match="full"):
        save(path, NEW)
    monkeypatch.undo()
    assert calls == [len(NEW.encode()), len(NEW.encode()) - 5]
    assert untouched(path)


def test_a_read_only_file_system_is_not_taken_for_permissions(
    path: Path, monkeypatch: pytest.MonkeyPatch
) -> None:
    """As the system tells it of a file on a mount that is read-only (POSIX, statvfs)."""
    sealed = SimpleNamespace(f_flag=os.ST_RDONLY)
    monkeypatch.setattr(os, "access", lambda *_: False)
    monkeypatch.setattr(os, "statvfs", lambda _: sealed)
    with pytest.raises(SaveError, match="the file system is read-only"):
        save(path, NEW)
    sealed.f_flag = 0
    with pytest.raises(SaveError, match="look at the permissions"):
        save(path, NEW)
    monkeypatch.undo()
    assert untouched(path)


def test_a_move_that_fails(path: Path, monkeypatch: pytest.MonkeyPatch) -> None:
    def fail(*_: object) -> None:
        raise OSError(errno.EROFS, "Read-only file system")

    monkeypatch.setattr(Path, "replace", fail)
    with pytest.raises(SaveError, match="read-only"):
        save(path, NEW)
    monkeypatch.undo()
    assert untouched(path)


def test_short_writes_are_carried_on(path: Path, monkeypatch: pytest.MonkeyPatch) -> None:
    real = os.write
    monkeypatch.setattr(os, "write", lambda handle, data: real(handle, data[:3]))
    save(path, NEW)
    assert path.read_bytes() == NEW.encode()


@pytest.mark.skipif(os.geteuid() == 0, reason="the superuser may write everywhere")
def test_a_read_only_folder(path: Path) -> None:
    path.parent.chmod(0o555)
    try:
        with pytest.raises(SaveError, match="may not be written"):
            save(path, NEW)
    finally:
        path.parent.chmod(0o755)
    assert untouched(path)


def test_a_folder_the_system_calls_read_only(path: Path, monkeypatch: pytest.MonkeyPatch) -> None:
    real = os.open

    def refuse(name: str, flags: int, *more: int, **named: int) -> int:
        if flags & os.O_CREAT:
            raise PermissionError(errno.EACCES, "Permission denied", name)
        return real(name, flags, *more, **named)

    monkeypatch.setattr(os, "open", refuse)
    with pytest.raises(SaveError, match="may not be written"):
        save(path, NEW)
    monkeypatch.undo()
    assert untouched(path)


def test_a_read_only_file(path: Path, monkeypatch: pytest.MonkeyPatch) -> None:
    monkeypatch.setattr(os, "access", lambda *_: False)
    with pytest.raises(SaveError, match="may not be written"):
        save(path, NEW)
    assert untouched(path)


@pytest.mark.parametrize(
    ("name", "said"),
    [
        (".", "it is a directory"),
        ("no/ft.toml", "its folder does not exist"),
        ("ft.toml/x.toml", "what should be its folder is a file"),
        ("x" * 300, "too long"),
        ("a\0b", "null"),
    ],
)
def test_places_where_no_file_can_be(path: Path, name: str, said: str) -> None:
    with pytest.raises(SaveError, match=said):
        save(path.parent / name, NEW)
    assert untouched(path)


def test_a_device(tmp_path: Path) -> None:
    os.mkfifo(tmp_path / "pipe")
    with pytest.raises(SaveError, match="device or pipe"):
        save(tmp_path / "pipe", NEW)


def test_a_text_that_is_no_unicode(path: Path) -> None:
    with pytest.raises(SaveError, match="surrogates"):
        save(path, "\ud800")
    assert untouched(path)


def test_a_folder_that_cannot_be_flushed_is_no_failure(
    path: Path, monkeypatch: pytest.MonkeyPatch
) -> None:
    real = os.fsync

    def fail_on_folders(handle: int) -> None:
        if stat.S_ISDIR(os.fstat(handle).st_mode):
            raise OSError(errno.EINVAL, "Invalid argument")
        real(handle)

    monkeypatch.setattr(os, "fsync", fail_on_folders)
    save(path, NEW)
    assert path.read_bytes() == NEW.encode()


def test_file_and_folder_are_flushed(path: Path, monkeypatch: pytest.MonkeyPatch) -> None:
    flushed = []
    monkeypatch.setattr(
        os, "fsync", lambda handle: flushed.append(stat.S_ISDIR(os.fstat(handle).st_mode))
    )
    save(path, NEW)
    assert flushed == [False, True]


def test_a_stamp_tells_whether_somebody_else_changed_the_file(path: Path) -> None:
    first = stamp(path)
    assert first is not None
    assert stamp(path) == first
    mine = save(path, NEW)
    assert mine != first
    assert stamp(path) == mine
    path.write_bytes(NEW.replace("B", "C").encode())
    os.utime(path, ns=(1, 1))
    assert stamp(path) != mine
    path.unlink()
    assert stamp(path) is None
