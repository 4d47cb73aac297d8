"""Water and steam: the verification tables of the releases, saturation, wetness and phase."""

from __future__ import annotations

import pytest
from fluid_tags import codes, finding, point, stops, tag

from specsheet import fluid
from specsheet.findings import Origin
from specsheet.fluid import evaluate, if97
from specsheet.fluid.backends.water import Water
from specsheet.fluid.model import Condition
from specsheet.fluid.state import State

STEAM = 'kind = "substance"\nsubstance = "steam"\nphase = "gas"'
WATER = 'kind = "substance"\nsubstance = "water"\nphase = "liquid"'


def state(phase: str, temperature: float | None, pressure: float | None) -> State:
    found = evaluate.state(Water(phase), Condition(temperature, pressure)).state
    assert found is not None
    return found


# IAPWS-IF97 (2007): tables 5, 15 and 42: T, p, specific volume, heat capacity, sound speed
@pytest.mark.parametrize(
    ("phase", "temperature", "pressure", "volume", "heat", "sound"),
    [
        ("liquid", 300.0, 3e6, 0.00100215168, 4173.01218, 1507.73921),
        ("liquid", 300.0, 80e6, 0.000971180894, 4010.08987, 1634.69054),
        ("gas", 700.0, 3500.0, 92.3015898, 2081.41274, 644.289068),
        ("gas", 700.0, 30e6, 0.00542946619, 10350.5092, 480.386523),
        ("gas", 1500.0, 0.5e6, 1.3845509, 2616.09445, 917.06869),
        ("gas", 1500.0, 30e6, 0.0230761299, 2727.24317, 928.548002),
    ],
)
def test_if97_verification_tables(
    phase: str, temperature: float, pressure: float, volume: float, heat: float, sound: float
) -> None:
    found = state(phase, temperature, pressure)
    assert 1.0 / found.properties["density"].value == pytest.approx(volume, rel=1e-8)
    assert found.value("heat_capacity") == pytest.approx(heat, rel=1e-8)
    assert found.value("sound_speed") == pytest.approx(sound, rel=1e-8)


# IAPWS-IF97 (2007), tables 35 and 36
@pytest.mark.parametrize(("temperature", "pressure"), [(300.0, 3536.58941), (600.0, 12344314.6)])
def test_saturation_pressure(temperature: float, pressure: float) -> None:
    assert if97.saturation_pressure(temperature) == pytest.approx(pressure, rel=3e-9)


@pytest.mark.parametrize(("pressure", "temperature"), [(1e5, 372.755919), (1e6, 453.035632)])
def test_saturation_temperature(pressure: float, temperature: float) -> None:
    assert if97.saturation_temperature(pressure) == pytest.approx(temperature, rel=2e-9)


# handbook water at 101.325 kPa (IAPWS): density; viscosity of ISO/TR 3666
@pytest.mark.parametrize(
    ("celsius", "density"),
    [(4, 999.97), (15, 999.10), (20, 998.21), (60, 983.20)],
)
def test_density_at_one_atmosphere(celsius: float, density: float) -> None:
    assert state("liquid", celsius + 273.15, 101325.0).value("density") == pytest.approx(
        density, abs=0.011
    )


@pytest.mark.parametrize(
    ("celsius", "viscosity"), [(20, 1.0016e-3), (25, 0.890e-3), (60, 0.466e-3)]
)
def test_viscosity_at_one_atmosphere(celsius: float, viscosity: float) -> None:
    assert state("liquid", celsius + 273.15, 101325.0).value("viscosity") == pytest.approx(
        viscosity, rel=1e-3
    )


# IAPWS-IF97 steam tables, saturated vapour
@pytest.mark.parametrize(
    ("pressure", "density", "enthalpy"), [(1e6, 5.145, 2777120.0), (10e6, 55.463, 2725470.0)]
)
def test_saturated_steam_from_pressure(pressure: float, density: float, enthalpy: float) -> None:
    found = state("gas", None, pressure)
    assert found.value("density") == pytest.approx(density, rel=2e-4)
    assert found.value("specific_enthalpy") == pytest.approx(enthalpy, rel=2e-4)


