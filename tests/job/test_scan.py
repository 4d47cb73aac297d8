"""Files and folders of a command line become tag files, each read once."""

from __future__ import annotations

from pathlib import Path

import pytest

from specsheet import tagfile
from specsheet.job import scan

TAG = """\
schema = 1
tag = "{}"
family = "vortex"
[fluid]
kind = "substance"
substance = "water"
phase = "liquid"
[[points]]
name = "normal"
flow = "20 m3/h"
"""


def write(path: Path, tag: str) -> Path:
    path.parent.mkdir(parents=True, exist_ok=True)
    path.write_text(TAG.replace("{}", tag))
    return path


@pytest.fixture
def site(tmp_path: Path) -> Path:
    for unit in ("a", "b"):
        for number in (10, 9):
            write(tmp_path / unit / "tags" / f"ft-{number}.toml", f"FT-{number}")
        (tmp_path / unit / "job.toml").write_text(f'schema = 1\ntitle = "{unit}"\n')
    return tmp_path


def test_folders_and_files_in_the_order_named(site: Path) -> None:
    lone = write(site / "lone.toml", "FT-1")
    found = scan([lone, site / "b", site / "a" / "tags", site / "b" / "tags" / "ft-9.toml"])
    assert [str(file.path.relative_to(site)) for file in found.files] == [
        "lone.toml",
        "b/tags/ft-9.toml",
        "b/tags/ft-10.toml",
        "a/tags/ft-9.toml",
        "a/tags/ft-10.toml",
    ]
    assert found.all_problems == ()
    titles = [file.reading.tag.text("job.title") for file in found.files if file.reading.tag]
    assert titles == ["", "b", "b", "a", "a"]


def test_each_job_is_read_once(site: Path, monkeypatch: pytest.MonkeyPatch) -> None:
    real, calls = tagfile.find_job, []

    def counted(path: Path) -> tagfile.Job:
        calls.append(path)
        return real(path)

    monkeypatch.setattr(tagfile, "find_job", counted)
    files = sorted((site / "a" / "tags").iterdir())
    assert len(scan(files).files) == 2
    assert len(calls) == 1


def test_problems_of_a_job_are_reported_once(site: Path) -> None:
    (site / "a" / "job.toml").write_text("schema = 1\nnonsense = 1\n")
    files = sorted((site / "a" / "tags").iterdir())
    for paths in ([site / "a"], files, [site / "a", *files, site / "a" / "job.toml"]):
        (problem,) = scan(paths).all_problems
        assert str(problem).startswith(f"{site}/a/job.toml:2: nonsense: ")


def test_the_same_number_within_one_job_only(site: Path) -> None:
    twin = write(site / "a" / "tags" / "twin.toml", "FT-9")
    assert [p.path for p in scan([site / "a", site / "b"]).all_problems] == [str(twin)]
    drafts = [write(site / "x" / name, "FT-9") for name in ("one.toml", "two.toml")]
    assert scan(drafts).all_problems == ()


def test_what_is_not_there(site: Path) -> None:
    (site / "empty").mkdir()
    found = scan([site / "no.toml", site / "empty", site / "a" / "tags" / "ft-9.toml"])
    assert [str(problem) for problem in found.all_problems] == [
        f"{site}/empty:1: file: no tag file is in this folder; name one, or the folder of a job",
        f"{site}/no.toml:1: file: there is no such file",
    ]
    assert [file.reading.tag is None for file in found.files] == [True, False]


def test_one_bad_file_does_not_hide_the_others(site: Path) -> None:
    (site / "a" / "tags" / "ft-9.toml").write_text("flow = 3 t/h")
    found = scan([site / "a"])
    assert [file.reading.tag is None for file in found.files] == [True, False]
    assert len(found.all_problems) == 1
