"""By how much the flow can change before a limit's verdict does, for all limits at once.

The flow of every operating point is scaled over four decades; where a margin changes its sign,
the crossing is closed in on. All limits and points share each call of the model.
"""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass

import numpy as np
from numpy.typing import NDArray

from specsheet.evaluate.model import Model
from specsheet.meters.family import Array, Limit, Stream

#: flow factors that the search looks at; 1 is among them
FACTORS = np.geomspace(0.01, 100.0, 81)
_ROUNDS = 4


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


def margin(limit: Limit, values: Array) -> Array:
    """Return how far inside its bounds a value is, relative to the bound; negative is outside.

    NaN (an impossible state) counts as outside by one.
    """
    inside = np.full(values.shape, np.inf)
    for bound, sign in ((limit.low, 1.0), (limit.high, -1.0)):
        if bound is not None:
            inside = np.fmin(inside, sign * (values - bound) / (abs(bound) or 1.0))
    return np.where(np.isnan(values), -1.0, np.clip(inside, -1e9, 1e9))


def scaled(stream: Stream) -> Stream:
    """Return every condition at every factor: n conditions give n * len(FACTORS) lanes."""
    count = stream.mass_flow.size
    lanes = stream.take(np.repeat(np.arange(count), FACTORS.size))
    return lanes.with_flow(lanes.mass_flow * np.tile(FACTORS, count))


def find_flips(
    model: Model, stream: Stream, limits: Sequence[Limit], grid: Sequence[Array]
) -> Flips:
    """Return all crossings of all limits at all points.

    Args:
        model: the meter.
        stream: the operating points, n of them.
        limits: limits driven by the flow.
        grid: for each limit, the values over :func:`scaled`, shape (n * len(FACTORS),).
    """
    count = stream.mass_flow.size
    shape = (len(limits), count, FACTORS.size)
    margins = np.array(
        [margin(limit, values) for limit, values in zip(limits, grid, strict=True)]
    ).reshape(shape)
    holds = margins >= 0.0
    of_limit, of_point, of_step = np.nonzero(holds[..., 1:] != holds[..., :-1])
    flips = Flips(
        of_limit,
        of_point,
        np.empty(of_limit.size),
        holds[of_limit, of_point, of_step + 1],
    )
    if of_limit.size:
        logs = np.log(FACTORS)
        low, high = logs[of_step], logs[of_step + 1]
        at_low = margins[of_limit, of_point, of_step]
        at_high = margins[of_limit, of_point, of_step + 1]
        flips.factor[:] = _close_in(model, stream, limits, flips, (low, high), (at_low, at_high))
    return flips


def _close_in(
    model: Model,
    stream: Stream,
    limits: Sequence[Limit],
    flips: Flips,
    bracket: tuple[Array, Array],
    ends: tuple[Array, Array],
) -> Array:
    """Narrow each bracket by interpolation and bisection in turn; return the factors."""
    (low, high), (at_low, at_high) = bracket, ends
    conditions = stream.take(flips.point)
    for turn in range(_ROUNDS):
        middle = (
            0.5 * (low + high)
            if turn == 1  # guards against a step, where interpolation creeps
            else low - at_low * (high - low) / (at_high - at_low)
        )
        lanes = conditions.with_flow(conditions.mass_flow * np.exp(middle))
        values = model(lanes).values
        found = np.empty(middle.size)
        for index, limit in enumerate(limits):
            mine = flips.limit == index
            if mine.any():
                found[mine] = margin(limit, values[limit.key][mine])
        same = (found >= 0.0) == (at_low >= 0.0)
        low, at_low = np.where(same, middle, low), np.where(same, found, at_low)
        high, at_high = np.where(same, high, middle), np.where(same, at_high, found)
    return np.exp(low - at_low * (high - low) / (at_high - at_low))
