"""The vapour pressure of a pure substance as a smooth curve, built once and evaluated cheaply.

One saturation state of the equation of state costs up to a fifth of a millisecond, and every state
asks for two. The logarithm of the vapour pressure over 1/T is so smooth that a polynomial through
forty Chebyshev points gives it to a part in a million; near the critical point and in the deep
cold the equation itself is asked.
"""

from __future__ import annotations

import bisect
import math
from collections.abc import Sequence
from dataclasses import dataclass
from functools import cache
from typing import Any

from specsheet.fluid import library
from specsheet.fluid.names import Substance, substances

#: share of the critical temperature between which the curve stands in for the equation
_COLD, _WARM = 0.45, 0.99
_NODES = 40
#: coefficients of ln p that add nothing
_NEGLIGIBLE = 1e-9
#: miss of ln p from which one more step of the secant rule leaves nothing to find
_NEAR = 1e-7


@dataclass(frozen=True, slots=True)
class Curve:
    """Chebyshev polynomial of ln p over 1/T.

    Attributes:
        first, last: 1/T at its ends [1/K], falling in temperature.
        coefficients: of the Chebyshev polynomials, from the highest degree that matters down,
            two and two.
        inverses, levels: 1/T [1/K] and ln(p/Pa) of its points, rising in temperature.
    """

    first: float
    last: float
    coefficients: tuple[tuple[float, float], ...]
    inverses: tuple[float, ...]
    levels: tuple[float, ...]

    def pressure(self, temperature: float) -> float | None:
        """Return the vapour pressure [Pa] at a temperature [K]; None beyond the curve."""
        inverse = 1.0 / temperature
        if not self.first <= inverse <= self.last:
            return None
        return math.exp(self._at(inverse))

    def temperature(self, pressure: float) -> float | None:
        """Return the boiling temperature [K] at a pressure [Pa]; None beyond the curve."""
        level = math.log(pressure)
        if not self.levels[0] <= level <= self.levels[-1]:
            return None
        # between two points the curve is all but straight: the secant rule needs a few steps
        place = max(bisect.bisect_left(self.levels, level), 1)
        before, miss_before = self.inverses[place - 1], self.levels[place - 1] - level
        after, miss_after = self.inverses[place], self.levels[place] - level
        for _ in range(12):
            if miss_after == miss_before:
                break
            step = after - miss_after * (after - before) / (miss_after - miss_before)
            before, miss_before = after, miss_after
            after = min(max(step, self.first), self.last)
            if abs(miss_before) < _NEAR:
                break
            miss_after = self._at(after) - level
        return 1.0 / after

    def _at(self, inverse: float) -> float:
        """Return ln p by the recurrence of Clenshaw."""
        twice = 2.0 * (2.0 * inverse - self.first - self.last) / (self.last - self.first)
        one = two = 0.0
        for higher, lower in self.coefficients:
            two = higher + twice * one - two
            one = lower + twice * two - one
        return one - 0.5 * twice * two


@cache
def _curve(key: str) -> Curve | None:
    """Return the curve of a substance; None where the equation gives no saturation."""
    item = substances()[key]
    coldest = max(item.lowest_temperature * 1.001, _COLD * item.critical_temperature)
    first, last = 1.0 / (_WARM * item.critical_temperature), 1.0 / coldest
    inverses, values = [], []
    for k in range(_NODES + 1):
        inverse = first + (last - first) * 0.5 * (1.0 + math.cos(math.pi * k / _NODES))
        found = _exact_pressure(item.equation, 1.0 / inverse)
        if found is None:
            return None
        inverses.append(inverse)
        values.append(math.log(found))
    coefficients = _chebyshev(values)
    while len(coefficients) > 4 and abs(coefficients[-1]) < _NEGLIGIBLE:
        coefficients.pop()
    coefficients += [0.0] * (len(coefficients) % 2)
    pairs = zip(coefficients[::-2], coefficients[-2::-2], strict=True)
    return Curve(first, last, tuple(pairs), tuple(inverses), tuple(values))


def _chebyshev(values: Sequence[float]) -> list[float]:
    """Return the coefficients of the polynomial through values at cos(pi k/n), k from 0 to n."""
    n = len(values) - 1
    found = []
    for degree in range(n + 1):
        terms = [value * math.cos(math.pi * degree * k / n) for k, value in enumerate(values)]
        total = sum(terms) - 0.5 * (terms[0] + terms[-1])
        found.append(total * (1.0 if degree in (0, n) else 2.0) / n)
    return found


def vapour_pressure(item: Substance, temperature: float) -> float | None:
    """Return the vapour pressure [Pa] at a temperature [K]; None off the saturation line."""
    if not item.lowest_temperature <= temperature < 0.9995 * item.critical_temperature:
        return None
    curve = _curve(item.key)
    found = None if curve is None else curve.pressure(temperature)
    return _exact_pressure(item.equation, temperature) if found is None else found


def boiling_temperature(item: Substance, pressure: float) -> float | None:
    """Return the boiling temperature [K] at a pressure [Pa]; None off the saturation line."""
    if not 0.0 < pressure < 0.999 * item.critical_pressure:
        return None
    curve = _curve(item.key)
    found = None if curve is None else curve.temperature(pressure)
    return _exact_temperature(item.equation, pressure) if found is None else found


@cache
def _state_of(equation: str) -> Any:
    return library.fluids().AbstractState("HEOS", equation)


def _exact_temperature(equation: str, pressure: float) -> float | None:
    state = _state_of(equation)
    try:
        state.update(library.fluids().PQ_INPUTS, pressure, 0.0)
        return float(state.T())
    except library.ERRORS:
        _state_of.cache_clear()
        return None


def _exact_pressure(equation: str, temperature: float) -> float | None:
    state = _state_of(equation)
    try:
        state.update(library.fluids().QT_INPUTS, 0.0, temperature)
        found = float(state.p())
    except library.ERRORS:
        _state_of.cache_clear()
        return None
    return found if math.isfinite(found) and found > 0.0 else None
