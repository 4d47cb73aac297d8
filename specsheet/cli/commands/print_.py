"""Print datasheets as PDF."""

from __future__ import annotations

from argparse import Namespace
from dataclasses import dataclass, replace
from functools import partial
from pathlib import Path

from specsheet import sheet
from specsheet.cli.batch import Batch
from specsheet.cli.narrate import data, say
from specsheet.cli.status import Status, verdict
from specsheet.evaluate import evaluate_settled
from specsheet.findings import Level
from specsheet.render import pdf
from specsheet.tag import Tag


@dataclass(frozen=True, slots=True)
class _Printed:
    """The sheet of one tag."""

    name: str
    path: str
    levels: frozenset[Level]
    document: bytes


def run(arguments: Namespace) -> Status:
    """Print each tag to ``<output>/<tag>.pdf`` and write the paths to stdout."""
    levels: set[Level] = set()
    printed: dict[Path, str] = {}
    batch = Batch(arguments.paths)
    unusable = False
    for made in batch.each(partial(_print, paper=arguments.paper)):
        if made is None:
            continue
        target = Path(arguments.output) / pdf.file_name(made.name)
        if target in printed:
            first = printed[target]
            say(f"{made.path}:1: tag: {target} is the sheet of {first}; not printed")
            unusable = True
            continue
        levels.update(made.levels)
        try:
            pdf.store(made.document, target)
        except pdf.WriteError as problem:
            say(str(problem))
            return Status.UNUSABLE
        printed[target] = made.path
        data(str(target))
    if unusable or batch.unusable:
        return Status.UNUSABLE
    return verdict(levels, strict=arguments.strict)


def _print(tag: Tag, *, paper: str | None) -> _Printed:
    evaluation = evaluate_settled(tag)
    made = sheet.build(evaluation)
    document = pdf.to_bytes(replace(made, paper=paper) if paper else made)
    levels = frozenset(item.level for item in evaluation.findings)
    return _Printed(tag.name, tag.path, levels, document)
