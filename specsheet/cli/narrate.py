"""What the program writes: data to stdout, narration to stderr; both in UTF-8 in any locale."""

from __future__ import annotations

import os
import sys
from io import TextIOWrapper


def set_up() -> None:
    """Write UTF-8 whatever the locale, and the names of files as the bytes that they are.

    A stream that the caller closed is opened on nothing: data that cannot go out are then told
    like any output that cannot be written, and narration is dropped.
    """
    for name, mode in (("stdin", os.O_RDONLY), ("stdout", os.O_RDONLY), ("stderr", os.O_WRONLY)):
        if getattr(sys, name) is None:
            nothing = os.open(os.devnull, mode)
            setattr(sys, name, os.fdopen(nothing, "r" if name == "stdin" else "w"))
    for stream, strays in ((sys.stdout, "surrogateescape"), (sys.stderr, "backslashreplace")):
        if isinstance(stream, TextIOWrapper):  # a caller may have put another stream there
            stream.reconfigure(encoding="utf-8", errors=strays)


def say(text: str) -> None:
    """Write one line of narration to stderr."""
    print(text, file=sys.stderr)


def data(text: str) -> None:
    """Write output that a script may read to stdout."""
    sys.stdout.write(text if text.endswith("\n") else f"{text}\n")
