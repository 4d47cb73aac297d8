"""Loss of a concentric reducer before a smaller meter and of the expander behind it.

Crane, Flow of Fluids (Technical Paper 410), gradual contraction and enlargement, from memory.
Both coefficients refer to the velocity in the smaller bore.
"""

from __future__ import annotations

from typing import Any

import numpy as np

#: half of the included angle up to which the gradual forms hold [rad]
_STEEP = np.pi / 8.0


def contraction_coefficient(*, diameter_ratio: Any, angle: float) -> Any:
    """Return the loss coefficient of a reducer [-], on the smaller bore.

    Args:
        diameter_ratio: smaller bore by larger bore, 0 to 1 [-]
        angle: included angle of the cone, above 0, up to pi [rad]

    0.8 sin(θ/2) (1 - β²) up to 45°, 0.5 sqrt(sin(θ/2)) (1 - β²) above.
    """
    sine = np.sin(angle / 2.0)
    factor = 0.8 * sine if angle / 2.0 <= _STEEP else 0.5 * np.sqrt(sine)
    return factor * (1.0 - diameter_ratio**2)


def enlargement_coefficient(*, diameter_ratio: Any, angle: float) -> Any:
    """Return the loss coefficient of an expander [-], on the smaller bore.

    Args:
        diameter_ratio: smaller bore by larger bore, 0 to 1 [-]
        angle: included angle of the cone, above 0, up to pi [rad]

    2.6 sin(θ/2) (1 - β²)² up to 45°, (1 - β²)² above (sudden, Borda-Carnot).
    """
    factor = 2.6 * np.sin(angle / 2.0) if angle / 2.0 <= _STEEP else 1.0
    return factor * (1.0 - diameter_ratio**2) ** 2
