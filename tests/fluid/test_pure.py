"""Pure substances: base densities, reference states, viscosity, phase and limits."""

from __future__ import annotations

import pytest
from fluid_tags import codes, finding, point, stops, tag

from specsheet import fluid
from specsheet.findings import Origin
from specsheet.fluid import evaluate, mixture_transport, names
from specsheet.fluid.backends.pure import Pure
from specsheet.fluid.model import Condition
from specsheet.fluid.state import State


def state(key: str, phase: str, temperature: float | None, pressure: float | None) -> State:
    found = evaluate.state(Pure(key, phase), Condition(temperature, pressure)).state
    assert found is not None
    return found


def substance(name: str, phase: str) -> str:
    return f'kind = "substance"\nsubstance = "{name}"\nphase = "{phase}"'


# handbook normal densities (0 degC, 101.325 kPa); air: ISO 6976, dry air of standard composition
@pytest.mark.parametrize(
    ("key", "temperature", "density", "tolerance"),
    [
        ("carbon_dioxide", 273.15, 1.9768, 5e-4),
        ("helium", 273.15, 0.17848, 3e-4),
        ("hydrogen", 273.15, 0.08988, 5e-4),
        ("methane", 273.15, 0.71745, 3e-4),
        ("oxygen", 273.15, 1.429, 3e-4),
        ("air", 273.15, 1.292923, 2e-4),
        ("air", 288.15, 1.22541, 2e-4),
    ],
)
def test_density_at_base(key: str, temperature: float, density: float, tolerance: float) -> None:
    found = state(key, "gas", temperature, 101325.0)
    assert found.value("density") == pytest.approx(density, rel=tolerance)


# Lemmon and others, J. Phys. Chem. Ref. Data 29 (2000), table A2 (dry air), rounding dominates
@pytest.mark.parametrize(
    ("temperature", "pressure", "molar_density", "molar_heat", "sound"),
    [
        (500.0, 0.2e6, 48.077, 29.84, 446.6),
        (2000.0, 10e6, 590.94, 36.25, 878.5),
    ],
)
def test_dry_air(
    temperature: float, pressure: float, molar_density: float, molar_heat: float, sound: float
) -> None:
    found = state("air", "gas", temperature, pressure)
    mass = names.substances()["air"].molar_mass
    assert found.value("density") == pytest.approx(molar_density * mass, rel=6e-4)
    assert found.value("heat_capacity") == pytest.approx(molar_heat / mass, rel=6e-4)
    assert found.value("sound_speed") == pytest.approx(sound, rel=6e-4)


# speed of sound in dry air at one atmosphere (a widely quoted value)
@pytest.mark.parametrize(("temperature", "sound"), [(273.15, 331.45), (293.15, 343.4)])
def test_speed_of_sound_in_air(temperature: float, sound: float) -> None:
    assert state("air", "gas", temperature, 101325.0).value("sound_speed") == pytest.approx(
        sound, rel=1e-3
    )


# Lemmon and Jacobsen, Int. J. Thermophys. 25 (2004), table V: T, molar density, viscosity
@pytest.mark.parametrize(
    ("key", "temperature", "density", "viscosity"),
    [
        ("air", 300.0, 5000.0, 2.13241e-5),
        ("argon", 200.0, 10000.0, 2.55662e-5),
        ("argon", 300.0, 5000.0, 2.63706e-5),
        ("nitrogen", 200.0, 10000.0, 2.1081e-5),
        ("nitrogen", 300.0, 5000.0, 2.0743e-5),
        ("oxygen", 200.0, 10000.0, 2.24445e-5),
    ],
)
def test_viscosity_of_dense_gases(
    key: str, temperature: float, density: float, viscosity: float
) -> None:
    found = mixture_transport.viscosity_at(key, temperature, density)
    assert found == pytest.approx(viscosity, rel=1e-5)


# dilute gas: Lemmon and Jacobsen (2004); Avgeri (2014, 2015), Michailidou (2013, 2014) check tables
@pytest.mark.parametrize(
    ("key", "temperature", "viscosity", "tolerance"),
    [
        ("air", 300.0, 1.8523e-5, 1e-5),
        ("argon", 300.0, 2.27241e-5, 1e-5),
        ("nitrogen", 300.0, 1.78771e-5, 1e-5),
        ("benzene", 300.0, 7.625e-6, 1e-3),
        ("toluene", 300.0, 7.023e-6, 1e-3),
        ("n_hexane", 250.0, 5.2584e-6, 1e-3),
        ("n_heptane", 400.0, 7.8361e-6, 1e-3),
    ],
)
def test_viscosity_of_dilute_gases(
    key: str, temperature: float, viscosity: float, tolerance: float
) -> None:
    found = mixture_transport.dilute_viscosity(key, temperature)
    assert found == pytest.approx(viscosity, rel=tolerance)


