"""The dew point of a dry gas at one pressure, found at once.

Asked for out of nowhere at a high pressure, the fluid library is slow to find a dew point and often
does not. A cubic equation of state gives one near by in a few steps of successive substitution; two
more with the fugacities of the true equation, and the search of the library ends where it should.
"""

from __future__ import annotations

import math
from collections.abc import Callable, Sequence
from dataclasses import dataclass
from functools import lru_cache
from typing import Any

from specsheet.fluid import library, mixture_state
from specsheet.fluid.calorific import Composition
from specsheet.fluid.phases import GAS, LIQUID
from specsheet.methods import cubic, equilibrium
from specsheet.methods.equilibrium import Critical

#: a liquid whose fractions all lie this near to those of the gas is the gas itself
TRIVIAL = 1e-3
#: dew points of the cubic equation lie within this share of the temperature of the true ones
CUBIC_MARGIN = 0.05
#: a dew point of the cubic equation is held against its own phases this far off [K]
_BESIDE = 2.0
#: steps with the cubic equation, and with the true one
_STEPS, _TRUE_STEPS = 40, 2
#: last step of the cubic equation [K], and of the logarithms of its ratios
_SETTLED, _SAME = 0.1, 0.02
#: longest step of temperature [K]
_LONGEST = 15.0

#: temperature [K] and liquid fractions -> ln K of each component between vapour and liquid
_Ratios = Callable[[float, Sequence[float]], list[float]]


@dataclass(slots=True)
class _Guess:
    """A dew point on its way: temperature [K], liquid fractions and ln K."""

    temperature: float
    liquid: list[float]
    ratios: list[float]


def find(composition: Composition, pressure: float, state: Any) -> float | None:
    """Return the dew temperature [K] at a pressure [Pa]; None where it is not sure.

    Args:
        composition: two components or more and mole fractions, without water, summing to one.
        pressure: [Pa]
        state: state object of the composition with no phase imposed; stands at the dew point
            afterwards, where one is found.
    """
    fractions, components = mixture_state.critical(composition)
    guess = _by_cubic(fractions, components, pressure)
    if guess is None:
        return None
    nearest = guess.temperature
    try:
        point = _refined(composition, components, pressure, guess)
        state.update_with_guesses(library.fluids().PQ_INPUTS, pressure, 1.0, point)
        found = float(state.T())
        liquid = state.mole_fractions_liquid()
    except library.ERRORS:
        _pair.cache_clear()  # what a failed object holds cannot be trusted
        return None
    trivial = all(abs(x - z) < TRIVIAL for x, z in zip(liquid, fractions, strict=True))
    return None if trivial or not abs(found - nearest) <= CUBIC_MARGIN * found else found


def _by_cubic(
    fractions: Sequence[float], components: Sequence[Critical], pressure: float
) -> _Guess | None:
    """Return the upper dew point of the cubic equation; None where it is not found."""
    start = equilibrium.wilson_dew_temperature(
        pressure=pressure, fractions=fractions, components=components
    )
    first = [
        math.log(
            equilibrium.wilson_ratio(temperature=start, pressure=pressure, component=component)
        )
        for component in components
    ]
    guess = _Guess(start, _liquid(fractions, first), first)

    def ratios(temperature: float, liquid: Sequence[float]) -> list[float]:
        gas, condensed = (
            cubic.log_fugacity_coefficients(
                temperature=temperature,
                pressure=pressure,
                fractions=mixed,
                components=components,
            )
            for mixed in (fractions, liquid)
        )
        return [low - high for low, high in zip(condensed, gas, strict=True)]

    for _ in range(_STEPS):
        moved, change = _step(guess, fractions, components, ratios)
        if all(abs(x / z - 1.0) < 0.02 for x, z in zip(guess.liquid, fractions, strict=True)):
            return None
        if moved < _SETTLED and change < _SAME:
            edge = _is_upper(fractions, components, pressure, guess.temperature)
            return guess if edge else None
    return None


def _liquid(fractions: Sequence[float], ratios: Sequence[float]) -> list[float]:
    """Return the fractions of the liquid beside a gas, summing to one."""
    amounts = [z * math.exp(-ratio) for z, ratio in zip(fractions, ratios, strict=True)]
    total = sum(amounts)
    return [amount / total for amount in amounts]


def _step(
    guess: _Guess, fractions: Sequence[float], components: Sequence[Critical], ratios: _Ratios
) -> tuple[float, float]:
    """Take one step towards the dew point; return by how much temperature [K] and ln K change.

    At the dew point the sum of z/K is one. Its slope over temperature is that of Wilson's ratios,
    steeper than the true one, so that no step leads across.
    """
    found = ratios(guess.temperature, guess.liquid)
    change = max(abs(new - old) for new, old in zip(found, guess.ratios, strict=True))
    total = sum(z * math.exp(-ratio) for z, ratio in zip(fractions, found, strict=True))
    slope = sum(
        x * 5.373 * (1.0 + item.acentric) * item.temperature
        for x, item in zip(guess.liquid, components, strict=True)
    )
    step = math.log(total) * guess.temperature**2 / slope
    guess.temperature += min(max(step, -_LONGEST), _LONGEST)
    guess.ratios, guess.liquid = found, _liquid(fractions, found)
    return abs(step), change


def _is_upper(
    fractions: Sequence[float], components: Sequence[Critical], pressure: float, dew: float
) -> bool:
    """Tell whether the cubic equation has two phases just below a temperature [K], one above."""
    warmer, colder = (
        cubic.phase(
            temperature=temperature,
            pressure=pressure,
            fractions=fractions,
            components=components,
        )
        for temperature in (dew + _BESIDE, dew - _BESIDE)
    )
    return colder == cubic.TWO != warmer


@lru_cache(maxsize=8)
def _pair(keys: tuple[str, ...]) -> tuple[Any, Any]:
    """Return state objects held in the gas and in the liquid, apart from those of states asked for.

    Raises:
        library.ERRORS: a pair of components has no mixing rule.
    """
    return mixture_state.imposed(keys, GAS), mixture_state.imposed(keys, LIQUID)


def _refined(
    composition: Composition, components: Sequence[Critical], pressure: float, guess: _Guess
) -> Any:
    """Return the guess, taken some steps on with the true equation, as the library wants it.

    Raises:
        library.ERRORS: the true equation has no such gas or liquid.
    """
    module = library.fluids()
    keys = tuple(key for key, _ in composition)
    fractions = [fraction for _, fraction in composition]
    gas, liquid = _pair(keys)
    gas.set_mole_fractions(fractions)

    def place() -> None:
        gas.update(module.PT_INPUTS, pressure, guess.temperature)
        liquid.set_mole_fractions(guess.liquid)
        liquid.update(module.PT_INPUTS, pressure, guess.temperature)

    def ratios(_temperature: float, _liquid: Sequence[float]) -> list[float]:
        place()
        return [
            math.log(liquid.fugacity_coefficient(i) / gas.fugacity_coefficient(i))
            for i in range(len(fractions))
        ]

    for _ in range(_TRUE_STEPS):
        _step(guess, fractions, components, ratios)
    place()
    point = module.GuessesStructure()
    point.T, point.p = guess.temperature, pressure
    point.x, point.y = guess.liquid, fractions
    point.rhomolar_liq, point.rhomolar_vap = liquid.rhomolar(), gas.rhomolar()
    return point
