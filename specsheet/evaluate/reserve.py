"""By how much the flow can change before a limit's verdict does, for all limits at once.

The flow of every operating point is scaled over four decades; where a margin changes its sign,
the crossing is closed in on. All limits and points share each call of the model.
"""

from __future__ import annotations

from collections.abc import Mapping, Sequence
from dataclasses import dataclass

import numpy as np
from numpy.typing import NDArray

from specsheet.evaluate.model import Model
from specsheet.meters.family import Array, Limit, Stream

#: flow factors that the search looks at; 1 is among them
FACTORS = np.geomspace(0.01, 100.0, 81)
_LOGS = np.log(FACTORS)
#: share of a step by which a margin may leave the straight line and be read off the grid: within
#: 0.01 % of the closed-in flow then, as measured over the demo job
STRAIGHT = 0.01
#: points of the grid around a crossing, in steps from the one before it
_AROUND = np.arange(-1, 3)
#: twenty cuts narrow a step of the grid to 0.55 %, within which a value that follows a power of the
#: flow is interpolated exactly, and a sum of powers to 1e-6
_CUTS = np.linspace(0.0, 1.0, 22)[1:-1]
#: a margin that changes so much more than evenly over a cut jumps there: one more round closes in
_JUMP = 3.0
#: a margin that ends at nothing bends there, as an error does that meets its limit and stays on it
_FLAT = 1e-9
_ROUNDS = 2


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

    def straightened(self, margins: Array) -> Array:
        """Return margins, shape (k, m), as logarithms of value by bound where that is sensible.

        So it is where one bound decides and is no zero: a power of the flow is a straight line
        over the logarithm of the flow there.
        """
        sign = np.where(np.isinf(self.high) & (self.low > 0.0), 1.0, 0.0)
        sign = np.where(np.isinf(self.low) & (self.high > 0.0), -1.0, sign)
        with np.errstate(all="ignore"):
            straight = sign * np.log1p(sign * margins)
        usable = (sign != 0.0) & np.isfinite(straight).all(axis=1, keepdims=True)
        return np.asarray(np.where(usable, straight, margins))


def margin(limit: Limit, values: Array) -> Array:
    """Return the margins of one limit, shape (n,) as ``values``; see :meth:`Bounds.margins`."""
    margins: Array = Bounds.of([limit]).margins(values[None])[0]
    return margins


