"""The flow from a measured signal, at the conditions of every operating point.

The family's response is inverted as it is, by bisection of all points at once: no family has a
second set of equations for this direction, so the two cannot disagree.
"""

from __future__ import annotations

from collections.abc import Mapping, Sequence
from dataclasses import dataclass, replace

import numpy as np
from numpy.typing import NDArray

from specsheet import packs
from specsheet.evaluate import assemble
from specsheet.evaluate.checks import hold, judge_limits
from specsheet.evaluate.common import COMMON_DERIVATIONS
from specsheet.evaluate.judge import put_into_line
from specsheet.evaluate.limits import limits_of
from specsheet.evaluate.prepare import Prepared, prepare
from specsheet.evaluate.prepare import request as requested
from specsheet.evaluate.result import PointResult, Result
from specsheet.evaluate.signals import Signal
from specsheet.evaluate.words import say
from specsheet.fields.terms import in_sentence
from specsheet.findings import Finding, Level, Origin
from specsheet.meters import registry
from specsheet.meters.family import Array, Element, Family, Request, Stream
from specsheet.tag import Tag

#: flows that are looked at first, by the flow stated at the point; the step between two is 12 %
_FACTORS = np.geomspace(1e-5, 1e3, 161)
#: halvings of such a step: it ends 1e-15 wide, below what a double resolves
_HALVINGS = 50
#: the signal found must be the one measured; where the output jumps (a cut-off) it is not
_SAME = 1e-6


@dataclass(frozen=True)
class Measured:
    """What a measured signal means.

    Attributes:
        signal: the signal.
        points: values at the flow found, by operating point; a point without one is missing.
        findings: why there is no flow at a point, and limits that the flow found crosses.
    """

    signal: Signal
    points: tuple[PointResult, ...]
    findings: tuple[Finding, ...]


def flow_from_signal(tag: Tag, text: str) -> Measured | Finding:
    """Return the flow that gives a measured signal at the conditions of each operating point.

    The meter is the one the tag describes: as stated, or as sized where it is free.

    Args:
        tag: the tag.
        text: the signal as read ("125 mbar", "12.4 mA", "52 %", "340 Hz").

    Returns:
        The flows, or a finding that says why there can be none.
    """
    family = registry.family(tag.family)
    if family is None or tag.family not in packs.family_keys():
        return _refused(
            "family",
            f"the family {tag.family!r} has no equations here, so no flow can be found from its "
            "signal",
        )
    prepared = prepare(tag)
    request = requested(prepared, packs.profile(tag.family))
    if request is None:
        return _refused("points", "no operating point can be evaluated; `specsheet check` says why")
    element = family.size(request)
    known = family.at(element, request.stream)
    signal = Signal.read(text, tag, family, known)
    if isinstance(signal, str):
        return _refused("signal", signal)
    return _found(prepared, request, family, element, signal)


def _refused(field: str, message: str) -> Finding:
    return Finding(Level.STOP, "signal-unusable", field, message)


def _found(
    prepared: Prepared, request: Request, family: Family, element: Element, signal: Signal
) -> Measured:
    stream = _as_read(request.stream, signal)
    flow = inverted(family, element, stream, signal.key, np.full(len(request.names), signal.value))
    usable: NDArray[np.intp] = np.flatnonzero(np.isfinite(flow))
    missing = [
        _no_flow(request, family, element, signal, index)
        for index in range(len(request.names))
        if index not in usable
    ]
    if not usable.size:
        return Measured(signal, (), tuple(missing))
    at_flow = replace(
        request,
        names=tuple(request.names[index] for index in usable),
        stream=stream.take(usable).with_flow(flow[usable]),
        normal=0,
        maximum=int(flow[usable].argmax()),
        minimum=int(flow[usable].argmin()),
    )
    _, model = put_into_line(prepared, request, family, element)
    response = model(at_flow.stream)
    limits = [limit for limit in limits_of(family, element, request) if limit.driver == "mass_flow"]
    checked = judge_limits(hold(at_flow, model, limits, response.values))
    crossed = [item for item in checked.findings if item.level is not Level.NOTE]
    points = _points(prepared, at_flow, family, signal, response.values)
    return Measured(signal, points, (*missing, *crossed))


