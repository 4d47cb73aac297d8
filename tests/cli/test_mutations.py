"""The embedded job, spoiled at random: no text of a tag file may make the program fail.

Every mutant runs the whole way: text -> tag -> evaluation -> sheet -> JSON, text and PDF.
"""

from __future__ import annotations

import json
import random
from typing import Any

import pytest
from cli_process import DEMO, DEMO_TAGS, demo_text
from hypothesis import HealthCheck, given, settings
from hypothesis import strategies as st

from specsheet import packs, sheet, tagfile
from specsheet.evaluate import evaluate
from specsheet.fields import COMMON
from specsheet.render import json as json_form
from specsheet.render import pdf
from specsheet.render import text as text_form

JOB = tagfile.load_job(DEMO / "job.toml")
PDF_MAGIC = b"%PDF-"

HOSTILE = (
    '""', '"0"', '"-1"', "0", "-1", "1e308", "-1e308", "1e-308", "nan", "inf", "true", "[]", "{}",
    '"0 t/h"', '"1e-30 t/h"', '"1e30 t/h"', '"1e300 kg/s"', '"5 Nm3/h"', '"3 m3/h"', '"2 GJ/h"',
    '"1 bar(a)"', '"0 bar(a)"', '"1e-12 bar(a)"', '"1e9 bar(a)"', '"0.001 mbar"', '"1e12 mbar"',
    '"-273.15 degC"', '"-273.14 degC"', '"0.01 K"', '"1e6 degC"', '"100 degC"', '"374 degC"',
    '"0 kg/m3"', '"1e-9 kg/m3"', '"1e9 kg/m3"', '"0 Pa s"', '"1e9 Pa s"', '"1e-15 Pa s"',
    '"0 %"', '"100 %"', '"1e9 %"', '"-5 %"', '"DN 10"', '"DN 2000"', '"DN 99"', '"NPS 1/8"',
    '"0 mm"', '"1e-9 mm"', '"1e9 mm"', '"1000 km"', '"0 D"', '"1e9 D"', '"size it"', '"propose"',
    '"gas"', '"liquid"', '"water"', '"methane"', '"helium"', '"mercury"', '"substance"',
    '"mixture"', '"solution"', '"given"', '"humid_air"', '"petroleum"', '"seawater"',
    '"[red] {0} %s </b> &amp; \\\\ \\u0007"', '"' + "long " * 400 + '"', '"\\u202e\\u2028 ½ 💧"',
    '["[/]", ""]', "{ methane = 1 }", "{ methane = 0.5, water = 0.5 }", "{ water = 1e-300 }",
    "2031-02-28", '{ value = "3 t/h" }',
)  # fmt: skip

EXTRA = tuple(entry.path for entry in COMMON if "." in entry.path) + tuple(
    f"meter.{entry.path.partition('.')[2]}"
    for key in packs.family_keys()
    for entry in packs.profile(key).entries
)


def _run(text: str) -> None:
    """Send a text the whole way; whatever it says, nothing may raise."""
    reading = tagfile.loads(text, "mutant.toml", JOB)
    for problem in reading.problems:
        assert problem.line >= 1
        assert problem.message
    if reading.tag is None:
        assert reading.problems
        return
    evaluation = evaluate(reading.tag)
    document = json_form.text(evaluation)
    assert json.loads(document, parse_constant=_no_constant)["tag"] == reading.tag.name
    built = sheet.build(evaluation)
    assert text_form.text(built)
    assert pdf.to_bytes(built).startswith(PDF_MAGIC)


def _no_constant(word: str) -> Any:
    raise AssertionError(f"{word} is not JSON")


def _spoil(text: str, rng: random.Random) -> str:
    """Apply one to three mutations: a value changed, a line lost or doubled, an entry added."""
    lines = text.splitlines()
    for _ in range(rng.randint(1, 3)):
        place = rng.randrange(len(lines))
        kind = rng.random()
        if kind < 0.5 and "=" in lines[place]:
            lines[place] = f"{lines[place].partition('=')[0]}= {rng.choice(HOSTILE)}"
        elif kind < 0.7:
            del lines[place]
        elif kind < 0.75:
            lines.insert(place, lines[place])
        elif kind < 0.8:
            lines[place] = lines[place][: rng.randint(0, len(lines[place]))]
        else:
            section, _, key = rng.choice(EXTRA).rpartition(".")
            heads = [n for n, line in enumerate(lines) if line.strip("[]") == section]
            if heads:
                lines.insert(rng.choice(heads) + 1, f"{key} = {rng.choice(HOSTILE)}")
        lines = lines or [""]
    return "\n".join(lines) + "\n"


@pytest.mark.parametrize("tag", DEMO_TAGS)
def test_the_tag_itself(tag: str) -> None:
    _run(demo_text(tag))


@pytest.mark.parametrize("tag", DEMO_TAGS)
@settings(
    max_examples=12,
    deadline=None,
    derandomize=True,
    suppress_health_check=list(HealthCheck),
)
@given(seed=st.integers(0, 2**32))
def test_mutants_never_raise(tag: str, seed: int) -> None:
    _run(_spoil(demo_text(tag), random.Random(seed)))


@pytest.mark.parametrize("family", packs.family_keys())
@pytest.mark.parametrize("tag", ["FT-2104", "FT-6101"])
def test_any_family_on_any_service(tag: str, family: str) -> None:
    reading = tagfile.loads(demo_text(tag), "", JOB)
    assert reading.tag is not None
    _run(demo_text(tag).replace(f'"{reading.tag.family}"', f'"{family}"', 1))


@pytest.mark.parametrize("tag", DEMO_TAGS)
def test_every_value_alone_replaced(tag: str) -> None:
    lines = demo_text(tag).splitlines()
    rng = random.Random(tag)
    for place, line in enumerate(lines):
        if "=" in line:
            value = rng.choice(HOSTILE)
            spoiled = [*lines[:place], f"{line.partition('=')[0]}= {value}", *lines[place + 1 :]]
            _run("\n".join(spoiled))
