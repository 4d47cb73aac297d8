"""What a permanent pressure loss costs: power and energy. First principles, no standard."""

from __future__ import annotations

import numpy as np
from numpy.typing import NDArray

Array = NDArray[np.float64]


def lost_power_liquid(*, pressure_loss: Array, volume_flow: Array, efficiency: float) -> Array:
    """Return the shaft power that a pressure loss takes from a pump [W].

    P = loss * qv / efficiency. Shapes (n,); pressure_loss [Pa], volume_flow [m3/s],
    efficiency [-] in (0, 1].
    """
    return np.asarray(pressure_loss * volume_flow / efficiency)


def lost_power_gas(
    *, pressure: Array, pressure_loss: Array, volume_flow: Array, efficiency: float
) -> Array:
    """Return the shaft power to compress a gas back over a pressure loss [W].

    Isothermal compression of an ideal gas, P = p1 qv ln(p1 / (p1 - loss)) / efficiency; tends to
    the liquid's formula for a small loss. Shapes (n,); pressure absolute [Pa]; NaN where the loss
    reaches the pressure.
    """
    with np.errstate(divide="ignore", invalid="ignore"):
        ratio = np.where(pressure_loss < pressure, pressure / (pressure - pressure_loss), np.nan)
        return np.asarray(pressure * volume_flow * np.log(ratio) / efficiency)
