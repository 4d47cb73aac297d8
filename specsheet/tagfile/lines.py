"""Where an entry stands in the text. tomllib gives no lines, so they are looked up when needed."""

from __future__ import annotations

import re
from collections.abc import Mapping

#: place of an entry: keys, and the index of a table in an array ("points", 0, "flow")
Place = tuple[str | int, ...]

_PART = r"""(?:[A-Za-z0-9_-]+|"(?:[^"\\\n]|\\.)*"|'[^'\n]*')"""
_DOTTED = rf"{_PART}(?:[ \t]*\.[ \t]*{_PART})*"
_HEADER = re.compile(rf"[ \t]*(\[\[?)[ \t]*({_DOTTED})[ \t]*\]")
_KEY = re.compile(rf"[ \t]*({_DOTTED})[ \t]*=")
_SPLIT = re.compile(_PART)
# strings and comments, so that brackets and quotes inside them do not count
_TOKEN = re.compile(
    r'"""|' r"'''|" r'"(?:[^"\\\n]|\\.)*"|' r"'[^'\n]*'|" r"\#[^\n]*|" r"[\[\]{}]|\n"
)


class Lines:
    """The line of every table and key of a TOML text, by a light scan."""

    def __init__(self, text: str) -> None:
        self._lines = _scan(text)

    def of(self, place: Place) -> int:
        """Return the line of the entry, else of the nearest thing around it, else 1."""
        for length in range(len(place), 0, -1):
            line = self._lines.get(place[:length])
            if line:
                return line
        return 1


def _parts(dotted: str) -> tuple[str, ...]:
    return tuple(part.strip("\"'") for part in _SPLIT.findall(dotted))


def _scan(text: str) -> Mapping[Place, int]:
    found: dict[Place, int] = {}
    counts: dict[Place, int] = {}
    table: Place = ()
    position, line = 0, 1
    while position < len(text):
        header = _HEADER.match(text, position)
        key = None if header else _KEY.match(text, position)
        if header:
            table = _table(_parts(header[2]), header[1] == "[[", counts)
            found.setdefault(table, line)
            position = header.end()
        elif key:
            found.setdefault((*table, *_parts(key[1])), line)
            position = key.end()
        position, passed = _skip(text, position)
        line += passed
    return found


def _table(parts: tuple[str, ...], array: bool, counts: dict[Place, int]) -> Place:
    """Return the place of a header; tables below an array belong to its last element."""
    place: Place = ()
    for part in parts[:-1]:
        place = (*place, part)
        if place in counts:
            place = (*place, counts[place])
    place = (*place, parts[-1])
    if array:
        counts[place] = counts.get(place, -1) + 1
        place = (*place, counts[place])
    return place


def _skip(text: str, position: int) -> tuple[int, int]:
    """Return the start of the next statement and the number of line ends before it."""
    depth = passed = 0
    while True:
        token = _TOKEN.search(text, position)
        if not token:
            return len(text), passed
        position = token.end()
        if token[0] == "\n":
            passed += 1
            if depth <= 0:
                return position, passed
        elif token[0] in ('"""', "'''"):
            end = text.find(token[0], position)
            end = len(text) if end < 0 else end + 3
            passed += text.count("\n", position, end)
            position = end
        elif token[0] in "[{":
            depth += 1
        elif token[0] in "]}":
            depth -= 1
