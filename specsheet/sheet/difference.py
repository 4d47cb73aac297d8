"""What differs between two sheets, row by row."""

from __future__ import annotations

from dataclasses import dataclass

from specsheet.sheet.model import Row, Sheet, Table


@dataclass(frozen=True, slots=True)
class Change:
    """One thing that differs.

    Attributes:
        section: title of the table or list.
        label: words of the row.
        column: operating point, or "".
        before, after: the text with its unit, "" where there was no such row.
    """

    section: str
    label: str
    column: str
    before: str
    after: str


def diff(old: Sheet, new: Sheet) -> tuple[Change, ...]:
    """Return the rows that differ between two sheets, in the order of the newer one."""
    before, after = _entries(old), _entries(new)
    places = [*after, *(place for place in before if place not in after)]
    return tuple(
        Change(place[0], place[2], place[3], before.get(place, ""), after.get(place, ""))
        for place in places
        if before.get(place, "") != after.get(place, "")
    )


#: section, key, label, column
_Place = tuple[str, str, str, str]


def _entries(sheet: Sheet) -> dict[_Place, str]:
    """Return every text of a sheet under the place where it stands."""
    found: dict[_Place, str] = {
        ("Head", key, label, ""): text
        for key, label, text in (
            ("tag", "Tag", sheet.tag),
            ("title", "Meter", sheet.title),
            ("service", "Service", sheet.service),
            ("status", "Status", sheet.status),
            ("revision", "Revision", sheet.revision),
            *((line.key, line.label, line.text) for line in sheet.head),
        )
    }
    for table in (sheet.points, *sheet.tables, *((sheet.budget,) if sheet.budget else ())):
        for row in table.rows:
            found.update(_cells(table, row))
    for limit in sheet.limits:
        key = f"{limit.key} {limit.allowed}"
        text = f"{limit.value} {limit.unit}".strip()
        found["Limits", key, limit.label, limit.point] = f"{text} ({limit.verdict})"
    for finding in sheet.findings:
        place = ("Findings", f"{finding.code} {finding.field}", finding.code, finding.point)
        found[place] = f"{finding.level}: {finding.message}"
    for clause in sheet.clauses:
        found[clause.title, clause.key, clause.title, ""] = " ".join(clause.sentences)
    found["Cautions", "cautions", "Cautions", ""] = " ".join(sheet.cautions)
    found["Remarks", "remarks", "Remarks", ""] = sheet.remarks
    return found


def _cells(table: Table, row: Row) -> dict[_Place, str]:
    columns = table.columns if len(table.columns) == len(row.cells) else ("",) * len(row.cells)
    return {
        (table.title, row.key, row.label, column): f"{cell.text} {row.unit}".strip()
        for column, cell in zip(columns, row.cells, strict=True)
    }
