"""The command line: thin. Data goes to stdout, narration to stderr, the verdict to the exit status.

A command's module is imported when the command runs, so that none pays for another's libraries.
"""

from __future__ import annotations

import os
import sys
from collections.abc import Sequence
from importlib import import_module

from specsheet.cli import narrate
from specsheet.cli.status import Status


def main(arguments: Sequence[str] | None = None) -> int:
    """Run one command and return its exit status.

    Args:
        arguments: the words after the program's name; None for those of the process.
    """
    narrate.set_up()
    words = sys.argv[1:] if arguments is None else list(arguments)
    try:
        status = _open_form(words) if _only_form(words) else _run(words)
        sys.stdout.flush()
        return status
    except BrokenPipeError:
        # the reader of our output (head, less) has gone: not our failure, and nothing to say
        _drop_output()
        return Status.FINE
    except KeyboardInterrupt:
        narrate.say("stopped by the keyboard; files already written are whole")
        return Status.INTERRUPTED
    except OSError as problem:
        # commands answer for the files they touch; what is left is our own output: a full disk
        where = f"{problem.filename}: file" if problem.filename else "the output"
        narrate.say(f"{where}: cannot be written or read: {problem.strerror or problem}")
        _drop_output()
        return Status.UNUSABLE


def _only_form(words: Sequence[str]) -> bool:
    """Tell whether the words open the form and hold nothing to parse."""
    return not words or (words[0] == "form" and len(words) <= 2 and words[-1][:1] not in ("-", ""))


def _open_form(words: Sequence[str]) -> int:
    """Open the form without the parser, whose making takes longer than drawing a screen."""
    from specsheet import tui

    return tui.run(words[1] if len(words) > 1 else None)


def _run(words: Sequence[str]) -> int:
    from specsheet.cli.parser import build_parser

    try:
        parsed = build_parser().parse_args(words)
    finally:
        sys.stdout.flush()  # help is out, or told that it cannot be, before the parser ends us
    command = import_module(f"specsheet.cli.commands.{parsed.module}")
    status: int = command.run(parsed)
    return int(status)


def _drop_output() -> None:
    """Let the interpreter flush what is left into nothing when it ends."""
    os.dup2(os.open(os.devnull, os.O_WRONLY), sys.stdout.fileno())
