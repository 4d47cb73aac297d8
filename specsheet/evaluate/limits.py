"""Which limits a tag is held to: the family's, its profile's, the purchase's and the house's."""

from __future__ import annotations

from collections.abc import Iterable
from dataclasses import replace

from specsheet import line
from specsheet.findings import Level
from specsheet.meters.family import Element, Family, Limit, Request
from specsheet.sources import PRACTICE

#: keys that change with the flow only through ``at``; every other key drives itself
STATE_KEYS = frozenset(
    {
        "density",
        "viscosity",
        "kinematic_viscosity",
        "pressure",
        "temperature",
        "isentropic_exponent",
    }
)


def limits_of(family: Family, element: Element, request: Request) -> tuple[Limit, ...]:
    """Return every limit that applies to the phase of the tag."""
    phase = request.tag.phase
    every: Iterable[Limit] = (
        *family.limits(element, request),
        *_of_profile(request),
        *_of_purchase(request),
        *_of_physics(),
        *line.velocity_limits(request.tag),
    )
    return tuple(_driven(limit) for limit in every if limit.phase in ("", phase))


def _driven(limit: Limit) -> Limit:
    return replace(limit, driver=limit.key) if limit.key in STATE_KEYS else limit


def _of_profile(request: Request) -> tuple[Limit, ...]:
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
    )


def _of_purchase(request: Request) -> tuple[Limit, ...]:
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


def _of_physics() -> tuple[Limit, ...]:
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
