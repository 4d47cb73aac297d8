"""Whole commands as processes: start-up, throughput over many tags, growth and memory."""

from __future__ import annotations

import shutil
from pathlib import Path

import pytest
from cli_process import DEMO, demo_job
from measure import cost, memory, process, report

pytestmark = pytest.mark.benchmark

SPECSHEET = ("-m", "specsheet")
BASELINE = ("-c", "import numpy, pint")
#: processor time of that on the machine that the budgets in milliseconds were set on [s]
IMPORTED = 0.25
FLUIDS = "from specsheet.fluid.library import {0}; {0}()"


def _fluids(function: str) -> float:
    """Return what loading the fluid library costs by itself [s]."""
    return process(("-c", FLUIDS.format(function))) - process(("-c", "pass"))


@pytest.mark.parametrize(
    ("tag", "load"), [("FT-2104", "extension"), ("FT-3410", "fluids")], ids=["steam", "mixture"]
)
def test_derive_one_tag(tag: str, load: str, tmp_path: Path) -> None:
    job = demo_job(tmp_path)
    spent = process((*SPECSHEET, "derive", f"tags/{tag}.toml", "--json"), job)
    ratio = spent / (process(BASELINE) + _fluids(load))
    report(f"derive {tag} by importing numpy, pint and the fluids", ratio, "", 1.5)
    assert ratio <= 1.5


@pytest.mark.parametrize("command", ["--help", "families", "schema"])
def test_light_command(command: str) -> None:
    ratio = process((*SPECSHEET, command)) / process(BASELINE)
    report(f"{command} by importing numpy and pint", ratio, "", 1.0)
    assert ratio <= 1.0


def _job_of(count: int, folder: Path) -> Path:
    """Write a job of many tags: those of the embedded job, over and over."""
    job = folder / f"job{count}"
    (job / "tags").mkdir(parents=True)
    shutil.copy(DEMO / "job.toml", job)
    texts = [path.read_text(encoding="utf-8") for path in sorted((DEMO / "tags").glob("*.toml"))]
    for place in range(count):
        text = texts[place % len(texts)]
        head = text.index('tag      = "')
        end = text.index("\n", head)
        renamed = f'{text[:head]}tag = "FT-{place:05}"{text[end:]}'
        # the process data differ from tag to tag, as they do in a real job
        renamed = renamed.replace(' degC"', f'.{place // len(texts):03} degC"')
        (job / "tags" / f"FT-{place:05}.toml").write_text(renamed, encoding="utf-8")
    return job


def _hold(command: str, few: Path, many: Path, budget: float) -> None:
    """Report and hold the cost of a command over many tags.

    Args:
        command: the command.
        few, many: jobs, the second of four times as many tags.
        budget: time that the user may wait for each tag [ms].
    """
    count = len(list((many / "tags").iterdir()))
    what = f"{command} {count} tags"
    runs = [cost((*SPECSHEET, command), many) for _ in range(3)]
    wall = min(1e3 * run.wall / count for run in runs)
    spent = min(run.seconds for run in runs)
    growth = spent / min(cost((*SPECSHEET, command), few).seconds for _ in range(3))
    held = memory((*SPECSHEET, command), many)
    pace = process(BASELINE) / IMPORTED
    report(f"{what}, time a tag", wall, "ms", budget)
    report(f"{what}, time a tag at the pace of the budgets", wall / pace, "ms", budget)
    report(f"{what}, processor time a tag", 1e3 * spent / count, "ms")
    report(f"{what}, processor time by a quarter of them", growth, "", 4.4)
    report(f"{what}, memory of all processes", held, "MB", 250.0)
    assert wall / pace <= budget
    assert growth <= 4.4
    assert held <= 250.0


def test_check_a_thousand_tags(tmp_path: Path) -> None:
    _hold("check", _job_of(250, tmp_path), _job_of(1000, tmp_path), 5.0)


def test_print_many_sheets(tmp_path: Path) -> None:
    _hold("print", _job_of(50, tmp_path), _job_of(200, tmp_path), 30.0)
