"""Transit-time ultrasonic meters: times along a path, velocity and sound speed back from them.

Sources: ISO 12242 and ISO 17089 for the path equations (from memory); the profile factor of a
diametral path in turbulent flow is a textbook form (from memory).
"""

from __future__ import annotations

from typing import Any

import numpy as np

from specsheet.methods.duct import LAMINAR, TURBULENT


def transit_time(*, path_length: Any, sound_speed: Any, velocity: Any, angle: Any) -> Any:
    """Return the time along a path [s]; a negative ``velocity`` gives the way upstream.

    Args:
        path_length: [m]
        sound_speed: of the fluid [m/s]
        velocity: mean axial velocity along the path [m/s]
        angle: between path and axis of the pipe [rad]
    """
    return path_length / (sound_speed + velocity * np.cos(angle))


def time_difference(*, path_length: Any, sound_speed: Any, velocity: Any, angle: Any) -> Any:
    """Return the time upstream minus the time downstream [s]; arguments as transit_time.

    2 L v cos φ / (c² - v² cos² φ), free of the cancellation of two nearly equal times.
    """
    along = velocity * np.cos(angle)
    return 2.0 * path_length * along / (sound_speed**2 - along**2)


def velocity(*, upstream_time: Any, downstream_time: Any, path_length: Any, angle: Any) -> Any:
    """Return the velocity along the path L / (2 cos φ) (1/td - 1/tu) [m/s]."""
    return path_length / (2.0 * np.cos(angle)) * (1.0 / downstream_time - 1.0 / upstream_time)


def sound_speed(*, upstream_time: Any, downstream_time: Any, path_length: Any) -> Any:
    """Return the sound speed L / 2 (1/td + 1/tu) [m/s]."""
    return path_length / 2.0 * (1.0 / downstream_time + 1.0 / upstream_time)


def profile_factor(*, reynolds_number: Any) -> Any:
    """Return mean velocity in the pipe by mean velocity along a diameter [-].

    3/4 in laminar flow (exact); 1 / (1.119 - 0.011 lg Re) in turbulent flow, from memory; between
    Re = 2000 and 4000 a straight line in log(Re), for there the profile is undecided.
    """
    re = np.maximum(reynolds_number, 1e-9)
    turbulent = 1.0 / (1.119 - 0.011 * np.log10(np.maximum(re, TURBULENT)))
    weight = np.clip(np.log(re / LAMINAR) / np.log(TURBULENT / LAMINAR), 0.0, 1.0)
    return 0.75 * (1.0 - weight) + turbulent * weight


def refracted_angle(*, angle: Any, sound_speed: Any, wedge_sound_speed: Any) -> Any:
    """Return the angle to the normal of the wall [rad] in the fluid, by Snell's law.

    The wall lies parallel between wedge and fluid and drops out. NaN where the sound is totally
    reflected.

    Args:
        angle: in the wedge, to the normal of the wall [rad]
        sound_speed: of the fluid [m/s]
        wedge_sound_speed: of the wedge [m/s]
    """
    return np.arcsin(np.sin(angle) * sound_speed / wedge_sound_speed)
