"""Which limits a tag is held to: the family's, its profile's, the purchase's and the house's."""

from __future__ import annotations

from collections.abc import Iterable
from dataclasses import replace

from specsheet import line
from specsheet.meters.family import Element, Family, Limit, Request
from specsheet.meters.shared.limits import of_physics, of_profile, of_purchase

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
        *of_profile(request),
        *of_purchase(request),
        *of_physics(),
        *line.velocity_limits(request.tag),
    )
    return tuple(_driven(limit) for limit in every if limit.phase in ("", phase))


def _driven(limit: Limit) -> Limit:
    return replace(limit, driver=limit.key) if limit.key in STATE_KEYS else limit
