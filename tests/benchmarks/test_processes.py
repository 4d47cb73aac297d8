"""Whole commands as processes: start-up, throughput over many tags, growth and memory."""

from __future__ import annotations

import shutil
from pathlib import Path

import pytest
from cli_process import DEMO, demo_job
from measure import process, report

pytestmark = pytest.mark.benchmark

SPECSHEET = ("-m", "specsheet")
BASELINE = ("-c", "import numpy, pint")
FLUIDS = "from specsheet.fluid.library import {0}; {0}()"


def _fluids(function: str) -> float:
    """Return what loading the fluid library costs by itself [s]."""
    return process(("-c", FLUIDS.format(function))).seconds - process(("-c", "pass")).seconds


@pytest.mark.parametrize(
    ("tag", "load"), [("FT-2104", "extension"), ("FT-3410", "fluids")], ids=["steam", "mixture"]
)
def test_derive_one_tag(tag: str, load: str, tmp_path: Path) -> None:
    job = demo_job(tmp_path)
    spent = process((*SPECSHEET, "derive", f"tags/{tag}.toml", "--json"), job).seconds
    ratio = spent / (process(BASELINE).seconds + _fluids(load))
    report(f"derive {tag} by importing numpy, pint and the fluids", ratio, "", 1.5)
    assert ratio <= 1.5


@pytest.mark.parametrize("command", ["--help", "families", "schema"])
def test_light_command(command: str) -> None:
    ratio = process((*SPECSHEET, command)).seconds / process(BASELINE).seconds
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


def test_check_a_thousand_tags(tmp_path: Path) -> None:
    few = process((*SPECSHEET, "check"), _job_of(250, tmp_path), 1)
    many = process((*SPECSHEET, "check"), _job_of(1000, tmp_path), 1)
    report("check 1000 tags, a tag", many.seconds / 1000 * 1e3, "ms", 5.0)
    report("check 1000 tags by 250 tags, time", many.seconds / few.seconds, "", 4.4)
    report("check 1000 tags, memory", many.megabytes, "MB", 250.0)
    assert many.seconds / 1000 <= 5e-3
    assert many.seconds / few.seconds <= 4.4
    assert many.megabytes <= 250.0


def test_print_many_sheets(tmp_path: Path) -> None:
    few = process((*SPECSHEET, "print"), _job_of(50, tmp_path), 1)
    many = process((*SPECSHEET, "print"), _job_of(200, tmp_path), 1)
    report("print 200 sheets, a sheet", many.seconds / 200 * 1e3, "ms", 30.0)
    report("print 200 sheets by 50 sheets, time", many.seconds / few.seconds, "", 4.4)
    report("print 200 sheets, memory", many.megabytes, "MB", 250.0)
    assert many.seconds / 200 <= 30e-3
    assert many.seconds / few.seconds <= 4.4
    assert many.megabytes <= 250.0
