"""The pipe a meter goes into."""

from __future__ import annotations

from dataclasses import dataclass


@dataclass(frozen=True, slots=True)
class Pipe:
    """The pipe the meter goes into.

    Attributes:
        inside_diameter: at 20 °C [m]
        wall: [m], NaN if unknown
        expansion: linear coefficient of thermal expansion [1/K]
        roughness: uniform equivalent roughness [m], NaN if unknown
        size: nominal size as text ("DN 150"), or ""
        nominal: nominal diameter as DN number, 0 if unknown
        material: name of the material
    """

    inside_diameter: float
    wall: float
    expansion: float
    roughness: float
    size: str
    nominal: int
    material: str
