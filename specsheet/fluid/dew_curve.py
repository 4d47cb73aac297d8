"""The dew point of a dry gas: at low pressure at once, above it step by step from there.

Asked for out of nowhere at a high pressure, a dew point is slow to find and often not found at all.
From a neighbour it is found at once, so the curve is followed upwards in pressure as far as someone
asks, and kept; between its points it is interpolated.
"""

from __future__ import annotations

import bisect
import math
from dataclasses import dataclass, field
from functools import lru_cache
from typing import Any

from specsheet.fluid import library, mixture_state, names
from specsheet.fluid.calorific import Composition
from specsheet.methods import equilibrium

#: up to here dew points are found without a guess, and the curve starts [Pa]
START = 10e5
#: step of ln p, and the smallest one before the curve ends
_STEP, _SMALLEST = math.log(1.1), 0.03
#: fall of temperature over one step where the curve bends back [K]
_FALL = 2.0
#: mixtures of more components take too long to follow while somebody waits
MOST_COMPONENTS = 12
#: a liquid whose fractions all lie this near to those of the gas is the gas itself
_TRIVIAL = 1e-3
#: change of temperature over one step that no true curve shows [K]
_JUMP = 15.0


@dataclass(slots=True)
class _Curve:
    """Points of one curve, growing; under the lock of the room.

    Attributes:
        composition: components and mole fractions.
        state: state object standing at the last point; None where the curve has ended.
        levels: ln(p/Pa), rising.
        temperatures: [K]
    """

    composition: Composition
    state: Any
    levels: list[float] = field(default_factory=list)
    temperatures: list[float] = field(default_factory=list)

    def follow(self, level: float) -> None:
        """Follow the curve to one point beyond a level, or to its end."""
        while self.state is not None and (not self.levels or self.levels[-1] <= level):
            step = self._step()
            wanted = self.levels[-1] + step if self.levels else math.log(START)
            found = self._next(wanted) if step >= _SMALLEST else None
            if found is None:
                self.state = None  # what a failed one holds is not to be used
                return
            self.levels.append(wanted)
            self.temperatures.append(found)

    def _step(self) -> float:
        """Return the next step of ln p: short where the curve bends back to its highest pressure.

        A search beyond that pressure would take its time and find nothing.
        """
        if len(self.levels) < 2:
            return _STEP
        slope = self.temperatures[-1] - self.temperatures[-2]
        slope /= self.levels[-1] - self.levels[-2]
        return _STEP if slope >= 0.0 else min(_STEP, _FALL / -slope)

    def _next(self, level: float) -> float | None:
        """Return the dew temperature [K] at a level, None where there is none to be trusted."""
        pressure = math.exp(level)
        found = _dew(self.composition, self.state, pressure, guessed=bool(self.levels))
        if found is None or (self.levels and abs(found - self.temperatures[-1]) > _JUMP):
            return None
        return found

    def temperature(self, level: float) -> float | None:
        """Return the dew temperature [K] between the points; None beyond them."""
        if len(self.levels) < 4 or not self.levels[0] <= level <= self.levels[-1]:
            return None
        first = bisect.bisect_right(self.levels, level) - 2
        first = min(max(first, 0), len(self.levels) - 4)
        x, y = self.levels[first : first + 4], self.temperatures[first : first + 4]
        return sum(
            y[i] * math.prod((level - x[j]) / (x[i] - x[j]) for j in range(4) if j != i)
            for i in range(4)
        )


def _dew(composition: Composition, state: Any, pressure: float, *, guessed: bool) -> float | None:
    """Return the dew temperature [K] a state object finds, from where it stands or from nothing."""
    module = library.fluids()
    fractions, components = mixture_state.critical(composition)
    estimate = equilibrium.wilson_dew_temperature(
        pressure=pressure, fractions=fractions, components=components
    )
    try:
        if guessed:
            state.update_with_guesses(module.PQ_INPUTS, pressure, 1.0, _guess(module, state))
        else:
            state.update(module.PQ_INPUTS, pressure, 1.0)
        found = float(state.T())
        liquid = state.mole_fractions_liquid()
    except library.ERRORS:
        return None
    trivial = all(abs(x - z) < _TRIVIAL for x, z in zip(liquid, fractions, strict=True))
    # the curve bends back as it is followed; out of nowhere so cold a point is a false one
    likely = found < estimate + 25.0 and (guessed or found > estimate - 60.0)
    return found if likely and not trivial else None


def _guess(module: Any, state: Any) -> Any:
    """Return the point a state object stands at, as a guess for the next."""
    guess = module.GuessesStructure()
    guess.T, guess.p = state.T(), state.p()
    guess.x, guess.y = list(state.mole_fractions_liquid()), list(state.mole_fractions_vapor())
    guess.rhomolar_liq = state.saturated_liquid_keyed_output(module.iDmolar)
    guess.rhomolar_vap = state.saturated_vapor_keyed_output(module.iDmolar)
    return guess


def _fresh(composition: Composition) -> Any:
    """Return a state object of its own, None where the library has no mixing rule."""
    table = names.substances()
    try:
        state = library.fluids().AbstractState(
            "HEOS", "&".join(table[key].equation for key, _ in composition)
        )
    except library.ERRORS:
        return None
    state.set_mole_fractions([fraction for _, fraction in composition])
    return state


@lru_cache(maxsize=64)
def _curve(composition: Composition) -> _Curve:
    return _Curve(composition, _fresh(composition))


@lru_cache(maxsize=1024)
def _low(composition: Composition, pressure: float) -> float | None:
    """Return the dew temperature [K] at a pressure below the curve."""
    state = _fresh(composition)
    return None if state is None else _dew(composition, state, pressure, guessed=False)


def known(composition: Composition, pressure: float) -> float | None:
    """Return the dew temperature [K] where the curve is followed that far already, else None."""
    if len(composition) < 2 or pressure < START:
        return None
    return _curve(composition).temperature(math.log(pressure))


def dew_temperature(composition: Composition, pressure: float) -> float | None:
    """Return the dew temperature [K] of a dry gas at a pressure [Pa]; None where it is not sure.

    Args:
        composition: components and mole fractions, without water, summing to one.
        pressure: [Pa]
    """
    if len(composition) < 2:
        return None
    if pressure < START:
        return _low(composition, pressure)
    if len(composition) > MOST_COMPONENTS:
        return None
    curve, level = _curve(composition), math.log(pressure)
    curve.follow(max(level, math.log(START) + 3.0 * _STEP))
    return curve.temperature(level)
