"""What the program tells the person at the terminal; always on stderr."""

from __future__ import annotations

import sys


def say(text: str) -> None:
    """Write one line of narration to stderr."""
    print(text, file=sys.stderr)


def data(text: str) -> None:
    """Write output that a script may read to stdout."""
    sys.stdout.write(text if text.endswith("\n") else f"{text}\n")
