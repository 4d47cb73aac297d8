"""The phase of mixtures: known traps, and the cubic equation behind the check."""

from __future__ import annotations

import itertools

import pytest
from fluid_tags import point, random_gases, stops, tag
from gas_cases import ISO_GASES

from specsheet import fluid
from specsheet.fluid import dew_curve, evaluate, library, mixture_phase, mixture_state, names
from specsheet.fluid.backends.mixture import Mixture
from specsheet.fluid.calorific import Composition
from specsheet.fluid.model import Condition
from specsheet.methods import cubic, equilibrium


def phase(composition: Composition, temperature: float, pressure: float, stated: str) -> str:
    found = evaluate.state(Mixture(composition, stated), Condition(temperature, pressure))
    assert found.state is not None, found.findings
    return found.state.phase


WET_BIOGAS = (("methane", 0.60), ("carbon_dioxide", 0.36), ("water", 0.04))
FLUE_GAS = (("nitrogen", 0.72), ("carbon_dioxide", 0.12), ("water", 0.12), ("oxygen", 0.04))
PIPELINE = (
    ("methane", 0.90),
    ("ethane", 0.05),
    ("propane", 0.03),
    ("n_butane", 0.01),
    ("nitrogen", 0.01),
)


@pytest.mark.parametrize(
    ("composition", "temperature", "pressure"),
    [(WET_BIOGAS, 293.15, 40e5), (WET_BIOGAS, 283.15, 70e5), (FLUE_GAS, 283.15, 70e5)],
)
def test_wet_gas_that_condenses_is_seen(
    composition: Composition, temperature: float, pressure: float
) -> None:
    """A blind flash of the library reports gas at these states."""
    assert phase(composition, temperature, pressure, "gas") == "two_phase"


@pytest.mark.parametrize(
    ("composition", "temperature", "pressure"),
    [
        (WET_BIOGAS, 320.0, 1.2e5),
        (FLUE_GAS, 430.0, 1.0e5),
        (PIPELINE, 283.15, 41e5),
        (PIPELINE, 293.15, 121e5),
    ],
)
def test_gas_is_verified(composition: Composition, temperature: float, pressure: float) -> None:
    assert phase(composition, temperature, pressure, "gas") == "gas"


def test_dense_fluid_is_not_given_the_root_of_a_gas() -> None:
    """The gas root imposed here is a quarter of the true density (548.61, ISO 20765-2, gas 2)."""
    gas = []
    for name, fraction in ISO_GASES["Gas 2"].items():
        item = names.find(name)
        assert item is not None
        gas.append((item.key, fraction))
    found = evaluate.state(Mixture(tuple(gas), "gas"), Condition(180.0, 13e6)).state
    assert found is not None
    assert found.phase == "liquid"
    assert found.value("density") == pytest.approx(548.61, rel=1e-3)


def test_carbon_dioxide_with_a_trace_is_not_called_gas_when_liquid() -> None:
    trace = (("carbon_dioxide", 0.999), ("nitrogen", 0.001))
    found = evaluate.state(Mixture(trace, "gas"), Condition(285.0, 60e5))
    phases = "refused" if found.state is None else found.state.phase
    assert phases != "gas"


def test_cold_pipeline_gas_is_a_stop() -> None:
    text = (
        'kind = "mixture"\nphase = "gas"\nmixture = { methane = 0.9, ethane = 0.05, '
        "propane = 0.03, n_butane = 0.01, nitrogen = 0.01 }"
    )
    result = fluid.derive(tag(text, point("40 bar(g)", "-60 degC")))
    assert stops(result) == ["phase-disagrees"]


POOL = (
    "methane",
    "ethane",
    "propane",
    "n_butane",
    "isobutane",
    "n_pentane",
    "n_hexane",
    "n_heptane",
    "nitrogen",
    "carbon_dioxide",
    "hydrogen_sulfide",
    "hydrogen",
    "carbon_monoxide",
    "oxygen",
)


