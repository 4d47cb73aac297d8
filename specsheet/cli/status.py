"""Exit statuses: part of the contract with scripts."""

from __future__ import annotations

from collections.abc import Iterable
from enum import IntEnum
from typing import TYPE_CHECKING

if TYPE_CHECKING:  # the form opens without it
    from specsheet.findings import Level


class Status(IntEnum):
    """What the process says when it ends."""

    FINE = 0
    STOPPED = 1  # a stop finding, or a caution with --strict
    UNUSABLE = 2  # the input could not be used
    INTERRUPTED = 130  # ctrl+c, by the convention of shells


def verdict(levels: Iterable[Level], *, strict: bool = False) -> Status:
    """Return the status for a set of finding levels."""
    bad = {"stop", "caution"} if strict else {"stop"}
    return Status.STOPPED if bad.intersection(levels) else Status.FINE
