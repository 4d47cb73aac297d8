"""Open a tag or a job in the form."""

from __future__ import annotations

from argparse import Namespace

from specsheet.cli.status import Status


def run(arguments: Namespace) -> int | Status:
    """Open the form; its own checks say when there is no terminal for it."""
    from specsheet import tui

    return tui.run(arguments.path)
