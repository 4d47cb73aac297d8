"""What every differential-pressure family owes: round trips, monotony, limits, speed, terms."""

import time
import warnings

import dp_tools as tools
import numpy as np
import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from specsheet.fields import TERMS
from specsheet.findings import Level, Origin
from specsheet.meters import registry
from specsheet.meters.dp import transmitter
from specsheet.meters.dp.response import flow_from, lanes_of, pressure_of, ratio_for, respond
from specsheet.meters.family import Stream

FAMILIES = [
    "orifice_concentric",
    "venturi_tube",
    "orifice_eccentric",
    "orifice_segmental",
    "orifice_quarter_circle",
    "orifice_conical_entrance",
    "nozzle_isa_1932",
    "nozzle_long_radius",
    "nozzle_venturi",
    "dall_tube",
    "cone",
    "wedge",
]


def device_of(key):
    """Return the device behind a family."""
    return registry.family(key).at.args[0]


def water(key, **given):
    flows = given.pop("flows", [5.0, 12.0, 20.0])
    return tools.request(key, flows, tools.water(3), **given)


def steam(key, **given):
    flows = given.pop("flows", [0.3, 0.86, 1.0])
    return tools.request(
        key, flows, tools.steam(3), phase="gas", diameter=0.1541, nominal=150, **given
    )


@pytest.mark.parametrize("key", FAMILIES)
@pytest.mark.parametrize("make", [water, steam])
def test_signal_goes_back_to_flow(key, make):
    """flow -> Δp -> flow within 1e-9, at every operating point."""
    request = make(key)
    device, element = device_of(key), registry.family(key).size(request)
    values = respond(device, element, request.stream)
    start = request.stream.with_flow(request.stream.mass_flow * 1.3)
    back = flow_from(device, element, start, values["differential_pressure"])
    np.testing.assert_allclose(back, request.stream.mass_flow, rtol=1e-9)


@pytest.mark.parametrize("key", FAMILIES)
def test_liquid_and_gas_side_by_side_answer_as_alone(key):
    """One call with lanes of both: each as in a call of its own, with ε = 1 in the liquid."""
    device = device_of(key)
    element = registry.family(key).size(steam(key))
    wet, dry = water(key).stream, steam(key).stream
    columns = (
        np.concatenate([getattr(wet, name), getattr(dry, name)])
        for name in Stream.__dataclass_fields__
    )
    both = respond(device, element, Stream(*columns))
    assert both["expansibility"][:3] == pytest.approx(1.0, abs=0.0)
    for name in ("differential_pressure", "expansibility"):
        alone = [respond(device, element, stream)[name] for stream in (wet, dry)]
        np.testing.assert_allclose(both[name], np.concatenate(alone), rtol=1e-12)


@pytest.mark.parametrize("key", FAMILIES)
@pytest.mark.parametrize("make", [water, steam])
def test_sizing_asks_for_the_pressure_of_the_response(key, make):
    request = make(key)
    device, element = device_of(key), registry.family(key).size(request)
    asked = pressure_of(device, element, request.stream)
    told = respond(device, element, request.stream)["differential_pressure"]
    np.testing.assert_array_equal(asked, told)


@pytest.mark.parametrize("key", FAMILIES)
@pytest.mark.parametrize("make", [water, steam])
def test_signal_and_flow_go_back_to_the_bore(key, make):
    """flow -> Δp -> β within 1e-9."""
    request = make(key)
    device, element = device_of(key), registry.family(key).size(request)
    stream = request.stream
    values = respond(device, element, stream)
    guess = lanes_of(device, element, stream).with_ratio(np.full(3, 0.5))
    found = ratio_for(device, guess, stream, values["differential_pressure"])
    np.testing.assert_allclose(found, values["diameter_ratio"], rtol=1e-9)


@settings(max_examples=40, deadline=None)
@given(
    reynolds=st.floats(2e4, 5e6),
    ratio=st.floats(0.2, 0.75),
    inside=st.floats(0.06, 0.6),
    exponent=st.one_of(st.just(np.nan), st.floats(1.05, 1.67)),
)
@pytest.mark.parametrize("key", FAMILIES)
def test_round_trip_through_every_unknown(key, reynolds, ratio, inside, exponent):
    """flow -> Δp -> bore -> flow, wherever the state can be."""
    request = water(key)
    device, element = device_of(key), registry.family(key).size(request)
    dimension = float(device.shape.share(np.array([ratio]))[0]) * inside
    element = tools.without_errors(element, size=dimension, inside_diameter=inside)
    flow = reynolds * np.pi * 1.002e-3 * inside / 4.0
    stream = tools.stream([flow], tools.water(1, isentropic_exponent=exponent, pressure=40e5))
    values = respond(device, element, stream)
    drop = values["differential_pressure"]
    if not np.isfinite(drop[0]) or drop[0] > 0.25 * 40e5:
        return
    guess = lanes_of(device, element, stream).with_ratio(np.array([0.5]))
    beta = ratio_for(device, guess, stream, drop)
    np.testing.assert_allclose(beta, values["diameter_ratio"], rtol=1e-9)
    start = stream.with_flow(stream.mass_flow * 0.8)
    np.testing.assert_allclose(flow_from(device, element, start, drop), flow, rtol=1e-9)


