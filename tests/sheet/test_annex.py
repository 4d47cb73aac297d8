"""The annex: nothing given is explained, nothing derived is left without equation and source."""

from __future__ import annotations

from pathlib import Path

import pytest

from specsheet import sheet, tagfile
from specsheet.evaluate import evaluate
from specsheet.findings import Origin
from specsheet.render import shared
from tests.sheet import samples

TAGS = Path(__file__).parents[2] / "profiles" / "demo" / "tags"


@pytest.mark.parametrize("name", ["FT-2104", "FT-3201", "FT-5102", "FT-6101"])
def test_every_working_has_equation_and_source(name: str) -> None:
    tag = tagfile.load(TAGS / f"{name}.toml").tag
    assert tag is not None
    made = sheet.build(evaluate(tag))
    assert len(made.annex) > 30
    for working in made.annex:
        assert working.equation, working.key
        assert working.source, working.key
        assert working.result.origins != (Origin.GIVEN,), working.key


def test_a_screen_goes_without_the_annex() -> None:
    held = samples.evaluation()
    bare, whole = sheet.build(held, annexed=False), sheet.build(held)
    assert bare.annex == ()
    assert whole.annex
    assert whole.sources[: len(bare.sources)] == bare.sources
    assert bare.tables == whole.tables


def test_values_of_one_equation_and_the_same_inputs_stand_together() -> None:
    groups = shared.groups(sheet.build(samples.evaluation()).annex)
    keys = [[working.key for working in group] for group in groups]
    assert ["density", "isentropic_exponent"] in keys
    assert ["reynolds_number"] in keys


def test_inputs_go_by_symbol_and_carry_every_point() -> None:
    annex = sheet.build(samples.evaluation()).annex
    reynolds = next(one for one in annex if one.key == "reynolds_number")
    said = shared.put_in(reynolds).replace(shared.FIXED, " ")
    assert said.startswith("● qm = 1.116 | 3.1 | 4.2 t/h; ○ D = 154.39 mm; ○ μ = ")


def test_a_source_that_is_an_entry_is_put_into_words() -> None:
    assert shared.source("require.uncertainty").endswith(", as on this sheet (require.uncertainty)")
    for citation in ("ISO 5167-2:2003, 5.3.2", "house limit, job.velocity_limits", "definition"):
        assert shared.source(citation) == citation
