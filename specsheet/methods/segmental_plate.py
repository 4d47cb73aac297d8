"""Segmental orifice plate: discharge coefficient.

Source: Miller, Flow Measurement Engineering Handbook, 3rd edition (coefficients as the general
library `fluids` carries them; limits from memory). Floats or arrays (n,), SI.
"""

from __future__ import annotations

from typing import Any

#: pipes from here on take the second set of constants [m]
LARGE_PIPE = 0.1

#: tappings, pipe below 100 mm -> C∞ = a + b β^2.1 + c β⁸ + d β⁴/(1 - β⁴) + e β³
_CONSTANTS = {
    ("flange", True): (0.6284, 0.1462, -0.8464, 0.2603, -0.2886),
    ("vena contracta", True): (0.6261, 0.1851, -0.2879, 0.1170, -0.2845),
    ("flange", False): (0.6276, 0.0828, 0.2739, -0.0934, -0.1132),
    ("vena contracta", False): (0.6276, 0.0828, 0.2739, -0.0934, -0.1132),
}


def discharge_coefficient(*, diameter_ratio: Any, inside_diameter: float, taps: str) -> Any:
    """Return C [-] of a segmental plate; it does not depend on the Reynolds number.

    Args:
        diameter_ratio: β = sqrt(open area by pipe area), 0.35 to 0.85 [-]
        inside_diameter: D [m]
        taps: "flange" or "vena contracta"
    """
    a, b, c, d, e = _CONSTANTS[taps, inside_diameter < LARGE_PIPE]
    beta = diameter_ratio
    beta4 = beta**4
    return a + b * beta**2.1 + c * beta4 * beta4 + d * beta4 / (1.0 - beta4) + e * beta**3
