"""Solutions, petroleum, seawater and slurries against published figures."""

from __future__ import annotations

import iapws
import pytest
from fluid_tags import codes, finding, point, stops, tag

from specsheet import fluid
from specsheet.fluid import evaluate
from specsheet.fluid.backends.petroleum import Petroleum
from specsheet.fluid.backends.seawater import Seawater
from specsheet.fluid.backends.solution import Solution
from specsheet.fluid.model import Condition
from specsheet.fluid.state import State
from specsheet.methods import petroleum, solutions, suspensions


def solved(key: str, fraction: float, celsius: float) -> State:
    found = evaluate.state(Solution(key, fraction, "liquid"), Condition(celsius + 273.15, 2e5))
    assert found.state is not None, found.findings
    return found.state


# A. Melinder (2010), secondary fluids, in CoolProp: mass fraction, degC, kg/m3, mPa s
@pytest.mark.parametrize(
    ("key", "fraction", "celsius", "density", "viscosity"),
    [
        ("ethylene_glycol", 0.3, 20, 1038.05, 2.166),
        ("propylene_glycol", 0.3, 20, 1023.78, 2.965),
        ("propylene_glycol", 0.5, 0, 1050.94, 19.11),
        ("sodium_chloride", 0.1, 20, 1070.58, 1.193),
        ("calcium_chloride", 0.2, 0, 1184.77, 3.183),
    ],
)
def test_secondary_fluids(
    key: str, fraction: float, celsius: float, density: float, viscosity: float
) -> None:
    found = solved(key, fraction, celsius)
    assert found.value("density") == pytest.approx(density, rel=2e-4)
    assert found.value("viscosity") == pytest.approx(viscosity * 1e-3, rel=1e-3)


# handbook densities at 20 degC [kg/m3], from memory
@pytest.mark.parametrize(
    ("key", "fraction", "density"),
    [
        ("sodium_hydroxide", 0.10, 1108.9),
        ("sodium_hydroxide", 0.30, 1327.9),
        ("sodium_hydroxide", 0.50, 1525.3),
        ("hydrogen_chloride", 0.10, 1047.4),
        ("hydrogen_chloride", 0.36, 1178.9),
        ("sulfuric_acid", 0.30, 1218.5),
        ("sulfuric_acid", 0.60, 1498.3),
        ("nitric_acid", 0.30, 1180.0),
        ("nitric_acid", 0.50, 1310.0),
        ("phosphoric_acid", 0.30, 1180.5),
        ("potassium_hydroxide", 0.30, 1290.0),
        ("sodium_chloride", 0.26, 1197.2),
        ("calcium_chloride", 0.40, 1395.7),
        ("ethanol", 0.80, 843.4),
    ],
)
def test_densities_of_solutions(key: str, fraction: float, density: float) -> None:
    found = solved(key, fraction, 20.0).properties["density"]
    assert found.value == pytest.approx(density, rel=max(found.uncertainty, 0.003))


# handbook viscosities at 20 degC [mPa s], from memory
@pytest.mark.parametrize(
    ("key", "fraction", "viscosity"),
    [
        ("sodium_hydroxide", 0.20, 4.48),
        ("sodium_hydroxide", 0.30, 13.0),
        ("hydrogen_chloride", 0.30, 1.70),
        ("sulfuric_acid", 0.50, 3.9),
        ("nitric_acid", 0.30, 1.31),
        ("potassium_hydroxide", 0.30, 2.4),
        ("sodium_chloride", 0.26, 1.99),
    ],
)
def test_viscosities_of_solutions(key: str, fraction: float, viscosity: float) -> None:
    found = solved(key, fraction, 20.0).properties["viscosity"]
    assert found.value == pytest.approx(viscosity * 1e-3, rel=found.uncertainty)


# handbook heat capacities near room temperature [J/kg/K]: caustic, brine and acids, from memory
@pytest.mark.parametrize(
    ("key", "fraction", "celsius", "heat"),
    [
        ("sodium_hydroxide", 0.10, 20, 3755),
        ("sodium_hydroxide", 0.30, 20, 3510),
        ("potassium_hydroxide", 0.30, 20, 3000),
        ("sulfuric_acid", 0.20, 20, 3520),
        ("sulfuric_acid", 0.50, 20, 2510),
        ("sulfuric_acid", 0.70, 20, 1970),
    ],
)
def test_heat_capacities_of_solutions(
    key: str, fraction: float, celsius: float, heat: float
) -> None:
    found = solved(key, fraction, celsius).properties["heat_capacity"]
    assert found.value == pytest.approx(heat, rel=found.uncertainty)


