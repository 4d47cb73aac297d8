"""Time and memory, measured so that a busy machine blurs them little: processor time, best of n."""

from __future__ import annotations

import os
import subprocess
import sys
import time
from collections.abc import Callable, Sequence
from contextlib import suppress
from dataclasses import dataclass
from pathlib import Path

import psutil
from cli_process import environment

#: time between two looks at the memory of a program [s]
_PAUSE = 0.05


@dataclass(frozen=True, slots=True)
class Cost:
    """What a program cost, all its processes together.

    Attributes:
        seconds: processor time [s].
        wall: time that its user waits [s].
    """

    seconds: float
    wall: float


def process(arguments: Sequence[str], cwd: Path | None = None) -> float:
    """Run the interpreter with arguments; return the least processor time of five runs [s]."""
    return min(cost(arguments, cwd).seconds for _ in range(5))


def cost(arguments: Sequence[str], cwd: Path | None = None) -> Cost:
    """Run the interpreter with arguments, once; return what it cost."""
    start = time.perf_counter()
    with _started(arguments, cwd) as child:
        _, _, used = os.wait4(child.pid, 0)
        child.returncode = 0
    return Cost(used.ru_utime + used.ru_stime, time.perf_counter() - start)


def memory(arguments: Sequence[str], cwd: Path | None = None) -> float:
    """Run the interpreter with arguments, once; return the most that its processes held [MB].

    In a run of its own, since a look at the memory of a process holds it up. What processes share
    counts once where the system tells.
    """
    peak = 0
    with _started(arguments, cwd) as child:
        while child.poll() is None:
            peak = max(peak, _held(child.pid))
            time.sleep(_PAUSE)
    return peak / 1e6


def _started(arguments: Sequence[str], cwd: Path | None) -> subprocess.Popen[bytes]:
    return subprocess.Popen(
        [sys.executable, *arguments],
        cwd=cwd,
        stdin=subprocess.DEVNULL,
        stdout=subprocess.DEVNULL,
        stderr=subprocess.DEVNULL,
        env=environment(),
    )


def _held(pid: int) -> int:
    """Return the memory that a process and those below it hold now [bytes]."""
    with suppress(psutil.Error):
        root = psutil.Process(pid)
        return sum(map(_of_one, (root, *root.children(recursive=True))))
    return 0


def _of_one(one: psutil.Process) -> int:
    with suppress(psutil.Error):
        told = one.memory_full_info()
        return int(getattr(told, "pss", told.rss))
    return 0


def calls(work: Callable[[int], object], count: int) -> float:
    """Return the least processor time [s] of ``count`` calls ``work(0)``, ``work(1)`` ..."""
    spent = []
    for place in range(count):
        start = time.process_time()
        work(place)
        spent.append(time.process_time() - start)
    return min(spent)


def report(what: str, measured: float, unit: str, budget: float | None = None) -> None:
    """Print one row of the table of measurements, with its budget where it has one."""
    limit = "" if budget is None else f"of {budget:.4g}"
    print(f"\n{what:<58} {measured:9.3g} {unit:<4} {limit}".rstrip())
