"""One tag file named on the command line: read, with its problems narrated."""

from __future__ import annotations

from collections.abc import Sequence

from specsheet import tagfile
from specsheet.cli.narrate import say
from specsheet.tag import Tag
from specsheet.tagfile import Change, Job, Reading


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
        supposed = suppose(path, changes, home)
        if isinstance(supposed, str):
            say(supposed)
        reading = Reading(None) if isinstance(supposed, str) else Reading(supposed)
    return reading, bool(problems) or reading.tag is None


def suppose(path: str, changes: Sequence[Change], home: Job) -> Tag | str:
    """Return the tag of a file as if its entries held other values, or why that is refused."""
    text = tagfile.read_text(path)
    if not isinstance(text, str):
        return str(text)
    try:
        reading = tagfile.suppose(text, changes, path, home)
    except tagfile.EditError as refused:
        return f"{path}: --set {refused}"
    return reading.tag or "; ".join(map(str, reading.problems))