# handbook values at 25 degC, low pressure, from memory: uPa s
@pytest.mark.parametrize(
    ("key", "viscosity"),
    [("carbon_monoxide", 17.7), ("ethylene", 10.3), ("chlorine", 13.4), ("sulfur_dioxide", 12.8)],
)
def test_viscosity_where_the_library_has_none(key: str, viscosity: float) -> None:
    found = state(key, "gas", 298.15, 101325.0).properties["viscosity"]
    assert found.value == pytest.approx(viscosity * 1e-6, rel=found.uncertainty)
    assert "handbook" in found.method


def test_viscosity_by_corresponding_states_is_typical() -> None:
    # krypton at 25 degC: 25.3 uPa s (handbook, from memory)
    found = state("krypton", "gas", 298.15, 101325.0).properties["viscosity"]
    assert found.origin is Origin.TYPICAL
    assert found.value == pytest.approx(25.3e-6, rel=found.uncertainty)


def test_saturated_from_pressure_alone_and_from_temperature_alone() -> None:
    boiling = state("propane", "liquid", None, 10e5)
    same = state("propane", "liquid", boiling.temperature, None)
    assert same.pressure == pytest.approx(10e5, rel=1e-6)
    assert same.value("density") == pytest.approx(boiling.value("density"), rel=1e-6)
    # NIST data on propane at 25 degC, saturated: 952.2 kPa, liquid 492.4 kg/m3 (from memory)
    room = state("propane", "liquid", 298.15, None)
    assert room.pressure == pytest.approx(952.2e3, rel=2e-3)
    assert room.value("density") == pytest.approx(492.4, rel=2e-3)


def test_on_saturation_is_snapped_with_a_note() -> None:
    boiling = state("propane", "liquid", None, 10e5).temperature
    result = evaluate.state(Pure("propane", "gas"), Condition(boiling + 0.03, 10e5)).state
    assert result is not None
    assert result.phase == "gas"
    assert [item.code for item in result.findings] == ["on-saturation"]


def test_liquid_stated_for_a_gas_flashes() -> None:
    result = fluid.derive(tag(substance("propane", "liquid"), point("4 bar(g)", "20 degC")))
    assert finding(result, "flashing").field == "points.normal.pressure"


def test_gas_stated_for_a_liquid_is_a_stop() -> None:
    result = fluid.derive(tag(substance("CO2", "gas"), point("60 bar(g)", "15 degC")))
    assert stops(result) == ["phase-disagrees"]


def test_nitrogen_at_high_pressure_is_a_gas_in_words() -> None:
    assert state("nitrogen", "gas", 293.15, 200e5).phase == "gas"


def test_below_the_melting_point_is_refused() -> None:
    result = fluid.derive(tag(substance("benzene", "liquid"), point("4 bar(g)", "0 degC")))
    assert finding(result, "fluid-limit").point == "normal"
    assert result.points == (None,)


def test_a_little_outside_the_limits_is_a_caution_and_far_outside_a_refusal() -> None:
    warm = fluid.derive(tag(substance("methane", "gas"), point("4 bar(g)", "360 degC")))
    hot = fluid.derive(tag(substance("methane", "gas"), point("4 bar(g)", "900 degC")))
    assert "fluid-limit" in codes(warm)
    assert warm.points[0] is not None
    assert hot.points == (None,)
    assert "351.9 °C" in finding(hot, "fluid-limit").message


def test_no_isentropic_exponent_for_a_liquid() -> None:
    found = state("propane", "liquid", 293.15, 20e5)
    assert "isentropic_exponent" not in found.properties
    assert found.value("vapour_pressure") == pytest.approx(836.5e3, rel=1e-3)


def test_a_vapour_that_is_liquid_at_base_has_no_volume_there() -> None:
    result = fluid.derive(tag(substance("n-hexane", "gas"), point("0.2 bar(g)", "120 degC")))
    assert [item.value("density") for item in result.bases.values()] == [None]
    assert "base-liquid" in codes(result)


def test_near_the_critical_point_is_a_caution() -> None:
    # critical point of carbon dioxide: 31.0 degC, 73.8 bar
    near = fluid.derive(tag(substance("CO2", "gas"), point("75 bar(g)", "35 degC")))
    far = fluid.derive(tag(substance("CO2", "gas"), point("20 bar(g)", "35 degC")))
    assert "near-critical" in codes(near)
    assert "near-critical" not in codes(far)
