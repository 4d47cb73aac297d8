"""Classical Venturi tubes: discharge coefficient, its limits of use, uncertainty.

Source: ISO 5167-4:2003, 5.5 to 5.9 (published values in the tests where seen; the limits of the
"as cast" tube and the loss are from memory). Floats or arrays of shape (n,), SI.
"""

from __future__ import annotations

from dataclasses import dataclass
from typing import Any

import numpy as np


@dataclass(frozen=True, slots=True)
class Venturi:
    """One make of the convergent.

    Attributes:
        discharge_coefficient: C, constant within the limits [-]
        uncertainty: relative expanded uncertainty of C, k = 2 [-]
        diameter: smallest and largest D [m]
        ratio: smallest and largest β [-]
        reynolds: smallest and largest ReD [-]
        clause: where it stands
    """

    discharge_coefficient: float
    uncertainty: float
    diameter: tuple[float, float]
    ratio: tuple[float, float]
    reynolds: tuple[float, float]
    clause: str


VENTURIS = {
    "as cast": Venturi(0.984, 0.007, (0.1, 0.8), (0.3, 0.75), (2e5, 2e6), "5.5.2"),
    "machined convergent": Venturi(0.995, 0.010, (0.05, 0.25), (0.4, 0.75), (2e5, 1e6), "5.5.3"),
    "welded sheet iron": Venturi(0.985, 0.015, (0.2, 1.2), (0.4, 0.7), (2e5, 2e6), "5.5.4"),
}


def loss_ratio(*, diameter_ratio: Any, divergent_angle: float) -> Any:
    """Return the permanent loss by Δp [-] of a classical Venturi tube.

    0.218 - 0.42 β + 0.38 β² for a divergent of 7°, 0.436 - 0.86 β + 0.59 β² for 15°, linear in
    the angle between them (handbook fit, from memory; 5.9 names 5 % to 20 % as usual).

    Args:
        diameter_ratio: β [-]
        divergent_angle: included angle of the divergent, 7° to 15° [rad]
    """
    beta = diameter_ratio
    gentle = 0.218 - 0.42 * beta + 0.38 * beta * beta
    steep = 0.436 - 0.86 * beta + 0.59 * beta * beta
    share = (np.rad2deg(divergent_angle) - 7.0) / 8.0
    return gentle + (steep - gentle) * np.clip(share, 0.0, 1.0)


#: construction -> ReD, C and its uncertainty [%] below the limits of use (annex B, informative;
#: from memory); the last node is the limit, joined to the constant of 5.5
_LOW_REYNOLDS = {
    "as cast": (
        (4e4, 6e4, 1e5, 1.5e5, 2e5),
        (0.957, 0.966, 0.976, 0.982, 0.984),
        (2.5, 2.0, 1.5, 1.0, 0.7),
    ),
    "machined convergent": ((5e4, 1e5, 2e5), (0.970, 0.977, 0.995), (3.0, 2.5, 1.0)),
    "welded sheet iron": (
        (4e4, 6e4, 1e5, 2e5),
        (0.960, 0.970, 0.980, 0.985),
        (3.0, 2.5, 2.5, 1.5),
    ),
}


def uncertainty(*, construction: str, reynolds_number: Any) -> Any:
    """Return the relative expanded uncertainty of the constant C, k = 2 [-].

    That of 5.5 within the limits of use. Below them C falls, which annex B estimates: the
    uncertainty of that estimate and its distance from the constant are added.

    Args:
        construction: key of :data:`VENTURIS`
        reynolds_number: ReD [-]
    """
    make = VENTURIS[construction]
    nodes, coefficients, percents = _LOW_REYNOLDS[construction]
    at = np.log(reynolds_number)
    expected = np.interp(at, np.log(nodes), coefficients)
    doubt = np.interp(at, np.log(nodes), percents) / 100.0
    return doubt + abs(make.discharge_coefficient - expected) / make.discharge_coefficient
