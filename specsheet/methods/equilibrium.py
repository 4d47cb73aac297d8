"""Cheap estimates of the phase of a mixture: vapour-liquid ratios and saturation over ice.

Sources: G. M. Wilson, paper 15C at the 65th AIChE meeting (1968): ratios from critical constants
(from memory; checked against dew points of equations of state in the tests); World Meteorological
Organization, guide no. 8 (2008), annex 4.B: vapour pressure over ice (from memory).
"""

from __future__ import annotations

import math
from collections.abc import Sequence
from dataclasses import dataclass


@dataclass(frozen=True, slots=True)
class Critical:
    """Critical temperature [K], critical pressure [Pa] and acentric factor [-] of a component."""

    temperature: float
    pressure: float
    acentric: float


def wilson_ratio(*, temperature: float, pressure: float, component: Critical) -> float:
    """Return y/x of a component between vapour and liquid [-].

    Args:
        temperature: [K]
        pressure: [Pa]
        component: critical constants.
    """
    power = 5.373 * (1.0 + component.acentric) * (1.0 - component.temperature / temperature)
    return component.pressure / pressure * math.exp(power)


def wilson_dew_sum(
    *,
    temperature: float,
    pressure: float,
    fractions: Sequence[float],
    components: Sequence[Critical],
) -> float:
    """Return the sum of z/K, which is below one for a gas above its dew point [-]."""
    return sum(
        z / wilson_ratio(temperature=temperature, pressure=pressure, component=item)
        for z, item in zip(fractions, components, strict=True)
    )


def wilson_bubble_pressure(
    *, temperature: float, fractions: Sequence[float], components: Sequence[Critical]
) -> float:
    """Return the estimated bubble pressure of a liquid mixture [Pa]."""
    return sum(
        z * wilson_ratio(temperature=temperature, pressure=1.0, component=item)
        for z, item in zip(fractions, components, strict=True)
    )


def wilson_dew_temperature(
    *, pressure: float, fractions: Sequence[float], components: Sequence[Critical]
) -> float:
    """Return the estimated dew temperature of a mixture [K], by halving between 20 K and 1000 K."""
    low, high = 20.0, 1000.0
    while high - low > 0.01:
        middle = 0.5 * (low + high)
        total = wilson_dew_sum(
            temperature=middle, pressure=pressure, fractions=fractions, components=components
        )
        low, high = (middle, high) if total > 1.0 else (low, middle)
    return high


def ice_vapour_pressure(temperature: float) -> float:
    """Return the vapour pressure over ice [Pa] at a temperature [K] below 273.16 K."""
    celsius = temperature - 273.15
    return 611.2 * math.exp(22.46 * celsius / (272.62 + celsius))


def frost_point(pressure: float) -> float:
    """Return the temperature [K] at which ice has a vapour pressure [Pa] below 611.2 Pa."""
    power = math.log(pressure / 611.2)
    return 273.15 + 272.62 * power / (22.46 - power)
