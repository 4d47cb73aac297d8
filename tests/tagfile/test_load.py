"""What may stand where a tag file should: nothing, a directory, other encodings, far too much."""

from __future__ import annotations

import os
import subprocess
import sys
from pathlib import Path

import pytest

from specsheet import tagfile
from specsheet.tagfile import source

GOOD = b"""\
schema = 1
tag = "FT-1"
family = "vortex"
[fluid]
kind = "substance"
substance = "water"
phase = "liquid"
[[points]]
name = "normal"
flow = "20 m3/h"
"""


def the_problem(path: Path) -> str:
    reading = tagfile.load(path)
    assert reading.tag is None
    (problem,) = reading.problems
    name = str(path).replace("\0", r"\x00")  # what would part or end a line is written out
    assert str(problem).startswith(f"{name}:")
    return str(problem)[len(name) :]


def test_a_file(tmp_path: Path) -> None:
    path = tmp_path / "ft.toml"
    path.write_bytes(b"\xef\xbb\xbf" + GOOD.replace(b"\n", b"\r\n"))
    reading = tagfile.load(path)
    assert reading.problems == ()
    assert reading.tag is not None
    assert reading.tag.path == str(path)
    assert reading.tag.folder == ""


def test_no_file(tmp_path: Path) -> None:
    assert the_problem(tmp_path / "no.toml") == ":1: file: there is no such file"


def test_a_directory(tmp_path: Path) -> None:
    assert "is a directory; a file was wanted" in the_problem(tmp_path)


def test_a_pipe_is_not_waited_for(tmp_path: Path) -> None:
    os.mkfifo(tmp_path / "pipe")
    assert "device or pipe" in the_problem(tmp_path / "pipe")


def test_a_name_no_system_takes(tmp_path: Path) -> None:
    assert "is no name of a file" in the_problem(tmp_path / "a\0b")
    assert "cannot be read" in the_problem(tmp_path / ("x" * 5000))


def test_a_file_in_place_of_the_folder(tmp_path: Path) -> None:
    (tmp_path / "a").write_bytes(GOOD)
    assert "cannot be read" in the_problem(tmp_path / "a" / "ft.toml")


def test_a_file_that_may_not_be_read(tmp_path: Path, monkeypatch: pytest.MonkeyPatch) -> None:
    def refuse(_: Path) -> bytes:
        raise PermissionError(13, "Permission denied")

    (tmp_path / "ft.toml").write_bytes(GOOD)
    monkeypatch.setattr(Path, "read_bytes", refuse)  # the superuser may read everything
    assert "may not be read" in the_problem(tmp_path / "ft.toml")


def test_ten_megabytes_are_refused_unread(tmp_path: Path, monkeypatch: pytest.MonkeyPatch) -> None:
    path = tmp_path / "big.toml"
    path.write_bytes(GOOD + b"#" * 10_000_000)
    monkeypatch.setattr(Path, "read_bytes", lambda _: pytest.fail("it was read"))
    assert "holds 10.0 MB; at most 1 MB is read" in the_problem(path)


def test_a_file_just_small_enough(tmp_path: Path) -> None:
    path = tmp_path / "long.toml"
    path.write_bytes(GOOD + b"#" * (source.LARGEST - len(GOOD)))
    assert tagfile.load(path).problems == ()


@pytest.mark.parametrize(
    ("raw", "line", "said"),
    [
        (GOOD.replace(b"water", "Dampf für".encode("latin-1")), 6, "byte 89 (0xFC) is not UTF-8"),
        (GOOD.decode().encode("utf-16"), 1, "encoded as UTF-16"),
        (GOOD.decode().encode("utf-16-be"), 1, "NUL"),
        (b"\xfe\xff" + GOOD.decode().encode("utf-16-be"), 1, "encoded as UTF-16"),
        (GOOD + b"\0\0\0", 11, "NUL"),
        (b"", 1, "the file is empty"),
        (b"\xef\xbb\xbf", 1, "the file is empty"),
        (b"%PDF-1.4 \x00\x01", 1, "NUL"),
    ],
)
def test_a_file_that_is_no_text(tmp_path: Path, raw: bytes, line: int, said: str) -> None:
    path = tmp_path / "ft.toml"
    path.write_bytes(raw)
    found = the_problem(path)
    assert found.startswith(f":{line}: file: ")
    assert said in found


def test_reading_imports_no_heavy_library() -> None:
    code = "import sys, specsheet.tagfile; print(*sys.modules)"
    ran = subprocess.run([sys.executable, "-c", code], capture_output=True, text=True, check=True)
    loaded = set(ran.stdout.split())
    assert not loaded & {"numpy", "pint", "CoolProp", "reportlab", "textual", "tomlkit"}
