"""The order of things on the plain-text sheet."""

from __future__ import annotations

from collections.abc import Iterable

from specsheet.findings import Level, Origin
from specsheet.render.text import ruler
from specsheet.render.text.layout import heading, table, wrapped
from specsheet.sheet.model import Row, Sheet, Table
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
    count = max(len(values.columns), 1)
    most = max(1, (width - 47) // 11)
    lines: list[str] = []
    for start in range(0, count, most):
        part = slice(start, min(start + most, count))
        names = values.columns[part]
        more = f": {' to '.join(dict.fromkeys((names[0], names[-1])))}" if start else ""
        rows = [_row(sheet, row, part) for row in values.rows]
        if names:
            rows.insert(0, ["", "", "", *names, "", ""])
        at_right = (False, False, False, *(True,) * (part.stop - part.start), False, False)
        if not values.columns:
            rows = [[row[0], row[1], f"{row[3]} {row[2]}".strip(), *row[4:]] for row in rows]
            at_right = (False,) * 5
        lines += heading(f"{values.title}{more}", width)
        lines += table(rows, width, at_right)
    return [*lines, *(wrapped(values.note, width) if values.note else ())]


def _row(sheet: Sheet, row: Row, part: slice, sourced: bool = True) -> list[str]:
    mixed = len(row.origins) > 1
    shown = row.cells * (part.stop - part.start) if len(row.cells) == 1 else row.cells[part]
    texts = [
        f"{MARKS[cell.origin]} {cell.text}" if mixed and cell.origin else cell.text
        for cell in shown
    ]
    mark = "" if mixed else _marks(row.origins)
    source = _numbers(sheet, row.source) if sourced else ""
    label = f"{row.label} ({row.note})" if row.note else row.label
    return [label, row.symbol, row.unit, *texts, mark, source]


def _marks(origins: Iterable[Origin]) -> str:
    return "".join(MARKS[origin] for origin in origins)


def _numbers(sheet: Sheet, source: str) -> str:
    found = sheet.numbers(source)
    return f"[{','.join(map(str, found))}]" if found else ""


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
            _numbers(sheet, row.source),
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
        source = _numbers(sheet, row.source)
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
    lines = heading("Calculation annex", width) if sheet.annex else []
    for working in sheet.annex:
        name = named(working.label, working.symbol)
        lines += wrapped(f"{name} {_numbers(sheet, working.source)}".rstrip(), width)
        lines += [f"  {line}" for line in wrapped(working.equation or "–", width - 2)]
        if not working.inputs:
            continue
        whole = slice(0, max(len(working.columns), 1))
        rows = [["", "", "", *working.columns, "", ""]] if working.columns else []
        rows += [_row(sheet, row, whole, False) for row in (*working.inputs, working.result)]
        at_right = (False, False, False, *(True,) * whole.stop, False, False)
        lines += [f"  {line}" for line in table(rows, width - 2, at_right)]
    return lines


def _sources(sheet: Sheet, width: int) -> list[str]:
    if not sheet.sources:
        return []
    rows = [[f"[{number}]", source] for number, source in enumerate(sheet.sources, start=1)]
    return [*heading("Sources", width), *table(rows, width, (True, False))]