@pytest.mark.parametrize(
    ("key", "fraction"),
    [("sodium_chloride", 0.2), ("calcium_chloride", 0.25), ("magnesium_chloride", 0.2)],
)
def test_heat_capacity_of_brine_by_two_sources(key: str, fraction: float) -> None:
    """Melinder below 40 degC, Laliberté above: independent measurements, one brine."""
    cold, warm = solved(key, fraction, 39.9), solved(key, fraction, 40.1)
    assert warm.properties["heat_capacity"].source != cold.properties["heat_capacity"].source
    assert warm.value("heat_capacity") == pytest.approx(cold.value("heat_capacity"), rel=0.03)


def test_no_heat_capacity_beyond_the_measurements() -> None:
    assert "heat_capacity" not in solved("sodium_hydroxide", 0.45, 20.0).properties
    assert "heat_capacity" not in solved("hydrogen_chloride", 0.30, 20.0).properties


# water that has not frozen: 286.5 Pa at -10 degC, 125.4 Pa at -20 degC (handbook, from memory)
@pytest.mark.parametrize(("celsius", "vapour"), [(0, 611.2), (-10, 286.5), (-20, 125.4)])
def test_vapour_pressure_of_cold_water(celsius: float, vapour: float) -> None:
    found = solutions.supercooled_vapour_pressure(celsius + 273.15)
    assert found == pytest.approx(vapour, rel=0.02)


def test_two_sources_meet_where_they_hand_over() -> None:
    """Brine goes from one correlation to another at 40 degC: no step beyond their uncertainty."""
    cold, warm = solved("sodium_chloride", 0.2, 39.99), solved("sodium_chloride", 0.2, 40.01)
    assert cold.value("density") == pytest.approx(warm.value("density"), rel=2e-3)
    assert cold.value("viscosity") == pytest.approx(warm.value("viscosity"), rel=0.05)


def test_vapour_pressure_of_spirits_gives_the_known_boiling_points() -> None:
    # ethanol-water with 0.5 by mole (71.9 % by mass) boils at 79.8 degC at 1 atm (handbook)
    found = Solution("ethanol", 0.719, "liquid")._vapour_pressure(273.15 + 79.8)
    assert found is not None
    assert found.value == pytest.approx(101325.0, rel=0.03)


def test_brine_freezes() -> None:
    text = 'kind = "solution"\nsolute = "MEG"\nmass_fraction = "30 %"\nphase = "liquid"'
    result = fluid.derive(tag(text, point("3 bar(g)", "-25 degC")))
    # 30 % ethylene glycol freezes near -14.6 degC (Melinder 2010)
    assert "-14.58 °C" in finding(result, "frozen").message


@pytest.mark.parametrize(
    ("solute", "fraction", "code", "field"),
    [
        ("caustic soda", "60 %", "concentration-limit", "fluid.mass_fraction"),
        ("nitric acid", "90 %", "concentration-limit", "fluid.mass_fraction"),
        ("unobtainium", "10 %", "solute-unknown", "fluid.solute"),
        ("NaCl", "130 %", "fraction-range", "fluid.mass_fraction"),
    ],
)
def test_solutions_refused(solute: str, fraction: str, code: str, field: str) -> None:
    text = f'kind = "solution"\nsolute = "{solute}"\nmass_fraction = "{fraction}"\nphase = "liquid"'
    result = fluid.derive(tag(text, point("3 bar(g)", "20 degC")))
    assert stops(result) == [code]
    assert finding(result, code).field == field


def test_strong_acid_has_a_density_and_asks_for_the_viscosity() -> None:
    text = 'kind = "solution"\nsolute = "H2SO4"\nmass_fraction = "96 %"\nphase = "liquid"'
    asked = fluid.derive(tag(text, point("3 bar(g)", "20 degC")))
    told = fluid.derive(tag(text, point("3 bar(g)", "20 degC", viscosity="22 mPa s")))
    assert asked.points[0] is not None
    # 1835.5 kg/m3 (handbook, from memory)
    assert asked.points[0].value("density") == pytest.approx(1835.5, rel=1e-3)
    assert "viscosity-missing" in codes(asked)
    assert "viscosity-missing" not in codes(told)


