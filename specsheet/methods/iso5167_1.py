"""Mass-flow equation of differential-pressure devices, and its solution for each unknown.

Source: ISO 5167-1:2003, clauses 3.3, 5 and 8 (from memory; its figures are checked in the tests).
All arguments are floats or arrays of shape (n,), SI. A state that cannot be is NaN.
"""

from __future__ import annotations

from collections.abc import Callable
from typing import Any

import numpy as np
from numpy.typing import NDArray

Array = NDArray[np.float64]

#: temperature at which bore and pipe are measured [K]
REFERENCE_TEMPERATURE = 293.15

_ROUNDS = 40
_TOLERANCE = 4e-14
_SETTLED = 1e-11


def grown(*, length: Any, expansion: Any, temperature: Any) -> Any:
    """Return a length [m] at ``temperature`` [K], measured at 20 °C.

    Args:
        length: at 20 °C [m]
        expansion: linear coefficient of the material [1/K]
        temperature: [K]
    """
    return length * (1.0 + expansion * (temperature - REFERENCE_TEMPERATURE))


def reynolds_number(*, mass_flow: Any, diameter: Any, viscosity: Any) -> Any:
    """Return Re = 4 qm / (π μ D) [-] from mass flow [kg/s], diameter [m] and viscosity [Pa s]."""
    return 4.0 * mass_flow / (np.pi * viscosity * diameter)


def mass_flow(
    *,
    discharge_coefficient: Any,
    expansibility: Any,
    diameter_ratio: Any,
    inside_diameter: Any,
    differential_pressure: Any,
    density: Any,
) -> Any:
    """Return qm = C ε β² (π/4) D² sqrt(2 Δp ρ1) / sqrt(1 - β⁴) [kg/s].

    Args:
        discharge_coefficient: C [-]
        expansibility: ε [-]
        diameter_ratio: β, below 1 [-]
        inside_diameter: D at operating temperature [m]
        differential_pressure: Δp [Pa]
        density: ρ1 upstream [kg/m3]
    """
    beta2 = diameter_ratio * diameter_ratio
    area = np.pi / 4.0 * inside_diameter * inside_diameter
    head = np.sqrt(2.0 * differential_pressure * density / (1.0 - beta2 * beta2))
    return discharge_coefficient * expansibility * beta2 * area * head


def incompressible_differential_pressure(
    *,
    mass_flow: Any,
    discharge_coefficient: Any,
    diameter_ratio: Any,
    inside_diameter: Any,
    density: Any,
) -> Any:
    """Return Δp ε² [Pa]: the differential pressure of a fluid that does not expand.

    The inverse of :func:`mass_flow`, whose arguments it shares.
    """
    beta2 = diameter_ratio * diameter_ratio
    area = np.pi / 4.0 * inside_diameter * inside_diameter
    speed = mass_flow / (discharge_coefficient * beta2 * area)
    return speed * speed * (1.0 - beta2 * beta2) / (2.0 * density)


def ratio_of_invariant(*, invariant: Any) -> Any:
    """Return β [-] where β² / sqrt(1 - β⁴) equals ``invariant`` (ISO 5167-1:2003, annex A)."""
    square = invariant * invariant
    return np.sqrt(np.sqrt(square / (1.0 + square)))


def fixed_point(step: Callable[[Any], Any], start: Any) -> Any:
    """Return x with x = step(x), lane by lane, by the secant method.

    The iteration of ISO 5167-1:2003, annex A. It suits a step that pulls inwards (slope below
    one); a lane where the slope reaches one has no solution (the flow chokes) and becomes NaN.

    Args:
        step: function of an array of shape (n,) that returns the next array.
        start: first guess, shape (n,).
    """
    with np.errstate(all="ignore"):
        return _secant(step, np.asarray(start, dtype=np.float64))


def _secant(step: Callable[[Any], Any], before: Array) -> Array:
    """Step by step; the last step is not tried where its error is foreseen within the tolerance.

    The error left by a secant step is the product of the two errors before it, times a curvature
    by the slope, which for the equations here is less than 1 / (slope x).
    """
    now: Array = np.asarray(step(before), dtype=np.float64)
    gap_before = now - before
    for _ in range(_ROUNDS):
        gap = step(now) - now
        size = np.abs(now)
        open_lanes = np.abs(gap) > _TOLERANCE * size
        moved = now - before
        slope = (gap - gap_before) / moved
        change = gap / slope
        after = np.where(open_lanes, np.where(slope < 0.0, now - change, np.nan), now)
        left = np.abs(change * moved / slope)
        if not (open_lanes & (left > _TOLERANCE * size * size)).any():
            return np.where(np.isnan(gap), np.nan, after)
        before, gap_before, now = now, gap, after
    settled = np.abs(step(now) - now) <= _SETTLED * np.abs(now)
    return np.where(settled, now, np.nan)


def differential_pressure(
    *,
    incompressible: Any,
    pressure: Any,
    expansibility: Callable[[Any], Any],
) -> Any:
    """Return Δp [Pa] from Δp ε², NaN where the flow chokes.

    Args:
        incompressible: Δp ε² [Pa]
        pressure: upstream, absolute [Pa]
        expansibility: ε [-] as a function of Δp/p1 [-]
    """
    start = incompressible / pressure

    def step(ratio: Any) -> Any:
        epsilon = expansibility(ratio)
        return np.where(ratio < 1.0, start / (epsilon * epsilon), np.nan)

    return fixed_point(step, start) * pressure


def diameter_sensitivity(*, diameter_ratio: Any) -> Any:
    """Return 2 β⁴ / (1 - β⁴): relative change of flow by relative change of D [-] (clause 8)."""
    beta4 = _fourth(diameter_ratio)
    return 2.0 * beta4 / (1.0 - beta4)


def bore_sensitivity(*, diameter_ratio: Any) -> Any:
    """Return 2 / (1 - β⁴): relative change of flow by relative change of d [-] (clause 8)."""
    return 2.0 / (1.0 - _fourth(diameter_ratio))


def loss_coefficient(*, discharge_coefficient: Any, diameter_ratio: Any) -> Any:
    """Return K = (sqrt(1 - β⁴ (1 - C²)) / (C β²) - 1)² [-], on the velocity in the pipe.

    Source: ISO 5167-2:2003, 5.4, also ISO 5167-3:2003, 5.1.8 (orifice plates and nozzles).
    """
    root = _loss_root(discharge_coefficient, diameter_ratio)
    return (root / (discharge_coefficient * diameter_ratio**2) - 1.0) ** 2


def loss_ratio(*, discharge_coefficient: Any, diameter_ratio: Any) -> Any:
    """Return the permanent loss by Δp [-] of an orifice plate or a nozzle.

    (sqrt(1 - β⁴ (1 - C²)) - C β²) / (sqrt(1 - β⁴ (1 - C²)) + C β²);
    source: ISO 5167-2:2003, 5.4.1, equation (7), also ISO 5167-3:2003.
    """
    root = _loss_root(discharge_coefficient, diameter_ratio)
    jet = discharge_coefficient * diameter_ratio * diameter_ratio
    return (root - jet) / (root + jet)


def _fourth(ratio: Any) -> Any:
    """Return the fourth power by squaring: a general power costs several times as much."""
    square = ratio * ratio
    return square * square


def _loss_root(discharge_coefficient: Any, diameter_ratio: Any) -> Any:
    beta4 = _fourth(diameter_ratio)
    return np.sqrt(1.0 - beta4 * (1.0 - discharge_coefficient * discharge_coefficient))
