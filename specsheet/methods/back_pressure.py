"""Pressure that a liquid must keep behind a meter so that it neither flashes nor cavitates.

The published form is p >= a Δp + b pv with both pressures absolute. For turbine meters a = 2 and
b = 1.25 (API MPMS 5.3). Other families use the same form with their own factors.
"""

from __future__ import annotations

from typing import Any

TURBINE_LOSS_FACTOR = 2.0
TURBINE_VAPOUR_FACTOR = 1.25


def minimum_back_pressure(
    *,
    pressure_loss: Any,
    vapour_pressure: Any,
    loss_factor: float = TURBINE_LOSS_FACTOR,
    vapour_factor: float = TURBINE_VAPOUR_FACTOR,
) -> Any:
    """Return the absolute pressure needed behind the meter [Pa].

    Args:
        pressure_loss: of the meter at the flow in question [Pa]
        vapour_pressure: absolute, at the operating temperature [Pa]
        loss_factor, vapour_factor: a and b [-]

    Source: API MPMS 5.3 for the form and the default factors.
    """
    return loss_factor * pressure_loss + vapour_factor * vapour_pressure


def cavitation_index(*, pressure: Any, downstream_pressure: Any, vapour_pressure: Any) -> Any:
    """Return (p2 - pv) / (p1 - p2) [-]; all pressures absolute [Pa].

    Source: form of ISA-RP75.23, from memory.
    """
    return (downstream_pressure - vapour_pressure) / (pressure - downstream_pressure)
