"""Dew points of dry gases, by ways that have nothing in common with how they are found."""

from __future__ import annotations

import pytest
from fluid_tags import random_gases

from specsheet.fluid import dew_curve, dew_point, evaluate, library
from specsheet.fluid.backends.mixture import Mixture
from specsheet.fluid.calorific import Composition
from specsheet.fluid.model import Condition

PIPELINE = (
    ("methane", 0.90),
    ("ethane", 0.05),
    ("propane", 0.03),
    ("n_butane", 0.01),
    ("nitrogen", 0.01),
)
POOL = ("methane", "ethane", "propane", "n_butane", "n_pentane", "nitrogen", "carbon_dioxide")


def _vapour(gas: Composition, temperature: float, pressure: float) -> float:
    """Return the share of vapour by the blind flash of the library; beyond 0 to 1 in one phase."""
    state = dew_curve._fresh(gas)
    state.update(library.fluids().PT_INPUTS, pressure, temperature)
    return float(state.Q())


def test_a_blind_flash_finds_two_phases_just_below_and_one_just_above() -> None:
    checked = 0
    for gas, pressure in random_gases(POOL, (6.0, 6.8), 16, 21):
        found = dew_point.find(gas, pressure, dew_curve._fresh(gas))
        if found is None:
            continue
        assert 0.0 < _vapour(gas, found - 0.3, pressure) < 1.0, (gas, pressure, found)
        assert not 0.0 <= _vapour(gas, found + 0.3, pressure) <= 1.0, (gas, pressure, found)
        checked += 1
    assert checked >= 8


@pytest.mark.parametrize("pressure", [12e5, 30e5, 60e5, 70e5])
def test_found_at_once_is_found_step_by_step(pressure: float) -> None:
    """The second way starts from a dew point at low pressure that is found without any guess."""
    state = dew_curve._fresh(PIPELINE)
    followed = dew_curve._dew(PIPELINE, state, 10e5, guessed=False)
    at = 10e5
    while at < pressure:
        at = min(1.05 * at, pressure)
        followed = dew_curve._dew(PIPELINE, state, at, guessed=True)
    dew_curve._found.cache_clear()
    assert dew_curve.dew_temperature(PIPELINE, pressure) == pytest.approx(followed, abs=1e-4)


def test_a_dew_point_does_not_depend_on_those_asked_for_before() -> None:
    dew_curve._found.cache_clear()
    alone = dew_curve.dew_temperature(PIPELINE, 60e5)
    dew_curve._found.cache_clear()
    for pressure in (20e5, 59.5e5, 60.5e5, 74e5, 80e5):
        dew_curve.dew_temperature(PIPELINE, pressure)
    assert dew_curve.dew_temperature(PIPELINE, 60e5) == pytest.approx(alone, abs=1e-7)


def test_a_warm_gas_shows_the_same_whatever_was_asked_before() -> None:
    """Far above its dew point no dew point is worth the search, so none is told."""
    warm = Condition(300.0, 60e5)
    evaluate.forget()
    alone = evaluate.state(Mixture(PIPELINE, "gas"), warm).state
    evaluate.forget()
    evaluate.state(Mixture(PIPELINE, "gas"), Condition(248.0, 60e5))
    again = evaluate.state(Mixture(PIPELINE, "gas"), warm).state
    assert alone is not None
    assert again is not None
    assert alone.properties.keys() == again.properties.keys()


def test_no_dew_point_above_the_highest_pressure_of_two_phases() -> None:
    """77 bar for this gas by its phase envelope (fluid library)."""
    dew_curve._found.cache_clear()
    assert dew_curve.dew_temperature(PIPELINE, 80e5) is None
    assert dew_curve.dew_temperature(PIPELINE, 90e5) is None
    assert dew_curve.dew_temperature(PIPELINE, 60e5) is not None


def test_the_state_of_the_gas_is_not_touched_by_the_search() -> None:
    """The phase is decided between the update of a state and the reading of its properties."""
    condition = Condition(250.0, 60e5)
    evaluate.forget()
    dew_curve._found.cache_clear()
    first = evaluate.state(Mixture(PIPELINE, "gas"), condition).state
    evaluate.forget()
    again = evaluate.state(Mixture(PIPELINE, "gas"), condition).state
    assert first is not None
    assert again is not None
    assert first.value("density") == again.value("density")
    assert first.value("dew_temperature") == pytest.approx(247.117, abs=0.01)
