"""Tables: cells wrap, rows stay whole, and the headings are set again overleaf.

A row that is taller than a page is the one exception: it flows on, line by line.
"""

from __future__ import annotations

from collections.abc import Callable, Sequence
from typing import NamedTuple

from specsheet.render.pdf import style
from specsheet.render.pdf.fonts import Run
from specsheet.render.pdf.page import Frame, Page
from specsheet.render.pdf.style import Style

_PADDING = 2.4  # above and below the text of a row, together
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


class _Place(NamedTuple):
    """Where the cells of a column stand: left or right edge in the frame, room and style."""

    x: float
    room: float
    look: Style
    right: bool


class _Row(NamedTuple):
    """One row ready to be set: the cells that hold something, and how high they stand."""

    cells: Sequence[tuple[tuple[Run, ...], Style, _Place]]
    ornament: Ornament | None
    lines: int
    size: float  # of the largest letters
    leading: float
    height: float


def grid(
    frame: Frame, title: str, columns: Sequence[Column], rows: Sequence[Line], gap: float = 11.0
) -> None:
    """Set a table with its title, ``gap`` below what stands above; nothing without rows."""
    if not rows:
        return
    made = _made(frame, columns, rows)
    whole = sum(row.height for row in made)
    start = min(sum(row.height for row in made[:_START]), frame.full / 2.0)
    frame.skip(gap)
    frame.keep(_TITLE + (whole if _TITLE + whole <= frame.full * _WHOLE else start))
    if title:
        frame.heading(title)
    _rows(frame, title, columns, made)


def _rows(frame: Frame, title: str, columns: Sequence[Column], made: Sequence[_Row]) -> None:
    """Set headings and rows, and go on overleaf where the page is full."""
    _headings(frame, columns)
    for place, row in enumerate(made):
        needed = row.height
        if place == len(made) - 2:  # the last row is not left alone
            needed += made[-1].height
        if frame.room < needed <= frame.full - _TITLE:
            _overleaf(frame, title, columns)
        _row(frame, title, columns, row)


def halves(frame: Frame, title: str, columns: Sequence[Column], rows: Sequence[Line]) -> None:
    """Set a long list under one title in two columns of equal height, the left one read first.

    Args:
        frame: where it is set.
        title: heading across both columns.
        columns: of one half; their widths fill ``(frame.width - style.GUTTER) / 2``.
        rows: the rows; nothing is set without any.
    """
    if not rows:
        return
    made = _made(frame, columns, rows)
    half = sum(row.height for row in made) / 2.0
    cut, left = 0, 0.0
    while left < half:
        left += made[cut].height
        cut += 1
    frame.skip(11.0)
    frame.keep(_TITLE + min(left, frame.full * _WHOLE))
    frame.heading(title)
    wide = (frame.width - style.GUTTER) / 2.0
    ends = []
    for x, part in ((frame.x, made[:cut]), (frame.x + wide + style.GUTTER, made[cut:])):
        column = Frame(frame.book, x, wide, frame.index, frame.y)
        _rows(column, "", columns, part)
        ends.append((column.index, -column.y))
    frame.index, frame.y = max(ends)[0], -max(ends)[1]


def _headings(frame: Frame, columns: Sequence[Column]) -> None:
    if not any(column.heading for column in columns):
        return
    headings = [Text(column.heading, style.HEADING) for column in columns]
    (row,) = _made(frame, columns, [Line(headings)])
    _draw(frame, row, 0, row.lines)
    frame.y -= row.height
    frame.page.line(frame.x, frame.y, frame.x + frame.width, frame.y, style.GREY, 0.5)


def _made(frame: Frame, columns: Sequence[Column], lines: Sequence[Line]) -> list[_Row]:
    """Return rows with their texts broken into lines."""
    places = _places(columns)
    return [_broken(frame, places, line) for line in lines]


def _places(columns: Sequence[Column]) -> list[_Place]:
    places = []
    x = 0.0
    for column in columns:
        edge = x + column.width - _BETWEEN if column.right else x
        room = max(column.width - _BETWEEN, column.look.size)
        places.append(_Place(edge, room, column.look, column.right))
        x += column.width
    return places


def _broken(frame: Frame, places: Sequence[_Place], line: Line) -> _Row:
    broken = frame.book.lines
    cells = []
    size = 0.0
    count = 1
    for place, cell in zip(places, line.cells, strict=True):
        text, look = (cell, place.look) if isinstance(cell, str) else cell
        if look.size > size:
            size = look.size
        if text:
            lines = broken(text, place.room, look)
            cells.append((lines, look, place))
            if len(lines) > count:
                count = len(lines)
    leading = size * style.LEADING
    return _Row(cells, line.ornament, count, size, leading, count * leading + _PADDING)


def _row(frame: Frame, title: str, columns: Sequence[Column], row: _Row) -> None:
    done = 0
    while done < row.lines:
        fits = int((frame.room - _PADDING) / row.leading)
        if fits < 1:
            _overleaf(frame, title, columns)
            continue
        count = min(fits, row.lines - done)
        height = count * row.leading + _PADDING
        if row.ornament and done == 0:
            row.ornament(frame.page, frame.x, frame.y, height)
        _draw(frame, row, done, count)
        frame.y -= height
        done += count
    frame.page.rule(frame.x, frame.x + frame.width, frame.y)


def _overleaf(frame: Frame, title: str, columns: Sequence[Column]) -> None:
    frame.turn()
    if title:
        text = f"{title}, continued"
        frame.page.text(frame.x, frame.y - style.QUIET.size, text, style.QUIET)
        frame.y -= style.QUIET.leading + 2.0
    _headings(frame, columns)


def _draw(frame: Frame, row: _Row, start: int, count: int) -> None:
    page = frame.page
    baseline = frame.y - _PADDING / 2.0 - row.size * 0.93
    for lines, look, place in row.cells:
        edge = frame.x + place.x
        y = baseline
        for line in lines[start : start + count]:
            page.run(edge - line.width if place.right else edge, y, line, look)
            y -= row.leading
