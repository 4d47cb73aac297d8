"""Wedge meters: discharge coefficient and loss; β from the opening by :mod:`segment`.

Source: ISO 5167-6:2019 (limits, loss and table of ε published; C also in the draft of 2017). ε is
that of a nozzle with the same β. Floats or arrays (n,), SI.
"""

from __future__ import annotations

from typing import Any

UNCERTAINTY = 0.04
DIAMETERS = (0.05, 0.6)
HEIGHTS = (0.2, 0.6)
REYNOLDS = (1e4, 9e6)


def discharge_coefficient(*, diameter_ratio: Any) -> Any:
    """Return C = 0.77 - 0.09 β [-]."""
    return 0.77 - 0.09 * diameter_ratio


def loss_ratio(*, diameter_ratio: Any) -> Any:
    """Return the permanent loss by Δp: 1.09 - 0.79 β [-]."""
    return 1.09 - 0.79 * diameter_ratio
