"""A bar across the flow: drag, blockage, wake frequency and natural frequency.

Sources: published laws of drag and of beams; Strouhal number and drag coefficient from memory.
Floats or arrays (n,), SI.
"""

from __future__ import annotations

from typing import Any

import numpy as np

#: first eigenvalue of a beam: held at one end; held at one end and propped at the other
HELD_AT_ONE_END = 1.87510407
PROPPED = 3.92660231

STEEL_DENSITY = 7900.0
STEEL_MODULUS = 1.93e11


def blockage(*, width: Any, length: Any, inside_diameter: Any) -> Any:
    """Return the frontal area of the bar by the area of the pipe [-]."""
    return 4.0 * width * length / (np.pi * inside_diameter**2)


def pressure_loss(*, drag_coefficient: Any, blockage: Any, density: Any, velocity: Any) -> Any:
    """Return the permanent loss [Pa]: drag of the bar spread over the pipe, CD B ρ v²/2."""
    return drag_coefficient * blockage * 0.5 * density * velocity**2


def wake_frequency(*, strouhal_number: Any, velocity: Any, width: Any) -> Any:
    """Return the frequency at which eddies leave the bar, f = Sr v / b [Hz]."""
    return strouhal_number * velocity / width


def natural_frequency(
    *,
    eigenvalue: float,
    length: float,
    width: float,
    wall: float,
    fluid_density: Any,
) -> Any:
    """Return the first natural frequency of a steel tube across the flow [Hz].

    λ²/(2 π L²) sqrt(E I / m), m of the tube with the fluid inside and as much again dragged along.

    Args:
        eigenvalue: λ by the way it is held [-]
        length: free length [m]
        width: outside diameter [m]
        wall: [m]
        fluid_density: [kg/m3]
    """
    inside = max(width - 2.0 * wall, 0.0)
    inertia = np.pi / 64.0 * (width**4 - inside**4)
    metal = STEEL_DENSITY * np.pi / 4.0 * (width**2 - inside**2)
    fluid = fluid_density * np.pi / 4.0 * (inside**2 + width**2)
    return (
        eigenvalue**2
        / (2.0 * np.pi * length**2)
        * np.sqrt(STEEL_MODULUS * inertia / (metal + fluid))
    )


def side_hole_coefficient(*, angle: Any, spherical: bool) -> Any:
    """Return the pressure coefficient at an angle from the stagnation point, ideal flow [-].

    1 - 4 sin² θ on a cylinder, 1 - 9/4 sin² θ on a sphere.

    Args:
        angle: θ [rad]
        spherical: sphere, else cylinder.
    """
    return 1.0 - (2.25 if spherical else 4.0) * np.sin(angle) ** 2
