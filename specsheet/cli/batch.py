"""Many tag files named on the command line: taken one by one, with their problems narrated."""

from __future__ import annotations

from collections.abc import Callable, Iterable, Iterator, Sequence
from dataclasses import dataclass
from functools import partial
from typing import Generic, TypeVar

from specsheet import job
from specsheet.cli.inputs import suppose
from specsheet.cli.narrate import say
from specsheet.cli.spread import Lost, spread
from specsheet.job import Listed, Numbers
from specsheet.tag import Tag
from specsheet.tagfile import Change, Problem

Result = TypeVar("Result")


@dataclass(frozen=True, slots=True)
class _Done(Generic[Result]):
    """What became of one file: its tag number, its problems as lines, what was made of the tag."""

    name: str
    problems: tuple[str, ...]
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
        self._narrate(map(str, found.problems))

    def each(
        self, work: Callable[[Tag], Result], changes: Sequence[Change] = ()
    ) -> Iterator[Result | None]:
        """Yield ``work(tag)`` for each file, in order; None where there is no tag to work on.

        With ``changes`` the entries hold those values instead; a change that is refused is a
        problem of the file, and gives no tag.

        No tag is kept. Many are shared out to processes (:mod:`specsheet.cli.spread`), so
        ``work`` is a function of a module, or a partial of one, and only its result comes back.
        The problems of a file are narrated before its result is yielded.
        """
        numbers = Numbers()
        results = spread(partial(_one, work, changes), self._files)
        for listed, done in zip(self._files, results, strict=True):
            if isinstance(done, Lost):
                done = _Done("", (str(_lost(listed)),), None)
            repeated = numbers.repeated(done.name, listed.path, listed.home)
            self._narrate((*done.problems, str(repeated)) if repeated else done.problems)
            yield done.result

    def _narrate(self, problems: Iterable[str]) -> None:
        """Narrate each problem once."""
        for text in problems:
            self.unusable = True
            if text not in self._said:
                self._said.add(text)
                say(text)


def _one(work: Callable[[Tag], Result], changes: Sequence[Change], listed: Listed) -> _Done[Result]:
    reading = listed.read().reading
    problems = tuple(map(str, reading.problems))
    if reading.tag is None:
        return _Done("", problems, None)
    name = reading.tag.name
    tag = suppose(reading.tag.path, changes, listed.job) if changes else reading.tag
    if isinstance(tag, str):
        return _Done(name, (*problems, tag), None)
    return _Done(name, problems, work(tag))


def _lost(listed: Listed) -> Problem:
    message = (
        "the process that worked on this tag ended, for want of memory perhaps; run the command on "
        "this file alone"
    )
    return Problem(str(listed.path), 1, "file", message)
