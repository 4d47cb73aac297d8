"""The dew points of a dry gas, kept by composition.

Each is found at its own pressure (:mod:`specsheet.fluid.dew_point`). Where that fails, near the
highest pressure of two phases, the curve is followed upwards from a lower pressure, since from a
neighbour a dew point is found at once. Near points that are known it is interpolated.
"""

from __future__ import annotations

import bisect
import math
from collections.abc import Sequence
from dataclasses import dataclass, field
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
#: ln p over which a dew curve may change its course, its change meanwhile and the error allowed [K]
_COURSE, _CHANGE, _ERROR = 0.1, 10.0, 1e-3
#: points to interpolate between at most
_POINTS = 4


@dataclass(slots=True)
class _Curve:
    """Points of one curve, growing; under the lock of the room.

    Attributes:
        composition: components and mole fractions.
        state: state object, standing at the point found last; None where there is no mixing rule.
        levels: ln(p/Pa), rising.
        temperatures: [K]
        end: ln(p/Pa) from which no dew point is found.
    """

    composition: Composition
    state: Any
    levels: list[float] = field(default_factory=list)
    temperatures: list[float] = field(default_factory=list)
    end: float = math.inf

    def temperature(self, level: float) -> float | None:
        """Return the dew temperature [K] from points known; None where they are not near enough."""
        near = sorted(
            zip(self.levels, self.temperatures, strict=True), key=lambda row: abs(row[0] - level)
        )
        error = _CHANGE
        for count, (known, _) in enumerate(near[:_POINTS], 1):
            error *= abs(level - known) / _COURSE
            if error < _ERROR:
                return _between(near[:count], level)
        return None

    def find(self, level: float) -> float | None:
        """Return the dew temperature [K] at a level, and keep it; None where there is none."""
        if self.state is None or level >= self.end:
            return None
        found = self._at(level)
        if found is None:
            found = self._followed(level)
        if found is None:
            self.end = level
        return found

    def _at(self, level: float) -> float | None:
        """Return the dew temperature [K] found at a level by itself."""
        found = dew_point.find(self.composition, math.exp(level), self.state)
        if found is None:
            self.state = _fresh(self.composition)  # what a failed one holds is not to be used
        else:
            self._keep(level, found)
        return found

    def _keep(self, level: float, temperature: float) -> None:
        place = bisect.bisect_left(self.levels, level)
        self.levels.insert(place, level)
        self.temperatures.insert(place, temperature)

    def _followed(self, level: float) -> float | None:
        """Return the dew temperature [K] at a level, followed from a lower one."""
        start, back = math.log(START), _STEP
        found = None
        while found is None and level - back > start:
            before = level - back
            found, back = self._at(before), 2.0 * back
        if found is None:
            before = start
            found = _dew(self.composition, self.state, START, guessed=False)
        slope = 0.0
        while found is not None and before < level:
            # short where the curve bends back: a search beyond its highest pressure takes its time
            step = _STEP if slope >= 0.0 else min(_STEP, _FALL / -slope)
            if step < _SMALLEST:
                return None
            after = min(before + step, level)
            warmth = _dew(self.composition, self.state, math.exp(after), guessed=True)
            if warmth is None or abs(warmth - found) > _JUMP:
                self.state = _fresh(self.composition)
                return None
            slope = (warmth - found) / (after - before)
            before, found = after, warmth
            self._keep(before, found)
        return found


def _between(points: Sequence[tuple[float, float]], level: float) -> float:
    """Return the temperature [K] at a level on the polynomial through some points."""
    return sum(
        warmth
        * math.prod((level - other) / (known - other) for other, _ in points if other != known)
        for known, warmth in points
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


@lru_cache(maxsize=16)
def _curve(composition: Composition) -> _Curve:
    return _Curve(composition, _fresh(composition))


@lru_cache(maxsize=64)
def _low(composition: Composition, pressure: float) -> float | None:
    """Return the dew temperature [K] at a low pressure."""
    state = _fresh(composition)
    return None if state is None else _dew(composition, state, pressure, guessed=False)


def known(composition: Composition, pressure: float) -> float | None:
    """Return the dew temperature [K] where points near by are known already, else None."""
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
    found = curve.temperature(level)
    return curve.find(level) if found is None else found
