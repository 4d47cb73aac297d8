"""The curve that stands in for saturation states of the equation of state."""

from __future__ import annotations

import pytest

from specsheet.fluid import names, saturation

KEYS = (
    "ammonia",
    "carbon_dioxide",
    "ethanol",
    "methane",
    "nitrogen",
    "propane",
    "r134a",
    "toluene",
)


@pytest.mark.parametrize("key", KEYS)
def test_curve_is_the_equation_to_a_part_in_a_million(key: str) -> None:
    item = names.substances()[key]
    coldest = max(item.lowest_temperature * 1.01, 0.46 * item.critical_temperature)
    for share in (0.0, 0.13, 0.5, 0.77, 1.0):
        temperature = coldest + share * (0.979 * item.critical_temperature - coldest)
        exact = saturation._exact_pressure(item.equation, temperature)
        assert exact is not None
        assert saturation.vapour_pressure(item, temperature) == pytest.approx(exact, rel=1e-6)
        assert saturation.boiling_temperature(item, exact) == pytest.approx(temperature, rel=1e-6)


@pytest.mark.parametrize("key", KEYS)
def test_curve_and_equation_meet_at_its_ends(key: str) -> None:
    item = names.substances()[key]
    edge = saturation._WARM * item.critical_temperature
    below = saturation.vapour_pressure(item, edge * (1 - 1e-7))
    above = saturation.vapour_pressure(item, edge * (1 + 1e-7))
    assert below == pytest.approx(above, rel=1e-5)


def test_nothing_beyond_the_critical_point() -> None:
    item = names.substances()["methane"]
    assert saturation.vapour_pressure(item, 200.0) is None
    assert saturation.boiling_temperature(item, 50e5) is None
    assert saturation.vapour_pressure(item, 50.0) is None
