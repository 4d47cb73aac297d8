"""The vortex meter: response, sizing, limits and uncertainty."""

import time
import warnings

import bore_tools as tools
import numpy as np
import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from specsheet.fields import TERMS
from specsheet.findings import Level, Origin
from specsheet.meters.shared.limits import of_physics, of_profile, shortfall
from specsheet.meters.vortex import FAMILY


def water_request(flows=(2.0, 8.0, 20.0), **more):
    return tools.request("vortex", list(flows), tools.water(3), **more)


def steam_request(flows=(0.1, 0.5, 1.0), **more):
    return tools.request(
        "vortex", list(flows), tools.steam(3), phase="gas", diameter=0.1541, nominal=150, **more
    )


def test_frequency_of_a_rated_meter():
    """ISO/TR 12764: f = Sr v / d; 80 mm bore, 3 m/s, d = 21.6 mm, Sr = 0.27 gives 37.5 Hz."""
    area = np.pi / 4 * 0.08**2
    request = water_request([3.0 * area * 998.2] * 3, meter__size="DN 80")
    values = FAMILY.at(FAMILY.size(request), request.stream)
    assert values["meter_velocity"] == pytest.approx(3.0)
    assert values["frequency"] == pytest.approx(37.5, rel=1e-9)


def test_stated_k_factor_rules_the_frequency():
    factor = tools.quantity(2900.0, "pulse_factor", "1/m3")
    request = water_request(meter__size="DN 80", meter__k_factor=factor)
    element = FAMILY.size(request)
    assert element.values["k_factor"].origin is Origin.GIVEN
    assert element.values["strouhal_number"].origin is Origin.DERIVED
    values = FAMILY.at(element, request.stream)
    assert values["frequency"] == pytest.approx(2900.0 * request.stream.volume_flow, rel=1e-9)


def test_hot_meter_sheds_slower():
    """The K-factor falls by 3 α Δt = 0.79 % from 20 to 185 °C (common practice)."""
    request = steam_request(meter__size="DN 150")
    element = FAMILY.size(request)
    values = FAMILY.at(element, request.stream)
    ratio = values["frequency"] / (element.numbers["k_factor"] * request.stream.volume_flow)
    assert ratio == pytest.approx(1 - 3 * 16e-6 * 165.0, abs=1e-4)


def test_pressure_loss_of_water_at_one_metre_per_second():
    """Usual loss of 1.1 ρ v² (common practice): 1098 Pa for water at 1 m/s, no reducers."""
    area = np.pi / 4 * 0.1**2
    request = water_request([area * 998.2] * 3, meter__size="DN 100")
    values = FAMILY.at(FAMILY.size(request), request.stream)
    assert values["pressure_loss"] == pytest.approx(1.1 * 998.2, rel=1e-9)
    assert values["reducer_loss"] == pytest.approx(0.0)


def test_reducers_add_their_loss():
    request = water_request(meter__size="DN 50")
    element = FAMILY.size(request)
    values = FAMILY.at(element, request.stream)
    ratio = 0.05 / 0.1023
    sine = np.sin(np.radians(15.0))
    wanted = 0.8 * sine * (1 - ratio**2) + 2.6 * sine * (1 - ratio**2) ** 2
    assert values["reducer_loss"] == pytest.approx(
        wanted * values["dynamic_pressure"] / 2, rel=1e-4
    )
    assert any("reducer" in sentence for sentence in element.notes["element"])


def test_back_pressure_of_warm_water():
    """2.9 Δp + 1.3 pv; pv of water at 90 °C is 70.18 kPa (IAPWS)."""
    hot = tools.water(3, vapour_pressure=70183.0, temperature=363.15, pressure=3e5)
    request = tools.request("vortex", [2.0, 8.0, 20.0], hot, meter__size="DN 100")
    element = FAMILY.size(request)
    values = FAMILY.at(element, request.stream)
    wanted = 2.9 * values["pressure_loss"] + 1.3 * 70183.0
    assert values["minimum_back_pressure"] == pytest.approx(wanted)
    assert (values["back_pressure_margin"] > 0).all()
    low = tools.request(
        "vortex",
        [2.0, 8.0, 20.0],
        tools.water(3, vapour_pressure=70183.0, pressure=0.95e5),
        meter__size="DN 100",
    )
    assert (FAMILY.at(FAMILY.size(low), low.stream)["back_pressure_margin"] < 0).any()


