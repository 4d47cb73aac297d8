"""What the program writes: data to stdout, narration to stderr; both in UTF-8 in any locale."""

from __future__ import annotations

import sys
from io import TextIOWrapper


def set_up() -> None:
    """Write UTF-8 whatever the locale, and the names of files as the bytes that they are."""
    for stream, strays in ((sys.stdout, "surrogateescape"), (sys.stderr, "backslashreplace")):
        if isinstance(stream, TextIOWrapper):  # a caller may have put another stream there
            stream.reconfigure(encoding="utf-8", errors=strays)


def say(text: str) -> None:
    """Write one line of narration to stderr."""
    print(text, file=sys.stderr)


def data(text: str) -> None:
    """Write output that a script may read to stdout."""
    sys.stdout.write(text if text.endswith("\n") else f"{text}\n")
