"""Phases that only the phase envelope settles, found in a process of its own."""

from __future__ import annotations

import pytest
from fluid_tags import codes, finding, point, tag

from specsheet import fluid
from specsheet.fluid import dew_curve, envelope, evaluate

TEXT = (
    'kind = "mixture"\nphase = "gas"\nmixture = { methane = 0.9, ethane = 0.05, '
    "propane = 0.03, n_butane = 0.01, nitrogen = 0.01 }"
)


@pytest.fixture(autouse=True)
def _unsettled(monkeypatch: pytest.MonkeyPatch) -> None:
    """Leave the phase open, as that of a gas of more components than are followed at once."""
    monkeypatch.setattr(dew_curve, "MOST_COMPONENTS", 4)
    dew_curve._found.cache_clear()
    envelope._known.clear()
    evaluate.forget()


def test_crossings_of_a_line() -> None:
    line = envelope.Envelope((200.0, 240.0, 220.0), (1e5, 50e5, 90e5))
    assert line.crossings(25.5e5) == (220.0,)
    assert line.crossings(70e5) == (230.0,)
    assert line.crossings(95e5) == ()


def test_an_unverified_phase_is_settled() -> None:
    # dew point 247.35 K (-25.8 degC) at 41 bar by the envelope of the same equation of state
    stated = tag(TEXT, point("40 bar(g)", "-22 degC"), point("40 bar(g)", "-30 degC", "minimum"))
    before = fluid.derive(stated)
    assert [state.phase for state in before.points if state] == ["unverified", "unverified"]
    assert "phase-unverified" in codes(before)
    assert fluid.settle(stated, 60.0)
    after = fluid.derive(stated)
    assert [state.phase for state in after.points if state] == ["gas", "two_phase"]
    assert finding(after, "phase-disagrees").point == "minimum"
    assert after.points[0] is not None
    assert after.points[0].value("dew_temperature") == pytest.approx(247.35, abs=0.3)
    assert not fluid.settle(stated)


@pytest.mark.parametrize("pressure", [25e5, 41e5, 55e5, 63e5, 74e5])
def test_dew_curve_lies_on_the_envelope(pressure: float, monkeypatch: pytest.MonkeyPatch) -> None:
    """Two ways of the library to the same line: the envelope's chords lie up to 1 K inside it."""
    monkeypatch.setattr(dew_curve, "MOST_COMPONENTS", 12)
    gas = (
        ("methane", 0.9),
        ("ethane", 0.05),
        ("propane", 0.03),
        ("n_butane", 0.01),
        ("nitrogen", 0.01),
    )
    assert envelope.settle(gas, 60.0)
    line = envelope.known(gas)
    assert line is not None
    found = dew_curve.dew_temperature(gas, pressure)
    assert found == pytest.approx(line.crossings(pressure)[-1] + 0.4, abs=0.6)


def test_nothing_to_settle() -> None:
    assert not fluid.settle(tag(TEXT, point("40 bar(g)", "30 degC")))


def test_time_runs_out() -> None:
    stated = tag(TEXT, point("40 bar(g)", "-22 degC"))
    assert not fluid.settle(stated, 0.01)
    assert "phase-unverified" in codes(fluid.derive(stated))
