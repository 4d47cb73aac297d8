"""The grid of flows that reserves are looked for on, and how a crossing is read off it."""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass

import numpy as np
from numpy.typing import NDArray

from specsheet.meters.family import Array, Limit

#: flow factors that the search looks at; 1 is among them
FACTORS = np.geomspace(0.01, 100.0, 81)
LOGS = np.log(FACTORS)
#: a value that rises over a step so much more than over those beside it jumps there
_STEEP = 2.5
#: six points of the grid around a crossing, in steps from the one before it
_AROUND = np.arange(-2, 4)
_POWERS = np.arange(6.0)


def _through(first: int, last: int) -> Array:
    """Return values at the six points -> coefficients of the polynomial through some of them."""
    chosen = slice(first, last)
    powers = np.vander(_AROUND[chosen], increasing=True)
    matrix = np.zeros((6, 6))
    matrix[chosen, : last - first] = np.linalg.inv(powers).T
    return matrix


_THROUGH_ALL = _through(0, 6)
#: through four points around the crossing, by the place of the one before it
_THROUGH_FOUR = np.array([_through(first, first + 4) for first in (0, 0, 1, 2, 2)])


@dataclass(frozen=True)
class Bounds:
    """The bounds of k limits as columns of shape (k, 1), infinite where a limit has none.

    ``low_scale`` and ``high_scale`` make a margin relative to its bound (1 where that is zero).
    """

    low: Array
    high: Array
    low_scale: Array
    high_scale: Array

    @classmethod
    def of(cls, limits: Sequence[Limit]) -> Bounds:
        """Return the bounds of limits."""
        low = [-np.inf if limit.low is None else limit.low for limit in limits]
        high = [np.inf if limit.high is None else limit.high for limit in limits]
        scales = (
            [abs(limit.low or 1.0) for limit in limits],
            [abs(limit.high or 1.0) for limit in limits],
        )
        return cls(*(np.array([column]).T for column in (low, high, *scales)))

    def take(self, rows: NDArray[np.intp]) -> Bounds:
        """Return the bounds of the chosen limits (repeats allowed)."""
        return Bounds(self.low[rows], self.high[rows], self.low_scale[rows], self.high_scale[rows])

    def margins(self, values: Array) -> Array:
        """Return how far inside its bounds each value is; shape (k, m) as ``values``.

        Relative to the bound; negative is outside. NaN (an impossible state) counts as outside by
        one.
        """
        inside = np.minimum(
            (values - self.low) / self.low_scale, (self.high - values) / self.high_scale
        )
        clipped = np.minimum(np.maximum(inside, -1e9), 1e9)
        return np.asarray(np.where(np.isnan(values), -1.0, clipped))


@dataclass(frozen=True)
class Edges:
    """The bound that each of k crossings goes over, as columns of shape (k, 1).

    Attributes:
        bound: the bound.
        sense: 1 for a lower bound, -1 for an upper one.
    """

    bound: Array
    sense: Array

    @classmethod
    def of(cls, bounds: Bounds, values: Array, outside: NDArray[np.intp]) -> Edges:
        """Return the bounds gone over.

        Args:
            bounds: bounds of the limit of each crossing.
            values: values over the grid, shape (k, len(FACTORS)).
            outside: place on the grid, beside each crossing, where the limit does not hold.
        """
        beyond = values[np.arange(outside.size), outside][:, None]
        over = (beyond > bounds.high) | np.isnan(beyond) & np.isinf(bounds.low)
        return cls(np.where(over, bounds.high, bounds.low), np.where(over, -1.0, 1.0))

    def take(self, rows: NDArray[np.intp]) -> Edges:
        """Return the bounds of the chosen crossings."""
        return Edges(self.bound[rows], self.sense[rows])

    def distance(self, values: Array) -> Array:
        """Return how far inside the bound each value is, shape (k, m) as ``values``.

        The logarithm of value by bound where there is one, since a power of the flow is a straight
        line over the logarithm of the flow there; else the difference. NaN is outside by one.
        """
        unknown = np.isnan(values)
        powers = (self.bound > 0.0) & ((values > 0.0) | unknown).all(axis=1, keepdims=True)
        with np.errstate(all="ignore"):
            inside = np.where(powers, np.log(values / self.bound), values - self.bound)
        return np.asarray(np.where(unknown, -1.0, self.sense * inside))


def read(
    edges: Edges, values: Array, steps: NDArray[np.intp], evenness: float
) -> tuple[Array, NDArray[np.bool_]]:
    """Return the factors read off the grid for k crossings, and which of them can be trusted.

    The crossing of the polynomial through six points, three before and three behind it where they
    are possible; where the one through four crosses elsewhere, the value is not smooth there. Where
    it jumps they may agree, so its rise is compared with those beside it too.

    Args:
        edges: the bound of each crossing.
        values: values over the grid, shape (k, len(FACTORS)).
        steps: step of the grid in which each crossing lies.
        evenness: as in :class:`specsheet.evaluate.reserve.Pains`.
    """
    rows = np.arange(steps.size)
    last = FACTORS.size - 1 - np.argmax(~np.isnan(values)[:, ::-1], axis=1)
    middle = np.clip(np.minimum(steps, last - 3), 2, FACTORS.size - 4)
    beyond = steps - middle  # steps from the middle of the six points to the crossing
    inside = edges.distance(values[rows[:, None], middle[:, None] + _AROUND])
    place = np.clip(beyond + 2, 0, 4)
    before, behind = inside[rows, place], inside[rows, place + 1]
    with np.errstate(all="ignore"):
        start = beyond + before / (before - behind)
        four = np.einsum("ki,kij->kj", inside, _THROUGH_FOUR[place])
        inner = _root(four, start)
        found = _root(inside @ _THROUGH_ALL, inner)
        clear = (np.abs(found - inner) <= evenness) & (place == beyond + 2)
        clear &= np.abs(found - beyond - 0.5) <= 0.5 + evenness  # in its own step
        rises = np.abs(np.diff(inside))
        beside = np.minimum(rises[rows, np.abs(place - 1)], rises[rows, 4 - np.abs(3 - place)])
        clear &= rises[rows, place] <= _STEEP * beside
        return np.exp(LOGS[middle] + found * (LOGS[1] - LOGS[0])), clear


def _root(coefficients: Array, start: Array) -> Array:
    """Return a root of each of k polynomials, by Newton's method.

    Args:
        coefficients: rising powers, shape (k, 6).
        start: places near the roots, shape (k,).
    """
    place = start
    for _ in range(3):
        powers = place[:, None] ** _POWERS
        rise = (coefficients[:, 1:] * powers[:, :-1]) @ _POWERS[1:]
        place = place - (coefficients * powers).sum(axis=1) / rise
    return place
