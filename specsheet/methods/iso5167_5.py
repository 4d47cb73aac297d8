"""Cone meters: diameter ratio, expansibility, loss.

Source: ISO 5167-5:2016 (table of ε and the loss in the tests; C, limits and u(C) from memory).
Floats or arrays (n,), SI.
"""

from __future__ import annotations

from typing import Any

import numpy as np

COEFFICIENT = 0.82
UNCERTAINTY = 0.05
DIAMETERS = (0.05, 0.5)
RATIOS = (0.45, 0.75)
REYNOLDS = (8e4, 1.2e7)


def diameter_ratio(*, cone_ratio: Any) -> Any:
    """Return β = sqrt(1 - (dc/D)²) [-] from dc/D of the cone's widest end."""
    return np.sqrt(1.0 - cone_ratio * cone_ratio)


def cone_ratio(*, diameter_ratio: Any) -> Any:
    """Return dc/D [-] from β; the inverse of :func:`diameter_ratio`."""
    return np.sqrt(1.0 - diameter_ratio * diameter_ratio)


def expansibility(
    *, diameter_ratio: Any, pressure_drop_ratio: Any, isentropic_exponent: Any
) -> Any:
    """Return ε = 1 - (0.649 + 0.696 β⁴) Δp/(κ p1) [-], p2/p1 from 0.75."""
    square = diameter_ratio * diameter_ratio
    factor = 0.649 + 0.696 * square * square
    return 1.0 - factor * pressure_drop_ratio / isentropic_exponent


def loss_ratio(*, diameter_ratio: Any) -> Any:
    """Return the permanent loss by Δp: 1.09 - 0.813 β [-]."""
    return 1.09 - 0.813 * diameter_ratio
