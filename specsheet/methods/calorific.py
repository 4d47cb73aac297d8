"""Calorific values and Wobbe index of a gas from its composition (ISO 6976:2016).

The molar values of table 3 stand in ``profiles/fluids/calorific.toml``.
"""

from __future__ import annotations

from collections.abc import Sequence


def at_temperature(
    *, temperature: float, temperatures: Sequence[float], values: Sequence[float]
) -> float:
    """Return a molar calorific value at a combustion temperature, between those of the table.

    Args:
        temperature: combustion temperature, in the unit of ``temperatures``; held at the ends.
        temperatures: rising.
        values: at ``temperatures``, in any unit.

    Source: ISO 6976:2016, table 3, which has 0, 15, 15.55, 20 and 25 degC; straight lines between.
    """
    if temperature <= temperatures[0]:
        return values[0]
    for low, high, first, last in zip(
        temperatures, temperatures[1:], values, values[1:], strict=False
    ):
        if temperature <= high:
            return first + (last - first) * (temperature - low) / (high - low)
    return values[-1]


def molar_gross(*, fractions: Sequence[float], gross: Sequence[float]) -> float:
    """Return the molar gross calorific value of a mixture as an ideal gas.

    Args:
        fractions: mole fractions [-].
        gross: molar gross calorific values [J/mol].

    Source: ISO 6976:2016, equation 2.
    """
    return sum(x * h for x, h in zip(fractions, gross, strict=True))


def molar_net(
    *, gross: float, fractions: Sequence[float], hydrogen: Sequence[int], condensation: float
) -> float:
    """Return the molar net calorific value [J/mol] of a mixture.

    Args:
        gross: molar gross calorific value [J/mol].
        fractions: mole fractions [-].
        hydrogen: atoms of hydrogen in each molecule.
        condensation: molar heat of condensation of water at the combustion temperature [J/mol].

    Source: ISO 6976:2016, equation 3.
    """
    atoms = sum(x * count for x, count in zip(fractions, hydrogen, strict=True))
    return gross - condensation * atoms / 2.0


def wobbe_index(*, calorific_value: float, relative_density: float) -> float:
    """Return the Wobbe index, in the unit of the calorific value by volume.

    Args:
        calorific_value: gross, by volume.
        relative_density: density of the gas by density of dry air at the same base [-].

    Source: ISO 6976:2016, equation 15.
    """
    return float(calorific_value / relative_density**0.5)
