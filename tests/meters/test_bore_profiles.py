"""Profiles of the meters with a bore of their own: examples, defaults, limits and size series."""

import warnings

import bore_tools as tools
import numpy as np
import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from specsheet import packs
from specsheet.fields import TERMS
from specsheet.findings import Level
from specsheet.meters import registry
from specsheet.quantity.value import Refusal
from specsheet.tagfile import values

KEYS = (
    "vortex",
    "magnetic",
    "coriolis",
    "ultrasonic_transit",
    "turbine_axial",
    "gear_oval",
    "piston_rotary",
    "disc_nutating",
    "thermal_inline",
)
FITTINGS = {
    "none",
    "single bend",
    "two bends in plane",
    "two bends out of plane",
    "tee",
    "reducer",
    "expander",
    "ball valve full open",
    "gate valve full open",
    "control valve",
    "swirl",
}


@pytest.mark.parametrize("key", KEYS)
def test_examples_and_defaults_can_be_read(key):
    profile = packs.profile(key)
    for entry in (*profile.entries, *profile.reply):
        for text in (entry.example, entry.default):
            if text:
                read = values.from_text(entry, text)
                assert not isinstance(read, Refusal), f"{entry.path}: {read}"


@pytest.mark.parametrize("key", KEYS)
def test_limits_bound_terms_and_name_their_source(key):
    profile = packs.profile(key)
    assert profile.limits
    for limit in profile.limits:
        assert limit.quantity in TERMS
        assert limit.source
        assert not limit.message.endswith(".")
        assert limit.low is None or limit.high is None or limit.low < limit.high
    assert all(figure.source for figure in profile.typical.values())


@pytest.mark.parametrize("key", KEYS)
def test_size_series_rises_and_says_that_it_is_typical(key):
    data = packs.profile(key).data
    bores = [row["bore"] for row in data["sizes"]]
    assert bores == sorted(set(bores))
    assert data["sizes_source"].startswith("typical")


@pytest.mark.parametrize("key", KEYS)
def test_straight_lengths_cover_every_fitting(key):
    rules = packs.profile(key).straight
    assert set(rules) >= FITTINGS | {"source", "betas", "downstream"}


@pytest.mark.parametrize("key", KEYS)
def test_clauses_cover_what_a_purchase_needs(key):
    profile = packs.profile(key)
    assert {"calibration", "installation", "output", "materials"} <= set(profile.clauses)
    assert profile.wetted
    assert any(entry.needed == "always" for entry in profile.reply)


@pytest.mark.parametrize("key", KEYS)
@pytest.mark.parametrize("value", [0.0, -1.0])
def test_figures_that_are_not_positive_are_left_aside_and_found(key, value):
    profile = packs.profile(key)
    figures = [
        entry
        for entry in profile.entries
        if entry.kind not in ("nominal_size", "choice", "text", "integer")
    ]
    wrong = {
        entry.path.replace(".", "__"): tools.quantity(
            value, "mass_flow" if entry.kind == "flow" else entry.kind
        )
        for entry in figures
    }
    fluid, phase = (
        (tools.steam(3), "gas") if key == "thermal_inline" else (tools.water(3), "liquid")
    )
    request = tools.request(key, [0.5, 1.0, 2.0], fluid, phase=phase, **wrong)
    family = registry.family(key)
    element = family.size(request)
    found = [item for item in element.findings if item.code == "figure-not-positive"]
    assert {item.field for item in found} == {entry.path for entry in figures}
    assert all(item.level is Level.STOP for item in found)
    plain = family.size(tools.request(key, [0.5, 1.0, 2.0], fluid, phase=phase))
    assert element.numbers == plain.numbers


_ANY = st.floats(1e-9, 1e9)


@pytest.mark.parametrize("key", KEYS)
@settings(deadline=None, max_examples=25)
@given(
    flows=st.lists(_ANY, min_size=3, max_size=3),
    density=_ANY,
    viscosity=_ANY,
    pressure=_ANY,
    temperature=st.floats(1.0, 3000.0),
    exponent=st.one_of(st.just(np.nan), st.floats(1.0, 2.0)),
    phase=st.sampled_from(["liquid", "gas"]),
    diameter=st.floats(1e-3, 5.0),
)
def test_sizing_never_raises_nor_warns(
    key, flows, density, viscosity, pressure, temperature, exponent, phase, diameter
):
    fluid = tools.water(
        3,
        density=density,
        viscosity=viscosity,
        pressure=pressure,
        temperature=temperature,
        isentropic_exponent=exponent,
    )
    request = tools.request(key, flows, fluid, phase=phase, diameter=diameter, nominal=0)
    family = registry.family(key)
    with warnings.catch_warnings():
        warnings.simplefilter("error")
        element = family.size(request)
        values = family.at(element, request.stream)
        parts = family.budget(element, request.stream, values)
        limits = family.limits(element, request)
    assert element.numbers["bore"] > 0.0
    assert parts
    assert all(limit.message for limit in limits)
