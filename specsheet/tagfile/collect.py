"""The collector every reader fills: values found, problems with the place they stand at."""

from __future__ import annotations

from collections.abc import Mapping

from specsheet.fields import Entry
from specsheet.quantity.value import Refusal
from specsheet.tag import Value
from specsheet.tagfile.known import Keys
from specsheet.tagfile.problem import Problem
from specsheet.tagfile.spans import Lines, Place
from specsheet.tagfile.values import from_toml
from specsheet.tagfile.words import came, did_you_mean, nearest, printable


class Collector:
    """Reads tables by the glossary and lists what could not be used."""

    def __init__(self, text: str, path: str, sections: Mapping[str, Keys]) -> None:
        self._text = text
        self._path = path
        self._sections = sections
        self._found: list[tuple[Place, str, str, bool]] = []

    def add(self, place: Place, field: str, message: str, *, lacking: bool = False) -> None:
        """Report a problem at a place of the file; ``lacking`` where nothing stands there."""
        self._found.append((place, field, message, lacking))

    def problems(self) -> tuple[Problem, ...]:
        """Return all problems in the order of the file. The text is scanned only when needed."""
        if not self._found:
            return ()
        lines = Lines(self._text)
        found = [
            Problem(self._path, lines.of(place), printable(field, 200), message, lacking)
            for place, field, message, lacking in self._found
        ]
        return tuple(sorted(found, key=lambda problem: problem.line))

    def table(
        self,
        raw: object,
        keys: Keys,
        *,
        place: Place = (),
        field: str = "",
        beside: tuple[str, ...] = (),
    ) -> dict[str, Value]:
        """Return key -> value of one table.

        Args:
            raw: the TOML value that should be a table.
            keys: the entries it may hold.
            place: where the table stands.
            field: its name in messages ("line", "points.normal"), "" for the top of the file.
            beside: keys that others read (the sections, at the top of the file).
        """
        if not isinstance(raw, dict):
            self.add(place, field, f"a section [{field}] was wanted, {came(raw)} came")
            return {}
        found: dict[str, Value] = {}
        for key, value in raw.items():
            entry = keys.get(key)
            if entry is None:
                if key not in beside:
                    self._unknown(key, keys, place, field, beside)
            elif not blank(value):
                taken = from_toml(entry, value)
                if isinstance(taken, Refusal):
                    self.add((*place, key), join(field, key), taken.message)
                else:
                    found[key] = taken
        for entry in keys.required:
            if blank(raw.get(entry.key, "")):
                self.add(place, join(field, entry.key), needed_message(entry), lacking=True)
        return found

    def _unknown(
        self, key: str, keys: Keys, place: Place, field: str, beside: tuple[str, ...]
    ) -> None:
        known = (*keys, *beside)
        home = next((name for name, group in self._sections.items() if key in group), None)
        if home is not None and not nearest(key, known):
            hint = f"it belongs to {_home(home)}"
        elif known:
            hint = did_you_mean(key, known)
        else:
            hint = "nothing is known here"
        self.add((*place, key), join(field, key), f"unknown entry; {hint}")


def _home(section: str) -> str:
    """Return words for the place of a section in its file."""
    if section in ("", "job"):
        return "the top of the file, above all sections"
    name = section.removeprefix("job.")
    return f"[[{name}]]" if name in ("points", "revisions") else f"[{name}]"


def blank(value: object) -> bool:
    """Tell whether a TOML value states nothing: an empty text, left to be filled in."""
    return isinstance(value, str) and not value.strip()


def join(field: str, key: str) -> str:
    """Return the path of a key in messages."""
    return f"{field}.{key}" if field else key


def needed_message(entry: Entry) -> str:
    """Return the message for an entry that must be there and is not."""
    quote = "" if entry.kind in ("integer", "date", "fractions") else '"'
    choices = f" (one of {', '.join(entry.choices)})" if entry.choices else ""
    return f"is missing; write {entry.key} = {quote}{entry.example}{quote}{choices}"