def _as_read(stream: Stream, signal: Signal) -> Stream:
    """Return the conditions; where the signal is the inlet pressure, at that pressure.

    The density follows the pressure at the temperature of the point, as the family has it.
    """
    if signal.key != "inlet_pressure":
        return stream
    pressure = np.full_like(stream.pressure, signal.value)
    return replace(
        stream, pressure=pressure, density=stream.density * signal.value / stream.pressure
    )


def inverted(family: Family, element: Element, stream: Stream, key: str, target: Array) -> Array:
    """Return the mass flow at which a value of the response is met [kg/s]; NaN where none is.

    Args:
        family, element: the meter.
        stream: the conditions; its flows tell where to look, n of them.
        key: glossary key of a value that rises with flow.
        target: what it is to be (SI), shape (n,).
    """
    count = stream.mass_flow.size

    def above(factor: Array, of: Stream, wanted: Array) -> NDArray[np.bool_]:
        found = family.at(element, of.with_flow(of.mass_flow * factor))[key]
        return np.asarray(found >= wanted)

    with np.errstate(all="ignore"):
        lanes = stream.take(np.repeat(np.arange(count), _FACTORS.size))
        grid = above(np.tile(_FACTORS, count), lanes, np.repeat(target, _FACTORS.size))
        grid = grid.reshape(count, _FACTORS.size)
        step = grid.argmax(axis=1)
        reached = grid.any(axis=1) & (step > 0)
        low, high = np.log(_FACTORS[np.maximum(step - 1, 0)]), np.log(_FACTORS[step])
        for _ in range(_HALVINGS):
            middle = 0.5 * (low + high)
            over = above(np.exp(middle), stream, target)
            low, high = np.where(over, low, middle), np.where(over, middle, high)
        flow = stream.mass_flow * np.exp(high)
        met = family.at(element, stream.with_flow(flow))[key]
        same = abs(met - target) <= _SAME * abs(target)
    return np.where(reached & same, flow, np.nan)


def _no_flow(
    request: Request, family: Family, element: Element, signal: Signal, index: int
) -> Finding:
    """Say what the signal can be at a point where no flow gives the one measured."""
    stream = request.stream.take(np.full(_FACTORS.size, index))
    with np.errstate(all="ignore"):
        found = family.at(element, stream.with_flow(stream.mass_flow * _FACTORS))[signal.key]
    known = found[np.isfinite(found)]
    name = request.names[index]
    why = ""
    if known.size and signal.value > known.max():
        most = say(signal.key, float(known.max()), request.tag.table("job.units"))
        why = f"; the most it can be there is {most}"
    elif known.size:
        why = ": below the low-flow cut-off the output shows none"
    return Finding(
        Level.STOP,
        "signal-out-of-reach",
        f"points.{name}",
        f"no flow gives {signal.text} ({in_sentence(signal.key)}) at the conditions of {name}"
        f"{why}. Check the signal, or state the conditions that it was read at",
        name,
    )


def _points(
    prepared: Prepared,
    request: Request,
    family: Family,
    signal: Signal,
    values: Mapping[str, Array],
) -> tuple[PointResult, ...]:
    tag, fluid = request.tag, prepared.fluid
    by_key = {item.key: item for item in (*COMMON_DERIVATIONS, *family.derivations)}
    states: Sequence[int] = [
        prepared.points.indices[prepared.points.names.index(name)] for name in request.names
    ]
    derived = assemble.derived(values, len(request.names), by_key)
    made = []
    for lane, name in enumerate(request.names):
        flow = float(request.stream.mass_flow[lane])
        row = assemble.flows_of(tag, fluid, flow, fluid.points[states[lane]])
        row["volume_flow"] = Result(float(request.stream.volume_flow[lane]), Origin.DERIVED)
        row |= derived[lane]
        row[signal.key] = Result(float(values[signal.key][lane]), Origin.GIVEN, text=signal.shown)
        made.append(PointResult(name, row))
    return tuple(made)
