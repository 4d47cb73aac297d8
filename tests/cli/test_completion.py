"""The completion scripts: whole by the shell's own reading, and right when a shell completes."""

from __future__ import annotations

import shutil
import subprocess
from pathlib import Path

import pytest
from cli_process import run

from specsheet import packs
from specsheet.cli.parser import build_parser

COMMANDS = sorted(build_parser()._subparsers._group_actions[0].choices)  # type: ignore[union-attr,arg-type]
CHECKS = {"bash": ["bash", "-n"], "zsh": ["zsh", "-n"], "fish": ["fish", "--no-execute"]}


@pytest.mark.parametrize("shell", CHECKS)
def test_script_is_whole(shell: str, tmp_path: Path) -> None:
    told = run("completion", shell)
    assert told.returncode == 0
    for command in COMMANDS:
        assert command in told.stdout
    if shutil.which(shell) is None:
        pytest.skip(f"{shell} is not installed")
    script = tmp_path / "script"
    script.write_text(told.stdout, encoding="utf-8")
    assert subprocess.run([*CHECKS[shell], str(script)], check=False).returncode == 0


def _complete(words: list[str], folder: Path) -> list[str]:
    """Return what bash offers for the last of the words."""
    script = run("completion", "bash").stdout
    line = " ".join(f"'{word}'" for word in words)
    ask = (
        f"{script}\nCOMP_WORDS=({line}) COMP_CWORD={len(words) - 1}\n"
        "_specsheet\nprintf '%s\\n' \"${COMPREPLY[@]}\""
    )
    done = subprocess.run(
        ["bash", "-c", ask], cwd=folder, capture_output=True, text=True, check=True
    )
    return sorted(line for line in done.stdout.splitlines() if line)


@pytest.mark.skipif(shutil.which("bash") is None, reason="bash is not installed")
@pytest.mark.parametrize(
    ("words", "expected"),
    [
        (["specsheet", ""], COMMANDS),
        (["specsheet", "fam"], ["families"]),
        (["specsheet", "families", "vor"], ["vortex"]),
        (["specsheet", "new", "FT-1", "--family", "ven"], ["venturi_tube"]),
        (["specsheet", "check", "--st"], ["--strict"]),
        (["specsheet", "check", "FT"], ["FT 2.toml", "FT-1.toml"]),
        (["specsheet", "print", "--paper", "L"], ["Letter"]),
        (["specsheet", "schema", "FT"], []),
        (["specsheet", "completion", "f"], ["fish"]),
    ],
    ids=lambda value: " ".join(value) if value and value[0] == "specsheet" else "",
)
def test_bash_completes(words: list[str], expected: list[str], tmp_path: Path) -> None:
    for name in ("FT-1.toml", "FT 2.toml"):
        (tmp_path / name).touch()
    assert _complete(words, tmp_path) == expected


def test_every_family_is_offered() -> None:
    script = run("completion", "bash").stdout
    assert all(key in script for key in packs.family_keys())