def test_saturated_from_temperature_is_the_same_state() -> None:
    by_pressure = state("gas", None, 8e5)
    by_temperature = state("gas", by_pressure.temperature, None)
    assert by_temperature.pressure == pytest.approx(8e5, rel=1e-8)
    assert by_temperature.value("density") == pytest.approx(by_pressure.value("density"), rel=1e-7)


def test_isentropic_exponent_is_that_of_the_real_gas() -> None:
    found = state("gas", 458.15, 8e5)
    values = {key: item.value for key, item in found.properties.items()}
    assert values["isentropic_exponent"] == pytest.approx(
        values["density"] * values["sound_speed"] ** 2 / 8e5
    )
    assert "isentropic_exponent" not in state("liquid", 300.0, 8e5).properties


def test_both_stated_within_the_tolerance_is_saturated_with_a_note() -> None:
    boiling = if97.saturation_temperature(8e5)
    assert boiling is not None
    near = evaluate.state(Water("gas"), Condition(boiling - 0.04, 8e5)).state
    off = evaluate.state(Water("gas"), Condition(boiling - 0.06, 8e5)).state
    assert near is not None
    assert off is not None
    assert near.phase == "gas"
    assert [item.code for item in near.findings] == ["on-saturation", "dryness-assumed"]
    assert [item.code for item in off.findings] == ["phase-disagrees"]


def test_saturated_steam_is_said_to_be_taken_as_dry() -> None:
    saturated = evaluate.state(Water("gas"), Condition(None, 8e5)).state
    stated = evaluate.state(Water("gas"), Condition(None, 8e5, 1.0)).state
    water = evaluate.state(Water("liquid"), Condition(None, 8e5)).state
    assert saturated is not None
    assert stated is not None
    assert water is not None
    assert [item.code for item in saturated.findings] == ["dryness-assumed"]
    assert not stated.findings
    assert "dryness-assumed" not in [item.code for item in water.findings]


def test_wet_steam_has_the_density_of_the_mixture() -> None:
    result = fluid.derive(tag(STEAM, point("7 bar(g)", "", dryness_fraction="95 %")))
    found = result.points[0]
    assert found is not None
    vapour, liquid = state("gas", None, 801325.0), state("liquid", None, 801325.0)
    volume = 0.95 / vapour.properties["density"].value + 0.05 / liquid.properties["density"].value
    assert found.phase == "two_phase"
    assert found.value("density") == pytest.approx(1.0 / volume, rel=1e-9)
    assert stops(result) == []
    assert finding(result, "wet-steam").field == "points.normal.dryness_fraction"


def test_dryness_away_from_saturation_is_said_not_used() -> None:
    result = fluid.derive(tag(STEAM, point("7 bar(g)", "185 degC", dryness_fraction="95 %")))
    assert finding(result, "dryness-unused").point == "normal"


def test_steam_that_would_be_water_is_a_stop() -> None:
    result = fluid.derive(tag(STEAM, point("7 bar(g)", "160 degC")))
    assert stops(result) == ["phase-disagrees"]
    assert "170.5 °C" in finding(result, "phase-disagrees").message


def test_hot_water_below_its_vapour_pressure_flashes() -> None:
    result = fluid.derive(tag(WATER, point("0 bar(g)", "105 degC")))
    assert finding(result, "flashing").field == "points.normal.pressure"
    assert "1.209 bar(a)" in finding(result, "flashing").message


def test_margin_to_saturation() -> None:
    hot = state("gas", 458.15, 801325.0)
    cold = state("liquid", 358.15, 801325.0)
    assert hot.value("saturation_margin") == pytest.approx(14.52, abs=0.01)
    assert cold.value("saturation_margin") == pytest.approx(85.48, abs=0.01)


def test_water_at_zero_celsius_base() -> None:
    # IAPWS-IF97 at 0 °C, 101.325 kPa (a widely quoted value)
    found = fluid.derive(tag(WATER, point("2 bar(g)", "15 degC", flow="3 Nm3/h")))
    densities = [item.value("density") for item in found.bases.values()]
    assert densities[1] == pytest.approx(999.844, abs=0.001)


def test_steam_has_no_volume_at_base() -> None:
    result = fluid.derive(tag(STEAM, point("7 bar(g)", "185 degC")))
    assert all(item.value("density") is None for item in result.bases.values())
    assert "base-liquid" in codes(result)


