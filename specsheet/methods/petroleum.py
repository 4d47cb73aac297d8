"""Petroleum liquids: density over temperature and pressure, viscosity over temperature.

Sources: API MPMS 11.1 / ISO 91 (tables 54A, 54B, 54D: constants from memory, checked against
published correction factors in the tests) and API MPMS 11.2.1M; ASTM D341 with the constant 0.7;
C. S. Cragoe, National Bureau of Standards, miscellaneous publication 97 (1929), from memory. The
2004 edition's rounding and its shift of temperature scale (below 0.02 %) are left out: not for
custody transfer.
"""

from __future__ import annotations

import math

#: constants K0, K1, K2 of the expansion at 15 degC, by product
EXPANSION = {
    "crude": (613.9723, 0.0, 0.0),
    "gasoline": (346.4228, 0.4388, 0.0),
    "transition": (2680.3206, 0.0, -0.00336312),
    "jet fuel": (594.5418, 0.0, 0.0),
    "fuel oil": (186.9696, 0.4862, 0.0),
    "lubricating oil": (0.0, 0.6278, 0.0),
}


def density_from_api_gravity(gravity: float) -> float:
    """Return the density at 60 degF [kg/m3] of an API gravity: 141.5/(131.5 + gravity) of water.

    Water at 60 degF is taken as 999.016 kg/m3 (API MPMS 11.1:2004).
    """
    return 999.016 * 141.5 / (131.5 + gravity)


def expansion(*, density_15: float, product: str) -> float:
    """Return the coefficient of thermal expansion at 15 degC [1/K].

    Args:
        density_15: density at 15 degC and atmospheric pressure [kg/m3].
        product: key of :data:`EXPANSION`.
    """
    k0, k1, k2 = EXPANSION[product]
    return k0 / density_15**2 + k1 / density_15 + k2


def temperature_correction(*, density_15: float, celsius: float, product: str) -> float:
    """Return density at a temperature by density at 15 degC, at atmospheric pressure [-].

    Args:
        density_15: [kg/m3]
        celsius: temperature [degC], within -50 to 150.
        product: key of :data:`EXPANSION`.
    """
    alpha = expansion(density_15=density_15, product=product)
    rise = celsius - 15.0
    return math.exp(-alpha * rise * (1.0 + 0.8 * alpha * rise))


def compressibility(*, density_15: float, celsius: float) -> float:
    """Return the compressibility [1/Pa].

    Args:
        density_15: [kg/m3]
        celsius: temperature [degC]

    Source: API MPMS 11.2.1M (from memory).
    """
    heavy = (density_15 / 1e3) ** 2
    power = -1.62080 + 0.00021592 * celsius + 0.87096 / heavy + 0.0042092 * celsius / heavy
    return 1e-9 * math.exp(power)


def pressure_correction(*, compressibility: float, gauge_pressure: float) -> float:
    """Return density under pressure by density at atmospheric pressure [-].

    Args:
        compressibility: [1/Pa]
        gauge_pressure: above the equilibrium pressure [Pa].
    """
    return 1.0 / (1.0 - compressibility * gauge_pressure)


def kinematic_viscosity(
    *,
    temperature: float,
    temperature_1: float,
    viscosity_1: float,
    temperature_2: float,
    viscosity_2: float,
) -> float:
    """Return the kinematic viscosity [m2/s] at a temperature, through two known ones.

    Args:
        temperature, temperature_1, temperature_2: [K]; the last two differ.
        viscosity_1, viscosity_2: kinematic [m2/s], above 0.3 mm2/s.

    Source: ASTM D341: log log (nu + 0.7) straight over log T, nu in mm2/s.
    """
    first, second = _walther(viscosity_1), _walther(viscosity_2)
    share = math.log(temperature / temperature_1) / math.log(temperature_2 / temperature_1)
    level = first + share * (second - first)
    return 1e-6 * float(10.0 ** (10.0**level) - 0.7)


def _walther(viscosity: float) -> float:
    return math.log10(math.log10(1e6 * viscosity + 0.7))


def heat_capacity(*, celsius: float, density_15: float) -> float:
    """Return the heat capacity of a petroleum liquid [J/kg/K], good to some 5 %.

    Args:
        celsius: temperature [degC]
        density_15: [kg/m3]

    Source: Cragoe (1929), from memory.
    """
    return (1685.0 + 3.39 * celsius) / math.sqrt(density_15 / 1e3)
