"""Drivers other than the flow in letters: each on a linear scale of its own under the ruler."""

from __future__ import annotations

from specsheet.render.text.layout import clean
from specsheet.sheet.model import Ruler, Scale

_HEADS = ("value", "flips at", "reserve")
_BETWEEN = 2
_SHORTEST = 8  # a bar with less room is left out: the figures say it all


def draw(ruler: Ruler, gutter: int, width: int) -> list[str]:
    """Return the scales in lines of ``width`` columns, none where there are none.

    Args:
        ruler: the ruler.
        gutter: columns of the words at the left.
        width: of the whole.
    """
    if not ruler.scales:
        return []
    cells = [tuple(map(clean, (s.mark.text, s.flip, s.reserve))) for s in ruler.scales]
    widths = [max(map(len, column)) for column in zip(_HEADS, *cells, strict=True)]
    long = width - gutter - _BETWEEN - sum(widths) - _BETWEEN * len(widths)
    long = long if long >= _SHORTEST else 0
    lines = [_line("Beside the flow", " " * long, _HEADS, gutter, widths)]
    for scale, texts in zip(ruler.scales, cells, strict=True):
        words = named(clean(scale.label), clean(scale.unit), gutter)
        lines.append(_line(words, _bar(scale, long) if long else "", texts, gutter, widths))
    return [*lines, *([f"{'':{gutter + _BETWEEN}}{ruler.more}"] if ruler.more else [])]


def named(label: str, unit: str, room: int) -> str:
    """Return a label with its unit in ``room`` columns; the label gives way, the unit stays."""
    behind = f", {unit}" if unit else ""
    room -= len(behind)
    return f"{label if len(label) <= room else f'{label[: room - 1]}…'}{behind}"


def _bar(scale: Scale, long: int) -> str:
    """Return the stretch that holds on its scale; the outermost columns are for the arrows."""

    def column(position: float) -> int:
        return 1 + round(position * (long - 3))

    start = 0 if scale.open_low else column(scale.low)
    end = long - 1 if scale.open_high else column(scale.high)
    flips, mark = column(scale.flips), column(scale.mark.position)
    if mark == flips:  # closer than a column: the side still has to show
        mark += -1 if scale.ceiling == scale.mark.inside else 1
    zero = column(scale.zero)
    line = ["─"] * long
    line[zero] = "┴"
    line[start : end + 1] = ["━"] * (end + 1 - start)
    if start < zero < end:
        line[zero] = "┿"
    line[start] = "◂" if scale.open_low else "┣"
    line[end] = "▸" if scale.open_high else "┫"
    line[mark] = "◆" if scale.mark.inside else "◇"
    return "".join(line)


def _line(words: str, bar: str, texts: tuple[str, ...], gutter: int, widths: list[int]) -> str:
    cells = "".join(
        f"{'':{_BETWEEN}}{text:>{wide}}" for text, wide in zip(texts, widths, strict=True)
    )
    return f"{words:>{gutter}}{'':{_BETWEEN}}{bar}{cells}".rstrip()