def test_volume_fraction_is_converted_and_said() -> None:
    text = (
        'kind = "solution"\nsolute = "ethylene glycol"\nvolume_fraction = "30 %"\nphase = "liquid"'
    )
    result = fluid.derive(tag(text, point("3 bar(g)", "20 degC")))
    # 30 parts of 1113 kg/m3 with 70 parts of water of 998.2 kg/m3
    assert "32.33 % by mass" in finding(result, "fraction-converted").message


# API MPMS 11.1 tables, published points: 35 API crude at 100 degF; and its compressed density
def test_volume_correction_of_crude() -> None:
    at_60 = petroleum.density_from_api_gravity(35.0)
    density = at_60
    for _ in range(5):
        density = at_60 / petroleum.temperature_correction(
            density_15=density, celsius=140 / 9, product="crude"
        )
    warm = petroleum.temperature_correction(
        density_15=density, celsius=(100 - 32) / 1.8, product="crude"
    )
    assert density * warm / at_60 == pytest.approx(0.98097, abs=2e-5)
    squeezed = petroleum.pressure_correction(
        compressibility=petroleum.compressibility(density_15=density, celsius=(100 - 32) / 1.8),
        gauge_pressure=6894757.0,
    )
    assert squeezed == pytest.approx(1.00576, abs=5e-5)


def test_products_meet_where_their_groups_do() -> None:
    """Constants typed wrong would open a gap between neighbouring groups of the standard."""
    for density, lower, upper in (
        (770.5, "gasoline", "transition"),
        (787.5, "transition", "jet fuel"),
    ):
        first = petroleum.expansion(density_15=density, product=lower)
        second = petroleum.expansion(density_15=density, product=upper)
        assert first == pytest.approx(second, rel=0.005)


def test_viscosity_of_oil_goes_through_both_points_and_between() -> None:
    # ISO VG 46 oil, 46 and 6.8 mm2/s at 40 and 100 degC; near 20 mm2/s at 60 degC (common charts)
    oil = Petroleum("lubricating oil", 870.0, ((313.15, 46e-6), (373.15, 6.8e-6)), "liquid")
    at = {
        t: oil.state(Condition(t + 273.15, 2e5)).value("kinematic_viscosity") for t in (40, 60, 100)
    }
    assert at[40] == pytest.approx(46e-6)
    assert at[100] == pytest.approx(6.8e-6)
    assert at[60] == pytest.approx(20.5e-6, rel=0.05)


def test_oil_by_gravity_or_density_is_the_same_oil() -> None:
    head = 'kind = "petroleum"\nproduct = "crude"\nphase = "liquid"\n'
    by_gravity = fluid.derive(tag(head + 'api_gravity = "35"', point("3 bar(g)", "40 degC")))
    by_density = fluid.derive(
        tag(head + 'density_15 = "849.42 kg/m3"', point("3 bar(g)", "40 degC"))
    )
    densities = [
        item.points[0].value("density") for item in (by_gravity, by_density) if item.points[0]
    ]
    assert densities[0] == pytest.approx(densities[1], rel=1e-5)
    assert "viscosity-missing" in codes(by_gravity)


def test_oil_far_beyond_its_viscosities_is_a_caution() -> None:
    text = (
        'kind = "petroleum"\nproduct = "fuel oil"\nphase = "liquid"\ndensity_15 = "940 kg/m3"\n'
        'viscosity_1 = "380 mm2/s"\nviscosity_1_temperature = "50 degC"\n'
        'viscosity_2 = "36 mm2/s"\nviscosity_2_temperature = "100 degC"'
    )
    result = fluid.derive(tag(text, point("3 bar(g)", "5 degC")))
    assert finding(result, "viscosity-extrapolated").field == "points.normal.viscosity"


def test_swapped_viscosities_are_refused() -> None:
    text = (
        'kind = "petroleum"\nproduct = "fuel oil"\nphase = "liquid"\ndensity_15 = "940 kg/m3"\n'
        'viscosity_1 = "36 mm2/s"\nviscosity_1_temperature = "50 degC"\n'
        'viscosity_2 = "380 mm2/s"\nviscosity_2_temperature = "100 degC"'
    )
    assert stops(fluid.derive(tag(text, point("3 bar(g)", "60 degC")))) == ["viscosity-pairs"]


