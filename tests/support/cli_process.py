"""The program as a process of its own, as a shell starts it."""

from __future__ import annotations

import os
import shutil
import subprocess
import sys
from dataclasses import dataclass
from pathlib import Path

import pytest

import specsheet
from specsheet import packs
from specsheet.cli import main

ROOT = Path(specsheet.__file__).resolve().parents[1]
DEMO = packs.folder() / "demo"
#: tag numbers of the embedded job
DEMO_TAGS = tuple(sorted(path.stem for path in (DEMO / "tags").glob("*.toml")))


def environment(**extra: str) -> dict[str, str]:
    """Return the environment of a user: the package found from anywhere, bytecode kept."""
    kept = {key: text for key, text in os.environ.items() if key != "PYTHONDONTWRITEBYTECODE"}
    return {**kept, "PYTHONPATH": str(ROOT), **extra}


def run(*arguments: str | Path, cwd: Path | None = None) -> subprocess.CompletedProcess[str]:
    """Run the program without a terminal and return what it said."""
    return subprocess.run(
        [sys.executable, "-m", "specsheet", *map(str, arguments)],
        cwd=cwd,
        capture_output=True,
        encoding="utf-8",
        stdin=subprocess.DEVNULL,
        timeout=120,
        check=False,
        env=environment(COLUMNS="120"),
    )


@dataclass(frozen=True, slots=True)
class Told:
    """What a run within the test's own process said."""

    returncode: int
    stdout: str
    stderr: str


def call(capsys: pytest.CaptureFixture[str], *arguments: str | Path) -> Told:
    """Run a command in this process: quicker, for tables of many inputs."""
    status = main([str(argument) for argument in arguments])
    written = capsys.readouterr()
    return Told(status, written.out, written.err)


def demo_job(folder: Path) -> Path:
    """Copy the embedded job into a folder of the test and return it."""
    return Path(shutil.copytree(DEMO, folder / "job"))


def demo_text(tag: str) -> str:
    """Return the text of a tag file of the embedded job."""
    return (DEMO / "tags" / f"{tag}.toml").read_text(encoding="utf-8")
