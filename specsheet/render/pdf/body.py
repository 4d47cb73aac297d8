"""The tables of the sheet: values by point, single values in two columns, limits, findings."""

from __future__ import annotations

from collections.abc import Sequence

from specsheet.findings import Level, Origin
from specsheet.render import shared
from specsheet.render.pdf import fonts, head, style
from specsheet.render.pdf.grid import Column, Line, Ornament, Text, grid, halves
from specsheet.render.pdf.page import Frame, Page, Place
from specsheet.render.shared import mark, marks, numbers, portions, values
from specsheet.sheet.model import FindingRow, LimitRow, Row, Sheet, Table
from specsheet.sheet.words import MARKS, named

_LABEL, _SYMBOL, _UNIT, _MARK, _SOURCE = 128.0, 30.0, 50.0, 13.0, 26.0
_ROWS = _LABEL + _SYMBOL + _UNIT + _MARK + _SOURCE
_NARROWEST, _WIDEST = 46.0, 84.0
_WHERE = 150.0
_LONGEST = 24  # letters of a value that decide the width of its column


def narrowest(sheet: Sheet) -> float:
    """Return the width of a column that holds every value by point without breaking a number."""
    tables = [table for table in (sheet.points, *sheet.tables, sheet.budget) if table]
    words = {
        word
        for table in tables
        if table.columns
        for row in table.rows
        for cell in row.cells
        for word in cell.text[:_LONGEST].split(" ")
    }
    widest = max((fonts.width(word, style.STRONG.size) for word in words), default=0.0)
    return max(_NARROWEST, widest + 8.0)


def by_point(frame: Frame, sheet: Sheet, table: Table) -> None:
    """Set a table with one column for each operating point, split where it is too wide."""
    most = max(1, int((frame.width - _ROWS) / frame.book.column))
    for part in portions(len(table.columns), most) if table.rows else ():
        title = shared.title(table, part)
        columns = point_columns(table.columns[part], frame.width)
        lines = [_point_line(sheet, row, part) for row in table.rows]
        grid(frame, frame.book.clean(title), columns, lines)
    if table.note:
        frame.y -= 3.0
        frame.paragraph(table.note, style.QUIET)


def point_columns(names: Sequence[str], width: float) -> list[Column]:
    """Return the columns of a table by point; the same for every table of a sheet."""
    rest = width - _ROWS
    each = min(rest / len(names), _WIDEST)
    label = _LABEL + rest - each * len(names)
    return [
        Column("", label),
        Column("", _SYMBOL, style.QUIET),
        Column("", _UNIT, style.QUIET),
        Column("", _MARK, style.QUIET),
        *(Column(name, each, style.BODY, True) for name in names),
        Column("", _SOURCE, style.SMALL, True),
    ]


def _point_line(sheet: Sheet, row: Row, part: slice) -> Line:
    return Line(
        [
            shared.label(row),
            row.symbol,
            row.unit,
            mark(row),
            *values(row, part),
            numbers(sheet, row.source),
        ]
    )


def singles(frame: Frame, sheet: Sheet) -> None:
    """Set the tables of single values in two columns, each table into the emptier one."""
    wide = (frame.width - style.GUTTER) / 2.0
    columns = [
        Frame(frame.book, frame.x + place * (wide + style.GUTTER), wide, frame.index, frame.y)
        for place in range(2)
    ]
    for table in sheet.tables:
        if table.columns:
            continue
        column = min(columns, key=lambda one: (one.index, -one.y))
        grid(column, table.title, _single_columns(wide), _single_lines(sheet, table.rows))
    lowest = max(columns, key=lambda one: (one.index, -one.y))
    frame.index, frame.y = lowest.index, lowest.y


def _single_columns(width: float) -> list[Column]:
    rest = width - _MARK - _SOURCE
    return [
        Column("", _MARK, style.QUIET),
        Column("", rest * 0.6, style.LISTED),
        Column("", rest * 0.4, style.LISTED),
        Column("", _SOURCE, style.SMALL, True),
    ]


def _single_lines(sheet: Sheet, rows: Sequence[Row]) -> list[Line]:
    return [
        Line(
            [
                marks(row.origins),
                named(row.label, row.symbol),
                f"{row.text} ({row.note})" if row.note else row.text,
                numbers(sheet, row.source),
            ]
        )
        for row in rows
    ]


def findings(frame: Frame, sheet: Sheet) -> None:
    """Set the findings, worst first, each with its badge."""
    rest = frame.width - 54.0 - _WHERE - _SOURCE
    columns = [
        Column("", 54.0),
        Column("What is wrong and how to mend it", rest),
        Column("Where", _WHERE, style.QUIET),
        Column("", _SOURCE, style.SMALL, True),
    ]
    grid(frame, "Findings", columns, [_finding(sheet, row) for row in sheet.findings])


def _finding(sheet: Sheet, row: FindingRow) -> Line:
    said = f"{row.message}\n{row.reserve}." if row.reserve else row.message
    first = " · ".join(text for text in (row.point, row.code) if text)
    where = "\n".join(text for text in (first, row.field) if text)
    return Line(["", said, where, numbers(sheet, row.source)], _badge(row.level))


