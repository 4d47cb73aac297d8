"""Tag files named on the command line: read, with their problems narrated."""

from __future__ import annotations

from collections.abc import Iterable

from specsheet import job, tagfile
from specsheet.cli.narrate import say
from specsheet.job import Scan
from specsheet.tagfile import Reading


def read_all(paths: Iterable[str]) -> Scan:
    """Read every tag file of files and folders, and narrate each problem once."""
    found = job.scan(paths)
    for text in dict.fromkeys(str(problem) for problem in found.all_problems):
        say(text)
    return found


def read_one(path: str) -> tuple[Reading, bool]:
    """Read one tag file within its job, narrate the problems; tell whether there were any."""
    home = tagfile.find_job(path)
    reading = tagfile.load(path, home)
    problems = (*home.problems, *reading.problems)
    for problem in problems:
        say(str(problem))
    return reading, bool(problems)
