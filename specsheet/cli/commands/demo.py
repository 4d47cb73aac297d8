"""Write the invented job, print its sheets, show a summary and open it in the form."""

from __future__ import annotations

import sys
from argparse import Namespace
from pathlib import Path

from rich.console import Console
from rich.progress import BarColumn, MofNCompleteColumn, Progress, TextColumn
from rich.table import Table
from rich.text import Text

from specsheet import job, packs, sheet, tagfile
from specsheet.cli.narrate import say
from specsheet.cli.status import Status
from specsheet.evaluate import Evaluation, evaluate
from specsheet.findings import Level
from specsheet.render import pdf


def run(arguments: Namespace) -> int | Status:
    """Run the demo; ends with 0 although some of its tags are wrong on purpose."""
    folder = Path(arguments.folder)
    try:
        _write_job(folder)
        results = _print_all(folder, Path(arguments.output))
    except (OSError, tagfile.SaveError, pdf.WriteError) as problem:
        say(f"the demo could not be written: {problem}")
        return Status.UNUSABLE
    _show(results)
    say(f"the job is in {folder}, the sheets are in {arguments.output}")
    if not arguments.no_form and sys.stdin.isatty() and sys.stdout.isatty():
        from specsheet import tui

        return tui.run(str(folder))
    return Status.FINE


def _write_job(folder: Path) -> None:
    """Copy the embedded job; a file that exists is somebody's work and stays."""
    source = packs.folder() / "demo"
    for path in sorted(source.rglob("*.toml")):
        target = folder / path.relative_to(source)
        if target.exists():
            continue
        target.parent.mkdir(parents=True, exist_ok=True)
        tagfile.save(target, path.read_text(encoding="utf-8"))


def _print_all(folder: Path, output: Path) -> list[tuple[Evaluation, Path]]:
    results: list[tuple[Evaluation, Path]] = []
    found = list(job.scan([str(folder)]).readings())
    console = Console(stderr=True)
    columns = (TextColumn("{task.description}"), BarColumn(), MofNCompleteColumn())
    with Progress(*columns, console=console) as progress:
        task = progress.add_task("printing", total=len(found))
        for reading in found:
            for problem in reading.problems:
                say(str(problem))
            if reading.tag is not None:
                evaluation = evaluate(reading.tag)
                target = output / pdf.file_name(reading.tag.name)
                pdf.write(sheet.build(evaluation), target)
                results.append((evaluation, target))
            progress.advance(task)
    return results


def _show(results: list[tuple[Evaluation, Path]]) -> None:
    """Write the summary table to stdout."""
    table = Table(box=None, pad_edge=False)
    for heading in ("tag", "service", "family", "stop", "caution", "note", "sheet"):
        table.add_column(heading, justify="right" if heading in tuple(Level) else "left")
    for evaluation, path in results:
        counts = [
            str(sum(finding.level is level for finding in evaluation.findings)) for level in Level
        ]
        tag = evaluation.tag
        cells = (tag.name, tag.text("service"), tag.family, *counts, str(path))
        table.add_row(*(Text(cell) for cell in cells))
    Console().print(table)
