"""Where a document stands: its current revision and the mark of the next."""

from __future__ import annotations

import re

from specsheet.tag import Revision, Tag

_FIRST = "A"
_COUNTED = re.compile(
    r"(.*?)(\d+|(?<![A-Za-z])(?:[A-Z]{1,3}|[a-z]{1,3}))",  # three letters at most: no words
    re.ASCII | re.DOTALL,
)


def current_revision(tag: Tag) -> Revision | None:
    """Return the current revision: the last of the block, which is written oldest first."""
    return tag.revisions[-1] if tag.revisions else None


def next_mark(tag: Tag) -> str:
    """Return the mark that follows the current one: A, B ... Z, AA; 0, 1 ... 9, 10; P1, P2.

    A mark that is not counted in letters or digits gets a 1 behind it.
    """
    current = current_revision(tag)
    if current is None:
        return _FIRST
    counted = _COUNTED.fullmatch(current.mark)
    if counted is None:
        return f"{current.mark}1"
    lead, last = counted.groups()
    if last.isdigit():
        return f"{lead}{int(last) + 1:0{len(last)}d}"
    return lead + _next_letters(last)


def _next_letters(letters: str) -> str:
    first, last = ("A", "Z") if letters.isupper() else ("a", "z")
    if letters[-1] != last:
        return letters[:-1] + chr(ord(letters[-1]) + 1)
    return (_next_letters(letters[:-1]) if letters[:-1] else first) + first
