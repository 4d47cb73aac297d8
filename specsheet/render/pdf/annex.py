"""The calculation annex and the list of sources: two columns that fill one after the other."""

from __future__ import annotations

from collections.abc import Sequence

from specsheet.render.pdf import style
from specsheet.render.pdf.fonts import Run
from specsheet.render.pdf.page import Columns, Frame
from specsheet.render.shared import figures, groups, numbers, put_in, source
from specsheet.sheet.model import Sheet, Working
from specsheet.sheet.words import named

_CITED = 26.0  # kept free for the numbers of the sources
_APART = 8.0  # between the name of a value and its figures
_NUMBER = 22.0  # for the number of a source in the list
_GAP = 2.4  # above and below the rule between two workings


def draw(frame: Frame, sheet: Sheet) -> None:
    """Set the annex: every value with its equation and the numbers put in, then the sources."""
    if sheet.annex:
        _opening(frame, sheet)
    columns = Columns.of(frame, 2)
    for group in groups(sheet.annex):
        _working(columns, sheet, group)
    _sources(columns, sheet)
    frame.index = columns.index
    frame.y = columns.y if columns.place == 0 else style.FOOT


def _opening(frame: Frame, sheet: Sheet) -> None:
    frame.keep(90.0)
    frame.heading("Calculation annex")
    frame.y -= 2.0
    names = sheet.points.columns
    order = f" Values that vary stand in the order {' | '.join(names)}." if len(names) > 1 else ""
    frame.paragraph(
        "Every derived value with its equation, its source and the numbers put in; symbols are "
        "those of the tables. The numbers are printed rounded; the program calculates with all "
        f"digits, in SI units.{order}",
        style.QUIET,
    )
    frame.y -= 5.0


def _working(frame: Columns, sheet: Sheet, group: Sequence[Working]) -> None:
    """Set the values that one equation gives: names with results, equation, numbers put in."""
    working = group[0]
    equation = _lines(frame, working.equation or "–", frame.width - _CITED)
    inputs = _lines(frame, put_in(working), frame.width - _CITED) if working.inputs else ()
    count = len(equation) + len(inputs) + len(group)
    frame.keep(min(count * style.FINE.leading + 2.0 * _GAP, frame.full))
    for one in group:
        _result(frame, one)
    cited = numbers(sheet, working.source)
    frame.page.right(frame.x + frame.width, frame.y - style.FINE.size, cited, style.SMALL)
    frame.put(equation, style.FINE)
    frame.put(inputs, style.QUIET)
    frame.y -= _GAP
    frame.page.rule(frame.x, frame.x + frame.width, frame.y)
    frame.y -= _GAP


def _result(frame: Columns, working: Working) -> None:
    """Set the name of a value and, at the right, its figures; below one another where too wide."""
    look = style.FINE_STRONG
    names = _lines(frame, named(working.label, working.symbol), frame.width)
    shown = _lines(frame, figures(working.result), frame.width)
    name, figure = names[0], shown[0]
    if len(names) == len(shown) == 1 and name.width + _APART + figure.width <= frame.width:
        frame.keep(look.leading)
        y = frame.y - look.size
        frame.page.run(frame.x + frame.width - figure.width, y, figure, look)
        frame.put(names, look)
    else:
        frame.put(names, look)
        frame.put(shown, look)


def _lines(frame: Frame, text: str, room: float) -> tuple[Run, ...]:
    return frame.book.lines(text, room, style.FINE)


def _sources(frame: Columns, sheet: Sheet) -> None:
    if sheet.sources:
        frame.skip(9.0)
        frame.keep(60.0)
        frame.heading("Sources")
        frame.y -= 2.0
    for number, cited in enumerate(sheet.sources, start=1):
        lines = _lines(frame, source(cited), frame.width - _NUMBER)
        frame.keep(style.FINE.leading)
        frame.page.text(frame.x, frame.y - style.FINE.size, f"[{number}]", style.QUIET)
        frame.put(lines, style.FINE, _NUMBER)
        frame.y -= 0.8
    if frame.book.missing:
        frame.skip(8.0)
        shown = ", ".join(f"U+{ord(letter):04X}" for letter in frame.book.missing)
        text = f"The font has no letter for {shown}: the number stands in brackets instead."
        frame.paragraph(text, style.QUIET)
