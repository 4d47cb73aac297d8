"""Bore and range of a differential-pressure device: sized where free, rated where given."""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass, replace
from math import isfinite, sqrt

import numpy as np
from numpy.typing import NDArray

from specsheet.findings import Finding, Level, Origin
from specsheet.meters.dp import transmitter
from specsheet.meters.dp.device import Bounds, Device, Lanes, Prepared
from specsheet.meters.dp.response import flow_from, lanes_of, pressure_of, ratio_for
from specsheet.meters.family import Array, Element, Given, Request, Stream
from specsheet.methods import iso5167_1 as equation
from specsheet.sources import PRACTICE, cite

#: how often the leading point may change
_ROUNDS = 3

#: above this diameter ratio nothing narrows the pipe any more [-]
_WIDEST = 0.95

#: a range below this share of the static pressure is left to the transmitter's static-pressure
#: error [-], and what a decade below it costs beside a diameter ratio off its target [-] (both
#: common practice, no source)
_LEAST_SHARE, _SMALL_RANGE = 0.002, 0.5

#: step to which a machined dimension is rounded, so that Δp falls [m]
STEP = 1e-5

RANGE = "differential_pressure_range"
UNCERTAINTIES = ("pipe_diameter_uncertainty", "bore_uncertainty")


@dataclass(frozen=True)
class Task:
    """What is to be sized, with the numbers that do not depend on the result.

    Attributes:
        device, request: what and for whom.
        prepared: what the device read from its own entries.
        bounds: within what the sizing may move.
        numbers, choices: of the element, but for "size" and "range".
        lead: index of the point that gives the largest Δp.
        flow: flow at the upper range value, where that is free to choose [kg/s].
    """

    device: Device
    request: Request
    prepared: Prepared
    bounds: Bounds
    numbers: Mapping[str, float]
    choices: Mapping[str, str]
    lead: int
    flow: float

    def conditions(self, count: int) -> Stream:
        """Return the leading point ``count`` times, at the flow of the upper range value."""
        index: NDArray[np.intp] = np.full(count, self.lead, dtype=np.intp)
        return self.request.stream.take(index).with_flow(np.full(count, self.flow))

    def element(self, size: float, span: float) -> Element:
        """Return a bare element of an effective dimension [m] and a range [Pa]."""
        numbers = {**self.numbers, "size": size, "range": span}
        return Element(numbers=numbers, values={}, choices=self.choices)


@dataclass(frozen=True)
class Sized:
    """What came out: effective and machined dimension [m], range [Pa], where each comes from."""

    size: float
    machined: float
    span: float
    size_origin: Origin
    span_origin: Origin
    findings: tuple[Finding, ...] = ()


def task(device: Device, request: Request) -> Task:
    """Collect what the sizing needs."""
    prepared = device.prepare(request)
    stream = request.stream
    lead = int(np.argmax(stream.mass_flow**2 / stream.density))
    margin = request.tag.si("meter.margin") or 0.0
    keys = (*transmitter.ERRORS, *UNCERTAINTIES)
    numbers = {
        "inside_diameter": request.pipe.inside_diameter,
        "pipe_expansion": request.pipe.expansion,
        "element_expansion": request.pipe.expansion,
        "cut_off": request.tag.si("meter.low_cut_off") or 0.0,
        "calibrated_coefficient": _or_nan(request, "discharge_coefficient"),
        "calibrated_uncertainty": _or_nan(request, "discharge_coefficient_uncertainty"),
        **{key: request.tag.si(f"meter.{key}") or 0.0 for key in UNCERTAINTIES},
        **transmitter.error_numbers(request),
        **prepared.numbers,
    }
    choices = {**transmitter.origins(request, keys), **prepared.choices}
    bounds = device.bounds(request, prepared)
    target = request.tag.si("meter.target_diameter_ratio")
    if target is not None:
        bounds = replace(bounds, target=target)
    flow = float(stream.mass_flow[lead]) * (1.0 + margin)
    return Task(device, request, prepared, bounds, numbers, choices, lead, flow)


def _or_nan(request: Request, key: str) -> float:
    value = request.tag.si(f"meter.{key}")
    return np.nan if value is None else value


@dataclass(frozen=True)
class Led:
    """A task with the point that leads it, what it comes to, and Δp at the points [Pa]."""

    task: Task
    sized: Sized
    pressure: Array


def led(of: Task) -> Led:
    """Return the task led by the point that gives the largest Δp with the element as sized.

    The first guess is the largest qm²/ρ; expansion of a gas can make another point harder, but not
    where all points stand under the same conditions.
    """
    stream = of.request.stream
    found = _solved(of)
    if stream.alike:
        return found
    for _ in range(_ROUNDS):
        lead = int(np.argmax(found.pressure))
        if not np.isfinite(found.pressure).all() or lead == of.lead:
            break
        margin = of.flow / float(stream.mass_flow[of.lead])
        of = replace(of, lead=lead, flow=float(stream.mass_flow[lead]) * margin)
        found = _solved(of)
    return found


