"""From limits to checks, findings and the bands of the range ruler."""

from __future__ import annotations

from collections.abc import Mapping, Sequence
from dataclasses import dataclass
from math import log

import numpy as np

from specsheet.evaluate.model import Model
from specsheet.evaluate.reserve import (
    EVEN,
    FACTORS,
    NO_FLIPS,
    Bounds,
    Flips,
    find_flips,
    margin,
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
    evenness: float = EVEN,
) -> Checked:
    """Check every limit at every operating point.

    Args:
        request: the tag's request; n points.
        model: the meter.
        limits: the limits that apply.
        values: response at the operating points, shape (n,).
        grid: response over :func:`specsheet.evaluate.reserve.scaled`; None for no reserves.
        evenness: as in :func:`specsheet.evaluate.reserve.find_flips`.
    """
    driven = [limit for limit in limits if _driven_by_flow(limit, values)]
    flips = NO_FLIPS if grid is None else find_flips(model, request.stream, driven, grid, evenness)
    crossings = _by_limit(flips, len(driven))
    checks: list[Check] = []
    findings: list[Finding] = []
    bands: list[Band] = []
    for limit, own, inside in zip(driven, crossings, _margins(driven, values), strict=True):
        judged = _judge_flow(request, limit, values[limit.key], inside, own)
        checks.append(judged)
        findings.extend(_findings(request, limit, judged, values[limit.key]))
        band = _band(request, limit, own)
        if band is not None:
            bands.append(band)
    for limit in limits:
        judged_state = _judge_state(request, limit, values, model.element.values)
        if judged_state is not None:
            checks.append(judged_state)
            stated = values.get(limit.key, np.array([judged_state.value]))
            findings.extend(_findings(request, limit, judged_state, stated))
    return Checked(tuple(checks), tuple(_tightest_first(bands, request)), tuple(findings))


def _driven_by_flow(limit: Limit, values: Mapping[str, Array]) -> bool:
    found = values.get(limit.key)
    return limit.driver == "mass_flow" and found is not None and not bool(np.isnan(found).all())


@dataclass(frozen=True, slots=True)
class _Crossing:
    """One flip of one limit: at which point, at which flow factor, and in which sense."""

    point: int
    factor: float
    rising: bool

    @property
    def distance(self) -> float:
        return abs(log(self.factor))


def _by_limit(flips: Flips, count: int) -> list[list[_Crossing]]:
    found: list[list[_Crossing]] = [[] for _ in range(count)]
    rows = (flips.limit, flips.point, flips.factor, flips.rising)
    for limit, point, factor, rising in zip(*(row.tolist() for row in rows), strict=True):
        found[limit].append(_Crossing(point, factor, rising))
    return found


def _margins(limits: Sequence[Limit], values: Mapping[str, Array]) -> list[list[float]]:
    """Return the margins of every limit at every point."""
    if not limits:
        return []
    found: list[list[float]] = (
        Bounds.of(limits).margins(np.array([values[limit.key] for limit in limits])).tolist()
    )
    return found


def _judge_flow(
    request: Request,
    limit: Limit,
    values: Array,
    inside: Sequence[float],
    crossings: Sequence[_Crossing],
) -> Check:
    """Judge a limit that the flow drives, at the point where it is tightest."""
    broken = [index for index, share in enumerate(inside) if share < 0.0]
    nearest: dict[int, _Crossing] = {}
    for crossing in sorted(crossings, key=lambda item: -item.distance):
        nearest[crossing.point] = crossing
    if broken and any(index in nearest for index in broken):
        known = [index for index in broken if index in nearest]
        worst = max(known, key=lambda index: nearest[index].distance)
    elif broken or not nearest:
        worst = inside.index(min(inside))
    else:
        worst = min(nearest, key=lambda index: nearest[index].distance)
    reserve = None
    if worst in nearest:
        factor = nearest[worst].factor
        flow = float(request.stream.mass_flow[worst])
        reserve = Reserve("mass_flow", flow * factor, factor - 1.0)
    return _check(request, limit, worst, float(values[worst]), not broken, reserve)


def _judge_state(
    request: Request,
    limit: Limit,
    values: Mapping[str, Array],
    element: Mapping[str, Given],
) -> Check | None:
    """Judge a limit that the flow does not drive; None when its value is not known."""
    if limit.driver == "mass_flow" and limit.key in values:
        return None
    found = values.get(limit.key)
    if found is None:
        stated = element.get(limit.key)
        if stated is None or isinstance(stated.value, str):
            return None
        found = np.array([stated.value])
    if np.isnan(found).all():
        return None
    inside = margin(limit, found)
    worst = int(inside.argmin())
    value = float(found[worst])
    bound = _nearest_bound(limit, value)
    reserve = Reserve(limit.key, bound, (bound - value) / value) if value and limit.driver else None
    return _check(request, limit, worst, value, bool(inside[worst] >= 0.0), reserve)


def _check(
    request: Request,
    limit: Limit,
    worst: int,
    value: float,
    holds: bool,
    reserve: Reserve | None,
) -> Check:
    return Check(
        key=limit.key,
        point=request.names[worst] if worst < len(request.names) else "",
        value=value,
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


def _findings(request: Request, limit: Limit, check: Check, values: Array) -> tuple[Finding, ...]:
    if check.holds:
        return _near(request, check) if _is_near(check) else ()
    broken = margin(limit, values) < 0.0
    others = [
        name
        for name, wrong in zip(request.names, broken, strict=False)
        if wrong and name != check.point
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
