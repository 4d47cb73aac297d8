"""Work on many items with all cores of the processor; the results come in the order of the items.

The first items are done in this process. What they load and remember (libraries, packs, fluids)
is then there for a crew of processes that do the rest, where that saves time.
"""

from __future__ import annotations

import os
import sys
from collections.abc import Callable, Iterator, Sequence
from dataclasses import dataclass
from typing import TypeVar

Item = TypeVar("Item")
Result = TypeVar("Result")

#: items done before a crew is thought of, and the fewest that pay for one
FIRST, WORTHWHILE = 24, 24
#: processes at most: each takes some 25 MB beside what all share, 40 MB where sheets are printed
LARGEST_CREW = 3


@dataclass(frozen=True, slots=True)
class Lost:
    """Stands for the result of an item whose process ended by itself.

    Attributes:
        cause: how it ended, in words.
    """

    cause: str


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
        processes: how many share the work; None for one a core, up to :data:`LARGEST_CREW`.
    """
    yield from map(work, items[:FIRST])
    rest = items[FIRST:]
    count = min(cores(), LARGEST_CREW) if processes is None else processes
    if count < 2 or len(rest) < WORTHWHILE:
        yield from map(work, rest)
        return
    from specsheet.cli.crew import Crew  # few items do without what it loads

    crew = Crew(work, rest, count)
    try:
        yield from crew.results()
    finally:
        crew.end()