def _badge(level: Level) -> Ornament:
    def draw(page: Page, x: float, y: float, _: float) -> None:
        head.badge(page, x, y - 13.0, level)

    return draw


def limits(frame: Frame, sheet: Sheet) -> None:
    """Set every limit looked at with value, bounds, verdict and reserve."""
    rest = frame.width - (66.0 + 58.0 + 92.0 + 44.0 + 46.0 + 64.0 + _SOURCE)
    columns = [
        Column("Limit", rest),
        Column("Tightest at", 66.0, style.QUIET),
        Column("Value", 58.0, style.BODY, True),
        Column("Allowed", 92.0, style.BODY),
        Column("Verdict", 44.0, style.BODY),
        Column("Reserve", 46.0, style.BODY, True),
        Column("Flips at", 64.0, style.BODY, True),
        Column("", _SOURCE, style.SMALL, True),
    ]
    grid(frame, "Limits checked", columns, [_limit(sheet, row) for row in sheet.limits])
    if sheet.limits:
        frame.y -= 3.0
        frame.paragraph(
            "Reserve: by how much the flow (or the driver named) can change before the verdict "
            "changes; for a limit that does not hold, by how much it must change.",
            style.QUIET,
        )


def _limit(sheet: Sheet, row: LimitRow) -> Line:
    allowed = f"{row.allowed} {row.unit}".strip()
    verdict: str | Text = "holds" if row.holds else Text(row.verdict.upper(), style.STRONG)
    label = named(row.label, row.symbol)
    said = label if row.holds else f"{label}: {row.message}"
    cells = [said, row.point, row.value, allowed, verdict, row.reserve, row.flips]
    return Line([*cells, numbers(sheet, row.source)])


def assumptions(frame: Frame, sheet: Sheet) -> None:
    """List everything that nobody typed, in two columns."""
    rest = (frame.width - style.GUTTER) / 2.0 - _MARK
    columns = [
        Column("", _MARK, style.QUIET),
        Column("Nobody stated", rest * 0.58, style.LISTED),
        Column("Assumed", rest * 0.42, style.LISTED),
    ]
    lines = [Line([MARKS[Origin.ASSUMED], row.label, row.text]) for row in sheet.assumptions]
    halves(frame, "Assumptions", columns, lines)


def clauses(frame: Frame, sheet: Sheet) -> None:
    """Set notes and clauses: heading at the left, sentences at the right."""
    columns = [
        Column("", 92.0, style.SUBSECTION),
        Column("", frame.width - 92.0),
    ]
    lines = [
        Line([clause.title if place == 0 else "", sentence])
        for clause in sheet.clauses
        for place, sentence in enumerate(clause.sentences)
    ]
    lines += [Line([label, text]) for label, text in head.overlong(frame, sheet)]
    if sheet.remarks:
        lines.append(Line(["Remarks", sheet.remarks]))
    grid(frame, "Notes and clauses", columns, lines)


def reply(frame: Frame, sheet: Sheet) -> None:
    """Set what the bidder must state, each with a place to write in."""
    label, wide = 190.0, frame.width - 190.0 - 60.0
    columns = [Column("The bidder states", label), Column("", wide), Column("Unit", 60.0)]

    def place(name: str, words: str) -> Ornament:
        def draw(page: Page, x: float, y: float, high: float) -> None:
            left, bottom = x + label, y - high + 1.2
            page.box(left, bottom, wide - 8.0, high - 2.4, edge=style.MIDDLE)
            frame.book.places.append(
                Place(name, words, frame.index, left, bottom, left + wide - 8.0, y - 1.2)
            )

        return draw

    lines = [
        Line(
            [Text(item.label, style.BODY), Text("", style.SECTION), item.unit],
            place(item.key, item.label),
        )
        for item in sheet.reply
    ]
    grid(frame, "Reply", columns, lines)


def revisions(frame: Frame, sheet: Sheet) -> None:
    """Set the revision block, and a line to sign on for the last revision."""
    each = 66.0
    columns = [
        Column("Mark", 40.0, style.STRONG),
        Column("Date", 66.0),
        Column("What changed", frame.width - 40.0 - 66.0 - 3 * each),
        *(Column(title, each) for title in ("By", "Checked", "Approved")),
    ]

    def sign(page: Page, x: float, y: float, high: float) -> None:
        for place in range(3):
            left = x + frame.width - (3 - place) * each
            page.line(left, y - high + 5.0, left + each - 8.0, y - high + 5.0, style.GREY, 0.5)

    lines = [
        Line([row.mark, row.date, row.text, row.by, row.checked, row.approved])
        for row in sheet.revisions
    ]
    blank = Text("\n", style.BODY)
    lines.append(Line(["", "", Text("Signatures", style.QUIET), blank, "", ""], sign))
    grid(frame, "Revisions", columns, lines)
