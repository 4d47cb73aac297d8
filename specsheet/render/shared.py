"""What every renderer with tables needs: marks, source numbers, and points in portions."""

from __future__ import annotations

import math
import re
from collections.abc import Iterable, Sequence

from specsheet.findings import Origin
from specsheet.sheet.model import Row, Sheet, Table, Working
from specsheet.sheet.words import MARKS, named
from specsheet.sheet.words import label as label_of

#: a space at which no line breaks
FIXED = "\u00a0"

_ENTRY = re.compile(r"(meter|require|line|design|fluid|points|job)(\.[a-z_0-9]+)+")


def marks(origins: Iterable[Origin]) -> str:
    """Return the marks of the origins."""
    return "".join(MARKS[origin] for origin in origins)


def mark(row: Row) -> str:
    """Return the mark of a row; "" where the origins vary and stand in the cells."""
    origins = row.origins
    return MARKS[origins[0]] if len(origins) == 1 else ""


def numbers(sheet: Sheet, source: str) -> str:
    """Return the numbers of the sources of a row ("[3]")."""
    found = sheet.numbers(source) if source else ()
    return f"[{','.join(map(str, found))}]" if found else ""


def source(citation: str) -> str:
    """Return a citation in words: the path of an entry stands for what this sheet says there."""
    if not _ENTRY.fullmatch(citation):
        return citation
    return f"{label_of(citation)}, as on this sheet ({citation})"


def values(row: Row, part: slice) -> list[str]:
    """Return the cells of a row at some of the points; their origins only where they vary.

    A value that does not depend on the point stands at each.
    """
    shown = row.cells * (part.stop - part.start) if len(row.cells) == 1 else row.cells[part]
    if len(row.origins) < 2:
        return [cell.text for cell in shown]
    return [f"{MARKS[cell.origin]} {cell.text}" if cell.origin else cell.text for cell in shown]


def label(row: Row) -> str:
    """Return the label of a row with its note."""
    return f"{row.label} ({row.note})" if row.note else row.label


def figures(row: Row) -> str:
    """Return the values of a row at all points in one text: "1.2 | 3.1 | 3.6 t/h", "154.05 mm".

    A line may break behind a bar and nowhere else.
    """
    texts = values(row, slice(0, len(row.cells)))
    told = texts if len(set(texts)) > 1 else texts[:1]
    joined = f"{FIXED}| ".join([fixed(text) for text in told])
    return f"{joined}{FIXED}{fixed(row.unit)}" if row.unit else joined


def fixed(text: str) -> str:
    """Return a text in which no line breaks."""
    return text.replace(" ", FIXED)


def put_in(working: Working) -> str:
    """Return the numbers put in: "● qm = 1.2 | 3.1 | 3.6 t/h;  ○ ρ = 4.03 kg/m³", or "".

    An input goes by its symbol; by its words where it has none, or shares it in this working.
    """
    signs = [working.symbol, *(row.symbol for row in working.inputs)]
    texts = []
    for row in working.inputs:
        alone = row.symbol and signs.count(row.symbol) == 1
        name = row.symbol if alone else named(row.label, row.symbol).replace("  ", " ")
        said = fixed(f"{mark(row)} {name} =".lstrip())
        texts.append(f"{said}{FIXED}{figures(row)}")
    return "; ".join(texts)


def groups(workings: Iterable[Working]) -> list[list[Working]]:
    """Return the workings with those put together that share equation, source and inputs."""
    made: dict[tuple[object, ...], list[Working]] = {}
    for working in workings:
        shared = bool(working.equation)
        inputs = tuple([row.key for row in working.inputs])  # one row has one key on a sheet
        key = (working.equation, working.source, inputs if shared else working.key)
        made.setdefault(key, []).append(working)
    return list(made.values())


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
