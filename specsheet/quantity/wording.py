"""Pieces of the sentences that refuse a text."""

from __future__ import annotations

from collections.abc import Iterable

from specsheet.quantity.value import Refusal

_SHOWN = 60


def quoted(text: str) -> str:
    """Return a text in quotes, short and printable, for a message."""
    if not text:
        return "nothing"
    short = text if len(text) <= _SHOWN else text[: _SHOWN - 3] + "..."
    return f'"{short}"' if short.isprintable() else ascii(short)


def join(texts: Iterable[str]) -> str:
    """Return "a", "a or b", "a, b or c"."""
    *first, last = texts
    return f"{', '.join(first)} or {last}" if first else last


def refusal(wanted: str, came: str, why: str, write: tuple[str, ...] = ()) -> Refusal:
    """Return the refusal that says what was wanted, what came, why not, and what to write."""
    comma = "," if "," in wanted else ""
    message = f"{wanted}{comma} is wanted, but {quoted(came)} came: {why}"
    return Refusal(f"{message}; write {join(write)}" if write else message, write)
