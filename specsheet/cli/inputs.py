"""Tag files named on the command line: read, with their problems narrated."""

from __future__ import annotations

from collections.abc import Iterable, Sequence

from specsheet import job, tagfile
from specsheet.cli.narrate import say
from specsheet.job import Scan
from specsheet.tagfile import Change, Reading


def read_all(paths: Iterable[str]) -> Scan:
    """Read every tag file of files and folders, and narrate each problem once."""
    found = job.scan(paths)
    for text in dict.fromkeys(str(problem) for problem in found.all_problems):
        say(text)
    return found


def read_one(path: str, changes: Sequence[Change] = ()) -> tuple[Reading, bool]:
    """Read one tag file within its job, narrate the problems; tell whether there were any.

    With ``changes`` the entries hold those values instead; a change that is refused gives no tag.
    """
    home = tagfile.find_job(path)
    reading = tagfile.load(path, home)
    problems = (*home.problems, *reading.problems)
    for problem in problems:
        say(str(problem))
    if changes and reading.tag is not None:
        reading = supposed(path, changes)
    return reading, bool(problems) or reading.tag is None


def supposed(path: str, changes: Sequence[Change]) -> Reading:
    """Read one tag file as if its entries held other values; narrate a refusal, without a tag."""
    text = tagfile.read_text(path)
    if not isinstance(text, str):
        return Reading(None, (text,))
    try:
        return tagfile.suppose(text, changes, path, tagfile.find_job(path))
    except tagfile.EditError as refused:
        say(f"{path}: --set {refused}")
        return Reading(None)
