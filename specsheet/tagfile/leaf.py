"""The text of one entry, as a form shows it <-> its TOML value."""

from __future__ import annotations

from typing import Any

from specsheet.fields import Entry
from specsheet.quantity.value import Refusal
from specsheet.tagfile.known import NO_KEYS, job_sections, tag_sections
from specsheet.tagfile.literal import value_text
from specsheet.tagfile.values import is_number, to_toml
from specsheet.tagfile.words import Number, number_text

_TABLE_KINDS = ("fractions", "units")


def entry_of(path: str, family: str) -> Entry | None:
    """Return the entry of a path ("points.normal.flow"), None for one that is not known.

    A path into a table ("fluid.mixture.methane") belongs to the entry of the table.
    """
    parts = path.split(".")
    if parts[0] in ("points", "revisions"):
        return tag_sections(family)[parts[0]].get(parts[-1])
    groups = job_sections() if parts[0] == "job" else tag_sections(family)
    for length in (len(parts), len(parts) - 1):
        section, _, key = ".".join(parts[:length]).rpartition(".")
        found = groups.get(section, NO_KEYS).get(key)
        if found and (length == len(parts) or found.kind in _TABLE_KINDS):
            return found
    return None


def typed(entry: Entry | None, path: str, text: str, old: object) -> Any:
    """Return the TOML value that states ``text`` at a path where ``old`` stood.

    Plain numbers stay bare where they were, and in tables; a text that is no value of its kind
    stays a text, for the reader to refuse.
    """
    leaf = entry is not None and entry.kind in _TABLE_KINDS and path != entry.path
    if entry is None or leaf or entry.kind == "dimensionless":
        bare = leaf or (isinstance(old, float | int) and not isinstance(old, bool))
        return _number(text.strip()) if bare and is_number(text) else text
    value = to_toml(entry, text)
    return text if isinstance(value, Refusal) else value


def shown(value: object) -> str:
    """Return a TOML value as the text of a form; "" for None."""
    if value is None:
        return ""
    if isinstance(value, str):
        return value
    if isinstance(value, float):
        return number_text(value)
    if isinstance(value, dict):
        return value_text(value)[2:-2]
    if isinstance(value, list) and all(_plain(item) for item in value):
        return ", ".join(value)
    return value_text(value)


def _number(text: str) -> int | Number:
    return int(text) if text.lstrip("+-").isdigit() else Number(text)


def _plain(item: object) -> bool:
    """Tell whether an item of a list can stand between commas without quotes."""
    return isinstance(item, str) and "," not in item and item == item.strip() and item[:1] != "["
