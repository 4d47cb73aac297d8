"""Rounding of ranges, current signal and pulse counting."""

import math

import pytest
from hypothesis import given
from hypothesis import strategies as st

from specsheet.methods import signal


@pytest.mark.parametrize(
    ("value", "rounded"),
    [(3.1, 4.0), (1.0, 1.0), (0.0101, 0.012), (96.0, 100.0), (101.0, 120.0), (4.0, 4.0), (8.1, 10)],
)
def test_round_up(value, rounded):
    assert signal.round_up(value=value) == pytest.approx(rounded)


@given(st.floats(1e-12, 1e12))
def test_round_up_is_not_below_and_not_far_above(value):
    found = signal.round_up(value=value)
    assert value * (1 - 1e-11) <= found <= value * 1.34
    assert signal.round_up(value=found) == pytest.approx(found, rel=1e-9)


@pytest.mark.parametrize("value", [0.0, -1.0, math.inf])
def test_round_up_hands_back_what_cannot_be_rounded(value):
    assert signal.round_up(value=value) == value


@given(st.floats(0.0, 1.2))
def test_current_round_trip(share):
    assert signal.fraction(current=signal.current(fraction=share)) == pytest.approx(
        share, abs=1e-12
    )


def test_counting_a_hundred_pulses():
    """100 pulses: half-width 1 %, rectangular, 0.577 % standard (JCGM 100:2008, 4.3.7)."""
    found = signal.counting_uncertainty(rate=10.0, time=10.0)
    assert found == pytest.approx(0.01 / 3**0.5)


@pytest.mark.parametrize("velocity", [0.5, -0.5])
def test_error_of_reading_and_zero(velocity):
    """0.5 % of reading and 1 mm/s at 0.5 m/s: 0.7 %; common practice, no source."""
    found = signal.velocity_error(reading_error=0.005, zero_velocity=0.001, velocity=velocity)
    assert found == pytest.approx(0.007)
