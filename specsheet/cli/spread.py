"""Work on many items with all cores of the processor; the results come in the order of the items.

The first items are done in this process. What they load and remember (libraries, packs, fluids)
is then there for the processes that share the rest, where that saves time.
"""

from __future__ import annotations

import os
import sys
from collections.abc import Callable, Iterator, Sequence
from dataclasses import dataclass
from typing import TypeVar

Item = TypeVar("Item")
Result = TypeVar("Result")

#: items done before other processes are thought of, and the fewest that pay for them
FIRST, WORTHWHILE = 12, 24
#: processes at most: each takes some 25 MB beside what all share, 40 MB where sheets are printed
MOST_PROCESSES = 3


@dataclass(frozen=True, slots=True)
class Lost:
    """Stands for the result of an item whose process ended by itself."""


def cores() -> int:
    """Return how many cores this process may use."""
    if sys.platform == "linux":
        return len(os.sched_getaffinity(0))
    return os.cpu_count() or 1


def spread(
    work: Callable[[Item], Result], items: Sequence[Item], processes: int | None = None
) -> Iterator[Result | Lost]:
    """Yield ``work(item)`` for every item, in order.

    Args:
        work: a function of a module, or a partial of one. What it raises is raised here.
        items: what it is done to. Items and results must be fit for pickling.
        processes: how many share the work; None for one a core, up to :data:`MOST_PROCESSES`.
    """
    yield from map(work, items[:FIRST])
    rest = items[FIRST:]
    count = min(cores(), MOST_PROCESSES) if processes is None else processes
    if count < 2 or len(rest) < WORTHWHILE:
        yield from map(work, rest)
        return
    from specsheet.cli.pool import shared  # few items do without what it loads

    yield from shared(work, rest, count)
