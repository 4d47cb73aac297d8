"""Plates beyond ISO 5167: eccentric, quarter-circle and conical entrance.

Source: ISO/TR 15377:1998 (tables of C in the tests; limits partly from memory). Corner tappings;
the quarter-circle plate also takes flange tappings above D = 40 mm. Floats or arrays (n,), SI.
"""

from __future__ import annotations

from typing import Any

import numpy as np

#: C of a conical entrance within 0.1 <= β <= 0.316
CONICAL_COEFFICIENT = 0.734

_RADIUS_RATIO = ((0.245, 0.300, 0.400, 0.500, 0.600), (0.100, 0.104, 0.114, 0.135, 0.210))


def eccentric_coefficient(*, diameter_ratio: Any) -> Any:
    """Return C = 0.9355 - 1.6889 β + 3.0428 β² - 1.7989 β³ [-], β from 0.46 to 0.84.

    Reproduces the table of the report to 0.001.
    """
    beta = diameter_ratio
    return 0.9355 + beta * (-1.6889 + beta * (3.0428 - 1.7989 * beta))


def eccentric_uncertainty(*, diameter_ratio: Any) -> Any:
    """Return the relative expanded uncertainty of C, k = 2: 1 % up to β = 0.75, then 2 % [-]."""
    return np.where(diameter_ratio <= 0.75, 0.01, 0.02)


def quarter_circle_coefficient(*, diameter_ratio: Any) -> Any:
    """Return C = 0.73823 + 0.3309 β - 1.1615 β² + 1.5084 β³ [-], β from 0.245 to 0.6."""
    beta = diameter_ratio
    return 0.73823 + beta * (0.3309 + beta * (-1.16158 + 1.5084 * beta))


def quarter_circle_uncertainty(*, diameter_ratio: Any) -> Any:
    """Return the relative expanded uncertainty of C, k = 2 [-] (from memory).

    2.5 % up to β = 0.316, 2 % above.
    """
    return np.where(diameter_ratio <= 0.316, 0.025, 0.02)


def quarter_circle_smallest_reynolds(*, diameter_ratio: Any) -> Any:
    """Return the smallest ReD = 1000 β + 9.4e6 (β - 0.24)⁸ [-] (from memory)."""
    return 1000.0 * diameter_ratio + 9.4e6 * np.maximum(diameter_ratio - 0.24, 0.0) ** 8


def quarter_circle_radius(*, diameter_ratio: float) -> float:
    """Return the edge radius by bore, r/d [-]; from memory, for the bidder to confirm."""
    return float(np.interp(diameter_ratio, *_RADIUS_RATIO))


def conical_expansibility_uncertainty(*, expansibility: Any) -> Any:
    """Return the relative expanded uncertainty of ε: 33 (1 - ε) %, k = 2 [-] (from memory)."""
    return 0.33 * (1.0 - expansibility)
