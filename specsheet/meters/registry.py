"""The registry: key of a family -> its module, imported only when it is asked for."""

from __future__ import annotations

from functools import cache
from importlib import import_module
from typing import TYPE_CHECKING

if TYPE_CHECKING:  # the list of families is wanted without numpy
    from specsheet.meters.family import Family

#: key -> module; a test holds it to the folder and to the profiles
MODULES = {
    key: f"specsheet.meters.{key}"
    for key in (
        # Differential pressure
        "orifice_concentric",
        "venturi_tube",
        "orifice_eccentric",
        "orifice_segmental",
        "orifice_quarter_circle",
        "orifice_conical_entrance",
        "nozzle_isa_1932",
        "nozzle_long_radius",
        "nozzle_venturi",
        "dall_tube",
        "cone",
        "wedge",
        "nozzle_critical",
        "pitot_tube",
        "pitot_averaging",
        "probe_multihole",
        "laminar_element",
        "variable_area_float",
        "variable_area_spring",
        # Oscillating
        "vortex",
        # Electromagnetic
        "magnetic",
        # Rotating and displacement
        "turbine_axial",
        "gear_oval",
        "piston_rotary",
        "disc_nutating",
        # Acoustic
        "ultrasonic_transit",
        # Mass
        "coriolis",
        "thermal_inline",
    )
}


@cache
def family(key: str) -> Family | None:
    """Return a family by its key, or None where there is none of that name."""
    module = MODULES.get(key)
    if module is None:
        return None
    found: Family = import_module(module).FAMILY
    return found
