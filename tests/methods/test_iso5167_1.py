"""The mass-flow equation: published cases, round trips, choking, sensitivities."""

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

from specsheet.methods import iso5167_1 as equation
from specsheet.methods import iso5167_2, iso5167_3

# API MPMS 14.3.4, test cases 1 and 3: inputs published; C of that standard's own equation put in
API_CASES = [
    # D, d at 20 °C [m], t [K], Δp, p1 [Pa], κ, μ [Pa s], ρ, C, D, d hot [m], ReD, Y, qm [kg/s]
    (
        (0.04926203, 0.036908994, 372.0388889, 27416.18479, 101325.3532, np.nan),
        (0.0002825, 941.7574987, 0.6100592),
        (0.0493054, 0.0369575, 519659.0, 1.0, 5.6848781),
    ),
    (
        (0.102270052, 0.067667124, 255.3722222, 13987.84431, 1378951.459, 1.3198),
        (1.352e-05, 32.78338714, 0.6054364),
        (0.1022269, 0.0676246, 2125769.0, 0.9963337, 2.3075333),
    ),
]


@pytest.mark.parametrize(("state", "fluid", "wanted"), API_CASES)
def test_api_cases(state, fluid, wanted):
    """API MPMS 14.3.4 cases 1 and 3, with C and Y of API 14.3.3 (qm computed with them)."""
    pipe, bore, temperature, drop, _, _ = state
    viscosity, density, coefficient = fluid
    inside = equation.grown(length=pipe, expansion=1.116e-5, temperature=temperature)
    hot = equation.grown(length=bore, expansion=1.665e-5, temperature=temperature)
    assert inside == pytest.approx(wanted[0], rel=2e-6)
    assert hot == pytest.approx(wanted[1], rel=2e-6)
    flow = equation.mass_flow(
        discharge_coefficient=coefficient,
        expansibility=wanted[3],
        diameter_ratio=hot / inside,
        inside_diameter=inside,
        differential_pressure=drop,
        density=density,
    )
    assert flow == pytest.approx(wanted[4], rel=2e-6)
    reynolds = equation.reynolds_number(mass_flow=flow, diameter=inside, viscosity=viscosity)
    assert reynolds == pytest.approx(wanted[2], rel=2e-6)


@pytest.mark.parametrize(("fluid", "wanted"), [case[1:] for case in API_CASES])
def test_iso_coefficient_beside_api(fluid, wanted):
    """ISO 5167-2 equation (4) lies within 0.025 % of API 14.3.3 at both cases."""
    found = iso5167_2.discharge_coefficient(
        diameter_ratio=wanted[1] / wanted[0],
        reynolds_number=wanted[2],
        inside_diameter=wanted[0],
        taps="flange",
    )
    assert found == pytest.approx(fluid[2], rel=2.5e-4)


def test_textbook_venturi():
    """de Nevers, example 5.9: 1 ft by 0.5 ft, 1 psi, water, C = 0.984: 3.779 m/s, 68.94 L/s."""
    flow = equation.mass_flow(
        discharge_coefficient=0.984,
        expansibility=1.0,
        diameter_ratio=0.5,
        inside_diameter=0.3048,
        differential_pressure=6894.757293,
        density=997.9502682,
    )
    assert flow / 997.9502682 == pytest.approx(0.06893890718, rel=1e-3)
    assert flow / 997.9502682 / (np.pi / 4 * 0.1524**2) == pytest.approx(3.779240929, rel=1e-3)


def test_textbook_orifice():
    """Cengel and Cimbala, example 8-10 (from memory): methanol, 40 x 30 mm, 11 cm of mercury.

    The book takes C = 0.61 and finds 3.09 L/s; its rounding allows 2 %.
    """
    drop = (13600.0 - 788.4) * 9.81 * 0.11
    flow = equation.mass_flow(
        discharge_coefficient=0.61,
        expansibility=1.0,
        diameter_ratio=0.75,
        inside_diameter=0.04,
        differential_pressure=drop,
        density=788.4,
    )
    assert flow / 788.4 == pytest.approx(0.00309, rel=0.02)


def test_sensitivities():
    """ISO 5167-1:2003, clause 8, β = 0.6 (from memory): 0.29779 for D, 2.29779 for d."""
    found = equation.diameter_sensitivity(diameter_ratio=0.6)
    assert found == pytest.approx(0.2977941176, rel=1e-9)
    assert equation.bore_sensitivity(diameter_ratio=0.6) == pytest.approx(2.297794118, rel=1e-9)


def test_combined_uncertainty():
    """Form of ISO 5167-1:2003, clause 8 (from memory): 0.5756 % for β = 0.6."""
    parts = np.array(
        [
            0.5,
            0.1,
            float(equation.diameter_sensitivity(diameter_ratio=0.6)) * 0.4,
            float(equation.bore_sensitivity(diameter_ratio=0.6)) * 0.07,
            0.5 * 0.25,
            0.5 * 0.25,
        ]
    )
    assert np.sqrt((parts**2).sum()) == pytest.approx(0.575596, rel=1e-5)


