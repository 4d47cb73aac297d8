"""JSON Schema (draft 2020-12) of the tag file, rendered from the glossary and the profiles."""

from __future__ import annotations

from collections.abc import Iterable
from typing import Any

from specsheet import packs
from specsheet.fields import COMMON, KINDS, REVISION, SECTIONS, Entry
from specsheet.tagfile.known import family_entries
from specsheet.tagfile.migrate import CURRENT

_LISTS = ("points", "revisions")
_TEXT: dict[str, Any] = {"type": "string"}
_TYPES: dict[str, dict[str, Any]] = {
    "text": _TEXT,
    "choice": _TEXT,
    "boolean": {"type": "boolean"},
    "integer": {"type": "integer"},
    "date": {"type": "string", "format": "date"},
    "list": {"type": "array", "items": _TEXT},
    "fractions": {
        "type": "object",
        "minProperties": 1,
        "additionalProperties": {"type": ["number", "string"]},
    },
    "units": {
        "type": "object",
        "minProperties": 1,
        "propertyNames": {"enum": list(KINDS)},
        "additionalProperties": _TEXT,
    },
    "dimensionless": {"type": ["number", "string"]},
}


def schema() -> dict[str, Any]:
    """Return the schema of a tag file as JSON data.

    The grammar of quantities is not part of it: a quantity is a text there, with its example.
    ``[meter]`` depends on the family, one branch each.
    """
    families = packs.family_keys()
    properties = {entry.key: _entry(entry) for entry in COMMON if not entry.section}
    properties["schema"] = {**properties["schema"], "const": CURRENT}
    properties["family"] = {**properties["family"], "enum": list(families)}
    for section in SECTIONS:
        if not section.key or section.key == "meter":
            continue
        table = _table(e for e in (*COMMON, *REVISION) if e.section == section.key)
        told = {"title": section.title, "description": section.help}
        properties[section.key] = (
            {**told, "type": "array", "items": table, "minItems": int(section.key == "points")}
            if section.key in _LISTS
            else {**told, **table}
        )
    meter = next(section for section in SECTIONS if section.key == "meter")
    properties["meter"] = {"title": meter.title, "description": meter.help, "type": "object"}
    top = [entry.key for entry in COMMON if not entry.section and entry.needed == "always"]
    return {
        "$schema": "https://json-schema.org/draft/2020-12/schema",
        "title": "Tag file",
        "description": "One flow meter to be bought: its process data and what is demanded.",
        "type": "object",
        "properties": properties,
        "required": [*top, "fluid", "points"],
        "additionalProperties": False,
        "allOf": [_branch(family) for family in families],
    }


def _branch(family: str) -> dict[str, Any]:
    return {
        "if": {"properties": {"family": {"const": family}}},
        "then": {"properties": {"meter": _table(family_entries(family))}},
    }


def _table(entries: Iterable[Entry]) -> dict[str, Any]:
    known = tuple(entries)
    table: dict[str, Any] = {
        "type": "object",
        "properties": {entry.key: _entry(entry) for entry in known},
        "additionalProperties": False,
    }
    required = [entry.key for entry in known if entry.needed == "always"]
    return {**table, "required": required} if required else table


def _entry(entry: Entry) -> dict[str, Any]:
    told: dict[str, Any] = {"title": entry.label, "description": _description(entry)}
    told.update(_TYPES.get(entry.kind, _TEXT))
    if entry.kind == "choice":
        told["enum"] = [*entry.choices, *entry.words]
    if entry.kind == "list" and entry.choices:
        told["items"] = {"type": "string", "enum": list(entry.choices)}
    if entry.example and told["type"] in ("string", ["number", "string"]):
        told["examples"] = [entry.example, *entry.words]
    return told


def _description(entry: Entry) -> str:
    parts = [entry.help]
    if entry.kind in KINDS:
        parts.append(f"Number and unit: {KINDS[entry.kind].label}.")
    if entry.needed and entry.needed != "always":
        parts.append(f"Needed {entry.needed}.")
    if entry.default:
        parts.append(f'If left out, "{entry.default}" is assumed.')
    return " ".join(parts)
