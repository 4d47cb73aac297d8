"""``job.toml``: what all tags of a folder share, read by the same machinery as a tag file."""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass, field
from pathlib import Path
from types import MappingProxyType
from typing import Any

from specsheet.tag import Value
from specsheet.tagfile.collect import Collector
from specsheet.tagfile.known import job_sections
from specsheet.tagfile.migrate import CURRENT
from specsheet.tagfile.problem import Problem
from specsheet.tagfile.source import BOM, read_text
from specsheet.tagfile.syntax import newer, parse, schema_of

JOB_FILE = "job.toml"

_NOTHING: Mapping[str, Value] = MappingProxyType({})


@dataclass(frozen=True, slots=True)
class Job:
    """What ``job.toml`` states.

    Attributes:
        path: the file, or "" where there is none.
        folder: the folder it stands in, or "".
        given: path -> value; paths start with "job." ("job.base.temperature").
        problems: everything in it that could not be used.
    """

    path: str = ""
    folder: str = ""
    given: Mapping[str, Value] = field(default_factory=lambda: _NOTHING)
    problems: tuple[Problem, ...] = ()


#: the job of a tag file that stands alone
NO_JOB = Job()


def find_job(path: str | Path) -> Job:
    """Return the job of a tag file: of its folder, else of the folder above, else NO_JOB."""
    here = Path(path).absolute().parent
    for folder in (here, here.parent):
        candidate = folder / JOB_FILE
        if _exists(candidate):
            return load_job(candidate)
    return NO_JOB


def _exists(path: Path) -> bool:
    try:
        return path.exists()
    except (OSError, ValueError):
        return False


def load_job(path: str | Path) -> Job:
    """Read a ``job.toml``. Nothing that stands at ``path`` raises."""
    folder = str(Path(path).parent)
    text = read_text(path)
    if isinstance(text, Problem):
        return Job(str(path), folder, problems=(text,))
    text = text.removeprefix(BOM)
    data = parse(text, str(path))
    if isinstance(data, Problem):
        return Job(str(path), folder, problems=(data,))
    schema = schema_of(data)
    if schema > CURRENT:
        return Job(str(path), folder, problems=(newer(text, str(path), schema),))
    collector = Collector(text, str(path), job_sections())
    given = _given(data, collector)
    return Job(str(path), folder, given, collector.problems())


def _given(data: Mapping[str, Any], collector: Collector) -> dict[str, Value]:
    given: dict[str, Value] = {}
    names = tuple(name.partition(".")[2] for name in job_sections())
    tables = tuple(name for name in names if name)
    top = collector.table(data, job_sections()["job"], beside=tables)
    given.update((f"job.{key}", value) for key, value in top.items())
    for name in tables:
        keys = job_sections()[f"job.{name}"]
        values = collector.table(data.get(name, {}), keys, place=(name,), field=name)
        given.update((f"job.{name}.{key}", value) for key, value in values.items())
    return given