def _solved(of: Task) -> Led:
    sized = solve(of)
    element = of.element(sized.size, sized.span)
    return Led(of, sized, pressure_of(of.device, element, of.request.stream))


def solve(of: Task) -> Sized:
    """Size or rate: bore and range each given or free."""
    shape, tag = of.device.shape, of.request.tag
    given = tag.si(f"meter.{shape.entry}")
    span = tag.si(f"meter.{RANGE}")
    if given is not None and given > 0.0:
        size = shape.effective(given, of.numbers)
        if span is None:
            return _range_for(of, size, given)
        return Sized(size, given, span, Origin.GIVEN, tag.origin(f"meter.{RANGE}"))
    if span is None:
        return _both(of)
    ratio = float(_Asked.of(of, np.array([span])).ratios()[0])
    if ratio < _WIDEST:
        return _machine(of, ratio, span, Origin.GIVEN)
    sized = _machine(of, of.bounds.largest, span, Origin.GIVEN)
    return replace(sized, findings=(_impossible(of, span),))


@dataclass(frozen=True)
class _Asked:
    """Upper range values [Pa] to size for, with the stream and the flow in the device at each.

    The diameter ratio of ``lanes`` is the one aimed at.
    """

    device: Device
    spans: Array
    stream: Stream
    lanes: Lanes

    @classmethod
    def of(cls, task: Task, spans: Array) -> _Asked:
        """Return the leading point at each upper range value."""
        stream = task.conditions(spans.size)
        share = float(task.device.shape.share(np.array([task.bounds.target]))[0])
        aimed = task.element(task.numbers["inside_diameter"] * share, 1.0)
        return cls(task.device, spans, stream, lanes_of(task.device, aimed, stream))

    def ratios(self) -> Array:
        """Return β for each upper range value, NaN where none gives it."""
        return ratio_for(self.device, self.lanes, self.stream, self.spans)


def _machine(of: Task, ratio: float, span: float, span_origin: Origin) -> Sized:
    """Turn β at operating temperature into a dimension at 20 °C, rounded up to the step."""
    temperature = float(of.request.stream.temperature[of.lead])
    inside = equation.grown(
        length=of.numbers["inside_diameter"],
        expansion=of.numbers["pipe_expansion"],
        temperature=temperature,
    )
    hot = inside * float(of.device.shape.share(np.array([ratio]))[0])
    cold = hot / equation.grown(
        length=1.0, expansion=of.numbers["element_expansion"], temperature=temperature
    )
    exact = of.device.shape.machined(cold, of.numbers)
    steps = round(exact / STEP, 6)
    whole = np.ceil(steps) if of.device.shape.widens else np.floor(steps)
    machined = round(float(whole) * STEP, 9)
    size = of.device.shape.effective(machined, of.numbers)
    return Sized(size, machined, span, Origin.DERIVED, span_origin)


def _range_for(of: Task, size: float, given: float) -> Sized:
    """Choose the preferred range that holds the largest Δp of a given bore."""
    stream = of.request.stream
    grown = of.flow / float(stream.mass_flow[of.lead])
    lanes = stream.with_flow(stream.mass_flow * grown)
    found = pressure_of(of.device, of.element(size, 1.0), lanes)
    top = float(np.nanmax(found)) if np.isfinite(found).any() else np.nan
    findings: tuple[Finding, ...] = ()
    if not np.isfinite(found).all():
        findings = (
            Finding(
                Level.STOP,
                "differential-pressure-impossible",
                f"meter.{of.device.shape.entry}",
                f"the stated {of.device.shape.label} cannot pass the largest flow: the gas would "
                f"choke; state a larger {of.device.shape.label}, or let it be sized",
            ),
        )
    span = transmitter.next_range(top) if np.isfinite(top) else float(transmitter.SERIES[-1])
    return Sized(size, given, span, Origin.GIVEN, Origin.DERIVED, findings)


def _both(of: Task) -> Sized:
    """Choose the preferred range whose β comes nearest to the target within all bounds."""
    bounds, spans = of.bounds, transmitter.SERIES
    asked = _Asked.of(of, spans)
    stream, ratios = asked.stream, asked.ratios()
    lanes = asked.lanes.with_ratio(ratios)
    vapour = np.where(np.isnan(stream.vapour_pressure), 0.0, stream.vapour_pressure)
    with np.errstate(all="ignore"):
        loss = of.device.loss(lanes, of.device.coefficient(lanes)) * spans
        back = float(of.request.stream.mass_flow[of.lead]) / of.flow
        size = lanes.inside_diameter * of.device.shape.share(ratios)
        broken = (
            ((ratios < bounds.smallest) | (ratios > bounds.largest)).astype(float)
            + (size < bounds.smallest_bore)
            + (spans > bounds.largest_differential)
            + (~np.isnan(stream.isentropic_exponent))
            * (spans > bounds.largest_drop * stream.pressure)
            + _excess(loss * back * back, _largest_loss(of.request))
            + (spans >= stream.pressure - vapour)
        )
        small = np.log10(np.maximum(_LEAST_SHARE * stream.pressure / spans, 1.0))
        wish = abs(ratios - bounds.target) + _SMALL_RANGE * small
        score = np.where(~(ratios < _WIDEST), np.inf, wish + 10.0 * broken)
    index = int(np.argmin(score))
    if not np.isfinite(score[index]):
        sized = _machine(of, bounds.largest, float(spans[index]), Origin.DERIVED)
        return replace(sized, findings=(_impossible(of, float(spans[index])),))
    sized = _machine(of, float(ratios[index]), float(spans[index]), Origin.DERIVED)
    if score[index] < 10.0:
        return sized
    return replace(sized, findings=(_no_match(of, float(spans[index])),))


