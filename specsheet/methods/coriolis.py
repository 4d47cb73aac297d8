"""Coriolis meters: error from base error and zero stability.

Source: ISO 10790 for the terms. Makers state the error in one of two forms, so there are two
functions; they differ most near the flow at which both parts are equal.
"""

from __future__ import annotations

from typing import Any

import numpy as np


def error_larger(*, base_error: Any, zero_stability: Any, mass_flow: Any) -> Any:
    """Return the larger of base error and zero stability by flow, relative [-].

    Args:
        base_error: of the reading [-]
        zero_stability: [kg/s]
        mass_flow: [kg/s]
    """
    return np.maximum(base_error, zero_stability / mass_flow)


def error_sum(*, base_error: Any, zero_stability: Any, mass_flow: Any) -> Any:
    """Return base error plus zero stability by flow, relative [-]; arguments as error_larger."""
    return base_error + zero_stability / mass_flow


def turndown_flow(*, base_error: Any, zero_stability: Any) -> Any:
    """Return the mass flow [kg/s] below which the zero stability outweighs the base error."""
    return zero_stability / base_error
