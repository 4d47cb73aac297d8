"""The starting file: readable, complete, and without an entry the reader does not know."""

from __future__ import annotations

import re

import pytest

from specsheet import packs, tagfile
from specsheet.fields import COMMON
from specsheet.tagfile import Document

OFFERED = re.compile(r"^# ([a-z0-9_]+ = )", re.MULTILINE)


@pytest.mark.parametrize("family", packs.family_keys())
def test_reads_back_with_nothing_but_the_blanks_to_fill(family: str) -> None:
    text = tagfile.new_text("FT-2104", family)
    reading = tagfile.loads(text)
    assert reading.tag is not None
    assert reading.tag.name == "FT-2104"
    assert reading.tag.family == family
    assert {problem.field for problem in reading.problems} >= {
        "fluid.kind",
        "fluid.phase",
        "points.normal.flow",
    }
    assert all("is missing; write" in problem.message for problem in reading.problems)
    assert max(map(len, text.splitlines())) <= 100


@pytest.mark.parametrize("family", packs.family_keys())
def test_everything_offered_reads_without_an_unknown_entry(family: str) -> None:
    """Take the # away from every entry offered: each example must be a valid one."""
    text = OFFERED.sub(r"\1", tagfile.new_text("FT-2104", family))
    reading = tagfile.loads(text)
    assert [str(p) for p in reading.problems if "is missing; write" not in p.message] == []
    for entry in (*COMMON, *packs.profile(family).entries):
        assert re.search(rf"^{entry.key} = ", text, re.MULTILINE), entry.path


def test_filled_in_it_is_a_tag() -> None:
    document = Document.parse(tagfile.new_text("FT-1", "vortex"))
    fill = {
        "fluid.kind": "substance",
        "fluid.substance": "water",
        "fluid.phase": "gas",
        "line.size": "DN 150",
        "line.schedule": "80",
        "points.normal.flow": "3.1 t/h",
        "points.normal.pressure": "7 bar(g)",
    }
    for path, text in fill.items():
        document.set(path, text)
    reading = tagfile.loads(document.text())
    assert reading.problems == ()
    assert reading.tag is not None
    assert reading.tag.text("line.schedule") == "80"
    # the new entry stands below the comment that explains it
    assert re.search(r'# schedule = "40".*\nschedule = "80"\n', document.text())


def test_a_tag_number_with_quotes_and_line_ends() -> None:
    name = 'FT "1"\n\\x'
    reading = tagfile.loads(tagfile.new_text(name, "vortex"))
    assert reading.tag is not None
    assert reading.tag.name == name


def test_an_unknown_family() -> None:
    with pytest.raises(KeyError):
        tagfile.new_text("FT-1", "vortx")
