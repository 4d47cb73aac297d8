"""Nozzles and Venturi nozzles: discharge coefficient, expansibility, loss, uncertainty.

Source: ISO 5167-3:2003 (tables of annex A in the tests; limits partly from memory). The
expansibility also serves Venturi tubes (ISO 5167-4:2003, 5.6) and wedges (ISO 5167-6:2019).
Floats or arrays of shape (n,), SI.
"""

from __future__ import annotations

from typing import Any

import numpy as np

#: smallest Δp/p1 told from none
_NOTHING = 1e-300
#: too little to change any exponent but one of nothing
_LESS = 1e-305


def expansibility(
    *, diameter_ratio: Any, pressure_drop_ratio: Any, isentropic_exponent: Any
) -> Any:
    """Return ε of adiabatic flow in a nozzle [-] (5.1.6.3).

    ε² = κ τ^(2/κ)/(κ - 1) * (1 - β⁴)/(1 - β⁴ τ^(2/κ)) * (1 - τ^((κ-1)/κ))/(1 - τ), written so
    that it stays exact near τ = 1 and κ = 1.

    Args:
        diameter_ratio: β [-]
        pressure_drop_ratio: 1 - τ = Δp/p1, 0 to below 1 [-]
        isentropic_exponent: κ [-]
    """
    beta2 = diameter_ratio * diameter_ratio
    beta4 = beta2 * beta2
    drop = np.maximum(pressure_drop_ratio, _NOTHING)
    log_tau = np.log1p(-drop)
    share = log_tau / isentropic_exponent
    contraction = np.exp(2.0 * share)
    exponent = log_tau - share - _LESS  # where κ = 1 it would be nothing, and divide nothing
    work = np.expm1(exponent) / exponent * log_tau / -drop
    return np.sqrt(contraction * (1.0 - beta4) / (1.0 - beta4 * contraction) * work)


def isa_1932_coefficient(*, diameter_ratio: Any, reynolds_number: Any) -> Any:
    """Return C of an ISA 1932 nozzle [-] (5.1.6.2), on ReD.

    0.9900 - 0.2262 β^4.1 - (0.00175 β² - 0.0033 β^4.15) (10⁶/ReD)^1.15
    """
    beta = diameter_ratio
    bracket = 0.00175 * beta**2 - 0.0033 * beta**4.15
    return 0.99 - 0.2262 * beta**4.1 - bracket * (1e6 / reynolds_number) ** 1.15


def long_radius_coefficient(*, diameter_ratio: Any, reynolds_number: Any) -> Any:
    """Return C = 0.9965 - 0.00653 sqrt(10⁶ β/ReD) of a long radius nozzle [-] (5.2.6.2)."""
    return 0.9965 - 0.00653 * np.sqrt(1e6 * diameter_ratio / reynolds_number)


def venturi_nozzle_coefficient(*, diameter_ratio: Any) -> Any:
    """Return C = 0.9858 - 0.196 β^4.5 of a Venturi nozzle [-] (5.3.4.2)."""
    return 0.9858 - 0.196 * diameter_ratio**4.5


def isa_1932_uncertainty(*, diameter_ratio: Any) -> Any:
    """Return the relative expanded uncertainty of C, k = 2 [-]: 0.8 %, above 0.6 (2 β - 0.4) %."""
    return np.maximum(0.8, 2.0 * diameter_ratio - 0.4) / 100.0


def venturi_nozzle_uncertainty(*, diameter_ratio: Any) -> Any:
    """Return the relative expanded uncertainty of C: (1.2 + 1.5 β⁴) %, k = 2 [-]."""
    return (1.2 + 1.5 * diameter_ratio**4) / 100.0


def expansibility_uncertainty(*, pressure_drop_ratio: Any) -> Any:
    """Return the relative expanded uncertainty of ε of a nozzle: 2 Δp/p1 %, k = 2 [-]."""
    return 0.02 * pressure_drop_ratio


def venturi_nozzle_expansibility_uncertainty(
    *, diameter_ratio: Any, pressure_drop_ratio: Any
) -> Any:
    """Return that of a Venturi nozzle or tube: (4 + 100 β⁸) Δp/p1 %, k = 2 [-].

    The same in ISO 5167-4:2003, 5.7.2.
    """
    return (0.04 + _eighth(diameter_ratio)) * pressure_drop_ratio


def _eighth(ratio: Any) -> Any:
    square = ratio * ratio
    fourth = square * square
    return fourth * fourth
