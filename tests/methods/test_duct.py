"""Velocity, Reynolds number and friction in round ducts."""

import fluids
import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

from specsheet.methods import duct


@pytest.mark.parametrize(
    ("reynolds", "roughness", "factor"),
    [  # solutions of the Colebrook-White equation, Moody chart; from memory
        (1e4, 0.0, 0.030883),
        (1e5, 0.0, 0.01799),
        (1e5, 0.001, 0.022175),
        (1e6, 0.0001, 0.013441),
    ],
)
def test_colebrook_white(reynolds, roughness, factor):
    found = duct.friction_factor(reynolds_number=reynolds, relative_roughness=roughness)
    assert found == pytest.approx(factor, rel=1e-4)


@pytest.mark.parametrize("reynolds", [5e3, 3e4, 2e5, 8e6])
@pytest.mark.parametrize("roughness", [0.0, 1e-5, 1e-3, 2e-2])
def test_friction_factor_agrees_with_general_library(reynolds, roughness):
    wanted = fluids.friction.Colebrook(reynolds, roughness)
    found = duct.friction_factor(reynolds_number=reynolds, relative_roughness=roughness)
    assert found == pytest.approx(wanted, rel=1e-6)


def test_laminar_loss_of_textbook_example():
    """Çengel and Cimbala, example 8-2 (from memory): Re = 1777, f = 0.0360, 43.7 kPa."""
    re = duct.reynolds_number(density=1000.0, velocity=0.9, diameter=0.003, viscosity=0.001519)
    factor = duct.friction_factor(reynolds_number=re)
    loss = duct.friction_loss(
        factor=factor, length=9.0, diameter=0.003, density=1000.0, velocity=0.9
    )
    assert re == pytest.approx(1777, rel=1e-3)
    assert factor == pytest.approx(0.0360, rel=2e-3)
    assert loss == pytest.approx(43700.0, rel=2e-3)


def test_turbulent_factor_of_textbook_example():
    """Çengel and Cimbala, example 8-3 (from memory): Re = 134 300, f = 0.0172."""
    speed = duct.velocity(volume_flow=0.006, diameter=0.05)
    re = duct.reynolds_number(density=999.0, velocity=speed, diameter=0.05, viscosity=0.001138)
    assert re == pytest.approx(134300, rel=6e-3)
    factor = duct.friction_factor(reynolds_number=re, relative_roughness=2e-6 / 0.05)
    assert factor == pytest.approx(0.0172, rel=6e-3)


@pytest.mark.parametrize("limit", [duct.LAMINAR, duct.TURBULENT])
def test_friction_factor_has_no_jump(limit):
    ends = duct.friction_factor(reynolds_number=np.array([limit * (1 - 1e-9), limit * (1 + 1e-9)]))
    assert ends[0] == pytest.approx(ends[1], rel=1e-6)


@given(st.floats(1e-6, 1e3), st.floats(1e-3, 5.0))
def test_velocity_and_area_return_the_flow(flow, diameter):
    speed = duct.velocity(volume_flow=flow, diameter=diameter)
    assert speed * duct.area(diameter=diameter) == pytest.approx(flow, rel=1e-12)