def test_gas_has_mach_number_and_no_back_pressure():
    request = steam_request()
    values = FAMILY.at(FAMILY.size(request), request.stream)
    assert "minimum_back_pressure" not in values
    assert values["mach_number"] == pytest.approx(values["meter_velocity"] / 508.0)


def test_line_size_where_the_minimum_allows():
    element = FAMILY.size(water_request([4.0, 20.0, 40.0]))
    assert element.values["meter_size"].value == "DN 100"
    assert element.values["meter_size"].origin is Origin.DERIVED


def test_smaller_than_the_line_where_the_minimum_is_low():
    """0.8 kg/s of water: Re = 4 q / (π D μ) >= 20 000 asks for D <= 50.8 mm."""
    element = FAMILY.size(water_request([0.8, 2.0, 4.0]))
    assert element.values["meter_size"].value == "DN 50"
    assert any("DN 80 would break: " in text for text in element.notes["element"])
    assert any("Reynolds number, meter" in text for text in element.notes["element"])


def test_purchase_limit_of_loss_keeps_the_meter_large():
    """Thick water, 3 kg/s: Re >= 20 000 asks for DN 50, a loss below 50 mbar for more."""
    thick = tools.water(3, viscosity=3e-3)
    free = FAMILY.size(tools.request("vortex", [3.0, 6.0, 12.0], thick))
    bound = tools.quantity(5e3, "pressure_difference", "mbar", "50 mbar")
    held = FAMILY.size(
        tools.request("vortex", [3.0, 6.0, 12.0], thick, require__pressure_loss=bound)
    )
    assert free.values["meter_size"].value == "DN 50"
    assert held.numbers["bore"] > free.numbers["bore"]


def test_unlisted_and_oversized_meters_are_found():
    element = FAMILY.size(water_request(meter__size="DN 65"))
    assert [finding.code for finding in element.findings] == ["size-not-listed"]
    assert element.numbers["bore"] == 0.065
    element = FAMILY.size(water_request(meter__size="DN 200"))
    assert [finding.code for finding in element.findings] == ["meter-larger-than-line"]


def test_unreadable_size_is_a_stop():
    element = FAMILY.size(water_request(meter__size="big"))
    assert element.findings[0].level is Level.STOP
    assert element.findings[0].field == "meter.size"


def test_bore_stated_alone_is_rated():
    bore = tools.quantity(0.0779, "length", "mm", "77.9 mm")
    element = FAMILY.size(water_request(meter__bore=bore))
    assert element.values["meter_bore"].value == 0.0779
    assert element.values["meter_bore"].origin is Origin.GIVEN
    assert element.values["meter_size"].value == "DN 80"


@pytest.mark.parametrize(
    ("key", "flow", "fluid", "phase"),
    [  # one point just outside each usual limit, in a 100 mm bore: v = q / (ρ A)
        ("meter_velocity", 9.1 * 998.2 * 7.854e-3, tools.water(3), "liquid"),
        ("dynamic_pressure", 0.29 * 998.2 * 7.854e-3, tools.water(3), "liquid"),
        ("dynamic_pressure", 3.0 * 3.99 * 7.854e-3, tools.steam(3), "gas"),
        ("meter_velocity", 76.0 * 3.99 * 7.854e-3, tools.steam(3), "gas"),
        ("meter_reynolds_number", 0.5 * 998.2 * 7.854e-3, tools.water(3, viscosity=3e-3), "liquid"),
        ("mach_number", 70.0 * 3.99 * 7.854e-3, tools.steam(3, sound_speed=220.0), "gas"),
    ],
)
def test_each_limit_flips_when_crossed(key, flow, fluid, phase):
    request = tools.request("vortex", [flow] * 3, fluid, phase=phase, meter__size="DN 100")
    element = FAMILY.size(request)
    every = (*of_profile(request), *of_physics())
    of_key = [limit for limit in every if limit.key == key]
    factors = np.geomspace(0.2, 5.0, 41)
    held = []
    for factor in factors:
        values = FAMILY.at(element, request.stream.with_flow(request.stream.mass_flow * factor))
        held.append(all(shortfall(limit, values) == 0.0 for limit in of_key))
    assert not held[20]
    assert any(held)


def test_error_grows_below_the_linear_reynolds_number():
    request = water_request([0.2, 0.8, 8.0], meter__size="DN 100")
    values = FAMILY.at(FAMILY.size(request), request.stream)
    expected = 0.0075 * np.maximum(1.0, 20000.0 / values["meter_reynolds_number"])
    assert values["error_limit"] == pytest.approx(expected)
    assert values["error_limit"][2] == pytest.approx(0.0075)


