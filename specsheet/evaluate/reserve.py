"""By how much the flow can change before a limit's verdict does, for all limits at once.

The flow of every operating point is scaled over four decades; where a margin changes its sign,
the crossing is closed in on. All limits and points share each call of the model.
"""

from __future__ import annotations

from collections.abc import Mapping, Sequence
from dataclasses import dataclass
from typing import NamedTuple

import numpy as np
from numpy.typing import NDArray

from specsheet.evaluate.model import Model
from specsheet.evaluate.stream import Lanes
from specsheet.findings import Level
from specsheet.meters.family import Array, Limit, Stream

#: flow factors that the search looks at; 1 is among them
FACTORS = np.geomspace(0.01, 100.0, 81)
_LOGS = np.log(FACTORS)
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
#: twenty cuts narrow a step of the grid to 0.55 %, within which a value that follows a power of the
#: flow is interpolated exactly, and a sum of powers to 1e-6
_CUTS = np.linspace(0.0, 1.0, 22)[1:-1]
#: a margin that changes so much more than evenly over a cut jumps there: one more round closes in
_JUMP = 3.0
#: a margin that ends at nothing bends there, as an error does that meets its limit and stays on it
_FLAT = 1e-9


class Pains(NamedTuple):
    """How exactly a crossing is wanted.

    Attributes:
        evenness: share of a step of the grid by which two readings of a crossing may differ and
            still be trusted.
        rounds: of closing in at most.
    """

    evenness: float
    rounds: int


#: within 0.05 % of the flow, as measured over the demo job
EXACT = Pains(0.001, 2)
#: within 0.3 % or so, which ranks families as well
ROUGH = Pains(0.03, 1)


@dataclass(frozen=True)
class Flips:
    """Every crossing found, as parallel arrays of shape (k,).

    Attributes:
        limit: index of the limit.
        point: index of the operating point.
        factor: flow factor at which the margin is zero [-].
        rising: whether the limit begins to hold there as the flow rises.
    """

    limit: NDArray[np.intp]
    point: NDArray[np.intp]
    factor: Array
    rising: NDArray[np.bool_]


#: no crossing was looked for
NO_FLIPS = Flips(np.empty(0, np.intp), np.empty(0, np.intp), np.empty(0), np.empty(0, np.bool_))


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


