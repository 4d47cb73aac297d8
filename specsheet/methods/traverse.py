"""Where to measure in a duct so that the plain mean of the velocities is the mean velocity.

Sources: ISO 3966, ISO 5802:2001 (positions in the tests). Positions count from the wall, by the
diameter or the side of the duct; every position has the same weight.
"""

from __future__ import annotations

LOG_LINEAR = "log-linear"
LOG_TCHEBYCHEFF = "log-Tchebycheff"

#: rule, points on a radius -> distances from the wall by D, from the wall to the axis
_ROUND = {
    (LOG_LINEAR, 3): (0.032, 0.135, 0.321),
    (LOG_LINEAR, 4): (0.021, 0.117, 0.184, 0.345),
    (LOG_LINEAR, 5): (0.019, 0.077, 0.153, 0.217, 0.361),
    (LOG_TCHEBYCHEFF, 3): (0.032, 0.137, 0.312),
    (LOG_TCHEBYCHEFF, 4): (0.024, 0.100, 0.194, 0.334),
    (LOG_TCHEBYCHEFF, 5): (0.019, 0.076, 0.155, 0.205, 0.357),
}

#: lines across a rectangular duct -> distances from one wall by the side (log-Tchebycheff)
_RECTANGULAR = {
    5: (0.074, 0.288, 0.500),
    6: (0.061, 0.235, 0.437),
    7: (0.053, 0.203, 0.366, 0.500),
}


def points_on_radius(rule: str = LOG_LINEAR) -> tuple[int, ...]:
    """Return how many points on a radius the rule has positions for."""
    return tuple(sorted(count for name, count in _ROUND if name == rule))


def round_duct(*, rule: str, points: int) -> tuple[float, ...]:
    """Return the positions along a whole diameter, from wall to wall, by D.

    Args:
        rule: "log-linear" or "log-Tchebycheff"
        points: on a radius, 3 to 5

    Raises:
        KeyError: the rule has no such number of points.
    """
    near = _ROUND[rule, points]
    return (*near, *(1.0 - distance for distance in reversed(near)))


def rectangular_duct(*, lines: int) -> tuple[float, ...]:
    """Return the positions of the lines across a side, from wall to wall, by the side.

    Raises:
        KeyError: there are positions for 5, 6 and 7 lines.
    """
    near = _RECTANGULAR[lines]
    far = tuple(1.0 - distance for distance in reversed(near) if distance != 0.5)
    return (*near, *far)
