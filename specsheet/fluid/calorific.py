"""Calorific values of a composition: by mass for the fluid, by volume at a base condition."""

from __future__ import annotations

import re
from collections.abc import Mapping
from functools import cache, lru_cache

from specsheet import packs
from specsheet.fluid import names
from specsheet.fluid.model import GAS_CONSTANT, Method
from specsheet.fluid.state import Property
from specsheet.methods import calorific as method
from specsheet.quantity.value import Base
from specsheet.sources import cite

#: component and mole fraction
Composition = tuple[tuple[str, float], ...]

_ISO6976 = cite("iso6976")
_BY_MASS = Method("sum of the molar values of the components", _ISO6976, 0.001)
_BY_VOLUME = Method(
    "calorific value by mass times the real density at base",
    _ISO6976 + "; " + cite("coolprop"),
    0.002,
)
_WOBBE = Method("calorific value by the root of the relative density", _ISO6976, 0.002)
_RELATIVE = Method("density by that of dry air at the same base", _ISO6976, 0.001)

#: molar mass [kg/mol] of dry air and its compressibility factor at 101.325 kPa by temperature [K]
AIR_MOLAR_MASS = 0.02896546
_AIR_FACTOR = ((273.15, 0.999419), (288.15, 0.999595), (288.705, 0.999601), (293.15, 0.999645))


@cache
def _hydrogen(formula: str) -> int:
    """Return the atoms of hydrogen in a formula ("C4H10" -> 10)."""
    return sum(int(count or 1) for count in re.findall(r"H(?![a-z])(\d*)", formula))


def air_density(base: Base) -> float:
    """Return the density of dry air [kg/m3] at a base condition.

    Source: ISO 6976:2016, compressibility factors of air at 101.325 kPa, the deviation from one
    taken in proportion to the pressure and on straight lines over temperature.
    """
    temperatures = [item[0] for item in _AIR_FACTOR]
    factors = [item[1] for item in _AIR_FACTOR]
    factor = method.at_temperature(
        temperature=base.temperature, temperatures=temperatures, values=factors
    )
    real = 1.0 - (1.0 - factor) * base.pressure / 101325.0
    return base.pressure * AIR_MOLAR_MASS / (GAS_CONSTANT * base.temperature * real)


@lru_cache(maxsize=64)
def molar(composition: Composition, combustion_temperature: float) -> tuple[float, float] | None:
    """Return gross and net molar calorific value [J/mol]; None where a component is not listed."""
    table = packs.table("fluids/calorific")
    inert = table["inert"]
    temperatures = table["temperatures"]
    celsius = combustion_temperature - 273.15

    def at(key: str) -> float:
        values = table["gross"][key][: len(temperatures)]
        return 1e3 * method.at_temperature(
            temperature=celsius, temperatures=temperatures, values=values
        )

    if any(key not in inert and key not in table["gross"] for key, _ in composition):
        return None
    fractions = [fraction for _, fraction in composition]
    gross = method.molar_gross(
        fractions=fractions, gross=[0.0 if key in inert else at(key) for key, _ in composition]
    )
    net = method.molar_net(
        gross=gross,
        fractions=fractions,
        hydrogen=[
            0 if key in inert else _hydrogen(names.substances()[key].formula)
            for key, _ in composition
        ],
        condensation=at("water"),
    )
    return gross, net


def molar_mass(composition: Composition) -> float:
    """Return the molar mass [kg/mol]."""
    table = names.substances()
    return sum(fraction * table[key].molar_mass for key, fraction in composition)


def by_mass(composition: Composition, combustion_temperature: float) -> Mapping[str, Property]:
    """Return the calorific values by mass; nothing where the gas does not burn or is not listed."""
    found = molar(composition, combustion_temperature)
    if found is None or found[1] <= 0.0:
        return {}
    mass = molar_mass(composition)
    return {
        "gross_calorific_value_mass": _BY_MASS(found[0] / mass),
        "net_calorific_value_mass": _BY_MASS(found[1] / mass),
    }


def by_volume(
    composition: Composition, density: float, combustion_temperature: float, base: Base
) -> dict[str, Property]:
    """Return relative density, and calorific values and Wobbe index by volume at base.

    Args:
        composition: components and mole fractions.
        density: of the gas at ``base`` [kg/m3].
        combustion_temperature: [K]
        base: the base condition of the volume.
    """
    relative = density / air_density(base)
    values = {"relative_density": _RELATIVE(relative)}
    found = molar(composition, combustion_temperature)
    if found is not None and found[1] > 0.0:
        mass = molar_mass(composition)
        gross = found[0] / mass * density
        values["gross_calorific_value"] = _BY_VOLUME(gross)
        values["net_calorific_value"] = _BY_VOLUME(found[1] / mass * density)
        values["wobbe_index"] = _WOBBE(
            method.wobbe_index(calorific_value=gross, relative_density=relative)
        )
    return values
