"""Tag files named on the command line: read, with their problems narrated."""

from __future__ import annotations

from collections.abc import Iterable, Iterator

from specsheet import job
from specsheet.cli.narrate import say
from specsheet.tagfile import Reading


def readings(paths: Iterable[str]) -> Iterator[Reading]:
    """Read every tag file of files and folders, in a stable order; narrate each problem once."""
    scanned = job.scan(paths)
    told: set[str] = set()
    for problem in scanned.problems:
        _tell(str(problem), told)
    for reading in scanned.readings():
        for problem in reading.problems:
            _tell(str(problem), told)
        yield reading


def _tell(text: str, told: set[str]) -> None:
    if text not in told:
        told.add(text)
        say(text)
