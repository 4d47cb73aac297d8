"""Checks of what was stated, before any meter is looked at."""

from __future__ import annotations

from collections.abc import Iterator
from itertools import pairwise

from specsheet.evaluate.stream import Points
from specsheet.findings import Finding, Level
from specsheet.tag import Tag

#: names of operating points whose flows must rise in this order
_ORDER = ("minimum", "normal", "maximum", "design")


def check_statements(tag: Tag, points: Points) -> tuple[Finding, ...]:
    """Return what is wrong with the statements as such.

    What of the file is not used, points that are missing, their order, gauge and absolute.
    """
    return (*_unused(tag), *_points(tag), *_order(tag, points), *_pressures(tag))


def _unused(tag: Tag) -> Iterator[Finding]:
    """Yield what stands in the file and is not used: without it the sheet may look sound."""
    for path, message in tag.unused:
        where = "The file job.toml" if path.startswith("job.") else "The file"
        yield Finding(
            Level.STOP, "entry-unusable", path, f"{where} holds what cannot be used here: {message}"
        )


def _points(tag: Tag) -> Iterator[Finding]:
    if not tag.points:
        message = "State at least one operating point: its name, flow, pressure and temperature."
        yield Finding(Level.STOP, "points-missing", "points", message)


def _order(tag: Tag, points: Points) -> Iterator[Finding]:
    flows = {
        point.name: flow
        for point, flow in zip(tag.points, points.mass_flows, strict=True)
        if flow is not None
    }
    known = [name for name in _ORDER if name in flows]
    for lower, upper in pairwise(known):
        if flows[lower] > flows[upper]:
            yield Finding(
                Level.CAUTION,
                "points-out-of-order",
                f"points.{lower}.flow",
                f"The flow at {lower} ({flows[lower]:.4g} kg/s) is larger than at {upper} "
                f"({flows[upper]:.4g} kg/s). Swap the two, or mend the unit of one.",
                lower,
            )
    for name in ("minimum", "maximum"):
        if flows and name not in flows:
            yield Finding(
                Level.NOTE,
                "point-not-stated",
                "points",
                f"No operating point is called {name}; the "
                f"{'smallest' if name == 'minimum' else 'largest'} flow stated stands in for it.",
            )


def _pressures(tag: Tag) -> Iterator[Finding]:
    for point in tag.points:
        stated = point.quantity("pressure")
        if stated is None:
            continue
        field = f"points.{point.name}.pressure"
        absolute = tag.absolute(stated)
        if absolute <= 0.0:
            yield Finding(
                Level.STOP,
                "pressure-not-positive",
                field,
                f"{stated.text} is at or below a perfect vacuum with an atmosphere of "
                f"{tag.atmospheric_pressure / 1e5:.4g} bar(a). State the pressure again.",
                point.name,
            )
        elif (
            stated.kind == "pressure_absolute"
            and absolute < 0.98 * tag.atmospheric_pressure
            and tag.quantity("design.minimum_pressure") is None
        ):
            yield Finding(
                Level.CAUTION,
                "pressure-below-atmosphere",
                field,
                f"{stated.text} is a vacuum. If a gauge pressure was meant, write "
                f"{stated.text.replace('(a)', '(g)')}; if not, state design.minimum_pressure.",
                point.name,
            )
