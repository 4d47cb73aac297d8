"""The range ruler: windows of flow and operating points on a logarithmic axis."""

from __future__ import annotations

import math
import re
from collections import Counter
from collections.abc import Sequence
from typing import TYPE_CHECKING

from specsheet.sheet import rounding, rows, scales, words
from specsheet.sheet.axis import FlowAxis, mass_flows
from specsheet.sheet.model import Mark, Ruler, Tick, Window
from specsheet.sheet.units import Units

if TYPE_CHECKING:
    from specsheet.evaluate.result import Band, Evaluation

#: room left and right of the operating points, and how far a window may draw the axis out [-]
_ROOM = 1.6
_REACH = 4.0

#: a flow this close to the end of a window stands on it (an end solved for the point itself, and
#: read off with this error at most) [-]
_TOUCH = 1e-3

#: where the short name of a value ends: "Signal", "Reynolds number", "Velocity", "Load"
_BEYOND_NAME = re.compile(r",| in the | at | by the ")


def build(evaluation: Evaluation, units: Units, axis: FlowAxis) -> Ruler | None:
    """Return the ruler, None when no operating point has a flow."""
    stated = mass_flows(evaluation)
    if not stated:
        return None
    # at the conditions of the normal point, to which the windows belong
    flows = {name: flow * axis.factors[name] / axis.factor for name, flow in stated.items()}
    bands = tuple(dict.fromkeys(evaluation.bands))  # one lane where two reasons set one bound
    low, high = _ends(list(flows.values()), bands)
    span = math.log(high / low)
    windows = tuple(
        _window(band, label, axis, low, high, span)
        for band, label in zip(bands, _labels(bands, units), strict=True)
    )
    start = max((window.low for window in windows), default=0.0)
    end = min((window.high for window in windows), default=1.0)
    beside, more = scales.build(evaluation, units, axis)
    return Ruler(
        label=axis.label,
        unit=axis.printed_unit,
        ticks=_ticks(axis.shown(low), axis.shown(high)),
        windows=windows,
        marks=tuple(
            Mark(
                name,
                _typed(evaluation, name, axis) or axis.text(flow),
                math.log(flow / low) / span,
                _inside(flow, bands),
            )
            for name, flow in flows.items()
        ),
        usable=(start, end) if start < end else None,
        scales=beside,
        more=more,
    )


def _typed(evaluation: Evaluation, name: str, axis: FlowAxis) -> str:
    """Return the flow of a point with its own digits where it was typed in the axis's unit."""
    held = next((point for point in evaluation.tag.points if point.name == name), None)
    flow = held.quantity("flow") if held else None
    figures, unit = words.split(flow.text) if flow else ("", "")
    return figures if flow and flow.kind == axis.kind and unit == axis.printed_unit else ""


def _ends(flows: list[float], bands: Sequence[Band]) -> tuple[float, float]:
    """Return the ends of the axis [kg/s]: the points with room, and the windows within reach."""
    smallest, largest = min(flows), max(flows)
    edges = [edge for band in bands for edge in (band.low, band.high) if edge is not None]
    near = [edge for edge in edges if smallest / _REACH <= edge <= largest * _REACH]
    return min([smallest, *near]) / _ROOM, max([largest, *near]) * _ROOM


def _inside(flow: float, bands: Sequence[Band]) -> bool:
    """Tell whether every window holds a flow; an end belongs to the window."""
    return all(
        (band.low is None or flow >= band.low * (1.0 - _TOUCH))
        and (band.high is None or flow <= band.high * (1.0 + _TOUCH))
        for band in bands
    )


def _labels(bands: Sequence[Band], units: Units) -> list[str]:
    """Return what each window is called; the bounds tell two windows of one value apart."""
    keys = Counter(band.key for band in bands)
    return [
        words.label(band.key) if keys[band.key] == 1 else _bounded(band, units) for band in bands
    ]


def _bounded(band: Band, units: Units) -> str:
    """Return the short name of a value with its bounds: "Signal ≤ 100 %"."""
    kind = rows.kind_of(band.key)
    unit = rows.unit_of(band.key, [x for x in (band.least, band.most) if x is not None], units)
    least, most = (
        "" if bound is None else rows.bound(bound, kind, unit) for bound in (band.least, band.most)
    )
    allowed = f"{least} to {most}" if least and most else f"≥ {least}" if least else f"≤ {most}"
    name = _BEYOND_NAME.split(words.label(band.key), maxsplit=1)[0]
    return f"{name} {allowed} {words.unit(unit)}".rstrip()


def _window(band: Band, label: str, axis: FlowAxis, low: float, high: float, span: float) -> Window:
    open_low = band.low is None or band.low < low
    open_high = band.high is None or band.high > high
    start = 0.0 if open_low or band.low is None else math.log(band.low / low) / span
    end = 1.0 if open_high or band.high is None else math.log(band.high / low) / span
    return Window(
        label=label,
        low=min(max(start, 0.0), 1.0),
        high=min(max(end, 0.0), 1.0),
        open_low=open_low,
        open_high=open_high,
        low_text="" if band.low is None else axis.text(band.low),
        high_text="" if band.high is None else axis.text(band.high),
        level=band.level,
    )


def _ticks(low: float, high: float) -> tuple[Tick, ...]:
    """Return the ticks between two flows in the unit shown: 1 to 9 in each decade."""
    decades = math.log10(high / low)
    labelled = (1,) if decades > 3.5 else (1, 2, 5) if decades > 0.8 else tuple(range(1, 10))
    ticks = []
    for power in range(math.floor(math.log10(low)), math.ceil(math.log10(high)) + 1):
        for digit in range(1, 10):
            value = digit * 10.0**power
            if low <= value <= high:
                label = rounding.plain(value) if digit in labelled else ""
                ticks.append(Tick(math.log10(value / low) / decades, label))
    return tuple(ticks)


def stagger(positions: Sequence[float], widths: Sequence[float], gap: float) -> tuple[int, ...]:
    """Return the lane of each label so that no two labels of a lane touch.

    Args:
        positions: centre of each label, in any unit.
        widths: width of each label, in the same unit.
        gap: least distance between two labels of a lane.

    Returns:
        lane of each label, 0 nearest to the axis, in the order given.
    """
    lanes: list[float] = []
    chosen = [0] * len(positions)
    for place in sorted(range(len(positions)), key=lambda at: positions[at] - widths[at] / 2.0):
        start = positions[place] - widths[place] / 2.0
        free = [lane for lane, end in enumerate(lanes) if start >= end + gap]
        lane = free[0] if free else len(lanes)
        if lane == len(lanes):
            lanes.append(0.0)
        lanes[lane] = start + widths[place]
        chosen[place] = lane
    return tuple(chosen)
