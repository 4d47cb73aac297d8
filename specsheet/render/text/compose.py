"""The order of things on the plain-text sheet."""

from __future__ import annotations

from collections.abc import Sequence

from specsheet.findings import Level, Origin
from specsheet.render import shared
from specsheet.render.shared import mark, numbers, portions
from specsheet.render.text import ruler
from specsheet.render.text.layout import heading, table, wrapped
from specsheet.sheet.model import Row, Sheet, Table, Working
from specsheet.sheet.words import LEGEND, MARKS, named

_NARROWEST = 80
_SIGNS = {Level.STOP: "× STOP", Level.CAUTION: "! CAUTION", Level.NOTE: "  NOTE"}


def text(sheet: Sheet, width: int = 80) -> str:
    """Return the sheet as plain text, ended by a line break.

    Args:
        sheet: the sheet.
        width: columns, 80 at least.
    """
    width = max(width, _NARROWEST)
    lines = _head(sheet, width)
    if sheet.ruler is not None:
        lines += ruler.draw(sheet.ruler, width)
    for values in (sheet.points, *sheet.tables, *((sheet.budget,) if sheet.budget else ())):
        lines += _values(sheet, values, width)
    lines += _limits(sheet, width)
    lines += _findings(sheet, width)
    lines += _prose(sheet, width)
    lines += _annex(sheet, width)
    lines += _sources(sheet, width)
    return "\n".join(line.rstrip() for line in lines) + "\n"


def _head(sheet: Sheet, width: int) -> list[str]:
    revision = f"revision {sheet.revision}" if sheet.revision else "no revision"
    day = sheet.date.isoformat() if sheet.date else ""
    lines = wrapped(f"{sheet.tag}  {sheet.title}", width)
    lines += wrapped(sheet.service, width) if sheet.service else []
    lines += wrapped(", ".join(part for part in (sheet.status, revision, day) if part), width)
    lines.append("")
    rows = [(line.label, line.text) for line in sheet.head]
    lines += table(rows, width, (False, False))
    lines += ["", *wrapped(sheet.verdict, width), "", LEGEND]
    return lines


def _values(sheet: Sheet, values: Table, width: int) -> list[str]:
    """Return a table of values; one with many operating points in portions."""
    if not values.rows:
        return []
    lines: list[str] = []
    for part in portions(len(values.columns), (width - 47) // 11):
        lines += heading(shared.title(values, part), width)
        if values.columns:
            rows = [_row(sheet, row, part) for row in values.rows]
            lines += _by_point(rows, values.columns[part], width)
        else:
            lines += table([_single(sheet, row) for row in values.rows], width, (False,) * 5)
    return [*lines, *(wrapped(values.note, width) if values.note else ())]


def _by_point(rows: list[list[str]], names: Sequence[str], width: int) -> list[str]:
    at_right = (False, False, False, *(True,) * len(names), False, False)
    return table([["", "", "", *names, "", ""], *rows], width, at_right)


def _row(sheet: Sheet, row: Row, part: slice) -> list[str]:
    source = numbers(sheet, row.source)
    cells = shared.values(row, part)
    return [shared.label(row), row.symbol, row.unit, *cells, mark(row), source]


def _single(sheet: Sheet, row: Row) -> list[str]:
    return [shared.label(row), row.symbol, row.text, mark(row), numbers(sheet, row.source)]


def _limits(sheet: Sheet, width: int) -> list[str]:
    if not sheet.limits:
        return []
    rows = [["Limit", "at", "Value", "Allowed", "Verdict", "Reserve", "Flips at", ""]]
    rows += [
        [
            row.label,
            row.point,
            row.value,
            f"{row.allowed} {row.unit}".strip(),
            row.verdict if row.holds else row.verdict.upper(),
            row.reserve,
            row.flips,
            numbers(sheet, row.source),
        ]
        for row in sheet.limits
    ]
    at_right = (False, False, True, False, False, True, True, False)
    return [*heading("Limits checked", width), *table(rows, width, at_right)]


def _findings(sheet: Sheet, width: int) -> list[str]:
    lines = heading("Findings", width) if sheet.findings else []
    for row in sheet.findings:
        where = ", ".join(part for part in (row.point, row.field, row.code) if part)
        said = " ".join(
            part for part in (row.message, f"{row.reserve}." * bool(row.reserve)) if part
        )
        source = numbers(sheet, row.source)
        body = [*wrapped(said, width - 12), *wrapped(f"({where}) {source}".rstrip(), width - 12)]
        lines += _hanging(_SIGNS[row.level], body)
    return lines


def _hanging(sign: str, body: list[str], indent: int = 12) -> list[str]:
    return [f"{sign if place == 0 else '':<{indent}}{line}" for place, line in enumerate(body)]


def _prose(sheet: Sheet, width: int) -> list[str]:
    """Return clauses, assumptions, cautions, the bidder's list, remarks and revisions."""
    lines: list[str] = []
    for clause in sheet.clauses:
        lines += heading(clause.title, width)
        for sentence in clause.sentences:
            lines += _hanging("·", wrapped(sentence, width - 2), 2)
    if sheet.assumptions:
        rows = [[row.label, row.text, MARKS[Origin.ASSUMED]] for row in sheet.assumptions]
        lines += heading("Assumptions", width) + table(rows, width, (False, False, False))
    lines += heading("Cautions", width)
    for caution in sheet.cautions:
        lines += _hanging("!", wrapped(caution, width - 2), 2)
    if sheet.reply:
        asked = [[item.label, f"________ {item.unit}".rstrip()] for item in sheet.reply]
        lines += heading("The bidder states", width) + table(asked, width, (False, False))
    if sheet.remarks:
        lines += heading("Remarks", width) + wrapped(sheet.remarks, width)
    if sheet.revisions:
        rows = [["Mark", "Date", "What changed", "By", "Checked", "Approved"]]
        rows += [[r.mark, r.date, r.text, r.by, r.checked, r.approved] for r in sheet.revisions]
        lines += heading("Revisions", width) + table(rows, width, (False,) * 6)
    return lines


def _annex(sheet: Sheet, width: int) -> list[str]:
    """Return each equation with the values it gives and the numbers put in."""
    if not sheet.annex:
        return []
    lines = heading("Calculation annex", width)
    if len(sheet.points.columns) > 1:
        order = " | ".join(sheet.points.columns)
        lines += wrapped(f"Values that vary stand in the order {order}.", width)
    for group in shared.groups(sheet.annex):
        lines += [line for one in group for line in _result(one, width)]
        working = group[0]
        said = f"{working.equation or '–'} {numbers(sheet, working.source)}".rstrip()
        for text in (said, shared.put_in(working)):
            lines += [f"    {line}" for line in wrapped(text, width - 4)] if text else []
    return [line.replace(shared.FIXED, " ") for line in lines]


def _result(working: Working, width: int) -> list[str]:
    name = named(working.label, working.symbol)
    shown = shared.figures(working.result)
    if len(name) + len(shown) + 2 <= width:
        return [f"{name}{shown:>{width - len(name)}}"]
    return [*wrapped(name, width), *(f"  {line}" for line in wrapped(shown, width - 2))]


def _sources(sheet: Sheet, width: int) -> list[str]:
    if not sheet.sources:
        return []
    cited = enumerate(map(shared.source, sheet.sources), start=1)
    rows = [[f"[{number}]", source] for number, source in cited]
    return [*heading("Sources", width), *table(rows, width, (True, False))]