def _nozzle(ratio, exponent):
    return lambda drop: iso5167_3.expansibility(
        diameter_ratio=ratio, pressure_drop_ratio=drop, isentropic_exponent=exponent
    )


@given(
    drop=st.floats(1e-6, 0.3),
    ratio=st.floats(0.1, 0.8),
    exponent=st.floats(1.01, 1.7),
)
def test_differential_pressure_goes_round(drop, ratio, exponent):
    """Δp ε² solved for Δp gives Δp back, far towards choking."""
    epsilon = _nozzle(ratio, exponent)
    pressure = 3e5
    bare = np.array([drop * pressure * epsilon(drop) ** 2])
    found = equation.differential_pressure(
        incompressible=bare, pressure=np.array([pressure]), expansibility=epsilon
    )
    assert found[0] == pytest.approx(drop * pressure, rel=1e-9)


def test_choking_is_no_number():
    """A nozzle passes no more than at its critical pressure ratio: beyond it nothing is said."""
    epsilon = _nozzle(0.5, 1.3)
    drops = np.linspace(0.01, 0.9, 400)
    most = float(np.max(drops * epsilon(drops) ** 2))
    pressure = np.full(3, 1e5)
    bare = np.array([0.5 * most, 0.999 * most, 1.01 * most]) * 1e5
    found = equation.differential_pressure(
        incompressible=bare, pressure=pressure, expansibility=epsilon
    )
    assert np.isfinite(found[:2]).all()
    assert np.isnan(found[2])


@pytest.mark.parametrize("exponent", [1.01, 1.3, 1.67])
@pytest.mark.parametrize("ratio", [0.2, 0.5, 0.75])
@pytest.mark.parametrize("part", [iso5167_2, iso5167_3])
def test_a_step_that_is_not_tried_ends_within_the_tolerance(part, ratio, exponent):
    """Δp ε² goes round within 1e-12 up to 99.99 % of choking, lane by lane and all at once."""

    def epsilon(drop):
        return part.expansibility(
            diameter_ratio=ratio, pressure_drop_ratio=drop, isentropic_exponent=exponent
        )

    def solved(bare):
        return equation.differential_pressure(
            incompressible=bare, pressure=np.ones_like(bare), expansibility=epsilon
        )

    drops = np.linspace(1e-6, 0.999, 4000)
    bare = drops * epsilon(drops) ** 2
    most = float(np.max(bare))
    bare = np.concatenate([bare[: int(np.argmax(bare)) : 200], most * np.array([0.99, 0.9999])])
    alone = np.concatenate([solved(bare[[lane]]) for lane in range(bare.size)])
    for found in (solved(bare), alone):
        np.testing.assert_allclose(found * epsilon(found) ** 2, bare, rtol=1e-12)


def test_the_last_step_is_not_tried_to_be_sure():
    """ε of a Venturi nozzle, β = 0.5, κ = 1.3, Δp/p1 = 0.25: no try is as near as the answer."""
    tries = []

    def epsilon(ratio):
        tries.append(ratio[0])
        return iso5167_3.expansibility(
            diameter_ratio=0.5, pressure_drop_ratio=ratio, isentropic_exponent=1.3
        )

    bare = 0.25 * epsilon(np.array([0.25])) ** 2
    tries.clear()
    found = equation.differential_pressure(
        incompressible=bare, pressure=np.ones(1), expansibility=epsilon
    )
    assert found[0] == pytest.approx(0.25, rel=1e-13)
    assert 1e-12 < min(abs(tried / 0.25 - 1.0) for tried in tries) < 1e-6


@given(ratio=st.floats(0.05, 0.95))
def test_invariant_goes_round(ratio):
    invariant = ratio**2 / np.sqrt(1.0 - ratio**4)
    assert equation.ratio_of_invariant(invariant=invariant) == pytest.approx(ratio, rel=1e-12)


def test_fixed_point_without_solution_is_no_number():
    """x = x + 1 has none; x = cos x is 0.7390851 (Dottie's number)."""
    assert np.isnan(equation.fixed_point(lambda x: x + 1.0, np.array([1.0])))[0]
    assert equation.fixed_point(np.cos, np.array([0.5]))[0] == pytest.approx(0.7390851332151607)


def test_loss_ratio_and_coefficient_agree():
    """ϖ = K ρ v²/2 with Δp of the mass-flow equation: two forms of one loss."""
    ratio, coefficient = 0.6, 0.61
    drop = equation.incompressible_differential_pressure(
        mass_flow=10.0,
        discharge_coefficient=coefficient,
        diameter_ratio=ratio,
        inside_diameter=0.1,
        density=1000.0,
    )
    velocity = 10.0 / 1000.0 / (np.pi / 4 * 0.1**2)
    from_ratio = drop * equation.loss_ratio(discharge_coefficient=coefficient, diameter_ratio=ratio)
    from_coefficient = (
        equation.loss_coefficient(discharge_coefficient=coefficient, diameter_ratio=ratio)
        * 500.0
        * velocity**2
    )
    assert from_ratio == pytest.approx(from_coefficient, rel=1e-9)
