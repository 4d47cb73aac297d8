"""Viscosity and thermal conductivity of mixtures.

The mixture model of the fluid library is not used: it is off by a quarter for hydrogen with carbon
dioxide, and by a factor of ten for liquids. Gases: Wilke at low density, raised to the true density
by the ratio that the components themselves show at the same molar density. Liquids: the logarithmic
rule of Grunberg and Nissan without interaction, a typical figure only.
"""

from __future__ import annotations

import math
from functools import lru_cache
from typing import Any

from specsheet.findings import Origin
from specsheet.fluid import library, names, transport
from specsheet.fluid.calorific import Composition
from specsheet.fluid.model import Method
from specsheet.fluid.state import Property
from specsheet.methods import gas_viscosity
from specsheet.sources import cite

_GAS = Method(
    "Wilke at low density, times the rise of the components with density",
    f"{cite('wilke')}; {cite('coolprop')}",
    0.04,
)
_DENSE_GAS = Method(_GAS.words, _GAS.source, 0.15)
_CONDUCTIVITY = Method(
    "Wassiljewa with the factors of Mason and Saxena, low density", cite("mason-saxena"), 0.1
)
_LIQUID = Method("logarithmic rule of the components", cite("grunberg"), 0.15, Origin.TYPICAL)


@lru_cache(maxsize=64)
def _gas_state(equation: str) -> Any:
    """Return a state object held in the gas, for the transport models of one component."""
    module = library.fluids()
    state = module.AbstractState("HEOS", equation)
    state.specify_phase(module.iphase_gas)
    return state


@lru_cache(maxsize=512)
def dilute_viscosity(key: str, temperature: float) -> float:
    """Return the viscosity [Pa s] of a component at low density."""
    item = names.substances()[key]
    found = viscosity_at(key, temperature, 1e-3)
    return transport.dilute(item, temperature).value if found is None else found


@lru_cache(maxsize=512)
def dilute_conductivity(key: str, temperature: float) -> float | None:
    """Return the thermal conductivity [W/m/K] of a component at low density; None if unknown."""
    state = _gas_state(names.substances()[key].equation)
    try:
        state.update(library.fluids().DmolarT_INPUTS, 1e-3, temperature)
        found = float(state.conductivity())
    except library.ERRORS:
        return None
    return found if math.isfinite(found) and found > 0.0 else None


def viscosity_at(key: str, temperature: float, density: float) -> float | None:
    """Return the viscosity [Pa s] of a component at a molar density [mol/m3]; None if unknown."""
    equation = names.substances()[key].equation
    if not transport.has_model(equation):
        return None
    state = _gas_state(equation)
    try:
        state.update(library.fluids().DmolarT_INPUTS, density, temperature)
        found = float(state.viscosity())
    except library.ERRORS:
        return None
    return found if math.isfinite(found) and found > 0.0 else None


def gas(
    composition: Composition,
    temperature: float,
    molar_density: float,
    density: float,
    *,
    dense: bool,
) -> dict[str, Property]:
    """Return viscosity, kinematic viscosity and conductivity of a gas mixture.

    Args:
        composition: components and mole fractions.
        temperature: [K]
        molar_density: of the mixture [mol/m3].
        density: of the mixture [kg/m3].
        dense: whether it is more than half as dense as at the critical point.
    """
    method = _DENSE_GAS if dense else _GAS
    table = names.substances()
    fractions = [fraction for _, fraction in composition]
    masses = [table[key].molar_mass for key, _ in composition]
    pure = [dilute_viscosity(key, temperature) for key, _ in composition]
    mixed = gas_viscosity.wilke(fractions=fractions, viscosities=pure, molar_masses=masses)
    viscosity = mixed * _rise(composition, temperature, molar_density, pure)
    values = {
        "viscosity": method(viscosity),
        "kinematic_viscosity": method(viscosity / density),
    }
    conductivities = [dilute_conductivity(key, temperature) for key, _ in composition]
    known = [value for value in conductivities if value is not None]
    if len(known) == len(conductivities):
        values["thermal_conductivity"] = _CONDUCTIVITY(
            gas_viscosity.wassiljewa(
                fractions=fractions, conductivities=known, viscosities=pure, molar_masses=masses
            )
        )
    return values


def _rise(
    composition: Composition, temperature: float, molar_density: float, dilute: list[float]
) -> float:
    """Return the rise of viscosity with density, averaged over the components that have a model."""
    total, weight = 0.0, 0.0
    for (key, fraction), low in zip(composition, dilute, strict=True):
        if fraction < 1e-3:
            continue
        high = viscosity_at(key, temperature, molar_density)
        if high is not None and 0.5 < high / low < 10.0:
            total += fraction * math.log(high / low)
            weight += fraction
    return math.exp(total / weight) if weight > 0.0 else 1.0


#: components that bind to each other, so that their liquids mix far from ideally
_POLAR = frozenset({"water", "methanol", "ethanol", "ammonia", "acetone", "propylene_glycol"})


def is_polar(composition: Composition) -> bool:
    """Tell whether a liquid has a polar component to speak of."""
    return any(key in _POLAR and fraction > 0.01 for key, fraction in composition)


def liquid(
    composition: Composition, temperature: float, pressure: float, density: float
) -> dict[str, Property]:
    """Return viscosity and kinematic viscosity of a liquid mixture, typical; nothing if unknown."""
    if is_polar(composition):
        return {}  # water thickens alcohol twofold; no rule without measurements sees that
    total = 0.0
    for key, fraction in composition:
        found = _liquid_viscosity(key, temperature, pressure)
        if found is None:
            return {}
        total += fraction * math.log(found)
    viscosity = math.exp(total)
    return {
        "viscosity": _LIQUID(viscosity),
        "kinematic_viscosity": _LIQUID(viscosity / density),
    }


@lru_cache(maxsize=128)
def _liquid_viscosity(key: str, temperature: float, pressure: float) -> float | None:
    """Return the viscosity [Pa s] of a component as liquid; its gas where it cannot be one."""
    item = names.substances()[key]
    module = library.fluids()
    try:
        state = module.AbstractState("HEOS", item.equation)
        state.update(module.PT_INPUTS, pressure, temperature)
        if state.rhomolar() < state.rhomolar_critical() and temperature < item.critical_temperature:
            state.update(module.QT_INPUTS, 0.0, temperature)
        found = float(state.viscosity())
    except library.ERRORS:
        return None
    return found if math.isfinite(found) and found > 0.0 else None
