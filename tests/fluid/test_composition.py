"""Compositions: bases, sums, percentages, unknown names; nothing is altered silently."""

from __future__ import annotations

import math

import pytest
from fluid_tags import codes, finding, point, stops, tag
from hypothesis import given, settings
from hypothesis import strategies as st

from specsheet import fluid
from specsheet.fluid import composition, names
from specsheet.fluid.state import FluidResult

GAS = 'kind = "mixture"\nphase = "gas"\n'


def derived(mixture: str, more: str = "") -> FluidResult:
    return fluid.derive(
        tag(f"{GAS}mixture = {{ {mixture} }}\n{more}", point("1 bar(g)", "40 degC"))
    )


def test_mass_fractions() -> None:
    found = composition.read({"methane": 0.5, "CO2": 0.5}, "mass", False).composition
    assert found is not None
    methane, carbon_dioxide = 0.5 / 16.0428, 0.5 / 44.0098
    assert dict(found)["methane"] == pytest.approx(methane / (methane + carbon_dioxide), rel=1e-4)


def test_volume_fractions_are_mole_fractions() -> None:
    stated = {"methane": 0.5, "CO2": 0.5}
    assert composition.read(stated, "volume", False) == composition.read(stated, "mole", False)


def test_a_wrong_sum_is_refused_with_the_sum_and_the_offer() -> None:
    result = derived("methane = 0.6, CO2 = 0.3")
    said = finding(result, "fractions-sum")
    assert stops(result) == ["fractions-sum"]
    assert "0.9" in said.message
    assert "fluid.normalise = true" in said.message


def test_normalise_scales_and_says_so() -> None:
    result = derived("methane = 0.6, CO2 = 0.3", "normalise = true")
    assert stops(result) == []
    assert "0.9" in finding(result, "fractions-scaled").message


def test_percentages_are_recognised() -> None:
    assert "percentages" in finding(derived("methane = 60, CO2 = 40"), "fractions-sum").message


def test_rounding_of_the_last_digit_is_scaled_with_a_note() -> None:
    result = derived("methane = 0.6667, CO2 = 0.3334")
    assert codes(result)[:1] == ["fractions-scaled"]


@pytest.mark.parametrize("value", [-0.1, math.nan, math.inf, "half"])
def test_fractions_that_are_none_are_refused(value: float | str) -> None:
    read = composition.read({"methane": value, "CO2": 1.0}, "mole", True)
    assert read.composition is None
    assert [item.code for item in read.findings] == ["fraction-range"]
    assert read.findings[0].field == "fluid.mixture.methane"


def test_unknown_substance_names_the_nearest() -> None:
    read = composition.read({"metane": 0.5, "CO2": 0.5}, "mole", False)
    assert read.composition is None
    assert "methane" in read.findings[0].message


def test_one_substance_under_two_names_is_added() -> None:
    read = composition.read({"CO2": 0.2, "carbon dioxide": 0.3, "methane": 0.5}, "mole", False)
    assert dict(read.composition or ())["carbon_dioxide"] == pytest.approx(0.5)


def test_air_among_others_is_split_into_its_gases() -> None:
    read = composition.read({"air": 0.5, "methane": 0.5}, "mole", False)
    assert dict(read.composition or ())["nitrogen"] == pytest.approx(0.3906)


def test_a_single_component_is_the_pure_substance() -> None:
    pure = derived("methane = 1.0")
    assert pure.name == "methane"


@settings(max_examples=100, deadline=None)
@given(
    st.dictionaries(
        st.sampled_from(sorted(names.substances())),
        st.floats(1e-6, 1.0),
        min_size=1,
        max_size=8,
    ),
    st.sampled_from(["mole", "mass", "volume"]),
)
def test_whatever_is_read_sums_to_one(stated: dict[str, float], basis: str) -> None:
    read = composition.read(stated, basis, True)
    assert read.composition is not None
    assert sum(fraction for _, fraction in read.composition) == pytest.approx(1.0, abs=1e-12)
    assert all(fraction > 0.0 for _, fraction in read.composition)


def test_volumes_of_a_liquid_are_those_of_the_pure_liquids() -> None:
    text = (
        'kind = "mixture"\nphase = "liquid"\nbasis = "volume"\n'
        "mixture = { propane = 0.6, n_butane = 0.4 }"
    )
    result = fluid.derive(tag(text, point("12 bar(g)", "15 degC")))
    assert "fractions-by-liquid-volume" in codes(result)
    # 507 and 585 kg/m3 at 15 degC (handbook, from memory); volumes all but add up
    assert result.points[0] is not None
    assert result.points[0].value("density") == pytest.approx(0.6 * 507 + 0.4 * 585, rel=0.01)


def test_a_gas_has_no_liquid_volume() -> None:
    read = composition.read({"methane": 0.1, "propane": 0.9}, "volume", False, "liquid")
    assert read.composition is None
    assert read.findings[0].code == "fraction-basis"
