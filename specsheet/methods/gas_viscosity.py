"""Viscosity of gases and gas mixtures at low density, and of liquids over temperature.

Sources: C. R. Wilke, J. Chem. Phys. 18 (1950) 517; Perry's Chemical Engineers' Handbook, 8th
edition, tables 2-312 and 2-313 (forms of the equations); P. Yoon and G. Thodos, AIChE J. 16 (1970)
300. Coefficients stand in ``profiles/fluids``.
"""

from __future__ import annotations

import math
from collections.abc import Sequence


def wilke(
    *, fractions: Sequence[float], viscosities: Sequence[float], molar_masses: Sequence[float]
) -> float:
    """Return the viscosity [Pa s] of a gas mixture at low density.

    Args:
        fractions: mole fractions [-], summing to one.
        viscosities: of the pure gases at the same temperature [Pa s].
        molar_masses: of the components [kg/mol].

    Source: Wilke (1950), equations 13 and 14.
    """
    total = 0.0
    roots = [math.sqrt(value) for value in viscosities]
    fourth = [mass**0.25 for mass in molar_masses]
    for i, x in enumerate(fractions):
        if x == 0.0:
            continue
        below = 0.0
        for j, y in enumerate(fractions):
            ratio = 1.0 + roots[i] / roots[j] * fourth[j] / fourth[i]
            below += y * ratio * ratio / math.sqrt(8.0 * (1.0 + molar_masses[i] / molar_masses[j]))
        total += x * viscosities[i] / below
    return total


def wassiljewa(
    *,
    fractions: Sequence[float],
    conductivities: Sequence[float],
    viscosities: Sequence[float],
    molar_masses: Sequence[float],
) -> float:
    """Return the thermal conductivity [W/m/K] of a gas mixture at low density.

    Args:
        fractions: mole fractions [-], summing to one.
        conductivities: of the pure gases [W/m/K].
        viscosities: of the pure gases [Pa s].
        molar_masses: of the components [kg/mol].

    Source: equation of Wassiljewa with the factors of Mason and Saxena (1958), whose constant is
    taken as one, so that they are those of Wilke (from memory).
    """
    total = 0.0
    for i, x in enumerate(fractions):
        if x == 0.0:
            continue
        below = 0.0
        for j, y in enumerate(fractions):
            mass = molar_masses[i] / molar_masses[j]
            ratio = 1.0 + math.sqrt(viscosities[i] / viscosities[j]) * mass**-0.25
            below += y * ratio * ratio / math.sqrt(8.0 * (1.0 + mass))
        total += x * conductivities[i] / below
    return total


def vapour_equation(*, temperature: float, c1: float, c2: float, c3: float, c4: float) -> float:
    """Return the viscosity [Pa s] of a vapour at low pressure and a temperature [K].

    Source: Perry's Handbook, 8th edition, table 2-312.
    """
    return float(c1 * temperature**c2 / (1.0 + c3 / temperature + c4 / temperature**2))


def liquid_equation(
    *, temperature: float, c1: float, c2: float, c3: float, c4: float, c5: float
) -> float:
    """Return the viscosity [Pa s] of a saturated liquid at a temperature [K].

    Source: Perry's Handbook, 8th edition, table 2-313.
    """
    return math.exp(c1 + c2 / temperature + c3 * math.log(temperature) + c4 * temperature**c5)


def yoon_thodos(
    *, temperature: float, critical_temperature: float, critical_pressure: float, molar_mass: float
) -> float:
    """Return the viscosity [Pa s] of a non-polar gas at low pressure, by corresponding states.

    Args:
        temperature: [K]
        critical_temperature: [K]
        critical_pressure: [Pa]
        molar_mass: [kg/mol]

    Source: Yoon and Thodos (1970), form for gases without polarity.
    """
    reduced = temperature / critical_temperature
    scale = (
        2173.4241 * critical_temperature ** (1 / 6) * (1e3 * molar_mass) ** -0.5
    ) / critical_pressure ** (2 / 3)
    shape = (
        1.0
        + 46.1 * reduced**0.618
        - 20.4 * math.exp(-0.449 * reduced)
        + 19.4 * math.exp(-4.058 * reduced)
    )
    return float(1e-8 * shape / scale)
