"""The plain-text sheet: golden, within its width, complete, and harmless to a terminal."""

from __future__ import annotations

from pathlib import Path

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from specsheet import sheet
from specsheet.render import text
from tests.sheet import samples

GOLDEN = Path(__file__).parent / "golden" / "sheet.txt"


def test_golden() -> None:
    made = text.text(sheet.build(samples.evaluation()))
    assert made == GOLDEN.read_text(encoding="utf-8")


@pytest.mark.parametrize("width", [80, 100, 132])
@pytest.mark.parametrize("held", [samples.evaluation, samples.one_point, samples.nine_points])
def test_no_line_is_wider_than_asked(width: int, held) -> None:
    made = text.text(sheet.build(held()), width)
    assert max(map(len, made.splitlines())) <= width


def test_a_narrow_terminal_gets_80_columns() -> None:
    made = sheet.build(samples.evaluation())
    assert text.text(made, 20) == text.text(made, 80)


def test_every_row_and_value_is_there() -> None:
    made = sheet.build(samples.nine_points())
    words = text.text(made, 100)
    for table in (made.points, *made.tables):
        for row in table.rows:
            for cell in row.cells:
                assert cell.text in words
    for finding in made.findings:
        assert finding.code in words


def test_no_number_is_broken_over_two_lines() -> None:
    made = sheet.build(samples.evaluation())
    words = text.text(made)
    for limit in made.limits:
        assert limit.value in words
        assert limit.flips in words or " " in limit.flips


def test_control_characters_never_reach_the_terminal() -> None:
    made = sheet.build(samples.evaluation(given={"service": "a\x1b[2Jb\x07\u202ec\td"}))
    words = text.text(made)
    assert "\x1b" not in words
    assert "\x07" not in words
    assert "\u202e" not in words


@settings(max_examples=30, deadline=None)
@given(st.text(max_size=300), st.text(max_size=60))
def test_any_text_is_printed(service: str, tag: str) -> None:
    held = samples.evaluation(given={"service": service, "tag": tag, "remarks": service})
    made = text.text(sheet.build(held))
    assert made.endswith("\n")
