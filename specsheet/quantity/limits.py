"""Bounds that belong to a kind: what no value of it can be, whatever the tag.

Whether a possible value is wise (a zero flow, a humidity of 140 %) is the business of the rooms
that know the tag.
"""

from __future__ import annotations

#: no quantity of this trade is larger or, unless zero, smaller [SI unit of the kind]
LARGEST = 1e30
SMALLEST = 1e-30

_NO_BOUND = (-LARGEST, LARGEST)
_FROM_ZERO = (0.0, LARGEST)
_ABOVE_ZERO = (SMALLEST, LARGEST)

_NOT_NEGATIVE = (
    "length roughness area volume time mass velocity pressure_absolute pressure_difference"
    " mass_flow volume_flow base_volume_flow energy_flow power frequency rotation conductivity"
    " ratio volume_energy money_rate"
)
_POSITIVE = (
    "temperature density dynamic_viscosity kinematic_viscosity heat_capacity"
    " thermal_conductivity molar_mass pulse_factor"
)

#: kind -> least and greatest SI value
_BOUNDS: dict[str, tuple[float, float]] = {
    **dict.fromkeys(_NOT_NEGATIVE.split(), _FROM_ZERO),
    **dict.fromkeys(_POSITIVE.split(), _ABOVE_ZERO),
    # No place of work has more air above it than 1.1 bar (common practice, no source).
    "pressure_gauge": (-1.1e5, LARGEST),
    # The air pressure that follows from it holds in the troposphere, up to 11 km (ISO 2533:1975).
    "elevation": (-5e3, 11e3),
}


def bounds(kind: str) -> tuple[float, float]:
    """Return the least and the greatest SI value that a kind can have, both allowed.

    A least value of :data:`SMALLEST` stands for "above zero".
    """
    return _BOUNDS.get(kind, _NO_BOUND)
