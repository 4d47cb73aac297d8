"""Thermal meters: heat that a gas takes from a heated cylinder across the flow (King's law).

Sources: Kramers (1946) for Nu = 0.42 Pr^0.20 + 0.57 Pr^0.33 Re^0.50, 0.01 < Re < 10 000; Eucken
for the Prandtl number of a dilute gas; both from memory. ISO 14511 for the terms.
"""

from __future__ import annotations

from typing import Any

import numpy as np


def prandtl_number(*, isentropic_exponent: Any) -> Any:
    """Return Pr = 4 κ / (9 κ - 5) of a dilute gas [-] (Eucken)."""
    return 4.0 * isentropic_exponent / (9.0 * isentropic_exponent - 5.0)


def thermal_conductivity(
    *,
    viscosity: Any,
    isentropic_exponent: Any,
    pressure: Any,
    density: Any,
    temperature: Any,
) -> Any:
    """Return λ = μ cp / Pr [W/m/K] of a gas, with cp = κ / (κ - 1) p / (ρ T).

    Ideal-gas heat capacity; within some 10 % for gases away from saturation.

    Args:
        viscosity: dynamic [Pa s]
        isentropic_exponent: [-]
        pressure: absolute [Pa]
        density: [kg/m3]
        temperature: [K]
    """
    exponent = isentropic_exponent
    capacity = exponent / (exponent - 1.0) * pressure / (density * temperature)
    return viscosity * capacity / prandtl_number(isentropic_exponent=exponent)


def nusselt_number(*, reynolds_number: Any, prandtl_number: Any) -> Any:
    """Return the Nusselt number of a cylinder across the flow [-] (Kramers)."""
    still = 0.42 * prandtl_number**0.20
    return still + 0.57 * prandtl_number**0.33 * np.sqrt(reynolds_number)


def reynolds_number(*, nusselt_number: Any, prandtl_number: Any) -> Any:
    """Return the Reynolds number that gives a Nusselt number [-]; the inverse of it."""
    moved = nusselt_number - 0.42 * prandtl_number**0.20
    return (moved / (0.57 * prandtl_number**0.33)) ** 2


def heater_power(*, nusselt_number: Any, conductivity: Any, length: float, rise: float) -> Any:
    """Return the power that holds a cylinder above the gas, π L λ Nu ΔT [W].

    Args:
        nusselt_number: [-]
        conductivity: of the gas [W/m/K]
        length: heated length [m]
        rise: temperature above the gas [K]
    """
    return np.pi * length * conductivity * nusselt_number * rise