@pytest.mark.parametrize("key", FAMILIES)
@pytest.mark.parametrize("make", [water, steam])
def test_signal_and_loss_rise_with_flow(key, make):
    request = make(key)
    family = registry.family(key)
    element = family.size(request)
    sweep = tools.alone(request.stream, 1, 200).with_flow(
        np.geomspace(0.02, 1.5, 200) * request.stream.mass_flow[2]
    )
    values = family.at(element, sweep)
    for name in (family.signal, "pressure_loss", "signal_fraction", "signal_current"):
        rising = values[name][np.isfinite(values[name])]
        assert rising.size > 150
        assert (np.diff(rising) > 0.0).all(), name


@pytest.mark.parametrize("key", FAMILIES)
@pytest.mark.parametrize("make", [water, steam])
def test_stated_range_is_met_by_the_sized_bore(key, make):
    """The bore is rounded up to 0.01 mm: Δp at the largest flow ends just below the range."""
    request = make(key, differential_pressure_range="160 mbar")
    family = registry.family(key)
    element = family.size(request)
    assert element.values["differential_pressure_range"].origin is Origin.GIVEN
    fraction = family.at(element, request.stream)["signal_fraction"][2]
    assert 0.985 < fraction <= 1.0


@pytest.mark.parametrize("key", FAMILIES)
@pytest.mark.parametrize("make", [water, steam])
def test_free_range_is_a_preferred_one(key, make):
    request = make(key)
    element = registry.family(key).size(request)
    chosen = element.values["differential_pressure_range"]
    assert chosen.origin is Origin.DERIVED
    assert np.isclose(transmitter.SERIES, chosen.value, rtol=1e-9).any()
    assert not [finding for finding in element.findings if finding.level is Level.STOP]


@pytest.mark.parametrize("key", FAMILIES)
def test_given_element_is_rated(key):
    """A bore from one sizing, given back, finds the same range again."""
    request = water(key)
    family, device = registry.family(key), device_of(key)
    sized = family.size(request)
    machined = sized.values[device.shape.term].value
    text = {device.shape.entry: f"{machined * 1e3:.6f} mm"}
    rated = family.size(water(key, **text))
    assert rated.values[device.shape.term].origin is Origin.GIVEN
    same = rated.values["differential_pressure_range"].value
    assert same == pytest.approx(sized.values["differential_pressure_range"].value)


@pytest.mark.parametrize("key", FAMILIES)
@pytest.mark.parametrize("make", [water, steam])
def test_everything_put_out_is_a_term_and_explained(key, make):
    request = make(key)
    family = registry.family(key)
    element = family.size(request)
    values = family.at(element, request.stream)
    assert {*values, *element.values} <= TERMS.keys()
    explained = {item.key for item in family.derivations}
    derived = {name for name, given in element.values.items() if given.origin is Origin.DERIVED}
    assert set(values) - explained == set()
    assert derived - explained == set()
    for item in family.derivations:
        assert set(item.inputs) <= TERMS.keys(), item
    for name, array in values.items():
        assert array.shape == (3,), name


@pytest.mark.parametrize("key", FAMILIES)
@pytest.mark.parametrize("make", [water, steam])
def test_budget_is_finite_and_named(key, make):
    request = make(key)
    family = registry.family(key)
    element = family.size(request)
    parts = family.budget(element, request.stream, family.at(element, request.stream))
    names = [part.key for part in parts]
    assert len(set(names)) == len(names)
    assert "discharge_coefficient" in names
    assert "transmitter_accuracy" in names
    for part in parts:
        assert part.relative.shape == (3,)
        assert np.isfinite(part.relative).all()
        assert part.source


@pytest.mark.parametrize("key", FAMILIES)
def test_impossible_flows_give_no_number_and_no_warning(key):
    request = steam(key)
    family = registry.family(key)
    element = family.size(request)
    wild = tools.alone(request.stream, 1, 4).with_flow(np.array([0.0, 1e-9, 50.0, 1e6]))
    with warnings.catch_warnings():
        warnings.simplefilter("error")
        values = family.at(element, wild)
        family.budget(element, wild, values)
    assert np.isnan(values["differential_pressure"][3])


