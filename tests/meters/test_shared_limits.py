"""By how much a limit is broken: the logarithm of value by bound at the worst point."""

import bore_tools as tools
import numpy as np
import pytest

from specsheet.findings import Level, Limit
from specsheet.meters.shared.limits import beside_own, of_profile, shortfall

NAN, INF = np.nan, np.inf


def limit(low, high, phase=""):
    return Limit("velocity", low, high, Level.CAUTION, "code", "message", "source", phase)


@pytest.mark.parametrize(
    ("low", "high", "values", "wanted"),
    [
        (1.0, 10.0, [1.0, 5.0, 10.0], 0.0),  # a value on its bound holds
        (1.0, 10.0, [0.5, 5.0, 10.0], np.log(2.0)),
        (1.0, 10.0, [0.5, 5.0, 40.0], np.log(4.0)),  # the worst of both sides
        (None, 10.0, [0.1, 20.0], np.log(2.0)),
        (1.0, None, [0.1, 20.0], np.log(10.0)),
        (0.0, None, [-3.0, 1.0], 1.0),  # nothing has no logarithm: one
        (None, 0.0, [-3.0, 1.0], 1.0),
        (-2.0, 2.0, [-4.0, 1.0], np.log(2.0)),
        (1.0, None, [-1.0], 20.0),  # no logarithm of the value: hopeless
        (1.0, None, [0.0], 20.0),
        (None, 1.0, [INF], 20.0),
        (1e-30, None, [1e-300], 20.0),
        (1.0, 10.0, [NAN, NAN], 0.0),  # not known: breaks nothing
        (1.0, 10.0, [NAN, 20.0], np.log(2.0)),
    ],
)
def test_shortfall(low, high, values, wanted):
    found = shortfall(limit(low, high), {"velocity": np.array(values)})
    assert found == pytest.approx(wanted, rel=1e-12)


def test_a_value_that_is_not_put_out_breaks_nothing():
    assert shortfall(limit(1.0, 2.0), {"load": np.array([9.0])}) == 0.0


@pytest.mark.parametrize(("phase", "physics"), [("liquid", "cavitation"), ("gas", "mach-number")])
def test_limits_beside_those_of_the_family_are_of_the_phase(phase, physics):
    """Profile, purchase and physics; what holds for the other phase is left out."""
    loss = tools.quantity(2e4, "pressure_difference", "Pa")
    request = tools.request(
        "vortex", [1.0, 2.0, 3.0], tools.water(3), phase=phase, require__pressure_loss=loss
    )
    found = beside_own(request)
    assert {item.phase for item in found} <= {"", phase}
    codes = [item.code for item in found]
    assert [code for code in codes if code.startswith(physics)]
    assert "pressure-loss-demanded" in codes
    assert set(of_profile(request)) <= set(found)
