"""Derive everything about one tag, or the flow from a measured signal, as text or JSON."""

from __future__ import annotations

from argparse import Namespace

from specsheet.cli.inputs import read_one
from specsheet.cli.narrate import data, say
from specsheet.cli.status import Status, verdict
from specsheet.findings import Finding
from specsheet.tag import Tag


def run(arguments: Namespace) -> Status:
    """Write the sheet of one tag to stdout; its problems go to stderr."""
    reading, troubled = read_one(arguments.file, arguments.set)
    if reading.tag is None:
        return Status.UNUSABLE
    write = _write_sheet if arguments.signal is None else _write_flow
    status = write(reading.tag, arguments)
    return Status.UNUSABLE if troubled else status


def _write_sheet(tag: Tag, arguments: Namespace) -> Status:
    from specsheet.evaluate import (
        evaluate_settled,
    )  # numpy: only once the file is known to be usable

    evaluation = evaluate_settled(tag)
    if arguments.json:
        from specsheet.render import json

        data(json.text(evaluation))
    else:
        from specsheet import sheet
        from specsheet.render import text

        data(text.text(sheet.build(evaluation)))
    return verdict((item.level for item in evaluation.findings), strict=arguments.strict)


def _write_flow(tag: Tag, arguments: Namespace) -> Status:
    """Write the flow that a signal stands for; a signal that cannot be one makes it unusable."""
    from specsheet.evaluate import measured
    from specsheet.render import measured as render

    found = measured.flow_from_signal(tag, arguments.signal)
    if isinstance(found, Finding):
        say(f"{arguments.file}: --signal: {found.message}")
        return Status.UNUSABLE
    data(render.as_json(tag, found) if arguments.json else render.text(tag, found))
    if not found.points:
        return Status.UNUSABLE
    return verdict((item.level for item in found.findings), strict=arguments.strict)
