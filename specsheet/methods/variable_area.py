"""Variable-area meters: a float in a cone, and a plunger against a spring.

Sources: VDI/VDE 3513-1 (float equation, from memory); mechanics. Floats or arrays (n,), SI.
"""

from __future__ import annotations

from typing import Any

import numpy as np

GRAVITY = 9.80665
_ROUNDS = 60


def equivalent_flow(
    *, volume_flow: Any, density: Any, float_density: Any, reference_density: Any
) -> Any:
    """Return the flow of another fluid [m3/s] that lifts the float as high.

    q sqrt(ρ (ρf - ρr) / (ρr (ρf - ρ))); NaN where the float swims in either.

    Args:
        volume_flow: of the fluid [m3/s]
        density: of the fluid [kg/m3]
        float_density: [kg/m3]
        reference_density: of the other fluid [kg/m3]
    """
    here = np.where(float_density > density, float_density - density, np.nan)
    there = np.where(float_density > reference_density, float_density - reference_density, np.nan)
    return volume_flow * np.sqrt(density * there / (reference_density * here))


def float_loss(*, density: Any, float_density: Any, float_height: Any) -> Any:
    """Return the pressure drop over the float [Pa]: its weight in the fluid by its area.

    (ρf - ρ) g h, h = volume by largest cross-section of the float [m].
    """
    return (float_density - density) * GRAVITY * float_height


def spring_pressure(*, displacement: Any, spring_rate: Any, preload: Any, area: Any) -> Any:
    """Return the pressure that holds a plunger against its spring [Pa]: (F0 + k x)/A.

    Args:
        displacement: x [m]
        spring_rate: k [N/m]
        preload: F0 at rest [N]
        area: of the plunger [m2]
    """
    return (preload + spring_rate * displacement) / area


def spring_flow(
    *, displacement: Any, slope: Any, spring_rate: Any, preload: Any, area: Any, density: Any
) -> Any:
    """Return the volume flow at a displacement [m3/s]: w x sqrt(2 Δp/ρ).

    Args:
        displacement: x [m]
        slope: w, growth of the effective opening with displacement [m]
        spring_rate, preload, area: as for :func:`spring_pressure`
        density: [kg/m3]
    """
    drop = spring_pressure(
        displacement=displacement, spring_rate=spring_rate, preload=preload, area=area
    )
    return slope * displacement * np.sqrt(2.0 * drop / density)


def spring_displacement(
    *, volume_flow: Any, slope: Any, spring_rate: Any, preload: Any, area: Any, density: Any
) -> Any:
    """Return the displacement [m]; the inverse of :func:`spring_flow`.

    Newton on x² (F0 + k x) = q² ρ A / (2 w²), convex for x > 0, from the right of its root.
    """
    wanted = np.asarray(volume_flow**2 * density * area / (2.0 * slope**2), dtype=np.float64)
    x = np.maximum(np.cbrt(wanted / spring_rate), 1e-300)
    for _ in range(_ROUNDS):
        value = x * x * (preload + spring_rate * x) - wanted
        step = value / (x * (2.0 * preload + 3.0 * spring_rate * x))
        x = x - step
        if not (np.abs(step) > 1e-15 * np.abs(x)).any():
            break
    return np.where(wanted > 0.0, x, 0.0)
