"""Every figure of the line's packs names a source that the bibliography knows."""

from collections.abc import Iterator
from typing import Any

import pytest

from specsheet.packs import table
from specsheet.sources import MEMORY, PRACTICE, SOURCES

PACKS = (
    "pipes_b3610",
    "pipes_b3619",
    "flanges_b165",
    "flanges_en1092",
    "materials",
    "compatibility",
    "ignition",
    "seals",
)


def _sources(data: Any) -> Iterator[str]:
    if isinstance(data, dict):
        for key, value in data.items():
            if key in ("source", "expansion_source", "roughness_source", "group_source"):
                yield value
            else:
                yield from _sources(value)
    elif isinstance(data, list):
        for item in data:
            yield from _sources(item)


@pytest.mark.parametrize("pack", PACKS)
def test_sources_are_in_the_bibliography(pack):
    found = set(_sources(table(pack)))
    assert found
    for text in found:
        if text == PRACTICE or text == f"handbook value ({MEMORY})":
            continue
        named = [source for source in SOURCES.values() if text.startswith(source.name)]
        assert named, text
        if all(source.basis == "memory" for source in named):
            assert MEMORY in text, text
