"""Time and memory, measured so that a busy machine blurs them little: processor time, best of n."""

from __future__ import annotations

import os
import subprocess
import sys
import time
from collections.abc import Callable, Sequence
from dataclasses import dataclass
from pathlib import Path

from cli_process import environment


@dataclass(frozen=True, slots=True)
class Cost:
    """What a process cost: processor time [s] of it and its children, peak memory [MB]."""

    seconds: float
    megabytes: float


def process(arguments: Sequence[str], cwd: Path | None = None, repeats: int = 5) -> Cost:
    """Run the interpreter with arguments; return the cheapest of the runs."""
    return min((_once(arguments, cwd) for _ in range(repeats)), key=lambda cost: cost.seconds)


def _once(arguments: Sequence[str], cwd: Path | None) -> Cost:
    with subprocess.Popen(
        [sys.executable, *arguments],
        cwd=cwd,
        stdin=subprocess.DEVNULL,
        stdout=subprocess.DEVNULL,
        stderr=subprocess.DEVNULL,
        env=environment(),
    ) as child:
        _, _, used = os.wait4(child.pid, 0)
        child.returncode = 0
    return Cost(used.ru_utime + used.ru_stime, used.ru_maxrss / 1024)


def calls(work: Callable[[int], object], count: int) -> float:
    """Return the least processor time [s] of ``count`` calls ``work(0)``, ``work(1)`` ..."""
    spent = []
    for place in range(count):
        start = time.process_time()
        work(place)
        spent.append(time.process_time() - start)
    return min(spent)


def report(what: str, measured: float, unit: str, budget: float) -> None:
    """Print one row of the table of measurements."""
    print(f"\n{what:<58} {measured:9.3g} {unit:<4} of {budget:.4g}")
