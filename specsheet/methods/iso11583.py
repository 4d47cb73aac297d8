"""Wet gas in Venturi tubes and orifice plates: over-reading and discharge coefficient.

Source: ISO/TR 11583:2012 (worked example in the tests; the plate's equations as public code quotes
them). Floats or arrays (n,), SI.
"""

from __future__ import annotations

from typing import Any

import numpy as np

GRAVITY = 9.80665

#: factor H by liquid: hydrocarbon, water at ambient temperature, water in wet steam
LIQUIDS = {"hydrocarbon": 1.0, "water": 1.35, "water in steam": 0.79}

#: relative expanded uncertainty, k = 2, of φ of a plate [-]: as of a Venturi tube (from memory)
PLATE_UNCERTAINTY = 0.03


def lockhart_martinelli(*, liquid_ratio: Any, gas_density: Any, liquid_density: Any) -> Any:
    """Return X = (ml/mg) sqrt(ρg/ρl) [-] from the mass ratio of liquid to gas."""
    return liquid_ratio * np.sqrt(gas_density / liquid_density)


def gas_froude_number(
    *, gas_mass_flow: Any, gas_density: Any, liquid_density: Any, inside_diameter: Any
) -> Any:
    """Return Frg = v sqrt(ρg/(ρl - ρg)) / sqrt(g D) [-], v the superficial velocity of the gas."""
    velocity = 4.0 * gas_mass_flow / (gas_density * np.pi * inside_diameter**2)
    lift = np.sqrt(gas_density / (liquid_density - gas_density))
    return velocity * lift / np.sqrt(GRAVITY * inside_diameter)


def throat_froude_number(*, froude_number: Any, diameter_ratio: Any) -> Any:
    """Return Frg,th = Frg / β^2.5 [-]."""
    return froude_number / diameter_ratio**2.5


def over_reading(
    *,
    lockhart_martinelli: Any,
    froude_number: Any,
    diameter_ratio: Any,
    gas_density: Any,
    liquid_density: Any,
    liquid_factor: Any,
) -> Any:
    """Return φ [-], by which a tube in wet gas reads the gas flow high.

    φ = sqrt(1 + CCh X + X²), CCh = (ρl/ρg)^n + (ρg/ρl)^n,
    n = max(0.583 - 0.18 β² - 0.578 exp(-0.8 Frg/H), 0.392 - 0.18 β²)
    """
    square = 0.18 * diameter_ratio**2
    falling = 0.583 - square - 0.578 * np.exp(-0.8 * froude_number / liquid_factor)
    exponent = np.maximum(falling, 0.392 - square)
    return _chisholm(lockhart_martinelli, liquid_density / gas_density, exponent)


def plate_over_reading(
    *, lockhart_martinelli: Any, froude_number: Any, gas_density: Any, liquid_density: Any
) -> Any:
    """Return φ [-], by which a square-edged plate in wet gas reads the gas flow high.

    n = 0.214 below Frg = 1.5, (1/sqrt(2) - 0.3/sqrt(Frg))² above; C stays that of dry gas.
    """
    rising = (1.0 / np.sqrt(2.0) - 0.3 / np.sqrt(froude_number)) ** 2
    exponent = np.where(froude_number < 1.5, 0.214, rising)
    return _chisholm(lockhart_martinelli, liquid_density / gas_density, exponent)


def _chisholm(x: Any, density_ratio: Any, exponent: Any) -> Any:
    """Return φ = sqrt(1 + CCh X + X²), CCh = (ρl/ρg)^n + (ρg/ρl)^n."""
    ratio = density_ratio**exponent
    return np.sqrt(1.0 + (ratio + 1.0 / ratio) * x + x**2)


def discharge_coefficient(*, lockhart_martinelli: Any, throat_froude_number: Any) -> Any:
    """Return C = 1 - 0.0463 exp(-0.05 Frg,th) min(1, sqrt(X/0.016)) [-]."""
    wetted = np.minimum(1.0, np.sqrt(lockhart_martinelli / 0.016))
    return 1.0 - 0.0463 * np.exp(-0.05 * throat_froude_number) * wetted


def uncertainty(*, lockhart_martinelli: Any) -> Any:
    """Return the relative expanded uncertainty, k = 2 [-]: 3 % up to X = 0.15, then 2.5 %.

    From memory; it covers C and φ together.
    """
    return np.where(lockhart_martinelli <= 0.15, 0.03, 0.025)
