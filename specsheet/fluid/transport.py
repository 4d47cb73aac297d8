"""Viscosity and thermal conductivity of pure substances, with a stand-in where no model exists."""

from __future__ import annotations

import math
from functools import lru_cache
from typing import Any

from specsheet import packs
from specsheet.findings import Origin
from specsheet.fluid import library
from specsheet.fluid.model import Method
from specsheet.fluid.names import Substance
from specsheet.fluid.phases import LIQUID
from specsheet.fluid.state import Property
from specsheet.methods import gas_viscosity
from specsheet.sources import cite

_SOURCE = cite("coolprop")
_VISCOSITY = Method("reference viscosity model", _SOURCE, 0.03)
#: substances whose models stray from published tables by more than others do
_LOOSE = Method("viscosity model, known to some 5 %", _SOURCE, 0.05)
_LOOSE_KEYS = frozenset({"ammonia", "hydrogen_sulfide", "sulfur_dioxide"})
_NUDGED = Method("viscosity model, mean of two near temperatures", _SOURCE, 0.05)
_TABLE = Method("handbook equation", cite("perry8", "tables 2-312 and 2-313"), 0.08)
_STATES = Method("corresponding states", cite("yoon-thodos"), 0.15, Origin.TYPICAL)
_CONDUCTIVITY = Method("reference conductivity model", _SOURCE, 0.05)


def pure(
    item: Substance, state: Any, phase: str, temperature: float, density: float
) -> dict[str, Property]:
    """Return viscosity, kinematic viscosity and conductivity of a state object as it stands."""
    values: dict[str, Property] = {}
    viscosity = _viscosity(item, state, phase, temperature, density)
    if viscosity is not None:
        values["viscosity"] = viscosity
        values["kinematic_viscosity"] = Property(
            viscosity.value / density,
            viscosity.origin,
            viscosity.method,
            viscosity.source,
            viscosity.uncertainty,
        )
    try:
        conductivity = state.conductivity()
    except library.ERRORS:
        return values
    if math.isfinite(conductivity) and conductivity > 0.0:
        values["thermal_conductivity"] = _CONDUCTIVITY(conductivity)
    return values


def _viscosity(
    item: Substance, state: Any, phase: str, temperature: float, density: float
) -> Property | None:
    try:
        value = state.viscosity()
        if math.isfinite(value) and value > 0.0:
            return (_LOOSE if item.key in _LOOSE_KEYS else _VISCOSITY)(value)
    except library.ERRORS:
        pass
    nudged = _nudged(item.equation, temperature, density)
    if nudged is not None:
        return _NUDGED(nudged)
    if phase == LIQUID:
        return _liquid(item.key, temperature)
    return dilute(item, temperature)


def _nudged(equation: str, temperature: float, density: float) -> float | None:
    """Return the mean of the viscosities a little below and above, where a model stumbles."""
    if not has_model(equation):
        return None
    module = library.fluids()
    state = module.AbstractState("HEOS", equation)
    found = []
    for factor in (0.999, 1.001):
        try:
            state.update(module.DmassT_INPUTS, density, temperature * factor)
            found.append(float(state.viscosity()))
        except library.ERRORS:
            continue
    sound = [value for value in found if math.isfinite(value) and value > 0.0]
    return sum(sound) / len(sound) if sound else None


@lru_cache(maxsize=256)
def has_model(equation: str) -> bool:
    """Tell whether the fluid library has a viscosity model for an equation of state."""
    module = library.fluids()
    state = module.AbstractState("HEOS", equation)
    try:
        state.specify_phase(module.iphase_gas)
        state.update(module.DmolarT_INPUTS, 1e-3, min(0.9 * state.Tmax(), 400.0))
        return bool(state.viscosity() > 0.0)
    except library.ERRORS:
        return False


def _liquid(key: str, temperature: float) -> Property | None:
    row = packs.table("fluids/viscosity")["liquid"].get(key)
    if row is None or not row[5] <= temperature <= row[6]:
        return None
    return _TABLE(
        gas_viscosity.liquid_equation(
            temperature=temperature, c1=row[0], c2=row[1], c3=row[2], c4=row[3], c5=row[4]
        )
    )


def dilute(item: Substance, temperature: float) -> Property:
    """Return the viscosity of a vapour at low pressure by handbook or corresponding states."""
    row = packs.table("fluids/viscosity")["gas"].get(item.key)
    if row is not None and row[4] <= temperature <= row[5]:
        return _TABLE(
            gas_viscosity.vapour_equation(
                temperature=temperature, c1=row[0], c2=row[1], c3=row[2], c4=row[3]
            )
        )
    return _STATES(
        gas_viscosity.yoon_thodos(
            temperature=temperature,
            critical_temperature=item.critical_temperature,
            critical_pressure=item.critical_pressure,
            molar_mass=item.molar_mass,
        )
    )
