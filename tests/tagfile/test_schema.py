"""The JSON Schema says what the reader accepts."""

from __future__ import annotations

import json
from typing import Any

import pytest

from specsheet import packs, tagfile
from specsheet.fields import COMMON, REVISION

SCHEMA = tagfile.schema()


def section(name: str) -> dict[str, Any]:
    table = SCHEMA["properties"][name]
    return dict(table.get("items", table)["properties"])


def test_is_json_of_the_draft() -> None:
    assert json.loads(json.dumps(SCHEMA)) == SCHEMA
    assert SCHEMA["$schema"] == "https://json-schema.org/draft/2020-12/schema"


@pytest.mark.parametrize("entry", [*COMMON, *REVISION], ids=lambda entry: entry.path)
def test_every_entry_is_there_with_its_words(entry: Any) -> None:
    where = section(entry.section) if entry.section else SCHEMA["properties"]
    found = where[entry.key]
    assert found["title"] == entry.label
    assert found["description"].startswith(entry.help)
    if entry.choices:
        assert found["enum"] == list(entry.choices)


def test_needed_entries_are_required() -> None:
    assert SCHEMA["required"] == ["schema", "tag", "family", "fluid", "points"]
    assert SCHEMA["properties"]["points"]["items"]["required"] == ["name", "flow"]
    assert SCHEMA["properties"]["points"]["minItems"] == 1
    assert SCHEMA["properties"]["fluid"]["required"] == ["kind", "phase"]


def test_nothing_unknown_is_allowed() -> None:
    assert SCHEMA["additionalProperties"] is False
    assert SCHEMA["properties"]["line"]["additionalProperties"] is False


def test_each_family_has_its_own_entries() -> None:
    branches = {
        branch["if"]["properties"]["family"]["const"]: branch["then"]["properties"]["meter"]
        for branch in SCHEMA["allOf"]
    }
    assert tuple(branches) == packs.family_keys()
    for key, meter in branches.items():
        assert list(meter["properties"]) == [e.key for e in packs.profile(key).entries]


def test_types() -> None:
    assert section("require")["quantity"]["type"] == "integer"
    assert section("require")["custody_transfer"]["type"] == "boolean"
    assert section("require")["documents"] == {
        "title": "Documents",
        "description": "That the bidder must hand in.",
        "type": "array",
        "items": {"type": "string"},
    }
    assert section("fluid")["mixture"]["type"] == "object"
    assert section("points")["flow"]["examples"] == ["3.1 t/h"]
    assert section("points")["isentropic_exponent"]["type"] == ["number", "string"]
    assert section("require")["turndown"]["type"] == ["number", "string"]
