"""Whether there is a terminal that the form can use."""

from __future__ import annotations

import os
import sys
from pathlib import Path


def objection(path: Path) -> str:
    """Return why the form cannot open ``path`` here, or ""."""
    if not (sys.stdin.isatty() and sys.stdout.isatty() and sys.stderr.isatty()):
        return (
            "The form needs a terminal for input and output. "
            'Without one use "specsheet derive FILE" or "specsheet check FILE".'
        )
    if os.environ.get("TERM") in ("dumb", "unknown"):
        return (
            f"The form cannot draw on a terminal of type {os.environ['TERM']}. "
            'Set TERM, or use "specsheet derive FILE".'
        )
    return _path_objection(path)


def _path_objection(path: Path) -> str:
    new = path.suffix == ".toml" and path.parent.is_dir()
    if path.exists() or new:
        return ""
    if path.suffix == ".toml":
        return f"{path}: its folder does not exist; make the folder first."
    return f"{path}: there is no such file or folder. A new tag file ends in .toml."


def tell(message: str) -> None:
    """Say something to the user, outside the form."""
    print(f"specsheet: {message}", file=sys.stderr)
