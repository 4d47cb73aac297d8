"""The Coriolis meter: error, loss with viscosity, size, gas limits and output."""

import warnings

import bore_tools as tools
import fluids
import numpy as np
import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from specsheet.fields import TERMS
from specsheet.findings import Origin
from specsheet.line.straight import straight
from specsheet.meters.coriolis import FAMILY
from specsheet.meters.shared.limits import of_physics, of_profile, shortfall

#: a meter of known figures: two tubes of 25 mm, effective length 2.5 m
STATED = {
    "meter__size": "DN 50",
    "meter__tube_bore": tools.quantity(0.025, "length", "mm"),
    "meter__zero_stability": tools.quantity(0.0002, "mass_flow", "kg/s"),
    "meter__base_error": tools.quantity(0.001, "ratio", "%"),
}


def liquid(flows=(0.1, 1.0, 5.0), fluid=None, **more):
    return tools.request(
        "coriolis", list(flows), fluid or tools.water(3), diameter=0.0525, nominal=50, **more
    )


def gas(flows=(0.05, 0.1, 0.2), fluid=None, **more):
    return tools.request(
        "coriolis",
        list(flows),
        fluid or tools.steam(3),
        phase="gas",
        diameter=0.1023,
        nominal=100,
        **more,
    )


def codes(element):
    return {finding.code for finding in element.findings}


def test_error_at_each_point_is_the_larger_of_both():
    """0.1 % or 0.2 g/s: 0.2 % at 0.1 kg/s, 0.1 % at 1 and 5 kg/s (ISO 10790, from memory)."""
    request = liquid(**STATED)
    values = FAMILY.at(FAMILY.size(request), request.stream)
    assert values["error_limit"] == pytest.approx([0.002, 0.001, 0.001])


def test_error_as_a_sum_where_so_stated():
    """0.1 % and 0.2 g/s at 1 kg/s: 0.12 % (ISO 10790, from memory)."""
    request = liquid(**STATED, meter__error_form="sum")
    values = FAMILY.at(FAMILY.size(request), request.stream)
    assert values["error_limit"][1] == pytest.approx(0.0012)


@pytest.mark.parametrize("viscosity", [3e-4, 1e-3, 0.2, 1.0])
def test_loss_of_the_tubes(viscosity):
    """Darcy-Weisbach with a general library's friction factor; 1.5 heads for the split."""
    request = liquid([4.0] * 3, tools.water(3, viscosity=viscosity), **STATED)
    values = FAMILY.at(FAMILY.size(request), request.stream)
    speed = 4.0 / 998.2 / (2 * np.pi / 4 * 0.025**2)
    reynolds = 998.2 * speed * 0.025 / viscosity
    factor = fluids.friction.friction_factor(
        reynolds, 1.5e-6 / 0.025, Method="Colebrook" if reynolds > 4000 else None
    )
    wanted = (factor * 2.5 / 0.025 + 1.5) * 998.2 * speed**2 / 2
    assert values["meter_velocity"] == pytest.approx(speed)
    assert values["pressure_loss"] == pytest.approx(wanted, rel=1e-5)


def test_laminar_loss_is_in_proportion_to_viscosity():
    """Hagen-Poiseuille: with the split left out, twice the viscosity, twice the loss."""
    losses = []
    for viscosity in (1.0, 2.0):
        request = liquid([1.0] * 3, tools.water(3, viscosity=viscosity), **STATED)
        values = FAMILY.at(FAMILY.size(request), request.stream)
        losses.append(values["pressure_loss"] - 1.5 * values["dynamic_pressure"] / 2)
    assert losses[1] == pytest.approx(2 * losses[0], rel=1e-9)


def test_stated_figures_are_given_and_others_typical():
    values = FAMILY.size(liquid(**STATED)).values
    assert values["zero_stability"].origin is Origin.GIVEN
    assert values["nominal_flow"].origin is Origin.TYPICAL
    assert values["nominal_flow"].source


def test_line_size_where_zero_stability_allows():
    assert FAMILY.size(liquid([1.0, 3.0, 6.0])).values["meter_size"].value == "DN 50"


def test_smaller_meter_where_the_zero_stability_outweighs():
    """Zero stability 0.005 % of nominal flow: base error 0.1 % holds down to 1/20 of it."""
    element = FAMILY.size(liquid([0.06, 0.3, 0.6]))
    assert element.values["meter_size"].value == "DN 25"
    assert any(
        "DN 40 would break: expected meter error" in text for text in element.notes["element"]
    )


def test_demanded_loss_outweighs_the_note_on_zero_stability():
    bound = tools.quantity(2e3, "pressure_difference", "mbar")
    element = FAMILY.size(liquid([0.06, 0.3, 0.6], require__pressure_loss=bound))
    assert element.numbers["connection"] > 0.025


@pytest.mark.parametrize(("mach", "stop", "caution"), [(0.29, 0, 0), (0.31, 0, 1), (0.51, 1, 1)])
def test_sonic_limits_of_gas(mach, stop, caution):
    """Mach 0.3 caution, 0.5 stop, in the tubes; common practice, no source."""
    area = 2 * np.pi / 4 * 0.05**2 * (1 + 16e-6 * 165.0) ** 2
    flow = mach * 508.0 * area * 3.99
    request = gas([flow] * 3, meter__size="DN 100")
    values = FAMILY.at(FAMILY.size(request), request.stream)
    assert values["mach_number"] == pytest.approx(mach, rel=1e-9)
    every = (*of_profile(request), *of_physics())
    of_mach = [item for item in every if item.key == "mach_number"]
    broken = [
        item.level
        for item in of_mach
        if item.phase in ("", request.tag.phase) and shortfall(item, values) > 0
    ]
    assert (broken.count("stop"), broken.count("caution")) == (stop, caution)


