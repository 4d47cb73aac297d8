"""A phase that could not be decided at once is settled with patience, and the verdict follows."""

import pytest

from specsheet.evaluate import evaluate, evaluate_settled, findings_settled, unsettled
from specsheet.fluid import dew_curve, envelope
from specsheet.fluid import evaluate as states
from tests.support.tags import WATER, point, tag_of

#: its dew point at 41 bar lies at 247.35 K by the equation of state's own envelope
GAS = (
    'kind = "mixture"\nphase = "gas"\nmixture = { methane = 0.9, ethane = 0.05, '
    "propane = 0.03, n_butane = 0.01, nitrogen = 0.01 }"
)


@pytest.fixture(autouse=True)
def _forgotten(monkeypatch):
    """Leave the phase open, as that of a gas of more components than are followed at once."""
    monkeypatch.setattr(dew_curve, "MOST_COMPONENTS", 4)
    dew_curve._found.cache_clear()
    envelope._known.clear()
    states.forget()


@pytest.mark.parametrize(
    ("temperature", "phase", "stopped"),
    [("-22 degC", "gas", False), ("-30 degC", "two_phase", True)],
)
def test_open_phase_is_settled(temperature, phase, stopped):
    tag = tag_of(point("normal", "4 t/h", "40 bar(g)", temperature), fluid=GAS)
    assert unsettled(evaluate(tag))
    settled = evaluate_settled(tag, 60.0)
    assert not unsettled(settled)
    assert settled.points[0].values["phase"].value == phase
    assert ("phase-disagrees" in {item.code for item in settled.findings}) is stopped
    assert findings_settled(tag, 60.0) == settled.findings


def test_time_that_runs_out_leaves_the_caution():
    tag = tag_of(point("normal", "4 t/h", "40 bar(g)", "-22 degC"), fluid=GAS)
    assert unsettled(evaluate_settled(tag, 0.01))


def test_decided_phase_costs_no_search(monkeypatch):
    monkeypatch.setattr(envelope, "settle", lambda *_: pytest.fail("nothing was open"))
    tag = tag_of(point("normal", "4 t/h", "4 bar(g)", "20 degC"), fluid=WATER)
    assert not unsettled(evaluate_settled(tag))
