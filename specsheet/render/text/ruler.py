"""The range ruler in letters: windows over a logarithmic axis, operating points above."""

from __future__ import annotations

from specsheet.render.text import scales
from specsheet.render.text.layout import clean, heading
from specsheet.sheet.model import Ruler, Window
from specsheet.sheet.ruler import stagger

_GUTTER = 26


def draw(ruler: Ruler, width: int) -> list[str]:
    """Return the ruler in lines of ``width`` columns."""
    return [*heading("Range ruler", width), *by_flow(ruler, width), *beside(ruler, width)]


def by_flow(ruler: Ruler, width: int) -> list[str]:
    """Return the points, a line for each window, and the axis with its labels."""
    long = width - _GUTTER - 2
    names = [clean(f"{mark.name[:30]} {mark.text}") for mark in ruler.marks]
    columns = [round(mark.position * (long - 1)) for mark in ruler.marks]
    lengths = [len(name) for name in names]
    starts = [
        min(max(column - length // 2, 0), max(long - length, 0))
        for column, length in zip(columns, lengths, strict=True)
    ]
    centres = [start + length / 2 for start, length in zip(starts, lengths, strict=True)]
    lanes = stagger(centres, lengths, 1.0)
    lines: list[str] = []
    for lane in reversed(range(max(lanes, default=0) + 1)):
        line = [" "] * long
        for name, start, at in zip(names, starts, lanes, strict=True):
            if at == lane:
                line[start : start + len(name)] = name
        lines.append(_line("", line))
    lines += [_line(window.label, _bar(window, long, columns)) for window in ruler.windows]
    axis = ["─"] * long
    for tick in ruler.ticks:
        axis[round(tick.position * (long - 1))] = "┴" if tick.label else "╴"
    for mark, column in zip(ruler.marks, columns, strict=True):
        axis[column] = "◆" if mark.inside else "◇"
    lines.append(_line("", axis))
    words = scales.named(ruler.label, ruler.unit, _GUTTER)
    lines.append(_line(words, _labels(ruler, long)))
    return lines


def beside(ruler: Ruler, width: int) -> list[str]:
    """Return the scales of the other drivers, none where there are none."""
    return scales.draw(ruler, _GUTTER, width)


def _bar(window: Window, long: int, columns: list[int]) -> list[str]:
    start, end = round(window.low * (long - 1)), round(window.high * (long - 1))
    line = ["│" if place in columns else " " for place in range(long)]
    for place in range(start, end + 1):
        line[place] = "┿" if place in columns else "━"
    line[start] = "◂" if window.open_low else "┣"
    line[end] = "▸" if window.open_high else "┫"
    return line


def _labels(ruler: Ruler, long: int) -> list[str]:
    line = [" "] * long
    taken = -1
    for tick in ruler.ticks:
        start = round(tick.position * (long - 1)) - len(tick.label) // 2
        if tick.label and start > taken and start + len(tick.label) <= long and start >= 0:
            line[start : start + len(tick.label)] = tick.label
            taken = start + len(tick.label)
    return line


def _line(words: str, line: list[str]) -> str:
    shown = clean(words)
    shown = shown if len(shown) <= _GUTTER else f"{shown[: _GUTTER - 1]}…"
    return f"{shown:>{_GUTTER}}  {''.join(line)}".rstrip()
