"""The limits that every family is held to, and by how much a response breaks them."""

from __future__ import annotations

from collections.abc import Mapping
from math import isfinite, log

from specsheet.findings import Level
from specsheet.meters.family import Array, Limit, Request
from specsheet.sources import PRACTICE

#: largest shortfall counted for one limit: a value without a logarithm counts as this
_HOPELESS = 20.0


def of_profile(request: Request) -> tuple[Limit, ...]:
    """Return the usual limits of the family for the phase of the tag, from its profile."""
    return tuple(
        Limit(
            key=item.quantity,
            low=item.low,
            high=item.high,
            level=Level(item.level),
            code=f"{item.quantity.replace('_', '-')}-limit",
            message=item.message,
            source=item.source,
            phase=item.phase,
        )
        for item in request.profile.limits
        if item.phase in ("", request.tag.phase)
    )


def _split(request: Request) -> str:
    """Return how a family can hold an uncertainty over a wider range."""
    if any(entry.path == "meter.second_range" for entry in request.profile.entries):
        return "split it over two transmitters"
    return "split it over two meters, take the reading by pulse or bus instead of 4-20 mA"


def of_purchase(request: Request) -> tuple[Limit, ...]:
    """Return the demands of the purchase that bound a value."""
    wanted: list[Limit] = []
    uncertainty = request.tag.si("require.uncertainty")
    if uncertainty is not None:
        wanted.append(
            Limit(
                key="uncertainty",
                low=None,
                high=uncertainty,
                level=Level.CAUTION,
                code="uncertainty-demanded",
                message=f"the purchase demands less; narrow the range, {_split(request)}, or "
                "choose a family that holds it",
                source="require.uncertainty",
            )
        )
    loss = request.tag.si("require.pressure_loss")
    if loss is not None:
        wanted.append(
            Limit(
                key="pressure_loss",
                low=None,
                high=loss,
                level=Level.CAUTION,
                code="pressure-loss-demanded",
                message="the purchase allows less; choose a larger meter or a lower signal",
                source="require.pressure_loss",
            )
        )
    return tuple(wanted)


_PHYSICS = (
    Limit(
        key="back_pressure_margin",
        low=0.0,
        high=None,
        level=Level.STOP,
        code="cavitation",
        message="the liquid flashes or cavitates in the meter: the reading is wrong and the "
        "meter is damaged; raise the pressure, cool the liquid, or lower the loss",
        source="vapour pressure of the liquid",
        phase="liquid",
    ),
    Limit(
        key="mach_number",
        low=None,
        high=0.3,
        level=Level.CAUTION,
        code="mach-number-high",
        message="above this the gas can no longer be taken as nearly incompressible in the "
        "pipe; choose a larger pipe",
        source=PRACTICE,
        phase="gas",
    ),
)


def of_physics() -> tuple[Limit, ...]:
    """Return the limits that hold for every family: no cavitation, no fast gas."""
    return _PHYSICS


def beside_own(request: Request) -> tuple[Limit, ...]:
    """Return the limits of the tag's phase that do not depend on the element."""
    every = (*of_profile(request), *of_purchase(request), *of_physics())
    return tuple(limit for limit in every if limit.phase in ("", request.tag.phase))


def shortfall(limit: Limit, values: Mapping[str, Array]) -> float:
    """Return by how much a limit is broken at its worst point: 0 where it holds everywhere.

    The logarithm of value over bound, so that limits of any unit weigh alike [-]. A value that is
    not known breaks nothing.
    """
    found = values.get(limit.key)
    if found is None:
        return 0.0
    low, high = limit.low, limit.high
    worst = 0.0
    for value in found.tolist():
        if low is not None and value < low:
            worst = max(worst, _distance(value, low))
        if high is not None and value > high:
            worst = max(worst, _distance(value, high))
    return worst


def _distance(value: float, bound: float) -> float:
    if not bound:
        return 1.0
    ratio = value / bound
    return min(abs(log(ratio)), _HOPELESS) if ratio > 0.0 and isfinite(ratio) else _HOPELESS
