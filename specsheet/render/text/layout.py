"""Plain text in columns: wrapping, tables and rules."""

from __future__ import annotations

import textwrap
import unicodedata
from collections.abc import Sequence

_BETWEEN = 2
_LONGEST_WORD = 26  # longer words may be broken to make a table fit
_NARROWEST = 6


def clean(text: str) -> str:
    """Return a text that a terminal shows as it is: control characters become spaces."""
    if text.isascii() and text.isprintable():
        return text
    return "".join(
        letter if letter == "\n" or unicodedata.category(letter) not in ("Cc", "Cf") else " "
        for letter in text.replace("\r\n", "\n")
    )


def wrapped(text: str, width: int) -> list[str]:
    """Return the lines of a text; "" gives one empty line."""
    lines: list[str] = []
    for paragraph in clean(text).split("\n"):
        lines += textwrap.wrap(
            paragraph, max(width, 8), break_on_hyphens=False, expand_tabs=False
        ) or [""]
    return lines


def heading(title: str, width: int) -> list[str]:
    """Return a section heading: an empty line, the title and a rule up to the width."""
    words = clean(title).replace("\n", " ")
    return ["", f"{words} {'─' * max(2, width - len(words) - 1)}"]


def table(rows: Sequence[Sequence[str]], width: int, right: Sequence[bool]) -> list[str]:
    """Return rows in columns as wide as their texts; the widest give way until all fit.

    Args:
        rows: cells, the same number in each row.
        width: of the whole table.
        right: for each column, whether it stands at the right.
    """
    if not rows:
        return []
    widths = _widths(rows, width)
    lines = []
    for row in rows:
        cells = [wrapped(cell, wide) for cell, wide in zip(row, widths, strict=True)]
        for place in range(max(map(len, cells))):
            parts = [
                _fit(cell[place] if place < len(cell) else "", wide, at_right)
                for cell, wide, at_right in zip(cells, widths, right, strict=True)
            ]
            lines.append((" " * _BETWEEN).join(parts).rstrip())
    return lines


def _widths(rows: Sequence[Sequence[str]], width: int) -> list[int]:
    widths = [
        max((len(line) for row in rows for line in clean(row[place]).split("\n")), default=0)
        for place in range(len(rows[0]))
    ]
    least = [
        min(_LONGEST_WORD, max(len(word) for row in rows for word in clean(row[place]).split(" ")))
        for place in range(len(rows[0]))
    ]
    room = width - _BETWEEN * (len(widths) - 1)
    while sum(widths) > room:
        spare = [wide - short for wide, short in zip(widths, least, strict=True)]
        if max(spare) > 0:
            widths[max(range(len(widths)), key=lambda at: (spare[at] > 0, widths[at]))] -= 1
        elif max(widths) > _NARROWEST:
            widths[widths.index(max(widths))] -= 1
        else:
            break
    return widths


def _fit(text: str, width: int, right: bool) -> str:
    return text.rjust(width) if right else text.ljust(width)
