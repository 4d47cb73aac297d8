"""Random edits: every other line stays as it is, and everything else still reads the same."""

from __future__ import annotations

import difflib
import tomllib

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from specsheet import tagfile
from specsheet.tagfile import Document
from specsheet.tagfile.literal import key_text, value_text
from specsheet.tagfile.spans import scan

TEXT = """\
# Steam to the digester
schema  = 1
tag     = "FT-2104"   # number
family  = 'vortex'
remarks = '''one
two'''

[fluid]
kind      = "mixture"
mixture   = { methane = 0.62, carbon_dioxide = 0.38 }   # by mole
phase     = "gas"

# the pipe
[line]
  size = "DN 150"
  # schedule = "40"

[[points]]
name = "normal"
flow = "3.1 t/h"

# winter

[[points]]  # least
name = "minimum"
flow = "0.6 t/h"

[require]
uncertainty = "1.5 %"
quantity = 2
"""

PATHS = (
    "tag",
    "service",
    "remarks",
    "fluid.phase",
    "fluid.name",
    "fluid.mixture.methane",
    "fluid.mixture.argon",
    "line.size",
    "line.schedule",
    "line.lining",
    "points.normal.flow",
    "points.minimum.flow",
    "points.normal.density",
    "points.minimum.isentropic_exponent",
    "design.pressure",
    "meter.size",
    "require.uncertainty",
    "require.quantity",
    "require.documents",
    "require.potable_water",
)

edits = st.lists(
    st.tuples(
        st.sampled_from(PATHS),
        st.one_of(
            st.just(""),
            st.sampled_from(["DN 200", "1.310", "3", "true", 'say "x"', "it's", "# no", "a = 1"]),
            st.text(st.characters(codec="utf-8"), max_size=20),
        ),
    ),
    max_size=8,
)


def leaves(data: object, place: tuple[object, ...] = ()) -> dict[tuple[object, ...], object]:
    if isinstance(data, dict):
        pairs = data.items()
    elif isinstance(data, list) and data and isinstance(data[0], dict):
        pairs = enumerate(data)  # type: ignore[assignment]
    else:
        return {place: data}
    found: dict[tuple[object, ...], object] = {}
    for key, value in pairs:
        found.update(leaves(value, (*place, key)))
    return found


def place_of(path: str) -> tuple[object, ...]:
    for name, index in (("normal", 0), ("minimum", 1)):
        if path.startswith(f"points.{name}."):
            return ("points", index, path.rpartition(".")[2])
    return tuple(path.split("."))


def changed_lines(before: str, after: str) -> tuple[int, int]:
    """Return how many lines an edit removed and added."""
    lines = list(difflib.ndiff(before.split("\n"), after.split("\n")))
    return sum(line[0] == "-" for line in lines), sum(line[0] == "+" for line in lines)


@settings(deadline=None, max_examples=150)
@given(edits)
def test_an_edit_changes_its_own_leaf_only(changes: list[tuple[str, str]]) -> None:
    document = Document.parse(TEXT)
    for path, text in changes:
        before, data = document.text(), leaves(tomllib.loads(document.text()))
        document.set(path, text)
        after = leaves(tomllib.loads(document.text()))
        place = place_of(path)
        assert {k: v for k, v in data.items() if k != place} == {
            k: v for k, v in after.items() if k != place
        }
        assert (place in after) == bool(text.strip())
        removed, added = changed_lines(before, document.text())
        single = (
            "\n" not in text and path != "remarks" and path.split(".")[0] not in ("design", "meter")
        )
        assert not single or max(removed, added) <= 1


@settings(deadline=None, max_examples=60)
@given(edits)
def test_an_edit_leaves_the_tag_as_it_was_but_for_its_entry(changes: list[tuple[str, str]]) -> None:
    document = Document.parse(TEXT)
    touched = set()
    for path, text in changes:
        document.set(path, text)
        touched.add(path)
    before, after = tagfile.loads(TEXT).tag, tagfile.loads(document.text()).tag
    assert before is not None
    assert after is not None
    for path, value in before.given.items():
        if path not in touched and path != "fluid.mixture":
            assert after.given[path] == value
    for old, new in zip(before.points, after.points, strict=True):
        for key, value in old.values.items():
            if f"points.{old.name}.{key}" not in touched:
                assert new.values[key] == value


@settings(deadline=None)
@given(st.permutations(["normal", "minimum", "a", "b"]), st.integers(-3, 3))
def test_points_come_and_go(names: list[str], steps: int) -> None:
    document = Document.parse(TEXT)
    for name in ("a", "b"):
        document.add_point(name)
    document.move(names[0], steps)
    for name in names[1:]:
        document.remove_point(name)
    assert document.point_names() == (names[0],)
    untouched = [line for line in TEXT.splitlines() if not line.startswith(("name", "flow", "[[p"))]
    kept = document.text().splitlines()
    assert [line for line in untouched if line and line not in kept] == []


@given(st.text(), st.sampled_from(["", "'x'", '"x"', '"""x"""', "'''x'''"]))
def test_a_text_is_written_so_that_it_reads_back(text: str, like: str) -> None:
    text = text.encode("utf-8", "ignore").decode()
    found = tomllib.loads(f"x = {value_text(text, like)}")["x"]
    assert found == text.replace("\r\n", "\n") or found == text


values = st.recursive(
    st.one_of(
        st.booleans(),
        st.integers(-(2**60), 2**60),
        st.floats(allow_nan=False),
        st.dates(),
        st.text(st.characters(codec="utf-8", exclude_characters="\r")),
    ),
    lambda inner: st.one_of(
        st.lists(inner, max_size=3),
        st.dictionaries(st.text(st.characters(codec="utf-8"), max_size=5), inner, max_size=3),
    ),
    max_leaves=8,
)


@settings(deadline=None)
@given(values)
def test_the_scan_finds_what_the_parser_finds(value: object) -> None:
    text = f"[[a]]\nb = 1\n[[a]]\n{key_text('c d')} . e = {value_text(value)} # x\n"
    expected = tomllib.loads(text)["a"][1]["c d"]["e"]
    assert expected == value
    spans = scan(text)
    start, end = spans.values["a", 1, "c d", "e"]
    assert tomllib.loads(f"x = {text[start:end]}")["x"] == value


@pytest.mark.parametrize("junk", ["=", "a", "[a", "a = {", "a = [1"])
def test_the_scan_of_no_toml_raises(junk: str) -> None:
    with pytest.raises((ValueError, IndexError)):
        scan(junk)
