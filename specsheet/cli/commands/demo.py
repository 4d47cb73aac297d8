"""Write the invented job, print its sheets, show a summary and open it in the form."""

from __future__ import annotations

from argparse import Namespace
from collections import Counter
from dataclasses import dataclass, replace
from pathlib import Path

from rich.console import Console
from rich.progress import BarColumn, MofNCompleteColumn, Progress, TextColumn
from rich.table import Table
from rich.text import Text

from specsheet import packs, sheet, tagfile, tui
from specsheet.cli.batch import Batch
from specsheet.cli.narrate import say
from specsheet.cli.status import Status
from specsheet.evaluate import evaluate_settled
from specsheet.findings import Level
from specsheet.render import pdf
from specsheet.tag import Tag
from specsheet.tui import terminal

#: spaces between two columns of the summary, and the least that is shown of a service
_GAP, _LEAST_SERVICE = 2, 12


@dataclass(frozen=True, slots=True)
class _Made:
    """What one tag came to: its line of the summary and its sheet."""

    name: str
    service: str
    family: str
    levels: Counter[Level]
    document: bytes


def run(arguments: Namespace) -> int | Status:
    """Run the demo; ends with 0 although some of its tags are wrong on purpose.

    The form opens at the end where there is a terminal for it.
    """
    folder = Path(arguments.folder)
    try:
        _write_job(folder)
        results = _print_all(folder, Path(arguments.output))
    except OSError as problem:
        say(f"the demo could not be written: {problem}")
        return Status.UNUSABLE
    _show(results)
    say(f"the job is in {folder}, the sheets are in {arguments.output}")
    if arguments.no_form or terminal.objection(folder):
        return Status.FINE
    return tui.run(str(folder))


def _write_job(folder: Path) -> None:
    """Copy the embedded job; a file that exists is somebody's work and stays."""
    source = packs.folder() / "demo"
    for path in sorted(source.rglob("*.toml")):
        target = folder / path.relative_to(source)
        if target.exists():
            continue
        target.parent.mkdir(parents=True, exist_ok=True)
        tagfile.save(target, path.read_text(encoding="utf-8"))


def _print_all(folder: Path, output: Path) -> list[_Made]:
    """Derive and print every tag, with a bar on stderr."""
    done: list[_Made] = []
    batch = Batch([str(folder)])
    columns = (TextColumn("{task.description}"), BarColumn(), MofNCompleteColumn())
    with Progress(*columns, console=Console(stderr=True)) as progress:
        for made in progress.track(batch.each(_make), total=batch.count, description="printing"):
            if made is not None:
                pdf.store(made.document, output / pdf.file_name(made.name))
                done.append(replace(made, document=b""))
    return done


def _make(tag: Tag) -> _Made:
    evaluation = evaluate_settled(tag)
    levels = Counter(finding.level for finding in evaluation.findings)
    document = pdf.to_bytes(sheet.build(evaluation))
    return _Made(tag.name, tag.text("service"), tag.family, levels, document)


def _show(tags: list[_Made]) -> None:
    """Write the summary table to stdout."""
    console = Console()
    table = Table(box=None, pad_edge=False)
    table.add_column("tag", no_wrap=True)
    width = _room_for_service(console.width, tags)
    table.add_column("service", no_wrap=True, overflow="ellipsis", max_width=width)
    table.add_column("family", no_wrap=True)
    for level in Level:
        table.add_column(level, justify="right", no_wrap=True)
    for tag in tags:
        cells = (tag.name, tag.service, tag.family, *(str(tag.levels[x]) for x in Level))
        table.add_row(*(Text(cell) for cell in cells))
    console.print(table)


def _room_for_service(width: int, tags: list[_Made]) -> int:
    """Return how wide the services may be so that nothing else is cut [characters]."""
    name = max((len(item.name) for item in tags), default=0)
    family = max((len(item.family) for item in tags), default=0)
    levels = sum(len(level) + _GAP for level in Level)
    return max(_LEAST_SERVICE, width - name - family - levels - 2 * _GAP)
