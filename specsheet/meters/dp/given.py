"""Entries of [meter] that cannot be: said, left out, and the rest is worked out without them."""

from __future__ import annotations

from collections.abc import Callable
from dataclasses import replace
from functools import wraps

import numpy as np

from specsheet.fields import KINDS, Entry
from specsheet.findings import Finding, Level
from specsheet.meters.family import Element, Request
from specsheet.quantity.value import Quantity

#: kinds whose value may be zero, but not below
_FROM_ZERO = ("ratio", "angle")

#: dimensions across the pipe, which must be smaller than its inside diameter
_ACROSS = (
    "bore",
    "throat",
    "segment_height",
    "wedge_height",
    "cone_diameter",
    "drain_hole",
    "plate_thickness",
    "probe_diameter",
    "probe_width",
    "plunger_diameter",
    "capillary_bore",
)

#: entry -> bounds between which it must lie
_BOUNDS = {
    "target_diameter_ratio": (0.05, 0.95),
    "discharge_coefficient": (0.05, 2.0),
    "flow_coefficient": (0.05, 2.0),
    "pitot_coefficient": (0.05, 2.0),
    "exit_ratio": (1.0, 20.0),
    "capillary_count": (1.0, 1e9),
}


def guarded(size: Callable[[Request], Element]) -> Callable[[Request], Element]:
    """Return the sizing with entries that cannot be taken out first, and without warnings."""

    @wraps(size, updated=())
    def checked(request: Request) -> Element:
        usable, findings = usable_entries(request)
        with np.errstate(all="ignore"):
            element = size(usable)
        return replace(element, findings=(*findings, *element.findings))

    return checked


def usable_entries(request: Request) -> tuple[Request, tuple[Finding, ...]]:
    """Return the request without the entries that cannot be, and a finding for each of them."""
    tag = request.tag
    findings = []
    for entry in request.profile.entries:
        value = tag.given.get(entry.path)
        if isinstance(value, Quantity):
            wanted = _wanted(entry, value.value, request.pipe.inside_diameter)
            if wanted:
                findings.append(_refusal(entry, wanted, value.text))
    if not findings:
        return request, ()
    refused = {finding.field for finding in findings}
    given = {path: value for path, value in tag.given.items() if path not in refused}
    return replace(request, tag=replace(tag, given=given)), tuple(findings)


def _wanted(entry: Entry, value: float, inside: float) -> str:
    """Return what was wanted instead, or "" where the value can be."""
    low, high = _BOUNDS.get(entry.key, (-np.inf, np.inf))
    if not low <= value <= high:
        return f"a value from {low:g} to {high:g}"
    if value < 0.0 or (value == 0.0 and entry.kind not in _FROM_ZERO):
        return f"{KINDS[entry.kind].label} above zero"
    if entry.key in _ACROSS and not value < inside:
        return f"less than the inside diameter of the pipe, {inside * 1e3:.4g} mm,"
    return ""


def _refusal(entry: Entry, wanted: str, came: str) -> Finding:
    return Finding(
        Level.STOP,
        f"{entry.key.replace('_', '-')}-impossible",
        entry.path,
        f"{wanted} is wanted, but {came} came; it is left out here. Correct it or take it out",
    )