def looked_at(stream: Stream) -> NDArray[np.intp]:
    """Return the points whose flow is scaled: all, or one where they differ in the flow only.

    There every limit flips at the same flow, whichever point it is seen from.
    """
    if not stream.alike:
        return np.arange(stream.mass_flow.size)
    return np.argsort(stream.mass_flow)[stream.mass_flow.size // 2 :][:1]


def scaled(stream: Stream) -> Lanes:
    """Return the points of :func:`looked_at` at every factor: m points give m * len(FACTORS)."""
    points = np.repeat(looked_at(stream), FACTORS.size)
    flows = stream.mass_flow[points].reshape(-1, FACTORS.size) * FACTORS
    return Lanes(points, flows.ravel())


@dataclass(frozen=True)
class Search:
    """What is looked for with one meter.

    Attributes:
        model: the meter.
        limits: limits driven by the flow.
        grid: response over :func:`scaled`.
    """

    model: Model
    limits: Sequence[Limit]
    grid: Mapping[str, Array]


def find_flips(
    stream: Stream, searches: Sequence[Search], pains: Pains = EXACT
) -> tuple[Flips, ...]:
    """Return all crossings of all limits at all points, for each search.

    A crossing is read off the grid where the value runs smoothly through its bound, and closed in
    on with the model elsewhere. Many searches are read off as one.

    Args:
        stream: the operating points, n of them.
        searches: one for each meter.
        pains: how exactly the crossings are wanted.
    """
    limits = [limit for search in searches for limit in search.limits]
    if not limits:
        return tuple(NO_FLIPS for _ in searches)
    points = looked_at(stream)
    values = np.array([search.grid[limit.key] for search in searches for limit in search.limits])
    bounds = Bounds.of(limits)
    margins = bounds.margins(values).reshape(len(limits), points.size, FACTORS.size)
    holds = margins >= 0.0
    flipped = (holds[..., 1:] != holds[..., :-1]) & ~_behind(searches, holds, values)
    of_limit, of_point, of_step = np.nonzero(flipped)
    table = values.reshape(holds.shape)[of_limit, of_point]
    rising = holds[of_limit, of_point, of_step + 1]
    edges = _Edges.of(bounds.take(of_limit), table, of_step + ~rising)
    factor, clear = _read(edges, table, of_step, pains.evenness)
    found = []
    first = 0
    for search in searches:
        own = (of_limit >= first) & (of_limit < first + len(search.limits))
        rest = np.flatnonzero(own & ~clear)
        if rest.size:
            brackets = _Brackets(
                search.model,
                stream.take(np.repeat(points[of_point[rest]], _CUTS.size)),
                edges.take(rest),
                [limits[index].key for index in of_limit[rest].tolist()],
            )
            factor[rest] = brackets.close_in(table[rest], of_step[rest], pains.rounds)
        flips = Flips(of_limit[own] - first, points[of_point[own]], factor[own], rising[own])
        found.append(_seen_from_all(flips, stream, points))
        first += len(search.limits)
    return tuple(found)


def _behind(
    searches: Sequence[Search], holds: NDArray[np.bool_], values: Array
) -> NDArray[np.bool_]:
    """Tell which crossings only say that no flow is possible, where a limit ended before that.

    A gas that chokes has no value of anything. Where the limit on the pressure ratio, say, ends
    below that flow, the end of the possible is no flip of every other limit.

    Args:
        searches: as in :func:`find_flips`.
        holds: whether each limit holds at each point over the grid, shape (k, m, len(FACTORS)).
        values: values over the grid, k * m * len(FACTORS) of them.

    Returns:
        for each limit, point and step of the grid.
    """
    known = ~np.isnan(values).reshape(holds.shape)
    ends = holds[..., :-1] & ~holds[..., 1:]
    brink = ends & ~known[..., 1:]
    if not brink.any():
        return brink
    first = 0
    for search in searches:
        own = slice(first, first + len(search.limits))
        binding = [limit.level is not Level.NOTE for limit in search.limits]
        ended = (ends & known[..., 1:])[own][binding].any(axis=0)
        brink[own] &= np.logical_or.accumulate(ended, axis=-1)
        first = own.stop
    return brink


@dataclass(frozen=True)
class _Edges:
    """The bound that each of k crossings goes over, as columns of shape (k, 1).

    Attributes:
        bound: the bound.
        sense: 1 for a lower bound, -1 for an upper one.
    """

    bound: Array
    sense: Array

    @classmethod
    def of(cls, bounds: Bounds, values: Array, outside: NDArray[np.intp]) -> _Edges:
        """Return the bounds gone over.

        Args:
            bounds: bounds of the limit of each crossing.
            values: values over the grid, shape (k, len(FACTORS)).
            outside: place on the grid, beside each crossing, where the limit does not hold.
        """
        beyond = values[np.arange(outside.size), outside][:, None]
        over = (beyond > bounds.high) | np.isnan(beyond) & np.isinf(bounds.low)
        return cls(np.where(over, bounds.high, bounds.low), np.where(over, -1.0, 1.0))

    def take(self, rows: NDArray[np.intp]) -> _Edges:
        """Return the bounds of the chosen crossings."""
        return _Edges(self.bound[rows], self.sense[rows])

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


def _read(
    edges: _Edges, values: Array, steps: NDArray[np.intp], evenness: float
) -> tuple[Array, NDArray[np.bool_]]:
    """Return the factors read off the grid for k crossings, and which of them can be trusted.

    The crossing of the polynomial through six points, three before and three behind it where they
    are possible; where the one through four crosses elsewhere, the value is not smooth there. Where
    it jumps they may agree, so its rise is compared with those beside it too.

    Args:
        edges: the bound of each crossing.
        values: values over the grid, shape (k, len(FACTORS)).
        steps: step of the grid in which each crossing lies.
        evenness: as in :class:`Pains`.
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
        return np.exp(_LOGS[middle] + found * (_LOGS[1] - _LOGS[0])), clear


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


def _seen_from_all(flips: Flips, stream: Stream, seen: NDArray[np.intp]) -> Flips:
    """Return flips as each of n points sees them, its own flow at factor 1.

    Args:
        flips: flips as the points looked at see them.
        stream: the operating points.
        seen: the points looked at: all, or one that stands for all.
    """
    count = stream.mass_flow.size
    if seen.size == count:
        return flips
    points = np.tile(np.arange(count), flips.limit.size)
    flows = np.repeat(flips.factor * stream.mass_flow[flips.point], count)
    return Flips(
        np.repeat(flips.limit, count),
        points,
        flows / stream.mass_flow[points],
        np.repeat(flips.rising, count),
    )


@dataclass(frozen=True)
class _Brackets:
    """The search inside k brackets at once.

    Attributes:
        model: the meter.
        conditions: the point of each bracket, once for each cut, k * len(_CUTS) lanes.
        edges: the bound gone over in each bracket.
        keys: glossary key of the limit of each bracket.
    """

    model: Model
    conditions: Stream
    edges: _Edges
    keys: Sequence[str]

    def close_in(self, values: Array, steps: NDArray[np.intp], rounds: int) -> Array:
        """Narrow each bracket by cuts; return the factors.

        Cuts instead of interpolation, since some values jump (an error that steps up below a
        Reynolds number) and a jump defeats interpolation.

        Args:
            values: values over the grid, shape (k, len(FACTORS)).
            steps: step of the grid in which each crossing lies.
            rounds: of narrowing at most.
        """
        rows = np.arange(steps.size)
        low, high = _LOGS[steps], _LOGS[steps + 1]
        at_low, at_high = values[rows, steps], values[rows, steps + 1]
        for _ in range(rounds):
            cuts = low[:, None] + (high - low)[:, None] * _CUTS
            table = np.column_stack([at_low, self._values(cuts), at_high])
            inside = self.edges.distance(table)
            flips = (inside[:, 1:] >= 0.0) != (inside[:, :1] >= 0.0)
            step = np.argmax(flips, axis=1)
            edges = np.column_stack([low, cuts, high])
            even = np.abs(inside[:, -1] - inside[:, 0]) / (_CUTS.size + 1)
            low, high = edges[rows, step], edges[rows, step + 1]
            at_low, at_high = table[rows, step], table[rows, step + 1]
            before, behind = inside[rows, step], inside[rows, step + 1]
            jumps = np.abs(behind - before) > _JUMP * even
            kinks = (np.abs(before) < _FLAT) | (np.abs(behind) < _FLAT)
            if not (jumps | kinks).any():
                break
        return np.asarray(np.exp(low - before * (high - low) / (behind - before)))

    def _values(self, cuts: Array) -> Array:
        """Return the values at the cuts, shape (k, len(_CUTS))."""
        lanes = self.conditions.with_flow(self.conditions.mass_flow * np.exp(cuts.ravel()))
        values = self.model(lanes).values
        distinct = {key: place for place, key in enumerate(dict.fromkeys(self.keys))}
        table = np.array([values[key] for key in distinct]).reshape(-1, *cuts.shape)
        own = np.array([distinct[key] for key in self.keys])
        return np.asarray(table[own, np.arange(own.size)])
