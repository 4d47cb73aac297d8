"""What stands in the file -> the text in a field, and back to a verdict on what was typed."""

from __future__ import annotations

from collections.abc import Mapping
from datetime import date
from typing import TYPE_CHECKING

from specsheet.fields import Entry
from specsheet.tagfile.words import number_text
from specsheet.tui.late import late

if TYPE_CHECKING:
    from specsheet import quantity
    from specsheet.tagfile import known
    from specsheet.tagfile import values as readers
else:
    quantity = late("specsheet.quantity")
    known = late("specsheet.tagfile.known")
    readers = late("specsheet.tagfile.values")

_FRACTIONS = "fractions"


def entry_at(family: str, path: str) -> Entry | None:
    """Return the entry that a path belongs to in a tag of that family; None for an unknown key.

    A leaf of a table entry ("fluid.mixture.methane") belongs to the table's entry.
    """
    sections = known.tag_sections(family)
    section, _, key = path.rpartition(".")
    found = sections.get(section, known.NO_KEYS).get(key)
    if found is None and section.count("."):
        found = entry_at(family, ".".join(path.split(".")[:2]))
        return found if found is not None and found.kind == _FRACTIONS else None
    return found


def shown(raw: object) -> str:
    """Return a TOML value as the text of a field."""
    if raw is None:
        return ""
    if isinstance(raw, bool):
        return "yes" if raw else "no"
    if isinstance(raw, date):
        return raw.isoformat()
    if isinstance(raw, list):
        texts = [item if isinstance(item, str) else str(item) for item in raw]
        if any("," in text or text.startswith("[") for text in texts):
            import json  # few lists need it, and the first screen does without

            return json.dumps(texts, ensure_ascii=False)
        return ", ".join(texts)
    if isinstance(raw, Mapping):
        return ", ".join(f"{key} = {shown(value)}" for key, value in raw.items())
    return number_text(raw) if isinstance(raw, float) else str(raw)


def refusal(entry: Entry | None, path: str, text: str) -> str:
    """Return why ``text`` cannot be stored at a path of an entry, or "" when it can."""
    if entry is None:
        return ""
    if entry.path != path:
        return _fraction_refusal(text)
    found = readers.from_text(entry, text)
    return found.message if isinstance(found, quantity.Refusal) else ""


def _fraction_refusal(text: str) -> str:
    try:
        float(text)
    except ValueError:
        found = quantity.parse(text, "ratio")
        return found.message if isinstance(found, quantity.Refusal) else ""
    return ""


def component(text: str) -> tuple[str, str] | str:
    """Read "methane 0.62" as a component and its fraction; else return what was wanted."""
    name, _, fraction = text.strip().rpartition(" ")
    name = name.strip().rstrip("=").strip()
    if not name or not (fraction[:1].isdecimal() or fraction[:1] in "+-.%"):
        return f'a substance and its fraction were wanted, "{text}" came; write methane 0.62'
    if fraction == "%":
        name, _, number = name.rpartition(" ")
        fraction = f"{number} %"
    name = name.strip().rstrip("=").strip()
    if "." in name:
        return f'"{name}" holds a full stop, which a name in a composition cannot; leave it out'
    return name, fraction
