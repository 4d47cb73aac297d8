"""Another family for a tag: what it does not take goes behind a "#", all else stays."""

from __future__ import annotations

import difflib

import pytest

from specsheet import packs, tagfile
from specsheet.tagfile import EditError, adopt, with_family

ORIFICE = """\
schema   = 1
tag      = "FT-1"
family   = "orifice_concentric"   # by the process department

[fluid]
kind = "substance"
substance = "water"
phase = "liquid"

[meter]
taps = "flange"          # as on the old sheet
bore = "74.2 mm"
differential_pressure_range = "250 mbar"

[[points]]
name = "normal"
flow = "10 t/h"
pressure = "7 bar(g)"
temperature = "60 degC"
"""


def changed(before: str, after: str) -> list[str]:
    """Return the lines that differ, as a diff shows them."""
    lines = difflib.unified_diff(before.splitlines(), after.splitlines(), lineterm="", n=0)
    return [line for line in lines if line[0] in "+-" and line[:3] not in ("+++", "---")]


def test_what_the_new_family_does_not_know_is_put_behind_a_hash() -> None:
    made = adopt(ORIFICE, "vortex")
    assert changed(ORIFICE, made.text) == [
        '-family   = "orifice_concentric"   # by the process department',
        '+family   = "vortex"   # by the process department',
        '-taps = "flange"          # as on the old sheet',
        '+# taps = "flange"          # as on the old sheet',
        '-differential_pressure_range = "250 mbar"',
        '+# differential_pressure_range = "250 mbar"',
    ]
    assert made.dropped == (
        'taps = "flange"          # as on the old sheet',
        'differential_pressure_range = "250 mbar"',
    )
    assert not tagfile.loads(made.text).problems


def test_a_value_that_the_new_family_does_not_take_is_put_behind_a_hash() -> None:
    """Both know meter.bore; only the plate can be told to size it."""
    text = ORIFICE.replace('"74.2 mm"', '"size it"')
    made = adopt(text, "vortex")
    assert '# bore = "size it"' in made.text
    assert 'bore = "size it"' in made.dropped
    assert not tagfile.loads(made.text).problems


def test_taking_the_family_that_is_there_changes_nothing() -> None:
    made = adopt(ORIFICE, "orifice_concentric")
    assert (made.text, made.dropped) == (ORIFICE, ())


def test_line_ends_and_byte_order_mark_are_kept() -> None:
    text = "\ufeff" + ORIFICE.replace("\n", "\r\n")
    made = adopt(text, "vortex")
    assert made.text.startswith("\ufeff")
    assert made.text.count("\r\n") == made.text.count("\n") == text.count("\n")
    assert '\r\n# taps = "flange"' in made.text


def test_values_of_several_lines_go_behind_a_hash_whole() -> None:
    text = ORIFICE.replace('taps = "flange"', 'taps = """\nflange\n"""')
    made = adopt(text, "vortex")
    assert '# taps = """\n# flange\n# """' in made.text
    assert not tagfile.loads(made.text).problems


def test_dotted_keys_go_behind_a_hash_too() -> None:
    head, _, rest = ORIFICE.partition("[fluid]")
    _, _, points = rest.partition("[[points]]")
    text = f'{head}meter.taps = "flange"\n[fluid]\n{rest.partition("[meter]")[0]}[[points]]{points}'
    assert '# meter.taps = "flange"' in adopt(text, "vortex").text


@pytest.mark.parametrize(
    ("text", "wanted"),
    [
        ("tag = ", "line 1"),
        ('family = "cone"\nmeter = { taps = "flange" }\n', "write it as a section"),
    ],
)
def test_what_cannot_be_edited_is_refused_in_words(text: str, wanted: str) -> None:
    with pytest.raises(EditError, match=wanted):
        adopt(text, "vortex")


def test_a_family_that_is_not_there_is_a_mistake_of_ours() -> None:
    with pytest.raises(KeyError):
        adopt(ORIFICE, "waterwheel")


@pytest.mark.parametrize("key", packs.family_keys())
def test_every_family_can_be_taken_over(key: str) -> None:
    made = adopt(ORIFICE, key)
    reading = tagfile.loads(made.text)
    assert reading.tag is not None
    assert reading.tag.family == key
    assert not [
        p for p in reading.problems if p.field.startswith("meter.") and "wanted" not in p.message
    ]
    before = tagfile.loads(ORIFICE).tag
    assert before is not None
    typed = with_family(before, key)
    assert {k: v for k, v in typed.given.items() if not k.startswith("meter.")} == {
        k: v for k, v in reading.tag.given.items() if not k.startswith("meter.")
    }
    assert not any(path.startswith("meter.") for path in typed.given)
    fresh = tagfile.loads(ORIFICE.partition("[meter]")[0].replace("orifice_concentric", key)).tag
    assert fresh is not None
    assert dict(typed.assumed) == dict(fresh.assumed)
