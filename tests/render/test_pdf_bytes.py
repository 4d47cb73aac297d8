"""The same sheet gives the same bytes: in every process, under every clock and environment."""

from __future__ import annotations

import hashlib
import os
import subprocess
import sys
from datetime import date
from pathlib import Path

import pytest

from specsheet import sheet
from specsheet.render import pdf
from specsheet.tag import Revision
from tests.sheet import samples

ROOT = Path(__file__).parents[2]

PROGRAM = """
import hashlib
from specsheet import sheet
from specsheet.render import pdf
from tests.sheet import samples
print(hashlib.sha256(pdf.to_bytes(sheet.build(samples.evaluation()))).hexdigest())
"""


def digest(**environment: str) -> str:
    """Digest of the sample sheet, printed by a process of its own."""
    run = subprocess.run(
        [sys.executable, "-c", PROGRAM],
        cwd=ROOT,
        env={**os.environ, **environment},
        capture_output=True,
        text=True,
        check=True,
    )
    return run.stdout.strip()


@pytest.mark.parametrize(
    "environment",
    [
        {"PYTHONHASHSEED": "1"},
        {"PYTHONHASHSEED": "12345", "TZ": "Asia/Kathmandu", "LANG": "C", "LC_ALL": "C"},
        {"SOURCE_DATE_EPOCH": "1234567890", "TZ": "America/St_Johns"},
    ],
)
def test_other_processes_write_the_same_bytes(environment: dict[str, str]) -> None:
    here = hashlib.sha256(pdf.to_bytes(sheet.build(samples.evaluation()))).hexdigest()
    assert digest(**environment) == here


def test_what_was_written_before_has_no_say() -> None:
    first = pdf.to_bytes(sheet.build(samples.evaluation()))
    pdf.to_bytes(sheet.build(samples.evaluation(given={"service": "Ж ρ Łódź 漢"})))
    assert pdf.to_bytes(sheet.build(samples.evaluation())) == first


def identity(data: bytes) -> bytes:
    """Line of the trailer with the two identifiers of the file."""
    return data[data.rindex(b"/ID") : data.rindex(b"/Info")]


def test_the_identity_follows_the_content() -> None:
    one = pdf.to_bytes(sheet.build(samples.evaluation()))
    other = pdf.to_bytes(sheet.build(samples.evaluation(given={"line.schedule": "80"})))
    assert identity(one) != identity(other)


def test_nothing_is_compressed_so_that_git_shows_the_difference() -> None:
    data = pdf.to_bytes(sheet.build(samples.evaluation()))
    assert b"Steam to digester heating header" in data


@pytest.mark.parametrize("day", [date(1, 1, 1), date(1969, 7, 20), date(9999, 12, 31)])
def test_any_date_of_revision_can_be_printed(day: date) -> None:
    held = samples.evaluation()
    tag = samples.replace(held.tag, revisions=(Revision("A", day),))
    data = pdf.to_bytes(sheet.build(samples.evaluation(tag=tag)))
    assert data.startswith(b"%PDF")
    assert f"D:{day.year:04d}{day.month:02d}{day.day:02d}".encode() in data
