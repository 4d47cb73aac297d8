"""Signals: current over a range, pulses by quantity, and what counting pulses costs."""

from __future__ import annotations

from math import floor, isfinite, log10
from typing import Any

import numpy as np

from specsheet.methods.gum import RECTANGULAR

#: mantissas of a range value that reads well on a display
RANGE_SERIES = (1.0, 1.2, 1.5, 2.0, 2.5, 3.0, 4.0, 5.0, 6.0, 8.0, 10.0)
DECADES = (1.0, 10.0)


def round_up(*, value: float, series: tuple[float, ...] = RANGE_SERIES) -> float:
    """Return the smallest number ``series`` x 10^n that is not below ``value`` (above 0)."""
    if not (value > 0.0 and isfinite(value)):
        return value
    decade = 10.0 ** floor(log10(value))
    mantissa = value / decade
    for step in series:
        if mantissa <= step * (1.0 + 1e-12):
            return float(step * decade)
    return float(10.0 * decade)


def current(*, fraction: Any) -> Any:
    """Return the current of a 4 to 20 mA signal [A] at a share of the span [-]."""
    return 0.004 + 0.016 * fraction


def fraction(*, current: Any) -> Any:
    """Return the share of the span [-] at a current [A]; the inverse of :func:`current`."""
    return (current - 0.004) / 0.016


def counting_uncertainty(*, rate: Any, time: float) -> Any:
    """Return the relative standard uncertainty of counting at ``rate`` [Hz] for ``time`` [s].

    The count is whole, so it is off by less than one pulse either way: a rectangular
    distribution of half-width 1/(f t) (JCGM 100:2008, 4.3.7).
    """
    with np.errstate(all="ignore"):
        return 1.0 / (rate * time) / RECTANGULAR


def velocity_error(*, reading_error: Any, zero_velocity: Any, velocity: Any) -> Any:
    """Return the largest error of a velocity, relative [-]: of the reading, and of the zero.

    Args:
        reading_error: of the reading [-]
        zero_velocity: velocity that the zero may be off by [m/s]
        velocity: of either sign [m/s]

    Form common in the trade; no source.
    """
    return reading_error + zero_velocity / np.abs(velocity)
