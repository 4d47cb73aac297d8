"""Induced voltage of an electromagnetic meter."""

import pytest
from hypothesis import given
from hypothesis import strategies as st

from specsheet.methods import electromagnetic


def test_induced_voltage():
    """U = k B D v, ISO 20456: 10 mT, 100 mm, 1 m/s gives 1 mV."""
    found = electromagnetic.induced_voltage(flux_density=0.01, diameter=0.1, velocity=1.0)
    assert found == pytest.approx(0.001, rel=1e-9)


@given(st.floats(1e-3, 0.1), st.floats(0.005, 3.0), st.floats(0.01, 15.0), st.floats(0.5, 1.5))
def test_voltage_and_velocity_round_trip(flux, bore, speed, weight):
    voltage = electromagnetic.induced_voltage(
        flux_density=flux, diameter=bore, velocity=speed, weight_factor=weight
    )
    back = electromagnetic.velocity(
        voltage=voltage, flux_density=flux, diameter=bore, weight_factor=weight
    )
    assert back == pytest.approx(speed, rel=1e-12)
