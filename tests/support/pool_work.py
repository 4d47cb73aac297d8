"""Works for a pool of processes, in a module that every one of them can import."""

from __future__ import annotations

import os
import signal
import time

#: the process in which the tests run: what ends a process must not end this one
HOME = os.getpid()


def doubled(item: int) -> int:
    """Return twice the item."""
    return 2 * item


def slow_at_first(item: int) -> int:
    """Return twice the item, the first of a process later than others."""
    time.sleep(0.2 if item % 50 == 25 else 0.0)
    return 2 * item


def killed_at_seventy(item: int) -> int:
    """Return twice the item, unless the system kills the process."""
    if item == 70:
        os.kill(os.getpid(), signal.SIGKILL)
    return 2 * item


def left_at_sixty_and_seventy(item: int) -> int:
    """Return twice the item, unless the process ends with the status 3."""
    if item in (60, 70):
        os._exit(3)
    return 2 * item


def left_at_the_last(item: int) -> int:
    """Return twice the item, unless it is the last: then the process ends."""
    if item == 149:
        os._exit(0)
    return 2 * item


def mistaken_at_seventy(item: int) -> int:
    """Return twice the item, unless there is a mistake in the work."""
    if item == 70:
        raise ZeroDivisionError(f"at {item}")
    return 2 * item


def process(item: int) -> int:  # noqa: ARG001
    """Return the process that works on the item."""
    time.sleep(0.002)
    return os.getpid()
