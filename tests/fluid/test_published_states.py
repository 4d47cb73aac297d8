"""Published states of single substances that no other test of this room takes up.

Where a release gives density for pressure, the pressure that belongs to it is sought first.
"""

from __future__ import annotations

import pyaga8
import pytest
from fluid_tags import point, tag
from gas_cases import ISO_GASES, TWENTY_ONE

from specsheet import fluid
from specsheet.fluid import evaluate, if97, names
from specsheet.fluid.backends.mixture import Mixture
from specsheet.fluid.backends.pure import Pure
from specsheet.fluid.backends.water import Water
from specsheet.fluid.model import Condition, Fluid
from specsheet.fluid.state import State
from specsheet.quantity.value import Base


def at(what: Fluid, temperature: float, pressure: float) -> State:
    found = evaluate.state(what, Condition(temperature, pressure))
    assert found.state is not None, found.findings
    return found.state


def _key(name: str) -> str:
    found = names.find(name)
    assert found is not None, name
    return found.key


def at_density(what: Fluid, temperature: float, density: float, high: float = 100e6) -> State:
    """Return the state of a density: bisection over pressure, on a logarithmic scale."""
    low = 1e3
    for _ in range(80):
        middle = (low * high) ** 0.5
        if (at(what, temperature, middle).value("density") or 0.0) < density:
            low = middle
        else:
            high = middle
    return at(what, temperature, middle)


# IAPWS-95 release, table 7: T, density, pressure, sound speed; IF97 stands within 0.05 % and 0.3 %
@pytest.mark.parametrize(
    ("phase", "temperature", "density", "pressure", "sound"),
    [
        ("liquid", 300.0, 1005.308, 20002251.5, 1534.92501),
        ("gas", 500.0, 4.532, 999938.125, 535.739001),
        ("liquid", 500.0, 838.025, 10000385.8, 1271.28441),
        ("gas", 900.0, 0.241, 100062.559, 724.027147),
        ("gas", 900.0, 52.615, 20000069.0, 698.445674),
    ],
)
def test_water_by_the_scientific_formulation(
    phase: str, temperature: float, density: float, pressure: float, sound: float
) -> None:
    found = at(Water(phase), temperature, pressure)
    assert found.value("density") == pytest.approx(density, rel=5e-4)
    assert found.value("sound_speed") == pytest.approx(sound, rel=3e-3)


# IAPWS-95 release, table 8
@pytest.mark.parametrize(
    ("temperature", "pressure", "liquid", "vapour"),
    [
        (275.0, 698.451167, 999.887406, 0.00550664919),
        (450.0, 932203.564, 890.34125, 4.8120036),
    ],
)
def test_saturation_by_the_scientific_formulation(
    temperature: float, pressure: float, liquid: float, vapour: float
) -> None:
    assert if97.saturation_pressure(temperature) == pytest.approx(pressure, rel=2e-4)
    for phase, density in (("liquid", liquid), ("gas", vapour)):
        found = evaluate.state(Water(phase), Condition(temperature, None)).state
        assert found is not None
        assert found.value("density") == pytest.approx(density, rel=5e-4)


# IAPWS-IF97, table 33 (region 3): T, density, pressure, heat capacity, sound speed
@pytest.mark.parametrize(
    ("temperature", "density", "pressure", "heat", "sound"),
    [
        (650.0, 200.0, 22293064.3, 44657.9342, 383.444594),
        (750.0, 500.0, 78309563.9, 6341.65359, 760.696041),
    ],
)
def test_region_3_through_the_pressure(
    temperature: float, density: float, pressure: float, heat: float, sound: float
) -> None:
    """The library takes pressure and temperature there by backward equations, to 1e-5."""
    found = at(Water("gas"), temperature, pressure)
    assert found.value("density") == pytest.approx(density, rel=1e-4)
    assert found.value("heat_capacity") == pytest.approx(heat, rel=1e-3)
    assert found.value("sound_speed") == pytest.approx(sound, rel=1e-3)