def test_flashing_behind_the_tubes():
    """1.25 pv; pv of water at 90 °C is 70.18 kPa (IAPWS)."""
    for pressure, holds in ((3e5, True), (0.9e5, False)):
        hot = tools.water(3, vapour_pressure=70183.0, temperature=363.15, pressure=pressure)
        request = liquid([1.0, 2.0, 4.0], hot, **STATED)
        values = FAMILY.at(FAMILY.size(request), request.stream)
        assert values["minimum_back_pressure"] == pytest.approx(1.25 * 70183.0)
        assert bool((values["back_pressure_margin"] > 0).all()) is holds


def test_density_counts_for_volume_flows_only():
    request = liquid(**STATED)
    element = FAMILY.size(request)
    values = FAMILY.at(element, request.stream)
    keys = [part.key for part in FAMILY.budget(element, request.stream, values)]
    assert keys == ["meter_error", "pressure_effect", "current_output"]
    volumes = tools.with_flows(request, "volume_flow", "m3/s", request.stream.volume_flow)
    element = FAMILY.size(volumes)
    parts = {part.key: part for part in FAMILY.budget(element, volumes.stream, values)}
    assert parts["density"].relative == pytest.approx(1.0 / 998.2 / 3**0.5)


def test_pressure_effect():
    """0.001 % by bar over 2 bar(a): 0.048 % at 50 bar(a), rectangular."""
    request = liquid(fluid=tools.water(3, pressure=50e5), **STATED)
    element = FAMILY.size(request)
    values = FAMILY.at(element, request.stream)
    parts = {part.key: part for part in FAMILY.budget(element, request.stream, values)}
    assert parts["pressure_effect"].relative == pytest.approx(0.00048 / 3**0.5)


@pytest.mark.parametrize(
    ("more", "metal"),
    [
        ({}, "stainless steel 316L"),
        ({"fluid__hazards": ("corrosive",)}, "nickel alloy C-22"),
        ({"meter__tube_material": "titanium"}, "titanium"),
    ],
)
def test_tube_material(more, metal):
    assert FAMILY.size(liquid(**more)).values["tube_material"].value == metal


def test_no_straight_lengths_are_asked_for():
    request = liquid()
    found = straight(request.tag, request.profile, None, pipe_diameter=0.05)
    assert found.findings == ()
    assert found.values["upstream_length"].value == 0.0


def test_bubbles_and_toxic_fluid():
    some = tools.quantity(0.01, "ratio", "%")
    element = FAMILY.size(liquid(fluid__bubbles=some, fluid__hazards=("toxic",)))
    assert {"bubbles", "containment"} <= codes(element)


def test_orientation_follows_the_phase():
    assert "below" in FAMILY.size(liquid()).notes["installation"][0]
    assert "above" in FAMILY.size(gas()).notes["installation"][0]


def test_pulses_count_mass():
    """Range 6 kg/s, at most 10 Hz: one pulse for 1 kg, 5 Hz at 5 kg/s."""
    request = liquid(**STATED)
    element = FAMILY.size(request)
    assert element.values["pulse_mass"].value == pytest.approx(1.0)
    assert FAMILY.at(element, request.stream)["pulse_rate"][2] == pytest.approx(5.0)


@settings(deadline=None, max_examples=40)
@given(st.lists(st.floats(1e-4, 1e3), min_size=2, max_size=20, unique=True))
def test_signal_and_loss_rise_with_flow(flows):
    element = FAMILY.size(liquid(**STATED))
    stream = tools.stream(sorted(flows), tools.water(len(flows)))
    values = FAMILY.at(element, stream)
    for key in ("signal_current", "pressure_loss", "meter_velocity", "pulse_rate"):
        assert (np.diff(values[key]) >= 0).all(), key
    assert (np.diff(values["error_limit"]) <= 0).all()
    share = (values["signal_current"] - 0.004) / 0.016
    back = share * element.numbers["upper_range_mass"]
    assert back == pytest.approx(stream.mass_flow, rel=1e-6)


@pytest.mark.parametrize("flow", [0.0, 1e-300, 1e300, np.inf, np.nan, -1.0])
@pytest.mark.parametrize("make", [liquid, gas])
def test_extreme_input_neither_raises_nor_warns(flow, make):
    element = FAMILY.size(make())
    stream = tools.stream([flow] * 3, tools.water(3, density=1e-9, viscosity=1e-12, pressure=1.0))
    with warnings.catch_warnings():
        warnings.simplefilter("error")
        values = FAMILY.at(element, stream)
        FAMILY.budget(element, stream, values)
    assert all(value.shape == (3,) for value in values.values())


def test_every_key_is_in_the_glossary_and_derived():
    told = {item.key for item in FAMILY.derivations}
    for request in (liquid(), gas()):
        element = FAMILY.size(request)
        values = FAMILY.at(element, request.stream)
        assert set(values) <= set(TERMS) & told
        assert set(element.values) <= set(TERMS)
    for item in FAMILY.derivations:
        assert set(item.inputs) <= set(TERMS), item.key
