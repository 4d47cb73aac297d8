"""Round ducts: velocity, Reynolds number, friction. Floats or arrays, SI, keyword-only."""

from __future__ import annotations

from typing import Any

import numpy as np

#: below the first the flow is laminar, above the second turbulent; between, friction is blended
LAMINAR = 2000.0
TURBULENT = 4000.0


def area(*, diameter: Any) -> Any:
    """Return the area [m2] of a circle of ``diameter`` [m]."""
    return np.pi / 4.0 * diameter**2


def velocity(*, volume_flow: Any, diameter: Any) -> Any:
    """Return the mean velocity [m/s] of ``volume_flow`` [m3/s] in a bore of ``diameter`` [m]."""
    return volume_flow / area(diameter=diameter)


def reynolds_number(*, density: Any, velocity: Any, diameter: Any, viscosity: Any) -> Any:
    """Return Re = ρ v D / μ [-].

    Args:
        density: [kg/m3]
        velocity: mean over the bore [m/s]
        diameter: [m]
        viscosity: dynamic [Pa s]
    """
    return density * velocity * diameter / viscosity


def _turbulent(reynolds_number: Any, relative_roughness: Any) -> Any:
    """Friction factor by Haaland's explicit form, polished on Colebrook-White."""
    root = -1.8 * np.log10((relative_roughness / 3.7) ** 1.11 + 6.9 / reynolds_number)
    for _ in range(6):  # each pass gains a digit
        root = -2.0 * np.log10(relative_roughness / 3.7 + 2.51 / reynolds_number * root)
    return root**-2


def friction_factor(*, reynolds_number: Any, relative_roughness: Any = 0.0) -> Any:
    """Return the Darcy friction factor [-].

    Laminar 64/Re up to Re = 2000, Colebrook-White from Re = 4000, and between them a straight
    line in log(Re): the flow there is undecided, and a value without a jump keeps solvers honest.

    Args:
        reynolds_number: [-]
        relative_roughness: uniform equivalent roughness by bore [-]

    Source: Hagen-Poiseuille; Colebrook-White (1939), from memory.
    """
    re = np.maximum(reynolds_number, 1e-9)
    laminar = 64.0 / np.minimum(re, LAMINAR)
    turbulent = _turbulent(np.maximum(re, TURBULENT), relative_roughness)
    weight = np.clip(np.log(re / LAMINAR) / np.log(TURBULENT / LAMINAR), 0.0, 1.0)
    return laminar * (1.0 - weight) + turbulent * weight


def friction_loss(*, factor: Any, length: Any, diameter: Any, density: Any, velocity: Any) -> Any:
    """Return the loss by friction f L/D ρ v²/2 [Pa] (Darcy-Weisbach).

    Args:
        factor: Darcy friction factor [-]
        length: [m]
        diameter: [m]
        density: [kg/m3]
        velocity: [m/s]
    """
    return factor * length / diameter * density * velocity**2 / 2.0
