"""Frequency and K-factor of a vortex meter."""

import pytest
from hypothesis import given
from hypothesis import strategies as st

from specsheet.methods import vortex


def test_frequency():
    """f = Sr v / d, ISO/TR 12764: 0.27 x 3 m/s / 21.6 mm = 37.5 Hz."""
    found = vortex.frequency(strouhal_number=0.27, velocity=3.0, bluff_width=0.0216)
    assert found == pytest.approx(37.5, rel=1e-9)


@given(st.floats(0.1, 0.4), st.floats(1e-3, 0.1), st.floats(5e-3, 0.5), st.floats(0.1, 100))
def test_k_factor_is_frequency_by_flow(strouhal, width, bore, speed):
    flow = speed * 3.141592653589793 / 4 * bore**2
    factor = vortex.k_factor(strouhal_number=strouhal, bluff_width=width, bore=bore)
    frequency = vortex.frequency(strouhal_number=strouhal, velocity=speed, bluff_width=width)
    assert factor * flow == pytest.approx(frequency, rel=1e-9)
    back = vortex.strouhal_number(k_factor=factor, bluff_width=width, bore=bore)
    assert back == pytest.approx(strouhal, rel=1e-12)


def test_k_factor_falls_by_half_a_per_cent_per_hundred_kelvin():
    """3 x 16e-6 x 100 K = 0.48 %; the growth of austenitic steel, common practice."""
    found = vortex.k_factor_hot(k_factor=1.0, expansion=16e-6, temperature_rise=100.0)
    assert found == pytest.approx(1 - 0.0048, abs=2e-5)
    assert vortex.k_factor_hot(k_factor=3.0, expansion=16e-6, temperature_rise=0.0) == 3.0