def _excess(loss: Array, allowed: float) -> Array:
    """Return 0 where the loss is allowed, above 1 and rising with the loss where it is not."""
    return np.where(loss > allowed, 1.0 + np.log(np.maximum(loss / allowed, 1.0)), 0.0)


def _largest_loss(request: Request) -> float:
    stated = (request.tag.si("meter.maximum_loss"), request.tag.si("require.pressure_loss"))
    return min((value for value in stated if value is not None), default=float("inf"))


def _impossible(of: Task, span: float) -> Finding:
    label = of.device.shape.label
    return Finding(
        Level.STOP,
        f"{of.device.shape.entry.replace('_', '-')}-impossible",
        f"meter.{RANGE}",
        f"no {label} gives {span / 100.0:.4g} mbar at the largest flow; the values printed are for "
        f"the largest usual {label}. State another range, or let the range be sized",
        source=cite("iso5167-1"),
    )


def _no_match(of: Task, span: float) -> Finding:
    return Finding(
        Level.CAUTION,
        "sizing-compromise",
        f"meter.{of.device.shape.entry}",
        f"no preferred range meets diameter ratio, pressure ratio and permitted loss together; "
        f"{span / 100.0:.4g} mbar comes nearest. Allow more loss or choose another line size",
        source=PRACTICE,
    )


def second_range(of: Led, bare: Element) -> tuple[float, tuple[Finding, ...]]:
    """Return the range of a second, stacked transmitter [Pa] (0 for none), and what to say."""
    tag, pressure = of.task.request.tag, of.pressure
    stated = tag.si("meter.second_range")
    if stated is not None:
        return transmitter.below(stated, bare.numbers["range"])
    known = [value for value in pressure.tolist() if isfinite(value)]
    if not known:
        return 0.0, ()
    lowest, span = min(known), bare.numbers["range"]
    proposal = transmitter.next_range(sqrt(lowest * span))
    if tag.text("meter.second_range") == "propose":
        return (proposal, ()) if proposal < span else (0.0, ())
    parts = transmitter.contributions(bare.numbers, bare.choices, np.array([lowest]))
    share = 2.0 * float(np.sqrt(sum(part.relative[0] ** 2 for part in parts))) if parts else 0.0
    if share <= 0.01 or proposal >= span:
        return 0.0, ()
    return 0.0, (
        Finding(
            Level.NOTE,
            "second-transmitter",
            "meter.second_range",
            f"at the smallest flow the transmitter alone adds {share * 100.0:.2g} % (k = 2); a "
            f"second transmitter of {proposal / 100.0:.4g} mbar on the same taps would reach lower",
            source=PRACTICE,
        ),
    )


def upper_flow(of: Task, element: Element) -> float:
    """Return the flow at the upper range value, at the leading point's conditions [kg/s]."""
    stream = of.conditions(1)
    span = np.array([element.numbers["range"]])
    return float(flow_from(of.device, element, stream, span)[0])


def given_values(of: Task, sized: Sized) -> dict[str, Given]:
    """Return the dimensions and the range, as they are printed."""
    device, numbers = of.device, of.numbers
    temperature = float(of.request.stream.temperature[of.request.normal])
    inside = equation.grown(
        length=numbers["inside_diameter"],
        expansion=numbers["pipe_expansion"],
        temperature=temperature,
    )
    hot = equation.grown(
        length=sized.size, expansion=numbers["element_expansion"], temperature=temperature
    )
    grown = hot / sized.size
    ratio = float(device.shape.ratio(np.array([hot / inside]))[0])
    clause = cite("iso5167-1")
    values = {
        device.shape.term: Given(sized.machined, sized.size_origin, device.source),
        "diameter_ratio": Given(ratio, Origin.DERIVED, device.source),
        "inside_diameter_hot": Given(inside, Origin.DERIVED, clause),
        RANGE: Given(sized.span, sized.span_origin, PRACTICE),
        "element_expansion": Given(
            numbers["element_expansion"], Origin.DERIVED, "table of materials"
        ),
    }
    if device.shape.hot_term:
        values[device.shape.hot_term] = Given(sized.machined * grown, Origin.DERIVED, clause)
    return values
