"""State objects of mixtures: built once, their phase imposed, their root checked.

Imposing a phase can return a root that is none of that phase, without a word. Every root is
therefore held against that of a cubic equation of state, which is never far off.
"""

from __future__ import annotations

import math
from functools import lru_cache
from typing import Any

from specsheet.fluid import library, names
from specsheet.fluid.calorific import Composition
from specsheet.fluid.phases import GAS, LIQUID
from specsheet.methods import cubic
from specsheet.methods.equilibrium import Critical

#: density by that of the cubic equation (or the reverse), above which a root is believed
_FAR = 0.6


@lru_cache(maxsize=64)
def critical(composition: Composition) -> tuple[tuple[float, ...], tuple[Critical, ...]]:
    """Return fractions and critical constants of a composition."""
    table = names.substances()
    return tuple(fraction for _, fraction in composition), tuple(
        Critical(
            table[key].critical_temperature,
            table[key].critical_pressure,
            table[key].acentric_factor,
        )
        for key, _ in composition
    )


@lru_cache(maxsize=16)
def state_of(keys: tuple[str, ...], phase: str) -> Any:
    """Return the one state object of some components and imposed phase, under the lock of the room.

    Its fractions are those of whoever used it last: set them before each update.

    Raises:
        ValueError: a pair of components has no mixing parameters and the phase is liquid.
    """
    return imposed(keys, phase)


def imposed(keys: tuple[str, ...], phase: str) -> Any:
    """Return a new state object of some components with the phase imposed.

    Raises:
        ValueError: a pair of components has no mixing parameters and the phase is liquid.
    """
    module = library.fluids()
    table = names.substances()
    if phase == GAS:
        estimate_pairs(keys)
    state = module.AbstractState("HEOS", "&".join(table[key].equation for key in keys))
    state.set_mole_fractions([1.0 / len(keys)] * len(keys))
    state.specify_phase(module.iphase_gas if phase == GAS else module.iphase_liquid)
    return state


def updated(composition: Composition, phase: str, temperature: float, pressure: float) -> Any:
    """Return the state object of a composition, imposed phase and state.

    Raises:
        library.ERRORS: there is no such state; forget the objects then.
    """
    state = state_of(tuple(key for key, _ in composition), phase)
    state.set_mole_fractions([fraction for _, fraction in composition])
    state.update(library.fluids().PT_INPUTS, pressure, temperature)
    return state


@lru_cache(maxsize=64)
def estimate_pairs(keys: tuple[str, ...]) -> tuple[tuple[str, str], ...]:
    """Give pairs without mixing parameters the linear rule; return those pairs."""
    module = library.fluids()
    table = names.substances()
    found = []
    for i, first in enumerate(keys):
        for second in keys[i + 1 :]:
            if not _known_pair(table[first].cas, table[second].cas):
                module.apply_simple_mixing_rule(table[first].cas, table[second].cas, "linear")
                _ESTIMATED.add(frozenset((table[first].cas, table[second].cas)))
            if frozenset((table[first].cas, table[second].cas)) in _ESTIMATED:
                found.append((first, second))
    return tuple(found)


#: pairs (CAS numbers) that got the linear rule in this process
_ESTIMATED: set[frozenset[str]] = set()


def _known_pair(first: str, second: str) -> bool:
    """Tell whether a pair has mixing parameters; the library keeps them in one order only."""
    for one, other in ((first, second), (second, first)):
        try:
            library.fluids().get_mixture_binary_pair_data(one, other, "gammaT")
        except library.ERRORS:
            continue
        return True
    return False


def forget() -> None:
    """Drop the state objects after a failure: what they hold cannot be trusted."""
    state_of.cache_clear()


def settled(composition: Composition, phase: str, temperature: float, pressure: float) -> Any:
    """Return the state object on the root of the stated phase, None where there is none.

    Where one phase is all there is (a dense fluid), the root is reached from the other side.

    Raises:
        library.ERRORS: there is no state at all.
    """
    fractions, components = critical(composition)
    low, high = cubic.compressibility_factors(
        temperature=temperature, pressure=pressure, fractions=fractions, components=components
    )
    factor = high if phase == GAS else low
    tries = (phase, LIQUID if phase == GAS else GAS) if high - low < 1e-9 else (phase,)
    failed: Exception | None = None
    for imposed in tries:
        try:
            state = updated(composition, imposed, temperature, pressure)
            if _sane(state) and _FAR < factor / state.compressibility_factor() < 1.0 / _FAR:
                return state
        except library.ERRORS as error:
            forget()
            failed = error
    if failed is not None:
        raise failed
    return None


def _sane(state: Any) -> bool:
    """Tell whether a state is one: finite, and stable against heat and pressure."""
    return all(
        math.isfinite(value) and value > 0.0
        for value in (state.rhomolar(), state.cpmolar(), state.cvmolar(), state.speed_sound())
    )
