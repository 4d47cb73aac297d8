"""Random states: finite, positive, consistent; nothing crashes, hangs or stays unflagged."""

from __future__ import annotations

import random
import time

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st
from random_fluids import composition, condition, faults, fluid

from specsheet.fluid import evaluate
from specsheet.fluid.backends.mixture import Mixture
from specsheet.fluid.backends.pure import Pure
from specsheet.fluid.backends.water import Water
from specsheet.fluid.model import Condition


def campaign(count: int, seed: int) -> list[str]:
    """Return the faults of random calls; every call gives a state or a finding, and in time."""
    choose = random.Random(seed)
    found = []
    for number in range(count):
        what, where = fluid(choose), condition(choose)
        start = time.perf_counter()
        outcome = evaluate.state(what, where)
        if time.perf_counter() - start > 10.0:
            found.append(f"{number}: {what} at {where} took too long")
        if outcome.state is None:
            if not outcome.findings:
                found.append(f"{number}: {what} at {where} gave nothing")
            continue
        found += [f"{number}: {what} at {where}: {fault}" for fault in faults(outcome.state)]
    return found


def test_two_thousand_random_calls() -> None:
    assert campaign(2000, 3) == []


@pytest.mark.benchmark
def test_twenty_thousand_random_calls() -> None:
    assert campaign(20_000, 4) == []


@settings(max_examples=150, deadline=None)
@given(st.floats(280.0, 1000.0), st.floats(1e4, 200e5))
def test_water_is_consistent_everywhere(temperature: float, pressure: float) -> None:
    found = evaluate.state(Water("liquid"), Condition(temperature, pressure)).state
    assert found is not None
    assert faults(found) == []
    more = evaluate.state(Water("liquid"), Condition(temperature, pressure * 1.01)).state
    assert more is not None
    assert (more.value("density") or 0.0) > (found.value("density") or 0.0)


@settings(max_examples=100, deadline=None)
@given(
    st.sampled_from(["nitrogen", "methane", "carbon_dioxide", "hydrogen", "propane", "ammonia"]),
    st.floats(250.0, 500.0),
    st.floats(1e4, 150e5),
)
def test_density_of_pure_substances_rises_with_pressure(
    key: str, temperature: float, pressure: float
) -> None:
    densities = []
    for factor in (1.0, 1.02):
        found = evaluate.state(Pure(key, "gas"), Condition(temperature, pressure * factor)).state
        assert found is not None
        assert faults(found) == []
        densities.append(found.value("density") or 0.0)
    assert densities[0] < densities[1]


@settings(max_examples=100, deadline=None)
@given(st.integers(0, 10_000), st.floats(250.0, 500.0), st.floats(1e4, 60e5))
def test_density_of_gas_mixtures_rises_with_pressure(
    seed: int, temperature: float, pressure: float
) -> None:
    gas = Mixture(composition(random.Random(seed)), "gas")
    states = [
        evaluate.state(gas, Condition(temperature, pressure * factor)).state
        for factor in (1.0, 1.02)
    ]
    verified = [state for state in states if state is not None and state.phase == "gas"]
    if len(verified) == 2:
        assert (verified[0].value("density") or 0.0) < (verified[1].value("density") or 0.0)
    assert [fault for state in states if state is not None for fault in faults(state)] == []
