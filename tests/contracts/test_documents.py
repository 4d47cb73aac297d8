"""README and DEVELOPERS stay true: what they name exists, and what they show is what comes."""

from __future__ import annotations

import re
import shutil
from pathlib import Path

import pytest
from house import ROOT
from pictures import SHEETS, sheet_bytes
from readme_blocks import blocks, play

from specsheet import packs
from specsheet.cli.parser import build_parser

README = (ROOT / "README.md").read_text(encoding="utf-8")
DEVELOPERS = (ROOT / "DEVELOPERS.md").read_text(encoding="utf-8")
COMMANDS = set(build_parser()._subparsers._group_actions[0].choices)  # type: ignore[union-attr,arg-type]


@pytest.mark.parametrize("text", [README, DEVELOPERS], ids=["README", "DEVELOPERS"])
def test_linked_files_exist(text: str) -> None:
    links = re.findall(r"\]\(([^)#:]+)\)", text)
    assert links
    assert [link for link in links if not (ROOT / link).exists()] == []


def test_named_places_exist() -> None:
    named = re.findall(r"`((?:specsheet|tests|profiles|\.ci)/[\w./-]*)`", DEVELOPERS)
    assert len(named) > 20
    assert [place for place in named if not (ROOT / place).exists()] == []


def test_every_room_is_on_the_map() -> None:
    rooms = {
        f"specsheet/{path.name}{'/' if path.is_dir() else ''}"
        for path in (ROOT / "specsheet").iterdir()
        if not path.name.startswith("_") and (path.is_dir() or path.suffix == ".py")
    }
    assert [room for room in sorted(rooms) if f"`{room}`" not in DEVELOPERS] == []


def test_readme_has_a_row_for_each_command() -> None:
    rows = set(re.findall(r"^\| `specsheet (\w+)", README, re.MULTILINE))
    assert rows == COMMANDS


def test_readme_lists_every_family() -> None:
    assert [key for key in packs.family_keys() if f"  {key} " not in README] == []


def test_readme_marks_the_two_commands() -> None:
    for name in ("demo", "test"):
        found = re.search(rf"<!-- command: {name} -->\n```sh\n(.+)\n```", README)
        assert found, name
        assert ".venv/bin/" in found[1]


@pytest.mark.skipif(shutil.which("bash") is None, reason="the tour is played by bash")
def test_tour_is_what_comes(tmp_path: Path) -> None:
    assert len(blocks(README)) >= 6
    assert play(README, tmp_path) == README, "run .ci/refresh and read the difference"


@pytest.mark.parametrize("tag", SHEETS)
def test_sample_sheet_is_what_is_printed(tag: str) -> None:
    kept = (ROOT / "output" / "sample" / f"{tag}.pdf").read_bytes()
    assert kept == sheet_bytes(tag), "run .ci/refresh and look at the sheets"
