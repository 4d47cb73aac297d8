"""A tag file (or ``job.toml``) being edited: leaf by leaf, every other line untouched.

After every edit the text is parsed again and compared with what was meant, so that no edit can
change anything else unseen.
"""

from __future__ import annotations

import copy
import json
from collections.abc import Callable
from datetime import date
from typing import Any

from specsheet.fields import SECTIONS, Entry
from specsheet.quantity.value import Refusal
from specsheet.tagfile import edit
from specsheet.tagfile.known import job_sections, tag_sections
from specsheet.tagfile.literal import value_text
from specsheet.tagfile.migrate import CURRENT, renames
from specsheet.tagfile.problem import Problem
from specsheet.tagfile.read import point_name
from specsheet.tagfile.source import BOM
from specsheet.tagfile.spans import Place, scan
from specsheet.tagfile.syntax import parse, schema_of
from specsheet.tagfile.values import is_number, to_toml
from specsheet.tagfile.words import Number, number_text

_ORDER = tuple(section.key for section in SECTIONS if section.key)
_TABLE_KINDS = ("fractions", "units")


class EditError(Exception):
    """An edit that the layout of the file does not allow; the message says what to do."""


class Document:
    """The text of a file, edited by path ("line.size", "points.minimum.flow").

    Raises:
        EditError: the text is no TOML, or an edit cannot be made.
        KeyError: a path names an operating point that is not there.
    """

    def __init__(self, text: str) -> None:
        self._bom = BOM if text.startswith(BOM) else ""
        text = text.removeprefix(BOM)
        self._crlf = "\r\n" in text
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
        return _shown(self._at(self._place(path)))

    def set(self, path: str, text: str) -> None:
        """State ``text`` under an entry; a blank text removes it.

        The value is written in the type its kind is kept in. A text that is no value of that kind
        is written all the same, in quotes: reading then reports it, and nothing typed is lost.
        """
        if not text.strip():
            self.unset(path)
            return
        place = self._place(path)
        entry = self._entry(path)
        value = self._value(entry, path, text, self._at(place))
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

    def _value(self, entry: Entry | None, path: str, text: str, old: Any) -> Any:
        leaf = entry is not None and entry.kind in _TABLE_KINDS and path != entry.path
        number = leaf or isinstance(old, float | int)
        plain = entry is None or leaf or entry.kind == "dimensionless"
        if plain and number and not isinstance(old, bool) and is_number(text):
            typed = text.strip()
            return int(typed) if typed.lstrip("+-").isdigit() else Number(typed)
        if plain or entry is None:
            return text
        value = to_toml(entry, text)
        return text if isinstance(value, Refusal) else value

    def _entry(self, path: str) -> Entry | None:
        """Return the entry that a path, or the table around its last part, belongs to."""
        family = self._data.get("family")
        family = family if isinstance(family, str) else ""
        parts = path.split(".")
        if parts[0] in ("points", "revisions"):
            return tag_sections(family)[parts[0]].get(parts[-1])
        groups = job_sections() if parts[0] == "job" else tag_sections(family)
        for length in (len(parts), len(parts) - 1):
            section, _, key = ".".join(parts[:length]).rpartition(".")
            found = groups.get(section, {}).get(key)
            if found and (length == len(parts) or found.kind in _TABLE_KINDS):
                return found
        return None

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
        try:
            return self.point_names().index(name)
        except ValueError:
            raise KeyError(f"there is no operating point {name}") from None

    def _at(self, place: Place) -> Any:
        found: Any = self._data
        for part in place:
            try:
                found = found[part]
            except (KeyError, IndexError, TypeError):
                return None
        return found

    def _set(self, place: Place, value: Any) -> None:
        stated = place in scan(self._text).values
        if stated:
            text = edit.replace_value(self._text, place, value)
        elif isinstance(self._at(place[:-1]), dict | None):
            text = edit.insert_value(self._text, place, value, _ORDER)
        else:
            raise EditError(f"{_path(place[:-1])} is no section; mend the file by hand first")
        self._apply(text, lambda data: _put(data, place, value))

    def _set_table(self, place: Place, value: dict[str, Any]) -> None:
        """Set a table that stands as a section of its own, or not at all."""
        old = self._at(place)
        if not isinstance(old, dict):
            self._set(place, value)
            return
        for key, item in value.items():
            self._set((*place, key), item)
        for key in old.keys() - value.keys():
            self._unset((*place, key))

    def _unset(self, place: Place) -> None:
        value = self._at(place)
        if value is None:
            return
        if isinstance(value, dict) and place not in scan(self._text).values:
            for key in list(value):
                self._unset((*place, key))
            return
        self._apply(edit.remove(self._text, place), lambda data: _drop(data, place))

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
        if _normal(_pruned(found)) != _normal(_pruned(expected)):
            raise EditError("this layout cannot be edited here; mend the file by hand first")
        self._text, self._data = text, found


def _parsed(text: str) -> dict[str, Any]:
    data = parse(text, "")
    if isinstance(data, Problem):
        raise EditError(f"line {data.line}: {data.message}")
    return data


def _put(data: Any, place: Place, value: Any) -> None:
    for part in place[:-1]:
        data = data[part] if isinstance(part, int) else data.setdefault(part, {})
    data[place[-1]] = value


def _drop(data: Any, place: Place) -> None:
    for part in place[:-1]:
        data = data[part]
    del data[place[-1]]


def _pruned(data: Any) -> Any:
    """Return data without empty tables: removing the last entry may remove its table."""
    if not isinstance(data, dict):
        return data
    pruned = {key: _pruned(value) for key, value in data.items()}
    return {key: value for key, value in pruned.items() if value != {}}


def _normal(data: Any) -> str:
    return json.dumps(data, sort_keys=True, default=str)


def _path(place: Place) -> str:
    return ".".join(str(part) for part in place)


def _shown(value: Any) -> str:
    if value is None:
        return ""
    if isinstance(value, list) and all(isinstance(v, str) and "," not in v for v in value):
        return ", ".join(value)
    if isinstance(value, dict):
        return value_text(value)[2:-2]
    if isinstance(value, str):
        return value
    return number_text(value) if isinstance(value, float) else value_text(value)
