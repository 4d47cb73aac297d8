"""Loss, slip and smallest flow of meters that turn."""

import numpy as np
import pytest

from specsheet.methods import turning


def test_loss_scales_with_density_and_the_square_of_the_flow():
    """The usual scaling of turbine meters: Δp = Δp0 (ρ/ρ0) (q/q0)²; common practice."""
    base = {"viscosity": 1e-3, "bore": 0.1, "inertial": 1.0}
    one = turning.pressure_loss(density=1000.0, velocity=2.0, **base)
    assert one == pytest.approx(2000.0)
    assert turning.pressure_loss(density=800.0, velocity=4.0, **base) == pytest.approx(
        one * 0.8 * 4
    )


def test_drag_of_thick_liquid_is_in_proportion_to_viscosity_and_flow():
    base = {"density": 0.0, "bore": 0.05, "inertial": 15.0, "viscous": 12500.0}
    one = turning.pressure_loss(viscosity=0.1, velocity=2.0, **base)
    assert one == pytest.approx(50000.0)
    assert turning.pressure_loss(viscosity=0.2, velocity=1.0, **base) == pytest.approx(one)


def test_slip_falls_with_viscosity():
    base = {"coefficient": 6.5e-9, "loss": 3e4, "velocity": 2.0, "bore": 0.05}
    thin = turning.slip(viscosity=1e-3, **base)
    assert thin == pytest.approx(0.004875)
    assert turning.slip(viscosity=1e-2, **base) == pytest.approx(thin / 10)


def test_dense_gas_turns_the_rotor_at_a_smaller_flow():
    """Four times the density, half the smallest flow: torque goes with ρ q² (ISO 9951)."""
    found = turning.lowest_flow_gas(
        lowest_flow=0.01, density=np.array([1.2, 4.8]), reference_density=1.2
    )
    assert found == pytest.approx([0.01, 0.005])


def test_thick_liquid_shortens_the_linear_range():
    """Linear above a Reynolds number, so in proportion to viscosity once that matters."""
    found = turning.lowest_flow_liquid(
        lowest_flow=0.01, viscosity=np.array([1e-6, 5e-6, 2e-5]), onset=5e-6
    )
    assert found == pytest.approx([0.01, 0.01, 0.04])


def test_register():
    """10^8 steps of 10 L at 100 m3/h: 10 000 h."""
    found = turning.time_to_roll_over(register=1e8 * 0.01, volume_flow=100.0 / 3600.0)
    assert found / 3600.0 == pytest.approx(10000.0)
