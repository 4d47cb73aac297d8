"""The verdict against one figure: the same as evaluating each file by hand."""

from __future__ import annotations

import pytest
from services import service_text

from specsheet import tagfile
from specsheet.evaluate import evaluate
from specsheet.evaluate.whatif import values_between, vary
from specsheet.findings import Level
from specsheet.tagfile import EditError

TEXT = service_text("water", "turbine_woltman")
FLOW = "points.maximum.flow"


def test_values_are_even_and_in_the_unit_of_the_first() -> None:
    found = values_between("vortex", FLOW, "80 m3/h", "200 m3/h", 7)
    assert found == tuple(f"{value} m3/h" for value in (80, 100, 120, 140, 160, 180, 200))


def test_the_last_value_may_be_in_another_unit() -> None:
    """55 L/s are 198 m3/h."""
    assert values_between("vortex", FLOW, "80 m3/h", "55 L/s", 2)[-1] == "198 m3/h"


def test_values_may_fall() -> None:
    assert values_between("vortex", "design.temperature", "200 degC", "100 degC", 3) == (
        "200 degC",
        "150 degC",
        "100 degC",
    )


@pytest.mark.parametrize(
    ("path", "first", "last", "steps", "words"),
    [
        (FLOW, "80 m3/h", "200 m3/h", 1, "--steps: a number from 2 to 200"),
        (FLOW, "80", "200 m3/h", 3, "unit is missing"),
        (FLOW, "80 m3/h", "200 kg/h", 3, "two kinds"),
        ("points.normal.pressure", "1 bar(g)", "2 bar(a)", 3, "two kinds"),
        ("line.size", "DN 80", "DN 100", 3, "only a quantity"),
        ("line.sizes", "DN 80", "DN 100", 3, "no such entry"),
    ],
)
def test_what_cannot_be_varied_is_refused_in_words(
    path: str, first: str, last: str, steps: int, words: str
) -> None:
    with pytest.raises(EditError, match=words):
        values_between("vortex", path, first, last, steps)


def test_each_row_is_the_evaluation_of_the_file_with_that_value() -> None:
    values = values_between("turbine_woltman", FLOW, "80 m3/h", "200 m3/h", 4)
    for trial in vary(TEXT, FLOW, values):
        tag = tagfile.loads(TEXT.replace('flow = "80 m3/h"', f'flow = "{trial.text}"')).tag
        assert tag is not None
        by_hand = evaluate(tag)
        assert trial.level == by_hand.worst
        assert trial.results["pressure_loss"] == by_hand.points[2].values["pressure_loss"]
        assert trial.worst in by_hand.findings


def test_the_verdict_turns_where_the_limit_stands() -> None:
    """5 m/s in 102.26 mm is 147.8 m3/h (profile of the family; common practice, no source)."""
    found = vary(TEXT, FLOW, ("140 m3/h", "147 m3/h", "149 m3/h"))
    assert [trial.level is Level.STOP for trial in found] == [False, False, True]
    assert found[2].worst is not None
    assert found[2].worst.code == "meter-velocity-limit"


def test_other_entries_may_be_supposed_at_every_step() -> None:
    found = vary(TEXT, FLOW, ("80 m3/h", "90 m3/h"), also=[("meter.size", "DN 80")])
    assert {trial.results["meter_size"].value for trial in found} == {"DN 80"}
