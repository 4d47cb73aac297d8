"""A tag file (or ``job.toml``) being edited: leaf by leaf, every other line untouched.

After every edit the text is parsed again and compared with what was meant, so that no edit can
change anything else unseen.
"""

from __future__ import annotations

import copy
from collections.abc import Callable
from datetime import date
from typing import Any

from specsheet.fields import SECTIONS
from specsheet.tagfile import edit
from specsheet.tagfile.data import at, drop, put, same
from specsheet.tagfile.leaf import entry_of, shown, typed
from specsheet.tagfile.literal import value_text
from specsheet.tagfile.migrate import CURRENT, renames
from specsheet.tagfile.problem import Problem
from specsheet.tagfile.read import point_name
from specsheet.tagfile.source import BOM
from specsheet.tagfile.spans import Place, scan
from specsheet.tagfile.syntax import parse, schema_of

_ORDER = tuple(section.key for section in SECTIONS if section.key)


class EditError(Exception):
    """An edit that the layout of the file does not allow; the message says what to do."""


class Document:
    """The text of a file, edited by path ("line.size", "points.minimum.flow").

    A point goes by its name, or by its number (from 1) where no point has that name; so the
    second of two points of one name can be reached. Revisions go by number ("revisions.1.mark"),
    the entries of ``job.toml`` by "job." ("job.base.pressure").

    Raises:
        EditError: the text is no TOML, or an edit cannot be made.
        KeyError: a path names an operating point that is not there.
    """

    def __init__(self, text: str) -> None:
        self._bom = BOM if text.startswith(BOM) else ""
        text = text.removeprefix(BOM)
        self._crlf = 0 < text.count("\n") == text.count("\r\n")
        self._text = text
        self._data = _parsed(text)

    @classmethod
    def parse(cls, text: str) -> Document:
        """Return the document of a text."""
        return cls(text)

    def text(self) -> str:
        """Return the whole text, with the line ends and byte-order mark it came with."""
        return self._bom + self._text

    # -- entries ---------------------------------------------------------------------------

    def get_text(self, path: str) -> str:
        """Return an entry as text, as a form shows it; "" where it is not stated."""
        return shown(at(self._data, self._place(path)))

    def set(self, path: str, text: str) -> None:
        """State ``text`` under an entry; a blank text removes it.

        The value is written in the type its kind is kept in. A text that is no value of that kind
        is written all the same, in quotes: reading then reports it, and nothing typed is lost.
        """
        if not text.strip():
            self.unset(path)
            return
        place = self._place(path)
        value = typed(entry_of(path, self._family()), path, text, at(self._data, place))
        if isinstance(value, dict) and place not in scan(self._text).values:
            self._set_table(place, value)
        else:
            self._set(place, value)

    def unset(self, path: str) -> None:
        """Remove an entry; nothing happens where it is not stated."""
        place = self._place(path)
        self._unset(place)

    # -- operating points and revisions ----------------------------------------------------

    def point_names(self) -> tuple[str, ...]:
        """Return the names of the operating points, in order."""
        return tuple(point_name(item, index) for index, item in enumerate(self._points()))

    def add_point(self, name: str) -> None:
        """Add an operating point behind the others."""
        self._add("points", {"name": name})

    def remove_point(self, name: str) -> None:
        """Remove an operating point and everything stated at it."""
        index = self._point(name)
        self._own_headers("points")
        start, end = edit.block(self._text, ("points", index))
        blank = len(self._text[:start]) - len(self._text[:start].rstrip())
        head = self._text[: start - blank] + ("\n" if start > blank else "")
        self._apply(head + self._text[end:], lambda data: data["points"].pop(index))

    def rename_point(self, name: str, new: str) -> None:
        """Give an operating point another name."""
        self._set(("points", self._point(name), "name"), new)

    def move(self, name: str, steps: int) -> None:
        """Move an operating point up (negative) or down, past ``steps`` others at most."""
        index = self._point(name)
        self._own_headers("points")
        target = min(max(index + steps, 0), len(self._points()) - 1)
        way = 1 if target > index else -1
        for place in range(index, target, way):
            self._swap(min(place, place + way))

    def add_revision(
        self, mark: str, day: date, text: str, by: str = "", checked: str = "", approved: str = ""
    ) -> None:
        """Add a line to the revision block, behind the others."""
        told = {"text": text, "by": by, "checked": checked, "approved": approved}
        self._add("revisions", {"mark": mark, "date": day} | {k: v for k, v in told.items() if v})

    def upgrade(self) -> None:
        """Bring the text to the current schema: what :mod:`migrate` does to the data."""
        schema = schema_of(self._data)
        for old, new in renames(schema).items():
            section, _, key = old.rpartition(".")
            target = new.rpartition(".")[2]
            table = self._data.get(section)
            if isinstance(table, dict) and key in table and target not in table:
                self._rename((section, key), target)
        if schema < CURRENT:
            self._set(("schema",), CURRENT)

    # -- how -------------------------------------------------------------------------------

    def _family(self) -> str:
        family = self._data.get("family")
        return family if isinstance(family, str) else ""

    def _place(self, path: str) -> Place:
        parts = path.split(".")
        if parts[0] == "job":
            return tuple(parts[1:])
        if parts[0] == "points" and len(parts) > 2:
            return ("points", self._point(".".join(parts[1:-1])), parts[-1])
        if parts[0] == "revisions" and len(parts) == 3:
            return ("revisions", int(parts[1]) - 1, parts[2])
        return tuple(parts)

    def _points(self) -> list[Any]:
        points = self._data.get("points", [])
        return points if isinstance(points, list) else []

    def _point(self, name: str) -> int:
        names = self.point_names()
        if name in names:
            return names.index(name)
        if name.isascii() and name.isdigit() and 0 < int(name) <= len(names):
            return int(name) - 1
        raise KeyError(f"there is no operating point {name}")

    def _set(self, place: Place, value: Any) -> None:
        stated = place in scan(self._text).values
        if stated:
            text = edit.replace_value(self._text, place, value)
        elif isinstance(at(self._data, place[:-1]), dict | None):
            text = edit.insert_value(self._text, place, value, _ORDER)
        else:
            raise EditError(f"{_path(place[:-1])} is no section; mend the file by hand first")
        self._apply(text, lambda data: put(data, place, value))

    def _set_table(self, place: Place, value: dict[str, Any]) -> None:
        """Set a table that stands as a section of its own, or not at all."""
        old = at(self._data, place)
        if not isinstance(old, dict):
            self._set(place, value)
            return
        for key, item in value.items():
            self._set((*place, key), item)
        for key in old.keys() - value.keys():
            self._unset((*place, key))

    def _unset(self, place: Place) -> None:
        value = at(self._data, place)
        if value is None:
            return
        if isinstance(value, dict) and place not in scan(self._text).values:
            for key in list(value):
                self._unset((*place, key))
            return
        self._apply(edit.remove(self._text, place), lambda data: drop(data, place))

    def _rename(self, place: Place, key: str) -> None:
        def change(data: Any) -> None:
            data[place[0]][key] = data[place[0]].pop(place[1])

        self._apply(edit.rename_key(self._text, place, key), change)

    def _add(self, section: str, values: dict[str, Any]) -> None:
        if section in self._data:
            self._own_headers(section)
        lines = "".join(f"{key} = {value_text(value)}\n" for key, value in values.items())
        text = edit.insert_block(self._text, section, f"[[{section}]]\n{lines}", _ORDER)
        self._apply(text, lambda data: data.setdefault(section, []).append(dict(values)))

    def _own_headers(self, section: str) -> None:
        if not any(s.header and s.place == (section, 0) for s in scan(self._text).statements):
            raise EditError(f"{section} are not written as [[{section}]]; do so by hand first")

    def _swap(self, index: int) -> None:
        text = self._text if self._text.endswith("\n") else self._text + "\n"
        first, second = (edit.block(text, ("points", at)) for at in (index, index + 1))
        swapped = (
            text[: first[0]]
            + text[slice(*second)]
            + text[first[1] : second[0]]
            + text[slice(*first)]
            + text[second[1] :]
        )

        def change(data: Any) -> None:
            data["points"].insert(index, data["points"].pop(index + 1))

        self._apply(swapped, change)

    def _apply(self, text: str, change: Callable[[Any], object]) -> None:
        """Take the edited text over, if it says what was meant and nothing else changed."""
        if self._crlf:
            text = text.replace("\r\n", "\n").replace("\n", "\r\n")
        expected = copy.deepcopy(self._data)
        change(expected)
        found = _parsed(text)
        if not same(found, expected):
            raise EditError("this layout cannot be edited here; mend the file by hand first")
        self._text, self._data = text, found


def _parsed(text: str) -> dict[str, Any]:
    data = parse(text, "")
    if isinstance(data, Problem):
        raise EditError(f"line {data.line}: {data.message}")
    return data


def _path(place: Place) -> str:
    return ".".join(str(part) for part in place)
