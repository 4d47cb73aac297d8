"""What users get wrong, through the command line: a message, the right status, never a traceback.

Two kinds of answer: a problem (the text cannot be used: status 2, on stderr, with file, line and
entry) and a finding (the text is sound and the tag is not: status 1 or 0, on stdout).
"""

from __future__ import annotations

import errno
import os
import re
import subprocess
import sys
from pathlib import Path

import pytest
from cli_process import call, demo_job, demo_text, environment, run

from specsheet.cli import main
from specsheet.findings import Level

STEAM = demo_text("FT-2104")
CONDENSATE = demo_text("FT-2305")


def _swap(text: str, old: str, new: str) -> str:
    assert old in text, f"the embedded job no longer holds {old!r}"
    return text.replace(old, new, 1)


UNREADABLE: list[tuple[str, bytes, str]] = [
    ("empty", b"", "the file is empty"),
    ("white", b"\n\n  \n", "the file is empty"),
    ("no TOML", b"tag = FT-1\n", "1: "),
    ("unclosed text", b'schema = 1\ntag = "FT-1\n', "2: "),
    ("UTF-16", STEAM.encode("utf-16"), "UTF-8 was wanted"),
    ("Latin-1", STEAM.replace("heating", "hëating").encode("latin-1"), "UTF-8"),
    ("NUL byte", b"schema = 1\n\0\n", "2: file: a NUL byte"),
    ("10 MB", STEAM.encode() + b"# more\n" * 1_500_000, "MB is read"),
    ("deeply nested", b"a = " + b"[" * 5000 + b"]" * 5000 + b"\n", "1: "),
    ("an archive", b"PK\x03\x04\xff\xfe\x00", ""),
]


@pytest.mark.parametrize("command", ["derive", "check", "print"])
@pytest.mark.parametrize(
    ("content", "words"), [x[1:] for x in UNREADABLE], ids=[x[0] for x in UNREADABLE]
)
def test_unreadable_file(
    content: bytes, words: str, command: str, tmp_path: Path, capsys: pytest.CaptureFixture[str]
) -> None:
    file = tmp_path / "FT-1.toml"
    file.write_bytes(content)
    told = call(
        capsys, command, file, *(["--output", tmp_path / "output"] if command == "print" else [])
    )
    assert told.returncode == 2
    assert told.stdout == ""
    assert told.stderr.startswith(f"{file}:")
    assert re.match(r":\d+: \w+: ", told.stderr.removeprefix(str(file)))
    assert words in told.stderr
    assert "Traceback" not in told.stderr
    assert not (tmp_path / "output").exists()


PROBLEMS: list[tuple[str, str, str, str]] = [
    ("unknown family", _swap(STEAM, '"orifice_concentric"', '"orifice_konzentric"'), "family", ""),
    ("no points", STEAM[: STEAM.index("[[points]]")], "points", ""),
    ("comma decimal", _swap(STEAM, '"3.1 t/h"', '"3,1 t/h"'), "points.normal.flow", "3.1 t/h"),
    ("negative", _swap(STEAM, '"3.1 t/h"', '"-3.1 t/h"'), "points.normal.flow", "the least value"),
    ("below vacuum", _swap(STEAM, '"7.0 bar(g)"', '"-7 bar(g)"'), "points.minimum.pressure", ""),
    ("no unit", _swap(STEAM, '"3.1 t/h"', '"3.1"'), "points.normal.flow", ""),
    ("wrong kind", _swap(STEAM, '"3.1 t/h"', '"3.1 bar(g)"'), "points.normal.flow", ""),
    ("gauge left open", _swap(STEAM, '"7.0 bar(g)"', '"7.0 bar"'), "points.minimum.pressure", "g"),
    ("not a number", _swap(STEAM, '"3.1 t/h"', '"nan t/h"'), "points.normal.flow", ""),
    ("TOML's own nan", _swap(STEAM, '"3.1 t/h"', "nan"), "points.normal.flow", ""),
    ("TOML's own inf", _swap(STEAM, '"3.1 t/h"', "inf"), "points.normal.flow", ""),
    ("overflow", _swap(STEAM, '"3.1 t/h"', '"1e999 t/h"'), "points.normal.flow", ""),
    (
        "below absolute zero",
        _swap(STEAM, '"182 degC"', '"-300 degC"'),
        "points.minimum.temperature",
        "",
    ),
    ("unknown entry", _swap(STEAM, "taps  ", "tapz  "), "meter.tapz", "taps"),
    ("a table for a value", _swap(STEAM, '"3.1 t/h"', "{ a = 1 }"), "points.normal.flow", ""),
    ("unknown size", _swap(STEAM, '"DN 150"', '"DN 151"'), "line.size", ""),
    ("newer format", _swap(STEAM, "schema   = 1", "schema = 99"), "schema", ""),
]


