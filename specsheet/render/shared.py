"""What every renderer with tables needs: marks, source numbers, and points in portions."""

from __future__ import annotations

import math
from collections.abc import Iterable, Sequence

from specsheet.findings import Origin
from specsheet.sheet.model import Row, Sheet, Table
from specsheet.sheet.words import MARKS


def marks(origins: Iterable[Origin]) -> str:
    """Return the marks of the origins."""
    return "".join(MARKS[origin] for origin in origins)


def mark(row: Row) -> str:
    """Return the mark of a row; "" where the origins vary and stand in the cells."""
    return marks(row.origins) if len(row.origins) == 1 else ""


def numbers(sheet: Sheet, source: str) -> str:
    """Return the numbers of the sources of a row ("[3]")."""
    found = sheet.numbers(source)
    return f"[{','.join(map(str, found))}]" if found else ""


def values(row: Row, part: slice) -> list[str]:
    """Return the cells of a row at some of the points; their origins only where they vary.

    A value that does not depend on the point stands at each.
    """
    mixed = len(row.origins) > 1
    shown = row.cells * (part.stop - part.start) if len(row.cells) == 1 else row.cells[part]
    return [
        f"{marks((cell.origin,))} {cell.text}" if mixed and cell.origin else cell.text
        for cell in shown
    ]


def label(row: Row) -> str:
    """Return the label of a row with its note."""
    return f"{row.label} ({row.note})" if row.note else row.label


def portions(count: int, most: int) -> list[slice]:
    """Return ``count`` columns in portions of no more than ``most``, as even as possible."""
    total = max(count, 1)
    size = math.ceil(total / math.ceil(total / most))
    return [slice(start, min(start + size, total)) for start in range(0, total, size)]


def title(table: Table, part: slice) -> str:
    """Return the title of a portion of a table; the first one has the title of the table."""
    if not part.start:
        return table.title
    names: Sequence[str] = table.columns[part]
    return f"{table.title}: {' to '.join(dict.fromkeys((names[0], names[-1])))}"
