"""List what is wrong with tags, worst first, with the margin to each limit."""

from __future__ import annotations

from argparse import Namespace
from collections import Counter

from specsheet.cli.inputs import read_all, supposed
from specsheet.cli.narrate import data, say
from specsheet.cli.status import Status, verdict
from specsheet.evaluate import evaluate_settled
from specsheet.findings import Finding, Level


def run(arguments: Namespace) -> Status:
    """Write one line a finding to stdout and the totals to stderr."""
    counts: Counter[Level] = Counter()
    scanned = read_all(arguments.paths)
    readings = scanned.readings()
    refused = False
    if arguments.set:
        usable = [file.path for file in scanned.files if file.reading.tag is not None]
        readings = tuple(supposed(str(path), arguments.set) for path in usable)
        refused = any(reading.tag is None for reading in readings)
    tags = [reading.tag for reading in readings if reading.tag is not None]
    for tag in tags:
        for finding in evaluate_settled(tag).findings:
            counts[finding.level] += 1
            if arguments.all or finding.level is not Level.NOTE:
                data(_line(tag.path, finding))
    say(
        f"{len(tags)} tag{'s' if len(tags) != 1 else ''}: {counts[Level.STOP]} stop, "
        f"{counts[Level.CAUTION]} caution, {counts[Level.NOTE]} note"
    )
    if scanned.all_problems or refused:
        return Status.UNUSABLE
    return verdict(counts, strict=arguments.strict)


def _line(path: str, finding: Finding) -> str:
    margin = ""
    if finding.reserve is not None:
        margin = f" [{finding.reserve.driver.replace('_', ' ')} {finding.reserve.fraction:+.1%}]"
    where = f" {finding.field}:" if finding.field else ""
    return f"{path}: {finding.level} {finding.code}:{where} {finding.message}{margin}"
