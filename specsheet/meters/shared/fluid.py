"""What free gas and solids in the fluid do to a meter; each family says it in its own words."""

from __future__ import annotations

from specsheet.findings import Finding, Level
from specsheet.meters.family import Request
from specsheet.sources import PRACTICE


def bubbles(request: Request, message: str) -> tuple[Finding, ...]:
    """Return a caution where a liquid carries free gas."""
    tag = request.tag
    if tag.phase != "liquid" or not (tag.si("fluid.bubbles") or 0.0) > 0.0:
        return ()
    return (Finding(Level.CAUTION, "bubbles", "fluid.bubbles", message, source=PRACTICE),)


def solids(request: Request, message: str, level: Level = Level.CAUTION) -> tuple[Finding, ...]:
    """Return a finding where the fluid is abrasive or carries solids."""
    tag = request.tag
    abrasive = tag.flag("fluid.abrasive")
    if not abrasive and not (tag.si("fluid.solids") or 0.0) > 0.0:
        return ()
    field = "fluid.abrasive" if abrasive else "fluid.solids"
    return (Finding(level, "solids", field, message, source=PRACTICE),)
