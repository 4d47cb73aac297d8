"""List what is wrong with tags, worst first, with the margin to each limit."""

from __future__ import annotations

from argparse import Namespace
from collections import Counter

from specsheet.cli.inputs import readings
from specsheet.cli.narrate import data, say
from specsheet.cli.status import Status, verdict
from specsheet.evaluate import evaluate
from specsheet.findings import Finding, Level


def run(arguments: Namespace) -> Status:
    """Write one line a finding to stdout and the totals to stderr."""
    counts: Counter[Level] = Counter()
    tags = 0
    unusable = False
    for reading in readings(arguments.paths):
        unusable = unusable or bool(reading.problems)
        if reading.tag is None:
            continue
        tags += 1
        for finding in evaluate(reading.tag).findings:
            counts[finding.level] += 1
            if arguments.all or finding.level is not Level.NOTE:
                data(_line(reading.tag.path, finding))
    if not tags and not unusable:
        say("no tag files found; name a tag file, or a folder with *.toml files in it or in tags/")
        return Status.UNUSABLE
    say(
        f"{tags} tag{'s' if tags != 1 else ''}: {counts[Level.STOP]} stop, "
        f"{counts[Level.CAUTION]} caution, {counts[Level.NOTE]} note"
    )
    if unusable:
        return Status.UNUSABLE
    return verdict(counts, strict=arguments.strict)


def _line(path: str, finding: Finding) -> str:
    margin = ""
    if finding.reserve is not None:
        margin = f" [{finding.reserve.driver.replace('_', ' ')} {finding.reserve.fraction:+.1%}]"
    where = f" {finding.field}:" if finding.field else ""
    return f"{path}: {finding.level} {finding.code}:{where} {finding.message}{margin}"