@pytest.mark.parametrize(
    ("text", "field", "words"), [x[1:] for x in PROBLEMS], ids=[x[0] for x in PROBLEMS]
)
def test_entry_that_cannot_be_used(
    text: str, field: str, words: str, tmp_path: Path, capsys: pytest.CaptureFixture[str]
) -> None:
    file = tmp_path / "FT-1.toml"
    file.write_text(text, encoding="utf-8")
    told = call(capsys, "derive", file)
    assert told.returncode == 2
    assert "Traceback" not in told.stderr
    found = re.search(rf"^{re.escape(str(file))}:(\d+): {re.escape(field)}: (.+)$", told.stderr, 8)
    assert found, told.stderr
    assert words in found[2]


FINDINGS: list[tuple[str, str, str, str]] = [
    ("zero flow", _swap(STEAM, '"3.1 t/h"', '"0 t/h"'), "flow-not-positive", "points.normal.flow"),
    ("absurd flow", _swap(STEAM, '"3.1 t/h"', '"3.1e9 t/h"'), "bore-impossible", "meter."),
    ("absurd pressure", _swap(STEAM, '"7.0 bar(g)"', '"7e9 bar(g)"'), "fluid-limit", "points."),
    ("flame", _swap(STEAM, '"182 degC"', '"18200 degC"'), "fluid-limit", "points.minimum."),
    ("wet, not dry", _swap(STEAM, '"182 degC"', '"120 degC"'), "phase-disagrees", "fluid.phase"),
    ("boiling", _swap(CONDENSATE, '"102 degC"', '"112 degC"'), "flashing", "points.minimum."),
]


@pytest.mark.parametrize(
    ("text", "code", "field"), [x[1:] for x in FINDINGS], ids=[x[0] for x in FINDINGS]
)
def test_sound_text_of_an_unsound_tag(
    text: str, code: str, field: str, tmp_path: Path, capsys: pytest.CaptureFixture[str]
) -> None:
    file = tmp_path / "FT-1.toml"
    file.write_text(text, encoding="utf-8")
    told = call(capsys, "check", file)
    assert told.returncode == 1
    assert f": {Level.STOP} {code}: {field}" in told.stdout
    assert "Traceback" not in told.stderr


def test_directory_in_place_of_a_file(tmp_path: Path) -> None:
    (tmp_path / "FT-1.toml").mkdir()
    told = run("derive", tmp_path / "FT-1.toml")
    assert (told.returncode, told.stdout) == (2, "")
    assert "is a directory; a file was wanted" in told.stderr


@pytest.mark.parametrize("command", ["derive", "check", "print"])
def test_nothing_at_the_path(command: str, tmp_path: Path) -> None:
    told = run(command, tmp_path / "absent" / "FT-1.toml")
    assert (told.returncode, told.stdout) == (2, "")
    assert "FT-1.toml" in told.stderr
    assert "Traceback" not in told.stderr


@pytest.mark.skipif(os.name != "posix", reason="a name with a line end")
def test_a_line_end_in_the_name_of_a_file_parts_no_line(tmp_path: Path) -> None:
    path = tmp_path / "a\nb.toml"
    path.write_text(
        'schema = 1\ntag = "FT-1"\nfamily = "vortex"\ncolour = "red"\n', encoding="utf-8"
    )
    done = run("check", str(path))
    assert done.returncode == 2
    lines = (done.stdout + done.stderr).splitlines()
    named = [line for line in lines if not line.startswith("1 tag")]
    assert named != []
    assert all(line.startswith(f"{tmp_path}/a\\nb.toml:") for line in named)


def test_folder_without_tags(tmp_path: Path) -> None:
    told = run("check", cwd=tmp_path)
    assert told.returncode == 2
    assert "no tag file is in this folder" in told.stderr


def test_one_bad_file_does_not_hide_the_others(tmp_path: Path) -> None:
    job = demo_job(tmp_path)
    (job / "tags" / "FT-0001.toml").write_text("", encoding="utf-8")
    told = run("check", job)
    assert told.returncode == 2
    assert "FT-0001.toml:1: file: the file is empty" in told.stderr
    assert "FT-2305.toml: stop cavitation" in told.stdout


