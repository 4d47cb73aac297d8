"""Older files: steps that bring their data to the current format, one schema at a time.

A step is data: the entries that changed their names. The file itself stays as it is until
somebody saves it; :meth:`specsheet.tagfile.document.Document.upgrade` then does the same to the
text. A new schema means: raise :data:`CURRENT`, add one step, add one test.
"""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass
from typing import Any

#: the schema that this version writes
CURRENT = 1


@dataclass(frozen=True, slots=True)
class Step:
    """What changed from one schema to the next.

    Attributes:
        renamed: old path -> new path, both in the same section.
    """

    renamed: Mapping[str, str]


#: schema -> step to the next. Schema 0 is the draft of the format before its first release.
STEPS: Mapping[int, Step] = {0: Step({"line.nominal_size": "line.size"})}


def renames(schema: int) -> Mapping[str, str]:
    """Return old path -> new path for everything renamed since ``schema``, in order."""
    found: dict[str, str] = {}
    for number in range(schema, CURRENT):
        found.update(STEPS[number].renamed)
    return found


def migrate(data: dict[str, Any], schema: int) -> dict[str, Any]:
    """Return the TOML data of an older file as the current format has it.

    An entry that is there under its new name already is left alone; the old one then stays and
    is reported as unknown.
    """
    for old, new in renames(schema).items():
        section, _, key = old.rpartition(".")
        table = data.get(section)
        target = new.rpartition(".")[2]
        if isinstance(table, dict) and key in table and target not in table:
            rest = {target if name == key else name: value for name, value in table.items()}
            data = {**data, section: rest}
    return data
