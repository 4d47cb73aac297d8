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

from specsheet.evaluate.grid import FACTORS, LOGS, Bounds, Edges, read
from specsheet.evaluate.model import Model
from specsheet.evaluate.stream import Lanes
from specsheet.findings import Level
from specsheet.meters.family import Array, Limit, Stream

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
    edges = Edges.of(bounds.take(of_limit), table, of_step + ~rising)
    factor, clear = read(edges, table, of_step, pains.evenness)
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
    edges: Edges
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
        low, high = LOGS[steps], LOGS[steps + 1]
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
