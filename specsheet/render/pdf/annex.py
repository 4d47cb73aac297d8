"""The calculation annex and the list of sources."""

from __future__ import annotations

from specsheet.render.pdf import body, style, wrap
from specsheet.render.pdf.grid import Column, Line, grid
from specsheet.render.pdf.page import Frame
from specsheet.sheet.model import Sheet, Working


def draw(frame: Frame, sheet: Sheet) -> None:
    """Set the annex on pages of its own: equations with their numbers, methods, sources."""
    with_numbers = [working for working in sheet.annex if working.inputs]
    methods = [working for working in sheet.annex if not working.inputs]
    if with_numbers:
        _opening(frame, "Calculation annex")
        for working in with_numbers:
            _working(frame, sheet, working)
    _methods(frame, sheet, methods)
    _sources(frame, sheet)


def _opening(frame: Frame, title: str) -> None:
    frame.keep(90.0)
    frame.heading(title)
    frame.y -= 2.0
    frame.paragraph(
        "Every derived value with its equation, its source and the numbers put in. The numbers are "
        "printed rounded; the program calculates with all digits, in SI units.",
        style.QUIET,
    )


def _working(frame: Frame, sheet: Sheet, working: Working) -> None:
    """Set one value: name, equation, numbers put in, result."""
    parts = body.chunks(working.columns, frame.width, frame.book.column)
    room = frame.width - 12.0
    equation = wrap.lines(frame.book.clean(working.equation), room, style.BODY.size)
    rows = (len(working.inputs) + 1) * (style.BODY.leading + 3.6) * len(parts)
    whole = 36.0 + len(equation) * style.BODY.leading + rows
    frame.skip(9.0)
    frame.keep(min(whole, frame.full))
    cited = body.numbers(sheet, working.source)
    name = f"{working.label}  {working.symbol}".rstrip()
    frame.page.text(frame.x, frame.y - 8.0, frame.book.clean(name), style.SUBSECTION)
    right = frame.x + frame.width
    frame.page.right(right, frame.y - 8.0, cited, style.SMALL)
    frame.y -= 13.0
    top, page = frame.y, frame.index
    frame.paragraph(working.equation, style.BODY, indent=12.0)
    if frame.index == page:
        frame.page.line(frame.x + 3.0, top, frame.x + 3.0, frame.y, style.MIDDLE, 1.6)
    frame.y -= 2.0
    for part in parts:
        columns = body.point_columns(working.columns[part] or ("",), frame.width)
        lines = [Line(body.point_cells(sheet, row, part)) for row in working.inputs]
        lines.append(Line(body.point_cells(sheet, working.result, part, bold=True)))
        grid(frame, "", columns, lines, gap=0.0)


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
                f"{working.label}  {working.symbol}".rstrip(),
                working.equation or "–",
                body.numbers(sheet, working.source),
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
