"""``job.toml``: found beside its tags, read by the same rules, shared by a run."""

from __future__ import annotations

from pathlib import Path

import pytest

from specsheet import tagfile

JOB = """\
schema = 1
title = "Heat station renewal"
client = "Tidal Island Works"
atmospheric_pressure = "0.98 bar(a)"
units = { mass_flow = "t/h" }
velocity_limits = { liquid = 3, gas = 25.0 }

[base]
temperature = "0 degC"
"""
TAG = """\
schema = 1
tag = "FT-1"
family = "vortex"
[fluid]
kind = "substance"
substance = "water"
phase = "liquid"
[[points]]
name = "normal"
flow = "20 m3/h"
pressure = "1 bar(g)"
"""


@pytest.fixture
def folder(tmp_path: Path) -> Path:
    (tmp_path / "job.toml").write_text(JOB)
    (tmp_path / "tags").mkdir()
    (tmp_path / "tags" / "ft-1.toml").write_text(TAG)
    return tmp_path


@pytest.mark.parametrize("place", ["tags/ft-1.toml", "ft-2.toml"])
def test_entries_of_the_job_are_the_tags(folder: Path, place: str) -> None:
    (folder / place).write_text(TAG)
    reading = tagfile.load(folder / place)
    tag = reading.tag
    assert reading.problems == ()
    assert tag is not None
    assert tag.folder == str(folder)
    assert tag.text("job.client") == "Tidal Island Works"
    assert tag.atmospheric_pressure == pytest.approx(98000)
    assert tag.base.temperature == pytest.approx(273.15)
    assert tag.base.pressure == pytest.approx(101325)  # assumed
    assert tag.table("job.units") == {"mass_flow": "t/h"}
    assert tag.table("job.velocity_limits") == {"liquid": 3.0, "gas": 25.0}
    assert "job.base.temperature" not in tag.assumed
    assert "job.base.pressure" in tag.assumed
    pressure = tag.points[0].quantity("pressure")
    assert pressure is not None
    assert tag.absolute(pressure) == pytest.approx(198000)


def test_a_job_two_folders_above_is_another_one(folder: Path) -> None:
    deep = folder / "tags" / "old"
    deep.mkdir()
    (deep / "ft-1.toml").write_text(TAG)
    tag = tagfile.load(deep / "ft-1.toml").tag
    assert tag is not None
    assert tag.folder == ""


def test_problems_of_the_job_come_with_the_tag(folder: Path) -> None:
    bad = JOB.replace("title", "titel").replace('"0 degC"', "0").replace('"t/h"', '"furlong"')
    (folder / "job.toml").write_text(bad)
    reading = tagfile.load(folder / "tags" / "ft-1.toml")
    path = folder / "job.toml"
    assert reading.tag is not None
    assert reading.tag.text("job.client") == "Tidal Island Works"
    assert [(p.path, p.line, p.field) for p in reading.problems] == [
        (str(path), 2, "titel"),
        (str(path), 5, "units"),
        (str(path), 9, "base.temperature"),
    ]


@pytest.mark.parametrize(
    ("text", "line", "field", "said"),
    [
        ("", 1, "file", "the file is empty"),
        ("schema = 1\ntitle = x\n", 2, "file", "not valid TOML"),
        ("title = 'x'\n", 1, "schema", "is missing"),
        ("schema = 2\n", 1, "schema", "install a newer specsheet"),
        ("schema = 1\nbase = 3\n", 2, "base", "a section [base] was wanted"),
        ("schema = 1\npaper = 'A5'\n", 2, "paper", "one of A4, Letter"),
        ("schema = 1\nunits = { mas_flow = 't/h' }\n", 2, "units", 'did you mean "mass_flow"?'),
        ("schema = 1\nunits = { mass_flow = 3 }\n", 2, "units", "the number 3 came"),
        ("schema = 1\nunits = {}\n", 2, "units", "a table of units was wanted"),
        ("schema = 1\npressure = '1 bar'\n", 2, "pressure", "[base]"),
    ],
)
def test_problems(folder: Path, text: str, line: int, field: str, said: str) -> None:
    (folder / "job.toml").write_text(text)
    (problem,) = tagfile.load_job(folder / "job.toml").problems
    assert (problem.line, problem.field) == (line, field)
    assert said in problem.message


def test_a_directory_in_place_of_the_job(folder: Path) -> None:
    (folder / "job.toml").unlink()
    (folder / "job.toml").mkdir()
    reading = tagfile.load(folder / "tags" / "ft-1.toml")
    assert reading.tag is not None
    assert "is a directory" in str(reading.problems[0])


def test_a_job_read_once_serves_a_run(folder: Path) -> None:
    job = tagfile.load_job(folder / "job.toml")
    (folder / "job.toml").write_text("broken")
    reading = tagfile.load(folder / "tags" / "ft-1.toml", job)
    assert reading.problems == ()
    assert reading.tag is not None
    assert reading.tag.text("job.title") == "Heat station renewal"
