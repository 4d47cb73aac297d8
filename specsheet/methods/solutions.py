"""Aqueous solutions: density, viscosity, heat capacity and vapour pressure.

Sources: M. Laliberté and W. E. Cooper, J. Chem. Eng. Data 49 (2004) 1141 (density); M. Laliberté,
J. Chem. Eng. Data 52 (2007) 321 (viscosity) and 54 (2009) 1725 (heat capacity); forms as published
in the documentation of a public library. Coefficients stand in ``profiles/fluids/solutions.toml``.
"""

from __future__ import annotations

import math
from collections.abc import Sequence

#: compressibility of water and its solutions near room temperature [1/Pa] (from memory)
COMPRESSIBILITY = 4.5e-10


def laliberte_density(
    *, celsius: float, solute_fraction: float, water_density: float, coefficients: Sequence[float]
) -> float:
    """Return the density of a solution [kg/m3].

    Args:
        celsius: temperature [degC]
        solute_fraction: by mass [-].
        water_density: of pure water at that temperature [kg/m3].
        coefficients: c0 ... c4 of the solute.

    Source: Laliberté and Cooper (2004), equations 5 and 6.
    """
    c0, c1, c2, c3, c4 = coefficients
    water = 1.0 - solute_fraction
    apparent = (c0 * solute_fraction + c1) * math.exp(1e-6 * (celsius + c4) ** 2)
    apparent /= solute_fraction + c2 + c3 * celsius
    return 1.0 / (water / water_density + solute_fraction / apparent)


def laliberte_viscosity(
    *, celsius: float, solute_fraction: float, water_viscosity: float, coefficients: Sequence[float]
) -> float:
    """Return the viscosity of a solution [Pa s].

    Args:
        celsius: temperature [degC]
        solute_fraction: by mass [-].
        water_viscosity: of pure water at that temperature [Pa s].
        coefficients: v1 ... v6 of the solute.

    Source: Laliberté (2007), equations 8 and 12.
    """
    v1, v2, v3, v4, v5, v6 = coefficients
    power = (v1 * solute_fraction**v2 + v3) / (v4 * celsius + 1.0)
    solute = 1e-3 * math.exp(power) / (v5 * solute_fraction**v6 + 1.0)
    return float(water_viscosity ** (1.0 - solute_fraction) * solute**solute_fraction)


def laliberte_heat_capacity(
    *,
    celsius: float,
    solute_fraction: float,
    water_heat_capacity: float,
    coefficients: Sequence[float],
) -> float:
    """Return the isobaric heat capacity of a solution [J/kg/K].

    Args:
        celsius: temperature [degC]
        solute_fraction: by mass [-].
        water_heat_capacity: of pure water at that temperature [J/kg/K].
        coefficients: a1 ... a6 of the solute.

    Source: Laliberté (2009), as documented in a public library of chemical data.
    """
    a1, a2, a3, a4, a5, a6 = coefficients
    power = a2 * celsius + a3 * math.exp(0.01 * celsius) + a4 * solute_fraction
    solute = 1e3 * (a1 * math.exp(power) + a5 * solute_fraction**a6)
    return float((1.0 - solute_fraction) * water_heat_capacity + solute_fraction * solute)


def water_mole_fraction(*, solute_fraction: float, molar_mass: float, ions: int) -> float:
    """Return moles of water by moles of all particles in a solution [-].

    Args:
        solute_fraction: by mass [-].
        molar_mass: of the solute [kg/mol].
        ions: particles from one of the solute.
    """
    water = (1.0 - solute_fraction) / 0.01801528
    return water / (water + ions * solute_fraction / molar_mass)


def supercooled_vapour_pressure(temperature: float) -> float:
    """Return the vapour pressure [Pa] of water below 273.15 K that has not frozen.

    Clausius and Clapeyron from 611.2 Pa at 273.15 K with the heat of evaporation there, 2.501 MJ/kg
    (from memory): within 2 % down to -20 degC.

    Args:
        temperature: [K]
    """
    return 611.2 * math.exp(-2.501e6 / 461.5 * (1.0 / temperature - 1.0 / 273.15))


def van_laar(*, fraction: float, first: float, second: float) -> tuple[float, float]:
    """Return the activity coefficients of a binary mixture: of the first component, of the second.

    Args:
        fraction: mole fraction of the first component [-].
        first, second: constants of van Laar [-].
    """
    other = 1.0 - fraction
    below = first * fraction + second * other
    return (
        math.exp(first * (second * other / below) ** 2),
        math.exp(second * (first * fraction / below) ** 2),
    )


def antoine(*, celsius: float, a: float, b: float, c: float) -> float:
    """Return a vapour pressure [Pa]; the constants are those for mmHg, degC and log10."""
    return float(133.322 * 10.0 ** (a - b / (c + celsius)))
