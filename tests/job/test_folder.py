"""A job folder: which files are its tags, in which order, and which tag numbers clash."""

from __future__ import annotations

from pathlib import Path

import pytest

from specsheet import job
from specsheet.job import file_stem, natural_order

JOB = 'schema = 1\nclient = "Tidal Island Works"\n'


def tag_text(name: str) -> str:
    return (
        f'schema = 1\ntag = "{name}"\nfamily = "vortex"\n'
        '[fluid]\nkind = "substance"\nsubstance = "water"\nphase = "liquid"\n'
        '[[points]]\nname = "normal"\nflow = "20 m3/h"\n'
    )


@pytest.fixture
def folder(tmp_path: Path) -> Path:
    (tmp_path / "job.toml").write_text(JOB)
    (tmp_path / "tags").mkdir()
    for name in ("FT-10", "FT-2", "ft-3"):
        (tmp_path / "tags" / f"{name}.toml").write_text(tag_text(name))
    for name in (".FT-2.toml", "FT-2.toml~", "notes.txt"):
        (tmp_path / "tags" / name).write_text("not a tag")
    return tmp_path


@pytest.mark.parametrize("place", ["", "job.toml", "tags"])
def test_a_job_is_opened_by_folder_file_or_tags(folder: Path, place: str) -> None:
    opened = job.open(folder / place)
    assert opened.folder == folder
    assert opened.job.given["job.client"] == "Tidal Island Works"
    assert [path.name for path in opened.paths] == ["FT-2.toml", "ft-3.toml", "FT-10.toml"]
    assert [file.name for file in opened.read()] == ["FT-2", "ft-3", "FT-10"]
    assert all(file.reading.problems == () for file in opened.read())


def test_every_tag_has_the_entries_of_the_job(folder: Path) -> None:
    for file in job.open(folder).read():
        assert file.reading.tag is not None
        assert file.reading.tag.folder == str(folder)
        assert file.reading.tag.text("job.client") == "Tidal Island Works"


def test_one_tag_file_of_a_job(folder: Path) -> None:
    opened = job.open(folder / "tags" / "FT-2.toml")
    assert opened.job.folder == str(folder)
    (file,) = opened.read()
    assert file.name == "FT-2"


def test_one_tag_file_alone(tmp_path: Path) -> None:
    (tmp_path / "a.toml").write_text(tag_text("FT-1"))
    (file,) = job.open(tmp_path / "a.toml").read()
    assert file.name == "FT-1"
    assert file.reading.problems == ()


def test_a_folder_without_a_job(tmp_path: Path) -> None:
    (tmp_path / "a.toml").write_text(tag_text("FT-1"))
    opened = job.open(tmp_path)
    assert opened.folder == tmp_path
    assert [file.name for file in opened.read()] == ["FT-1"]


def test_find(folder: Path) -> None:
    opened = job.open(folder)
    found = opened.find("FT-3")
    assert found is not None
    assert found.path == folder / "tags" / "ft-3.toml"
    assert opened.find("FT-4") is None


def test_the_same_tag_number_twice_is_a_problem_of_the_second(folder: Path) -> None:
    (folder / "tags" / "ft-9.toml").write_text(tag_text("ft-2"))
    files = {file.path.name: file.reading for file in job.open(folder).read()}
    assert files["FT-2.toml"].problems == ()
    (problem,) = files["ft-9.toml"].problems
    assert problem.field == "tag"
    assert f'{folder}/tags/FT-2.toml is tag "ft-2" already' in problem.message
    assert files["ft-9.toml"].tag is not None


def test_a_damaged_file_goes_by_its_name(folder: Path) -> None:
    (folder / "tags" / "ft-9.toml").write_bytes(b"\xff\xfe")
    file = job.open(folder).find("FT-9")
    assert file is not None
    assert file.reading.tag is None
    assert "UTF-16" in str(file.reading.problems[0])


def test_a_folder_that_cannot_be_listed(folder: Path, monkeypatch: pytest.MonkeyPatch) -> None:
    def refuse(_: Path) -> object:
        raise PermissionError(13, "Permission denied")

    monkeypatch.setattr(Path, "iterdir", refuse)
    opened = job.open(folder)
    assert opened.paths == ()
    assert "cannot be listed: Permission denied" in str(opened.problems[0])


def test_natural_order() -> None:
    names = ["b", "FT-10", "FT-2", "ft-2a", "A", "FT-2-1", "FT-" + "9" * 30, "10", "9"]
    assert sorted(names, key=natural_order) == [
        "9", "10", "A", "b", "FT-2", "FT-2-1", "ft-2a", "FT-10", "FT-" + "9" * 30
    ]  # fmt: skip


@pytest.mark.parametrize(
    ("tag", "stem"),
    [
        ("FT-2104", "FT-2104"),
        ("10 FT 2104 A", "10-FT-2104-A"),
        ("../../etc/passwd", "etc-passwd"),
        ("..", "tag"),
        ("", "tag"),
        ("=20.QMA01/BF1", "20.QMA01-BF1"),
        ("FT\0\n1", "FT-1"),
        ("Ä" * 5, "tag"),
        ("x" * 300, "x" * 100),
    ],
)
def test_file_stem(tag: str, stem: str) -> None:
    assert file_stem(tag) == stem


def test_offers_stay_in_their_folder(folder: Path) -> None:
    opened = job.open(folder)
    assert opened.offers("FT-2") == folder / "offers" / "FT-2"
    assert opened.offers("../x") == folder / "offers" / "x"
