"""Writing: whole or not at all, with a message; names that every file system takes."""

from __future__ import annotations

from pathlib import Path

import pytest

from specsheet import sheet
from specsheet.render import pdf
from tests.sheet import samples


@pytest.fixture
def made() -> sheet.Sheet:
    return sheet.build(samples.evaluation())


def test_the_file_holds_the_document_and_its_folder_is_made(
    made: sheet.Sheet, tmp_path: Path
) -> None:
    target = tmp_path / "output" / "FT-2104.pdf"
    pdf.write(made, target)
    assert target.read_bytes() == pdf.to_bytes(made)
    assert [path.name for path in target.parent.iterdir()] == ["FT-2104.pdf"]


def test_the_paper_can_be_chosen_when_printing(made: sheet.Sheet, tmp_path: Path) -> None:
    pdf.write(made, tmp_path / "x.pdf", paper="Letter")
    assert b"612 792" in (tmp_path / "x.pdf").read_bytes()


def test_a_folder_in_the_place_of_the_file(made: sheet.Sheet, tmp_path: Path) -> None:
    with pytest.raises(pdf.WriteError, match="directory"):
        pdf.write(made, tmp_path)


def test_a_file_in_the_place_of_the_folder(made: sheet.Sheet, tmp_path: Path) -> None:
    (tmp_path / "output").write_text("mine")
    with pytest.raises(pdf.WriteError, match="folder cannot be made"):
        pdf.write(made, tmp_path / "output" / "FT-2104.pdf")
    assert (tmp_path / "output").read_text() == "mine"


def test_a_full_disk_leaves_the_older_file(
    made: sheet.Sheet, tmp_path: Path, monkeypatch: pytest.MonkeyPatch
) -> None:
    target = tmp_path / "x.pdf"
    target.write_bytes(b"older")

    def full(*_: object) -> int:
        raise OSError(28, "No space left on device")

    monkeypatch.setattr("os.write", full)
    with pytest.raises(pdf.WriteError, match="disk is full"):
        pdf.write(made, target)
    assert target.read_bytes() == b"older"
    assert [path.name for path in tmp_path.iterdir()] == ["x.pdf"]


@pytest.mark.parametrize(
    ("tag", "name"),
    [
        ("FT-2104", "FT-2104.pdf"),
        ("FT 2104/A", "FT_2104_A.pdf"),
        ("../../etc/passwd", "etc_passwd.pdf"),
        ("Źródło-1", "Źródło-1.pdf"),
        ("", "sheet.pdf"),
        ("...", "sheet.pdf"),
        ("con", "_con.pdf"),
        ("x" * 300, "x" * 80 + ".pdf"),
        ("a:b*c?", "a_b_c.pdf"),
    ],
)
def test_file_names(tag: str, name: str) -> None:
    assert pdf.file_name(tag) == name
