"""The orifice plate as a piece of steel: thickness, bending, drain and vent holes.

Sources: ISO 5167-2:2003, 5.1.5 (thickness E and e, bevel); ISO/TR 9464 (bending; from memory);
ISO/TR 15377:1998 (drain hole; from memory). SI.
"""

from __future__ import annotations

from typing import Any

import numpy as np

#: usual sheet thicknesses [m] (common practice, no source)
THICKNESSES = (0.003, 0.004, 0.005, 0.006, 0.008, 0.010, 0.012, 0.015, 0.020, 0.025, 0.030, 0.040)

#: a drain or vent hole is not to be wider than this share of the bore [-]
LARGEST_HOLE = 0.1


def largest_thickness(*, inside_diameter: float) -> float:
    """Return the largest plate thickness E [m]: 0.05 D, 3.2 mm in pipes up to 64 mm (5.1.5.3)."""
    return (
        max(0.05 * inside_diameter, 0.0032)
        if inside_diameter <= 0.064
        else (0.05 * inside_diameter)
    )


def edge_thickness(*, inside_diameter: float, thickness: float) -> float:
    """Return a cylindrical edge thickness e [m] between 0.005 D and 0.02 D (5.1.5.1), rounded.

    The whole plate where it is thin enough; otherwise near 0.015 D, in tenths of a millimetre.
    """
    if thickness <= 0.02 * inside_diameter:
        return thickness
    return float(np.floor(0.015 * inside_diameter * 1e4) / 1e4)


def bending_stress(
    *, differential_pressure: Any, diameter_ratio: Any, support_diameter: Any, thickness: Any
) -> Any:
    """Return the bending stress in the plate [Pa]: Δp (0.681 - 0.651 β) (D'/E)².

    ISO/TR 9464 gives E/D' > sqrt(Δp (0.681 - 0.651 β)/σy) against lasting bending (from memory).

    Args:
        differential_pressure: largest Δp across the plate [Pa]
        diameter_ratio: β [-]
        support_diameter: diameter D' at which the plate is held [m]
        thickness: E [m]
    """
    slender = support_diameter / thickness
    return differential_pressure * (0.681 - 0.651 * diameter_ratio) * slender * slender


def bending_error(
    *,
    differential_pressure: Any,
    diameter_ratio: Any,
    support_diameter: Any,
    thickness: Any,
    elastic_modulus: Any,
) -> Any:
    """Return the relative error of flow by elastic bending of the plate [-]; negative reads low.

    -(Δp/Ey) (D'/E)² (a D'/E - b), a = β (13.5 - 15.5 β), b = 117 - 106 β^1.3, in per cent / 100
    (ISO/TR 9464, from memory).

    Args:
        differential_pressure, diameter_ratio, support_diameter, thickness: as for
            :func:`bending_stress`.
        elastic_modulus: of the plate Ey [Pa]
    """
    beta = diameter_ratio
    slender = support_diameter / thickness
    a = beta * (13.5 - 15.5 * beta)
    b = 117.0 - 106.0 * beta**1.3
    percent = differential_pressure / elastic_modulus * slender**2 * (a * slender - b)
    return -percent / 100.0


def effective_bore(*, bore: Any, hole: Any) -> Any:
    """Return the bore that counts [m] of a plate with a drain or vent hole.

    d = dm (1 + 0.55 (dk/dm)²) for dk up to 0.1 dm (ISO/TR 15377:1998, from memory).

    Args:
        bore: measured, dm [m]
        hole: diameter of the hole, dk [m]
    """
    return bore + 0.55 * hole * hole / bore


def measured_bore(*, effective: Any, hole: Any) -> Any:
    """Return the bore to be machined [m]; the inverse of :func:`effective_bore`."""
    return 0.5 * (effective + np.sqrt(effective * effective - 2.2 * hole * hole))
