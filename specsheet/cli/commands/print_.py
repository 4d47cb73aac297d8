"""Print datasheets as PDF."""

from __future__ import annotations

from argparse import Namespace
from pathlib import Path

from specsheet import sheet
from specsheet.cli.inputs import read_all
from specsheet.cli.narrate import data, say
from specsheet.cli.status import Status, verdict
from specsheet.evaluate import evaluate_settled
from specsheet.findings import Level
from specsheet.render import pdf


def run(arguments: Namespace) -> Status:
    """Print each tag to ``<output>/<tag>.pdf`` and write the paths to stdout."""
    levels: set[Level] = set()
    printed: dict[Path, str] = {}
    scanned = read_all(arguments.paths)
    unusable = bool(scanned.all_problems)
    for reading in scanned.readings():
        if reading.tag is None:
            continue
        target = Path(arguments.output) / pdf.file_name(reading.tag.name)
        if target in printed:
            first = printed[target]
            say(f"{reading.tag.path}:1: tag: {target} is the sheet of {first}; not printed")
            unusable = True
            continue
        evaluation = evaluate_settled(reading.tag)
        levels.update(item.level for item in evaluation.findings)
        try:
            pdf.write(sheet.build(evaluation), target, paper=arguments.paper)
        except pdf.WriteError as problem:
            say(str(problem))
            return Status.UNUSABLE
        printed[target] = reading.tag.path
        data(str(target))
    return Status.UNUSABLE if unusable else verdict(levels, strict=arguments.strict)