def test_budget_leaves_the_density_out_for_volume_flows():
    request = steam_request()
    element = FAMILY.size(request)
    values = FAMILY.at(element, request.stream)
    keys = [item.key for item in FAMILY.budget(element, request.stream, values)]
    assert keys == ["meter_error", "counting", "current_output", "density"]
    by_volume = FAMILY.size(
        tools.with_flows(request, "volume_flow", "m3/s", request.stream.volume_flow)
    )
    keys = [item.key for item in FAMILY.budget(by_volume, request.stream, values)]
    assert "density" not in keys


def test_range_is_rounded_in_the_unit_of_the_user():
    request = tools.with_flows(water_request(), "mass_flow", "t/h", [2.0, 8.0, 20.0])
    element = FAMILY.size(request)
    assert element.values["upper_range_flow"].value == pytest.approx(80.0 / 3.6)
    assert any("80 t/h" in sentence for sentence in element.notes["output"])
    current = FAMILY.at(element, request.stream)["signal_current"]
    assert current[2] == pytest.approx(0.004 + 0.016 * 72.0 / 80.0)


def test_stated_range_below_the_largest_flow_is_found():
    span = tools.quantity(10.0, "mass_flow", "kg/s")
    element = FAMILY.size(water_request(meter__upper_range_value=span))
    assert "range-exceeded" in [finding.code for finding in element.findings]


def test_liquid_without_vapour_pressure_is_found():
    unknown = tools.request("vortex", [2.0, 8.0, 20.0], tools.water(3, vapour_pressure=np.nan))
    assert "vapour-pressure-missing" in {item.code for item in FAMILY.size(unknown).findings}
    assert "vapour-pressure-missing" not in {
        item.code for item in FAMILY.size(steam_request()).findings
    }


def test_bubbles_and_solids_are_found():
    some = tools.quantity(0.005, "ratio", "%")
    element = FAMILY.size(water_request(fluid__bubbles=some, fluid__abrasive=True))
    assert {"bubbles", "solids"} <= {finding.code for finding in element.findings}


@settings(deadline=None, max_examples=40)
@given(st.lists(st.floats(1e-3, 1e3), min_size=2, max_size=20, unique=True))
def test_signal_and_loss_rise_with_flow(flows):
    request = water_request(meter__size="DN 100")
    element = FAMILY.size(request)
    stream = tools.stream(sorted(flows), tools.water(len(flows)))
    values = FAMILY.at(element, stream)
    for key in ("frequency", "pressure_loss", "signal_current", "pulse_rate", "velocity"):
        assert (np.diff(values[key]) >= 0).all(), key
    back = values["frequency"] / element.numbers["k_factor"] * 998.2
    assert back == pytest.approx(stream.mass_flow, rel=1e-9)


@pytest.mark.parametrize("flow", [0.0, 1e-300, 1e300, np.inf, np.nan, -1.0])
@pytest.mark.parametrize("phase", ["liquid", "gas"])
def test_extreme_input_neither_raises_nor_warns(flow, phase):
    fluid = tools.water(3, density=1e-9, viscosity=1e-12, pressure=1.0, sound_speed=np.nan)
    good = water_request() if phase == "liquid" else steam_request()
    element = FAMILY.size(good)
    stream = tools.stream([flow] * 3, fluid)
    with warnings.catch_warnings():
        warnings.simplefilter("error")
        values = FAMILY.at(element, stream)
        FAMILY.budget(element, stream, values)
    assert all(value.shape == (3,) for value in values.values())


def test_every_key_is_in_the_glossary_and_derived():
    told = {item.key for item in FAMILY.derivations}
    for request in (water_request(), steam_request()):
        element = FAMILY.size(request)
        values = FAMILY.at(element, request.stream)
        assert set(values) <= set(TERMS)
        assert set(element.values) <= set(TERMS)
        assert set(values) <= told
    for item in FAMILY.derivations:
        assert set(item.inputs) <= set(TERMS), item.key


@pytest.mark.benchmark
def test_a_thousand_lanes_cost_little_more_than_one():
    request = water_request(meter__size="DN 100")
    element = FAMILY.size(request)

    def seconds(count):
        stream = tools.stream(np.linspace(1, 20, count), tools.water(count))
        start = time.perf_counter()
        for _ in range(200):
            FAMILY.at(element, stream)
        return time.perf_counter() - start

    seconds(1)
    assert seconds(1000) < 6 * seconds(1)
