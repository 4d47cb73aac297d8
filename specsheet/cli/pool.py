"""A pool of processes that a command shares its items out to, and what becomes of one that ends."""

from __future__ import annotations

import gc
import multiprocessing
import os
import signal
import sys
import threading
from collections.abc import Callable, Iterator, Sequence
from concurrent.futures import ProcessPoolExecutor
from concurrent.futures.process import BrokenProcessPool
from contextlib import contextmanager
from dataclasses import dataclass
from functools import partial
from typing import TypeVar

from specsheet.cli.spread import Lost

Item = TypeVar("Item")
Result = TypeVar("Result")

#: items that go to a process at once
_CHUNK = 6


def shared(
    work: Callable[[Item], Result], items: Sequence[Item], count: int
) -> Iterator[Result | Lost]:
    """Yield ``work(item)`` for every item, in order, done by ``count`` processes.

    Where a process ends by itself, the items that may have been in hand are done again, each in a
    process of its own: so the one that ends its process is known, and no other is lost.
    """
    done = 0
    while done < len(items):
        try:
            with _pool(count) as pool:
                attempts = pool.map(partial(_attempt, work), items[done:], chunksize=_CHUNK)
                for attempt in attempts:
                    if isinstance(attempt, _Raised):
                        raise attempt.error
                    done += 1
                    yield attempt
        except BrokenProcessPool:
            for item in items[done : done + 2 * count * _CHUNK]:
                done += 1
                yield _alone(work, item)
        except _NoProcessError:
            yield from map(work, items[done:])
            return


@dataclass(frozen=True, slots=True)
class _Raised:
    """An exception on its way from a process of the pool to this one."""

    error: Exception


def _attempt(work: Callable[[Item], Result], item: Item) -> Result | _Raised:
    """Return the result, or what was raised: else it would take its whole chunk with it."""
    try:
        return work(item)
    except Exception as error:
        return _Raised(error)


def _alone(work: Callable[[Item], Result], item: Item) -> Result | Lost:
    try:
        with _pool(1) as pool:
            return pool.submit(work, item).result()
    except BrokenProcessPool:
        return Lost()


class _NoProcessError(Exception):
    """The system gives no process: no memory, or too many are there."""


@contextmanager
def _pool(count: int) -> Iterator[ProcessPoolExecutor]:
    """Make a pool; where it is left early its processes are ended, whatever they are at."""
    # a fork copies the locks of other threads as they happen to be; elsewhere it is not safe
    forks = sys.platform == "linux" and threading.active_count() == 1
    context = multiprocessing.get_context("fork" if forks else "spawn")
    pool = ProcessPoolExecutor(count, mp_context=context, initializer=_begin)
    sys.stdout.flush()  # else every process would start with a copy of what is not out yet
    gc.freeze()  # a search for garbage would touch, and so copy, all that is shared
    try:
        with _interrupts_held():
            pool.submit(int)  # starts the processes
        yield pool
    except BrokenProcessPool:
        raise
    except BaseException as error:
        for process in multiprocessing.active_children():
            process.kill()
        if isinstance(error, OSError):
            raise _NoProcessError from error
        raise
    finally:
        pool.shutdown(cancel_futures=True)
        gc.unfreeze()


@contextmanager
def _interrupts_held() -> Iterator[None]:
    """Keep ctrl+c until the processes have started: they begin with it held."""
    if not hasattr(signal, "pthread_sigmask"):
        yield
        return
    before = signal.pthread_sigmask(signal.SIG_BLOCK, {signal.SIGINT})
    try:
        yield
    finally:
        signal.pthread_sigmask(signal.SIG_SETMASK, before)


def _begin() -> None:
    """Begin a process: ctrl+c ends it without a word, and so does the end of the one it serves."""
    if signal.getsignal(signal.SIGINT) is signal.default_int_handler:
        signal.signal(signal.SIGINT, signal.SIG_DFL)
    if hasattr(signal, "pthread_sigmask"):
        signal.pthread_sigmask(signal.SIG_UNBLOCK, {signal.SIGINT})
    threading.Thread(target=_end_with_parent, daemon=True).start()


def _end_with_parent() -> None:
    parent = multiprocessing.parent_process()
    if parent is not None:
        parent.join()
        os._exit(1)
