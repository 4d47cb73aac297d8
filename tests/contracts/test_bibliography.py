"""Every citation leads to the bibliography, and every entry of it is cited."""

from __future__ import annotations

import ast
import re

import pytest
from house import ROOT, SOURCE_FILES, relative

from specsheet.sources import MEMORY, PRACTICE, SOURCES, cite

BASES = {"published values", "read", "memory"}
PACKS = "\n".join(
    path.read_text(encoding="utf-8") for path in sorted((ROOT / "profiles").rglob("*.toml"))
)
WORDS = {  # every text in the sources: a key may reach cite() by way of a table
    node.value
    for path in SOURCE_FILES
    if relative(path) != "specsheet/sources.py"
    for node in ast.walk(ast.parse(path.read_text(encoding="utf-8")))
    if isinstance(node, ast.Constant) and isinstance(node.value, str)
}


def _literal_citations() -> list[tuple[str, int, str]]:
    """Return file, line and key of every citation whose key is written out."""
    found = []
    for path in SOURCE_FILES:
        for node in ast.walk(ast.parse(path.read_text(encoding="utf-8"))):
            if not isinstance(node, ast.Call) or not node.args:
                continue
            name = getattr(node.func, "id", getattr(node.func, "attr", ""))
            first = node.args[0]
            if name == "cite" and isinstance(first, ast.Constant):
                found.append((relative(path), node.lineno, str(first.value)))
    return found


def test_every_cited_key_exists() -> None:
    cited = _literal_citations()
    assert len(cited) > 20
    assert [place for place in cited if place[2] not in SOURCES] == []


@pytest.mark.parametrize("key", SOURCES)
def test_every_source_is_cited(key: str) -> None:
    named = re.search(rf'"{re.escape(key)}[":,]', PACKS) or SOURCES[key].name in PACKS
    assert key in WORDS or named, f"nothing cites {key}: drop it from the bibliography"


@pytest.mark.parametrize("key", SOURCES)
def test_source_is_whole(key: str) -> None:
    source = SOURCES[key]
    assert source.key == key
    assert source.basis in BASES
    assert source.name
    assert source.title


def test_a_source_from_memory_says_so_wherever_it_is_printed() -> None:
    for key, source in SOURCES.items():
        assert cite(key, "5.1").startswith(f"{source.name}, 5.1")
        assert cite(key).endswith(f"({MEMORY})") == (source.basis == "memory")


def test_an_unknown_key_is_our_own_mistake() -> None:
    with pytest.raises(KeyError):
        cite("no such source")


def test_practice_is_marked_as_such() -> None:
    assert PRACTICE == "common practice, no source"
