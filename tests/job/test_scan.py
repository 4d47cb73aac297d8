"""Files and folders of a command line become tag files, each listed once."""

from __future__ import annotations

from pathlib import Path

import pytest

from specsheet import tagfile
from specsheet.job import Numbers, scan

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
    assert found.problems == ()
    tags = [file.read().reading.tag for file in found.files]
    assert [tag.text("job.title") for tag in tags if tag] == ["", "b", "b", "a", "a"]


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
        (problem,) = scan(paths).problems
        assert str(problem).startswith(f"{site}/a/job.toml:2: nonsense: ")


def _repeated(paths: list[Path]) -> list[str]:
    """Return the files whose number an earlier one of their job has."""
    numbers = Numbers()
    return [
        problem.path
        for file in scan(paths).files
        if (problem := numbers.repeated(file.read().name, file.path, file.home))
    ]


def test_the_same_number_within_one_job_only(site: Path) -> None:
    twin = write(site / "a" / "tags" / "twin.toml", "ft-9")
    assert _repeated([site / "a", site / "b"]) == [str(twin)]
    drafts = [write(site / "x" / name, "FT-9") for name in ("one.toml", "two.toml")]
    assert _repeated(drafts) == []


def test_no_tag_file_is_read_before_it_is_wanted(
    site: Path, monkeypatch: pytest.MonkeyPatch
) -> None:
    read: list[Path] = []
    monkeypatch.setattr(tagfile, "load", lambda path, _: read.append(path))
    files = scan([site / "a", site / "b"]).files
    assert read == []
    files[1].read()
    assert read == [files[1].path]


def test_what_is_not_there(site: Path) -> None:
    (site / "empty").mkdir()
    found = scan([site / "no.toml", site / "empty", site / "a" / "tags" / "ft-9.toml"])
    assert [str(problem) for problem in found.problems] == [
        f"{site}/empty:1: file: no tag file is in this folder; name one, or the folder of a job",
    ]
    absent, present = (file.read().reading for file in found.files)
    assert present.tag is not None
    assert [str(problem) for problem in absent.problems] == [
        f"{site}/no.toml:1: file: there is no such file"
    ]
