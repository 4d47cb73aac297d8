"""Laminar flow in capillaries and porous plugs.

Sources: Hagen-Poiseuille and Darcy (published laws); kinetic-energy factor from memory. Floats or
arrays (n,), SI. The pressure drop is a ν-part and an inertial part: S = a μ q + b ρ q².
"""

from __future__ import annotations

from typing import Any

import numpy as np

#: kinetic energy and development of the profile, on ρ v² (capillary viscometry, from memory)
KINETIC_FACTOR = 1.16

#: largest Reynolds number of a capillary [-]
LARGEST_REYNOLDS = 2000.0


def bundle_resistance(*, bore: Any, length: Any, count: Any) -> Any:
    """Return a = 128 L / (n π d⁴) [1/m3] of n capillaries in parallel."""
    return 128.0 * length / (count * np.pi * bore**4)


def bundle_inertia(*, bore: Any, count: Any) -> Any:
    """Return b = m (4/(n π d²))² [1/m4] with the kinetic factor m."""
    return KINETIC_FACTOR * (4.0 / (count * np.pi * bore**2)) ** 2


def plug_resistance(*, length: Any, permeability: Any, area: Any) -> Any:
    """Return a = L / (k A) [1/m3] of a porous plug (Darcy)."""
    return length / (permeability * area)


def entrance_length(*, reynolds_number: Any, bore: Any) -> Any:
    """Return 0.06 Re d [m], within which the profile develops."""
    return 0.06 * reynolds_number * bore


def differential_pressure(
    *,
    volume_flow: Any,
    viscosity: Any,
    density: Any,
    resistance: Any,
    inertia: Any,
    pressure: Any,
    compressible: Any,
) -> Any:
    """Return the pressure drop [Pa]; NaN where a gas could not pass at that inlet pressure.

    S = a μ q + b ρ q² for a liquid; an isothermal gas expands along the way: Δp (1 - Δp/(2 p)) = S.

    Args:
        volume_flow: at the inlet [m3/s]
        viscosity: [Pa s]
        density: at the inlet [kg/m3]
        resistance: a [1/m3]
        inertia: b [1/m4]
        pressure: inlet, absolute [Pa]
        compressible: whether it is a gas (bool or array)
    """
    stiff = resistance * viscosity * volume_flow + inertia * density * volume_flow**2
    expanded = 2.0 * stiff / (1.0 + np.sqrt(1.0 - 2.0 * stiff / pressure))
    return np.where(compressible, expanded, stiff)


def volume_flow(
    *,
    differential_pressure: Any,
    viscosity: Any,
    density: Any,
    resistance: Any,
    inertia: Any,
    pressure: Any,
    compressible: Any,
) -> Any:
    """Return the volume flow at the inlet [m3/s]; the inverse of :func:`differential_pressure`."""
    drop = differential_pressure
    stiff = np.where(compressible, drop * (1.0 - 0.5 * drop / pressure), drop)
    linear = resistance * viscosity
    return 2.0 * stiff / (linear + np.sqrt(linear**2 + 4.0 * inertia * density * stiff))


def flow_exponent(
    *, volume_flow: Any, viscosity: Any, density: Any, resistance: Any, inertia: Any
) -> Any:
    """Return d ln q / d ln Δp [-]: 1 where viscous, 0.5 where inertial."""
    linear = resistance * viscosity
    square = inertia * density * volume_flow
    return (linear + square) / (linear + 2.0 * square)
