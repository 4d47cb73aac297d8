"""A circle cut by a chord: area of the segment below it, for segmental plates and wedges.

Plain geometry; ISO 5167-6:2019 uses it for the diameter ratio of a wedge. Floats or arrays (n,).
"""

from __future__ import annotations

from typing import Any

import numpy as np

_ROUNDS = 60


def area_ratio(*, height_ratio: Any) -> Any:
    """Return the area of a segment of height h by that of the circle, from h/D, 0 to 1 [-].

    (acos(1 - 2 h/D) - 2 (1 - 2 h/D) sqrt(h/D - (h/D)²)) / π
    """
    chord = 1.0 - 2.0 * height_ratio
    half = np.sqrt(np.maximum(height_ratio - height_ratio * height_ratio, 0.0))
    return (np.arccos(chord) - 2.0 * chord * half) / np.pi


def height_ratio(*, area_ratio: Any) -> Any:
    """Return h/D [-] of a segment with that share of the circle's area, 0 to 1 [-].

    Newton on the half angle t, where area = (t - sin t cos t)/π and h/D = (1 - cos t)/2; it starts
    from 2 t³/(3 π), which the area comes to in a small segment, and falls onto the root from above.
    """
    share = np.asarray(area_ratio, dtype=np.float64)
    small = np.minimum(share, 1.0 - share)
    angle = np.cbrt(1.5 * np.pi * small)
    for _ in range(_ROUNDS):
        sine = np.sin(angle)
        excess = angle - sine * np.cos(angle) - np.pi * small
        step = excess / np.maximum(2.0 * sine * sine, 1e-300)
        angle = angle - step
        if not (np.abs(step) > 1e-15 * np.abs(angle)).any():
            break
    height = np.sin(angle / 2.0) ** 2
    return np.where(share <= 0.5, height, 1.0 - height)


def diameter_ratio(*, height_ratio: Any) -> Any:
    """Return β = sqrt(area ratio) [-] from h/D."""
    return np.sqrt(area_ratio(height_ratio=height_ratio))


def height_of_ratio(*, diameter_ratio: Any) -> Any:
    """Return h/D [-] from β; the inverse of :func:`diameter_ratio`."""
    return height_ratio(area_ratio=diameter_ratio * diameter_ratio)
