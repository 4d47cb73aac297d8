"""Orifice plates: discharge coefficient, expansibility, uncertainty, roughness.

Source: ISO 5167-2:2003 (the equations are checked against published values in the tests; the
roughness table is from memory). Floats or arrays of shape (n,), SI.
"""

from __future__ import annotations

from typing import Any

import numpy as np

#: below this inside diameter a term is added to C and its uncertainty: 2.8 inches [m]
SMALL_PIPE = 0.07112

_INCH = 0.0254
_LN_19000 = np.log(19000.0)
_LN_1E6 = np.log(1e6)


def tapping_distances(*, taps: str, inside_diameter: Any) -> tuple[Any, Any]:
    """Return L1 and L'2 [-]: distances of the tappings from the plate's faces, by D (5.3.2.1).

    Args:
        taps: "corner", "flange" or "D and D/2"
        inside_diameter: D [m]
    """
    if taps == "corner":
        return 0.0, 0.0
    if taps == "flange":
        return _INCH / inside_diameter, _INCH / inside_diameter
    return 1.0, 0.47


def discharge_coefficient(
    *, diameter_ratio: Any, reynolds_number: Any, inside_diameter: Any, taps: str
) -> Any:
    """Return C of the Reader-Harris/Gallagher equation (5.3.2.1, equation (4)) [-].

    Args:
        diameter_ratio: β, 0.1 to 0.75 [-]
        reynolds_number: of the pipe, ReD [-]
        inside_diameter: D, 50 mm to 1 m [m]
        taps: "corner", "flange" or "D and D/2"
    """
    beta = diameter_ratio
    ln_beta = np.log(beta)
    ln_re = np.log(reynolds_number)
    beta2 = beta * beta
    beta4 = beta2 * beta2
    shape = np.exp(0.8 * (_LN_19000 + ln_beta - ln_re))
    slope = (0.0188 + 0.0063 * shape) * np.exp(3.5 * ln_beta + 0.3 * (_LN_1E6 - ln_re))
    result = (
        0.5961
        + 0.0261 * beta2
        - 0.216 * beta4 * beta4
        + 0.000521 * np.exp(0.7 * (_LN_1E6 + ln_beta - ln_re))
        + slope
        + _tapping_terms(beta, ln_beta, beta4, shape, inside_diameter, taps)
    )
    small = np.maximum(2.8 - inside_diameter / _INCH, 0.0)
    return result + 0.011 * (0.75 - beta) * small


def _tapping_terms(
    beta: Any, ln_beta: Any, beta4: Any, shape: Any, inside_diameter: Any, taps: str
) -> Any:
    upstream, downstream = tapping_distances(taps=taps, inside_diameter=inside_diameter)
    decay7 = np.exp(-7.0 * upstream)
    rise = 0.043 + 0.080 * np.exp(-10.0 * upstream) - 0.123 * decay7
    result = rise * (1.0 - 0.11 * shape) * beta4 / (1.0 - beta4)
    if taps == "corner":
        return result
    moved = 2.0 * downstream / (1.0 - beta)
    return result - 0.031 * (moved - 0.8 * moved**1.1) * np.exp(1.3 * ln_beta)


def expansibility(
    *, diameter_ratio: Any, pressure_drop_ratio: Any, isentropic_exponent: Any
) -> Any:
    """Return ε = 1 - (0.351 + 0.256 β⁴ + 0.93 β⁸) (1 - (p2/p1)^(1/κ)) [-] (5.3.2.2).

    Args:
        diameter_ratio: β [-]
        pressure_drop_ratio: Δp/p1, up to 0.25 [-]
        isentropic_exponent: κ [-]
    """
    beta2 = diameter_ratio * diameter_ratio
    beta4 = beta2 * beta2
    factor = 0.351 + (0.256 + 0.93 * beta4) * beta4
    return 1.0 + factor * np.expm1(np.log1p(-pressure_drop_ratio) / isentropic_exponent)


def coefficient_uncertainty(
    *, diameter_ratio: Any, reynolds_number: Any, inside_diameter: Any
) -> Any:
    """Return the relative expanded uncertainty of C, k = 2 [-] (5.3.3.1).

    The terms for pipes below 71.12 mm and for β above 0.5 below ReD 10 000 are added
    arithmetically, as the clause asks.
    """
    beta = diameter_ratio
    percent = np.where(beta < 0.2, 0.7 - beta, np.where(beta <= 0.6, 0.5, 1.667 * beta - 0.5))
    small = np.maximum(2.8 - inside_diameter / _INCH, 0.0)
    percent = percent + 0.9 * (0.75 - beta) * small
    return (percent + np.where((beta > 0.5) & (reynolds_number < 1e4), 0.5, 0.0)) / 100.0


def expansibility_uncertainty(*, pressure_drop_ratio: Any, isentropic_exponent: Any) -> Any:
    """Return the relative expanded uncertainty of ε: 3.5 Δp/(κ p1) % (5.3.3.2), k = 2 [-]."""
    return 0.035 * pressure_drop_ratio / isentropic_exponent


def smallest_reynolds_number(*, diameter_ratio: float, inside_diameter: float, taps: str) -> float:
    """Return the smallest ReD of use [-] (5.3.1); D in metres.

    Corner, D and D/2: 5000 up to β = 0.56, 16 000 β² above. Flange: 5000 and 170 β² D (D in mm).
    """
    if taps == "flange":
        return max(5000.0, 170.0 * diameter_ratio**2 * inside_diameter * 1000.0)
    return 5000.0 if diameter_ratio <= 0.56 else 16000.0 * diameter_ratio**2


_ROUGHNESS_RE = np.log10([1e4, 3e4, 1e5, 3e5, 1e6, 3e6, 1e7, 3e7, 1e8])
_ROUGHNESS_BETA = (0.20, 0.30, 0.40, 0.50, 0.60, 0.65)
_ROUGHNESS = (
    (15.0, 15.0, 15.0, 15.0, 15.0, 15.0, 15.0, 15.0, 15.0),
    (15.0, 15.0, 15.0, 15.0, 15.0, 15.0, 15.0, 14.0, 13.0),
    (15.0, 15.0, 10.0, 7.2, 5.2, 4.1, 3.5, 3.1, 2.7),
    (11.0, 7.7, 4.9, 3.3, 2.2, 1.6, 1.3, 1.1, 0.9),
    (5.6, 4.0, 2.5, 1.6, 1.0, 0.7, 0.6, 0.5, 0.4),
    (4.2, 3.0, 1.9, 1.2, 0.8, 0.6, 0.4, 0.3, 0.3),
)


def largest_roughness(*, diameter_ratio: Any, reynolds_number: float) -> Any:
    """Return the largest Ra/D of the upstream pipe [-] (5.3.1, table 1; from memory).

    Between columns and rows the logarithm of ReD and β are interpolated; at the ends the last
    value holds.

    Args:
        diameter_ratio: β [-]
        reynolds_number: of the pipe, ReD; one for all [-]
    """
    at = np.log10(max(reynolds_number, 1.0))
    rows = [np.interp(at, _ROUGHNESS_RE, row) for row in _ROUGHNESS]
    return np.interp(diameter_ratio, _ROUGHNESS_BETA, rows) * 1e-4
