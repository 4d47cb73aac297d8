"""Slurries: density and viscosity of solids in a liquid.

Source: D. G. Thomas, J. Colloid Sci. 20 (1965) 267 (viscosity; from memory).
"""

from __future__ import annotations

import math


def volume_fraction(*, mass_fraction: float, solids_density: float, liquid_density: float) -> float:
    """Return solids by volume [-] from solids by mass [-] and the densities [kg/m3]."""
    solids = mass_fraction / solids_density
    return solids / (solids + (1.0 - mass_fraction) / liquid_density)


def density(*, volume_fraction: float, solids_density: float, liquid_density: float) -> float:
    """Return the density of a slurry [kg/m3] from solids by volume [-] and the densities."""
    return volume_fraction * solids_density + (1.0 - volume_fraction) * liquid_density


def relative_viscosity(volume_fraction: float) -> float:
    """Return the viscosity of a slurry of spheres by that of its liquid [-].

    Args:
        volume_fraction: solids by volume [-], to 0.6; they must not form a network.
    """
    fraction = volume_fraction
    return 1.0 + 2.5 * fraction + 10.05 * fraction**2 + 0.00273 * math.exp(16.6 * fraction)
