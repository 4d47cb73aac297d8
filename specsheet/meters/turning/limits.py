"""Limits of a meter that turns: its range, and what the liquid may be like."""

from __future__ import annotations

from specsheet.findings import Level
from specsheet.meters.family import Element, Limit, Request
from specsheet.sources import PRACTICE


def limits(element: Element, request: Request) -> tuple[Limit, ...]:
    """Return the range of flow of the size; above it for a short time only."""
    del request
    overload = element.numbers["overload"]
    return (
        Limit(
            "flow_by_smallest",
            1.0,
            None,
            Level.CAUTION,
            "below-linear-range",
            "the flow lies below the range of the stated error; choose a smaller meter",
            PRACTICE,
        ),
        Limit(
            "load",
            None,
            1.0,
            Level.CAUTION,
            "above-range",
            "the meter overspeeds and its bearings wear; choose a larger meter",
            PRACTICE,
        ),
        Limit(
            "load",
            None,
            overload,
            Level.STOP,
            "overspeed",
            "the meter is damaged by overspeed; choose a larger meter",
            PRACTICE,
        ),
    )
