"""List what is wrong with tags, worst first, with the margin to each limit."""

from __future__ import annotations

from argparse import Namespace
from collections import Counter
from dataclasses import dataclass
from functools import partial

from specsheet.cli.batch import Batch
from specsheet.cli.narrate import data, say
from specsheet.cli.status import Status, verdict
from specsheet.evaluate import findings_settled
from specsheet.fields import TERMS
from specsheet.findings import Finding, Level, Reserve
from specsheet.tag import Tag
from specsheet.tagfile.problem import in_one_line


@dataclass(frozen=True, slots=True)
class _Checked:
    """The findings of one tag: as lines, and how many of each level."""

    lines: str
    levels: Counter[Level]


def run(arguments: Namespace) -> Status:
    """Write one line a finding to stdout and the totals to stderr."""
    counts: Counter[Level] = Counter()
    tags = 0
    batch = Batch(arguments.paths)
    for checked in batch.each(partial(_check, notes=arguments.all), arguments.set):
        if checked is not None:
            tags += 1
            counts += checked.levels
            if checked.lines:
                data(checked.lines)
    say(
        f"{tags} tag{'s' if tags != 1 else ''}: {counts[Level.STOP]} stop, "
        f"{counts[Level.CAUTION]} caution, {counts[Level.NOTE]} note"
    )
    if batch.unusable:
        return Status.UNUSABLE
    return verdict(counts, strict=arguments.strict)


def _check(tag: Tag, *, notes: bool) -> _Checked:
    findings = findings_settled(tag)
    shown = (item for item in findings if notes or item.level is not Level.NOTE)
    levels = Counter(item.level for item in findings)
    return _Checked("".join(_line(tag.path, item) for item in shown), levels)


def _margin(reserve: Reserve) -> str:
    """Return what flips the verdict, a temperature by kelvins: "mass flow +9.4%"."""
    words = reserve.driver.replace("_", " ")
    if reserve.driver in TERMS and TERMS[reserve.driver].kind == "temperature":
        return f"{words} {reserve.change:+.3g} K"
    return f"{words} {reserve.fraction:+.1%}"


def _line(path: str, finding: Finding) -> str:
    margin = "" if finding.reserve is None else f" [{_margin(finding.reserve)}]"
    where = f" {finding.field}:" if finding.field else ""
    return (
        f"{in_one_line(path)}: {finding.level} {finding.code}:{where} {finding.message}{margin}\n"
    )
