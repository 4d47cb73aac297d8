"""The panes as text: widths, order, letters. No terminal."""

from __future__ import annotations

from dataclasses import replace

import pytest
from rich.style import Style

from specsheet.findings import Level, Origin
from specsheet.sheet.model import Cell, LimitRow, Mark, Row, Scale, Table
from specsheet.tui import readout
from specsheet.tui.glyphs import plain_ascii, printable
from specsheet.tui.lines import strip_of
from specsheet.tui.protocol import Trouble
from specsheet.tui.readout import Item
from tests.tui.conftest import sheet


def text_of(lines: list[readout.Line]) -> list[str]:
    return ["".join(text for text, _ in line) for line in lines]


@pytest.mark.parametrize("width", [40, 60, 78, 120])
def test_no_line_of_the_findings_is_wider_than_the_pane(width: int) -> None:
    found = readout.items(sheet("long " * 40), (), (), str)
    lines, owners = readout.finding_lines(found, width)
    assert max(len(line) for line in text_of(lines)) <= width
    assert len(lines) == len(owners)
    assert sorted(set(owners)) == list(range(len(found)))


def test_the_worst_comes_first_and_every_level_has_a_letter() -> None:
    refused = [Item(Level.STOP, "line.size", "Nominal size", "not stored: no size")]
    found = readout.items(sheet(), [Trouble("points", "no point")], refused, str)
    lines, _ = readout.finding_lines(found, 200)
    assert [line[0] for line in text_of(lines)] == ["S", "S", "C", "!"]
    assert readout.counts(found) == "stop 2, caution 1, safety 1"
    assert readout.worst(found) is Level.STOP


def test_a_standing_caution_of_the_service_is_shown_but_is_no_finding() -> None:
    found = readout.items(sheet(), (), (), str)
    assert any("licensed engineer" in item.message and item.level is None for item in found)
    assert readout.counts(found) == "caution 1, safety 1"
    assert readout.worst(found) is Level.CAUTION


def test_derived_values_stand_in_columns_with_their_origin() -> None:
    lines = text_of(readout.derived(sheet(), 60))
    head, row = lines[0], lines[1]
    assert "minimum" in head
    assert "Velocity m/s" in row
    assert "1.2g" in row
    assert row.index("1.2") + 2 == head.index("minimum") + len("minimum") - 1


def test_the_ruler_shows_points_scale_and_windows() -> None:
    ruler = sheet().ruler
    assert ruler is not None
    lines = text_of(readout.ruler_lines(ruler, 78))
    joined = "\n".join(lines)
    for words in ("normal", "minimum", "Mass flow, t/h", "velocity", "10"):
        assert words in joined
    assert max(map(len, lines)) <= 78


def test_what_flips_a_verdict_beside_the_flow_stands_below_the_windows() -> None:
    ruler = sheet().ruler
    assert ruler is not None
    bare = text_of(readout.ruler_lines(ruler, 78))
    mark = Mark("minimum", "182.0", 0.8, True)
    words = ("170.4", mark, "−12 K", Level.STOP, False)
    scale = Scale("Temperature", "°C", 0.7, 1.0, False, True, 0.0, *words)
    lines = readout.ruler_lines(replace(ruler, scales=(scale, scale), more="1 more."), 78)
    assert text_of(lines)[: len(bare)] == bare
    head, *scales, more = lines[len(bare) :]
    assert [line[0][1] for line in (head, *scales, more)] == ["label", *["accent"] * 3]
    for ((said, _),) in scales:
        assert said.startswith("           Temperature, °C  ─┴")
        assert said.endswith("182.0     170.4    −12 K")
        assert len(said) == 78


def test_the_ruler_keeps_its_columns_in_plain_ascii(monkeypatch: pytest.MonkeyPatch) -> None:
    monkeypatch.setenv("SPECSHEET_ASCII", "1")
    ruler = sheet().ruler
    assert ruler is not None
    mark = Mark("minimum", "182.0", 0.8, True)
    words = ("170.4", mark, "−12 K", Level.STOP, False)
    scale = Scale("Temperature", "°C", 0.7, 1.0, False, True, 0.0, *words)
    windows = (replace(ruler.windows[0], label="Velocity ≤ 3 m/s"),)
    ruler = replace(ruler, windows=windows, scales=(scale,))
    lines = [plain_ascii(line) for line in text_of(readout.ruler_lines(ruler, 78))]
    assert max(map(len, lines)) == 78
    for name in ("Velocity <= 3 m/s", "Temperature, deg C"):
        (line,) = (line for line in lines if name in line)
        assert line.index(name) + len(name) == 26
    assert lines[-1].endswith("-12 K")


@pytest.mark.parametrize("text", ["━┿◂▸┣┫│─┴╴◆◇✓✗▸", "Δ ρ ≤ 5 m³/h ± 1 °C ·"])
def test_every_sign_of_ours_has_a_plain_form(text: str) -> None:
    plain = plain_ascii(text)
    assert plain.isascii()
    assert "?" not in plain


def test_control_characters_cannot_reach_the_terminal() -> None:
    assert printable("a\x1b[2Jb\nc\td") == "a [2Jb c d"


@pytest.mark.parametrize(
    ("holds", "said"),
    [
        (True, "reserve +32 % (4.10 t/h) to velocity at normal"),
        (False, "velocity at normal does not hold; it would at +32 % (4.10 t/h)"),
    ],
)
def test_the_summary_tells_a_reserve_from_a_limit_that_does_not_hold(
    holds: bool, said: str
) -> None:
    limit = LimitRow(
        key="velocity",
        label="Velocity",
        symbol="v",
        point="normal",
        value="8",
        allowed="at most 10",
        unit="m/s",
        holds=holds,
        level=Level.CAUTION,
        verdict="",
        reserve="+32 %",
        flips="4.10 t/h",
        message="",
        source="",
    )
    told = readout.summary(replace(sheet(), limits=(limit,)), ())
    assert told == f"no findings; {said}"


@pytest.mark.parametrize("width", [34, 46, 60, 80])
def test_no_number_is_ever_cut(width: int) -> None:
    names = tuple(f"case {number}" for number in range(7))
    cells = tuple(Cell(f"{1234567 + number}", Origin.DERIVED) for number in range(7))
    table = Table("points", "Points", names, (Row("mass_flow", "Mass flow", "qm", cells, "kg/h"),))
    lines = text_of(readout.derived(replace(sheet(), points=table), width))
    joined = "\n".join(lines)
    assert all(cell.text in joined for cell in cells)
    assert max(len(line.rstrip()) for line in lines) <= width


def test_a_cut_line_shows_that_it_is_cut() -> None:
    strip = strip_of([("12345678", Style())], 5, Style())
    assert strip.text == "1234…"
    assert strip_of([("12345", Style())], 5, Style()).text == "12345"
