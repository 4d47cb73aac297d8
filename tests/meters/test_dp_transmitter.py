"""The transmitter of a differential-pressure meter: legs, error, a second one, the cut-off."""

import dp_tools as tools
import numpy as np
import pytest

from specsheet.meters import registry
from specsheet.meters.dp import transmitter


def water(key, **given):
    flows = given.pop("flows", [5.0, 12.0, 20.0])
    return tools.request(key, flows, tools.water(3), **given)


@pytest.mark.parametrize(("way", "sign"), [("vertical up", -1.0), ("vertical down", 1.0)])
def test_head_of_the_legs(way, sign):
    """Water in the legs of a line with oil-free glycol of 1065 kg/m3: (ρ - ρleg) g Δz."""
    request = water(
        "orifice_concentric",
        line__orientation=way,
        leg_fluid="glycol and water",
        tapping_distance="2000 mm",
    )
    element = registry.family("orifice_concentric").size(request)
    wanted = sign * (1065.0 - 998.2) * 9.80665 * 2.0
    assert element.values["calibrated_range_low"].value == pytest.approx(wanted)
    span = element.values["differential_pressure_range"].value
    assert element.values["calibrated_range_high"].value == pytest.approx(span + wanted)


def test_transmitter_error_grows_as_the_flow_falls():
    """Half of a/√3 at full range; a tenth of the flow makes it a hundredfold (JCGM 100, 4.3.7)."""
    numbers = {"range": 1e4, "transmitter_accuracy": 0.00075}
    (part,) = transmitter.contributions(numbers, {}, np.array([1e4, 1e2]))
    np.testing.assert_allclose(part.relative, 0.5 * 0.00075 / np.sqrt(3) * np.array([1, 100]))


def test_second_transmitter_takes_over_below_its_range():
    numbers = {"range": 1e4, "second_range": 1e3, "transmitter_accuracy": 0.00075}
    (part,) = transmitter.contributions(numbers, {}, np.array([9e3, 5e2]))
    np.testing.assert_allclose(
        part.relative, 0.5 * 0.00075 / np.sqrt(3) * np.array([1e4 / 9e3, 1e3 / 5e2])
    )


def test_second_transmitter_is_proposed_where_one_does_not_reach():
    request = water("orifice_concentric", flows=[1.0, 12.0, 20.0])
    codes = [item.code for item in registry.family("orifice_concentric").size(request).findings]
    assert "second-transmitter" in codes
    stacked = water("orifice_concentric", flows=[1.0, 12.0, 20.0], second_range="propose")
    element = registry.family("orifice_concentric").size(stacked)
    span = element.values["differential_pressure_range"].value
    assert 0.0 < element.values["second_range"].value < span


def test_cut_off_rests_at_four_milliampere():
    request = water("orifice_concentric", low_cut_off="10 %")
    family = registry.family("orifice_concentric")
    element = family.size(request)
    top = element.values["upper_range_flow"].value
    stream = request.stream.with_flow(np.array([0.05, 0.15, 1.0]) * top)
    currents = family.at(element, stream)["signal_current_root"]
    assert currents[0] == pytest.approx(0.004)
    assert currents[1] == pytest.approx(0.004 + 0.016 * 0.15, rel=5e-3)
    assert currents[2] == pytest.approx(0.020)


def test_second_transmitter_must_reach_lower():
    request = water(
        "orifice_concentric", differential_pressure_range="160 mbar", second_range="250 mbar"
    )
    element = registry.family("orifice_concentric").size(request)
    assert "second-transmitter-useless" in [item.code for item in element.findings]
    assert "second_range" not in element.values