def looked_at(stream: Stream) -> NDArray[np.intp]:
    """Return the points whose flow is scaled: all, or one where they differ in the flow only.

    There every limit flips at the same flow, whichever point it is seen from.
    """
    order = np.argsort(stream.mass_flow)
    return order[order.size // 2 :][:1] if stream.alike else np.arange(order.size)


def scaled(stream: Stream) -> Stream:
    """Return the points of :func:`looked_at` at every factor: m points give m * len(FACTORS)."""
    points = looked_at(stream)
    lanes = stream.take(np.repeat(points, FACTORS.size))
    return lanes.with_flow(lanes.mass_flow * np.tile(FACTORS, points.size))


def find_flips(
    model: Model,
    stream: Stream,
    limits: Sequence[Limit],
    grid: Mapping[str, Array],
    straightness: float = STRAIGHT,
) -> Flips:
    """Return all crossings of all limits at all points.

    A crossing is read off the grid where the margin runs straight through it, and closed in on
    with the model elsewhere.

    Args:
        model: the meter.
        stream: the operating points, n of them.
        limits: limits driven by the flow.
        grid: response over :func:`scaled`.
        straightness: share of a step of the grid by which the margin may leave the straight
            line around a crossing and still be read off the grid.
    """
    if not limits:
        return NO_FLIPS
    points = looked_at(stream)
    bounds = Bounds.of(limits)
    values = np.array([grid[limit.key] for limit in limits])
    margins = bounds.margins(values).reshape(len(limits), points.size, FACTORS.size)
    holds = margins >= 0.0
    of_limit, of_point, of_step = np.nonzero(holds[..., 1:] != holds[..., :-1])
    if not of_limit.size:
        return NO_FLIPS
    own = bounds.take(of_limit)
    factor, smooth = _interpolated(own, margins[of_limit, of_point], of_step, straightness)
    rest = np.flatnonzero(~smooth)
    if rest.size:
        search = _Search(
            model,
            stream.take(np.repeat(points[of_point[rest]], _CUTS.size)),
            own.take(rest),
            [limits[index].key for index in of_limit[rest].tolist()],
        )
        steps, rows = of_step[rest], margins[of_limit[rest], of_point[rest]]
        lanes = np.arange(rest.size)
        factor[rest] = search.close_in(
            (_LOGS[steps], _LOGS[steps + 1]), (rows[lanes, steps], rows[lanes, steps + 1])
        )
    rising = holds[of_limit, of_point, of_step + 1]
    found = Flips(of_limit, points[of_point], factor, rising)
    return found if points.size == stream.mass_flow.size else _seen_from_all(found, stream)


def _interpolated(
    bounds: Bounds, margins: Array, steps: NDArray[np.intp], straightness: float
) -> tuple[Array, NDArray[np.bool_]]:
    """Return the factors read off the grid for k crossings, and which of them can be trusted.

    A cubic through the two points before and the two behind a crossing gives it; where it leaves
    the straight line by little, the margin is smooth there.

    Args:
        bounds: bounds of the limit of each crossing.
        margins: margins over all factors for each crossing, shape (k, len(FACTORS)).
        steps: step of the grid in which each crossing lies.
        straightness: as in :func:`find_flips`.
    """
    places = np.clip(steps[:, None] + _AROUND, 0, FACTORS.size - 1)
    near = bounds.straightened(margins[np.arange(steps.size)[:, None], places])
    with np.errstate(all="ignore"):
        straight = near[:, 1] / (near[:, 1] - near[:, 2])
        cubic = np.zeros(steps.size)  # Lagrange, the factor over the margin
        for place, own in zip(_AROUND, near.T, strict=True):
            others = near[:, place != _AROUND]
            cubic += place * np.prod(others / (others - own[:, None]), axis=1)
        smooth = np.abs(cubic - straight) <= straightness
        return np.exp(_LOGS[steps] + cubic * (_LOGS[1] - _LOGS[0])), smooth


def _seen_from_all(flips: Flips, stream: Stream) -> Flips:
    """Return the flips of one point as each of n points sees them, its own flow at factor 1."""
    count = stream.mass_flow.size
    points = np.tile(np.arange(count), flips.limit.size)
    flows = np.repeat(flips.factor * stream.mass_flow[flips.point], count)
    return Flips(
        np.repeat(flips.limit, count),
        points,
        flows / stream.mass_flow[points],
        np.repeat(flips.rising, count),
    )


@dataclass(frozen=True)
class _Search:
    """The search inside k brackets at once.

    Attributes:
        model: the meter.
        conditions: the point of each bracket, once for each cut, k * len(_CUTS) lanes.
        bounds: bounds of the limit of each bracket.
        keys: glossary key of the limit of each bracket.
    """

    model: Model
    conditions: Stream
    bounds: Bounds
    keys: Sequence[str]

    def close_in(self, bracket: tuple[Array, Array], ends: tuple[Array, Array]) -> Array:
        """Narrow each bracket (logarithms of the factor) by cuts; return the factors.

        Cuts instead of interpolation, since some values jump (an error that steps up below a
        Reynolds number) and a jump defeats interpolation.
        """
        (low, high), (at_low, at_high) = bracket, ends
        rows = np.arange(low.size)
        for _ in range(_ROUNDS):
            cuts = low[:, None] + (high - low)[:, None] * _CUTS
            edges = np.column_stack([low, cuts, high])
            margins = np.column_stack([at_low, self._margins(cuts), at_high])
            step = np.argmax((margins[:, 1:] >= 0.0) != (margins[:, :1] >= 0.0), axis=1)
            even = np.abs(at_high - at_low) / (_CUTS.size + 1)
            low, high = edges[rows, step], edges[rows, step + 1]
            at_low, at_high = margins[rows, step], margins[rows, step + 1]
            jumps = np.abs(at_high - at_low) > _JUMP * even
            kinks = (np.abs(at_low) < _FLAT) | (np.abs(at_high) < _FLAT)
            if not (jumps | kinks).any():
                break
        at_low, at_high = self.bounds.straightened(np.column_stack([at_low, at_high])).T
        return np.asarray(np.exp(low - at_low * (high - low) / (at_high - at_low)))

    def _margins(self, cuts: Array) -> Array:
        """Return the margins at the cuts, shape (k, len(_CUTS))."""
        lanes = self.conditions.with_flow(self.conditions.mass_flow * np.exp(cuts.ravel()))
        values = self.model(lanes).values
        distinct = {key: place for place, key in enumerate(dict.fromkeys(self.keys))}
        table = np.array([values[key] for key in distinct]).reshape(-1, *cuts.shape)
        own = np.array([distinct[key] for key in self.keys])
        return self.bounds.margins(table[own, np.arange(own.size)])
