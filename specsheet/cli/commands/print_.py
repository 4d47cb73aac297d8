"""Print datasheets as PDF."""

from __future__ import annotations

from argparse import Namespace
from pathlib import Path

from specsheet import sheet
from specsheet.cli.inputs import readings
from specsheet.cli.narrate import data, say
from specsheet.cli.status import Status, verdict
from specsheet.evaluate import evaluate
from specsheet.findings import Level
from specsheet.render import pdf


def run(arguments: Namespace) -> Status:
    """Print each tag to ``<output>/<tag>.pdf`` and write the paths to stdout."""
    levels: set[Level] = set()
    unusable = False
    printed: dict[Path, str] = {}
    for reading in readings(arguments.paths):
        unusable = unusable or bool(reading.problems)
        if reading.tag is None:
            continue
        evaluation = evaluate(reading.tag)
        levels.update(item.level for item in evaluation.findings)
        target = Path(arguments.output) / pdf.file_name(reading.tag.name)
        if target in printed:
            say(f"{reading.tag.path}: tag: {printed[target]} has the same tag; not printed")
            unusable = True
            continue
        try:
            pdf.write(sheet.build(evaluation), target, paper=arguments.paper)
        except pdf.WriteError as problem:
            say(str(problem))
            return Status.UNUSABLE
        printed[target] = reading.tag.path
        data(str(target))
    if not printed and not unusable:
        say("no tag files found; name a tag file, or a folder with *.toml files in it or in tags/")
        return Status.UNUSABLE
    return Status.UNUSABLE if unusable else verdict(levels, strict=arguments.strict)
