"""The blocks of README.md that are real: what they say is written and run, in order.

A block follows an HTML comment of one line:

* ``<!-- tour: file NAME -->``  its text is a file, written into the folder of the tour;
* ``<!-- tour -->``             its lines with ``$`` are commands, the rest is what they said.
"""

from __future__ import annotations

import os
import re
import subprocess
import sys
from dataclasses import dataclass
from pathlib import Path

from cli_process import environment
from house import ROOT

README = ROOT / "README.md"
_BLOCK = re.compile(
    r"<!-- tour(?:: file (?P<file>\S+))? -->\n```\w*\n(?P<body>.*?)^```$", re.M | re.S
)


@dataclass(frozen=True, slots=True)
class Block:
    """One block: where its text stands in README.md, and as which file, if it is one."""

    start: int
    end: int
    body: str
    file: str


def blocks(text: str) -> list[Block]:
    """Return the real blocks of a text."""
    return [
        Block(found.start("body"), found.end("body"), found["body"], found["file"] or "")
        for found in _BLOCK.finditer(text)
    ]


def play(text: str, folder: Path) -> str:
    """Return the text with every block as it should stand, by writing and running them."""
    played, done = "", 0
    for block in blocks(text):
        played += text[done : block.start]
        played += _written(block, folder) if block.file else _run(block, folder)
        done = block.end
    return played + text[done:]


def _written(block: Block, folder: Path) -> str:
    (folder / block.file).write_text(block.body, encoding="utf-8")
    return block.body


def _run(block: Block, folder: Path) -> str:
    commands = [line[2:] for line in block.body.splitlines() if line.startswith("$ ")]
    return "".join(f"$ {command}\n{_said(command, folder)}" for command in commands)


def _said(command: str, folder: Path) -> str:
    own = f'specsheet() {{ "{sys.executable}" -m specsheet "$@"; }}\n'
    done = subprocess.run(
        ["bash", "-c", own + command],
        cwd=folder,
        stdin=subprocess.DEVNULL,
        stdout=subprocess.PIPE,
        stderr=subprocess.STDOUT,
        encoding="utf-8",
        check=False,
        env=environment(COLUMNS="100", LC_ALL="C.UTF-8", PATH=os.environ["PATH"]),
    )
    return done.stdout
