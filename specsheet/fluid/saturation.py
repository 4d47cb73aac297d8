"""The vapour pressure of a pure substance as a smooth curve, built once and evaluated cheaply.

One saturation state of the equation of state costs up to a fifth of a millisecond, and every state
asks for two. The logarithm of the vapour pressure over 1/T is so smooth that a polynomial through
some forty Chebyshev points gives it to a part in a million; near the critical point and in the deep
cold the equation itself is asked.
"""

from __future__ import annotations

import bisect
import math
import operator
from dataclasses import dataclass
from functools import cache
from typing import Any

from specsheet.fluid import library
from specsheet.fluid.names import Substance

#: share of the critical temperature between which the curve stands in for the equation
_COLD, _WARM = 0.45, 0.98
_NODES = 40


@dataclass(frozen=True, slots=True)
class Curve:
    """Barycentric polynomial of ln p over 1/T through Chebyshev points of the second kind.

    Attributes:
        nodes: 1/T [1/K], falling in temperature.
        values: ln(p/Pa) at the nodes.
        weights: barycentric weights.
    """

    nodes: tuple[float, ...]
    values: tuple[float, ...]
    weights: tuple[float, ...]

    def pressure(self, temperature: float) -> float | None:
        """Return the vapour pressure [Pa] at a temperature [K]; None beyond the curve."""
        inverse = 1.0 / temperature
        if not self.nodes[0] <= inverse <= self.nodes[-1]:
            return None
        return math.exp(self._at(inverse))

    def temperature(self, pressure: float) -> float | None:
        """Return the boiling temperature [K] at a pressure [Pa]; None beyond the curve."""
        level = math.log(pressure)
        if not self.values[-1] <= level <= self.values[0]:
            return None
        # values fall along the nodes; between two of them the curve is all but straight
        right = bisect.bisect_left(self.values, -level, lo=1, hi=_NODES, key=operator.neg)
        before, after = self.nodes[right - 1], self.nodes[right]
        miss_before, miss_after = self.values[right - 1] - level, self.values[right] - level
        for _ in range(8):
            if miss_after == miss_before:
                break
            step = after - miss_after * (after - before) / (miss_after - miss_before)
            before, miss_before = after, miss_after
            after = min(max(step, self.nodes[0]), self.nodes[-1])
            miss_after = self._at(after) - level
            if abs(miss_after) < 1e-12:
                break
        return 1.0 / after

    def _at(self, inverse: float) -> float:
        above = below = 0.0
        for node, value, weight in zip(self.nodes, self.values, self.weights, strict=True):
            gap = inverse - node
            if gap == 0.0:
                return value
            share = weight / gap
            above += share * value
            below += share
        return above / below


@cache
def _curve(item: Substance) -> Curve | None:
    """Return the curve of a substance; None where the equation gives no saturation."""
    coldest = max(item.lowest_temperature * 1.001, _COLD * item.critical_temperature)
    first, last = 1.0 / (_WARM * item.critical_temperature), 1.0 / coldest
    nodes, values, weights = [], [], []
    for k in range(_NODES + 1):
        share = 0.5 * (1.0 - math.cos(math.pi * k / _NODES))
        node = first + (last - first) * share
        found = _exact_pressure(item.equation, 1.0 / node)
        if found is None:
            return None
        nodes.append(node)
        values.append(math.log(found))
        weights.append((0.5 if k in (0, _NODES) else 1.0) * (-1.0) ** k)
    return Curve(tuple(nodes), tuple(values), tuple(weights))


def vapour_pressure(item: Substance, temperature: float) -> float | None:
    """Return the vapour pressure [Pa] at a temperature [K]; None off the saturation line."""
    if not item.lowest_temperature <= temperature < 0.9995 * item.critical_temperature:
        return None
    curve = _curve(item)
    found = None if curve is None else curve.pressure(temperature)
    return _exact_pressure(item.equation, temperature) if found is None else found


def boiling_temperature(item: Substance, pressure: float) -> float | None:
    """Return the boiling temperature [K] at a pressure [Pa]; None off the saturation line."""
    if not 0.0 < pressure < 0.999 * item.critical_pressure:
        return None
    curve = _curve(item)
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
