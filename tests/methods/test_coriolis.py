"""Error of a Coriolis meter from base error and zero stability."""

import pytest
from hypothesis import given
from hypothesis import strategies as st

from specsheet.methods import coriolis


def test_sum_of_base_error_and_zero_stability():
    """0.1 % and 0.2 g/s at 1 kg/s: 0.12 % (form of ISO 10790, from memory)."""
    found = coriolis.error_sum(base_error=0.001, zero_stability=0.0002, mass_flow=1.0)
    assert 100 * found == pytest.approx(0.12, rel=1e-9)


@pytest.mark.parametrize(
    ("flow", "error"),
    [(1.0, 0.001), (0.2, 0.001), (0.1, 0.002), (0.02, 0.01)],
)
def test_larger_of_base_error_and_zero_stability(flow, error):
    """0.1 % or 0.2 g/s, whichever is more: equal at 0.2 kg/s (arithmetic)."""
    found = coriolis.error_larger(base_error=0.001, zero_stability=0.0002, mass_flow=flow)
    assert found == pytest.approx(error)


@given(st.floats(1e-4, 1e-2), st.floats(1e-9, 1.0), st.floats(1e-6, 1e4))
def test_forms_bound_each_other_and_meet_at_the_turndown(base, zero, flow):
    larger = coriolis.error_larger(base_error=base, zero_stability=zero, mass_flow=flow)
    total = coriolis.error_sum(base_error=base, zero_stability=zero, mass_flow=flow)
    assert larger <= total <= 2 * larger * (1 + 1e-12)
    edge = coriolis.turndown_flow(base_error=base, zero_stability=zero)
    assert zero / edge == pytest.approx(base)