# IAPWS R12-08, table 5: viscosity at a density; the enhancement at the critical point is left
# out, as the release allows for industrial use; the other rows lie beyond the pressures of IF97
@pytest.mark.parametrize(
    ("phase", "temperature", "density", "viscosity", "tolerance"),
    [
        ("gas", 647.35, 122.0, 2.5520677e-05, 0.02),
        ("gas", 647.35, 222.0, 3.1337589e-05, 0.02),
        ("gas", 647.35, 422.0, 4.9436256e-05, 0.02),
    ],
)
def test_viscosity_of_water(
    phase: str, temperature: float, density: float, viscosity: float, tolerance: float
) -> None:
    found = at_density(Water(phase), temperature, density)
    assert found.value("viscosity") == pytest.approx(viscosity, rel=tolerance)


# handbook water at 101.325 kPa (IAPWS): speed of sound [m/s]
@pytest.mark.parametrize(("celsius", "sound"), [(20, 1482.3), (25, 1496.7), (60, 1551.0)])
def test_sound_in_water(celsius: float, sound: float) -> None:
    found = at(Water("liquid"), celsius + 273.15, 101325.0)
    assert found.value("sound_speed") == pytest.approx(sound, rel=2e-3)


def test_boiling_water() -> None:
    # 958.37 kg/m3 at 100 degC (handbook); 19 947 Pa at 60 degC (IAPWS)
    boiling = evaluate.state(Water("liquid"), Condition(373.15, None)).state
    assert boiling is not None
    assert boiling.value("density") == pytest.approx(958.37, rel=3e-5)
    assert if97.saturation_pressure(333.15) == pytest.approx(19947.0, rel=5e-4)


# Lemmon and others, J. Phys. Chem. Ref. Data 29 (2000), table A2: mol/m3, J/mol/K, m/s
def test_cold_air() -> None:
    found = at(Pure("air", "gas"), 100.0, 101325.0)
    density, heat = found.value("density"), found.value("heat_capacity")
    assert density is not None
    assert heat is not None
    assert density / 0.0289655 == pytest.approx(124.49, rel=6e-4)
    assert heat * 0.0289655 == pytest.approx(30.13, rel=6e-4)
    assert found.value("sound_speed") == pytest.approx(198.2, rel=6e-4)


# Lemmon and Jacobsen, Int. J. Thermophys. 25 (2004), table V: dilute gas
@pytest.mark.parametrize(
    ("key", "viscosity"), [("air", 7.09559e-06), ("argon", 8.1894e-06), ("nitrogen", 6.90349e-06)]
)
def test_viscosity_of_cold_dilute_gases(key: str, viscosity: float) -> None:
    found = at(Pure(key, "gas"), 100.0, 1e3)
    assert found.value("viscosity") == pytest.approx(viscosity, rel=2e-4)


# check tables of the reference correlations (Laesecke and Muzny 2017; Michailidou and others 2013,
# 2014; Avgeri and others 2015): T, density, viscosity
@pytest.mark.parametrize(
    ("key", "phase", "temperature", "density", "viscosity"),
    [
        ("carbon_dioxide", "liquid", 225.0, 1150.0, 0.00022218),
        ("toluene", "liquid", 300.0, 865.0, 0.00056678),
        ("n_hexane", "liquid", 400.0, 600.0, 0.00017762),
        ("n_heptane", "liquid", 400.0, 600.0, 0.00017594),
    ],
)
def test_viscosity_of_liquids(
    key: str, phase: str, temperature: float, density: float, viscosity: float
) -> None:
    found = at_density(Pure(key, phase), temperature, density, 50e6)
    assert found.value("density") == pytest.approx(density, rel=1e-6)
    assert found.value("viscosity") == pytest.approx(viscosity, rel=1e-3)


