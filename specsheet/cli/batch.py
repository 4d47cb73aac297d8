"""Many tag files named on the command line: taken one by one, with their problems narrated."""

from __future__ import annotations

from collections.abc import Callable, Iterable, Iterator
from dataclasses import dataclass
from functools import partial
from typing import Generic, TypeVar

from specsheet import job
from specsheet.cli.narrate import say
from specsheet.cli.spread import Lost, spread
from specsheet.job import Listed, Numbers
from specsheet.tag import Tag
from specsheet.tagfile import Problem

Result = TypeVar("Result")


@dataclass(frozen=True, slots=True)
class _Done(Generic[Result]):
    """What became of one file: its tag number, its problems, what was made of the tag."""

    name: str
    problems: tuple[Problem, ...]
    result: Result | None


class Batch:
    """The tag files in files and folders, taken one by one, their problems narrated.

    Attributes:
        count: number of files.
        unusable: whether anything could not be used so far.
    """

    def __init__(self, paths: Iterable[str]) -> None:
        """Find the files and narrate what is wrong with their folders and jobs."""
        found = job.scan(paths)
        self._files = found.files
        self._said: set[str] = set()
        self.count = len(found.files)
        self.unusable = False
        self._narrate(found.problems)

    def each(self, work: Callable[[Tag], Result]) -> Iterator[Result | None]:
        """Yield ``work(tag)`` for each file, in order; None where no tag could be read.

        No tag is kept. Many are shared out to processes (:mod:`specsheet.cli.spread`), so
        ``work`` is a function of a module, or a partial of one, and only its result comes back.
        The problems of a file are narrated before its result is yielded.
        """
        numbers = Numbers()
        for listed, done in zip(self._files, spread(partial(_one, work), self._files), strict=True):
            if isinstance(done, Lost):
                self._narrate((_lost(listed, done.cause),))
                yield None
                continue
            repeated = numbers.repeated(done.name, listed.path, listed.home)
            self._narrate((*done.problems, repeated) if repeated else done.problems)
            yield done.result

    def _narrate(self, problems: Iterable[Problem]) -> None:
        """Narrate each problem once."""
        for text in map(str, problems):
            self.unusable = True
            if text not in self._said:
                self._said.add(text)
                say(text)


def _one(work: Callable[[Tag], Result], listed: Listed) -> _Done[Result]:
    reading = listed.read().reading
    if reading.tag is None:
        return _Done("", reading.problems, None)
    return _Done(reading.tag.name, reading.problems, work(reading.tag))


def _lost(listed: Listed, cause: str) -> Problem:
    message = f"the process that worked on this tag {cause}; run the command on this file alone"
    return Problem(str(listed.path), 1, "file", message)
