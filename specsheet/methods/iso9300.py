"""Critical flow Venturi nozzles: choked flow, critical flow function, back pressure.

Source: ISO 9300:2005 (from memory; critical ratio and ideal critical flow function are published
laws). Floats or arrays (n,), SI.
"""

from __future__ import annotations

from typing import Any

import numpy as np

#: throat -> (a, b, n, smallest Re, largest Re) of C = a - b Re^-n, Re on the throat
THROATS = {
    "toroidal": (0.9959, 2.720, 0.5, 2.1e4, 3.2e7),
    "cylindrical": (0.9976, 0.1388, 0.2, 3.5e5, 1.1e7),
}

#: relative expanded uncertainty of C, k = 2
UNCERTAINTY = 0.003

#: of the search for a Mach number; so near to one, two roots fall together and no nearer is told
_ROUNDS, _TOLERANCE, _BELOW_ONE = 60, 1e-14, 1.0 - 1e-8


def critical_flow_function(*, isentropic_exponent: Any) -> Any:
    """Return C* = sqrt(κ) (2/(κ+1))^((κ+1)/(2(κ-1))) of an ideal gas [-]."""
    kappa = isentropic_exponent
    power = (kappa + 1.0) / (2.0 * (kappa - 1.0))
    return np.sqrt(kappa) * (2.0 / (kappa + 1.0)) ** power


def critical_pressure_ratio(*, isentropic_exponent: Any) -> Any:
    """Return r* = (2/(κ+1))^(κ/(κ-1)), throat by stagnation pressure [-]."""
    kappa = isentropic_exponent
    return (2.0 / (kappa + 1.0)) ** (kappa / (kappa - 1.0))


def discharge_coefficient(*, throat_reynolds_number: Any, throat: str) -> Any:
    """Return C = a - b Re^-n [-]; ``throat`` is a key of :data:`THROATS`."""
    a, b, n, _, _ = THROATS[throat]
    return a - b * throat_reynolds_number**-n


def mass_flux(*, isentropic_exponent: Any, pressure: Any, density: Any) -> Any:
    """Return the ideal choked mass flux C* sqrt(p0 ρ0) [kg/(m2 s)].

    With p0 ρ0 in place of p0/sqrt(R T0 / M) it also serves a real gas, to the accuracy with which
    its isentropic exponent describes it.

    Args:
        isentropic_exponent: κ [-]
        pressure: stagnation, absolute [Pa]
        density: at stagnation [kg/m3]
    """
    return critical_flow_function(isentropic_exponent=isentropic_exponent) * np.sqrt(
        pressure * density
    )


def exit_pressure_ratio(*, isentropic_exponent: Any, area_ratio: float) -> Any:
    """Return the subsonic exit pressure by stagnation pressure of a lossless diffuser [-].

    Solves (A/A*)² = (2/(κ+1) (1 + (κ-1)/2 Ma²))^((κ+1)/(κ-1)) / Ma² for Ma below one, by Newton's
    method on its logarithm, which rises to the root from the value of a gas at rest.

    Args:
        isentropic_exponent: κ [-]
        area_ratio: exit by throat, at least 1 [-]
    """
    kappa = np.asarray(isentropic_exponent, dtype=np.float64)
    half = 0.5 * (kappa - 1.0)
    power = 0.25 * (kappa + 1.0) / half
    mach = (2.0 / (kappa + 1.0)) ** power / area_ratio
    for _ in range(_ROUNDS):
        growth = 1.0 + half * mach * mach
        excess = power * np.log(2.0 / (kappa + 1.0) * growth) - np.log(mach * area_ratio)
        rise = excess * mach * growth / (1.0 - mach * mach)
        if not (np.abs(rise) > _TOLERANCE * mach).any():
            break
        mach = np.minimum(mach + rise, _BELOW_ONE)
    return (1.0 + half * mach * mach) ** (-kappa / (kappa - 1.0))


def largest_back_pressure_ratio(*, isentropic_exponent: Any, area_ratio: float) -> Any:
    """Return the largest back pressure by inlet pressure at which the throat still chokes [-].

    r* + 0.8 (ideal exit ratio - r*), for throat Reynolds numbers above 2e5 (from memory).
    """
    critical = critical_pressure_ratio(isentropic_exponent=isentropic_exponent)
    ideal = exit_pressure_ratio(isentropic_exponent=isentropic_exponent, area_ratio=area_ratio)
    return critical + 0.8 * (ideal - critical)
