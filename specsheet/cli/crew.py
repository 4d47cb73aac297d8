"""The processes that share a work. Each has one item in hand, so that it is known which item
ended one that ends by itself; another takes its place.
"""

from __future__ import annotations

import gc
import multiprocessing
import signal
import sys
import threading
from collections.abc import Callable, Iterator, Sequence
from contextlib import contextmanager, suppress
from dataclasses import dataclass
from multiprocessing.connection import Connection, wait
from typing import Any

from specsheet.cli.spread import Lost

#: results that may wait for an earlier one, for each process
AHEAD = 8


@dataclass(frozen=True, slots=True)
class _Raised:
    """An exception on its way from a process of the crew to this one."""

    error: Exception


class Crew:
    """The processes, and the results that wait for earlier ones."""

    def __init__(self, work: Callable[[Any], Any], items: Sequence[Any], count: int) -> None:
        self._work = work
        self._items = items
        self._next = 0
        self._done: dict[int, Any] = {}
        self._members: list[_Member] = []
        self._ahead = AHEAD * count
        sys.stdout.flush()  # else every process would start with a copy of what is not out yet
        gc.freeze()  # a search for garbage would touch, and so copy, all that is shared
        for _ in range(count):
            self._add_member()

    def results(self) -> Iterator[Any]:
        """Yield the result of every item, in order."""
        for place, item in enumerate(self._items):
            self._hand_out(place)
            while place not in self._done:
                if not self._members:  # the system lets us have no process at all
                    self._done[place] = self._work(item)
                else:
                    self._collect()
                    self._hand_out(place)
            result = self._done.pop(place)
            if isinstance(result, _Raised):
                raise result.error
            yield result

    def end(self) -> None:
        """End the processes, whatever they are at: they hold nothing that could be lost."""
        for member in self._members:
            member.end()
        gc.unfreeze()

    def _add_member(self) -> None:
        with suppress(OSError):  # no memory, or too many processes: the others do the work
            self._members.append(_Member(self._work, self._items))

    def _hand_out(self, place: int) -> None:
        """Give each idle process the next item, not too far ahead of ``place``."""
        limit = min(len(self._items), place + self._ahead)
        for member in self._members:
            if member.hand is None and self._next < limit:
                member.give(self._next)
                self._next += 1

    def _collect(self) -> None:
        """Wait for a result, and take all that are there."""
        busy = [member for member in self._members if member.hand is not None]
        ready = wait([member.link for member in busy])
        for member in busy:
            if member.link in ready and member.hand is not None:
                place, result = member.hand, member.take()
                self._done[place] = result
                if isinstance(result, Lost):
                    self._members.remove(member)
                    self._add_member()


class _Member:
    """One process and this end of the line to it."""

    def __init__(self, work: Callable[[Any], Any], items: Sequence[Any]) -> None:
        # a fork copies the locks of other threads as they happen to be; elsewhere it is not safe
        forks = sys.platform == "linux" and threading.active_count() == 1
        context = multiprocessing.get_context("fork" if forks else "spawn")
        self.hand: int | None = None  #: place of the item it works on
        self.link, theirs = context.Pipe()
        self._process = context.Process(  # type: ignore[attr-defined]
            target=_serve, args=(theirs, work, items), daemon=True
        )
        with theirs, _interrupts_held():
            self._process.start()

    def give(self, place: int) -> None:
        """Give it the item at ``place``."""
        self.hand = place
        with suppress(OSError):  # it has ended: taking the result tells
            self.link.send(place)

    def take(self) -> Any:
        """Return the result of what it has in hand; :class:`Lost` where the process has ended."""
        self.hand = None
        try:
            return self.link.recv()
        except (EOFError, OSError):
            self._process.join(1.0)
            self.end()
            return Lost(_ending(self._process.exitcode))

    def end(self) -> None:
        """End the process at once."""
        self.link.close()
        self._process.kill()
        self._process.join()


def _serve(link: Connection, work: Callable[[Any], Any], items: Sequence[Any]) -> None:
    """Be a process of the crew: a place comes, its result goes, until the parent has gone."""
    _end_at_an_interrupt()
    parent = multiprocessing.parent_process()
    assert parent is not None
    with suppress(EOFError, OSError):
        while link in wait([link, parent.sentinel]):
            place = link.recv()
            try:
                result = work(items[place])
            except Exception as error:
                result = _Raised(error)
            link.send(result)


def _ending(code: int | None) -> str:
    """Return words for the exit code of a process."""
    if code is not None and code < 0:
        with suppress(ValueError):
            return f"was ended by the signal {signal.Signals(-code).name}"
    return f"ended with the status {code}"


@contextmanager
def _interrupts_held() -> Iterator[None]:
    """Keep ctrl+c until a process has started: it begins with it held, and none is missed."""
    if not hasattr(signal, "pthread_sigmask"):
        yield
        return
    before = signal.pthread_sigmask(signal.SIG_BLOCK, {signal.SIGINT})
    try:
        yield
    finally:
        signal.pthread_sigmask(signal.SIG_SETMASK, before)


def _end_at_an_interrupt() -> None:
    """Let ctrl+c end this process without a word: the one that started it speaks."""
    if signal.getsignal(signal.SIGINT) is signal.default_int_handler:
        signal.signal(signal.SIGINT, signal.SIG_DFL)
    if hasattr(signal, "pthread_sigmask"):
        signal.pthread_sigmask(signal.SIG_UNBLOCK, {signal.SIGINT})
