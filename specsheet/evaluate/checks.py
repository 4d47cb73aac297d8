"""From limits to checks, findings and the bands of the range ruler."""

from __future__ import annotations

from collections.abc import Mapping, Sequence
from dataclasses import dataclass
from math import isnan, log, nan

import numpy as np

from specsheet.evaluate.grid import FACTORS, Bounds
from specsheet.evaluate.model import Model
from specsheet.evaluate.reserve import NO_FLIPS, Flips, Search
from specsheet.evaluate.result import Band, Check
from specsheet.evaluate.words import facts
from specsheet.findings import Finding, Level, Reserve
from specsheet.meters.family import Array, Given, Limit, Request

#: a limit that holds by less than this share of the flow is worth a note; common practice
NEAR = 0.05
#: a limit that holds by less than this was sized to on purpose
SIZED_TO = 0.001


@dataclass(frozen=True)
class Checked:
    """What the limits say.

    Attributes:
        checks: every limit looked at.
        bands: windows of mass flow at the conditions of the normal point.
        findings: one for each limit that does not hold, or holds narrowly.
    """

    checks: tuple[Check, ...]
    bands: tuple[Band, ...]
    findings: tuple[Finding, ...]


@dataclass(frozen=True)
class Held:
    """A meter held against its limits, before reserves are looked for.

    Attributes:
        request: the tag's request; n points.
        model: the meter.
        driven: limits that the flow drives.
        others: limits that it does not.
    """

    request: Request
    model: Model
    driven: tuple[_Row, ...]
    others: tuple[_Row, ...]

    @property
    def stopped(self) -> bool:
        """Whether a stop is broken at an operating point."""
        rows = (*self.driven, *self.others)
        return any(row.limit.level is Level.STOP and min(row.inside) < 0.0 for row in rows)

    def search(self, grid: Mapping[str, Array]) -> Search:
        """Return the search for its reserves.

        Args:
            grid: response over :func:`specsheet.evaluate.reserve.scaled`.
        """
        return Search(self.model, [row.limit for row in self.driven], grid)


def hold(
    request: Request, model: Model, limits: Sequence[Limit], values: Mapping[str, Array]
) -> Held:
    """Hold a meter against its limits at every operating point.

    Args:
        request: the tag's request; n points.
        model: the meter.
        limits: the limits that apply.
        values: response at the operating points, shape (n,).
    """
    driven: list[_Row] = []
    others: list[_Row] = []
    for row in _rows(limits, values, model.element.values):
        by_flow = row.limit.driver == "mass_flow" and row.limit.key in values
        (driven if by_flow else others).append(row)
    return Held(request, model, tuple(driven), tuple(others))


def judge_limits(held: Held, flips: Flips = NO_FLIPS, *, near: bool = True) -> Checked:
    """Judge every limit.

    Args:
        held: the meter, held against them.
        flips: what the search for reserves found.
        near: whether a limit that holds narrowly is worth a note.
    """
    request = held.request
    checks: list[Check] = []
    findings: list[Finding] = []
    bands: list[Band] = []
    crossings = _by_limit(flips, len(held.driven))
    for row, own in zip(held.driven, crossings, strict=True):
        checks.append(_judge_flow(request, row, own))
        band = _band(request, row.limit, own)
        if band is not None:
            bands.append(band)
    checks.extend(_judge_state(request, row) for row in held.others)
    for row, check in zip((*held.driven, *held.others), checks, strict=True):
        if not check.holds:
            findings.append(_broken(request, row, check))
        elif near and _is_near(check):
            findings.append(_near(request, check))
    return Checked(tuple(checks), tuple(_tightest_first(bands, request)), tuple(findings))


@dataclass(frozen=True, slots=True, eq=False)
class _Row:
    """A limit whose value is known.

    Attributes:
        limit: the limit.
        values: at every point; one value where it belongs to the meter as a whole.
        inside: margin of each value.
    """

    limit: Limit
    values: Sequence[float]
    inside: Sequence[float]


def _rows(
    limits: Sequence[Limit], values: Mapping[str, Array], element: Mapping[str, Given]
) -> tuple[_Row, ...]:
    """Return the limits whose value is known at some point, with its margins."""
    known: list[tuple[Limit, list[float]]] = []
    for limit in limits:
        array, own = values.get(limit.key), element.get(limit.key)
        if array is not None:
            column = array.tolist()
        elif own is not None and not isinstance(own.value, str):
            column = [own.value]
        else:
            continue
        if not all(map(isnan, column)):
            known.append((limit, column))
    if not known:
        return ()
    most = max(len(column) for _, column in known)
    table = [column + [nan] * (most - len(column)) for _, column in known]
    inside = Bounds.of([limit for limit, _ in known]).margins(np.array(table)).tolist()
    return tuple(
        _Row(limit, column, share[: len(column)])
        for (limit, column), share in zip(known, inside, strict=True)
    )


@dataclass(frozen=True, slots=True)
class _Crossing:
    """One flip of one limit.

    Attributes:
        point: the operating point that it is seen from.
        factor: the flow there by that of the point [-].
        distance: logarithm of the factor, without its sign.
        rising: whether the limit begins to hold there as the flow rises.
    """

    point: int
    factor: float
    distance: float
    rising: bool


