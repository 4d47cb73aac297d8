"""Water in a gas against liquid water or ice: how much a gas can hold, by equal fugacity."""

from __future__ import annotations

import math
from functools import lru_cache
from typing import Any

from specsheet.fluid import if97
from specsheet.fluid.backends.water import Water
from specsheet.fluid.calorific import Composition
from specsheet.fluid.model import GAS_CONSTANT, Condition
from specsheet.fluid.phases import GAS
from specsheet.methods import equilibrium

#: molar volume of liquid water, for the rise of its fugacity with pressure [m3/mol]
_MOLAR_VOLUME = 1.8e-5


def saturated_fraction(
    composition: Composition, temperature: float, pressure: float, state: Any
) -> float:
    """Return the mole fraction of water at which a gas is saturated with it [-]; may exceed one.

    Args:
        composition: with water.
        temperature: [K]
        pressure: [Pa]
        state: state object of the gas at that state; its fugacity coefficient of water is used.
    """
    index = [key for key, _ in composition].index("water")
    vapour = saturation(temperature)
    poynting = math.exp(_MOLAR_VOLUME * max(pressure - vapour, 0.0) / (GAS_CONSTANT * temperature))
    condensed = vapour * _saturated_coefficient(temperature) * poynting
    return condensed / (pressure * float(state.fugacity_coefficient(index)))


def saturation(temperature: float) -> float:
    """Return the vapour pressure [Pa] of water, over ice below freezing."""
    found = if97.saturation_pressure(temperature)
    if found is not None:
        return found
    if temperature >= if97.CRITICAL_TEMPERATURE:
        return if97.CRITICAL_PRESSURE
    return equilibrium.ice_vapour_pressure(temperature)


@lru_cache(maxsize=64)
def _saturated_coefficient(temperature: float) -> float:
    """Return the fugacity coefficient of saturated steam, from its compressibility factor."""
    if temperature < if97.LOWEST_TEMPERATURE:
        return 1.0
    factor = Water(GAS).state(Condition(temperature, None)).value("compressibility") or 1.0
    return math.exp(factor - 1.0)


def boiling(pressure: float) -> float:
    """Return the temperature [K] at which water or ice has a vapour pressure [Pa]."""
    found = if97.saturation_temperature(pressure)
    if found is not None:
        return found
    if pressure >= if97.CRITICAL_PRESSURE:
        return if97.CRITICAL_TEMPERATURE
    return equilibrium.frost_point(pressure)
