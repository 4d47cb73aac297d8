"""From limits to checks, findings and the bands of the range ruler."""

from __future__ import annotations

from collections.abc import Iterable, Mapping, Sequence
from dataclasses import dataclass
from math import isnan, log, nan

import numpy as np

from specsheet.evaluate.model import Model
from specsheet.evaluate.reserve import (
    EXACT,
    FACTORS,
    NO_FLIPS,
    Bounds,
    Flips,
    Pains,
    find_flips,
)
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


def check_limits(
    request: Request,
    model: Model,
    limits: Sequence[Limit],
    values: Mapping[str, Array],
    grid: Mapping[str, Array] | None,
    pains: Pains = EXACT,
    *,
    sparing: bool = False,
) -> Checked:
    """Check every limit at every operating point.

    Args:
        request: the tag's request; n points.
        model: the meter.
        limits: the limits that apply.
        values: response at the operating points, shape (n,).
        grid: response over :func:`specsheet.evaluate.reserve.scaled`; None for no reserves.
        pains: how exactly the reserves are wanted.
        sparing: whether to look for no reserves where a stop is broken.
    """
    rows = _rows(limits, values, model.element.values)
    driven = [row for row in rows if row.limit.driver == "mass_flow" and row.limit.key in values]
    flips = NO_FLIPS
    if grid is not None and not (sparing and _is_stopped(rows)):
        own = [row.limit for row in driven]
        flips = find_flips(model, request.stream, own, grid, pains)
    checks: list[Check] = []
    findings: list[Finding] = []
    bands: list[Band] = []
    for row, crossings in zip(driven, _by_limit(flips, len(driven)), strict=True):
        checks.append(_judge_flow(request, row, crossings))
        findings.extend(_findings(request, row, checks[-1]))
        band = _band(request, row.limit, crossings)
        if band is not None:
            bands.append(band)
    for row in rows:
        if row not in driven:
            checks.append(_judge_state(request, row))
            findings.extend(_findings(request, row, checks[-1]))
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


def _is_stopped(rows: Iterable[_Row]) -> bool:
    """Tell whether a stop is broken at an operating point."""
    return any(row.limit.level is Level.STOP and min(row.inside) < 0.0 for row in rows)


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


def _findings(request: Request, row: _Row, check: Check) -> tuple[Finding, ...]:
    if check.holds:
        return _near(request, check) if _is_near(check) else ()
    limit = row.limit
    others = [
        name
        for name, share in zip(request.names, row.inside, strict=False)
        if share < 0.0 and name != check.point
    ]
    also = f" The same holds at {', '.join(others)}." if others else ""
    message = f"{_facts(request, check)}: {limit.message}.{also}"
    return (
        Finding(
            limit.level,
            limit.code,
            _field(check),
            message[0].upper() + message[1:],
            check.point,
            limit.source,
            check.reserve,
        ),
    )


def _is_near(check: Check) -> bool:
    return (
        check.reserve is not None
        and check.reserve.driver == "mass_flow"
        and SIZED_TO < abs(check.reserve.fraction) < NEAR
        and check.level is not Level.NOTE
    )


def _near(request: Request, check: Check) -> tuple[Finding, ...]:
    assert check.reserve is not None
    fraction = check.reserve.fraction
    message = (
        f"{_facts(request, check)}; the limit holds, but a flow "
        f"{100.0 * abs(fraction):.2g} % {'higher' if fraction > 0 else 'lower'} would cross it."
    )
    return (
        Finding(
            Level.NOTE,
            "limit-near",
            _field(check),
            message[0].upper() + message[1:],
            check.point,
            check.source,
            check.reserve,
        ),
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
