"""Vortex shedding: frequency, K-factor and its growth with temperature.

Source: ISO/TR 12764 (f = Sr v / d, published; the rest from memory). The velocity is the mean
velocity in the bore of the meter, upstream of the bluff body.
"""

from __future__ import annotations

from typing import Any

import numpy as np


def frequency(*, strouhal_number: Any, velocity: Any, bluff_width: Any) -> Any:
    """Return the shedding frequency f = Sr v / d [Hz].

    Args:
        strouhal_number: [-]
        velocity: mean velocity in the meter [m/s]
        bluff_width: width of the bluff body across the flow [m]
    """
    return strouhal_number * velocity / bluff_width


def k_factor(*, strouhal_number: Any, bluff_width: Any, bore: Any) -> Any:
    """Return pulses by volume K = f / q = 4 Sr / (π D² d) [1/m3].

    Args:
        strouhal_number: [-]
        bluff_width: [m]
        bore: of the meter [m]
    """
    return 4.0 * strouhal_number / (np.pi * bore**2 * bluff_width)


def strouhal_number(*, k_factor: Any, bluff_width: Any, bore: Any) -> Any:
    """Return the Strouhal number [-] of a stated ``k_factor`` [1/m3]; the inverse of k_factor."""
    return k_factor * np.pi * bore**2 * bluff_width / 4.0


def k_factor_hot(*, k_factor: Any, expansion: Any, temperature_rise: Any) -> Any:
    """Return the K-factor [1/m3] of a meter that has grown: K / (1 + α Δt)³.

    Bore and bluff body grow together, so the swept volume of one vortex grows with the cube.

    Args:
        k_factor: as calibrated [1/m3]
        expansion: linear coefficient of the meter's material [1/K]
        temperature_rise: above the temperature of calibration [K]
    """
    return k_factor / (1.0 + expansion * temperature_rise) ** 3
