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
#: two rounds of twelve cuts narrow a step of the grid to 0.07 %, within which a smooth margin is
#: interpolated to 1e-7
_ROUNDS = 2
_CUTS = np.linspace(0.0, 1.0, 14)[1:-1]


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
    """Narrow each bracket by cutting it into sections; return the factors.

    Sections instead of interpolation, since some values jump (an error that steps up below a
    Reynolds number) and a jump defeats interpolation.
    """
    (low, high), (at_low, at_high) = bracket, ends
    rows = np.arange(low.size)
    conditions = stream.take(np.repeat(flips.point, _CUTS.size))
    for _ in range(_ROUNDS):
        cuts = low[:, None] + (high - low)[:, None] * _CUTS
        lanes = conditions.with_flow(conditions.mass_flow * np.exp(cuts.ravel()))
        values = model(lanes).values
        found = np.empty(cuts.shape)
        for index in np.unique(flips.limit):
            mine = flips.limit == index
            key = limits[index].key
            found[mine] = margin(limits[index], values[key].reshape(cuts.shape)[mine])
        edges = np.column_stack([low, cuts, high])
        margins = np.column_stack([at_low, found, at_high])
        step = np.argmax((margins[:, 1:] >= 0.0) != (margins[:, :1] >= 0.0), axis=1)
        low, high = edges[rows, step], edges[rows, step + 1]
        at_low, at_high = margins[rows, step], margins[rows, step + 1]
    return np.exp(low - at_low * (high - low) / (at_high - at_low))
