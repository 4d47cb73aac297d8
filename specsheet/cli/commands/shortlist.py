"""Hold every meter family against one tag, or take one of them over into the file."""

from __future__ import annotations

from argparse import Namespace

from specsheet import tagfile
from specsheet.cli.choose import known_family
from specsheet.cli.inputs import read_one
from specsheet.cli.narrate import data, say
from specsheet.cli.status import Status, verdict
from specsheet.tagfile import Problem


def run(arguments: Namespace) -> Status:
    """Write the shortlist to stdout, or change the family in the file."""
    if arguments.adopt is not None:
        return _adopt(arguments.file, arguments.adopt)
    reading, troubled = read_one(arguments.file)
    if reading.tag is None:
        return Status.UNUSABLE

    from specsheet.evaluate.candidates import Verdict  # numpy: only once it is needed
    from specsheet.evaluate.shortlist import shortlist
    from specsheet.render import shortlist as render

    found = shortlist(reading.tag)
    data(render.as_json(found) if arguments.json else render.text(found))
    if troubled:
        return Status.UNUSABLE
    if all(item.verdict is Verdict.UNFIT for item in found.candidates):
        return Status.STOPPED
    return verdict(item.level for item in found.findings)


def _adopt(path: str, family: str) -> Status:
    """Write another family into the file; say what was put behind a "#"."""
    if not known_family(family):
        return Status.UNUSABLE
    text = tagfile.read_text(path)
    if isinstance(text, Problem):
        say(str(text))
        return Status.UNUSABLE
    try:
        made = tagfile.adopt(text, family)
        tagfile.save(path, made.text)
    except (tagfile.EditError, tagfile.SaveError) as problem:
        say(f"{path}: family: {problem}")
        return Status.UNUSABLE
    for line in made.dropped:
        say(f"{path}: meter: {family} does not take `{line}`; put behind a #")
    say(f"{path}: the family is {family} now")
    return Status.FINE
