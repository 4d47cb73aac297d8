"""Profiles of the meters with a bore of their own: examples, defaults, limits and size series."""

import pytest

from specsheet import packs
from specsheet.fields import TERMS
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
