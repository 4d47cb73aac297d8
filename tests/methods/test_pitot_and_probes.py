"""Pitot tubes, traverses, probes, capillaries, variable area and critical nozzles."""

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

from specsheet.methods import capillary, iso9300, pitot, probe, traverse, variable_area


def test_pitot_incompressible():
    """ISO 3966: 100 Pa in air of 1.2 kg/m3 is 12.91 m/s."""
    found = pitot.velocity(
        differential_pressure=100.0, density=1.2, pressure=101325.0, isentropic_exponent=np.nan
    )
    assert found == pytest.approx(12.9099445, rel=1e-8)


def test_pitot_compressible():
    """ISO 3966 (from memory): 5 kPa, κ = 1.4 is 90.50 m/s, not 91.29."""
    found = pitot.velocity(
        differential_pressure=5000.0, density=1.2, pressure=101325.0, isentropic_exponent=1.4
    )
    assert found == pytest.approx(90.50126, rel=1e-6)


@given(
    velocity=st.floats(0.1, 250.0),
    exponent=st.one_of(st.just(np.nan), st.floats(1.05, 1.67)),
)
def test_pitot_goes_round(velocity, exponent):
    state = {"density": 1.2, "pressure": 101325.0, "isentropic_exponent": exponent}
    drop = pitot.differential_pressure(velocity=velocity, **state)
    assert pitot.velocity(differential_pressure=drop, **state) == pytest.approx(velocity, rel=1e-9)


def test_profile_on_the_axis():
    """One half in laminar flow (Hagen-Poiseuille, exact); 0.8167 for the 1/7 law."""
    found = pitot.mean_to_centre(reynolds_number=np.array([500.0, 10 ** (7 / 1.66), 1e7]))
    assert found[0] == 0.5
    assert found[1] == pytest.approx(0.8166666667, rel=1e-6)
    assert found[1] < found[2] < 1.0


# ISO 5802:2001, tables 2 and 3; ISO 3966: rule, points on a radius, distances from the wall by D
TRAVERSES = [
    ("log-linear", 3, (0.032, 0.135, 0.321)),
    ("log-linear", 4, (0.021, 0.117, 0.184, 0.345)),
    ("log-linear", 5, (0.019, 0.077, 0.153, 0.217, 0.361)),
    ("log-Tchebycheff", 4, (0.024, 0.100, 0.194, 0.334)),
]


@pytest.mark.parametrize(("rule", "points", "near"), TRAVERSES)
def test_traverse_positions(rule, points, near):
    found = traverse.round_duct(rule=rule, points=points)
    assert len(found) == 2 * points
    assert found[:points] == near
    np.testing.assert_allclose(np.add(found, found[::-1]), 1.0)


@pytest.mark.parametrize(
    ("lines", "near"),
    [(5, (0.074, 0.288, 0.5)), (6, (0.061, 0.235, 0.437)), (7, (0.053, 0.203, 0.366))],
)
def test_rectangular_positions(lines, near):
    """ISO 3966, log-Tchebycheff rule."""
    found = traverse.rectangular_duct(lines=lines)
    assert len(found) == lines
    assert found[:3] == near
    np.testing.assert_allclose(np.add(found, found[::-1]), 1.0)


@pytest.mark.parametrize(("rule", "points"), [(rule, points) for rule, points, _ in TRAVERSES])
def test_traverse_finds_the_mean_of_the_power_law(rule, points):
    """The mean of u/u0 = (y/R)^(1/7) is 2 n²/((n + 1)(2 n + 1)) = 0.8167; met to 0.5 %."""
    depth = np.array(traverse.round_duct(rule=rule, points=points)[:points])
    assert np.mean((2.0 * depth) ** (1 / 7)) == pytest.approx(0.8166666667, rel=5e-3)


def test_beam_frequency():
    """Tube of 25 x 2.5 mm, 1 m, held at one end: 3.516/(2π) sqrt(EI/m)/L² (beam theory)."""
    inertia = np.pi / 64 * (0.025**4 - 0.02**4)
    mass = 7900.0 * np.pi / 4 * (0.025**2 - 0.02**2)
    wanted = 3.516 / (2 * np.pi) * np.sqrt(1.93e11 * inertia / mass)
    found = probe.natural_frequency(
        eigenvalue=probe.HELD_AT_ONE_END, length=1.0, width=0.025, wall=0.0025, fluid_density=0.0
    )
    assert found == pytest.approx(wanted, rel=1e-3)


def test_side_holes_of_ideal_flow():
    """cp is 1 in front; -3 at the flank of a cylinder, -5/4 at that of a sphere (published)."""
    flank = np.pi / 2
    assert probe.side_hole_coefficient(angle=0.0, spherical=True) == 1.0
    assert probe.side_hole_coefficient(angle=flank, spherical=False) == pytest.approx(-3.0)
    assert probe.side_hole_coefficient(angle=flank, spherical=True) == pytest.approx(-1.25)


LIQUID = {"pressure": 1e5, "compressible": False}


def test_hagen_poiseuille():
    """Cengel and Cimbala, example 8-2 (from memory): 3 mm, 9 m, 0.9 m/s: 43.7 kPa (viscous)."""
    flow = 0.9 * np.pi / 4 * 0.003**2
    drop = capillary.differential_pressure(
        volume_flow=flow,
        viscosity=0.001519,
        density=1000.0,
        resistance=capillary.bundle_resistance(bore=0.003, length=9.0, count=1.0),
        inertia=0.0,
        **LIQUID,
    )
    assert drop == pytest.approx(43700.0, rel=2e-3)


