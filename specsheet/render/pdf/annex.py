"""The calculation annex and the list of sources."""

from __future__ import annotations

from specsheet.render.pdf import style, wrap
from specsheet.render.pdf.grid import Column, Line, Text, grid
from specsheet.render.pdf.page import Columns, Frame
from specsheet.render.pdf.style import Style
from specsheet.render.shared import mark, numbers, portions, values
from specsheet.sheet.model import Row, Sheet, Working
from specsheet.sheet.words import named

_FEW = 3  # operating points that fit a column of the annex
_LABEL, _UNIT, _VALUE = 78.0, 34.0, 36.0
_SMALL = Style(7.0)
_SMALL_STRONG = Style(7.0, True)


def draw(frame: Frame, sheet: Sheet) -> None:
    """Set the annex on pages of its own: equations with their numbers, methods, sources."""
    with_numbers = [working for working in sheet.annex if working.inputs]
    methods = [working for working in sheet.annex if not working.inputs]
    if with_numbers:
        _opening(frame)
        few = all(len(working.columns) <= _FEW for working in with_numbers)
        columns = Columns.of(frame, 2 if few else 1)
        for working in with_numbers:
            _working(columns, sheet, working)
        frame.index = columns.index
        frame.y = columns.y if columns.place == 0 else style.FOOT
    _methods(frame, sheet, methods)
    _sources(frame, sheet)


def _opening(frame: Frame) -> None:
    frame.keep(90.0)
    frame.heading("Calculation annex")
    frame.y -= 2.0
    frame.paragraph(
        "Every derived value with its equation, its source and the numbers put in. The numbers are "
        "printed rounded; the program calculates with all digits, in SI units.",
        style.QUIET,
    )
    frame.y -= 6.0


def _working(frame: Columns, sheet: Sheet, working: Working) -> None:
    """Set one value: name, equation, numbers put in, result."""
    parts = _parts(frame, working)
    equation = wrap.lines(frame.book.clean(working.equation), frame.width - 12.0, _SMALL.size)
    rows = (len(working.inputs) + 2) * (style.BODY.leading + 3.6) * len(parts)
    frame.skip(10.0)
    frame.keep(min(30.0 + len(equation) * _SMALL.leading + rows, frame.full))
    cited = numbers(sheet, working.source)
    name = frame.book.clean(named(working.label, working.symbol))
    for line in wrap.lines(name, frame.width - 40.0, style.SUBSECTION.size):
        frame.page.text(frame.x, frame.y - 8.0, line, style.SUBSECTION)
        frame.y -= style.SUBSECTION.leading
    frame.page.right(frame.x + frame.width, frame.y + 2.5, cited, style.SMALL)
    frame.y -= 2.0
    top, column = frame.y, (frame.index, frame.place)
    frame.paragraph(working.equation, _SMALL, indent=12.0)
    if (frame.index, frame.place) == column:
        frame.page.line(frame.x + 3.0, top, frame.x + 3.0, frame.y, style.MIDDLE, 1.6)
    frame.y -= 2.0
    for part in parts:
        names = working.columns[part] or ("",)
        lines = [_line(row, part) for row in working.inputs]
        lines.append(_line(working.result, part, bold=True))
        grid(frame, "", _columns(frame, names), lines, gap=0.0)


def _parts(frame: Frame, working: Working) -> list[slice]:
    """Return the operating points in portions that fit the frame."""
    most = max(1, int((frame.width - _LABEL - _UNIT) / _value(frame)))
    return portions(len(working.columns), most)


def _value(frame: Frame) -> float:
    """Return the width of a value: that of the sheet's own columns, in the smaller type."""
    return max(_VALUE, frame.book.column * _SMALL.size / style.BODY.size)


def _columns(frame: Frame, names: tuple[str, ...]) -> list[Column]:
    each = min(_value(frame), (frame.width - _LABEL - _UNIT) / len(names))
    return [
        Column("", frame.width - _UNIT - each * len(names), _SMALL),
        Column("", _UNIT, style.SMALL),
        *(Column(name, each, _SMALL, True) for name in names),
    ]


def _line(row: Row, part: slice, bold: bool = False) -> Line:
    look = _SMALL_STRONG if bold else _SMALL
    label = Text(f"{mark(row)} {named(row.label, row.symbol)}".strip(), look)
    cells = [Text(text, look) for text in values(row, part)]
    return Line([label, row.unit, *cells])


def _methods(frame: Frame, sheet: Sheet, workings: list[Working]) -> None:
    """List the values that one method gives as a whole, without numbers of the sheet put in."""
    columns = [
        Column("Value", 190.0),
        Column("Method", frame.width - 190.0 - 40.0),
        Column("Source", 40.0, style.SMALL, True),
    ]
    lines = [
        Line(
            [
                named(working.label, working.symbol),
                working.equation or "–",
                numbers(sheet, working.source),
            ]
        )
        for working in workings
    ]
    grid(frame, "Methods", columns, lines)


def _sources(frame: Frame, sheet: Sheet) -> None:
    columns = [Column("", 26.0, style.QUIET), Column("", frame.width - 26.0)]
    lines = [Line([f"[{number}]", source]) for number, source in enumerate(sheet.sources, start=1)]
    grid(frame, "Sources", columns, lines)
    if frame.book.missing:
        frame.skip(8.0)
        shown = ", ".join(f"U+{ord(letter):04X}" for letter in frame.book.missing)
        text = f"The font has no letter for {shown}: the number stands in brackets instead."
        frame.paragraph(text, style.QUIET)
