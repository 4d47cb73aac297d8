"""Humid air, compressed air and wet gas against published points and an independent model."""

from __future__ import annotations

import pytest
from fluid_tags import codes, finding, point, stops, tag

from specsheet import fluid
from specsheet.fluid import library
from specsheet.fluid.backends.mixture import AIR, Mixture
from specsheet.fluid.backends.wet_gas import saturated, wetted
from specsheet.fluid.model import Condition
from specsheet.fluid.water_in_gas import saturation

WATER, DRY = 0.01801528, 0.0289655
AIR_60 = 'kind = "humid_air"\nphase = "gas"\nrelative_humidity = "60 %"'


def ratio(fraction: float) -> float:
    """Return mass of water by mass of dry air."""
    return fraction / (1.0 - fraction) * WATER / DRY


# ASHRAE Handbook Fundamentals 2017, chapter 1, tables 3 (pressure) and 2 (humidity ratio)
@pytest.mark.parametrize(
    ("celsius", "pressure"), [(-5, 401.74), (5, 872.6), (25, 3169.7), (150, 476101.4)]
)
def test_saturation_pressure_over_water_and_ice(celsius: float, pressure: float) -> None:
    assert saturation(celsius + 273.15) == pytest.approx(pressure, rel=5e-4)


@pytest.mark.parametrize(("celsius", "expected"), [(5, 0.005425), (25, 0.020173)])
def test_humidity_ratio_at_saturation(celsius: float, expected: float) -> None:
    found = ratio(saturated(AIR, celsius + 273.15, 101325.0))
    assert found == pytest.approx(expected, rel=0.002)


def test_humid_air_of_the_reference_equation() -> None:
    # IAPWS G8-10, table 14: mass fraction of dry air 0.977605798, 300 K, 100 kPa
    air = 0.977605798
    fraction = (1 - air) / WATER / ((1 - air) / WATER + air / DRY)
    found = Mixture(wetted(AIR, fraction), "gas").state(Condition(300.0, 1e5))
    assert found.value("density") == pytest.approx(1.14614216, rel=4e-4)
    assert found.value("heat_capacity") == pytest.approx(1026.81324, rel=2e-3)
    assert found.value("sound_speed") == pytest.approx(349.234196, rel=4e-4)


@pytest.mark.parametrize(
    ("temperature", "pressure", "humidity", "water_tolerance"),
    [
        (298.15, 101325.0, 0.6, 0.002),
        (308.15, 8e5, 0.6, 0.005),
        (308.15, 20e5, 1.0, 0.02),
        (350.0, 101325.0, 0.9, 0.01),
        (263.15, 101325.0, 0.8, 0.005),
    ],
)
def test_against_the_humid_air_model_of_ashrae_rp_1485(
    temperature: float, pressure: float, humidity: float, water_tolerance: float
) -> None:
    fraction = humidity * saturated(AIR, temperature, pressure)
    module = library.fluids()

    def other(key: str) -> float:
        return float(module.HAPropsSI(key, "T", temperature, "P", pressure, "R", humidity))

    assert ratio(fraction) == pytest.approx(other("W"), rel=water_tolerance)
    found = Mixture(wetted(AIR, fraction), "gas").state(Condition(temperature, pressure))
    assert found.value("density") == pytest.approx(1.0 / other("Vha"), rel=1.5e-3)
    assert found.value("viscosity") == pytest.approx(other("mu"), rel=0.03)


def test_relative_humidity_counts_at_every_point() -> None:
    result = fluid.derive(
        tag(AIR_60, point("0 bar(g)", "25 degC"), point("0 bar(g)", "5 degC", "minimum"))
    )
    dew = [state.value("dew_temperature") for state in result.points if state]
    # dew points at 60 %, 25 and 5 degC: 16.7 and -2.2 degC (psychrometric tables, from memory)
    assert dew[0] == pytest.approx(273.15 + 16.7, abs=0.1)
    assert dew[1] == pytest.approx(273.15 - 2.2, abs=0.4)
    assert stops(result) == []


def test_water_dew_point_fixes_the_content_at_the_normal_point() -> None:
    text = 'kind = "humid_air"\nphase = "gas"\nwater_dew_point = "3 degC"'
    result = fluid.derive(
        tag(text, point("7 bar(g)", "35 degC"), point("7 bar(g)", "1 degC", "minimum"))
    )
    assert result.name == "humid air"
    assert stops(result) == ["phase-disagrees"]
    assert finding(result, "phase-disagrees").point == "minimum"
    cold = result.points[1]
    assert cold is not None
    assert cold.value("dew_temperature") == pytest.approx(276.15, abs=0.2)


def test_saturated_gas_is_at_its_dew_point_not_below() -> None:
    text = (
        'kind = "mixture"\nphase = "gas"\nmixture = { CH4 = 0.62, CO2 = 0.38 }\n'
        'relative_humidity = "100 %"'
    )
    result = fluid.derive(tag(text, point("0.2 bar(g)", "35 degC")))
    assert stops(result) == []
    assert "near-dew-point" in codes(result)
    # 5628 Pa of 121.3 kPa is water
    assert result.constants["molar_mass"].value == pytest.approx(
        0.0464 * WATER + 0.9536 * (0.62 * 0.01604246 + 0.38 * 0.0440095), rel=1e-3
    )


def test_humid_air_without_humidity_is_taken_as_dry_and_said() -> None:
    result = fluid.derive(tag('kind = "humid_air"\nphase = "gas"', point("7 bar(g)", "35 degC")))
    assert "humidity-missing" in codes(result)
    assert result.points[0] is not None


@pytest.mark.parametrize(
    ("more", "code"),
    [
        ('relative_humidity = "120 %"', "humidity-range"),
        ('relative_humidity = "60 %"\nmixture = { CH4 = 0.9, H2O = 0.1 }', "humidity-twice"),
    ],
)
def test_humidity_that_makes_no_sense(more: str, code: str) -> None:
    mixture = "" if "mixture" in more else "mixture = { CH4 = 0.9, CO2 = 0.1 }\n"
    text = f'kind = "mixture"\nphase = "gas"\n{mixture}{more}'
    result = fluid.derive(tag(text, point("1 bar(g)", "35 degC")))
    assert stops(result) == [code]


def test_humidity_above_boiling_is_refused() -> None:
    result = fluid.derive(tag(AIR_60, point("0 bar(g)", "150 degC")))
    assert finding(result, "humidity-range").field == "points.normal.temperature"


@pytest.mark.parametrize("name", ["air", "nitrogen"])
def test_humidity_of_a_pure_gas_is_not_passed_over(name: str) -> None:
    head = f'kind = "substance"\nsubstance = "{name}"\nphase = "gas"\n'
    dry = fluid.derive(tag(head, point("1 bar(g)", "40 degC")))
    wet = fluid.derive(tag(head + 'relative_humidity = "80 %"', point("1 bar(g)", "40 degC")))
    assert wet.constants["molar_mass"].value < dry.constants["molar_mass"].value
    assert wet.points[0] is not None
    # 80 % of 7.384 kPa is a dew point of 36.0 degC
    assert wet.points[0].value("dew_temperature") == pytest.approx(309.15, abs=0.15)