def test_screen_and_cubic_never_call_gas_what_the_equation_of_state_condenses() -> None:
    """Dew points of the multi-fluid equation are the truth; both cheap steps must stay clear."""
    checked = 0
    for gas, pressure in random_gases(POOL, (5.0, 6.7), 60, 11):
        dew = dew_curve.dew_temperature(gas, pressure)
        if dew is None:
            continue
        fractions, components = mixture_state.critical(gas)
        for colder in (1.0, 5.0, 15.0):
            here = {"temperature": dew - colder, "pressure": pressure}
            shared = {"fractions": fractions, "components": components}
            screen = equilibrium.wilson_dew_sum(
                temperature=here["temperature"] - mixture_phase.MARGIN,
                pressure=pressure,
                **shared,
            )
            assert screen >= 1.0, (gas, pressure, colder)
            place = mixture_phase._Place(fractions, components, here["temperature"], pressure)
            answer = mixture_phase._by_cubic("gas", place)
            assert not mixture_phase._clearly("gas", place)
            assert answer != "gas", (gas, pressure, colder)
            checked += 1
    assert checked > 90


def test_fugacities_against_an_independent_implementation() -> None:
    """Peng-Robinson of the fluid library, pure components, both roots."""
    module = library.fluids()
    for key, temperature, pressure in (("propane", 300.0, 5e5), ("methane", 250.0, 60e5)):
        item = names.substances()[key]
        state = module.AbstractState("PR", item.equation)
        state.specify_phase(module.iphase_gas)
        state.update(module.PT_INPUTS, pressure, temperature)
        _, factor = cubic.compressibility_factors(
            temperature=temperature,
            pressure=pressure,
            fractions=(1.0,),
            components=(
                equilibrium.Critical(
                    state.T_critical(), state.p_critical(), state.acentric_factor()
                ),
            ),
        )
        assert factor == pytest.approx(state.compressibility_factor(), rel=2e-3)


def test_fugacity_coefficient_of_a_pure_gas_is_the_integral_of_its_factor() -> None:
    """ln phi = integral of (Z - 1)/p over pressure: a check that needs no other library."""
    methane = equilibrium.Critical(190.564, 4.5992e6, 0.01142)
    steps = [1e5 * (i + 0.5) / 2 for i in range(100)]  # to 50 bar
    total = 0.0
    for pressure in steps:
        _, factor = cubic.compressibility_factors(
            temperature=250.0, pressure=pressure, fractions=(1.0,), components=(methane,)
        )
        total += (factor - 1.0) / pressure * 0.5e5
    found = cubic.log_fugacity_coefficients(
        temperature=250.0, pressure=50e5, fractions=(1.0,), components=(methane,)
    )
    assert found[0] == pytest.approx(total, rel=1e-3)


def test_a_binary_splits_between_bubble_and_dew_and_nowhere_else() -> None:
    """Propane with n-butane at 300 K: bubble and dew pressures by Raoult within some 3 %."""
    propane, butane = (
        equilibrium.Critical(
            item.critical_temperature, item.critical_pressure, item.acentric_factor
        )
        for item in (names.substances()[key] for key in ("propane", "n_butane"))
    )
    bubble = 0.5 * 9.98e5 + 0.5 * 2.58e5
    dew = 1.0 / (0.5 / 9.98e5 + 0.5 / 2.58e5)
    answers = [
        cubic.phase(
            temperature=300.0,
            pressure=pressure,
            fractions=(0.5, 0.5),
            components=(propane, butane),
        )
        for pressure in (0.9 * dew, 1.1 * dew, 0.93 * bubble, 1.1 * bubble)
    ]
    assert answers == ["gas", "two_phase", "two_phase", "liquid"]


def test_ice_and_frost_point_are_inverse() -> None:
    for temperature in (200.0, 240.0, 272.0):
        pressure = equilibrium.ice_vapour_pressure(temperature)
        assert equilibrium.frost_point(pressure) == pytest.approx(temperature, abs=1e-9)


def test_wilson_dew_temperature_zeroes_its_sum() -> None:
    fractions, components = mixture_state.critical(PIPELINE)
    for pressure in (1e5, 10e5, 50e5):
        found = equilibrium.wilson_dew_temperature(
            pressure=pressure, fractions=fractions, components=components
        )
        total = equilibrium.wilson_dew_sum(
            temperature=found, pressure=pressure, fractions=fractions, components=components
        )
        assert total == pytest.approx(1.0, abs=1e-3)
    rising = [
        equilibrium.wilson_dew_temperature(
            pressure=pressure, fractions=fractions, components=components
        )
        for pressure in (1e5, 10e5, 50e5)
    ]
    assert all(low < high for low, high in itertools.pairwise(rising))
