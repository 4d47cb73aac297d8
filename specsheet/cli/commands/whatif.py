"""Table of the verdict against one figure of a tag."""

from __future__ import annotations

from argparse import Namespace

from specsheet import tagfile
from specsheet.cli.inputs import read_one
from specsheet.cli.narrate import data, say
from specsheet.cli.status import Status


def run(arguments: Namespace) -> Status:
    """Write one row a value to stdout; ends with 0 whatever the verdicts are."""
    reading, troubled = read_one(arguments.file, arguments.set)
    text = tagfile.read_text(arguments.file)
    if reading.tag is None or not isinstance(text, str):
        return Status.UNUSABLE

    from specsheet.evaluate import whatif  # numpy: only once the file is known to be usable
    from specsheet.render import whatif as render

    job = tagfile.find_job(arguments.file)
    try:
        values = whatif.values_between(
            reading.tag.family, arguments.vary, arguments.first, arguments.last, arguments.steps
        )
        trials = whatif.vary(
            text, arguments.vary, values, also=arguments.set, file=arguments.file, job=job
        )
    except tagfile.EditError as refused:
        say(f"{arguments.file}: {refused}")
        return Status.UNUSABLE
    write = render.as_json if arguments.json else render.text
    data(write(reading.tag, arguments.vary, trials))
    return Status.UNUSABLE if troubled else Status.FINE