# GPA: 23.645 m3/kmol at 15 degC; 1 Nm3 = 1.0549 m3 at 15 degC = 1.0732 m3 at 20 degC; and
# 0.0268 Nm3 to the cubic foot (60 degF, 14.696 psi), 0.02685 at 14.73 psi: ideal gas, as helium is
@pytest.mark.parametrize(
    ("temperature", "pressure", "ratio"),
    [
        (288.15, 101325.0, 1.0549),
        (293.15, 101325.0, 1.0732),
        (288.7055556, 101325.3532, 0.0283168466 / 0.026791),
        (288.7055556, 101559.7749, 0.0283168466 / 0.026855),
    ],
)
def test_base_conditions(temperature: float, pressure: float, ratio: float) -> None:
    helium = Pure("helium", "gas")
    normal = helium.base(Base("", 273.15, 101325.0)).value("density")
    other = helium.base(Base("", temperature, pressure)).value("density")
    assert normal is not None
    assert other is not None
    assert normal / other == pytest.approx(ratio, rel=2e-4)


def test_molar_volume_at_15_degrees() -> None:
    density = Pure("helium", "gas").base(Base("", 288.15, 101325.0)).value("density")
    assert density is not None
    assert 4.002602e-3 / density == pytest.approx(0.023645, rel=1e-3)


def test_humid_air_by_its_wet_bulb() -> None:
    # ASHRAE Fundamentals 2017, chapter 1, example 1: 40 degC, W = 6.5 g/kg, 0.896 m3/kg of dry air
    share = 0.0065 / 0.018015 / (0.0065 / 0.018015 + 1.0 / 0.028965)
    air = (
        ("nitrogen", 0.7812 * (1.0 - share)),
        ("oxygen", 0.2096 * (1.0 - share)),
        ("argon", 0.0092 * (1.0 - share)),
        ("water", share),
    )
    density = at(Mixture(air, "gas"), 313.15, 101325.0).value("density")
    assert density is not None
    assert 1.0065 / density == pytest.approx(0.896, rel=2e-3)


def test_gas_of_21_components() -> None:
    # check values of the reference implementation of AGA report 8, GERG-2008, at 400 K and 50 MPa
    gas = tuple((_key(name), share) for name, share in TWENTY_ONE.items())
    found = at(Mixture(gas, "gas"), 400.0, 50e6)
    density = found.value("density")
    assert density is not None
    assert density / 0.0205427445 == pytest.approx(12798.28626, rel=2e-4)
    assert found.value("compressibility") == pytest.approx(1.174690666, rel=2e-4)
    assert found.value("sound_speed") == pytest.approx(714.4248841, rel=1e-3)
    assert found.value("isentropic_exponent") == pytest.approx(2.683820255, rel=2e-3)
    assert (found.value("heat_capacity") or 0.0) * 0.0205427445 == pytest.approx(
        58.45522051, rel=2e-3
    )


def test_heavy_gas_against_an_independent_gerg_2008() -> None:
    """Gas 6 of ISO 20765-2, propane to decane with water; no state of it is at hand in print."""
    gas = tuple((_key(name), share) for name, share in ISO_GASES["Gas 6"].items())
    mixed = pyaga8.Composition()
    for name, share in ISO_GASES["Gas 6"].items():
        setattr(mixed, name, share)
    gerg = pyaga8.Gerg2008()
    gerg.set_composition(mixed)
    gerg.pressure, gerg.temperature = 500.0, 550.0
    gerg.calc_density(0)
    gerg.calc_properties()
    found = at(Mixture(gas, "gas"), 550.0, 500e3)
    assert found.phase == "gas"
    assert found.value("compressibility") == pytest.approx(gerg.z, rel=2e-3)
    assert found.value("sound_speed") == pytest.approx(gerg.w, rel=4e-3)


def test_example_2_of_iso_6976_at_base() -> None:
    # ISO 6976:2016, annex D, example 2: Z at 15.55 degC, molar mass, with water
    text = (
        'kind = "mixture"\nphase = "gas"\nmixture = { methane = 0.931819, ethane = 0.025618, '
        "water = 0.016837, nitrogen = 0.010335, carbon_dioxide = 0.015391 }"
    )
    result = fluid.derive(tag(text, point("1 bar(g)", "60 degC")))
    assert result.constants["molar_mass"].value == pytest.approx(0.0169891697, rel=2e-5)