# IAPWS R13-08, table 8; pure water by IAPWS-IF97 in place of IAPWS-95, hence the tolerances
@pytest.mark.parametrize(
    ("pressure", "density", "heat", "sound"),
    [(101325.0, 1028.1072, 3986.48579, 1449.00246), (100e6, 1070.92645, 3771.90387, 1621.98998)],
)
def test_seawater(pressure: float, density: float, heat: float, sound: float) -> None:
    found = Seawater(0.03516504, "liquid").state(Condition(273.15, pressure))
    assert found.value("density") == pytest.approx(density, rel=5e-5)
    assert found.value("heat_capacity") == pytest.approx(heat, rel=3e-3)
    assert found.value("sound_speed") == pytest.approx(sound, rel=2e-3)


@pytest.mark.parametrize(("celsius", "salinity"), [(10, 0.02), (25, 0.035), (60, 0.08), (75, 0.11)])
def test_density_of_seawater_against_an_independent_library(
    celsius: float, salinity: float
) -> None:
    found = Seawater(salinity, "liquid").state(Condition(celsius + 273.15, 101325.0))
    other = iapws.SeaWater(T=celsius + 273.15, P=0.101325, S=salinity)
    assert found.value("density") == pytest.approx(other.rho, rel=5e-5)


@pytest.mark.parametrize(("celsius", "salinity"), [(5, 0.035), (25, 0.02), (35, 0.04)])
def test_sound_in_seawater_against_an_independent_library(celsius: float, salinity: float) -> None:
    found = Seawater(salinity, "liquid").state(Condition(celsius + 273.15, 5e5))
    other = iapws.SeaWater(T=celsius + 273.15, P=0.5, S=salinity)
    assert found.value("sound_speed") == pytest.approx(other.w, rel=2.5e-3)


def test_no_sound_speed_in_brine_that_nobody_measured() -> None:
    found = Seawater(0.11, "liquid").state(Condition(348.15, 5e5))
    assert "sound_speed" not in found.properties


def test_viscosity_of_seawater() -> None:
    # 35 g/kg at 20 degC: 1.077 mPa s (Sharqawy and others 2010, from memory)
    found = Seawater(0.035, "liquid").state(Condition(293.15, 101325.0))
    assert found.value("viscosity") == pytest.approx(1.077e-3, rel=0.005)


def test_thomas() -> None:
    # 1 + 0.5 + 0.402 + 0.0756 at 20 %: the terms by hand
    assert suspensions.relative_viscosity(0.2) == pytest.approx(1.9776, abs=1e-3)
    assert suspensions.relative_viscosity(0.0) == pytest.approx(1.0, abs=0.003)


def test_slurry_by_mass_and_by_volume_agree() -> None:
    head = 'kind = "slurry"\nsubstance = "water"\nphase = "liquid"\nsolids_density = "2650 kg/m3"\n'
    volume = fluid.derive(tag(head + 'solids = "8 %"', point("3 bar(g)", "20 degC")))
    share = 0.08 * 2650 / (0.08 * 2650 + 0.92 * 998.34)
    mass = fluid.derive(
        tag(head + f'solids_mass_fraction = "{100 * share:.6f} %"', point("3 bar(g)", "20 degC"))
    )
    densities = [item.points[0].value("density") for item in (volume, mass) if item.points[0]]
    assert densities[0] == pytest.approx(0.08 * 2650 + 0.92 * 998.34, rel=1e-4)
    assert densities[1] == pytest.approx(densities[0], rel=1e-5)
    assert finding(volume, "slurry-viscosity").field == "points.normal.viscosity"


@pytest.mark.parametrize(
    "text",
    [
        'kind = "solution"\nsolute = "NaCl"\nmass_fraction = "10 %"',
        'kind = "seawater"\nsalinity = "3.5 %"',
        'kind = "petroleum"\nproduct = "crude"\ndensity_15 = "850 kg/m3"',
        'kind = "slurry"\nsubstance = "water"\nsolids = "5 %"\nsolids_density = "2000 kg/m3"',
    ],
)
def test_liquids_stated_as_gas_are_refused(text: str) -> None:
    result = fluid.derive(tag(f'{text}\nphase = "gas"', point("3 bar(g)", "20 degC")))
    assert stops(result) == ["liquid-only"]
