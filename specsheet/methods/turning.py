"""Meters that turn: loss, slip and the smallest flow. Floats or arrays, SI, keyword-only."""

from __future__ import annotations

from typing import Any

import numpy as np


def pressure_loss(
    *,
    density: Any,
    viscosity: Any,
    velocity: Any,
    bore: Any,
    inertial: float,
    viscous: float = 0.0,
    starting: float = 0.0,
) -> Any:
    """Return the loss K ρ v²/2 + V μ v / D + p0 [Pa].

    The first part is the usual scaling with density and the square of the flow; the second the
    laminar drag in the clearances; the third what it takes to turn the meter at all.

    Args:
        density: [kg/m3]
        viscosity: dynamic [Pa s]
        velocity: in the bore [m/s]
        bore: [m]
        inertial, viscous: K and V [-]
        starting: p0 [Pa]
    """
    return inertial * density * velocity**2 / 2.0 + viscous * viscosity * velocity / bore + starting


def slip(*, coefficient: float, loss: Any, viscosity: Any, velocity: Any, bore: Any) -> Any:
    """Return the share of the flow that leaks past the turning parts S Δp D / (μ v) [-].

    Leakage through a narrow gap is laminar: in proportion to the loss, against the viscosity.

    Args:
        coefficient: S, of the clearances [-]
        loss: across the meter [Pa]
        viscosity: dynamic [Pa s]
        velocity: in the bore [m/s]
        bore: [m]
    """
    return coefficient * loss * bore / (viscosity * velocity)


def lowest_flow_gas(*, lowest_flow: Any, density: Any, reference_density: float) -> Any:
    """Return the smallest flow of a gas turbine [m3/s], q √(ρref / ρ).

    The torque goes with ρ q², so dense gas turns the rotor at a smaller flow (ISO 9951, from
    memory).

    Args:
        lowest_flow: at the reference density [m3/s]
        density, reference_density: [kg/m3]
    """
    return lowest_flow * np.sqrt(reference_density / density)


def lowest_flow_liquid(*, lowest_flow: Any, viscosity: Any, onset: float) -> Any:
    """Return the smallest flow of the linear range of a liquid turbine [m3/s].

    Linear above a Reynolds number, so it grows with the viscosity once that passes ``onset``.

    Args:
        lowest_flow: in thin liquid [m3/s]
        viscosity: kinematic [m2/s]
        onset: kinematic viscosity from which it counts [m2/s]
    """
    return lowest_flow * np.maximum(1.0, viscosity / onset)


def time_to_roll_over(*, register: float, volume_flow: Any) -> Any:
    """Return the time [s] in which ``volume_flow`` [m3/s] fills a ``register`` [m3]."""
    return register / volume_flow
