"""Usual largest velocities in the line: the house's own, else common practice."""

from __future__ import annotations

from specsheet.findings import Level, Limit
from specsheet.sources import PRACTICE
from specsheet.tag import Tag

#: largest usual velocity [m/s] of liquid, gas and steam
_USUAL = {"liquid": 3.0, "gas": 30.0, "steam": 50.0}
#: below it, solids settle [m/s]
_SETTLING = 1.0
_SETTLING_KINDS = ("slurry",)
_CURES = {
    "liquid": "the line is noisy, wears and surges; choose a larger pipe or confirm it",
    "gas": "the line is noisy and loses pressure; choose a larger pipe or confirm it",
    "steam": "the line is noisy and wet steam wears it; choose a larger pipe or confirm it",
}


def service_of(tag: Tag) -> str:
    """Return "liquid", "gas" or "steam", as house limits are stated."""
    if tag.phase != "gas":
        return "liquid"
    substance = tag.text("fluid.substance").strip().lower()
    is_steam = tag.text("fluid.kind") == "substance" and substance in ("water", "steam", "h2o")
    return "steam" if is_steam else "gas"


def velocity_limits(tag: Tag) -> tuple[Limit, ...]:
    """Return the limits on the velocity in the pipe that the house or common practice sets."""
    service = service_of(tag)
    house = tag.table("job.velocity_limits").get(service)
    if isinstance(house, float | int) and house > 0.0:
        highest, source = float(house), "house limit, job.velocity_limits"
    else:
        highest, source = _USUAL[service], PRACTICE
    limits = [
        Limit(
            key="velocity",
            low=None,
            high=highest,
            level=Level.CAUTION,
            code="line-velocity-high",
            message=_CURES[service],
            source=source,
        )
    ]
    if tag.text("fluid.kind") in _SETTLING_KINDS:
        limits.append(
            Limit(
                key="velocity",
                low=_SETTLING,
                high=None,
                level=Level.CAUTION,
                code="line-velocity-low",
                message="solids settle in the line; choose a smaller pipe or confirm the velocity",
                source=PRACTICE,
            )
        )
    return tuple(limits)
