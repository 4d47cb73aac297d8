"""Write the invented job, print its sheets, show a summary and open it in the form."""

from __future__ import annotations

from argparse import Namespace
from collections import Counter
from pathlib import Path

from rich.console import Console
from rich.progress import BarColumn, MofNCompleteColumn, Progress, TextColumn
from rich.table import Table
from rich.text import Text

from specsheet import packs, sheet, tagfile, tui
from specsheet.cli.inputs import read_all
from specsheet.cli.narrate import say
from specsheet.cli.status import Status
from specsheet.evaluate import Evaluation, evaluate_settled
from specsheet.findings import Level
from specsheet.render import pdf
from specsheet.tui import terminal

#: spaces between two columns of the summary, and the least that is shown of a service
_GAP, _LEAST_SERVICE = 2, 12


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


def _print_all(folder: Path, output: Path) -> list[Evaluation]:
    """Derive and print every tag, with a bar on stderr."""
    done: list[Evaluation] = []
    readings = read_all([str(folder)]).readings()
    columns = (TextColumn("{task.description}"), BarColumn(), MofNCompleteColumn())
    with Progress(*columns, console=Console(stderr=True)) as progress:
        for reading in progress.track(readings, description="printing"):
            if reading.tag is not None:
                evaluation = evaluate_settled(reading.tag)
                pdf.write(sheet.build(evaluation), output / pdf.file_name(reading.tag.name))
                done.append(evaluation)
    return done


def _show(evaluations: list[Evaluation]) -> None:
    """Write the summary table to stdout."""
    console = Console()
    table = Table(box=None, pad_edge=False)
    table.add_column("tag", no_wrap=True)
    width = _room_for_service(console.width, evaluations)
    table.add_column("service", no_wrap=True, overflow="ellipsis", max_width=width)
    table.add_column("family", no_wrap=True)
    for level in Level:
        table.add_column(level, justify="right", no_wrap=True)
    for evaluation in evaluations:
        tag = evaluation.tag
        counts = Counter(finding.level for finding in evaluation.findings)
        cells = (tag.name, tag.text("service"), tag.family, *(str(counts[x]) for x in Level))
        table.add_row(*(Text(cell) for cell in cells))
    console.print(table)


def _room_for_service(width: int, evaluations: list[Evaluation]) -> int:
    """Return how wide the services may be so that nothing else is cut [characters]."""
    tag = max((len(item.tag.name) for item in evaluations), default=0)
    family = max((len(item.tag.family) for item in evaluations), default=0)
    levels = sum(len(level) + _GAP for level in Level)
    return max(_LEAST_SERVICE, width - tag - family - levels - 2 * _GAP)
