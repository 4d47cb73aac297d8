"""A job of many tags on several processes: the same words, files and status as on one."""

from __future__ import annotations

import os
import signal
import subprocess
import sys
import time
from pathlib import Path

import psutil
import pytest
from cli_process import demo_text, environment

pytestmark = pytest.mark.skipif(os.name != "posix", reason="signals and forks of POSIX")

#: the program on a processor of so many cores, its evaluation spoiled where {spoil} says so
PROGRAM = """\
import os, signal, sys
from specsheet.cli import main, spread
from specsheet.cli.commands import check
spread.cores = lambda: {cores}
real = check.findings_settled
def evaluate(tag):
    {spoil}
    return real(tag)
check.findings_settled = evaluate
sys.exit(main({arguments!r}))
"""
TAGS = 60
TEXTS = [demo_text(tag) for tag in ("FT-2104", "FT-2305", "FT-5102")]


def _start(job: Path, *arguments: str, cores: int, spoil: str = "pass") -> subprocess.Popen[str]:
    program = PROGRAM.format(cores=cores, spoil=spoil, arguments=list(arguments))
    return subprocess.Popen(
        [sys.executable, "-c", program],
        cwd=job,
        stdin=subprocess.DEVNULL,
        stdout=subprocess.PIPE,
        stderr=subprocess.PIPE,
        encoding="utf-8",
        env=environment(),
        start_new_session=True,
    )


def _run(job: Path, *arguments: str, cores: int, spoil: str = "pass") -> tuple[int, str, str]:
    with _start(job, *arguments, cores=cores, spoil=spoil) as child:
        out, err = child.communicate(timeout=120)
    return child.returncode, out, err


@pytest.fixture
def job(tmp_path: Path) -> Path:
    """Return a job of many tags."""
    tags = tmp_path / "job" / "tags"
    tags.mkdir(parents=True)
    for place in range(TAGS):
        text = TEXTS[place % len(TEXTS)]
        head = text.index('tag      = "')
        named = f'{text[:head]}tag = "FT-{place}"{text[text.index(chr(10), head) :]}'
        (tags / f"FT-{place}.toml").write_text(named, encoding="utf-8")
    (tmp_path / "job" / "job.toml").write_text('schema = 1\ntitle = "many"\n', encoding="utf-8")
    return tmp_path / "job"


def _spoil_files(job: Path) -> None:
    """Give a file without TOML, an entry that cannot be read, and a number that comes twice."""
    tags = job / "tags"
    (tags / "FT-40.toml").write_text("flow = 3 t/h\n", encoding="utf-8")
    text = (tags / "FT-45.toml").read_text(encoding="utf-8")
    (tags / "FT-45.toml").write_text(text.replace("bar(g)", "bar"), encoding="utf-8")
    text = (tags / "FT-50.toml").read_text(encoding="utf-8")
    (tags / "FT-50.toml").write_text(text.replace('"FT-50"', '"ft-30"'), encoding="utf-8")


def test_check_says_the_same(job: Path) -> None:
    arguments = ("check", "--all", "--set", "points.normal.pressure=5 bar(g)")
    assert _run(job, *arguments, cores=3) == _run(job, *arguments, cores=1)
    _spoil_files(job)
    status, out, err = _run(job, "check", "--strict", cores=3)
    assert (status, out, err) == _run(job, "check", "--strict", cores=1)
    assert status == 2
    named = [line.split(":")[0] for line in err.splitlines()]
    assert named[:2] == ["tags/FT-40.toml", "tags/FT-45.toml"]
    assert named[-2:] == ["tags/FT-50.toml", f"{TAGS - 1} tags"]
    assert 'FT-30.toml is tag "ft-30" already; each tag needs its own number' in err


def test_print_writes_the_same(job: Path) -> None:
    _spoil_files(job)
    several = _run(job, "print", "--output", "several", cores=3)
    one = _run(job, "print", "--output", "one", cores=1)
    assert several[0] == 2
    assert several == tuple(
        text.replace("one/", "several/") if isinstance(text, str) else text for text in one
    )
    sheets = sorted(path.name for path in (job / "one").iterdir())
    assert len(sheets) == TAGS - 1  # one is no TOML; FT-30 and ft-30 name two files
    for name in sheets:
        assert (job / "several" / name).read_bytes() == (job / "one" / name).read_bytes()
    assert sorted(path.name for path in (job / "several").iterdir()) == sheets


def test_print_into_what_is_no_folder_says_so_once(job: Path) -> None:
    (job / "output").write_text("a file", encoding="utf-8")
    status, out, err = _run(job, "print", cores=3)
    assert (status, out) == (2, "")
    assert len(err.splitlines()) == 1
    assert "was not saved" in err


def test_a_tag_that_ends_its_process_is_named_and_no_other_is_lost(job: Path) -> None:
    spoil = "tag.name == 'FT-41' and os.kill(os.getpid(), signal.SIGKILL)"
    status, out, err = _run(job, "check", cores=3, spoil=spoil)
    assert status == 2
    message, totals = err.splitlines()
    assert message.startswith("tags/FT-41.toml:1: file: the process that worked on this tag ended")
    assert totals.startswith(f"{TAGS - 1} tags: ")
    whole = _run(job, "check", cores=1)[1].splitlines()
    assert out.splitlines() == [line for line in whole if not line.startswith("tags/FT-41.toml")]


def _pool_of(child: subprocess.Popen[str]) -> list[psutil.Process]:
    """Return the processes that work for the program, once they are there."""
    for _ in range(600):
        found = psutil.Process(child.pid).children()
        if len(found) == 2:
            return found
        time.sleep(0.05)
    raise AssertionError("no process was started")


@pytest.mark.parametrize(
    ("sent", "seconds"), [(signal.SIGINT, 300), (signal.SIGKILL, 1)], ids=["ctrl+c", "killed"]
)
def test_a_program_that_is_stopped_leaves_no_process(
    job: Path, sent: signal.Signals, seconds: int
) -> None:
    # ctrl+c ends what is at work; a process whose parent was killed ends after its tag
    spoil = f"__import__('time').sleep({seconds} if int(tag.name[3:]) > 30 else 0)"
    with _start(job, "check", cores=2, spoil=spoil) as child:
        pool = _pool_of(child)
        time.sleep(0.3)
        if sent == signal.SIGINT:
            os.killpg(child.pid, sent)  # as a terminal does: every process gets it
        else:
            child.send_signal(sent)
        _, err = child.communicate(timeout=20)
    _, left = psutil.wait_procs(pool, timeout=20)
    assert left == []
    if sent == signal.SIGINT:
        assert child.returncode == 130
        assert err == "stopped by the keyboard; files already written are whole\n"
