"""The limits that decide a size, and by how much a response breaks them."""

from __future__ import annotations

from collections.abc import Mapping

import numpy as np

from specsheet.findings import Level
from specsheet.meters.family import Array, Limit, Request

#: largest shortfall counted for one limit: a value without a logarithm counts as this
_HOPELESS = 20.0


def of_profile(request: Request) -> tuple[Limit, ...]:
    """Return the usual limits of the family, from its profile, for the phase of the tag."""
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


def of_purchase(request: Request) -> tuple[Limit, ...]:
    """Return the demands of the purchase that a size can answer."""
    wanted = (("uncertainty", "require.uncertainty"), ("pressure_loss", "require.pressure_loss"))
    return tuple(
        Limit(key, None, bound, Level.CAUTION, f"{key}-demanded", "", path)
        for key, path in wanted
        if (bound := request.tag.si(path)) is not None
    )


def of_physics(request: Request) -> tuple[Limit, ...]:
    """Return the limits that hold for every family: no cavitation, no fast gas."""
    if request.tag.phase == "liquid":
        return (Limit("back_pressure_margin", 0.0, None, Level.STOP, "cavitation", "", ""),)
    return (Limit("mach_number", None, 0.3, Level.CAUTION, "mach-number-high", "", ""),)


def shortfall(limit: Limit, values: Mapping[str, Array]) -> float:
    """Return by how much a limit is broken at its worst point: 0 where it holds everywhere.

    The logarithm of value over bound, so that limits of any unit weigh alike [-]. A value that is
    not known everywhere (all NaN) breaks nothing.
    """
    found = values.get(limit.key)
    if found is None or bool(np.isnan(found).all()):
        return 0.0
    worst = 0.0
    with np.errstate(all="ignore"):
        for bound, sign in ((limit.low, 1.0), (limit.high, -1.0)):
            if bound is None:
                continue
            broken = sign * (found - bound) < 0.0
            distance = np.abs(np.log(found / bound)) if bound else np.full(found.shape, 1.0)
            distance = np.where(np.isfinite(distance), distance, _HOPELESS)
            worst = max(worst, float(np.max(np.where(broken, distance, 0.0), initial=0.0)))
    return min(worst, _HOPELESS)
