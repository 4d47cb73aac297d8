"""Tables: cells wrap, rows stay whole, and the headings are set again overleaf.

A row that is taller than a page is the one exception: it flows on, line by line.
"""

from __future__ import annotations

from collections.abc import Callable, Sequence
from typing import NamedTuple

from specsheet.render.pdf import style, wrap
from specsheet.render.pdf.page import Frame, Page
from specsheet.render.pdf.style import Style

_PADDING = 3.6  # above and below the text of a row, together
_BETWEEN = 6.0  # kept free at the right of each cell
_TITLE = 34.0  # of the title and the headings
_WHOLE = 0.26  # of a page: a table up to this height is not split
_START = 4  # rows of a longer table that stand on its first page at least


class Column(NamedTuple):
    """One column: heading, width [pt], how its text is set and whether it stands at the right."""

    heading: str
    width: float
    look: Style = style.BODY
    right: bool = False


class Text(NamedTuple):
    """A cell set in another style than its column."""

    text: str
    look: Style


#: draws something besides text into a row: page, x, top and height of the row
Ornament = Callable[[Page, float, float, float], None]


class Line(NamedTuple):
    """One row: a cell for each column, and what else is drawn."""

    cells: Sequence[str | Text]
    ornament: Ornament | None = None


class _Set(NamedTuple):
    """One cell ready to be set: lines, style, left edge in the frame, width and side."""

    lines: tuple[str, ...]
    look: Style
    x: float
    width: float
    right: bool


def grid(
    frame: Frame, title: str, columns: Sequence[Column], rows: Sequence[Line], gap: float = 11.0
) -> None:
    """Set a table with its title, ``gap`` below what stands above; nothing without rows."""
    if not rows:
        return
    cells = [_cells(frame, columns, row) for row in rows]
    heights = [_height(row) for row in cells]
    whole = _TITLE + sum(heights)
    start = _TITLE + min(sum(heights[:_START]), frame.full / 2.0)
    frame.skip(gap)
    frame.keep(whole if whole <= frame.full * _WHOLE else start)
    if title:
        frame.heading(title)
    _headings(frame, columns)
    for place, (row, held) in enumerate(zip(rows, cells, strict=True)):
        needed = sum(heights[place:]) if place == len(rows) - 2 else heights[place]
        if frame.room < needed <= frame.full - _TITLE:  # the last row is not left alone
            _overleaf(frame, title, columns)
        _row(frame, title, columns, row, held)


def _headings(frame: Frame, columns: Sequence[Column]) -> None:
    if not any(column.heading for column in columns):
        return
    cells = _cells(
        frame, columns, Line([Text(column.heading, style.HEADING) for column in columns])
    )
    height = _height(cells)
    _draw(frame, cells, 0, max(len(cell.lines) for cell in cells))
    frame.y -= height
    frame.page.line(frame.x, frame.y, frame.x + frame.width, frame.y, style.GREY, 0.5)


def _cells(frame: Frame, columns: Sequence[Column], row: Line) -> list[_Set]:
    made = []
    x = 0.0
    for column, cell in zip(columns, row.cells, strict=True):
        text, look = cell if isinstance(cell, Text) else (cell, column.look)
        room = max(column.width - _BETWEEN, look.size)
        lines = wrap.lines(frame.book.clean(text), room, look.size)
        made.append(_Set(lines, look, x, column.width, column.right))
        x += column.width
    return made


def _leading(cells: Sequence[_Set]) -> float:
    return max(cell.look.leading for cell in cells)


def _height(cells: Sequence[_Set]) -> float:
    return max(len(cell.lines) for cell in cells) * _leading(cells) + _PADDING


def _row(
    frame: Frame, title: str, columns: Sequence[Column], row: Line, cells: Sequence[_Set]
) -> None:
    total = max(len(cell.lines) for cell in cells)
    leading = _leading(cells)
    done = 0
    while done < total:
        fits = int((frame.room - _PADDING) / leading)
        if fits < 1:
            _overleaf(frame, title, columns)
            continue
        count = min(fits, total - done)
        height = count * leading + _PADDING
        if row.ornament and done == 0:
            row.ornament(frame.page, frame.x, frame.y, height)
        _draw(frame, cells, done, count)
        frame.y -= height
        done += count
    frame.page.line(frame.x, frame.y, frame.x + frame.width, frame.y, style.HAIRLINE, 0.4)


def _overleaf(frame: Frame, title: str, columns: Sequence[Column]) -> None:
    frame.turn()
    if title:
        text = f"{title}, continued"
        frame.page.text(frame.x, frame.y - style.QUIET.size, text, style.QUIET)
        frame.y -= style.QUIET.leading + 2.0
    _headings(frame, columns)


def _draw(frame: Frame, cells: Sequence[_Set], start: int, count: int) -> None:
    leading = _leading(cells)
    baseline = frame.y - _PADDING / 2.0 - max(cell.look.size for cell in cells) * 0.93
    for cell in cells:
        for place, line in enumerate(cell.lines[start : start + count]):
            y = baseline - place * leading
            if cell.right:
                frame.page.right(frame.x + cell.x + cell.width - _BETWEEN, y, line, cell.look)
            else:
                frame.page.text(frame.x + cell.x, y, line, cell.look)
