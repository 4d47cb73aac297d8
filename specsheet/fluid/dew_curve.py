"""The dew point of a dry gas at a pressure.

It is found at its own pressure (:mod:`specsheet.fluid.dew_point`). Where that fails, near the
highest pressure of two phases, the curve is followed upwards from a lower pressure, since from a
neighbour a dew point is found at once. What is found depends on nothing that was asked before.
"""

from __future__ import annotations

import math
from functools import lru_cache
from typing import Any

from specsheet.fluid import dew_point, library, mixture_state, names
from specsheet.fluid.calorific import Composition
from specsheet.methods import equilibrium

#: up to here dew points are found without a guess [Pa]
START = 10e5
#: step of ln p, and the smallest one before the curve ends
_STEP, _SMALLEST = math.log(1.1), 0.03
#: fall of temperature over one step where the curve bends back [K]
_FALL = 2.0
#: mixtures of more components take too long while somebody waits
MOST_COMPONENTS = 12
#: change of temperature over one step that no true curve shows [K]
_JUMP = 15.0


def dew_temperature(composition: Composition, pressure: float) -> float | None:
    """Return the dew temperature [K] of a dry gas at a pressure [Pa]; None where it is not sure.

    The pressure counts with four digits, so that points at nearly one pressure share a search; that
    moves the dew point by 0.01 K at most, far less than the equation of state is wrong by.

    Args:
        composition: components and mole fractions, without water, summing to one.
        pressure: [Pa]
    """
    return _found(composition, float(f"{pressure:.4g}"))


@lru_cache(maxsize=64)
def _found(composition: Composition, pressure: float) -> float | None:
    if len(composition) < 2 or (pressure >= START and len(composition) > MOST_COMPONENTS):
        return None
    state = _fresh(composition)
    if state is None:
        return None
    if pressure < START:
        return _dew(composition, state, pressure, guessed=False)
    found = dew_point.find(composition, pressure, state)
    return _followed(composition, pressure) if found is None else found


def _followed(composition: Composition, pressure: float) -> float | None:
    """Return the dew temperature [K] at a pressure [Pa], followed from a lower one."""
    level, start = math.log(pressure), math.log(START)
    found, back = None, _STEP
    while found is None and level - back > start:
        state = _fresh(composition)  # what one holds that failed is not to be used
        before = level - back
        found, back = dew_point.find(composition, math.exp(before), state), 2.0 * back
    if found is None:
        state, before = _fresh(composition), start
        found = _dew(composition, state, START, guessed=False)
    slope = 0.0
    while found is not None and before < level:
        # short where the curve bends back: a search beyond its highest pressure takes its time
        step = _STEP if slope >= 0.0 else min(_STEP, _FALL / -slope)
        if step < _SMALLEST:
            return None
        after = min(before + step, level)
        warmth = _dew(composition, state, math.exp(after), guessed=True)
        if warmth is None or abs(warmth - found) > _JUMP:
            return None
        slope = (warmth - found) / (after - before)
        before, found = after, warmth
    return found


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
    trivial = all(abs(x - z) < dew_point.TRIVIAL for x, z in zip(liquid, fractions, strict=True))
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