@given(
    drop=st.floats(1.0, 4e4),
    gas=st.booleans(),
    inertia=st.floats(0.0, 1e9),
)
def test_capillary_goes_round(drop, gas, inertia):
    state = {
        "viscosity": 1.8e-5,
        "density": 1.2,
        "resistance": 5e10,
        "inertia": inertia,
        "pressure": 1e5,
        "compressible": gas,
    }
    flow = capillary.volume_flow(differential_pressure=drop, **state)
    assert capillary.differential_pressure(volume_flow=flow, **state) == pytest.approx(
        drop, rel=1e-9
    )


def test_capillary_exponent():
    """Flow rises with Δp where viscous, with its root where inertial."""
    state = {"volume_flow": 1.0, "viscosity": 1.0, "density": 1.0}
    assert capillary.flow_exponent(**state, resistance=1.0, inertia=0.0) == 1.0
    assert capillary.flow_exponent(**state, resistance=0.0, inertia=1.0) == 0.5


def test_float_conversion():
    """VDI/VDE 3513-1 (from memory): scale of water, 800 kg/m3, float 7850: factor 1.132938."""
    found = variable_area.equivalent_flow(
        volume_flow=1.0, density=998.0, float_density=7850.0, reference_density=800.0
    )
    assert found == pytest.approx(1.132938, rel=1e-6)


def test_float_loss_is_its_weight():
    """A float of 30 cm3 on 10 cm2 (3 cm), 7850 in 998.2 kg/m3: (6851.8) g 0.03 = 2016 Pa."""
    found = variable_area.float_loss(density=998.2, float_density=7850.0, float_height=0.03)
    assert found == pytest.approx(6851.8 * 9.80665 * 0.03)


@given(displacement=st.floats(1e-5, 0.1), preload=st.floats(0.0, 50.0), rate=st.floats(1.0, 5e3))
def test_spring_goes_round(displacement, preload, rate):
    state = {
        "slope": 3e-3,
        "spring_rate": rate,
        "preload": preload,
        "area": 1e-3,
        "density": 998.2,
    }
    flow = variable_area.spring_flow(displacement=displacement, **state)
    back = variable_area.spring_displacement(volume_flow=flow, **state)
    assert back == pytest.approx(displacement, rel=1e-9)


def test_spring_rests_without_flow():
    found = variable_area.spring_displacement(
        volume_flow=np.array([0.0]),
        slope=3e-3,
        spring_rate=100.0,
        preload=1.0,
        area=1e-3,
        density=998.2,
    )
    assert found[0] == 0.0


def test_critical_flow_function():
    """Ideal gas, κ = 1.4: 0.684731."""
    found = iso9300.critical_flow_function(isentropic_exponent=1.4)
    assert found == pytest.approx(0.684731, rel=1e-6)


def test_critical_pressure_ratio():
    """κ = 1.3: 0.5457 (published)."""
    found = iso9300.critical_pressure_ratio(isentropic_exponent=1.3)
    assert found == pytest.approx(0.5457, rel=2e-4)


def test_toroidal_throat():
    """ISO 9300:2005 (from memory): Red = 1e6 gives 0.99318."""
    found = iso9300.discharge_coefficient(throat_reynolds_number=1e6, throat="toroidal")
    assert found == pytest.approx(0.99318, rel=1e-6)


@pytest.mark.parametrize("mach", [0.03, 0.3, 0.8, 0.99])
def test_exit_pressure_goes_back_to_the_area(mach):
    """Ma -> A/A* by the isentropic law -> exit pressure -> Ma, for gases heavy and light."""
    kappa = np.array([1.02, 1.2, 1.4, 1.667])
    growth = 1.0 + 0.5 * (kappa - 1.0) * mach**2
    area = (2.0 / (kappa + 1.0) * growth) ** (0.5 * (kappa + 1.0) / (kappa - 1.0)) / mach
    for gas, wide, grown in zip(kappa, area, growth, strict=True):
        found = iso9300.exit_pressure_ratio(isentropic_exponent=gas, area_ratio=wide)
        assert found == pytest.approx(grown ** (-gas / (gas - 1.0)), rel=1e-11)


def test_exit_pressure_of_a_gas_that_is_none_is_no_number():
    kappa = np.array([1.4, np.nan])
    found = iso9300.exit_pressure_ratio(isentropic_exponent=kappa, area_ratio=2.0)
    assert np.isfinite(found[0])
    assert np.isnan(found[1])


def test_diffuser_lets_the_back_pressure_rise():
    """Area ratio 1 chokes at r*; a wide exit ideally at nearly the full pressure."""
    critical = iso9300.critical_pressure_ratio(isentropic_exponent=1.4)
    none = iso9300.largest_back_pressure_ratio(isentropic_exponent=1.4, area_ratio=1.0)
    assert none == pytest.approx(critical, rel=1e-6)
    ideal = iso9300.exit_pressure_ratio(isentropic_exponent=1.4, area_ratio=2.0)
    assert ideal == pytest.approx(0.937, abs=1e-3)  # isentropic tables: A/A* = 2, Ma = 0.3059
    wide = iso9300.largest_back_pressure_ratio(isentropic_exponent=1.4, area_ratio=2.0)
    assert critical < wide < ideal
