"""The command line: thin. Data goes to stdout, narration to stderr, the verdict to the exit status.

A command's module is imported when the command runs, so that none pays for another's libraries.
"""

from __future__ import annotations

import os
import sys
from collections.abc import Sequence
from importlib import import_module

from specsheet.cli.narrate import say
from specsheet.cli.parser import build_parser
from specsheet.cli.status import Status


def main(arguments: Sequence[str] | None = None) -> int:
    """Run one command and return its exit status.

    Args:
        arguments: the words after the program's name; None for those of the process.
    """
    parsed = build_parser().parse_args(arguments)
    command = import_module(f"specsheet.cli.commands.{parsed.module}")
    try:
        status: int = command.run(parsed)
        return int(status)
    except BrokenPipeError:
        # the reader of our output (head, less) has gone: not our failure, and nothing to say
        os.dup2(os.open(os.devnull, os.O_WRONLY), sys.stdout.fileno())
        return Status.FINE
    except KeyboardInterrupt:
        say("stopped by the keyboard; files already written are whole")
        return Status.INTERRUPTED