def test_sheet_into_what_is_no_folder(tmp_path: Path) -> None:
    job = demo_job(tmp_path)
    (job / "output").write_text("a file", encoding="utf-8")
    told = run("print", "tags/FT-2104.toml", cwd=job)
    assert (told.returncode, told.stdout) == (2, "")
    assert "was not saved" in told.stderr
    assert (job / "output").read_text(encoding="utf-8") == "a file"


@pytest.mark.skipif(not Path("/proc/self").is_dir(), reason="needs a folder nobody may write to")
@pytest.mark.parametrize(
    "arguments",
    [("new", "FT-1", "--family", "vortex", "--folder", "/proc/self"), ("demo", "/proc")],
)
def test_folder_that_cannot_be_written_to(arguments: tuple[str, ...], tmp_path: Path) -> None:
    told = run(*arguments, cwd=tmp_path)
    assert (told.returncode, told.stdout) == (2, "")
    assert "Traceback" not in told.stderr
    assert told.stderr.strip()


@pytest.mark.skipif(os.name != "posix" or os.geteuid() == 0, reason="root may write anywhere")
def test_read_only_folder(tmp_path: Path) -> None:
    job = demo_job(tmp_path)
    (job / "output").mkdir(mode=0o500)
    told = run("print", "tags/FT-2104.toml", cwd=job)
    assert (told.returncode, told.stdout) == (2, "")
    assert list((job / "output").iterdir()) == []


def _full(*_: object) -> int:
    raise OSError(errno.ENOSPC, os.strerror(errno.ENOSPC))


@pytest.mark.parametrize(
    "arguments",
    [
        ["print", "job/tags/FT-2104.toml", "--output", "job"],
        ["new", "FT-1", "--family", "vortex", "--folder", "job"],
        ["demo", "job/demo", "--output", "job", "--no-form"],
    ],
    ids=lambda arguments: arguments[0],
)
def test_full_disk_leaves_no_half_written_file(
    arguments: list[str],
    tmp_path: Path,
    monkeypatch: pytest.MonkeyPatch,
    capsys: pytest.CaptureFixture[str],
) -> None:
    job = demo_job(tmp_path)
    old = job / "FT-2104.pdf"
    old.write_bytes(b"the sheet of last month")
    monkeypatch.chdir(tmp_path)
    before = sorted(path for path in job.rglob("*") if path.is_file())
    monkeypatch.setattr(os, "write", _full)
    assert main(arguments) == 2
    monkeypatch.undo()
    assert "the disk is full" in capsys.readouterr().err
    assert sorted(path for path in job.rglob("*") if path.is_file()) == before
    assert old.read_bytes() == b"the sheet of last month"


@pytest.mark.skipif(not Path("/dev/full").exists(), reason="needs the device that is always full")
def test_output_that_cannot_be_written() -> None:
    with Path("/dev/full").open("w") as full:
        done = subprocess.run(
            [sys.executable, "-m", "specsheet", "families"],
            stdout=full,
            stderr=subprocess.PIPE,
            text=True,
            check=False,
        )
    assert done.returncode == 2
    assert done.stderr.startswith("the output: cannot be written")
    assert "Traceback" not in done.stderr


@pytest.mark.skipif(os.name != "posix", reason="needs a shell that closes streams")
@pytest.mark.parametrize(
    ("words", "closed", "status", "said"),
    [
        ("families", ">&-", 2, "the output: cannot be written"),
        ("--help", ">&-", 2, "the output: cannot be written"),
        ("check absent.toml", "2>&-", 2, ""),
        ("families", "2>&-", 0, ""),
        ("form", "<&-", 2, "The form needs a terminal"),
    ],
)
def test_a_stream_that_the_caller_closed(
    words: str, closed: str, status: int, said: str, tmp_path: Path
) -> None:
    done = subprocess.run(
        ["bash", "-c", f"{sys.executable} -m specsheet {words} {closed}"],
        capture_output=True,
        text=True,
        check=False,
        cwd=tmp_path,
        env=environment(),
    )
    assert done.returncode == status
    assert said in done.stderr
    assert "Traceback" not in done.stderr
    assert "Exception" not in done.stderr


def test_reader_of_the_output_that_has_gone() -> None:
    done = subprocess.run(
        ["bash", "-o", "pipefail", "-c", f"{sys.executable} -m specsheet schema | head -1"],
        capture_output=True,
        text=True,
        check=False,
    )
    assert done.returncode == 0
    assert done.stderr == ""


def test_form_without_a_terminal(tmp_path: Path) -> None:
    told = run("form", demo_job(tmp_path))
    assert (told.returncode, told.stdout) == (2, "")
    assert "needs a terminal" in told.stderr
    assert "specsheet derive" in told.stderr