def _by_limit(flips: Flips, count: int) -> list[list[_Crossing]]:
    found: list[list[_Crossing]] = [[] for _ in range(count)]
    distance = np.abs(np.log(flips.factor))
    columns = (flips.point, flips.factor, distance, flips.rising)
    crossings = map(_Crossing, *(column.tolist() for column in columns))
    for limit, crossing in zip(flips.limit.tolist(), crossings, strict=True):
        found[limit].append(crossing)
    return found


def _judge_flow(request: Request, row: _Row, crossings: Sequence[_Crossing]) -> Check:
    """Judge a limit that the flow drives, at the point where it is tightest."""
    inside = row.inside
    broken = [index for index, share in enumerate(inside) if share < 0.0]
    nearest: dict[int, _Crossing] = {}
    for crossing in crossings:
        known = nearest.get(crossing.point)
        if known is None or crossing.distance <= known.distance:
            nearest[crossing.point] = crossing
    mended = [index for index in broken if index in nearest]
    if mended:
        worst = max(mended, key=lambda index: nearest[index].distance)
    elif broken or not nearest:
        worst = inside.index(min(inside))
    else:
        worst = min(nearest, key=lambda index: nearest[index].distance)
    reserve = None
    if worst in nearest:
        factor = nearest[worst].factor
        flow = float(request.stream.mass_flow[worst])
        reserve = Reserve("mass_flow", flow * factor, factor - 1.0)
    return _check(request, row, worst, not broken, reserve)


def _judge_state(request: Request, row: _Row) -> Check:
    """Judge a limit that the flow does not drive."""
    limit, worst = row.limit, row.inside.index(min(row.inside))
    value = row.values[worst]
    bound = _nearest_bound(limit, value)
    reserve = Reserve(limit.key, bound, (bound - value) / value) if value and limit.driver else None
    return _check(request, row, worst, row.inside[worst] >= 0.0, reserve)


def _check(request: Request, row: _Row, worst: int, holds: bool, reserve: Reserve | None) -> Check:
    limit = row.limit
    return Check(
        key=limit.key,
        point=request.names[worst] if worst < len(request.names) else "",
        value=row.values[worst],
        low=limit.low,
        high=limit.high,
        holds=holds,
        level=limit.level,
        message=limit.message,
        source=limit.source,
        reserve=reserve,
    )


def _nearest_bound(limit: Limit, value: float) -> float:
    bounds = [bound for bound in (limit.low, limit.high) if bound is not None]
    return min(bounds, key=lambda bound: abs(bound - value))


def _broken(request: Request, row: _Row, check: Check) -> Finding:
    limit = row.limit
    others = [
        name
        for name, share in zip(request.names, row.inside, strict=False)
        if share < 0.0 and name != check.point
    ]
    also = f" The same holds at {', '.join(others)}." if others else ""
    message = f"{_facts(request, check)}: {limit.message}.{also}"
    return Finding(
        limit.level,
        limit.code,
        _field(check),
        message[0].upper() + message[1:],
        check.point,
        limit.source,
        check.reserve,
    )


def _is_near(check: Check) -> bool:
    return (
        check.reserve is not None
        and check.reserve.driver == "mass_flow"
        and SIZED_TO < abs(check.reserve.fraction) < NEAR
        and check.level is not Level.NOTE
    )


def _near(request: Request, check: Check) -> Finding:
    assert check.reserve is not None
    fraction = check.reserve.fraction
    message = (
        f"{_facts(request, check)}; the limit holds, but a flow "
        f"{100.0 * abs(fraction):.2g} % {'higher' if fraction > 0 else 'lower'} would cross it."
    )
    return Finding(
        Level.NOTE,
        "limit-near",
        _field(check),
        message[0].upper() + message[1:],
        check.point,
        check.source,
        check.reserve,
    )


def _facts(request: Request, check: Check) -> str:
    where = f" at {check.point}" if check.point else ""
    units = request.tag.table("job.units")
    return facts(check.key, check.value, (check.low, check.high), units, where)


def _field(check: Check) -> str:
    if not check.point:
        return ""
    own = check.key if check.key in ("temperature", "pressure", "density", "viscosity") else "flow"
    return f"points.{check.point}.{own}"


def _band(request: Request, limit: Limit, crossings: Sequence[_Crossing]) -> Band | None:
    """Return the window of flow around the normal point in which the limit holds."""
    here = [crossing for crossing in crossings if crossing.point == request.normal]
    if not here:
        return None
    flow = float(request.stream.mass_flow[request.normal])
    starts = [crossing.factor for crossing in here if crossing.rising]
    ends = [crossing.factor for crossing in here if not crossing.rising]
    low = flow * min(starts) if starts else None
    high = flow * max(ends) if ends else None
    return Band(limit.key, limit.low, limit.high, low, high, limit.level)


def _tightest_first(bands: list[Band], request: Request) -> list[Band]:
    flow = float(request.stream.mass_flow[request.normal])

    def width(band: Band) -> float:
        low = band.low or flow * FACTORS[0]
        high = band.high or flow * FACTORS[-1]
        return log(high / low)

    return sorted(bands, key=width)