@pytest.mark.parametrize("key", FAMILIES)
def test_impossible_range_is_a_finding(key):
    """No opening makes 9 bar out of a trickle; the sheet says so instead of failing."""
    request = steam(key, flows=[1e-4, 2e-4, 80.0], differential_pressure_range="0.1 mbar")
    element = registry.family(key).size(request)
    codes = [finding.code for finding in element.findings if finding.level is Level.STOP]
    assert any("impossible" in code for code in codes)


@pytest.mark.parametrize("key", FAMILIES)
def test_limits_cross(key):
    """A flow far above range breaks the range, one far below breaks the cut-off."""
    request = water(key)
    family = registry.family(key)
    element = family.size(request)
    found = {limit.code: limit for limit in family.limits(element, request)}
    stream = request.stream
    far = family.at(element, stream.with_flow(stream.mass_flow * 3.0))["signal_fraction"]
    near = family.at(element, stream.with_flow(stream.mass_flow * 1e-3))["signal_fraction"]
    assert far[2] > found["above-range"].high
    assert near[0] < found["below-cut-off"].low


@pytest.mark.benchmark
@pytest.mark.parametrize("key", FAMILIES)
@pytest.mark.parametrize("make", [water, steam])
def test_a_thousand_lanes_take_little(key, make):
    """500 lanes within the time of 250 numpy powers of 500 lanes (about 1 ms) in the same run."""
    request = make(key)
    family = registry.family(key)
    element = family.size(request)
    sweep = tools.alone(request.stream, 1, 500).with_flow(
        np.geomspace(0.01, 100.0, 500) * request.stream.mass_flow[1]
    )
    base = np.linspace(0.1, 2.0, 500)

    def seconds(work, count=30):
        best = np.inf
        for _ in range(5):
            start = time.perf_counter()
            for _ in range(count):
                work()
            best = min(best, (time.perf_counter() - start) / count)
        return best

    assert seconds(lambda: family.at(element, sweep)) < 250 * seconds(lambda: base**0.7)


@pytest.mark.parametrize(
    ("key", "entry", "text"),
    [
        ("orifice_concentric", "bore", "0 mm"),
        ("orifice_concentric", "bore", "103 mm"),
        ("orifice_concentric", "differential_pressure_range", "0 mbar"),
        ("orifice_concentric", "plate_thickness", "0 mm"),
        ("orifice_concentric", "target_diameter_ratio", "1.2"),
        ("orifice_concentric", "discharge_coefficient", "0"),
        ("cone", "cone_diameter", "2000 mm"),
        ("wedge", "wedge_height", "0 mm"),
    ],
)
def test_an_entry_that_cannot_be_is_said_and_left_out(key, entry, text):
    """The finding names the entry and what came; everything else is worked out without it."""
    request = water(key, **{entry: text})
    family = registry.family(key)
    element = family.size(request)
    stops = [item for item in element.findings if item.level is Level.STOP]
    assert [item.field for item in stops] == [f"meter.{entry}"]
    assert text in stops[0].message
    assert np.isfinite(family.at(element, request.stream)["differential_pressure"]).all()


def test_range_above_the_pressure_is_out_of_reach():
    """20 bar cannot stand across a plate in steam of 8 bar."""
    request = steam("orifice_concentric", bore="80 mm", differential_pressure_range="20 bar")
    element = registry.family("orifice_concentric").size(request)
    assert "range-out-of-reach" in [item.code for item in element.findings]
    assert "upper_range_flow" not in element.values


def test_the_hardest_point_decides_the_bore():
    """The largest Δp is not always at the largest flow: thin gas at less flow makes more."""
    fluid = tools.steam(3)
    fluid["density"] = np.array([4.0, 2.0, 4.0])
    fluid["pressure"] = np.array([8e5, 4e5, 8e5])
    request = tools.request(
        "orifice_concentric",
        [0.3, 0.9, 1.0],
        fluid,
        phase="gas",
        diameter=0.1541,
        nominal=150,
        differential_pressure_range="250 mbar",
    )
    family = registry.family("orifice_concentric")
    fraction = family.at(family.size(request), request.stream)["signal_fraction"]
    assert fraction.argmax() == 1
    assert 0.99 < fraction[1] <= 1.0


def test_expansion_can_make_another_point_the_hardest():
    """Equal qm²/ρ, but half the pressure: ε is smaller there and Δp larger."""
    fluid = tools.steam(3)
    fluid["pressure"] = np.array([8e5, 2e5, 8e5])
    request = tools.request(
        "orifice_concentric",
        [0.3, 0.9999, 1.0],
        fluid,
        phase="gas",
        diameter=0.1541,
        nominal=150,
        differential_pressure_range="250 mbar",
    )
    family = registry.family("orifice_concentric")
    fraction = family.at(family.size(request), request.stream)["signal_fraction"]
    assert fraction.argmax() == 1
    assert 0.99 < fraction[1] <= 1.0
