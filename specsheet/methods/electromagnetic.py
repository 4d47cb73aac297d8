"""Electromagnetic meters: the voltage that a conducting liquid induces across a magnetic field.

Source: ISO 20456, U = k B D v.
"""

from __future__ import annotations

from typing import Any


def induced_voltage(
    *, flux_density: Any, diameter: Any, velocity: Any, weight_factor: float = 1.0
) -> Any:
    """Return the voltage between the electrodes U = k B D v [V].

    Args:
        flux_density: mean magnetic flux density across the bore [T]
        diameter: distance of the electrodes, the bore [m]
        velocity: mean over the bore [m/s]
        weight_factor: k, of the shape of the field; 1 for a uniform one [-]
    """
    return weight_factor * flux_density * diameter * velocity


def velocity(*, voltage: Any, flux_density: Any, diameter: Any, weight_factor: float = 1.0) -> Any:
    """Return the mean velocity [m/s] of a ``voltage`` [V]; the inverse of induced_voltage."""
    return voltage / (weight_factor * flux_density * diameter)
