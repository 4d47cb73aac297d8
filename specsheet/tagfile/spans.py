"""Where everything stands in a valid TOML text: the characters of each header, key and value.

tomli gives no places, and a file edited in place must change nothing but what was edited; so
one scan of the text serves the line numbers of problems and the edits alike. The text must have
been accepted by tomli before.
"""

from __future__ import annotations

import re
from dataclasses import dataclass, field

import tomli

#: place of an entry: keys, and the index of a table in an array ("points", 0, "flow")
Place = tuple[str | int, ...]

#: first and last + 1 character of something
Span = tuple[int, int]

_PART = re.compile(r""""((?:[^"\\\n]|\\.)*)"|'([^'\n]*)'|([A-Za-z0-9_-]+)""")
_BLANK = re.compile(r"[ \t]*")
_GAP = re.compile(r"(?:[ \t\r\n]|\#[^\n]*)*")  # between statements and inside arrays
_STRING = re.compile(
    r'"""(?:[^\\]|\\.)*?"""(?:"{0,2})'
    r"|'''.*?'''(?:'{0,2})"
    r'|"(?:[^"\\\n]|\\.)*"'
    r"|'[^'\n]*'",
    re.DOTALL,
)
_BARE = re.compile(r"[^,\]}#\r\n]*")
_REST = re.compile(r"[ \t]*(\#[^\r\n]*)?(?:\r?\n|$)")  # what may follow a statement


@dataclass(frozen=True, slots=True)
class Statement:
    """One header or one ``key = value`` of the text.

    Attributes:
        place: what it states.
        table: the header it stands under (its own place for a header).
        start: first character.
        key: characters of the key.
        value: characters of the value; of nothing for a header.
        end: first character of the next line.
        comment: characters of the comment behind it.
        header: whether it is a header.
    """

    place: Place
    table: Place
    start: int
    key: Span
    value: Span
    end: int
    comment: Span
    header: bool = False


@dataclass(slots=True)
class Spans:
    """The scan of a text.

    Attributes:
        statements: headers and ``key = value``, in order.
        values: characters of every value, also inside arrays and inline tables.
        first: first character of everything that has a place, tables without a header included.
    """

    statements: list[Statement] = field(default_factory=list)
    values: dict[Place, Span] = field(default_factory=dict)
    first: dict[Place, int] = field(default_factory=dict)


class Scanner:
    """Scans one text; use :func:`scan`."""

    def __init__(self, text: str) -> None:
        self._text = text
        self._counts: dict[Place, int] = {}
        self.spans = Spans()

    def run(self) -> Spans:
        """Scan the whole text."""
        table: Place = ()
        position = self._gap(0)
        while position < len(self._text):
            if self._text[position] == "[":
                statement = self._header(position)
                table = statement.place
            else:
                statement = self._pair(position, table)
            self.spans.statements.append(statement)
            for length in range(1, len(statement.place) + 1):
                self.spans.first.setdefault(statement.place[:length], position)
            position = self._gap(max(statement.end, position + 1))
        return self.spans

    def _header(self, start: int) -> Statement:
        array = self._text.startswith("[[", start)
        parts, key, position = self._key(start + (2 if array else 1))
        place = self._table(parts, array)
        close = self._text.index("]", position) + (2 if array else 1)
        end, comment = self._rest(close)
        return Statement(place, place, start, key, (close, close), end, comment, header=True)

    def _table(self, parts: tuple[str, ...], array: bool) -> Place:
        """Return the place of a header; tables below an array belong to its last element."""
        place: Place = ()
        for part in parts[:-1]:
            place = (*place, part)
            if place in self._counts:
                place = (*place, self._counts[place])
        place = (*place, parts[-1])
        if array:
            self._counts[place] = self._counts.get(place, -1) + 1
        return (*place, self._counts[place]) if place in self._counts else place

    def _pair(self, start: int, table: Place) -> Statement:
        parts, key, position = self._key(start)
        place = (*table, *parts)
        value = self._value(self._skip(position + 1), place)
        end, comment = self._rest(value[1])
        return Statement(place, table, start, key, value, end, comment)

    def _key(self, position: int) -> tuple[tuple[str, ...], Span, int]:
        """Return the parts of a dotted key, its last part's characters, and what follows it."""
        parts: list[str] = []
        while True:
            match = _PART.match(self._text, self._skip(position))
            if match is None:
                raise ValueError(f"no key at character {position}")
            parts.append(_name(match))
            position = self._skip(match.end())
            if not self._text.startswith(".", position):
                return tuple(parts), match.span(), position
            position += 1

    def _value(self, start: int, place: Place) -> Span:
        opening = self._text[start]
        if opening == "[":
            end = self._array(start, place)
        elif opening == "{":
            end = self._inline(start, place)
        else:
            string = _STRING.match(self._text, start)
            end = string.end() if string else self._bare(start)
        self.spans.values[place] = (start, end)
        self.spans.first.setdefault(place, start)
        return start, end

    def _bare(self, start: int) -> int:
        match = _BARE.match(self._text, start)
        return start + len(match[0].rstrip()) if match else start

    def _array(self, start: int, place: Place) -> int:
        position, index = self._gap(start + 1), 0
        while self._text[position] != "]":
            _, position = self._value(position, (*place, index))
            position, index = self._after(position), index + 1
        return position + 1

    def _inline(self, start: int, place: Place) -> int:
        position = self._gap(start + 1)
        while self._text[position] != "}":
            parts, _, position = self._key(position)
            _, position = self._value(self._skip(position + 1), (*place, *parts))
            position = self._after(position)
        return position + 1

    def _after(self, position: int) -> int:
        """Return the next element, or the closing bracket, behind an element."""
        position = self._gap(position)
        return self._gap(position + 1) if self._text[position] == "," else position

    def _skip(self, position: int) -> int:
        match = _BLANK.match(self._text, position)
        return match.end() if match else position

    def _gap(self, position: int) -> int:
        match = _GAP.match(self._text, position)
        return match.end() if match else position

    def _rest(self, position: int) -> tuple[int, Span]:
        match = _REST.match(self._text, position)
        if match is None:
            raise ValueError(f"no end of line at character {position}")
        return match.end(), match.span(1) if match[1] else (position, position)


def _name(match: re.Match[str]) -> str:
    basic, literal, bare = match.groups()
    if basic is None:
        return literal if bare is None else bare
    if "\\" not in basic:
        return basic
    return next(iter(tomli.loads(f'"{basic}" = 0')))


def scan(text: str) -> Spans:
    """Return where everything stands in ``text``, which tomli must have accepted.

    Raises:
        ValueError, IndexError: the text is no TOML.
    """
    return Scanner(text).run()


class Lines:
    """The line of every table and key of a TOML text."""

    def __init__(self, text: str) -> None:
        self._text = text
        try:
            self._first = scan(text).first
        except RecursionError:  # nested to the very limit that tomli itself bears
            self._first = {}

    def of(self, place: Place) -> int:
        """Return the line of the entry, else of the nearest thing around it, else 1."""
        for length in range(len(place), 0, -1):
            position = self._first.get(place[:length])
            if position is not None:
                return self._text.count("\n", 0, position) + 1
        return 1
