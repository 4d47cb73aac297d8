"""The limits that every family is held to, and by how much a response breaks them."""

from __future__ import annotations

from collections.abc import Mapping

import numpy as np

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
                message="the purchase demands less; narrow the range, split it over two "
                "transmitters, or choose a family that holds it",
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


def of_physics() -> tuple[Limit, ...]:
    """Return the limits that hold for every family: no cavitation, no fast gas."""
    return (
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
