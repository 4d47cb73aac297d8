"""Pitot tubes: velocity and dynamic pressure, incompressible and compressible.

Source: ISO 3966 (values in the tests). Floats or arrays (n,), SI.
"""

from __future__ import annotations

from typing import Any

import numpy as np


def differential_pressure(
    *, velocity: Any, density: Any, pressure: Any, isentropic_exponent: Any
) -> Any:
    """Return total less static pressure [Pa] at a velocity [m/s].

    p ((1 + (κ - 1)/2 ρ v²/(κ p))^(κ/(κ-1)) - 1); ρ v²/2 where κ is NaN (a liquid).

    Args:
        velocity: local [m/s]
        density: [kg/m3]
        pressure: static, absolute [Pa]
        isentropic_exponent: κ, above 1, or NaN [-]
    """
    head = 0.5 * density * velocity * velocity
    share = (isentropic_exponent - 1.0) / isentropic_exponent
    rise = np.expm1(np.log1p(share * head / pressure) / share)
    return np.where(np.isnan(isentropic_exponent), head, pressure * rise)


def velocity(
    *, differential_pressure: Any, density: Any, pressure: Any, isentropic_exponent: Any
) -> Any:
    """Return the local velocity [m/s]; the inverse of :func:`differential_pressure`."""
    share = (isentropic_exponent - 1.0) / isentropic_exponent
    head = pressure * np.expm1(share * np.log1p(differential_pressure / pressure)) / share
    found = np.where(np.isnan(isentropic_exponent), differential_pressure, head)
    return np.sqrt(2.0 * found / density)


def mean_to_centre(*, reynolds_number: Any) -> Any:
    """Return the mean velocity by that on the axis [-] in a long straight round pipe.

    Power law u/u0 = (y/R)^(1/n), mean 2 n²/((n + 1)(2 n + 1)), n = 1.66 log10 Re (from memory);
    one half in laminar flow, joined linearly between Re 2000 and 4000.
    """
    n = 1.66 * np.log10(np.maximum(reynolds_number, 4000.0))
    turbulent = 2.0 * n * n / ((n + 1.0) * (2.0 * n + 1.0))
    share = np.clip((reynolds_number - 2000.0) / 2000.0, 0.0, 1.0)
    return 0.5 + (turbulent - 0.5) * share
