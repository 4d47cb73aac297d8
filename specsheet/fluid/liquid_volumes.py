"""Fractions of a liquid by volume: volumes of the pure liquids at 15 degC, before mixing."""

from __future__ import annotations

from collections.abc import Mapping
from functools import lru_cache

from specsheet.findings import Finding
from specsheet.fluid import if97, library, names
from specsheet.fluid.lock import LOCK
from specsheet.fluid.model import note, stop

TEMPERATURE = 288.15

SAID = note(
    "fractions-by-liquid-volume",
    "fluid.basis",
    "The fractions by volume are taken as volumes of the pure liquids at 15 °C, before mixing.",
)


def masses(volumes: Mapping[str, float]) -> dict[str, float] | Finding:
    """Return the mass of each component from its volume, or the refusal where one is no liquid."""
    found = {}
    for key, volume in volumes.items():
        with LOCK:
            density = _density(key)
        if density is None:
            name = names.substances()[key].name
            text = (
                f"{name} is no liquid at 15 °C, so its fraction by volume of the liquid has no "
                "meaning: state the composition by mole or by mass."
            )
            return stop("fraction-basis", "fluid.basis", text)
        found[key] = volume * density
    return found


@lru_cache(maxsize=128)
def _density(key: str) -> float | None:
    """Return the density [kg/m3] of a pure liquid at 15 degC; None where there is none."""
    if key == "water":
        return if97.liquid_density(TEMPERATURE, 101325.0)
    item = names.substances()[key]
    module = library.fluids()
    state = module.AbstractState("HEOS", item.equation)
    try:
        state.update(module.QT_INPUTS, 0.0, TEMPERATURE)
        return float(state.rhomass())
    except library.ERRORS:
        return None