@pytest.mark.parametrize(
    ("pressure", "temperature", "field"),
    [
        ("7 bar(g)", "-2 degC", "points.normal.temperature"),
        ("7 bar(g)", "2100 degC", "points.normal.temperature"),
        ("1200 bar(g)", "300 degC", "points.normal.pressure"),
        ("600 bar(g)", "900 degC", "points.normal.pressure"),
    ],
)
def test_outside_the_regions_is_refused(pressure: str, temperature: str, field: str) -> None:
    result = fluid.derive(tag(STEAM, point(pressure, temperature)))
    assert result.points == (None,)
    assert finding(result, "fluid-limit").field == field


def test_nothing_stated_asks_for_it() -> None:
    result = fluid.derive(tag(STEAM, point()))
    assert finding(result, "conditions-missing").field == "points.normal.pressure"


def test_every_value_says_where_it_comes_from() -> None:
    found = state("gas", 458.15, 8e5)
    for item in found.properties.values():
        assert item.origin is Origin.DERIVED
        assert item.method
        assert item.source
        assert item.uncertainty > 0.0


def test_hardly_superheated_steam_is_a_caution() -> None:
    near = fluid.derive(tag(STEAM, point("7 bar(g)", "172 degC")))
    far = fluid.derive(tag(STEAM, point("7 bar(g)", "185 degC")))
    assert finding(near, "near-saturation").field == "points.normal.temperature"
    assert "near-saturation" not in codes(far)


def test_supercritical_water_is_noted() -> None:
    result = fluid.derive(tag(STEAM, point("240 bar(g)", "400 degC")))
    assert "supercritical" in codes(result)
    assert stops(result) == []


# IAPWS-IF97 (2007), table 33 (region 3): T, p, density, enthalpy; reached from T and p backwards
@pytest.mark.parametrize(
    ("temperature", "pressure", "density", "enthalpy", "tolerance"),
    [
        (650.0, 22293064.3, 200.0, 2375124.01, 1e-4),
        (750.0, 78309563.9, 500.0, 2258688.45, 1e-5),
    ],
)
def test_region_3(
    temperature: float, pressure: float, density: float, enthalpy: float, tolerance: float
) -> None:
    found = state("gas", temperature, pressure)
    assert found.value("density") == pytest.approx(density, rel=tolerance)
    assert found.value("specific_enthalpy") == pytest.approx(enthalpy, rel=tolerance)


def at_density(temperature: float, density: float) -> State:
    """Return the state of steam of a density, by halving the pressure."""
    low, high = 1e3, 49e6
    for _ in range(80):
        middle = 0.5 * (low + high)
        found = state("gas", temperature, middle)
        low, high = (middle, high) if (found.value("density") or 0.0) < density else (low, middle)
    return found


# IAPWS R12-08, table 4 (temperature, density, viscosity), where IAPWS-IF97 reaches
@pytest.mark.parametrize(
    ("temperature", "density", "viscosity"),
    [
        (433.15, 1.0, 1.4538324e-5),
        (873.15, 1.0, 3.2619287e-5),
        (1173.15, 1.0, 4.4217245e-5),
    ],
)
def test_viscosity_release(temperature: float, density: float, viscosity: float) -> None:
    assert at_density(temperature, density).value("viscosity") == pytest.approx(viscosity, rel=2e-7)


def test_conductivity_release() -> None:
    # IAPWS R15-11, table 4: 298.15 K, 998 kg/m3 (2.2 MPa), there without the critical part
    found = state("liquid", 298.15, 2.18e6)
    assert found.value("density") == pytest.approx(998.0, abs=0.05)
    assert found.value("thermal_conductivity") == pytest.approx(0.607712868, rel=2e-3)


def test_water_about_to_boil_is_a_caution() -> None:
    # 120 degC boils at 1.987 bar(a)
    near = fluid.derive(tag(WATER, point("2.05 bar(a)", "120 degC")))
    far = fluid.derive(tag(WATER, point("3 bar(a)", "120 degC")))
    saturated = fluid.derive(tag(WATER, point("2 bar(a)")))
    assert "0.063" in finding(near, "near-boiling").message
    assert "near-boiling" not in codes(far)
    assert "near-boiling" in codes(saturated)
