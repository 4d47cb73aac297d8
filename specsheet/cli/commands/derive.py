"""Derive everything about one tag and write it as text or JSON."""

from __future__ import annotations

from argparse import Namespace

from specsheet.cli.inputs import read_one
from specsheet.cli.narrate import data
from specsheet.cli.status import Status, verdict


def run(arguments: Namespace) -> Status:
    """Write the sheet of one tag to stdout; its problems go to stderr."""
    reading, troubled = read_one(arguments.file, arguments.set)
    if reading.tag is None:
        return Status.UNUSABLE

    from specsheet.evaluate import evaluate  # numpy: only once the file is known to be usable

    evaluation = evaluate(reading.tag)
    if arguments.json:
        from specsheet.render import json

        data(json.text(evaluation))
    else:
        from specsheet import sheet
        from specsheet.render import text

        data(text.text(sheet.build(evaluation)))
    if troubled:
        return Status.UNUSABLE
    return verdict((item.level for item in evaluation.findings), strict=arguments.strict)
