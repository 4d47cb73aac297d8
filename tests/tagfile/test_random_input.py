"""Whatever the text: reading never raises, and its problems can be printed."""

from __future__ import annotations

from hypothesis import example, given, settings
from hypothesis import strategies as st

from specsheet import tagfile
from specsheet.fields import COMMON
from specsheet.tagfile.literal import key_text, value_text

KEYS = sorted({entry.key for entry in COMMON} | {entry.section for entry in COMMON} | {"meter"})


def check(reading: tagfile.Reading) -> None:
    assert reading.tag is not None or reading.problems
    for problem in reading.problems:
        assert problem.line >= 1
        assert str(problem).isprintable()
        assert str(problem).startswith(f"ft.toml:{problem.line}: {problem.field}: ")


@settings(deadline=None, max_examples=200)
@given(st.text())
@example("a = 1_0")
@example('"" = 1')
@example("schema = 99999999999999999999")
def test_random_text(text: str) -> None:
    check(tagfile.loads(text, "ft.toml"))


@settings(deadline=None)
@given(st.binary())
def test_random_bytes(tmp_path_factory: object, raw: bytes) -> None:
    path = tmp_path_factory.getbasetemp() / "random.toml"  # type: ignore[attr-defined]
    path.write_bytes(raw)
    reading = tagfile.load(path)
    assert reading.tag is not None or reading.problems


keys = st.one_of(st.sampled_from(KEYS), st.text(st.characters(codec="utf-8"), max_size=6))
scalars = st.one_of(
    st.booleans(),
    st.integers(),
    st.floats(),
    st.dates(),
    st.text(st.characters(codec="utf-8"), max_size=12),
    st.sampled_from(["vortex", "DN 50", "3 t/h", "nan t/h", "-300 degC", "1e999 bar(g)", "0 D"]),
)
data = st.dictionaries(
    keys,
    st.recursive(
        scalars,
        lambda inner: st.one_of(
            st.lists(inner, max_size=3), st.dictionaries(keys, inner, max_size=4)
        ),
        max_leaves=10,
    ),
    max_size=8,
)


@settings(deadline=None, max_examples=300)
@given(data, st.sampled_from(["", 'schema = 1\nfamily = "vortex"\n', "schema = 0\n"]))
def test_random_toml(data: dict[str, object], head: str) -> None:
    rest = {key: value for key, value in data.items() if f"\n{key} =" not in f"\n{head}"}
    lines = "".join(f"{key_text(key)} = {value_text(value)}\n" for key, value in rest.items())
    check(tagfile.loads(head + lines, "ft.toml"))
